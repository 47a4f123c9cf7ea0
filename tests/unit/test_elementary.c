/* SPDX-License-Identifier: MIT */
/* The elementary functions against the C library's (long double), in units in the last place. */
#include "../cmocka_all.h"
#include "base/elementary.h"
#include "base/geometry.h"
#include "base/random.h"
#include <float.h>
#include <math.h>

#define N_SAMPLES 200000

static double ulps (double got, long double want)
{
  int exponent;
  (void) frexpl ((long double) want, &exponent);
  return (double) (fabsl ((long double) got - want) / ldexpl ((long double) 1.0L, exponent - DBL_MANT_DIG));
}

static void every_function_is_within_two_ulp (void **state)
{
  KhRandomKey key = { 7, 0 };
  double worst[6] = { 0 };
  for (uint64_t i = 0; i < N_SAMPLES; i++)
    {
      double unit = kh_random_unit (key, i, 0), angle = (unit - 0.5) * (i % 2 ? 12 : 2e5);
      double wide = kh_exp ((kh_random_unit (key, i, 1) - 0.5) * 80);
      worst[0] = fmax (worst[0], ulps (kh_sin (angle), sinl ((long double) angle)));
      worst[1] = fmax (worst[1], ulps (kh_cos (angle), cosl ((long double) angle)));
      worst[2] = fmax (worst[2], ulps (kh_atan (i % 2 ? wide : -wide), atanl (i % 2 ? (long double) wide : (long double) -wide)));
      double power = (unit - 0.5) * 1400;
      worst[3] = fmax (worst[3], ulps (kh_exp (power), expl ((long double) power)));
      worst[4] = fmax (worst[4], ulps (kh_log (wide), logl ((long double) wide)));
      double y = (kh_random_unit (key, i, 2) - 0.5), x = (kh_random_unit (key, i, 3) - 0.5);
      worst[5] = fmax (worst[5], ulps (kh_atan2 (y, x), atan2l ((long double) y, (long double) x)));
    }
  for (int f = 0; f < 6; f++)
    if (!(worst[f] <= 2.0))
      fail_msg ("function %d is %.3f ulp off", f, worst[f]);
}

static void edges (void **state)
{
  assert_true (kh_sin (0) == 0 && kh_cos (0) == 1 && kh_atan (0) == 0 && kh_exp (0) == 1 && kh_log (1) == 0);
  assert_true (kh_atan2 (0, 0) == 0);
  assert_true (kh_atan2 (0, -1) == KH_PI);
  assert_true (kh_atan2 (1, 0) == KH_PI / 2);
  assert_true (kh_atan2 (-1, 0) == -KH_PI / 2);
}

/* Dudek & Jenkin, Computational Principles of Mobile Robotics, sec. 3.1.5 (the
 * formula; the value computed): wheels 0.6 and 0.8, track 0.5, one second. */
static void an_arc_ends_where_the_textbook_says (void **state)
{
  KhPose end = kh_pose_advance ((KhPose){ 0, 0, 0 }, 0.7, 0.2 / 0.5, 1);
  assert_true (fabs (end.x - 0.681482099) < 5e-10);
  assert_true (fabs (end.y - 0.138143260) < 5e-10);
  assert_true (fabs (end.heading_rad - 0.4) < 1e-15);
}

static void a_straight_line_is_the_limit_of_the_arc (void **state)
{
  for (double omega = 1e-3; omega > 1e-14; omega *= 0.1)
    {
      KhPose end = kh_pose_advance ((KhPose){ 1, 2, 0.5 }, 200, omega, 0.01);
      assert_true (fabs (end.x - (1 + 2 * cos (0.5))) < 2 * omega * 0.01 + 1e-14);
      assert_true (fabs (end.y - (2 + 2 * sin (0.5))) < 2 * omega * 0.01 + 1e-14);
    }
}

static void a_box_is_as_far_as_its_nearest_point (void **state)
{
  KhBox box = { 0, 0, 10, 5 };
  assert_true (kh_box_distance (box, (KhVec){ 3, 3 }) == 0);
  assert_true (kh_box_distance (box, (KhVec){ 13, 9 }) == 5);
  assert_true (kh_box_distance (box, (KhVec){ -2, 4 }) == 2);
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (every_function_is_within_two_ulp), cmocka_unit_test (edges),
    cmocka_unit_test (an_arc_ends_where_the_textbook_says),
    cmocka_unit_test (a_straight_line_is_the_limit_of_the_arc),
    cmocka_unit_test (a_box_is_as_far_as_its_nearest_point),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
