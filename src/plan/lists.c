/* SPDX-License-Identifier: MIT */
#include "plan/lists.h"
#include <string.h>

static void opening_clear (gpointer data) { g_free (((KhOpening *)data)->other); }

static void mark_clear (gpointer data) { g_free (((KhMark *)data)->other); }

static void set_aside_clear (gpointer data)
{
  KhSetAside *entry = data;
  g_free (entry->code);
  g_free (entry->reason);
  g_free (entry->other);
}

static GArray *list_new (gsize size, GDestroyNotify clear)
{
  GArray *list = g_array_new (FALSE, FALSE, (guint)size);
  g_array_set_clear_func (list, clear);
  return list;
}

GArray *kh_openings_new (void) { return list_new (sizeof (KhOpening), opening_clear); }

GArray *kh_marks_new (void) { return list_new (sizeof (KhMark), mark_clear); }

GArray *kh_set_aside_new (void) { return list_new (sizeof (KhSetAside), set_aside_clear); }

/* The copies own their texts: each loop knows which. */
GArray *kh_openings_copy (const GArray *from)
{
  GArray *list = kh_openings_new ();
  for (guint i = 0; i < from->len; i++)
    {
      KhOpening opening = g_array_index (from, KhOpening, i);
      opening.other = g_strdup (opening.other);
      g_array_append_val (list, opening);
    }
  return list;
}

GArray *kh_marks_copy (const GArray *from)
{
  GArray *list = kh_marks_new ();
  for (guint i = 0; i < from->len; i++)
    {
      KhMark mark = g_array_index (from, KhMark, i);
      mark.other = g_strdup (mark.other);
      g_array_append_val (list, mark);
    }
  return list;
}

GArray *kh_set_aside_copy (const GArray *from)
{
  GArray *list = kh_set_aside_new ();
  for (guint i = 0; i < from->len; i++)
    {
      KhSetAside entry = g_array_index (from, KhSetAside, i);
      entry.code = g_strdup (entry.code);
      entry.reason = g_strdup (entry.reason);
      entry.other = g_strdup (entry.other);
      g_array_append_val (list, entry);
    }
  return list;
}

static gboolean edge_equal (KhEdge a, KhEdge b) { return a.axis == b.axis && a.column == b.column && a.row == b.row; }

gboolean kh_openings_equal (const GArray *a, const GArray *b)
{
  if (a->len != b->len)
    return FALSE;
  for (guint i = 0; i < a->len; i++)
    {
      const KhOpening *x = &g_array_index (a, KhOpening, i), *y = &g_array_index (b, KhOpening, i);
      if (!edge_equal (x->edge, y->edge) || x->use != y->use || g_strcmp0 (x->other, y->other) != 0)
        return FALSE;
    }
  return TRUE;
}

gboolean kh_marks_equal (const GArray *a, const GArray *b)
{
  if (a->len != b->len)
    return FALSE;
  for (guint i = 0; i < a->len; i++)
    {
      const KhMark *x = &g_array_index (a, KhMark, i), *y = &g_array_index (b, KhMark, i);
      if (x->cell.column != y->cell.column || x->cell.row != y->cell.row
          || memcmp (x->size_nm, y->size_nm, sizeof x->size_nm) != 0
          || memcmp (x->offset_nm, y->offset_nm, sizeof x->offset_nm) != 0 || g_strcmp0 (x->other, y->other) != 0)
        return FALSE;
    }
  return TRUE;
}

gboolean kh_set_aside_equal (const GArray *a, const GArray *b)
{
  if (a->len != b->len)
    return FALSE;
  for (guint i = 0; i < a->len; i++)
    {
      const KhSetAside *x = &g_array_index (a, KhSetAside, i), *y = &g_array_index (b, KhSetAside, i);
      if (g_strcmp0 (x->code, y->code) != 0 || x->at[0] != y->at[0] || x->at[1] != y->at[1]
          || g_strcmp0 (x->reason, y->reason) != 0 || g_strcmp0 (x->other, y->other) != 0)
        return FALSE;
    }
  return TRUE;
}
