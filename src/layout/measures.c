/* SPDX-License-Identifier: MIT */
#include "layout/measures.h"
#include <string.h>

/* Ways out of a cell of floor: passages, openings and leaks. */
static int count_ways (const KhPlan *plan, KhCell cell)
{
  int n = 0;
  for (int h = 0; h < KH_N_HEADINGS; h++)
    n += !kh_plan_has_wall (plan, kh_cell_edge (cell, (KhHeading)h));
  return n;
}

static gboolean has_exit (const KhPlan *plan, KhCell cell)
{
  for (guint i = 0; i < plan->openings->len; i++)
    {
      const KhOpening *opening = &g_array_index (plan->openings, KhOpening, i);
      KhCell sides[2];
      kh_edge_get_cells (opening->edge, sides);
      for (int k = 0; k < 2; k++)
        if (opening->use == KH_OPENING_EXIT && sides[k].column == cell.column && sides[k].row == cell.row
            && !kh_plan_has_wall (plan, opening->edge) && kh_plan_is_boundary (plan, opening->edge))
          return TRUE;
    }
  return FALSE;
}

/* Cells at which a way may end: the marks', or where there is none the exits'. */
static guint8 *dup_ends (const KhPlan *plan)
{
  guint8 *ends = g_malloc0 ((gsize)kh_lattice_n_cells (&plan->lattice));
  for (guint i = 0; i < plan->marks->len; i++)
    ends[kh_lattice_cell_index (&plan->lattice, g_array_index (plan->marks, KhMark, i).cell)] = 1;
  for (guint i = 0; plan->marks->len == 0 && i < plan->openings->len; i++)
    {
      KhCell sides[2];
      kh_edge_get_cells (g_array_index (plan->openings, KhOpening, i).edge, sides);
      for (int k = 0; k < 2; k++)
        if (kh_plan_has_floor (plan, sides[k]) && has_exit (plan, sides[k]))
          ends[kh_lattice_cell_index (&plan->lattice, sides[k])] = 1;
    }
  return ends;
}

/* Breadth first (Moore 1959) over the cells that can be reached; counts dead
 * ends and junctions on the way. */
static void look_round (const KhPlan *plan, KhMeasures *measures)
{
  const KhLattice *lattice = &plan->lattice;
  gsize n = (gsize)kh_lattice_n_cells (lattice);
  g_autofree guint8 *ends = dup_ends (plan);
  g_autofree int *steps = g_new (int, n);
  g_autofree int *queue = g_new (int, n);
  gsize head = 0, tail = 0;
  memset (steps, -1, sizeof (int) * n);
  queue[tail++] = kh_lattice_cell_index (lattice, plan->start.cell);
  steps[queue[0]] = 0;
  while (head < tail)
    {
      int at = queue[head++];
      KhCell cell = kh_lattice_cell_at (lattice, at);
      int ways = count_ways (plan, cell);
      measures->dead_ends += ways == 1;
      measures->junctions += ways >= 3;
      if (ends[at] && measures->shortest_steps < 0)
        measures->shortest_steps = steps[at];
      for (int h = 0; h < KH_N_HEADINGS; h++)
        {
          KhCell next = kh_cell_neighbour (cell, (KhHeading)h);
          if (!kh_plan_has_passage (plan, kh_cell_edge (cell, (KhHeading)h)))
            continue;
          int to = kh_lattice_cell_index (lattice, next);
          if (steps[to] < 0)
            {
              steps[to] = steps[at] + 1;
              queue[tail++] = to;
            }
        }
    }
}

static int longest_straight (const KhPlan *plan)
{
  int longest = 0;
  for (int axis = 0; axis < 2; axis++)
    {
      int n_lines = axis == KH_AXIS_X ? plan->lattice.rows : plan->lattice.columns;
      int length = axis == KH_AXIS_X ? plan->lattice.columns : plan->lattice.rows;
      for (int line = 0; line < n_lines; line++)
        for (int at = 0, run = 0; at < length; at++)
          {
            KhCell cell = axis == KH_AXIS_X ? (KhCell){ at, line } : (KhCell){ line, at };
            KhEdge back = kh_cell_edge (cell, axis == KH_AXIS_X ? KH_HEADING_WEST : KH_HEADING_SOUTH);
            run = !kh_plan_has_floor (plan, cell) ? 0 : kh_plan_has_passage (plan, back) ? run + 1 : 1;
            longest = MAX (longest, run);
          }
    }
  return longest;
}

static void count_points (const KhPlan *plan, int points_by_kind[5])
{
  for (int row = 0; row <= plan->lattice.rows; row++)
    for (int column = 0; column <= plan->lattice.columns; column++)
      {
        gboolean east = kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_X, column, row });
        gboolean west = kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_X, column - 1, row });
        gboolean north = kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_Y, column, row });
        gboolean south = kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_Y, column, row - 1 });
        int n = east + west + north + south;
        if (n == 1)
          points_by_kind[0]++;
        else if (n == 2)
          points_by_kind[(east && west) || (north && south) ? 1 : 2]++;
        else if (n > 2)
          points_by_kind[n]++;
      }
}

void kh_measures (const KhPlan *plan, KhMeasures *measures)
{
  *measures = (KhMeasures){ .shortest_steps = -1 };
  measures->longest_straight = longest_straight (plan);
  count_points (plan, measures->points_by_kind);
  if (plan->has_start && kh_plan_has_floor (plan, plan->start.cell))
    look_round (plan, measures);
}
