/* SPDX-License-Identifier: MIT */
/* The follower on random perfect mazes: what it must reach, and what must hold of every run. */
#include "../cmocka_all.h"
#include "base/random.h"
#include "layout/handwalk.h"
#include "mazes.h"
#include "robot/run.h"
#include <math.h>
#include <string.h>

/* A sanitizer makes a run ten times as long, and needs only a few to see what it looks for. */
#if defined(__has_feature)
#if __has_feature(address_sanitizer)
#define N_MAZES 6
#define N_WITH_ERRORS 12
#endif
#endif
#ifndef N_MAZES
#define N_MAZES 100
#define N_WITH_ERRORS 300
#endif
#define LEAST_SHARE 0.985    /* of runs with the default errors */
#define LEAST_CLEARANCE 0.12 /* of the pitch, no errors */

static KhTrace *run (const KhPlan *plan, KhHand hand, gboolean exact, guint64 seed, guint64 trial)
{
  g_autoptr (KhSolids) solids = kh_solids_new (plan);
  KhRunSettings settings = { hand, exact, seed, trial };
  KhTrace *trace = kh_run (plan, solids, &settings, NULL, NULL);
  assert_non_null (trace);
  return trace;
}

static void assert_as_walked (const KhPlan *plan, const KhTrace *trace, guint64 seed)
{
  KhHandWalk walk;
  assert_true (kh_hand_walk (plan, trace->hand, &walk));
  if (trace->outcome != KH_OUTCOME_ARRIVED)
    fail_msg ("seed %" G_GUINT64_FORMAT ": %s", seed, trace->why);
  assert_int_equal (trace->cells->len, walk.path->len);
  assert_memory_equal (trace->cells->data, walk.path->data, walk.path->len * sizeof (KhCell));
  kh_hand_walk_clear (&walk);
}

/* Two default robots, two sizes, either hand: all arrive by the cells of the
 * hand walk, and never come nearer to a wall than 0.12 of the pitch. */
static void without_errors_every_maze_is_driven_as_walked (void **state)
{
  static const double pitches[2] = { 180, 300 }, walls[2] = { 12, 18 };
  static const int sizes[2] = { 8, 16 };
  for (int robot = 0; robot < 2; robot++)
    for (int size = 0; size < 2; size++)
      {
        double least = HUGE_VAL;
        for (guint64 seed = 1; seed <= N_MAZES; seed++)
          for (int hand = 0; hand < 2; hand++)
            {
              g_autoptr (KhPlan) plan = kh_test_maze_new (sizes[size], sizes[size], pitches[robot], walls[robot], seed);
              kh_test_maze_face (plan, (KhHand)hand);
              g_autoptr (KhTrace) trace = run (plan, (KhHand)hand, TRUE, 1, 0);
              assert_as_walked (plan, trace, seed);
              least = MIN (least, trace->least_clearance_mm);
            }
        print_message ("pitch %g, %d x %d: %d runs arrive, least clearance %.2f mm = %.4f of the pitch\n",
                       pitches[robot], sizes[size], sizes[size], 2 * N_MAZES, least, least / pitches[robot]);
        assert_true (least >= LEAST_CLEARANCE * pitches[robot]);
      }
}

static void with_the_default_errors_nearly_all_arrive (void **state)
{
  int arrived = 0;
  for (guint64 trial = 0; trial < N_WITH_ERRORS; trial++)
    {
      g_autoptr (KhPlan) plan = kh_test_maze_new (16, 16, 180, 12, 1000 + trial);
      kh_test_maze_face (plan, (KhHand)(trial % 2));
      g_autoptr (KhTrace) trace = run (plan, (KhHand)(trial % 2), FALSE, 1, trial);
      arrived += trace->outcome == KH_OUTCOME_ARRIVED;
      if (trace->outcome != KH_OUTCOME_ARRIVED)
        print_message ("trial %" G_GUINT64_FORMAT ": %s\n", trial, trace->why);
    }
  print_message ("%d of %d arrive with the default errors\n", arrived, N_WITH_ERRORS);
  assert_true (arrived >= LEAST_SHARE * N_WITH_ERRORS);
}

/* Both hands are the same code mirrored: the mirrored plan gives the mirrored
 * run. Odd numbers, so that no ray meets a corner to the last bit, where
 * rounding would decide. */
static void a_mirrored_plan_gives_the_mirrored_run (void **state)
{
  for (guint64 seed = 1; seed <= 10; seed++)
    {
      g_autoptr (KhPlan) plan = kh_test_maze_new (7, 5, 180, 12, seed);
      plan->robot.drive.cruise_mm_s = 197.3;
      plan->robot.side_sensors.front_mm = 34.71;
      g_autoptr (KhPlan) mirror = kh_test_mirror_new (plan);
      g_autoptr (KhTrace) a = run (plan, KH_HAND_RIGHT, TRUE, 1, 0);
      g_autoptr (KhTrace) b = run (mirror, KH_HAND_LEFT, TRUE, 1, 0);
      assert_int_equal (a->ticks->len, b->ticks->len);
      for (gsize i = 0; i < kh_trace_get_n_ticks (a); i++)
        {
          const KhTick *x = kh_trace_get_tick (a, i), *y = kh_trace_get_tick (b, i);
          assert_int_equal (x->state, y->state);
          assert_true (fabs (x->x - (7 * 180 - y->x)) < 1e-6 && fabs (x->y - y->y) < 1e-6);
        }
    }
}

static void the_same_key_gives_the_same_run (void **state)
{
  g_autoptr (KhPlan) plan = kh_test_maze_new (8, 8, 180, 12, 5);
  g_autoptr (KhTrace) a = run (plan, KH_HAND_RIGHT, FALSE, 3, 7);
  g_autoptr (KhTrace) b = run (plan, KH_HAND_RIGHT, FALSE, 3, 7);
  g_autoptr (KhTrace) other = run (plan, KH_HAND_RIGHT, FALSE, 3, 8);
  assert_true (kh_trace_hash (a) == kh_trace_hash (b));
  assert_true (kh_trace_hash (a) != kh_trace_hash (other));
}

/* Nothing a file may hold brings a run down: robots of any sane and insane numbers end with one outcome. */
static void odd_robots_come_to_an_end (void **state)
{
  gsize n;
  const KhRobotMember *members = kh_robot_get_members (&n);
  int outcomes[6] = { 0 };
  for (guint64 seed = 0; seed < 150; seed++)
    {
      KhRandomKey key = { seed, 9 };
      g_autoptr (KhPlan) plan = kh_test_maze_new (4, 4, 180, 12, seed);
      for (int k = 0; k < 4; k++)
        {
          const KhRobotMember *member = &members[kh_random_below (key, 0, (uint64_t)k, (uint32_t)n)];
          double share = pow (kh_random_unit (key, 1, (uint64_t)k), 4);
          double value = member->least + share * (member->most - member->least);
          if (member->kind == KH_MEMBER_INT)
            *(int *)(void *)((char *)&plan->robot + member->offset) = (int)value;
          else if (member->kind != KH_MEMBER_BOOLEAN)
            *(double *)(void *)((char *)&plan->robot + member->offset) = value;
        }
      plan->robot.body.shape = seed % 3 == 0 ? KH_BODY_BOX : KH_BODY_DISC;
      g_autoptr (KhSolids) solids = kh_solids_new (plan);
      KhRunSettings settings = { (KhHand)(seed % 2), seed % 4 == 0, 1, seed };
      g_autoptr (GError) error = NULL;
      g_autoptr (KhTrace) trace = kh_run (plan, solids, &settings, NULL, &error);
      if (!trace)
        {
          assert_true (g_error_matches (error, KH_RUN_ERROR, KH_RUN_ERROR_ROBOT));
          continue;
        }
      outcomes[trace->outcome]++;
      assert_true (*trace->why != '\0');
      for (gsize i = 0; i < kh_trace_get_n_ticks (trace); i++)
        assert_true (isfinite (kh_trace_get_tick (trace, i)->x) && isfinite (kh_trace_get_tick (trace, i)->y));
    }
  assert_true (outcomes[KH_OUTCOME_ARRIVED] > 0 && outcomes[KH_OUTCOME_CONTACT] > 0);
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (without_errors_every_maze_is_driven_as_walked),
    cmocka_unit_test (with_the_default_errors_nearly_all_arrive),
    cmocka_unit_test (a_mirrored_plan_gives_the_mirrored_run),
    cmocka_unit_test (the_same_key_gives_the_same_run),
    cmocka_unit_test (odd_robots_come_to_an_end),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
