/* SPDX-License-Identifier: MIT */
#include "mazes.h"
#include "base/random.h"
#include "base/units.h"

/* Loop-erased random walks from each cell to the tree. */
static void draw_tree (KhPlan *plan, uint64_t seed)
{
  const KhLattice *lattice = &plan->lattice;
  int n = kh_lattice_n_cells (lattice);
  g_autofree guint8 *in_tree = g_malloc0 ((gsize)n);
  g_autofree guint8 *way = g_malloc0 ((gsize)n);
  uint64_t draw = 0;
  KhRandomKey key = { seed, 0 };
  in_tree[kh_random_below (key, 0, 0, (uint32_t)n)] = 1;
  for (int from = 0; from < n; from++)
    {
      KhCell cell = kh_lattice_cell_at (lattice, from);
      while (!in_tree[kh_lattice_cell_index (lattice, cell)])
        {
          KhHeading heading = (KhHeading)kh_random_below (key, 1, draw++, 4);
          KhCell next = kh_cell_neighbour (cell, heading);
          if (!kh_plan_has_floor (plan, next))
            continue;
          way[kh_lattice_cell_index (lattice, cell)] = (guint8)heading;
          cell = next;
        }
      for (cell = kh_lattice_cell_at (lattice, from); !in_tree[kh_lattice_cell_index (lattice, cell)];)
        {
          int at = kh_lattice_cell_index (lattice, cell);
          in_tree[at] = 1;
          plan->walled[kh_lattice_edge_index (lattice, kh_cell_edge (cell, (KhHeading)way[at]))] = 0;
          cell = kh_cell_neighbour (cell, (KhHeading)way[at]);
        }
    }
}

KhPlan *kh_test_maze_new (int columns, int rows, double pitch_mm, double thickness_mm, uint64_t seed)
{
  KhPlan *plan = kh_plan_new (columns, rows, kh_nm_from_mm (pitch_mm), kh_nm_from_mm (thickness_mm), 50 * KH_NM_PER_MM);
  int64_t half = kh_plan_clear_width_nm (plan) / 2;
  KhMark mark = { { columns - 1, rows - 1 }, { half, half }, { 0, 0 }, NULL };
  for (int i = 0; i < kh_lattice_n_edges (&plan->lattice); i++)
    plan->walled[i] = 1;
  draw_tree (plan, seed);
  g_array_append_val (plan->marks, mark);
  kh_test_maze_face (plan, KH_HAND_RIGHT);
  return plan;
}

/* In A1 the boundary is at the right hand facing east, at the left facing north. */
void kh_test_maze_face (KhPlan *plan, KhHand hand)
{
  KhHeading first = hand == KH_HAND_RIGHT ? KH_HEADING_EAST : KH_HEADING_NORTH;
  KhHeading second = hand == KH_HAND_RIGHT ? KH_HEADING_NORTH : KH_HEADING_EAST;
  plan->start.heading = kh_plan_has_wall (plan, kh_cell_edge (plan->start.cell, first)) ? second : first;
}

KhPlan *kh_test_mirror_new (const KhPlan *plan)
{
  static const KhHeading turned[] = { KH_HEADING_NORTH, KH_HEADING_WEST, KH_HEADING_SOUTH, KH_HEADING_EAST };
  KhPlan *mirror = kh_plan_copy (plan);
  int columns = plan->lattice.columns;
  for (int i = 0; i < kh_lattice_n_edges (&plan->lattice); i++)
    {
      KhEdge edge = kh_lattice_edge_at (&plan->lattice, i);
      KhEdge image
          = { edge.axis, edge.axis == KH_AXIS_X ? columns - 1 - edge.column : columns - edge.column, edge.row };
      mirror->walled[kh_lattice_edge_index (&plan->lattice, image)] = plan->walled[i];
    }
  for (guint i = 0; i < mirror->marks->len; i++)
    {
      KhMark *mark = &g_array_index (mirror->marks, KhMark, i);
      mark->cell.column = columns - 1 - mark->cell.column;
      mark->offset_nm[0] = -mark->offset_nm[0];
    }
  mirror->start.cell.column = columns - 1 - mirror->start.cell.column;
  mirror->start.heading = turned[mirror->start.heading];
  mirror->robot.hand = plan->robot.hand == KH_HAND_RIGHT ? KH_HAND_LEFT : KH_HAND_RIGHT;
  return mirror;
}

KhPlan *kh_test_layout_new (int columns, int rows, double share, uint64_t seed)
{
  KhRandomKey key = { seed, 1 };
  KhPlan *plan = kh_plan_new (columns, rows, 180 * KH_NM_PER_MM, 12 * KH_NM_PER_MM, 50 * KH_NM_PER_MM);
  double gaps = kh_random_unit (key, 0, 0) < 0.5 ? 0 : 0.15;
  for (int i = 0; i < kh_lattice_n_cells (&plan->lattice); i++)
    plan->gap[i] = kh_random_unit (key, 1, (uint64_t)i) < gaps;
  for (int i = 0; i < kh_lattice_n_edges (&plan->lattice); i++)
    {
      KhEdge edge = kh_lattice_edge_at (&plan->lattice, i);
      gboolean boundary = kh_plan_is_boundary (plan, edge);
      plan->walled[i] = kh_random_unit (key, 2, (uint64_t)i) < (boundary ? 0.95 : share);
      if (boundary && kh_random_unit (key, 3, (uint64_t)i) < 0.05)
        {
          KhOpening opening = { edge, (KhOpeningUse)kh_random_below (key, 4, (uint64_t)i, 3), NULL };
          g_array_append_val (plan->openings, opening);
        }
    }
  plan->walls.posts = kh_random_unit (key, 5, 0) < 0.3 ? KH_POSTS_EVERYWHERE : KH_POSTS_WHERE_WALLS_MEET;
  return plan;
}
