/* SPDX-License-Identifier: MIT */
#include "app/tool.h"

#include <glib/gi18n-lib.h>

static gboolean block_of (const KhPlan *plan, const KhGesture *gesture, KhCellBlock *block)
{
  KhCell a, b;
  KhVec to = gesture->dragged ? gesture->to : gesture->from;
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  if (!kh_place_get_cell (plan, gesture->from, &a))
    return FALSE;
  /* a drag may leave the lattice: it reaches to the border then */
  to.x = CLAMP (to.x, pitch / 2, (plan->lattice.columns - 0.5) * pitch);
  to.y = CLAMP (to.y, pitch / 2, (plan->lattice.rows - 0.5) * pitch);
  if (!kh_place_get_cell (plan, to, &b))
    return FALSE;
  block->column = MIN (a.column, b.column);
  block->row = MIN (a.row, b.row);
  block->columns = ABS (a.column - b.column) + 1;
  block->rows = ABS (a.row - b.row) + 1;
  return TRUE;
}

/* The whole drag does what it does to its first cell; the secondary button gives back. */
static gboolean gives_floor (const KhPlan *plan, const KhGesture *gesture)
{
  KhCell cell;
  if (gesture->take_away)
    return TRUE;
  return kh_place_get_cell (plan, gesture->from, &cell) && !kh_plan_has_floor (plan, cell);
}

static gboolean within (KhCellBlock block, KhCell cell)
{
  return cell.column >= block.column && cell.column < block.column + block.columns && cell.row >= block.row
         && cell.row < block.row + block.rows;
}

static gboolean floor_after (const KhPlan *plan, KhCellBlock block, gboolean floor, KhCell cell)
{
  if (kh_lattice_has_cell (&plan->lattice, cell) && within (block, cell))
    return floor;
  return kh_plan_has_floor (plan, cell);
}

/* The edges round and within the block, so that its new outline is walled and
 * no wall is left where the old outline was. */
static void sort_edges (const KhPlan *plan, KhCellBlock block, gboolean floor, GArray *lay, GArray *take_away)
{
  for (int r = block.row; r < block.row + block.rows; r++)
    for (int c = block.column; c < block.column + block.columns; c++)
      for (int h = 0; h < KH_N_HEADINGS; h++)
        {
          KhCell cell = { c, r }, other = kh_cell_neighbour (cell, (KhHeading)h);
          KhEdge edge = kh_cell_edge (cell, (KhHeading)h);
          gboolean inside = floor_after (plan, block, floor, cell), outside = floor_after (plan, block, floor, other);
          gboolean was_boundary = kh_plan_is_boundary (plan, edge);
          if (inside != outside && !was_boundary)
            g_array_append_val (lay, edge);
          else if (!inside && !outside)
            g_array_append_val (take_away, edge);
          else if (inside && outside && was_boundary)
            g_array_append_val (take_away, edge);
        }
}

static KhChange *drop_openings (const KhPlan *plan, KhCellBlock block, gboolean floor)
{
  g_autoptr (GArray) kept = g_array_new (FALSE, FALSE, sizeof (KhOpening));
  for (guint i = 0; i < plan->openings->len; i++)
    {
      const KhOpening *opening = &g_array_index (plan->openings, KhOpening, i);
      KhCell sides[2];
      kh_edge_get_cells (opening->edge, sides);
      gboolean touched = within (block, sides[0]) || within (block, sides[1]);
      if (!touched || floor_after (plan, block, floor, sides[0]) != floor_after (plan, block, floor, sides[1]))
        g_array_append_val (kept, *opening);
    }
  if (kept->len == plan->openings->len)
    return NULL;
  return kh_change_new_openings ((const KhOpening *)(void *)kept->data, kept->len);
}

KhEdit *kh_edit_floor (const KhPlan *plan, KhCellBlock block, gboolean floor)
{
  g_autoptr (GArray) cells = g_array_new (FALSE, FALSE, sizeof (KhCell));
  g_autoptr (GArray) lay = g_array_new (FALSE, FALSE, sizeof (KhEdge));
  g_autoptr (GArray) take_away = g_array_new (FALSE, FALSE, sizeof (KhEdge));
  for (int r = block.row; r < block.row + block.rows; r++)
    for (int c = block.column; c < block.column + block.columns; c++)
      {
        KhCell cell = { c, r };
        if (kh_plan_has_floor (plan, cell) != floor)
          g_array_append_val (cells, cell);
      }
  if (cells->len == 0)
    return NULL;
  sort_edges (plan, block, floor, lay, take_away);

  GPtrArray *group = g_ptr_array_new ();
  KhChange *openings = drop_openings (plan, block, floor);
  if (openings != NULL)
    g_ptr_array_add (group, openings);
  g_ptr_array_add (group, kh_change_new_gaps ((const KhCell *)(void *)cells->data, cells->len, !floor));
  if (take_away->len > 0)
    g_ptr_array_add (group, kh_change_new_walls ((const KhEdge *)(void *)take_away->data, take_away->len, FALSE));
  if (lay->len > 0)
    g_ptr_array_add (group, kh_change_new_walls ((const KhEdge *)(void *)lay->data, lay->len, TRUE));

  int n = (int)cells->len;
  g_autofree char *name = kh_cell_dup_name (g_array_index (cells, KhCell, 0));
  char *words = g_strdup_printf (
      floor ? ngettext ("Floor of %d cell given back at %s", "Floor of %d cells given back at %s", n)
            : ngettext ("Floor of %d cell taken away at %s", "Floor of %d cells taken away at %s", n),
      n, name);
  return kh_edit_new_take (kh_change_new_group_take (group), words);
}

static KhEdit *make (const KhPlan *plan, const KhGesture *gesture)
{
  KhCellBlock block;
  if (!block_of (plan, gesture, &block))
    return NULL;
  return kh_edit_floor (plan, block, gives_floor (plan, gesture));
}

static void draw (const KhGhostScene *scene, const KhGesture *gesture, cairo_t *cr)
{
  double pitch = kh_mm_from_nm (scene->plan->lattice.pitch_nm);
  KhCellBlock block;
  if (!block_of (scene->plan, gesture, &block))
    return;
  gboolean floor = gives_floor (scene->plan, gesture);
  kh_ghost_box (scene, cr,
                (KhBox){ block.column * pitch, block.row * pitch, (block.column + block.columns) * pitch,
                         (block.row + block.rows) * pitch },
                !floor);
  if (gesture->dragged)
    {
      g_autofree char *text = g_strdup_printf (_ ("%d × %d cells"), block.columns, block.rows);
      kh_ghost_label (scene, cr, (KhVec){ gesture->to.x, gesture->to.y + 16 / scene->view->scale }, text);
    }
}

const KhTool kh_tool_floor = {
  .name = "floor",
  .label = N_ ("Floor"),
  .tooltip = N_ ("Take cells away, or give them back: click or drag over cells (F)"),
  .icon_name = "kh-floor-symbolic",
  .key = "f",
  .make = make,
  .draw = draw,
};
