/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/random.h"
#include "plan/robot.h"
#include "plan/solids.h"

/* What the robot's sensors say. A reading is millimetres from the sensor to
 * the wall, or NAN where there is no echo: nothing in range, or the wall met
 * too far off its normal (a painted board mirrors sound and light). Nearer
 * than the least reading, a sensor says the least: a wall at its face must not
 * look like no wall. */

typedef struct
{
  double side_front, side_rear, front;
} KhReadings;

/* The errors drawn for one run; all 0 when exact. */
typedef struct
{
  KhRandomKey key;
  const KhRobotErrors *errors; /* NULL: exact */
  double side_front_bias, side_rear_bias, front_bias;
  double wheel_gain[2];        /* left, right: factors about 1 */
} KhErrors;

/* Which number of a tick's draws is used for what. */
enum
{
  KH_DRAW_SIDE_FRONT, KH_DRAW_SIDE_REAR, KH_DRAW_FRONT, KH_DRAW_SLIP_LEFT, KH_DRAW_SLIP_RIGHT, KH_DRAW_TURN,
  KH_DRAW_DROP_SIDE_FRONT, KH_DRAW_DROP_SIDE_REAR, KH_DRAW_DROP_FRONT,
  /* once a run, at tick 0 of another word */
  KH_DRAW_BIAS_SIDE_FRONT, KH_DRAW_BIAS_SIDE_REAR, KH_DRAW_BIAS_FRONT, KH_DRAW_GAIN_LEFT, KH_DRAW_GAIN_RIGHT,
  KH_DRAW_START_X, KH_DRAW_START_Y, KH_DRAW_START_HEADING
};
#define KH_DRAW_ONCE UINT64_MAX /* the tick of what is drawn once a run */

void kh_errors_init (KhErrors *errors, const KhRobot *robot, KhRandomKey key, gboolean exact);

/* True distances first, then the errors. hand_sign +1: sensors on the right. */
void kh_sensors_read_side (const KhRobot *robot, const KhSolids *solids, KhPose pose, double hand_sign,
                           const KhErrors *errors, uint64_t tick, KhReadings *readings);
void kh_sensors_read_front (const KhRobot *robot, const KhSolids *solids, KhPose pose, const KhErrors *errors,
                            uint64_t tick, KhReadings *readings);
