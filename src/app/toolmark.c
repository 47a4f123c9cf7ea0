/* SPDX-License-Identifier: MIT */
#include "app/tool.h"

#include <glib/gi18n-lib.h>
#include <math.h>

static gboolean lies_in (const KhMark *mark, KhCell cell)
{
  return mark->cell.column == cell.column && mark->cell.row == cell.row;
}

static const KhMark *mark_in (const KhPlan *plan, KhCell cell)
{
  for (guint i = 0; i < plan->marks->len; i++)
    if (lies_in (&g_array_index (plan->marks, KhMark, i), cell))
      return &g_array_index (plan->marks, KhMark, i);
  return NULL;
}

/* A square of a third of the pitch in the middle of the cell: large enough to
 * be met on either side's way through the cell at the usual clearances. */
void kh_mark_init_for_plan (KhMark *mark, const KhPlan *plan, KhCell cell)
{
  int64_t size = plan->lattice.pitch_nm / 3 / KH_NM_PER_MM * KH_NM_PER_MM;
  size = MIN (MAX (size, KH_NM_PER_MM), kh_plan_clear_width_nm (plan));
  *mark = (KhMark){ .cell = cell, .size_nm = { size, size } };
}

/* The rectangle dragged, to whole millimetres, kept within the clear square of its cell. */
static gboolean mark_of_drag (const KhPlan *plan, const KhGesture *gesture, KhMark *mark)
{
  KhCell cell;
  if (!kh_place_get_cell (plan, gesture->from, &cell))
    return FALSE;
  KhVec middle = kh_cell_middle_mm (plan, cell);
  double half = floor (kh_mm_from_nm (kh_plan_clear_width_nm (plan)) / 2);
  double from[2] = { gesture->from.x - middle.x, gesture->from.y - middle.y };
  double to[2] = { gesture->to.x - middle.x, gesture->to.y - middle.y };
  *mark = (KhMark){ .cell = cell };
  for (int axis = 0; axis < 2; axis++)
    {
      int64_t a = (int64_t)CLAMP (round (from[axis]), -half, half) * KH_NM_PER_MM;
      int64_t b = (int64_t)CLAMP (round (to[axis]), -half, half) * KH_NM_PER_MM;
      mark->size_nm[axis] = ABS (b - a);
      mark->offset_nm[axis] = (a + b) / 2;
      if (mark->size_nm[axis] < 5 * KH_NM_PER_MM)
        return FALSE; /* too small to be meant */
    }
  return TRUE;
}

KhEdit *kh_edit_mark (const KhPlan *plan, KhCell cell, const KhMark *mark_or_null)
{
  g_autoptr (GArray) marks = g_array_new (FALSE, FALSE, sizeof (KhMark));
  const KhMark *before = mark_in (plan, cell);
  for (guint i = 0; i < plan->marks->len; i++)
    if (!lies_in (&g_array_index (plan->marks, KhMark, i), cell))
      g_array_append_val (marks, g_array_index (plan->marks, KhMark, i));
  if (mark_or_null != NULL)
    {
      KhMark mark = *mark_or_null;
      mark.cell = cell;
      mark.other
          = before != NULL ? before->other : NULL; /* members of the file that are not known stay with the mark */
      g_array_append_val (marks, mark);
    }
  else if (before == NULL)
    return NULL;
  if (marks->len > KH_MARKS_MOST)
    return kh_edit_new_notice_take (
        g_strdup_printf (_ ("A plan holds %d marks at most: take one away first."), KH_MARKS_MOST));

  g_autofree char *name = kh_cell_dup_name (cell);
  char *words;
  if (mark_or_null == NULL)
    words = g_strdup_printf (_ ("Mark taken away at %s"), name);
  else if (before != NULL)
    words = g_strdup_printf (_ ("Mark changed at %s"), name);
  else
    words = g_strdup_printf (_ ("Mark placed at %s"), name);
  return kh_edit_new_take (kh_change_new_marks ((const KhMark *)(void *)marks->data, marks->len), words);
}

static KhEdit *make (const KhPlan *plan, const KhGesture *gesture)
{
  KhCell cell;
  KhMark mark;
  if (!kh_place_get_cell (plan, gesture->from, &cell))
    return NULL;
  if (gesture->take_away)
    return kh_edit_mark (plan, cell, NULL);
  if (gesture->dragged)
    return mark_of_drag (plan, gesture, &mark) ? kh_edit_mark (plan, cell, &mark) : NULL;
  if (mark_in (plan, cell) != NULL)
    return kh_edit_mark (plan, cell, NULL);
  kh_mark_init_for_plan (&mark, plan, cell);
  return kh_edit_mark (plan, cell, &mark);
}

static void draw (const KhGhostScene *scene, const KhGesture *gesture, cairo_t *cr)
{
  const KhPlan *plan = scene->plan;
  KhCell cell;
  KhMark mark;
  if (!kh_place_get_cell (plan, gesture->from, &cell))
    return;
  const KhMark *before = mark_in (plan, cell);
  gboolean take_away = gesture->take_away || (!gesture->dragged && before != NULL);
  if (take_away && before == NULL)
    return;
  if (take_away)
    mark = *before;
  else if (!gesture->dragged)
    kh_mark_init_for_plan (&mark, plan, cell);
  else if (!mark_of_drag (plan, gesture, &mark))
    return;
  KhVec middle = kh_cell_middle_mm (plan, cell);
  double x = middle.x + kh_mm_from_nm (mark.offset_nm[0]), y = middle.y + kh_mm_from_nm (mark.offset_nm[1]);
  double width = kh_mm_from_nm (mark.size_nm[0]), height = kh_mm_from_nm (mark.size_nm[1]);
  kh_ghost_box (scene, cr, (KhBox){ x - width / 2, y - height / 2, x + width / 2, y + height / 2 }, take_away);
  if (gesture->dragged && !take_away)
    {
      g_autofree char *text = g_strdup_printf (_ ("%.0f × %.0f mm"), width, height);
      kh_ghost_label (scene, cr, (KhVec){ x, y + height / 2 + 14 / scene->view->scale }, text);
    }
}

const KhTool kh_tool_mark = {
  .name = "mark",
  .label = N_ ("Mark"),
  .tooltip = N_ ("Place a mark or take it away: click a cell; drag to give its size (M)"),
  .icon_name = "kh-mark-symbolic",
  .key = "m",
  .make = make,
  .draw = draw,
};
