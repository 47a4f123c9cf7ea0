/* SPDX-License-Identifier: MIT */
#include "app/resize.h"
#include "base/units.h"
#include "plan/lists.h"
#include <glib/gi18n-lib.h>

/* How far everything moves, in cells. */
static void get_shift (const KhPlan *plan, const KhResize *resize, int *columns, int *rows)
{
  *columns = resize->east_stays ? resize->columns - plan->lattice.columns : 0;
  *rows = resize->north_stays ? resize->rows - plan->lattice.rows : 0;
}

static KhEdge moved_edge (KhEdge edge, int columns, int rows)
{
  return (KhEdge){ edge.axis, edge.column + columns, edge.row + rows };
}

static KhCell moved_cell (KhCell cell, int columns, int rows)
{
  return (KhCell){ cell.column + columns, cell.row + rows };
}

/* Walls, gaps and locks from the old lattice to the new; the old boundary goes
 * where it would stand inside, and the new one is walled. */
static void move_walls (const KhPlan *from, KhPlan *to, int columns, int rows)
{
  for (int i = 0; i < kh_lattice_n_cells (&from->lattice); i++)
    {
      KhCell cell = moved_cell (kh_lattice_cell_at (&from->lattice, i), columns, rows);
      if (kh_lattice_has_cell (&to->lattice, cell))
        to->gap[kh_lattice_cell_index (&to->lattice, cell)] = from->gap[i];
    }
  for (int i = 0; i < kh_lattice_n_edges (&from->lattice); i++)
    {
      KhEdge old = kh_lattice_edge_at (&from->lattice, i), edge = moved_edge (old, columns, rows);
      if (!kh_lattice_has_edge (&to->lattice, edge))
        continue;
      int at = kh_lattice_edge_index (&to->lattice, edge);
      gboolean was_boundary = kh_plan_is_boundary (from, old), is_boundary = kh_plan_is_boundary (to, edge);
      if (was_boundary == is_boundary)
        to->walled[at] = from->walled[i];
      else
        to->walled[at] = is_boundary;
      if (from->locked && from->locked[i])
        {
          if (!to->locked)
            to->locked = g_malloc0 ((gsize)kh_lattice_n_edges (&to->lattice));
          to->locked[at] = 1;
        }
    }
}

static void move_signs (const KhPlan *from, KhPlan *to, int columns, int rows)
{
  g_autoptr (GArray) openings = kh_openings_copy (from->openings);
  g_autoptr (GArray) marks = kh_marks_copy (from->marks);
  for (guint i = openings->len; i > 0; i--)
    {
      KhOpening *opening = &g_array_index (openings, KhOpening, i - 1);
      opening->edge = moved_edge (opening->edge, columns, rows);
      if (!kh_lattice_has_edge (&to->lattice, opening->edge) || !kh_plan_is_boundary (to, opening->edge))
        g_array_remove_index (openings, i - 1);
    }
  for (guint i = marks->len; i > 0; i--)
    {
      KhMark *mark = &g_array_index (marks, KhMark, i - 1);
      mark->cell = moved_cell (mark->cell, columns, rows);
      if (!kh_lattice_has_cell (&to->lattice, mark->cell))
        g_array_remove_index (marks, i - 1);
    }
  g_array_unref (to->openings);
  g_array_unref (to->marks);
  to->openings = g_steal_pointer (&openings);
  to->marks = g_steal_pointer (&marks);
  to->start.cell = moved_cell (from->start.cell, columns, rows);
  to->has_start = from->has_start && kh_lattice_has_cell (&to->lattice, to->start.cell);
  if (!to->has_start)
    to->start.cell = (KhCell){ 0, 0 };
}

static void take_away_loose (KhPlan *plan)
{
  /* Sections of the old boundary have no meaning on the new one. */
  g_array_set_size (plan->build.loose_sections, 0);
}

KhPlan *kh_resize_plan (const KhPlan *plan, const KhResize *resize)
{
  int columns, rows;
  KhPlan *to = kh_plan_copy (plan);
  get_shift (plan, resize, &columns, &rows);
  to->lattice.columns = resize->columns;
  to->lattice.rows = resize->rows;
  g_free (to->walled);
  g_free (to->gap);
  g_clear_pointer (&to->locked, g_free);
  to->walled = g_malloc0 ((gsize)kh_lattice_n_edges (&to->lattice));
  to->gap = g_malloc0 ((gsize)kh_lattice_n_cells (&to->lattice));
  move_walls (plan, to, columns, rows);
  for (int i = 0; i < kh_lattice_n_edges (&to->lattice); i++)
    {
      KhEdge edge = kh_lattice_edge_at (&to->lattice, i), old = moved_edge (edge, -columns, -rows);
      if (kh_plan_is_boundary (to, edge) && !kh_lattice_has_edge (&plan->lattice, old))
        to->walled[i] = 1;
    }
  move_signs (plan, to, columns, rows);
  take_away_loose (to);
  return to;
}

char *kh_resize_dup_words (const KhPlan *plan, const KhResize *resize)
{
  if (resize->columns == plan->lattice.columns && resize->rows == plan->lattice.rows)
    return NULL;
  g_autoptr (KhPlan) to = kh_resize_plan (plan, resize);
  g_autofree char *width = kh_length_dup_text (kh_plan_width_nm (to), KH_LENGTH_UNIT_MM, FALSE);
  g_autofree char *depth = kh_length_dup_text (kh_plan_depth_nm (to), KH_LENGTH_UNIT_MM, TRUE);
  GString *text = g_string_new (NULL);
  int walls = kh_plan_n_walls (to) - kh_plan_n_walls (plan);
  g_string_append_printf (text, _ ("%d × %d cells, %s × %s."), resize->columns, resize->rows, width, depth);
  if (walls != 0)
    g_string_append_printf (text,
                            walls > 0 ? ngettext (" %d wall more.", " %d walls more.", (gulong)walls)
                                      : ngettext (" %d wall fewer.", " %d walls fewer.", (gulong)-walls),
                            ABS (walls));
  if (plan->has_start && !to->has_start)
    g_string_append (text, _ (" The start goes."));
  if (to->marks->len < plan->marks->len)
    g_string_append_printf (text, ngettext (" %u mark goes.", " %u marks go.", plan->marks->len - to->marks->len),
                            plan->marks->len - to->marks->len);
  if (to->openings->len < plan->openings->len)
    g_string_append_printf (text,
                            ngettext (" %u opening goes.", " %u openings go.", plan->openings->len - to->openings->len),
                            plan->openings->len - to->openings->len);
  return g_string_free (text, FALSE);
}
