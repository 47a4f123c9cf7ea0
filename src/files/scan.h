/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>

/* A look at JSON text (RFC 8259) before anything is built from it: UTF-8, the
 * whole grammar, nesting, number form, count of values.  What passes can be
 * given to the JSON library, which takes more than the standard does.  Linear, no memory. */

typedef struct { gsize most_bytes; int most_depth; gsize most_values; } KhScanLimits;

/* FALSE: *fault (owned) says what is wrong, with line and column where it has a place. */
gboolean kh_scan_json (const char *bytes, gsize n, const KhScanLimits *limits, char **fault);

/* On text that has passed: the first character past the value that starts here, past white space. */
const char *kh_scan_skip_value (const char *text);
const char *kh_scan_skip_space (const char *text);
