/* SPDX-License-Identifier: MIT */
/* The hand walk on every layout of 3 x 3 cells, from every state. */
#include "../cmocka_all.h"
#include "layout/handwalk.h"
#include "layout/layout.h"
#include "layouts.h"
#include <string.h>

static void put_mark (KhPlan *plan, int column, int row)
{
  KhMark mark = { { column, row }, { 80000000, 80000000 }, { 0, 0 }, NULL };
  g_array_set_size (plan->marks, 0);
  g_array_append_val (plan->marks, mark);
}

typedef struct
{
  int from[2], to[2], reachable, right, left, both;
} Case;

/* Computed for this project; the reasoning is that of Matthews, Mazes and
 * Labyrinths, 1922, ch. XXI. -1: not given. */
static const Case cases[] = {
  { { 0, 0 }, { 2, 2 }, 1135, 1135, 1135, 1135 },
  { { 0, 0 }, { 1, 1 }, 2004, 1989, 1989, -1 },
  { { 1, 1 }, { 2, 2 }, 2004, 1815, 1824, 1683 },
};

static void arrivals_are_as_counted (void **state)
{
  int edges[16];
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      const Case *c = &cases[i];
      int reachable = 0, right = 0, left = 0, both = 0;
      g_autoptr (KhPlan) plan = hall_new (3, 3);
      int n = inner_edges (plan, edges);
      plan->start.cell = (KhCell){ c->from[0], c->from[1] };
      put_mark (plan, c->to[0], c->to[1]);
      for (unsigned layout = 0; layout < 1u << n; layout++)
        {
          KhHandWalk walks[2];
          set_layout (plan, edges, n, layout);
          g_autoptr (KhLayout) regions = kh_layout_new (plan);
          reachable += regions->region_of_cell[c->from[0] + 3 * c->from[1]] == regions->region_of_cell[c->to[0] + 3 * c->to[1]];
          for (int hand = 0; hand < 2; hand++)
            assert_true (kh_hand_walk (plan, (KhHand) hand, &walks[hand]));
          right += walks[KH_HAND_RIGHT].arrives;
          left += walks[KH_HAND_LEFT].arrives;
          both += walks[0].arrives && walks[1].arrives;
          kh_hand_walk_clear (&walks[0]);
          kh_hand_walk_clear (&walks[1]);
        }
      assert_int_equal (reachable, c->reachable);
      assert_int_equal (right, c->right);
      assert_int_equal (left, c->left);
      if (c->both >= 0)
        assert_int_equal (both, c->both);
    }
}

/* The point at the walker's rear on the hand's side. */
static int point_at_hand (const KhPlan *plan, KhHand hand)
{
  KhCell cell = plan->start.cell;
  KhHeading side = kh_heading_turned (plan->start.heading, hand == KH_HAND_RIGHT ? 1 : -1);
  KhHeading back = kh_heading_turned (plan->start.heading, 2);
  gboolean east = side == KH_HEADING_EAST || back == KH_HEADING_EAST;
  gboolean north = side == KH_HEADING_NORTH || back == KH_HEADING_NORTH;
  return kh_lattice_point_index (&plan->lattice, (KhPoint){ cell.column + east, cell.row + north });
}

/* Cells visited = cells of the start's floor with a corner in the piece (or
 * bare point) at the hand: on all 294,912 states of all layouts. */
static void cells_visited_are_those_beside_the_piece_at_the_hand (void **state)
{
  int edges[16], n_states = 0;
  g_autoptr (KhPlan) plan = hall_new (3, 3);
  int n = inner_edges (plan, edges);
  for (unsigned layout = 0; layout < 1u << n; layout++)
    {
      set_layout (plan, edges, n, layout);
      g_autoptr (KhLayout) pieces = kh_layout_new (plan);
      for (int s = 0; s < 9 * 4 * 2; s++, n_states++)
        {
          KhHandWalk walk;
          KhHand hand = (KhHand) (s % 2);
          gboolean stood[9] = { FALSE };
          plan->start.heading = (KhHeading) (s / 2 % 4);
          plan->start.cell = kh_lattice_cell_at (&plan->lattice, s / 8);
          assert_true (kh_hand_walk (plan, hand, &walk));
          for (guint i = 0; i < walk.path->len; i++)
            stood[kh_lattice_cell_index (&plan->lattice, g_array_index (walk.path, KhCell, i))] = TRUE;
          int q = point_at_hand (plan, hand), piece = pieces->piece_of_point[q], n_cells = 0;
          for (int i = 0; i < 9; i++)
            {
              KhCell cell = kh_lattice_cell_at (&plan->lattice, i);
              gboolean beside = FALSE;
              for (int k = 0; k < 4; k++)
                {
                  int p = kh_lattice_point_index (&plan->lattice, (KhPoint){ cell.column + k % 2, cell.row + k / 2 });
                  beside |= piece < 0 ? p == q : pieces->piece_of_point[p] == piece;
                }
              beside = beside && pieces->region_of_cell[i] == pieces->region_of_cell[s / 8];
              assert_int_equal (beside, stood[i]);
              n_cells += stood[i];
            }
          assert_int_equal (walk.n_cells, n_cells);
          kh_hand_walk_clear (&walk);
        }
    }
  assert_int_equal (n_states, 294912);
}

/* An empty hall of 3 x 3: the right hand goes round 8 cells, never the middle one. */
static void an_empty_hall_is_gone_round (void **state)
{
  KhHandWalk walk;
  g_autoptr (KhPlan) plan = hall_new (3, 3);
  assert_true (kh_hand_walk (plan, KH_HAND_LEFT, &walk));
  assert_int_equal (walk.ends, KH_WALK_ENDS_CIRCLES);
  assert_int_equal (walk.n_cells, 8);
  kh_hand_walk_clear (&walk);
}

/* Dudeney, Amusements in Mathematics, 1917, on threading mazes: every passage
 * of a perfect maze twice, 2(nm - 1) moves a tour: 3 x 3 has 16. */
static void a_perfect_maze_is_toured_passage_by_passage (void **state)
{
  int edges[16];
  g_autoptr (KhPlan) plan = hall_new (3, 3);
  int n = inner_edges (plan, edges), n_trees = 0;
  for (unsigned layout = 0; layout < 1u << n; layout++)
    {
      set_layout (plan, edges, n, layout);
      int walls = 0;
      for (int i = 0; i < n; i++)
        walls += (int) (layout >> i) & 1;
      g_autoptr (KhLayout) regions = kh_layout_new (plan);
      if (walls != 4 || regions->n_regions != 1)
        continue;
      n_trees++;
      for (int hand = 0; hand < 2; hand++)
        {
          KhHandWalk walk;
          plan->start.heading = kh_plan_has_wall (plan, kh_cell_edge (plan->start.cell, KH_HEADING_NORTH)) ? KH_HEADING_EAST : KH_HEADING_NORTH;
          assert_true (kh_hand_walk (plan, (KhHand) hand, &walk));
          assert_int_equal (walk.n_cells, 9);
          assert_in_range (walk.n_steps, 16, 18); /* the start's own state may not come back at once */
          kh_hand_walk_clear (&walk);
        }
    }
  assert_int_equal (n_trees, 192);
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (arrivals_are_as_counted),
    cmocka_unit_test (cells_visited_are_those_beside_the_piece_at_the_hand),
    cmocka_unit_test (an_empty_hall_is_gone_round),
    cmocka_unit_test (a_perfect_maze_is_toured_passage_by_passage),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
