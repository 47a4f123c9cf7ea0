/* SPDX-License-Identifier: MIT */
/* Every layout of 2 x 2, 3 x 2 and 3 x 3 cells. */
#include "../cmocka_all.h"
#include "layout/layout.h"
#include "layout/measures.h"
#include "layouts.h"

typedef struct
{
  int connected, acyclic, trees, simply, islands[4], layouts;
} Counts;

/* The passage graph by brute force: a label spread until nothing changes. */
static void count_graph (const KhPlan *plan, int *n_components, int *n_cycles)
{
  int label[16], n = kh_lattice_n_cells (&plan->lattice), n_passages = 0;
  for (int i = 0; i < n; i++)
    label[i] = i;
  for (gboolean again = TRUE; again;)
    {
      again = FALSE;
      n_passages = 0;
      for (int e = 0; e < kh_lattice_n_edges (&plan->lattice); e++)
        {
          KhEdge edge = kh_lattice_edge_at (&plan->lattice, e);
          KhCell sides[2];
          if (!kh_plan_has_passage (plan, edge))
            continue;
          n_passages++;
          kh_edge_get_cells (edge, sides);
          int *a = &label[kh_lattice_cell_index (&plan->lattice, sides[0])];
          int *b = &label[kh_lattice_cell_index (&plan->lattice, sides[1])];
          again |= *a != *b;
          *a = *b = MIN (*a, *b);
        }
    }
  *n_components = 0;
  for (int i = 0; i < n; i++)
    *n_components += label[i] == i;
  *n_cycles = n_passages - n + *n_components;
}

static void look_at (KhPlan *plan, Counts *counts)
{
  int n_components, n_cycles;
  g_autoptr (KhLayout) layout = kh_layout_new (plan);
  count_graph (plan, &n_components, &n_cycles);
  int loops = 0;
  for (int r = 0; r < layout->n_regions; r++)
    loops += layout->loops_of_region[r];
  /* Euler's formula: cycles of the passage graph = loops of all regions + bare inner points. */
  assert_int_equal (layout->n_regions, n_components);
  assert_int_equal (loops + layout->n_bare_points, n_cycles);
  assert_int_equal (layout->n_pockets, n_components - 1);
  counts->layouts++;
  counts->connected += n_components == 1;
  counts->acyclic += n_cycles == 0;
  counts->trees += n_components == 1 && n_cycles == 0;
  counts->simply += layout->simply_connected;
  if (n_components == 1)
    counts->islands[layout->islands->len]++;
  /* With a post on every point the bare ones are pieces too, and loops are all the cycles. */
  plan->walls.posts = KH_POSTS_EVERYWHERE;
  g_autoptr (KhLayout) posts = kh_layout_new (plan);
  plan->walls.posts = KH_POSTS_WHERE_WALLS_MEET;
  assert_int_equal (posts->n_lone_posts, layout->n_bare_points);
  loops = 0;
  for (int r = 0; r < posts->n_regions; r++)
    loops += posts->loops_of_region[r];
  assert_int_equal (loops, n_cycles);
}

static Counts count_layouts (int columns, int rows)
{
  int edges[16];
  Counts counts = { 0 };
  g_autoptr (KhPlan) plan = hall_new (columns, rows);
  int n = inner_edges (plan, edges);
  for (unsigned layout = 0; layout < 1u << n; layout++)
    {
      set_layout (plan, edges, n, layout);
      look_at (plan, &counts);
    }
  return counts;
}

/* connected: OEIS A359992, A359993; acyclic: OEIS A080691; spanning trees: OEIS
 * A007341, A116469; simply connected and islands: computed for this project by
 * brute force and by polygon holes (posts only where walls meet). */
static void counts_are_the_published_ones (void **state)
{
  Counts c = count_layouts (2, 2);
  assert_int_equal (c.layouts, 16);
  assert_int_equal (c.connected, 5);
  assert_int_equal (c.acyclic, 15);
  assert_int_equal (c.trees, 4);
  assert_int_equal (c.simply, 5);
  c = count_layouts (3, 2);
  assert_int_equal (c.connected, 23);
  assert_int_equal (c.trees, 15);
  assert_int_equal (c.simply, 22);
  c = count_layouts (3, 3);
  assert_int_equal (c.layouts, 4096);
  assert_int_equal (c.connected, 431);
  assert_int_equal (c.acyclic, 3102);
  assert_int_equal (c.trees, 192);
  assert_int_equal (c.simply, 361);
  assert_int_equal (c.islands[0], 361);
  assert_int_equal (c.islands[1], 68);
  assert_int_equal (c.islands[2], 2);
}

/* Expected dead ends of a uniform spanning tree: 2 x 2: 2; 3 x 3: 55/16 (computed, matrix-tree theorem). */
static void dead_ends_of_all_trees_have_the_expected_mean (void **state)
{
  int edges[16];
  for (int size = 2; size <= 3; size++)
    {
      g_autoptr (KhPlan) plan = hall_new (size, size);
      int n = inner_edges (plan, edges), sum = 0, trees = 0;
      for (unsigned layout = 0; layout < 1u << n; layout++)
        {
          int n_components, n_cycles;
          KhMeasures measures;
          set_layout (plan, edges, n, layout);
          count_graph (plan, &n_components, &n_cycles);
          if (n_components != 1 || n_cycles != 0)
            continue;
          kh_measures (plan, &measures);
          sum += measures.dead_ends;
          trees++;
        }
      assert_int_equal (size == 2 ? sum : 16 * sum, size == 2 ? 2 * trees : 55 * trees);
    }
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (counts_are_the_published_ones),
    cmocka_unit_test (dead_ends_of_all_trees_have_the_expected_mean),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
