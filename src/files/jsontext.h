/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include <stdint.h>

/* Pieces of JSON text: plain decimals, whatever the locale. */
void kh_json_append_text (GString *json, const char *text); /* quoted and escaped; NULL: null */
void kh_json_append_number (GString *json, double value);   /* shortest that reads back; not finite: null */
void kh_json_append_fixed (GString *json, double value, int decimals); /* rounded, trailing zeros dropped */
void kh_json_append_nm (GString *json, int64_t nm);         /* as millimetres, exact */
void kh_json_append_milli (GString *json, int64_t milli);   /* thousandths as a decimal, exact */
void kh_json_append_boolean (GString *json, gboolean value);
