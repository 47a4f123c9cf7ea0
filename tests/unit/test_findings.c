/* SPDX-License-Identifier: MIT */
/* What is said of small plans, word for word. */
#include "../cmocka_all.h"
#include "review/review.h"
#include <string.h>

typedef struct
{
  const char *what;
  void (*make) (KhPlan *plan); /* from a closed hall of 4 x 3, start in A1 facing north, mark in D3 */
  const char *said;            /* "code severity: text", a line each, in order; the other hand's note left out */
} Case;

static KhEdge x_edge (int c, int r) { return (KhEdge){ KH_AXIS_X, c, r }; }
static KhEdge y_edge (int c, int r) { return (KhEdge){ KH_AXIS_Y, c, r }; }

static void wall (KhPlan *plan, KhEdge edge, gboolean walled)
{
  plan->walled[kh_lattice_edge_index (&plan->lattice, edge)] = walled != FALSE;
}

static void opening (KhPlan *plan, KhEdge edge, KhOpeningUse use)
{
  KhOpening o = { edge, use, NULL };
  g_array_append_val (plan->openings, o);
}

/* One way along the rows, so that nothing is bare: walls that reach from the sides. */
static void comb (KhPlan *plan)
{
  for (int c = 0; c < 3; c++)
    wall (plan, x_edge (c, 1), TRUE);
  for (int c = 1; c < 4; c++)
    wall (plan, x_edge (c, 2), TRUE);
  plan->start.heading = KH_HEADING_EAST;
}

static void leak (KhPlan *plan)
{
  comb (plan);
  wall (plan, y_edge (0, 1), FALSE);
}

static void leak_on_the_way (KhPlan *plan)
{
  comb (plan);
  wall (plan, y_edge (4, 0), FALSE);
}

static void pocket (KhPlan *plan)
{
  comb (plan);
  wall (plan, y_edge (1, 2), TRUE);
  wall (plan, y_edge (1, 1), TRUE);
}

static void no_start (KhPlan *plan)
{
  comb (plan);
  plan->has_start = FALSE;
}

static void start_on_gap (KhPlan *plan)
{
  comb (plan);
  plan->gap[0] = 1;
  wall (plan, y_edge (1, 0), TRUE);
}

static void no_mark (KhPlan *plan)
{
  comb (plan);
  g_array_set_size (plan->marks, 0);
}

static void exit_only (KhPlan *plan)
{
  no_mark (plan);
  wall (plan, y_edge (4, 2), FALSE);
  opening (plan, y_edge (4, 2), KH_OPENING_EXIT);
}

static void island (KhPlan *plan)
{
  wall (plan, x_edge (1, 1), TRUE);
  wall (plan, x_edge (2, 1), TRUE);
  wall (plan, y_edge (2, 1), TRUE);
  plan->start.heading = KH_HEADING_EAST;
}

static void mark_at_island (KhPlan *plan)
{
  island (plan);
  plan->walled[kh_lattice_edge_index (&plan->lattice, x_edge (1, 2))] = 1;
  g_array_index (plan->marks, KhMark, 0).cell = (KhCell){ 1, 1 };
}

static void mark_in_wall (KhPlan *plan)
{
  comb (plan);
  g_array_index (plan->marks, KhMark, 0).offset_nm[0] = 60000000;
}

static void walled_opening (KhPlan *plan)
{
  comb (plan);
  opening (plan, y_edge (0, 0), KH_OPENING_ENTRANCE);
}

static void opening_inside (KhPlan *plan)
{
  comb (plan);
  opening (plan, x_edge (3, 1), KH_OPENING_PLAIN);
}

static void no_wall_at_hand (KhPlan *plan)
{
  comb (plan);
  plan->start.heading = KH_HEADING_NORTH;
}

static void nothing (KhPlan *plan)
{
  memset (plan->walled, 0, (gsize) kh_lattice_n_edges (&plan->lattice));
}

static const Case cases[] = {
  { "a comb", comb, "" },
  { "a leak off the way", leak,
    "leak hinders: The boundary is open at A2 west and no opening is declared there. A robot that comes by can leave the maze. Lay a wall, or declare an opening.\n"
    "hand-fails notes: The left hand does not reach the mark. It leaves the maze at A2 west.\n" },
  { "a leak on the way", leak_on_the_way,
    "hand-fails breaks: The right hand does not reach the mark. It leaves the maze at D1 east.\n"
    "leak breaks: The boundary is open at D1 east and no opening is declared there. The right hand leaves the maze here. Lay a wall, or declare an opening.\n" },
  { "a pocket", pocket,
    "mark-unreachable breaks: The mark in D3 cannot be reached from the start. Walls or gaps part them on all ways; take a wall away, or move the mark.\n"
    "hand-fails breaks: The right hand does not reach the mark. It goes round for ever and sees 7 cells.\n"
    "pocket hinders: 5 cells cannot be reached from the start, A2 among them. No robot gets there. Take a wall away to open it, or take its floor away.\n"
    "hand-fails notes: The left hand does not reach the mark. It goes round for ever and sees 7 cells.\n" },
  { "no start", no_start, "no-start breaks: The plan has no start. No run can be shown; place one with the Start tool.\n" },
  { "a start on a gap", start_on_gap,
    "start-on-gap breaks: The start at A1 stands where there is no floor. No run can be shown; move the start, or give the floor back.\n"
    "wall-off-floor notes: 2 walls stand where there is no floor. No robot meets them, but they are cut and built.\n" },
  { "neither mark nor exit", no_mark,
    "no-mark breaks: The plan has neither a mark nor an exit. Nothing tells the robot that it has arrived; place a mark, or declare an exit.\n" },
  { "an exit and no mark", exit_only,
    "no-mark notes: The plan has no mark. A run counts as arrived when the robot leaves by the exit; a mark would tell the robot itself.\n" },
  { "an island", island,
    "island hinders: 3 walls round C2 stand free. The right hand still reaches its end; a robot that loses its wall here can circle them for ever.\n" },
  { "the mark at the island", mark_at_island,
    "island breaks: 4 walls round C2 stand free. The mark touches only this island: no hand rule from the start gets there.\n"
    "hand-fails breaks: The right hand does not reach the mark. It goes round for ever and sees 10 cells.\n"
    "hand-fails notes: The left hand does not reach the mark. It goes round for ever and sees 10 cells.\n" },
  { "a mark in a wall", mark_in_wall,
    "mark-in-wall hinders: The mark in D3 reaches under a wall or beyond its cell. What lies under a wall is not seen by the robot; make the mark smaller, or move it.\n" },
  { "an entrance with a wall", walled_opening,
    "opening-walled hinders: The entrance at A1 west has a wall in it. No robot gets through. Take the wall away, or the opening.\n" },
  { "an opening inside", opening_inside,
    "opening-inside hinders: The opening at D1 north is no longer on the boundary. It has no meaning inside; take it away.\n" },
  { "no wall at the hand", no_wall_at_hand,
    "no-wall-at-hand hinders: At the start in A1 there is no wall at the right hand. The robot drives straight on until a wall stands at its hand or ahead. Turn the start, or lay a wall there.\n" },
};

static KhPlan *hall_new (void)
{
  KhPlan *plan = kh_plan_new (4, 3, 180000000, 12000000, 50000000);
  KhMark mark = { { 3, 2 }, { 80000000, 80000000 }, { 0, 0 }, NULL };
  g_array_append_val (plan->marks, mark);
  return plan;
}

static void each_plan_is_told_what_is_true_of_it (void **state)
{
  int differ = 0;
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      KhReviewSettings settings;
      g_autoptr (KhPlan) plan = hall_new ();
      cases[i].make (plan);
      kh_review_settings_init (&settings, plan);
      g_autoptr (KhReview) review = kh_review_new (plan, &settings, NULL);
      g_autoptr (GString) said = g_string_new (NULL);
      for (guint k = 0; k < review->findings->len; k++)
        {
          const KhFinding *finding = g_ptr_array_index (review->findings, k);
          g_autofree char *text = kh_finding_dup_text (finding);
          assert_int_equal (finding->number, k + 1);
          if (strcmp (finding->code, "other-hand") != 0 && strcmp (finding->code, "bare-point") != 0)
            g_string_append_printf (said, "%s %s: %s\n", finding->code, kh_severity_get_name (finding->severity), text);
        }
      if (strcmp (said->str, cases[i].said) != 0)
        print_error ("%s\n  said\n%s  not\n%s", cases[i].what, said->str, cases[i].said);
      differ += strcmp (said->str, cases[i].said) != 0;
    }
  assert_int_equal (differ, 0);
}

static void a_hall_without_walls_is_empty (void **state)
{
  KhReviewSettings settings;
  g_autoptr (KhPlan) plan = hall_new ();
  nothing (plan);
  kh_review_settings_init (&settings, plan);
  g_autoptr (KhReview) review = kh_review_new (plan, &settings, NULL);
  const KhFinding *first = g_ptr_array_index (review->findings, 0);
  assert_true (review->n_by_severity[KH_SEVERITY_BREAKS] >= 1);
  assert_int_equal (first->severity, KH_SEVERITY_BREAKS);
  gboolean empty = FALSE, grouped = FALSE;
  for (guint i = 0; i < review->findings->len; i++)
    {
      const KhFinding *finding = g_ptr_array_index (review->findings, i);
      empty |= strcmp (finding->code, "empty") == 0;
      grouped |= strstr (finding->wrong, "more edges") != NULL;
    }
  assert_true (empty && grouped && review->findings->len < 20);
}

static void what_is_set_aside_is_counted_apart (void **state)
{
  KhReviewSettings settings;
  g_autoptr (KhPlan) plan = hall_new ();
  leak (plan);
  KhSetAside aside = { g_strdup ("leak"), { 0, 1.5 }, g_strdup ("the door of the hall"), NULL };
  g_array_append_val (plan->set_aside, aside);
  kh_review_settings_init (&settings, plan);
  g_autoptr (KhReview) review = kh_review_new (plan, &settings, NULL);
  assert_int_equal (review->n_set_aside, 1);
  assert_int_equal (review->n_by_severity[KH_SEVERITY_HINDERS], 0);
  const KhFinding *last = g_ptr_array_index (review->findings, review->findings->len - 1);
  assert_string_equal (last->reason, "the door of the hall");
  assert_int_equal (last->number, 0);
}

/* A square robot can turn only where its diagonal fits: clear 168 -> a side up to 118.8 (computed). */
static void a_robot_too_wide_is_told_before_any_run (void **state)
{
  for (int wide = 0; wide < 2; wide++)
    {
      KhReviewSettings settings;
      g_autoptr (KhPlan) plan = hall_new ();
      comb (plan);
      plan->robot.body.shape = KH_BODY_BOX;
      plan->robot.body.ahead_mm = plan->robot.body.behind_mm = plan->robot.body.half_width_mm = wide ? 59.45 : 59.35;
      kh_review_settings_init (&settings, plan);
      g_autoptr (KhReview) review = kh_review_new (plan, &settings, NULL);
      gboolean told = FALSE;
      for (guint i = 0; i < review->findings->len; i++)
        told |= strcmp (((const KhFinding *) g_ptr_array_index (review->findings, i))->code, "robot-too-wide") == 0;
      assert_int_equal (told, wide);
    }
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (each_plan_is_told_what_is_true_of_it),
    cmocka_unit_test (a_hall_without_walls_is_empty),
    cmocka_unit_test (what_is_set_aside_is_counted_apart),
    cmocka_unit_test (a_robot_too_wide_is_told_before_any_run),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
