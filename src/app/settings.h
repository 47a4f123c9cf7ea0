/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/units.h"

/* What is remembered between starts: GSettings org.kerfhand.Kerfhand.  Where
 * the schema is not installed (a run out of the build folder) values are kept
 * for this run only.  Main thread only. */

int kh_settings_get_int (const char *key, int fallback);
void kh_settings_set_int (const char *key, int value);
char *kh_settings_dup_string (const char *key, const char *fallback); /* owned */
void kh_settings_set_string (const char *key, const char *value);
KhLengthUnit kh_settings_get_unit (void);
