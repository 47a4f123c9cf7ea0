/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "../wall_texts.h"
#include "base/units.h"
#include "panels/cutlist.h"

#define MM KH_NM_PER_MM

typedef struct
{
  int64_t length_mm;
  int count;
} Row;

static void assert_rows (const KhCutList *list, const Row *rows, guint n)
{
  for (guint i = 0; i < list->rows->len; i++)
    {
      const KhCutRow *row = &g_array_index (list->rows, KhCutRow, i);
      if (i >= n || row->length_nm != rows[i].length_mm * MM || row->count != rows[i].count)
        fail_msg ("row %u: %d panels of %g mm", i, row->count, kh_mm_from_nm (row->length_nm));
    }
  assert_int_equal (list->rows->len, n);
}

/* Lengths over k walls: flush to both outer faces k p + t, one end captured k p, both k p - t
 * (computed for this project; the areas of tests/outside agree with a polygon library). */
static void lengths_follow_what_the_ends_meet (void **state)
{
  static const struct
  {
    const char *what, *runs;
    KhEnds ends;
    Row rows[4];
    guint n;
  } cases[] = {
    { "free both ends", "X1:0-3", KH_ENDS_FULL, { { 552, 1 } }, 1 },
    { "free both ends, flush", "X1:0-3", KH_ENDS_FLUSH, { { 540, 1 } }, 1 },
    { "stem of a tee", "X0:0-3 Y1:0-2", KH_ENDS_FULL, { { 552, 1 }, { 360, 1 } }, 2 },
    { "stem of a tee, flush", "X0:0-3 Y1:0-2", KH_ENDS_FLUSH, { { 540, 1 }, { 354, 1 } }, 2 },
    { "stem of two tees", "X0:0-3 X2:0-3 Y1:0-2", KH_ENDS_FULL, { { 552, 2 }, { 348, 1 } }, 2 },
    { "corner: one owns it", "X0:0-3 Y0:0-3", KH_ENDS_FULL, { { 552, 1 }, { 540, 1 } }, 2 },
    { "cross: the longer goes through", "X1:0-3 Y1:0-2", KH_ENDS_FULL, { { 552, 1 }, { 180, 2 } }, 2 },
    { "open chain: the inner ones are n p",
      "X0:0-3 Y3:0-3 X3:1-3 Y1:1-3",
      KH_ENDS_FULL,
      { { 540, 2 }, { 372, 1 }, { 360, 1 } },
      3 },
  };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      g_autoptr (KhPlan) plan = plan_from_runs (4, 4, cases[i].runs);
      plan->build.ends = cases[i].ends;
      g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
      print_message ("%s\n", cases[i].what);
      assert_rows (list, cases[i].rows, cases[i].n);
    }
}

/* Boundary of 16 x 16 cells, 180/12, with no joint but the corners: two of 2 892 and two of 2 868
 * (computed: 16 * 180 + 12 = 2 892, 16 * 180 - 12 = 2 868). */
static void a_closed_ring_has_two_lengths (void **state)
{
  g_autoptr (KhPlan) plan = kh_plan_new (16, 16, 180 * MM, 12 * MM, 50 * MM);
  plan->build.longest_panel_nm = 3000 * MM;
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
  static const Row rows[] = { { 2892, 2 }, { 2868, 2 } };
  assert_rows (list, rows, 2);
  assert_int_equal (list->n_points[KH_POINT_CORNER], 4);
  assert_int_equal (list->n_points[KH_POINT_STRAIGHT], 60);
}

/* 3 x 3, 180/12: boundary only 25 920 mm2, with one wall (1,1)-(2,1) 28 224 mm2 (computed, agrees with GEOS). */
static void areas_are_those_of_the_figure (void **state)
{
  g_autoptr (KhPlan) plan = kh_plan_new (3, 3, 180 * MM, 12 * MM, 50 * MM);
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
  assert_int_equal (list->total_nm * 12 / MM, 25920);
  plan->walled[kh_lattice_edge_index (&plan->lattice, (KhEdge){ KH_AXIS_X, 1, 1 })] = 1;
  g_autoptr (KhCutList) more = kh_cut_list_new (plan, NULL);
  assert_int_equal (more->total_nm * 12 / MM, 28224);
}

/* The maze on the project's pictures of the window: 28 panels. */
static const char boat_house[]
    = "X0:0-8 X6:0-8 Y0:1-6 Y8:0-5 X1:3-7 Y2:0-4 X2:6-8 X5:5-7 Y7:4-6 Y4:4-6 Y5:1-3 Y6:3-5 X2:3-4 X3:3-4 "
      "X3:5-6 X4:2-3 X4:4-5 X5:1-2 X2:1-2 X3:0-1 X3:7-8 X4:0-1 Y1:1-2 Y3:4-5 Y1:5-6 Y4:2-3";

static void the_boat_house_maze_has_28_panels (void **state)
{
  g_autoptr (KhPlan) plan = plan_from_runs (8, 6, boat_house);
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
  for (guint i = 0; i < list->rows->len; i++)
    {
      const KhCutRow *row = &g_array_index (list->rows, KhCutRow, i);
      print_message ("%g x %d:", kh_mm_from_nm (row->length_nm), row->count);
      for (guint k = 0; k < row->panels->len; k++)
        print_message (" %s", g_array_index (list->panels, KhPanel, g_array_index (row->panels, int, k)).label);
      print_message ("\n");
    }
  assert_int_equal (list->panels->len, 28);
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (lengths_follow_what_the_ends_meet),
    cmocka_unit_test (a_closed_ring_has_two_lengths),
    cmocka_unit_test (areas_are_those_of_the_figure),
    cmocka_unit_test (the_boat_house_maze_has_28_panels),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
