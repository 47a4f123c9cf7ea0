/* SPDX-License-Identifier: MIT */
/* The "robot" of a plan file.  Limits are those of kh_robot_get_members. */
#include "files/planfields.h"
#include <stddef.h>

#define ROW(type, member, name, kind, ...)                                                                             \
  {                                                                                                                    \
    name, kind, offsetof (type, member), __VA_ARGS__                                                                   \
  }
#define NUMBER(type, member, name, least, most) ROW (type, member, name, KH_FIELD_DOUBLE, least, most)
#define LENGTH(type, member, name) NUMBER (type, member, name, 0, 5000)
#define PLACE(type, member, name) NUMBER (type, member, name, -5000, 5000)
#define END                                                                                                            \
  {                                                                                                                    \
    NULL                                                                                                               \
  }

static const char *const hand_choices[] = { "right", "left", NULL };
static const char *const shape_choices[] = { "disc", "box", NULL };
static const char *const lost_by_choices[] = { "front", "rear", "either", NULL };

/* A disc is written with its radius, a box with its sides; what the other shape
 * holds is written only where it differs from what stands in for it. */
static gboolean wants_radius (gconstpointer from)
{
  const KhRobotBody *body = from;
  return body->shape == KH_BODY_DISC || body->radius_mm != 50;
}

static gboolean wants_ahead (gconstpointer from)
{
  const KhRobotBody *body = from;
  return body->shape == KH_BODY_BOX || body->ahead_mm != 40;
}

static gboolean wants_behind (gconstpointer from)
{
  const KhRobotBody *body = from;
  return body->shape == KH_BODY_BOX || body->behind_mm != 40;
}

static gboolean wants_half_width (gconstpointer from)
{
  const KhRobotBody *body = from;
  return body->shape == KH_BODY_BOX || body->half_width_mm != 42;
}

static const KhField body_rows[] = {
  ROW (KhRobotBody, shape, "shape", KH_FIELD_CHOICE, .choices = shape_choices),
  ROW (KhRobotBody, radius_mm, "radius_mm", KH_FIELD_DOUBLE, 1, 5000, .wanted = wants_radius),
  ROW (KhRobotBody, ahead_mm, "ahead_mm", KH_FIELD_DOUBLE, 1, 5000, .wanted = wants_ahead),
  ROW (KhRobotBody, behind_mm, "behind_mm", KH_FIELD_DOUBLE, 1, 5000, .wanted = wants_behind),
  ROW (KhRobotBody, half_width_mm, "half_width_mm", KH_FIELD_DOUBLE, 1, 5000, .wanted = wants_half_width),
  END,
};
static const KhFields body_fields = { body_rows, offsetof (KhRobotBody, other) };

static const KhField drive_rows[] = {
  NUMBER (KhRobotDrive, track_mm, "track_mm", 1, 5000),
  NUMBER (KhRobotDrive, wheel_radius_mm, "wheel_radius_mm", 1, 5000),
  NUMBER (KhRobotDrive, cruise_mm_s, "cruise_mm_s", 1, 10000),
  NUMBER (KhRobotDrive, curve_mm_s, "curve_mm_s", 1, 10000),
  NUMBER (KhRobotDrive, pivot_wheel_mm_s, "pivot_wheel_mm_s", 1, 10000),
  NUMBER (KhRobotDrive, wheel_limit_mm_s, "wheel_limit_mm_s", 1, 10000),
  NUMBER (KhRobotDrive, lag_s, "lag_s", 0, 2),
  END,
};
static const KhFields drive_fields = { drive_rows, offsetof (KhRobotDrive, other) };

static const KhField front_rows[] = {
  PLACE (KhFrontSensor, ahead_mm, "ahead_mm"),
  NUMBER (KhFrontSensor, half_beam_deg, "half_beam_deg", 0, 60),
  NUMBER (KhFrontSensor, incidence_limit_deg, "incidence_limit_deg", 1, 90),
  ROW (KhFrontSensor, range_mm, "range_mm", KH_FIELD_RANGE, 0, 20000),
  NUMBER (KhFrontSensor, rate_hz, "rate_hz", 0.5, 1000),
  ROW (KhFrontSensor, n_rays, "rays", KH_FIELD_INT, 1, 99),
  END,
};
static const KhFields front_fields = { front_rows, offsetof (KhFrontSensor, other) };

static const KhField side_rows[] = {
  LENGTH (KhSideSensors, front_mm, "front_mm"),
  LENGTH (KhSideSensors, rear_mm, "rear_mm"),
  LENGTH (KhSideSensors, offset_mm, "offset_mm"),
  ROW (KhSideSensors, range_mm, "range_mm", KH_FIELD_RANGE, 0, 20000),
  NUMBER (KhSideSensors, incidence_limit_deg, "incidence_limit_deg", 1, 90),
  NUMBER (KhSideSensors, rate_hz, "rate_hz", 0.5, 1000),
  END,
};
static const KhFields side_fields = { side_rows, offsetof (KhSideSensors, other) };

static const KhField floor_rows[] = {
  PLACE (KhFloorSensor, ahead_mm, "ahead_mm"),
  END,
};
static const KhFields floor_fields = { floor_rows, offsetof (KhFloorSensor, other) };

static const KhField control_rows[] = {
  NUMBER (KhRobotControl, rate_hz, "rate_hz", 5, 1000),
  NUMBER (KhRobotControl, gain_per_s, "gain_per_s", 0.01, 1000),
  NUMBER (KhRobotControl, look_ahead_mm, "look_ahead_mm", 1, 5000),
  ROW (KhRobotControl, side_tolerance_mm, "side_tolerance_mm", KH_FIELD_DOUBLE_OPEN, 0, 5000),
  ROW (KhRobotControl, jump_mm, "jump_mm", KH_FIELD_DOUBLE_OPEN, 0, 5000),
  ROW (KhRobotControl, n_lost_samples, "lost_samples", KH_FIELD_INT, 1, 20),
  ROW (KhRobotControl, n_blocked_samples, "blocked_samples", KH_FIELD_INT, 1, 20),
  ROW (KhRobotControl, trim, "trim", KH_FIELD_BOOLEAN, .least = 0),
  ROW (KhRobotControl, lost_by, "lost_by", KH_FIELD_CHOICE, .choices = lost_by_choices),
  PLACE (KhRobotControl, lead_in_add_mm, "lead_in_add_mm"),
  END,
};
static const KhFields control_fields = { control_rows, offsetof (KhRobotControl, other) };

static const KhField errors_rows[] = {
  NUMBER (KhRobotErrors, side_noise_mm, "side_noise_mm", 0, 1000),
  NUMBER (KhRobotErrors, side_bias_mm, "side_bias_mm", 0, 1000),
  NUMBER (KhRobotErrors, side_step_mm, "side_step_mm", 0, 1000),
  NUMBER (KhRobotErrors, front_noise_mm, "front_noise_mm", 0, 1000),
  NUMBER (KhRobotErrors, front_bias_mm, "front_bias_mm", 0, 1000),
  NUMBER (KhRobotErrors, front_step_mm, "front_step_mm", 0, 1000),
  NUMBER (KhRobotErrors, wheel_gain_percent, "wheel_gain_percent", 0, 50),
  NUMBER (KhRobotErrors, slip_percent, "slip_percent", 0, 50),
  NUMBER (KhRobotErrors, turn_time_percent, "turn_time_percent", 0, 50),
  NUMBER (KhRobotErrors, start_mm, "start_mm", 0, 1000),
  NUMBER (KhRobotErrors, start_deg, "start_deg", 0, 90),
  NUMBER (KhRobotErrors, dropout_percent, "dropout_percent", 0, 100),
  NUMBER (KhRobotErrors, wall_place_mm, "wall_place_mm", 0, 100),
  END,
};
static const KhFields errors_fields = { errors_rows, offsetof (KhRobotErrors, other) };

static const KhField robot_rows[] = {
  ROW (KhRobot, name, "name", KH_FIELD_TEXT, .most = 200),
  ROW (KhRobot, hand, "hand", KH_FIELD_CHOICE, .choices = hand_choices),
  ROW (KhRobot, body, "body", KH_FIELD_OBJECT, .object = &body_fields),
  ROW (KhRobot, drive, "drive", KH_FIELD_OBJECT, .object = &drive_fields),
  ROW (KhRobot, front_sensor, "front_sensor", KH_FIELD_OBJECT, .object = &front_fields),
  ROW (KhRobot, side_sensors, "side_sensors", KH_FIELD_OBJECT, .object = &side_fields),
  ROW (KhRobot, floor_sensor, "floor_sensor", KH_FIELD_OBJECT, .object = &floor_fields),
  ROW (KhRobot, control, "control", KH_FIELD_OBJECT, .object = &control_fields),
  ROW (KhRobot, errors, "errors", KH_FIELD_OBJECT, .object = &errors_fields),
  END,
};
const KhFields kh_plan_robot_fields = { robot_rows, offsetof (KhRobot, other) };
