/* SPDX-License-Identifier: MIT */
#include "files/fields.h"
#include "base/units.h"
#include "files/jsontext.h"
#include "plan/build.h"
#include <glib/gi18n-lib.h>
#include <math.h>
#include <string.h>

/* A number within the row's limits, or the fault told. */
static gboolean read_number (KhReader *reader, KhNode node, const KhField *field, double *value)
{
  gboolean whole = field->kind == KH_FIELD_INT || field->kind == KH_FIELD_COUNT;
  gboolean open = field->kind == KH_FIELD_COUNT || field->kind == KH_FIELD_DOUBLE_OPEN
                  || field->kind == KH_FIELD_NM_OPEN || field->kind == KH_FIELD_PRICE;
  double number;
  if (kh_node_get_number (node, &number) && number >= field->least && number <= field->most
      && (!whole || number == floor (number)))
    {
      *value = number;
      return TRUE;
    }
  g_autofree char *least = kh_number_dup_file_text (field->least), *most = kh_number_dup_file_text (field->most);
  kh_reader_fault (reader, node,
                   open    ? _ ("give a number from %s to %s, or null")
                   : whole ? _ ("give a whole number from %s to %s")
                           : _ ("give a number from %s to %s"),
                   least, most);
  return FALSE;
}

static void read_choice (KhReader *reader, KhNode node, const KhField *field, int *value)
{
  const char *text = kh_node_get_text (node);
  for (int i = 0; text && field->choices[i]; i++)
    if (strcmp (text, field->choices[i]) == 0)
      {
        *value = i;
        return;
      }
  g_autofree char *all = g_strjoinv ("\", \"", (char **)field->choices);
  kh_reader_fault (reader, node, _ ("give one of \"%s\""), all);
}

static void read_text (KhReader *reader, KhNode node, const KhField *field, char **into)
{
  const char *text = kh_node_get_text (node);
  if (!text)
    kh_reader_fault (reader, node, _ ("give a text in quotes"));
  else if (g_utf8_strlen (text, -1) > (glong)field->most)
    kh_reader_fault (reader, node, _ ("the text has %ld characters; give %ld at most"), g_utf8_strlen (text, -1),
                     (glong)field->most);
  else
    {
      g_free (*into);
      *into = g_strdup (text);
    }
}

static void read_range (KhReader *reader, KhNode node, const KhField *field, double into[2])
{
  KhStep step = { 0 };
  double pair[2];
  gsize n = 0;
  while (kh_node_is_array (node) && kh_node_next (node, &step))
    {
      if (n < 2 && !kh_node_get_number (step.value, &pair[n]))
        n = 2;
      n++;
    }
  if (n == 2 && pair[0] >= field->least && pair[1] <= field->most && pair[0] < pair[1])
    memcpy (into, pair, sizeof pair);
  else
    kh_reader_fault (reader, node, _ ("give two numbers, the least and the most, from %g to %g"), field->least,
                     field->most);
}

static void read_field (KhReader *reader, KhNode node, const KhField *field, gpointer into, gpointer context)
{
  gpointer at = (char *)into + field->offset;
  double number;
  switch (field->kind)
    {
    case KH_FIELD_OBJECT:
      kh_fields_read (field->object, reader, node, at, context);
      return;
    case KH_FIELD_SPECIAL:
      field->read (reader, node, into, context);
      return;
    case KH_FIELD_CHOICE:
      read_choice (reader, node, field, at);
      return;
    case KH_FIELD_TEXT:
      read_text (reader, node, field, at);
      return;
    case KH_FIELD_RANGE:
      read_range (reader, node, field, at);
      return;
    case KH_FIELD_BOOLEAN:
      if (!kh_node_get_boolean (node, at))
        kh_reader_fault (reader, node, _ ("give true or false"));
      return;
    default:
      break;
    }
  if (kh_node_is_null (node))
    switch (field->kind)
      {
      case KH_FIELD_DOUBLE_OPEN:
        *(double *)at = (double) NAN;
        return;
      case KH_FIELD_COUNT:
        *(int *)at = KH_COUNT_ANY;
        return;
      case KH_FIELD_NM_OPEN:
        *(int64_t *)at = KH_LENGTH_OPEN_NM;
        return;
      case KH_FIELD_PRICE:
        *(int64_t *)at = KH_PRICE_NONE;
        return;
      default:
        break;
      }
  if (!read_number (reader, node, field, &number))
    return;
  switch (field->kind)
    {
    case KH_FIELD_INT:
    case KH_FIELD_COUNT:
      *(int *)at = (int)number;
      break;
    case KH_FIELD_NM:
    case KH_FIELD_NM_OPEN:
      *(int64_t *)at = kh_nm_from_mm (number);
      break;
    case KH_FIELD_PRICE:
      *(int64_t *)at = (int64_t)llround (number * 1000);
      break;
    default:
      *(double *)at = number;
    }
}

static void keep_other (GString *other, const KhStep *step)
{
  if (other->len > 0)
    g_string_append (other, ", ");
  g_string_append_len (other, step->name_source, step->name_end - step->name_source);
  g_string_append (other, ": ");
  g_string_append_len (other, step->value.source, step->value.end - step->value.source);
}

void kh_fields_read (const KhFields *fields, KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  if (!kh_node_is_object (node))
    {
      kh_reader_fault (reader, node, _ ("give an object: { and }"));
      return;
    }
  KhStep step = { 0 };
  guint64 seen = 0;
  g_autoptr (GString) other = g_string_new (NULL);
  while (kh_node_next (node, &step))
    {
      const KhField *field = fields->rows;
      while (field->name && strcmp (field->name, step.name) != 0)
        field++;
      if (!field->name)
        {
          keep_other (other, &step);
          continue;
        }
      gsize mark = kh_reader_enter_member (reader, step.name);
      seen |= G_GUINT64_CONSTANT (1) << (field - fields->rows);
      read_field (reader, step.value, field, into, context);
      kh_reader_leave (reader, mark);
    }
  for (const KhField *field = fields->rows; field->name; field++)
    if (field->required && !(seen & (G_GUINT64_CONSTANT (1) << (field - fields->rows))))
      kh_reader_missing (reader, field->name, _ ("add it"));
  if (other->len > 0)
    {
      char **kept = (char **)(void *)((char *)into + fields->other_offset);
      g_free (*kept);
      *kept = g_strdup (other->str);
    }
}

static void write_choice (GString *json, const KhField *field, int value)
{
  kh_json_append_text (json, field->choices[value]);
}

static void write_value (GString *json, const KhField *field, gconstpointer from)
{
  gconstpointer at = (const char *)from + field->offset;
  switch (field->kind)
    {
    case KH_FIELD_DOUBLE:
    case KH_FIELD_DOUBLE_OPEN:
      kh_json_append_number (json, *(const double *)at);
      break;
    case KH_FIELD_RANGE:
      g_string_append_c (json, '[');
      kh_json_append_number (json, ((const double *)at)[0]);
      g_string_append (json, ", ");
      kh_json_append_number (json, ((const double *)at)[1]);
      g_string_append_c (json, ']');
      break;
    case KH_FIELD_COUNT:
      if (*(const int *)at == KH_COUNT_ANY)
        g_string_append (json, "null");
      else
        g_string_append_printf (json, "%d", *(const int *)at);
      break;
    case KH_FIELD_INT:
      g_string_append_printf (json, "%d", *(const int *)at);
      break;
    case KH_FIELD_BOOLEAN:
      kh_json_append_boolean (json, *(const gboolean *)at);
      break;
    case KH_FIELD_NM:
    case KH_FIELD_NM_OPEN:
      if (field->kind == KH_FIELD_NM_OPEN && *(const int64_t *)at == KH_LENGTH_OPEN_NM)
        g_string_append (json, "null");
      else
        kh_json_append_nm (json, *(const int64_t *)at);
      break;
    case KH_FIELD_PRICE:
      if (*(const int64_t *)at == KH_PRICE_NONE)
        g_string_append (json, "null");
      else
        kh_json_append_milli (json, *(const int64_t *)at);
      break;
    case KH_FIELD_CHOICE:
      write_choice (json, field, *(const int *)at);
      break;
    case KH_FIELD_TEXT:
      kh_json_append_text (json, *(char *const *)at);
      break;
    case KH_FIELD_OBJECT:
      kh_fields_write (field->object, json, at, -1);
      break;
    case KH_FIELD_SPECIAL:
      field->write (json, from);
      break;
    }
}

void kh_fields_write (const KhFields *fields, GString *json, gconstpointer from, int indent)
{
  const char *other = *(char *const *)(const void *)((const char *)from + fields->other_offset);
  g_autofree char *gap = indent < 0 ? g_strdup ("") : g_strdup_printf ("\n%*s", indent, "");
  gboolean first = TRUE;
  g_string_append_c (json, '{');
  for (const KhField *field = fields->rows; field->name; field++)
    {
      if (field->wanted && !field->wanted (from))
        continue;
      g_string_append_printf (json, "%s%s\"%s\": ", first ? "" : indent < 0 ? ", " : ",", gap, field->name);
      write_value (json, field, from);
      first = FALSE;
    }
  if (other)
    g_string_append_printf (json, "%s%s%s", first ? "" : indent < 0 ? ", " : ",", gap, other);
  if (indent >= 2)
    g_string_append_printf (json, "\n%*s", indent - 2, "");
  g_string_append_c (json, '}');
}
