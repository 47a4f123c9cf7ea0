/* SPDX-License-Identifier: MIT */
#pragma once
#include <gio/gio.h>

/* The drawn example plans, carried inside the programs (a GResource), so that
 * they are there installed or not. */
#define KH_EXAMPLE_FIRST "first-maze"

char **kh_example_dup_names (void);           /* sorted; owned (g_strfreev) */
char *kh_example_dup_text (const char *name); /* the plan file's bytes, NUL-terminated; NULL: no such example */
