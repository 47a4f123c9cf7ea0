/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/plan.h"

/* The plan file: JSON text <-> KhPlan.  No header here shows a type of the JSON library. */

#define KH_PLAN_FILE_MOST_BYTES (8 * 1024 * 1024)
#define KH_PLAN_FILE_MOST_VALUES 2000000
#define KH_PLAN_FILE_MOST_FAULTS 20

/* Reads 'n' bytes.  On failure NULL, and *faults (of char *, owned by the
 * caller) holds one message a fault, up to 20: "name: walls.runs[3]: [0, 0, 2,
 * 1] does not lie on a lattice line; ...".  'name' is how the file is called in them. */
KhPlan *kh_plan_file_parse (const char *bytes, gsize n, const char *name, GPtrArray **faults);
/* NUL-terminated UTF-8, ends in a newline; the same plan gives the same bytes. Owned. */
char *kh_plan_file_dup_text (const KhPlan *plan);

/* Load and parse: the file's state comes back too, so that a later save can
 * tell whether another program wrote it meanwhile. */
KhPlan *kh_plan_file_load (const char *path, GPtrArray **faults);
