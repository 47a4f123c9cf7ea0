/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/plan.h"

/* What follows for a robot from pitch and wall thickness: the settings its own
 * program needs. Millimetres, seconds, radians.
 *
 *   pitch p, wall thickness t; side sensors b off the centre line, front one
 *   a_f ahead of the axle; front sensor d ahead of the axle. */
typedef struct
{
  double pitch, thickness;
  double hand_sign;        /* +1 right hand, -1 left */
  double wall_distance;    /* D* = p/2 - t/2: axle centre to wall face, in the middle of the way */
  double side_reading;     /* s* = D* - b */
  double front_threshold;  /* F* = p/2 - t/2 - d: the axle is at the cell's centre */
  double side_limit;       /* readings from here on are no wall: min (s* + tolerance, range - 1) */
  double jump;             /* more than this above the last wall is no wall */
  double front_arms;       /* F* + blocked samples * cruise * front period */
  double control_period, side_period, front_period;
  double pivot_rate;       /* rad/s in place: 2 * wheel speed / track */
} KhDerived;

void kh_derived_init (KhDerived *derived, const KhPlan *plan, KhHand hand);

/* The way driven straight once the wall is lost, before the curve: the axle
 * comes to the wall's end. wall_distance and angle as measured; never under 0. */
double kh_derived_lead_in_mm (const KhDerived *derived, const KhRobot *robot, double wall_distance, double angle_rad);
/* The curve's radius, kept within 0.6 and 1.4 of half a pitch. */
double kh_derived_curve_radius_mm (const KhDerived *derived, double wall_distance);
/* Its speed, lowered so that the outer wheel stays within its limit. */
double kh_derived_curve_speed_mm_s (const KhRobot *robot, double radius);
