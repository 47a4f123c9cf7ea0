/* SPDX-License-Identifier: MIT */
/* Questions a plan answers: what stands where, how large it is. */
#include "base/units.h"
#include "plan/plan.h"

gboolean kh_plan_has_wall (const KhPlan *plan, KhEdge edge)
{
  return kh_lattice_has_edge (&plan->lattice, edge) && plan->walled[kh_lattice_edge_index (&plan->lattice, edge)];
}

gboolean kh_plan_has_floor (const KhPlan *plan, KhCell cell)
{
  return kh_lattice_has_cell (&plan->lattice, cell) && !plan->gap[kh_lattice_cell_index (&plan->lattice, cell)];
}

gboolean kh_plan_is_boundary (const KhPlan *plan, KhEdge edge)
{
  KhCell sides[2];
  kh_edge_get_cells (edge, sides);
  return kh_plan_has_floor (plan, sides[0]) != kh_plan_has_floor (plan, sides[1]);
}

const KhOpening *kh_plan_get_opening (const KhPlan *plan, KhEdge edge)
{
  for (guint i = 0; i < plan->openings->len; i++)
    {
      const KhOpening *opening = &g_array_index (plan->openings, KhOpening, i);
      if (opening->edge.axis == edge.axis && opening->edge.column == edge.column && opening->edge.row == edge.row)
        return opening;
    }
  return NULL;
}

gboolean kh_plan_has_passage (const KhPlan *plan, KhEdge edge)
{
  KhCell sides[2];
  kh_edge_get_cells (edge, sides);
  return kh_plan_has_floor (plan, sides[0]) && kh_plan_has_floor (plan, sides[1]) && !kh_plan_has_wall (plan, edge);
}

gboolean kh_plan_starts_on_entrance (const KhPlan *plan)
{
  if (!plan->has_start)
    return FALSE;
  KhEdge behind = kh_cell_edge (plan->start.cell, kh_heading_turned (plan->start.heading, 2));
  const KhOpening *opening = kh_plan_get_opening (plan, behind);
  return opening && opening->use == KH_OPENING_ENTRANCE && kh_plan_is_boundary (plan, behind)
         && !kh_plan_has_wall (plan, behind);
}

void kh_plan_get_start_pose (const KhPlan *plan, double *x_mm, double *y_mm, double *heading_rad)
{
  g_assert (plan->has_start);
  int columns, rows;
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm), back = kh_plan_starts_on_entrance (plan) ? 0.5 : 0.0;
  kh_heading_get_step (plan->start.heading, &columns, &rows);
  *x_mm = (plan->start.cell.column + 0.5 - back * columns) * pitch;
  *y_mm = (plan->start.cell.row + 0.5 - back * rows) * pitch;
  *heading_rad = kh_heading_get_angle_rad (plan->start.heading);
}

GArray *kh_plan_dup_runs (const KhPlan *plan, const guint8 *edges)
{
  const KhLattice *lattice = &plan->lattice;
  GArray *runs = g_array_new (FALSE, FALSE, sizeof (KhRun));
  for (int axis = 0; axis < 2; axis++)
    {
      int n_lines = (axis == KH_AXIS_X ? lattice->rows : lattice->columns) + 1;
      int length = axis == KH_AXIS_X ? lattice->columns : lattice->rows;
      const guint8 *line = edges + (axis == KH_AXIS_X ? 0 : kh_lattice_n_edges_x (lattice));
      for (int i = 0; i < n_lines; i++, line += length)
        for (int from = 0; from < length; from++)
          if (line[from])
            {
              KhRun run = { (KhAxis)axis, i, from, from };
              while (run.to < length && line[run.to])
                run.to++;
              from = run.to;
              g_array_append_val (runs, run);
            }
    }
  return runs;
}

GArray *kh_plan_dup_gap_blocks (const KhPlan *plan)
{
  int n = plan->lattice.columns;
  GArray *blocks = g_array_new (FALSE, FALSE, sizeof (KhCellBlock));
  g_autofree int *newest = g_new (int, n); /* the newest block that begins at a column */
  for (int column = 0; column < n; column++)
    newest[column] = -1;
  for (int row = 0; row < plan->lattice.rows; row++)
    {
      const guint8 *line = plan->gap + (gsize)row * (gsize)n;
      for (int column = 0; column < n; column++)
        if (line[column])
          {
            KhCellBlock piece = { column, row, 0, 1 };
            while (column < n && line[column])
              column++;
            piece.columns = column - piece.column;
            KhCellBlock *below
                = newest[piece.column] < 0 ? NULL : &g_array_index (blocks, KhCellBlock, newest[piece.column]);
            if (below && below->columns == piece.columns && below->row + below->rows == row)
              below->rows++;
            else
              {
                newest[piece.column] = (int)blocks->len;
                g_array_append_val (blocks, piece);
              }
          }
    }
  return blocks;
}

int64_t kh_plan_width_nm (const KhPlan *plan)
{
  return plan->lattice.columns * plan->lattice.pitch_nm + plan->walls.thickness_nm;
}

int64_t kh_plan_depth_nm (const KhPlan *plan)
{
  return plan->lattice.rows * plan->lattice.pitch_nm + plan->walls.thickness_nm;
}

int64_t kh_plan_clear_width_nm (const KhPlan *plan) { return plan->lattice.pitch_nm - plan->walls.thickness_nm; }

int kh_plan_n_walls (const KhPlan *plan)
{
  int n = 0;
  for (int i = 0; i < kh_lattice_n_edges (&plan->lattice); i++)
    n += plan->walled[i];
  return n;
}
