/* SPDX-License-Identifier: MIT */
#include "robot/sensors.h"
#include "base/elementary.h"
#include "robot/rays.h"
#include <math.h>

#define RAD(degrees) ((degrees) * (KH_PI / 180))

void kh_errors_init (KhErrors *errors, const KhRobot *robot, KhRandomKey key, gboolean exact)
{
  const KhRobotErrors *e = &robot->errors;
  *errors = (KhErrors){ .key = key, .errors = exact ? NULL : e, .wheel_gain = { 1, 1 } };
  if (exact)
    return;
  errors->side_front_bias = e->side_bias_mm * kh_random_gauss (key, KH_DRAW_ONCE, KH_DRAW_BIAS_SIDE_FRONT);
  errors->side_rear_bias = e->side_bias_mm * kh_random_gauss (key, KH_DRAW_ONCE, KH_DRAW_BIAS_SIDE_REAR);
  errors->front_bias = e->front_bias_mm * kh_random_gauss (key, KH_DRAW_ONCE, KH_DRAW_BIAS_FRONT);
  for (int wheel = 0; wheel < 2; wheel++)
    errors->wheel_gain[wheel]
        += e->wheel_gain_percent / 100 * kh_random_gauss (key, KH_DRAW_ONCE, (uint64_t)(KH_DRAW_GAIN_LEFT + wheel));
}

/* A reading as the robot gets it: bias, noise, resolution, drop-outs. */
static double spoil (const KhErrors *errors, uint64_t tick, double mm, double bias, double noise, double step, int draw)
{
  if (!errors->errors || isnan (mm))
    return mm;
  double drop = errors->errors->dropout_percent;
  if (drop > 0 && kh_random_unit (errors->key, tick, (uint64_t)(draw + KH_DRAW_DROP_SIDE_FRONT)) * 100 < drop)
    return (double)NAN;
  mm += bias + noise * kh_random_gauss (errors->key, tick, (uint64_t)draw);
  if (step > 0)
    mm = floor (mm / step + 0.5) * step;
  return MAX (mm, 0.0);
}

/* One ray of a side sensor; true distance or NAN. */
static double look_aside (const KhRobot *robot, const KhSolids *solids, KhPose pose, double hand_sign, double ahead)
{
  const KhSideSensors *side = &robot->side_sensors;
  KhRayHit hit;
  double s, c;
  kh_sincos (pose.heading_rad, &s, &c);
  KhVec from
      = { pose.x + ahead * c + hand_sign * side->offset_mm * s, pose.y + ahead * s - hand_sign * side->offset_mm * c };
  kh_ray_cast (solids, from, hand_sign * s, -hand_sign * c, &hit);
  gboolean seen = hit.distance <= side->range_mm[1] && hit.incidence >= kh_cos (RAD (side->incidence_limit_deg));
  return seen ? MAX (hit.distance, side->range_mm[0]) : (double)NAN;
}

void kh_sensors_read_side (const KhRobot *robot, const KhSolids *solids, KhPose pose, double hand_sign,
                           const KhErrors *errors, uint64_t tick, KhReadings *readings)
{
  const KhRobotErrors *e = &robot->errors;
  double front = look_aside (robot, solids, pose, hand_sign, robot->side_sensors.front_mm);
  double rear = look_aside (robot, solids, pose, hand_sign, -robot->side_sensors.rear_mm);
  readings->side_front
      = spoil (errors, tick, front, errors->side_front_bias, e->side_noise_mm, e->side_step_mm, KH_DRAW_SIDE_FRONT);
  readings->side_rear
      = spoil (errors, tick, rear, errors->side_rear_bias, e->side_noise_mm, e->side_step_mm, KH_DRAW_SIDE_REAR);
}

void kh_sensors_read_front (const KhRobot *robot, const KhSolids *solids, KhPose pose, const KhErrors *errors,
                            uint64_t tick, KhReadings *readings)
{
  const KhFrontSensor *front = &robot->front_sensor;
  KhVec from = kh_pose_place (pose, front->ahead_mm, 0);
  double limit = kh_cos (RAD (front->incidence_limit_deg)), half = RAD (front->half_beam_deg), nearest = HUGE_VAL;
  int n = front->n_rays;
  for (int ray = 0; ray < n; ray++)
    {
      KhRayHit hit;
      double s, c, off = n > 1 ? half * (2.0 * ray / (n - 1) - 1) : 0;
      kh_sincos (pose.heading_rad + off, &s, &c);
      kh_ray_cast (solids, from, c, s, &hit);
      if (hit.incidence >= limit && hit.distance < nearest)
        nearest = hit.distance;
    }
  gboolean seen = nearest <= front->range_mm[1];
  readings->front = spoil (errors, tick, seen ? MAX (nearest, front->range_mm[0]) : (double)NAN, errors->front_bias,
                           robot->errors.front_noise_mm, robot->errors.front_step_mm, KH_DRAW_FRONT);
}
