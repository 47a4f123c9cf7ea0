/* SPDX-License-Identifier: MIT */
#include "app/tool.h"
#include "app/words.h"

#include <glib/gi18n-lib.h>
#include <math.h>

KhEdit *kh_edit_start (const KhPlan *plan, KhCell cell, KhHeading heading)
{
  KhStart start = { .cell = cell, .heading = heading, .other = plan->has_start ? plan->start.other : NULL };
  gboolean same_cell = plan->has_start && plan->start.cell.column == cell.column && plan->start.cell.row == cell.row;
  if (same_cell && plan->start.heading == heading)
    return NULL;
  if (!kh_plan_has_floor (plan, cell))
    {
      g_autofree char *gap = kh_cell_dup_name (cell);
      return kh_edit_new_notice_take (g_strdup_printf (_ ("%s has no floor: the robot cannot start there."), gap));
    }
  g_autofree char *name = kh_cell_dup_name (cell);
  char *words = same_cell ? g_strdup_printf (_ ("Start turned %s"), kh_words_get_heading (heading))
                          : g_strdup_printf (_ ("Start placed at %s"), name);
  return kh_edit_new_take (kh_change_new_start (&start), words);
}

KhEdit *kh_edit_start_away (const KhPlan *plan)
{
  if (!plan->has_start)
    return NULL;
  return kh_edit_new_take (kh_change_new_start (NULL), g_strdup (_ ("Start taken away")));
}

/* With its back to the entrance where there is one, else toward the first way out of the cell. */
static KhHeading first_heading (const KhPlan *plan, KhCell cell)
{
  for (int h = 0; h < KH_N_HEADINGS; h++)
    {
      const KhOpening *opening = kh_plan_get_opening (plan, kh_cell_edge (cell, (KhHeading)h));
      if (opening != NULL && opening->use == KH_OPENING_ENTRANCE)
        return kh_heading_turned ((KhHeading)h, 2);
    }
  for (int h = 0; h < KH_N_HEADINGS; h++)
    if (kh_plan_has_passage (plan, kh_cell_edge (cell, (KhHeading)h)))
      return (KhHeading)h;
  return KH_HEADING_NORTH;
}

static gboolean start_of (const KhPlan *plan, const KhGesture *gesture, KhCell *cell, KhHeading *heading)
{
  if (!kh_place_get_cell (plan, gesture->from, cell))
    return FALSE;
  double dx = gesture->to.x - gesture->from.x, dy = gesture->to.y - gesture->from.y;
  if (gesture->dragged)
    *heading = fabs (dx) > fabs (dy) ? (dx > 0 ? KH_HEADING_EAST : KH_HEADING_WEST)
                                     : (dy > 0 ? KH_HEADING_NORTH : KH_HEADING_SOUTH);
  else if (plan->has_start && plan->start.cell.column == cell->column && plan->start.cell.row == cell->row)
    *heading = kh_heading_turned (plan->start.heading, 1);
  else
    *heading = first_heading (plan, *cell);
  return TRUE;
}

static KhEdit *make (const KhPlan *plan, const KhGesture *gesture)
{
  KhCell cell;
  KhHeading heading;
  if (!start_of (plan, gesture, &cell, &heading))
    return NULL;
  if (gesture->take_away)
    return kh_edit_start_away (plan);
  return kh_edit_start (plan, cell, heading);
}

static void draw (const KhGhostScene *scene, const KhGesture *gesture, cairo_t *cr)
{
  KhCell cell;
  KhHeading heading;
  if (!start_of (scene->plan, gesture, &cell, &heading) || !kh_plan_has_floor (scene->plan, cell))
    return;
  KhVec at = kh_view_to_device (scene->view, kh_cell_middle_mm (scene->plan, cell));
  double size = 0.22 * kh_mm_from_nm (scene->plan->lattice.pitch_nm) * scene->view->scale;
  size = CLAMP (size, 5, 40);
  cairo_save (cr);
  cairo_translate (cr, at.x, at.y);
  cairo_rotate (cr, -kh_heading_get_angle_rad (heading)); /* device y points down */
  cairo_move_to (cr, size, 0);
  cairo_line_to (cr, -size * 0.7, size * 0.75);
  cairo_line_to (cr, -size * 0.3, 0);
  cairo_line_to (cr, -size * 0.7, -size * 0.75);
  cairo_close_path (cr);
  kh_palette_set_source (cr, scene->scheme, gesture->take_away ? KH_INK_CONTACT : KH_INK_SIGN, 0.35);
  cairo_fill_preserve (cr);
  kh_palette_set_source (cr, scene->scheme, gesture->take_away ? KH_INK_CONTACT : KH_INK_SIGN, 1);
  cairo_set_line_width (cr, scene->high_contrast ? 2 : 1.5);
  cairo_stroke (cr);
  cairo_restore (cr);
}

const KhTool kh_tool_start = {
  .name = "start",
  .label = N_ ("Start"),
  .tooltip = N_ ("Place the start: click a cell, click it again to turn; or drag the way it faces (S)"),
  .icon_name = "kh-start-symbolic",
  .key = "s",
  .make = make,
  .draw = draw,
};
