/* SPDX-License-Identifier: MIT */
#include "base/geometry.h"
#include "base/elementary.h"
#include <math.h>

/* sin (x) / x near nothing, where the quotient would be 0 / 0. */
static double sine_quotient (double x, double sine) { return fabs (x) > 1e-4 ? sine / x : 1.0 - x * x / 6.0; }

/* The chord of the arc: length v dt sin(h)/h, half the turn h away from the
 * heading.  Written so, it needs no case for the straight line. */
KhPose kh_pose_advance (KhPose pose, double v_mm_s, double omega_rad_s, double dt_s)
{
  double half = 0.5 * omega_rad_s * dt_s;
  double sine = kh_sin (half);
  double chord = v_mm_s * dt_s * sine_quotient (half, sine);
  double s, c;
  kh_sincos (pose.heading_rad + half, &s, &c);
  return (KhPose){ pose.x + chord * c, pose.y + chord * s, pose.heading_rad + omega_rad_s * dt_s };
}

KhVec kh_pose_place (KhPose pose, double ahead_mm, double left_mm)
{
  double s, c;
  kh_sincos (pose.heading_rad, &s, &c);
  return (KhVec){ pose.x + ahead_mm * c - left_mm * s, pose.y + ahead_mm * s + left_mm * c };
}

double kh_box_distance (KhBox box, KhVec point)
{
  double dx = MAX (MAX (box.x0 - point.x, point.x - box.x1), 0.0);
  double dy = MAX (MAX (box.y0 - point.y, point.y - box.y1), 0.0);
  return sqrt (dx * dx + dy * dy);
}
