/* SPDX-License-Identifier: MIT */
#include "app/words.h"

#include <glib/gi18n-lib.h>

static KhCell side_within (const KhLattice *lattice, KhEdge edge, gboolean *is_far)
{
  KhCell sides[2];
  kh_edge_get_cells (edge, sides);
  *is_far = !kh_lattice_has_cell (lattice, sides[0]);
  return sides[*is_far ? 1 : 0];
}

char *kh_words_dup_edge (const KhLattice *lattice, KhEdge edge)
{
  gboolean is_far;
  KhCell cell = side_within (lattice, edge, &is_far);
  KhHeading heading = edge.axis == KH_AXIS_X ? (is_far ? KH_HEADING_SOUTH : KH_HEADING_NORTH)
                                             : (is_far ? KH_HEADING_WEST : KH_HEADING_EAST);
  g_autofree char *name = kh_cell_dup_name (cell);
  /* Translators: a cell and one of its sides, "C4 north" */
  return g_strdup_printf (C_ ("edge", "%s %s"), name, kh_words_get_heading (heading));
}

char *kh_words_dup_edge_cell (const KhLattice *lattice, KhEdge edge)
{
  gboolean is_far;
  return kh_cell_dup_name (side_within (lattice, edge, &is_far));
}

const char *kh_words_get_heading (KhHeading heading)
{
  switch (heading)
    {
    case KH_HEADING_NORTH:
      return _ ("north");
    case KH_HEADING_EAST:
      return _ ("east");
    case KH_HEADING_SOUTH:
      return _ ("south");
    case KH_HEADING_WEST:
    default:
      return _ ("west");
    }
}

const char *kh_words_get_opening (KhOpeningUse use)
{
  switch (use)
    {
    case KH_OPENING_ENTRANCE:
      return _ ("entrance");
    case KH_OPENING_EXIT:
      return _ ("exit");
    case KH_OPENING_PLAIN:
    default:
      return _ ("other opening");
    }
}

char *kh_words_dup_edge_state (const KhPlan *plan, KhEdge edge)
{
  g_autofree char *place = kh_words_dup_edge (&plan->lattice, edge);
  const KhOpening *opening = kh_plan_get_opening (plan, edge);
  const char *state = _ ("open");
  if (opening != NULL)
    state = kh_words_get_opening (opening->use);
  else if (kh_plan_has_wall (plan, edge))
    state = _ ("wall");
  /* Translators: where the lattice cursor is and what stands there: "edge C4 north, wall" */
  return g_strdup_printf (_ ("edge %s, %s"), place, state);
}

char *kh_words_dup_cell_state (const KhPlan *plan, KhCell cell)
{
  g_autofree char *name = kh_cell_dup_name (cell);
  GString *text = g_string_new (NULL);
  /* Translators: where the lattice cursor is: "cell C4" */
  g_string_append_printf (text, _ ("cell %s"), name);
  if (!kh_plan_has_floor (plan, cell))
    g_string_append_printf (text, ", %s", _ ("no floor"));
  if (plan->has_start && plan->start.cell.column == cell.column && plan->start.cell.row == cell.row)
    {
      g_string_append (text, ", ");
      g_string_append_printf (text, _ ("start facing %s"), kh_words_get_heading (plan->start.heading));
    }
  for (guint i = 0; i < plan->marks->len; i++)
    {
      const KhMark *mark = &g_array_index (plan->marks, KhMark, i);
      if (mark->cell.column == cell.column && mark->cell.row == cell.row)
        g_string_append_printf (text, ", %s", _ ("mark"));
    }
  return g_string_free (text, FALSE);
}

char *kh_words_dup_size (const KhPlan *plan, KhLengthUnit unit)
{
  g_autofree char *width = kh_length_dup_text (kh_plan_width_nm (plan), unit, FALSE);
  g_autofree char *depth = kh_length_dup_text (kh_plan_depth_nm (plan), unit, TRUE);
  /* Translators: columns, rows, width over all, depth over all with its unit */
  return g_strdup_printf (_ ("%d × %d cells, %s × %s"), plan->lattice.columns, plan->lattice.rows, width, depth);
}
