/* SPDX-License-Identifier: MIT */
/* Driving against textbook values and against GSL's ODE integrator, rays against all boxes. */
#include "../cmocka_all.h"
#include "base/elementary.h"
#include "base/geometry.h"
#include "base/random.h"
#include "mazes.h"
#include "plan/solids.h"
#include "robot/clearance.h"
#include "robot/derived.h"
#include "robot/rays.h"
#include <gsl/gsl_errno.h>
#include <gsl/gsl_odeiv2.h>
#include <math.h>

/* x' = v cos th, y' = v sin th, th' = omega */
static int unicycle (double t, const double y[], double f[], void *params)
{
  const double *command = params;
  f[0] = command[0] * cos (y[2]);
  f[1] = command[0] * sin (y[2]);
  f[2] = command[1];
  return GSL_SUCCESS;
}

static void arcs_agree_with_an_integrator (void **state)
{
  for (uint64_t i = 0; i < 400; i++)
    {
      KhRandomKey key = { 21, 0 };
      double command[2] = { 600 * (kh_random_unit (key, i, 0) - 0.5), i % 7 ? 12 * (kh_random_unit (key, i, 1) - 0.5) : 0 };
      double seconds = 2 * kh_random_unit (key, i, 2), t = 0;
      double y[3] = { 100 * kh_random_unit (key, i, 3), 5, 7 * (kh_random_unit (key, i, 4) - 0.5) };
      KhPose end = kh_pose_advance ((KhPose){ y[0], y[1], y[2] }, command[0], command[1], seconds);
      gsl_odeiv2_system system = { unicycle, NULL, 3, command };
      gsl_odeiv2_driver *driver = gsl_odeiv2_driver_alloc_y_new (&system, gsl_odeiv2_step_rk8pd, 1e-3, 1e-10, 1e-12);
      assert_int_equal (gsl_odeiv2_driver_apply (driver, &t, seconds, y), GSL_SUCCESS);
      gsl_odeiv2_driver_free (driver);
      assert_true (fabs (end.x - y[0]) < 1e-7 && fabs (end.y - y[1]) < 1e-7 && fabs (end.heading_rad - y[2]) < 1e-9);
    }
}

/* Siegwart, Nourbakhsh, Introduction to Autonomous Mobile Robots, 2004, sec. 3.2
 * (section from memory): wheel radius 1, half track 1, rates 4 and 2, heading 90 degrees: (0, 3, 1). */
static void forward_kinematics_are_the_textbooks (void **state)
{
  double right = 4, left = 2, half = 1, v = (right + left) / 2, omega = (right - left) / (2 * half), dt = 1e-7;
  KhPose end = kh_pose_advance ((KhPose){ 0, 0, KH_PI / 2 }, v, omega, dt);
  assert_true (fabs (end.x / dt) < 1e-6 && fabs (end.y / dt - 3) < 1e-6 && fabs ((end.heading_rad - KH_PI / 2) / dt - 1) < 1e-6);
}

/* Computed, t = pi b / (4 v): a quarter turn in place, track 100, wheels 200: 0.392699 s. A quarter
 * circle R 90, track 100, speed 200: 0.706858 s, wheels 311.11 and 88.89; with wheels limited to 200
 * the speed is 128.571 and it takes 1.099557 s. */
static void turns_and_curves_take_the_time_computed (void **state)
{
  g_autoptr (KhPlan) plan = kh_plan_new (4, 4, 180000000, 12000000, 50000000);
  plan->robot.drive.track_mm = 100;
  plan->robot.drive.pivot_wheel_mm_s = 200;
  plan->robot.drive.wheel_limit_mm_s = 400;
  KhDerived derived;
  kh_derived_init (&derived, plan, KH_HAND_RIGHT);
  assert_true (fabs (KH_PI / 2 / derived.pivot_rate - 0.392699) < 5e-7);
  double speed = kh_derived_curve_speed_mm_s (&plan->robot, 90);
  assert_true (fabs (speed - 200) < 1e-12);
  assert_true (fabs (KH_PI / 2 * 90 / speed - 0.706858) < 5e-7);
  assert_true (fabs (speed * (1 + 100.0 / 180) - 311.11) < 5e-3 && fabs (speed * (1 - 100.0 / 180) - 88.89) < 5e-3);
  plan->robot.drive.wheel_limit_mm_s = 200;
  speed = kh_derived_curve_speed_mm_s (&plan->robot, 90);
  assert_true (fabs (speed - 128.571) < 5e-4);
  assert_true (fabs (KH_PI / 2 * 90 / speed - 1.099557) < 5e-7);
}

/* Tractrix: a point ahead driven along a straight line, tan(phi/2) = tan(phi0/2) exp(-V t / e);
 * V 100, e 50, phi0 90 degrees, 1 s: 15.41463 degrees. (computed two ways) */
static void a_point_ahead_pulls_the_robot_along_a_tractrix (void **state)
{
  double e = 50, V = 100, dt = 1e-5;
  KhPose pose = { 0, 0, KH_PI / 2 };
  for (int i = 0; i < 100000; i++)
    pose = kh_pose_advance (pose, V * kh_cos (pose.heading_rad), -V * kh_sin (pose.heading_rad) / e, dt);
  assert_true (fabs (pose.heading_rad * 180 / KH_PI - 15.41463) < 2e-3);
  assert_true (fabs (2 * kh_atan (kh_exp (-2)) * 180 / KH_PI - 15.41463) < 5e-6);
}

/* A ray against one box: slabs (Kay & Kajiya 1986); the second way. */
static double slab (KhBox box, KhVec from, double dx, double dy)
{
  double near = -HUGE_VAL, far = HUGE_VAL;
  const double lows[2] = { box.x0 - from.x, box.y0 - from.y }, highs[2] = { box.x1 - from.x, box.y1 - from.y }, d[2] = { dx, dy };
  for (int axis = 0; axis < 2; axis++)
    {
      if (d[axis] == 0)
        {
          if (lows[axis] > 0 || highs[axis] < 0)
            return HUGE_VAL;
          continue;
        }
      double a = lows[axis] / d[axis], b = highs[axis] / d[axis];
      near = fmax (near, fmin (a, b));
      far = fmin (far, fmax (a, b));
    }
  return near <= far && far >= 0 ? fmax (near, 0) : HUGE_VAL;
}

static void rays_agree_with_all_boxes (void **state)
{
  double worst = 0;
  int hits = 0;
  for (uint64_t seed = 1; seed <= 12; seed++)
    {
      KhRandomKey key = { seed, 3 };
      g_autoptr (KhPlan) plan = kh_test_layout_new (7, 6, 0.35, seed);
      g_autoptr (KhSolids) solids = kh_solids_new (plan);
      g_autoptr (GArray) boxes = kh_solids_dup_boxes (solids);
      for (uint64_t i = 0; i < 2000; i++)
        {
          KhRayHit hit;
          KhVec from = { 1260 * kh_random_unit (key, i, 0), 1080 * kh_random_unit (key, i, 1) };
          double s, c, angle = i % 20 ? 7 * kh_random_unit (key, i, 2) : KH_PI / 2 * (double) (i % 4), best = HUGE_VAL;
          kh_sincos (angle, &s, &c);
          if (i % 20 == 0)
            {
              c = i % 80 == 0 ? 1 : i % 80 == 40 ? -1 : 0;
              s = i % 80 == 20 ? 1 : i % 80 == 60 ? -1 : 0;
            }
          kh_ray_cast (solids, from, c, s, &hit);
          for (guint k = 0; k < boxes->len; k++)
            best = fmin (best, slab (g_array_index (boxes, KhBox, k), from, c, s));
          if (isinf (best) != 0 || isinf (hit.distance) != 0)
            assert_true (isinf (best) && isinf (hit.distance));
          else
            {
              worst = fmax (worst, fabs (best - hit.distance));
              hits++;
            }
        }
    }
  print_message ("%d rays hit; farthest apart %.3g mm\n", hits, worst);
  assert_true (hits > 15000 && worst < 1e-9);
}

/* The body's clearance against all boxes, for discs: distance to the nearest less the radius. */
static void clearance_agrees_with_all_boxes (void **state)
{
  for (uint64_t seed = 1; seed <= 8; seed++)
    {
      KhRandomKey key = { seed, 4 };
      g_autoptr (KhPlan) plan = kh_test_layout_new (6, 6, 0.4, seed);
      g_autoptr (KhSolids) solids = kh_solids_new (plan);
      g_autoptr (GArray) boxes = kh_solids_dup_boxes (solids);
      for (uint64_t i = 0; i < 1000; i++)
        {
          KhClearance clearance;
          KhRobotBody body = { .shape = i % 2 ? KH_BODY_BOX : KH_BODY_DISC, .radius_mm = 40, .ahead_mm = 30, .behind_mm = 45, .half_width_mm = 35 };
          KhPose pose = { 1080 * kh_random_unit (key, i, 0), 1080 * kh_random_unit (key, i, 1), 7 * kh_random_unit (key, i, 2) };
          double nearest = HUGE_VAL;
          kh_clearance (solids, &body, pose, &clearance);
          for (guint k = 0; k < boxes->len; k++)
            if (body.shape == KH_BODY_DISC)
              nearest = fmin (nearest, fmax (kh_box_distance (g_array_index (boxes, KhBox, k), (KhVec){ pose.x, pose.y }) - 40, 0));
            else
              /* The outline walked in small steps: an upper bound within a step. */
              for (int n = 0; n < 4 * 60; n++)
                {
                  static const double corner[5][2] = { { -45, -35 }, { 30, -35 }, { 30, 35 }, { -45, 35 }, { -45, -35 } };
                  int side = n / 60;
                  double share = (n % 60) / 60.0;
                  KhVec at = kh_pose_place (pose, corner[side][0] + share * (corner[side + 1][0] - corner[side][0]),
                                            corner[side][1] + share * (corner[side + 1][1] - corner[side][1]));
                  nearest = fmin (nearest, kh_box_distance (g_array_index (boxes, KhBox, k), at));
                }
          if (body.shape == KH_BODY_DISC && nearest < 120)
            assert_true (fabs (nearest - clearance.distance) < 1e-9);
          else if (body.shape == KH_BODY_BOX && nearest < 150)
            assert_true (clearance.distance <= nearest + 1e-9 && (clearance.distance >= nearest - 1.4 || clearance.distance == 0));
        }
    }
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (arcs_agree_with_an_integrator), cmocka_unit_test (forward_kinematics_are_the_textbooks),
    cmocka_unit_test (turns_and_curves_take_the_time_computed), cmocka_unit_test (a_point_ahead_pulls_the_robot_along_a_tractrix),
    cmocka_unit_test (rays_agree_with_all_boxes), cmocka_unit_test (clearance_agrees_with_all_boxes),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
