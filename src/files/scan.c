/* SPDX-License-Identifier: MIT */
#include "files/scan.h"
#include <glib/gi18n-lib.h>
#include <math.h>
#include <string.h>

#define MOST_NESTED 64
/* The JSON library copies a number into a buffer of 64. */
#define MOST_NUMBER 60

typedef struct
{
  const char *begin, *at, *end;
  const char *wrong; /* translated; NULL: all well so far */
} Scanner;

static gboolean refuse (Scanner *s, const char *wrong)
{
  if (!s->wrong)
    s->wrong = wrong;
  return FALSE;
}

static int peek (const Scanner *s) { return s->at < s->end ? (guchar)*s->at : -1; }

static void skip_space (Scanner *s)
{
  while (s->at < s->end && strchr (" \t\r\n", *s->at) && *s->at != '\0')
    s->at++;
}

static gboolean scan_hex (Scanner *s, unsigned *unit)
{
  *unit = 0;
  for (int i = 0; i < 4; i++)
    {
      int digit = s->at < s->end ? g_ascii_xdigit_value (*s->at) : -1;
      if (digit < 0)
        return refuse (s, _ ("\\u needs four hexadecimal digits"));
      *unit = *unit * 16 + (unsigned)digit;
      s->at++;
    }
  return TRUE;
}

/* After the backslash. */
static gboolean scan_escape (Scanner *s)
{
  int c = peek (s);
  unsigned unit, low;
  if (c > 0 && strchr ("\"\\/bfnrt", c))
    {
      s->at++;
      return TRUE;
    }
  if (c != 'u')
    return refuse (s, _ ("a backslash must be followed by one of \" \\ / b f n r t u"));
  s->at++;
  if (!scan_hex (s, &unit))
    return FALSE;
  if (unit == 0)
    return refuse (s, _ ("the character \\u0000 cannot stand in a text"));
  if (unit < 0xd800 || unit > 0xdfff)
    return TRUE;
  if (unit > 0xdbff || s->end - s->at < 6 || s->at[0] != '\\' || s->at[1] != 'u')
    return refuse (s, _ ("half of a surrogate pair stands alone"));
  s->at += 2;
  if (!scan_hex (s, &low))
    return FALSE;
  return low >= 0xdc00 && low <= 0xdfff ? TRUE : refuse (s, _ ("half of a surrogate pair stands alone"));
}

static gboolean scan_string (Scanner *s)
{
  s->at++;
  while (TRUE)
    {
      int c = peek (s);
      if (c < 0)
        return refuse (s, _ ("the text ends inside a string"));
      if (c < 0x20)
        return refuse (s, _ ("a control character stands in a string; write it as \\u00XX"));
      s->at++;
      if (c == '"')
        return TRUE;
      if (c == '\\' && !scan_escape (s))
        return FALSE;
    }
}

static gboolean scan_digits (Scanner *s)
{
  if (!g_ascii_isdigit (peek (s)))
    return refuse (s, _ ("a digit is missing in a number"));
  while (s->at < s->end && g_ascii_isdigit (*s->at))
    s->at++;
  return TRUE;
}

static gboolean scan_number (Scanner *s)
{
  const char *begin = s->at;
  if (peek (s) == '-')
    s->at++;
  if (peek (s) == '0' && s->at + 1 < s->end && g_ascii_isdigit (s->at[1]))
    return refuse (s, _ ("a number must not begin with 0"));
  if (!scan_digits (s))
    return FALSE;
  if (peek (s) == '.')
    {
      s->at++;
      if (!scan_digits (s))
        return FALSE;
    }
  if (peek (s) == 'e' || peek (s) == 'E')
    {
      s->at++;
      if (peek (s) == '+' || peek (s) == '-')
        s->at++;
      if (!scan_digits (s))
        return FALSE;
    }
  if (s->at - begin > MOST_NUMBER)
    {
      s->at = begin;
      return refuse (s, _ ("a number is longer than 60 characters"));
    }
  char copy[MOST_NUMBER + 1];
  memcpy (copy, begin, (gsize)(s->at - begin));
  copy[s->at - begin] = '\0';
  if (!isfinite (g_ascii_strtod (copy, NULL)))
    {
      s->at = begin;
      return refuse (s, _ ("a number is too large; a number must be finite"));
    }
  return TRUE;
}

static gboolean scan_word (Scanner *s)
{
  static const char *const words[] = { "true", "false", "null" };
  for (gsize i = 0; i < G_N_ELEMENTS (words); i++)
    {
      gsize n = strlen (words[i]);
      if ((gsize)(s->end - s->at) >= n && memcmp (s->at, words[i], n) == 0)
        {
          s->at += n;
          return TRUE;
        }
    }
  return refuse (s, s->at == s->end
                        ? _ ("the text ends where a value is asked for")
                        : _ ("a value is asked for here: a text in quotes, a number, true, false, null, [ or {"));
}

static gboolean scan_scalar (Scanner *s)
{
  int c = peek (s);
  if (c == '"')
    return scan_string (s);
  if (c == '-' || g_ascii_isdigit (c))
    return scan_number (s);
  return scan_word (s);
}

static gboolean scan_key (Scanner *s)
{
  skip_space (s);
  if (peek (s) != '"')
    return refuse (s, s->at == s->end ? _ ("the text ends inside an object")
                                      : _ ("a member's name in quotes is asked for here"));
  if (!scan_string (s))
    return FALSE;
  skip_space (s);
  if (peek (s) != ':')
    return refuse (s, _ ("a colon is missing after a member's name"));
  s->at++;
  skip_space (s);
  return TRUE;
}

/* Past a value: commas and closings, until another value is due or all is done.
 * TRUE with *more set. */
static gboolean scan_after (Scanner *s, char *stack, int *depth, gboolean *more)
{
  while (*depth > 0)
    {
      skip_space (s);
      int c = peek (s);
      char open = stack[*depth - 1];
      if (c == ',')
        {
          s->at++;
          skip_space (s);
          *more = TRUE;
          return open == '[' || scan_key (s);
        }
      if (c != (open == '[' ? ']' : '}'))
        return refuse (s, c < 0         ? _ ("the text ends too early; the file seems cut off")
                          : open == '[' ? _ ("a comma or ] is missing here")
                                        : _ ("a comma or } is missing here"));
      s->at++;
      (*depth)--;
    }
  *more = FALSE;
  return TRUE;
}

static gboolean scan_all (Scanner *s, const KhScanLimits *limits)
{
  char stack[MOST_NESTED];
  int depth = 0;
  gsize n_values = 0;
  gboolean more = TRUE;
  skip_space (s);
  while (more)
    {
      int c = peek (s);
      if (++n_values > limits->most_values)
        return refuse (s, _ ("there are more values than the 2,000,000 that are read"));
      if (c == '[' || c == '{')
        {
          if (depth == limits->most_depth)
            return refuse (s, _ ("lists and objects are nested deeper than 32"));
          stack[depth++] = (char)c;
          s->at++;
          skip_space (s);
          if (peek (s) != (c == '[' ? ']' : '}'))
            {
              if (c == '{' && !scan_key (s))
                return FALSE;
              continue;
            }
          s->at++;
          depth--;
        }
      else if (!scan_scalar (s))
        return FALSE;
      if (!scan_after (s, stack, &depth, &more))
        return FALSE;
    }
  skip_space (s);
  return s->at == s->end ? TRUE : refuse (s, _ ("something follows after the end"));
}

static char *dup_fault (const Scanner *s)
{
  int line = 1;
  const char *begin = s->begin;
  for (const char *c = s->begin; c < s->at; c++)
    if (*c == '\n')
      {
        line++;
        begin = c + 1;
      }
  return g_strdup_printf (_ ("line %d, column %ld: %s"), line, g_utf8_strlen (begin, s->at - begin) + 1, s->wrong);
}

gboolean kh_scan_json (const char *bytes, gsize n, const KhScanLimits *limits, char **fault)
{
  const char *bad;
  Scanner s = { bytes, bytes, bytes + n, NULL };
  g_assert (limits->most_depth <= MOST_NESTED);
  if (n > limits->most_bytes)
    {
      *fault = g_strdup_printf (_ ("the file is larger than the %zu MiB that are read"),
                                limits->most_bytes >> 20);
      return FALSE;
    }
  if (!g_utf8_validate_len (bytes, n, &bad))
    {
      s.at = bad;
      s.wrong = _ ("this is not UTF-8 text");
    }
  else if (n >= 3 && memcmp (bytes, "\xef\xbb\xbf", 3) == 0)
    s.wrong = _ ("the text begins with a byte order mark; save it as UTF-8 without one");
  else if (scan_all (&s, limits))
    return TRUE;
  *fault = dup_fault (&s);
  return FALSE;
}

const char *kh_scan_skip_space (const char *text) { return text + strspn (text, " \t\r\n"); }

const char *kh_scan_skip_value (const char *text)
{
  int depth = 0;
  do
    {
      switch (*text)
        {
        case '"':
          for (text++; *text != '"'; text++)
            if (*text == '\\')
              text++;
          text++;
          break;
        case '[':
        case '{':
          depth++;
          text++;
          break;
        case ']':
        case '}':
          depth--;
          text++;
          break;
        case ',':
        case ':':
        case ' ':
        case '\t':
        case '\r':
        case '\n':
          text++;
          break;
        default:
          text += strcspn (text, ",]} \t\r\n");
        }
  } while (depth > 0);
  return text;
}
