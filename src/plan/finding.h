/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/lattice.h"

/* One thing the program has to say about a plan: a plain value, made by
 * layout, robot or panels, numbered by review, shown by canvas, card and print. */

typedef enum
{
  KH_SEVERITY_BREAKS,  /* stops the build or the run */
  KH_SEVERITY_HINDERS,
  KH_SEVERITY_NOTES
} KhSeverity;

typedef struct
{
  const char *code;    /* static: "island", "leak", ... */
  KhSeverity severity;
  int number;          /* from 1, given by review; 0 before */
  double at[2];        /* lattice units, columns then rows */
  GArray *cells;       /* of KhCell: what it is about; may be empty */
  GArray *edges;       /* of KhEdge: drawn with an outline; may be empty */
  char *wrong;         /* one sentence: what is wrong */
  char *effect;        /* one or two: what it does to the robot or the build; may be "" */
  char *reason;        /* set aside with these words; NULL = not set aside */
} KhFinding;

KhFinding *kh_finding_new (const char *static_code, KhSeverity severity, double column, double row);
void kh_finding_free (KhFinding *finding);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhFinding, kh_finding_free)
char *kh_finding_dup_text (const KhFinding *finding); /* both sentences in one line; owned */
const char *kh_severity_get_name (KhSeverity severity); /* "breaks", as in the JSON answers */
