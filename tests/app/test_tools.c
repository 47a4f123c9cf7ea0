/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"

#include "app/tool.h"
#include "plan/history.h"

/* The tools as pure functions of a plan and a gesture: what a drag or a click
 * would do, that one gesture is one step, and that undo brings all of it back. */

#define P 180.0 /* the plan's pitch, mm */

static KhPlan *new_plan (void) { return kh_plan_new (4, 3, 180 * KH_NM_PER_MM, 12 * KH_NM_PER_MM, 50 * KH_NM_PER_MM); }

static KhGesture drag (double x0, double y0, double x1, double y1)
{
  return (KhGesture){ .from = { x0, y0 }, .to = { x1, y1 }, .dragged = TRUE };
}

static KhGesture click (double x, double y) { return (KhGesture){ .from = { x, y }, .to = { x, y } }; }

/* Does it through a history, checks that undo gives the plan back, and redoes it. */
static KhHistory *done (KhPlan *plan_taken, const KhTool *tool, KhGesture gesture)
{
  g_autoptr (KhPlan) before = kh_plan_copy (plan_taken);
  KhHistory *history = kh_history_new_take (plan_taken);
  g_autoptr (KhEdit) edit = tool->make (kh_history_get_plan (history), &gesture);
  assert_non_null (edit);
  assert_non_null (edit->change);
  assert_true (kh_history_do_take (history, g_steal_pointer (&edit->change), edit->words));
  assert_int_equal (kh_history_get_n_undo (history), 1);
  assert_true (kh_history_undo (history));
  assert_true (kh_plan_equal (before, kh_history_get_plan (history)));
  assert_true (kh_history_redo (history));
  return history;
}

static void a_drag_snaps_to_one_line (void **state)
{
  static const struct
  {
    double x0, y0, x1, y1; /* mm */
    int n;
    KhEdge first;
  } cases[] = {
    { P, P, 3 * P, P, 2, { KH_AXIS_X, 1, 1 } },
    { P + 40, P - 30, 3 * P - 20, P + 80, 2, { KH_AXIS_X, 1, 1 } }, /* trembling */
    { 3 * P, P, P, P, 2, { KH_AXIS_X, 1, 1 } },                     /* from the east */
    { 2 * P, P, 2 * P + 60, 2 * P + 20, 1, { KH_AXIS_Y, 2, 1 } },   /* more north than east */
    { P, P, 40 * P, P, 3, { KH_AXIS_X, 1, 1 } },                    /* out of the lattice */
    { 2 * P, 2 * P, 2 * P, -5 * P, 2, { KH_AXIS_Y, 2, 0 } },
  };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      g_autoptr (KhHistory) history
          = done (new_plan (), &kh_tool_walls, drag (cases[i].x0, cases[i].y0, cases[i].x1, cases[i].y1));
      assert_int_equal (kh_plan_n_walls (kh_history_get_plan (history)), 14 + cases[i].n);
      assert_true (kh_plan_has_wall (kh_history_get_plan (history), cases[i].first));
    }
}

static void nothing_to_do_is_no_edit (void **state)
{
  g_autoptr (KhPlan) plan = new_plan ();
  KhGesture none[] = { drag (P, P, P + 20, P - 10), drag (0, 0, 3 * P, 0), click (P / 2, P / 2) };
  for (gsize i = 0; i < G_N_ELEMENTS (none); i++)
    assert_null (kh_tool_walls.make (plan, &none[i]));
  KhGesture outside = click (-900, 20);
  for (int i = 0; i < KH_N_TOOLS; i++)
    assert_null (kh_tool_get ((KhToolId)i)->make (plan, &outside));
}

static void words_name_what_and_where (void **state)
{
  g_autoptr (KhPlan) plan = new_plan ();
  KhGesture gesture = drag (P, P, 3 * P, P);
  g_autoptr (KhEdit) edit = kh_tool_walls.make (plan, &gesture);
  assert_string_equal (edit->words, "2 walls laid at B1");
  gesture = click (0, P / 2);
  g_autoptr (KhEdit) one = kh_tool_walls.make (plan, &gesture);
  assert_string_equal (one->words, "1 wall taken away at A1");
}

static void an_opening_goes_round (void **state)
{
  KhEdge edge = { KH_AXIS_Y, 0, 0 };
  KhHistory *history = kh_history_new_take (new_plan ());
  static const int uses[] = { KH_OPENING_ENTRANCE, KH_OPENING_EXIT, KH_OPENING_PLAIN, -1 };
  for (int i = 0; i < 4; i++)
    {
      KhGesture gesture = click (2, P / 2);
      g_autoptr (KhEdit) edit = kh_tool_opening.make (kh_history_get_plan (history), &gesture);
      assert_true (kh_history_do_take (history, g_steal_pointer (&edit->change), edit->words));
      const KhOpening *opening = kh_plan_get_opening (kh_history_get_plan (history), edge);
      assert_int_equal (opening != NULL ? (int)opening->use : -1, uses[i]);
      assert_int_equal (kh_plan_has_wall (kh_history_get_plan (history), edge), uses[i] < 0);
    }
  assert_int_equal (kh_history_get_n_undo (history), 4);
  kh_history_free (history);
  /* inside there is none, and it is said why */
  g_autoptr (KhPlan) plan = new_plan ();
  KhGesture gesture = click (P, P / 2);
  g_autoptr (KhEdit) refused = kh_tool_opening.make (plan, &gesture);
  assert_null (refused->change);
  assert_non_null (strstr (refused->notice, "boundary"));
}

static void a_wall_over_an_opening_closes_it (void **state)
{
  KhEdge edge = { KH_AXIS_Y, 0, 0 };
  KhPlan *plan = new_plan ();
  g_autoptr (KhEdit) open = kh_edit_opening (plan, edge, KH_OPENING_EXIT);
  kh_change_free (kh_change_apply (open->change, plan));
  g_autoptr (KhHistory) history = done (plan, &kh_tool_walls, drag (0, 0, 0, P));
  assert_null (kh_plan_get_opening (kh_history_get_plan (history), edge));
  assert_true (kh_plan_has_wall (kh_history_get_plan (history), edge));
}

static void taken_floor_keeps_the_rest_closed (void **state)
{
  /* the north-east corner, two cells wide */
  KhPlan *plan = new_plan ();
  g_autoptr (KhHistory) history = done (plan, &kh_tool_floor, drag (2.5 * P, 2.5 * P, 3.5 * P, 2.5 * P));
  const KhPlan *now = kh_history_get_plan (history);
  int n_boundary = 0;
  for (int i = 0; i < kh_lattice_n_edges (&now->lattice); i++)
    {
      KhEdge edge = kh_lattice_edge_at (&now->lattice, i);
      n_boundary += kh_plan_is_boundary (now, edge);
      assert_int_equal (kh_plan_has_wall (now, edge), kh_plan_is_boundary (now, edge));
    }
  assert_int_equal (n_boundary, 14); /* an L has its box's girth */
  /* given back: the plan as it was */
  g_autoptr (KhPlan) first = new_plan ();
  KhGesture back = drag (2.5 * P, 2.5 * P, 3.5 * P, 2.5 * P);
  g_autoptr (KhEdit) edit = kh_tool_floor.make (now, &back);
  assert_true (kh_history_do_take (history, g_steal_pointer (&edit->change), edit->words));
  assert_true (kh_plan_equal (first, kh_history_get_plan (history)));
}

static void marks_stay_in_their_cell (void **state)
{
  g_autoptr (KhHistory) history = done (new_plan (), &kh_tool_mark, drag (P + 30, P + 40, 9 * P, P + 100));
  const KhMark *mark = &g_array_index (kh_history_get_plan (history)->marks, KhMark, 0);
  assert_int_equal (mark->cell.column, 1);
  /* from 30 mm to the clear square's end at 174 mm; from 40 to 100 mm */
  assert_int_equal (mark->size_nm[0], 144 * KH_NM_PER_MM);
  assert_int_equal (mark->offset_nm[0], 12 * KH_NM_PER_MM);
  assert_int_equal (mark->size_nm[1], 60 * KH_NM_PER_MM);
  assert_int_equal (mark->offset_nm[1], -20 * KH_NM_PER_MM);
  KhGesture tiny = drag (P + 30, P + 40, P + 32, P + 90);
  assert_null (kh_tool_mark.make (kh_history_get_plan (history), &tiny));
}

static void the_start_is_placed_and_turned (void **state)
{
  g_autoptr (KhHistory) history = done (new_plan (), &kh_tool_start, click (2.5 * P, 1.5 * P));
  const KhPlan *plan = kh_history_get_plan (history);
  assert_int_equal (plan->start.cell.column, 2);
  assert_int_equal (plan->start.cell.row, 1);
  KhHeading heading = plan->start.heading;
  KhGesture again = click (2.5 * P, 1.5 * P);
  g_autoptr (KhEdit) turn = kh_tool_start.make (plan, &again);
  assert_true (kh_history_do_take (history, g_steal_pointer (&turn->change), turn->words));
  assert_int_equal (plan->start.heading, kh_heading_turned (heading, 1));
  KhGesture west = drag (2.5 * P, 1.5 * P, 1.2 * P, 1.6 * P);
  g_autoptr (KhEdit) to_west = kh_tool_start.make (plan, &west);
  assert_true (kh_history_do_take (history, g_steal_pointer (&to_west->change), to_west->words));
  assert_int_equal (plan->start.heading, KH_HEADING_WEST);
  /* not on a gap */
  KhHistory *gap = done (new_plan (), &kh_tool_floor, click (3.5 * P, 2.5 * P));
  KhGesture there = click (3.5 * P, 2.5 * P);
  g_autoptr (KhEdit) refused = kh_tool_start.make (kh_history_get_plan (gap), &there);
  assert_null (refused->change);
  assert_non_null (refused->notice);
  kh_history_free (gap);
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (a_drag_snaps_to_one_line),         cmocka_unit_test (nothing_to_do_is_no_edit),
    cmocka_unit_test (words_name_what_and_where),        cmocka_unit_test (an_opening_goes_round),
    cmocka_unit_test (a_wall_over_an_opening_closes_it), cmocka_unit_test (taken_floor_keeps_the_rest_closed),
    cmocka_unit_test (marks_stay_in_their_cell),         cmocka_unit_test (the_start_is_placed_and_turned),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
