/* SPDX-License-Identifier: MIT */
#include "base/units.h"
#include <glib/gi18n-lib.h>
#include <locale.h>
#include <math.h>
#include <stdlib.h>
#include <string.h>

#define MOST_NM (G_GINT64_CONSTANT (9000000) * KH_NM_PER_MM) /* 9 km */
#define NARROW_SPACE "\u202f"

G_DEFINE_QUARK (kh - units - error - quark, kh_units_error)

int64_t kh_nm_from_mm (double mm) { return (int64_t)llround (mm * (double)KH_NM_PER_MM); }

double kh_mm_from_nm (int64_t nm) { return (double)nm / (double)KH_NM_PER_MM; }

char *kh_nm_dup_file_text (int64_t nm)
{
  uint64_t size = nm < 0 ? 0 - (uint64_t)nm : (uint64_t)nm;
  uint64_t whole = size / (uint64_t)KH_NM_PER_MM, rest = size % (uint64_t)KH_NM_PER_MM;
  GString *text = g_string_new (nm < 0 ? "-" : "");
  g_string_append_printf (text, "%" G_GUINT64_FORMAT, whole);
  if (rest != 0)
    {
      g_string_append_printf (text, ".%06" G_GUINT64_FORMAT, rest);
      while (text->str[text->len - 1] == '0')
        g_string_truncate (text, text->len - 1);
    }
  return g_string_free (text, FALSE);
}

/* "1.25e-07" -> "0.000000125"; text without an exponent is given back as it is. */
static char *without_exponent (const char *text)
{
  const char *e = strpbrk (text, "eE");
  if (!e)
    return g_strdup (text);
  gboolean negative = text[0] == '-';
  g_autoptr (GString) digits = g_string_new (NULL);
  int point = -1;
  for (const char *c = text + negative; c < e; c++)
    {
      if (*c == '.')
        point = (int)digits->len;
      else
        g_string_append_c (digits, *c);
    }
  if (point < 0)
    point = (int)digits->len;
  point += (int)g_ascii_strtoll (e + 1, NULL, 10);
  while (point <= 0)
    {
      g_string_prepend_c (digits, '0');
      point++;
    }
  while (point > (int)digits->len)
    g_string_append_c (digits, '0');
  if (point < (int)digits->len)
    g_string_insert_c (digits, point, '.');
  return g_strconcat (negative ? "-" : "", digits->str, NULL);
}

char *kh_number_dup_file_text (double value)
{
  char buffer[G_ASCII_DTOSTR_BUF_SIZE];
  g_assert (isfinite (value));
  for (int digits = 15; digits <= 17; digits++)
    {
      g_autofree char *format = g_strdup_printf ("%%.%dg", digits);
      g_ascii_formatd (buffer, sizeof buffer, format, value);
      if (g_ascii_strtod (buffer, NULL) == value)
        break;
    }
  return without_exponent (strcmp (buffer, "-0") == 0 ? "0" : buffer);
}

/* "12345" -> "12 345" with a narrow no-break space. */
static void append_grouped (GString *text, uint64_t whole)
{
  g_autofree char *digits = g_strdup_printf ("%" G_GUINT64_FORMAT, whole);
  gsize n = strlen (digits);
  for (gsize i = 0; i < n; i++)
    {
      if (i > 0 && (n - i) % 3 == 0)
        g_string_append (text, NARROW_SPACE);
      g_string_append_c (text, digits[i]);
    }
}

static void append_mm (GString *text, uint64_t nm)
{
  uint64_t hundredths = (nm + 5000) / 10000;
  append_grouped (text, hundredths / 100);
  unsigned rest = (unsigned)(hundredths % 100);
  if (rest == 0)
    return;
  g_string_append (text, localeconv ()->decimal_point);
  if (rest % 10 == 0)
    g_string_append_printf (text, "%u", rest / 10);
  else
    g_string_append_printf (text, "%02u", rest);
}

static void append_inches (GString *text, uint64_t nm, uint64_t part)
{
  uint64_t inch = (uint64_t)KH_NM_PER_INCH;
  uint64_t parts = (nm * part + inch / 2) / inch;
  uint64_t whole = parts / part, over = parts % part;
  while (over != 0 && over % 2 == 0)
    {
      over /= 2;
      part /= 2;
    }
  if (whole != 0 || over == 0)
    append_grouped (text, whole);
  if (over != 0)
    g_string_append_printf (text, "%s%" G_GUINT64_FORMAT "/%" G_GUINT64_FORMAT, whole != 0 ? " " : "", over, part);
}

char *kh_length_dup_text (int64_t nm, KhLengthUnit unit, gboolean with_unit)
{
  GString *text = g_string_new (nm < 0 ? "\u2212" : "");
  uint64_t size = nm < 0 ? 0 - (uint64_t)nm : (uint64_t)nm;
  if (unit == KH_LENGTH_UNIT_MM)
    append_mm (text, size);
  else
    append_inches (text, size, unit == KH_LENGTH_UNIT_INCH_16 ? 16 : 32);
  if (with_unit)
    g_string_append (text, unit == KH_LENGTH_UNIT_MM ? " mm" : " in");
  return g_string_free (text, FALSE);
}

static const char *skip_space (const char *text)
{
  while (*text != '\0' && g_unichar_isspace (g_utf8_get_char (text)))
    text = g_utf8_next_char (text);
  return text;
}

/* Digits with one decimal point ('.' or ','); NULL when there is no digit. */
static const char *read_decimal (const char *text, double *value)
{
  g_autoptr (GString) digits = g_string_new (NULL);
  gboolean point = FALSE, any = FALSE;
  for (; g_ascii_isdigit (*text) || ((*text == '.' || *text == ',') && !point); text++)
    {
      if (g_ascii_isdigit (*text))
        any = TRUE;
      else
        point = TRUE;
      g_string_append_c (digits, *text == ',' ? '.' : *text);
    }
  if (!any)
    return NULL;
  *value = g_ascii_strtod (digits->str, NULL);
  return text;
}

/* "7", "7 1/16", "7-1/16", "1/2": NULL when none stands here. */
static const char *read_number (const char *text, double *value)
{
  double first, second, third;
  const char *end = read_decimal (text, &first);
  if (!end)
    return NULL;
  if (*end == '/')
    {
      end = read_decimal (end + 1, &second);
      if (!end || second == 0)
        return NULL;
      *value = first / second;
      return end;
    }
  *value = first;
  const char *next = *end == '-' ? end + 1 : skip_space (end);
  const char *slash = read_decimal (next, &second);
  if (next == end || !slash || *slash != '/')
    return end;
  slash = read_decimal (slash + 1, &third);
  if (!slash || third == 0)
    return NULL;
  *value += second / third;
  return slash;
}

/* Nanometres in the unit that stands here; *end is moved past it.  0: no unit known. */
static double read_unit (const char *text, KhLengthUnit bare, const char **end)
{
  static const struct
  {
    const char *name;
    double nm;
  } units[] = {
    { "mm", 1e6 },        { "cm", 1e7 },         { "dm", 1e8 },         { "inches", 25.4e6 },
    { "inch", 25.4e6 },   { "in", 25.4e6 },      { "\"", 25.4e6 },      { "\u2033", 25.4e6 },
    { "\u201d", 25.4e6 }, { "feet", 304.8e6 },   { "foot", 304.8e6 },   { "ft", 304.8e6 },
    { "'", 304.8e6 },     { "\u2032", 304.8e6 }, { "\u2019", 304.8e6 }, { "m", 1e9 },
  };
  *end = text;
  if (*text == '\0')
    return bare == KH_LENGTH_UNIT_MM ? 1e6 : 25.4e6;
  for (gsize i = 0; i < G_N_ELEMENTS (units); i++)
    {
      gsize n = strlen (units[i].name);
      if (g_ascii_strncasecmp (text, units[i].name, n) == 0 && !g_ascii_isalpha (text[n]))
        {
          *end = text + n;
          return units[i].nm;
        }
    }
  return 0;
}

gboolean kh_length_parse (const char *text, KhLengthUnit unit, int64_t *nm, GError **error)
{
  const char *at = skip_space (text);
  double sign = 1, sum = 0;
  if (*at == '-' || g_str_has_prefix (at, "\u2212"))
    {
      sign = -1;
      at = skip_space (g_utf8_next_char (at));
    }
  do
    {
      double value;
      const char *end = read_number (at, &value);
      if (!end)
        {
          g_set_error (error, KH_UNITS_ERROR, KH_UNITS_ERROR_NOT_A_NUMBER,
                       _ ("“%s” is not a length; give a number such as 180, 18 cm or 7 1/16 in"), text);
          return FALSE;
        }
      at = skip_space (end);
      double factor = read_unit (at, unit, &end);
      if (factor == 0)
        {
          g_set_error (error, KH_UNITS_ERROR, KH_UNITS_ERROR_UNIT,
                       _ ("“%s” does not end in a unit that is known; use mm, cm, m, in or ft"), text);
          return FALSE;
        }
      sum += value * factor;
      at = skip_space (end);
  } while (*at != '\0');
  if (!(sum <= (double)MOST_NM))
    {
      g_set_error (error, KH_UNITS_ERROR, KH_UNITS_ERROR_RANGE, _ ("“%s” is longer than 9 km; give a smaller length"),
                   text);
      return FALSE;
    }
  *nm = (int64_t)llround (sign * sum);
  return TRUE;
}
