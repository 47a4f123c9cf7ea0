/* SPDX-License-Identifier: MIT */
#include "robot/derived.h"
#include "base/elementary.h"
#include "base/units.h"

void kh_derived_init (KhDerived *derived, const KhPlan *plan, KhHand hand)
{
  const KhRobot *robot = &plan->robot;
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm), thickness = kh_mm_from_nm (plan->walls.thickness_nm);
  double middle = pitch / 2 - thickness / 2;
  *derived = (KhDerived){
    .pitch = pitch,
    .thickness = thickness,
    .hand_sign = hand == KH_HAND_RIGHT ? 1 : -1,
    .wall_distance = middle,
    .side_reading = middle - robot->side_sensors.offset_mm,
    .front_threshold = middle - robot->front_sensor.ahead_mm,
    .jump = kh_robot_jump_mm (robot, plan->lattice.pitch_nm),
    .control_period = 1 / robot->control.rate_hz,
    .side_period = 1 / robot->side_sensors.rate_hz,
    .front_period = 1 / robot->front_sensor.rate_hz,
    .pivot_rate = 2 * robot->drive.pivot_wheel_mm_s / robot->drive.track_mm,
  };
  derived->side_limit = MIN (derived->side_reading + kh_robot_side_tolerance_mm (robot, plan->lattice.pitch_nm),
                             robot->side_sensors.range_mm[1] - 1);
  derived->front_arms
      = derived->front_threshold + robot->control.n_blocked_samples * robot->drive.cruise_mm_s * derived->front_period;
}

double kh_derived_lead_in_mm (const KhDerived *derived, const KhRobot *robot, double wall_distance, double angle_rad)
{
  double seen_late = derived->side_period / 2 + (robot->control.n_lost_samples - 1) * derived->side_period;
  double way = robot->side_sensors.front_mm - derived->thickness / 2 + wall_distance * kh_tan (angle_rad)
               - robot->drive.cruise_mm_s * (seen_late + robot->drive.lag_s) + robot->control.lead_in_add_mm;
  return MAX (way, 0.0);
}

double kh_derived_curve_radius_mm (const KhDerived *derived, double wall_distance)
{
  double radius = wall_distance + derived->thickness / 2;
  return CLAMP (radius, 0.6 * derived->pitch / 2, 1.4 * derived->pitch / 2);
}

double kh_derived_curve_speed_mm_s (const KhRobot *robot, double radius)
{
  double most = robot->drive.wheel_limit_mm_s / (1 + robot->drive.track_mm / (2 * radius));
  return MIN (robot->drive.curve_mm_s, most);
}
