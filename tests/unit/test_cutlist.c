/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "../wall_texts.h"
#include "base/units.h"
#include "panels/cutlist.h"
#include <string.h>

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

/* The picture has the same 28 panels, joints and nine lengths in other numbers: there walls along x own
 * every corner; here corners are owned the same way round along a chain, so that more panels are whole pitches. */
static void the_boat_house_maze_has_28_panels (void **state)
{
  static const Row rows[]
      = { { 912, 2 }, { 732, 1 }, { 726, 2 }, { 714, 2 }, { 708, 1 }, { 360, 5 }, { 348, 1 }, { 192, 2 }, { 180, 12 } };
  g_autoptr (KhPlan) plan = plan_from_runs (8, 6, boat_house);
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
  assert_rows (list, rows, G_N_ELEMENTS (rows));
  assert_int_equal (list->panels->len, 28);
  assert_string_equal (g_array_index (list->panels, KhPanel, 0).label, "X0:0-4");
  for (guint i = 0; i < list->panels->len; i++)
    {
      const KhPanel *panel = &g_array_index (list->panels, KhPanel, i);
      assert_int_equal (g_array_index (list->rows, KhCutRow, panel->row).length_nm, panel->length_nm);
    }
}

/* 10 walls in a row, 180/12: a piece of 6 is 1 086 with one free end, of 7 over 1 200. */
static void splices_stand_where_walls_meet_and_leave_no_stub (void **state)
{
  static const struct
  {
    const char *runs;
    int at;
  } cases[] = {
    { "X1:0-10", 5 },               /* nothing meets: equal lengths */
    { "X1:0-10 Y4:0-1", 4 },        /* a stem meets: there */
    { "X1:0-10 Y4:0-1 Y6:1-2", 6 }, /* two alike: the further one */
    { "X1:0-10 Y5:0-1 Y6:0-1", 5 }, /* two: the more equal */
    { "X1:0-10 Y9:0-1", 5 },        /* too far out: would need a third panel */
  };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      g_autoptr (KhPlan) plan = plan_from_runs (10, 2, cases[i].runs);
      g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
      const KhPanel *panels = &g_array_index (list->panels, KhPanel, 0);
      print_message ("%s\n", cases[i].runs);
      assert_int_equal (panels[0].run.to, cases[i].at);
      assert_int_equal (panels[1].run.from, cases[i].at);
      assert_int_equal (panels[1].run.to, 10);
    }
}

static void a_needed_break_goes_to_a_cross (void **state)
{
  /* The line along x needs a joint; it takes one of its crosses, the other one it passes. */
  g_autoptr (KhPlan) plan = plan_from_runs (10, 2, "X1:0-10 Y5:0-2 Y1:0-2");
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
  assert_int_equal (list->panels->len, 5);
  assert_string_equal (g_array_index (list->panels, KhPanel, 0).label, "X1:0-5");
  assert_int_equal (g_array_index (list->panels, KhPanel, 0).ends[1], -1);
  assert_int_equal (g_array_index (list->panels, KhPanel, 0).length_nm, 900 * MM);
}

static void loose_sections_have_joints_at_their_ends (void **state)
{
  g_autoptr (KhPlan) plan = plan_from_runs (6, 2, "X0:0-6");
  KhRun loose = { KH_AXIS_X, 0, 2, 3 };
  g_array_append_val (plan->build.loose_sections, loose);
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
  static const Row rows[] = { { 546, 1 }, { 366, 1 }, { 180, 1 } };
  assert_rows (list, rows, 3);
  assert_string_equal (g_array_index (list->panels, KhPanel, 1).label, "X0:2-3");
}

static void a_wall_longer_than_the_limit_is_refused_with_the_numbers (void **state)
{
  g_autoptr (KhPlan) plan = plan_from_runs (4, 4, "X2:1-2");
  plan->build.longest_panel_nm = 191 * MM;
  g_autoptr (GError) error = NULL;
  assert_null (kh_cut_list_new (plan, &error));
  assert_true (g_error_matches (error, KH_PANELS_ERROR, KH_PANELS_ERROR_LENGTH));
  assert_non_null (strstr (error->message, "X2:1-2"));
  assert_non_null (strstr (error->message, "192"));
  assert_non_null (strstr (error->message, "191"));
  plan->build.longest_panel_nm = 192 * MM;
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
  assert_non_null (list);
}

static void other_joints_are_refused (void **state)
{
  g_autoptr (KhPlan) plan = kh_plan_new (2, 2, 180 * MM, 12 * MM, 50 * MM);
  for (int joint = KH_JOINT_GROOVED_POSTS; joint <= KH_JOINT_HALVED; joint++)
    {
      g_autoptr (GError) error = NULL;
      plan->build.joint = (KhJoint)joint;
      assert_null (kh_cut_list_new (plan, &error));
      assert_true (g_error_matches (error, KH_PANELS_ERROR, KH_PANELS_ERROR_JOINT));
    }
}

static void points_are_counted_by_kind (void **state)
{
  g_autoptr (KhPlan) plan = plan_from_runs (3, 3, "X0:0-3 Y0:0-2 X1:0-2 Y1:0-2");
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
  /* (0,0) corner; (1,0) tee; (2,0) straight; (3,0) end; (0,1) tee; (1,1) cross; (2,1), (0,2), (1,2) ends. */
  static const int counts[KH_N_POINT_KINDS] = { 4, 1, 1, 2, 1 };
  for (int i = 0; i < KH_N_POINT_KINDS; i++)
    {
      print_message ("%s\n", kh_point_kind_get_name ((KhPointKind)i));
      assert_int_equal (list->n_points[i], counts[i]);
    }
  assert_int_equal (list->n_lone_posts, 0);
  plan->walls.posts = KH_POSTS_EVERYWHERE;
  plan->gap[kh_lattice_cell_index (&plan->lattice, (KhCell){ 2, 2 })] = 1; /* its outer corner touches no floor */
  g_autoptr (KhCutList) posts = kh_cut_list_new (plan, NULL);
  assert_int_equal (posts->n_lone_posts, 16 - 9 - 1);
}

static void nothing_to_build_is_an_empty_list (void **state)
{
  g_autoptr (KhPlan) plan = plan_from_runs (2, 2, "X0:0-1");
  plan->walled[0] = 0;
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
  g_autoptr (KhSawOrder) order = kh_cut_list_dup_order (list, plan);
  KhSawSettings settings = { 1 };
  g_autoptr (KhSawPlan) saw_plan = kh_saw_plan_new (order, &settings, NULL);
  assert_int_equal (list->panels->len, 0);
  assert_int_equal (saw_plan->patterns->len, 0);
  assert_true (saw_plan->proven);
}

static KhStock *add_board (KhPlan *plan, KhStockForm form, int64_t length_mm, int64_t width_mm)
{
  KhStock board = { .name = g_strdup (""),
                    .form = form,
                    .length_nm = length_mm * MM,
                    .width_nm = width_mm * MM,
                    .thickness_nm = KH_LENGTH_OPEN_NM,
                    .count = KH_COUNT_ANY,
                    .price_milli = KH_PRICE_NONE };
  g_array_append_val (plan->build.stock, board);
  return &g_array_index (plan->build.stock, KhStock, plan->build.stock->len - 1);
}

/* Strips of 50 mm, kerf 3, trim 5 on all edges: (1 220 - 10 + 3) / 53 = 22 across, (2 440 - 10 + 3) / 53 = 45 along. */
static void boards_become_stock (void **state)
{
  g_autoptr (KhPlan) plan = kh_plan_new (3, 3, 180 * MM, 12 * MM, 50 * MM);
  add_board (plan, KH_STOCK_STRIP, 3000, 0)->thickness_nm = 18 * MM;
  add_board (plan, KH_STOCK_SHEET, 2440, 1220)->grain = KH_GRAIN_ALONG;
  add_board (plan, KH_STOCK_SHEET, 2440, 1220)->grain = KH_GRAIN_ANY;
  add_board (plan, KH_STOCK_SHEET, 2440, 59)->grain = KH_GRAIN_ALONG;
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
  g_autoptr (KhSawOrder) order = kh_cut_list_dup_order (list, plan);
  static const struct
  {
    int64_t length_mm;
    int count, n_strips, pool;
  } stock[] = { { 2440, -1, 1, 0 },  { 3000, 0, 1, 0 }, { 2440, -1, 22, 0 },
                { 2440, -1, 22, 4 }, { 2440, 0, 1, 0 }, { 1220, -1, 45, 4 } };
  assert_int_equal (order->stock->len, G_N_ELEMENTS (stock));
  for (guint i = 0; i < order->stock->len; i++)
    {
      const KhSawStock *s = &g_array_index (order->stock, KhSawStock, i);
      assert_int_equal (s->length_nm, stock[i].length_mm * MM);
      assert_int_equal (s->count, stock[i].count);
      assert_int_equal (s->n_strips, stock[i].n_strips);
      assert_int_equal (s->pool, stock[i].pool);
    }
  assert_true (kh_saw_order_check (order, NULL));
  g_autoptr (GPtrArray) notes = kh_cut_list_dup_board_notes (plan);
  assert_int_equal (notes->len, 2);
  assert_non_null (strstr (g_ptr_array_index (notes, 0), "18"));
  assert_non_null (strstr (g_ptr_array_index (notes, 1), "50"));
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (lengths_follow_what_the_ends_meet),
    cmocka_unit_test (a_closed_ring_has_two_lengths),
    cmocka_unit_test (areas_are_those_of_the_figure),
    cmocka_unit_test (the_boat_house_maze_has_28_panels),
    cmocka_unit_test (splices_stand_where_walls_meet_and_leave_no_stub),
    cmocka_unit_test (a_needed_break_goes_to_a_cross),
    cmocka_unit_test (loose_sections_have_joints_at_their_ends),
    cmocka_unit_test (a_wall_longer_than_the_limit_is_refused_with_the_numbers),
    cmocka_unit_test (other_joints_are_refused),
    cmocka_unit_test (points_are_counted_by_kind),
    cmocka_unit_test (nothing_to_build_is_an_empty_list),
    cmocka_unit_test (boards_become_stock),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
