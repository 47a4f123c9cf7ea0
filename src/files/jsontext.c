/* SPDX-License-Identifier: MIT */
#include "files/jsontext.h"
#include "base/units.h"
#include <math.h>
#include <string.h>

void kh_json_append_text (GString *json, const char *text)
{
  if (!text)
    {
      g_string_append (json, "null");
      return;
    }
  g_string_append_c (json, '"');
  for (; *text; text++)
    {
      guchar c = (guchar)*text;
      if (c == '"' || c == '\\')
        g_string_append_printf (json, "\\%c", c);
      else if (c == '\n')
        g_string_append (json, "\\n");
      else if (c == '\t')
        g_string_append (json, "\\t");
      else if (c < 0x20 || c == 0x7f)
        g_string_append_printf (json, "\\u%04x", c);
      else
        g_string_append_c (json, (char)c);
    }
  g_string_append_c (json, '"');
}

void kh_json_append_number (GString *json, double value)
{
  g_autofree char *text = isfinite (value) ? kh_number_dup_file_text (value) : g_strdup ("null");
  g_string_append (json, text);
}

void kh_json_append_fixed (GString *json, double value, int decimals)
{
  double factor = pow (10, decimals);
  kh_json_append_number (json, round (value * factor) / factor);
}

void kh_json_append_nm (GString *json, int64_t nm)
{
  g_autofree char *text = kh_nm_dup_file_text (nm);
  g_string_append (json, text);
}

void kh_json_append_milli (GString *json, int64_t milli)
{
  g_string_append_printf (json, "%s%" G_GINT64_FORMAT, milli < 0 ? "-" : "", ABS (milli) / 1000);
  int rest = (int)(ABS (milli) % 1000);
  if (rest == 0)
    return;
  g_string_append_printf (json, ".%03d", rest);
  while (json->str[json->len - 1] == '0')
    g_string_truncate (json, json->len - 1);
}

void kh_json_append_boolean (GString *json, gboolean value) { g_string_append (json, value ? "true" : "false"); }
