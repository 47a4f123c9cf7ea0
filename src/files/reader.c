/* SPDX-License-Identifier: MIT */
#include "files/reader.h"
#include "files/planfile.h"
#include "files/scan.h"
#include <cjson/cJSON.h>
#include <glib/gi18n-lib.h>
#include <limits.h>
#include <math.h>
#include <string.h>

#define MOST_DEPTH 32
#define MOST_QUOTED 48

struct KhReader
{
  cJSON *tree;
  char *name, *text;
  GString *path;
  GPtrArray *faults; /* borrowed */
};

static void tell (KhReader *reader, char *message_taken)
{
  g_autofree char *message = message_taken;
  if (!kh_reader_is_full (reader))
    g_ptr_array_add (reader->faults, g_strdup_printf ("%s: %s", reader->name, message));
}

/* A member twice: a set for each object. */
static void find_doubles (KhReader *reader, const cJSON *item)
{
  g_autoptr (GHashTable) names = cJSON_IsObject (item) ? g_hash_table_new (g_str_hash, g_str_equal) : NULL;
  guint index = 0;
  for (const cJSON *child = item->child; child && !kh_reader_is_full (reader); child = child->next, index++)
    {
      if (!names && !cJSON_IsObject (child) && !cJSON_IsArray (child))
        continue;
      gsize mark = names ? kh_reader_enter_member (reader, child->string) : kh_reader_enter_index (reader, index);
      if (names && !g_hash_table_add (names, child->string))
        tell (reader, g_strdup_printf (_ ("%s: this member stands twice; keep one of them"), reader->path->str));
      if (child->child)
        find_doubles (reader, child);
      kh_reader_leave (reader, mark);
    }
}

KhReader *kh_reader_new (const char *bytes, gsize n, const char *name, GPtrArray **faults, KhNode *root)
{
  const KhScanLimits limits = { KH_PLAN_FILE_MOST_BYTES, MOST_DEPTH, KH_PLAN_FILE_MOST_VALUES };
  if (!*faults)
    *faults = g_ptr_array_new_with_free_func (g_free);
  KhReader *reader = g_new0 (KhReader, 1);
  char *fault = NULL;
  reader->name = g_strdup (strcmp (name, "-") == 0 ? _ ("standard input") : name);
  reader->path = g_string_new (NULL);
  reader->faults = *faults;
  if (n == 0)
    tell (reader, g_strdup (_ ("the file is empty")));
  else if (!kh_scan_json (bytes, n, &limits, &fault))
    tell (reader, fault);
  else
    {
      reader->text = g_strndup (bytes, n);
      reader->tree = cJSON_ParseWithLengthOpts (reader->text, n + 1, NULL, 1);
      if (!reader->tree)
        tell (reader, g_strdup (_ ("this is no JSON text that can be read")));
      else
        find_doubles (reader, reader->tree);
    }
  if (!reader->tree || reader->faults->len > 0)
    {
      kh_reader_free (reader);
      return NULL;
    }
  const char *source = kh_scan_skip_space (reader->text);
  *root = (KhNode){ reader->tree, source, kh_scan_skip_value (source) };
  return reader;
}

void kh_reader_free (KhReader *reader)
{
  if (!reader)
    return;
  cJSON_Delete (reader->tree);
  g_free (reader->name);
  g_free (reader->text);
  g_string_free (reader->path, TRUE);
  g_free (reader);
}

gsize kh_reader_enter_member (KhReader *reader, const char *name)
{
  gsize mark = reader->path->len;
  g_string_append_printf (reader->path, "%s%s", mark > 0 ? "." : "", name);
  return mark;
}

gsize kh_reader_enter_index (KhReader *reader, guint index)
{
  gsize mark = reader->path->len;
  g_string_append_printf (reader->path, "[%u]", index);
  return mark;
}

void kh_reader_leave (KhReader *reader, gsize mark) { g_string_truncate (reader->path, mark); }

/* The source of a value on one line, cut short. */
static char *dup_quoted (KhNode node)
{
  g_autofree char *source = g_strndup (node.source, (gsize)(node.end - node.source));
  g_strdelimit (source, "\n\r\t", ' ');
  if (g_utf8_strlen (source, -1) <= MOST_QUOTED)
    return g_strdup (source);
  g_autofree char *cut = g_utf8_substring (source, 0, MOST_QUOTED);
  return g_strconcat (cut, "…", NULL);
}

void kh_reader_fault (KhReader *reader, KhNode node, const char *wanted_format, ...)
{
  va_list args;
  va_start (args, wanted_format);
  g_autofree char *wanted = g_strdup_vprintf (wanted_format, args);
  va_end (args);
  g_autofree char *quoted = dup_quoted (node);
  const char *path = reader->path->len > 0 ? reader->path->str : _ ("the whole file");
  /* Translators: member's path, what stands there, what is asked for. */
  tell (reader, g_strdup_printf (_ ("%s: here stands %s; %s"), path, quoted, wanted));
}

void kh_reader_missing (KhReader *reader, const char *member, const char *wanted)
{
  gsize mark = kh_reader_enter_member (reader, member);
  tell (reader, g_strdup_printf (_ ("%s: this member is missing; %s"), reader->path->str, wanted));
  kh_reader_leave (reader, mark);
}

gboolean kh_reader_has_faults (const KhReader *reader) { return reader->faults->len > 0; }

gboolean kh_reader_is_full (const KhReader *reader) { return reader->faults->len >= KH_PLAN_FILE_MOST_FAULTS; }

gboolean kh_node_is_object (KhNode node) { return cJSON_IsObject (node.item); }

gboolean kh_node_is_array (KhNode node) { return cJSON_IsArray (node.item); }

gboolean kh_node_is_null (KhNode node) { return cJSON_IsNull (node.item); }

gboolean kh_node_get_number (KhNode node, double *value)
{
  const cJSON *item = node.item;
  if (!cJSON_IsNumber (item) || !isfinite (item->valuedouble))
    return FALSE;
  *value = item->valuedouble;
  return TRUE;
}

gboolean kh_node_get_whole (KhNode node, int *value)
{
  double number;
  if (!kh_node_get_number (node, &number) || number != floor (number) || number < INT_MIN || number > INT_MAX)
    return FALSE;
  *value = (int)number;
  return TRUE;
}

gboolean kh_node_get_boolean (KhNode node, gboolean *value)
{
  if (!cJSON_IsBool (node.item))
    return FALSE;
  *value = cJSON_IsTrue (node.item) ? TRUE : FALSE;
  return TRUE;
}

const char *kh_node_get_text (KhNode node)
{
  const cJSON *item = node.item;
  return cJSON_IsString (item) ? item->valuestring : NULL;
}

gsize kh_node_get_length (KhNode node)
{
  gsize n = 0;
  for (const cJSON *child = ((const cJSON *)node.item)->child; child; child = child->next)
    n++;
  return n;
}

/* Tree and source are walked side by side: the library keeps the order of the text. */
gboolean kh_node_next (KhNode of, KhStep *step)
{
  const cJSON *item = step->begun ? ((const cJSON *)step->item)->next : ((const cJSON *)of.item)->child;
  const char *at = step->begun ? kh_scan_skip_space (step->source) : of.source;
  step->begun = TRUE;
  if (!item)
    return FALSE;
  at = kh_scan_skip_space (at + 1); /* past the opening or the comma */
  step->item = item;
  step->name = item->string;
  if (item->string)
    {
      step->name_source = at;
      step->name_end = kh_scan_skip_value (at);
      at = kh_scan_skip_space (kh_scan_skip_space (step->name_end) + 1); /* past the colon */
    }
  step->value = (KhNode){ item, at, kh_scan_skip_value (at) };
  step->source = step->value.end;
  return TRUE;
}

gboolean kh_node_get_wholes (KhNode node, int *values, gsize n)
{
  if (!kh_node_is_array (node))
    return FALSE;
  const cJSON *child = ((const cJSON *)node.item)->child;
  for (gsize i = 0; i < n; i++, child = child->next)
    if (!child || !kh_node_get_whole ((KhNode){ child, NULL, NULL }, &values[i]))
      return FALSE;
  return child == NULL;
}
