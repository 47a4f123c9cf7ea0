/* SPDX-License-Identifier: MIT */
#include "plan/robot.h"
#include "base/units.h"
#include <glib/gi18n-lib.h>
#include <math.h>
#include <stddef.h>
#include <string.h>

G_DEFINE_QUARK (kh - robot - error - quark, kh_robot_error)

#define AT(path) offsetof (KhRobot, path)
#define LENGTH_MOST 5000.0

static const KhRobotMember members[] = {
  { "body", "radius_mm", KH_MEMBER_DOUBLE, AT (body.radius_mm), 1, LENGTH_MOST },
  { "body", "ahead_mm", KH_MEMBER_DOUBLE, AT (body.ahead_mm), 1, LENGTH_MOST },
  { "body", "behind_mm", KH_MEMBER_DOUBLE, AT (body.behind_mm), 1, LENGTH_MOST },
  { "body", "half_width_mm", KH_MEMBER_DOUBLE, AT (body.half_width_mm), 1, LENGTH_MOST },
  { "drive", "track_mm", KH_MEMBER_DOUBLE, AT (drive.track_mm), 1, LENGTH_MOST },
  { "drive", "wheel_radius_mm", KH_MEMBER_DOUBLE, AT (drive.wheel_radius_mm), 1, LENGTH_MOST },
  { "drive", "cruise_mm_s", KH_MEMBER_DOUBLE, AT (drive.cruise_mm_s), 1, 10000 },
  { "drive", "curve_mm_s", KH_MEMBER_DOUBLE, AT (drive.curve_mm_s), 1, 10000 },
  { "drive", "pivot_wheel_mm_s", KH_MEMBER_DOUBLE, AT (drive.pivot_wheel_mm_s), 1, 10000 },
  { "drive", "wheel_limit_mm_s", KH_MEMBER_DOUBLE, AT (drive.wheel_limit_mm_s), 1, 10000 },
  { "drive", "lag_s", KH_MEMBER_DOUBLE, AT (drive.lag_s), 0, 2 },
  { "front_sensor", "ahead_mm", KH_MEMBER_DOUBLE, AT (front_sensor.ahead_mm), -LENGTH_MOST, LENGTH_MOST },
  { "front_sensor", "half_beam_deg", KH_MEMBER_DOUBLE, AT (front_sensor.half_beam_deg), 0, 60 },
  { "front_sensor", "incidence_limit_deg", KH_MEMBER_DOUBLE, AT (front_sensor.incidence_limit_deg), 1, 90 },
  { "front_sensor", "rate_hz", KH_MEMBER_DOUBLE, AT (front_sensor.rate_hz), 0.5, 1000 },
  { "front_sensor", "rays", KH_MEMBER_INT, AT (front_sensor.n_rays), 1, 99 },
  { "side_sensors", "front_mm", KH_MEMBER_DOUBLE, AT (side_sensors.front_mm), 0, LENGTH_MOST },
  { "side_sensors", "rear_mm", KH_MEMBER_DOUBLE, AT (side_sensors.rear_mm), 0, LENGTH_MOST },
  { "side_sensors", "offset_mm", KH_MEMBER_DOUBLE, AT (side_sensors.offset_mm), 0, LENGTH_MOST },
  { "side_sensors", "incidence_limit_deg", KH_MEMBER_DOUBLE, AT (side_sensors.incidence_limit_deg), 1, 90 },
  { "side_sensors", "rate_hz", KH_MEMBER_DOUBLE, AT (side_sensors.rate_hz), 0.5, 1000 },
  { "floor_sensor", "ahead_mm", KH_MEMBER_DOUBLE, AT (floor_sensor.ahead_mm), -LENGTH_MOST, LENGTH_MOST },
  { "control", "rate_hz", KH_MEMBER_DOUBLE, AT (control.rate_hz), 5, 1000 },
  { "control", "gain_per_s", KH_MEMBER_DOUBLE, AT (control.gain_per_s), 0.01, 1000 },
  { "control", "look_ahead_mm", KH_MEMBER_DOUBLE, AT (control.look_ahead_mm), 1, LENGTH_MOST },
  { "control", "side_tolerance_mm", KH_MEMBER_DOUBLE_OPEN, AT (control.side_tolerance_mm), 0, LENGTH_MOST },
  { "control", "jump_mm", KH_MEMBER_DOUBLE_OPEN, AT (control.jump_mm), 0, LENGTH_MOST },
  { "control", "lost_samples", KH_MEMBER_INT, AT (control.n_lost_samples), 1, 20 },
  { "control", "blocked_samples", KH_MEMBER_INT, AT (control.n_blocked_samples), 1, 20 },
  { "control", "trim", KH_MEMBER_BOOLEAN, AT (control.trim), 0, 1 },
  { "control", "lead_in_add_mm", KH_MEMBER_DOUBLE, AT (control.lead_in_add_mm), -LENGTH_MOST, LENGTH_MOST },
  { "errors", "side_noise_mm", KH_MEMBER_DOUBLE, AT (errors.side_noise_mm), 0, 1000 },
  { "errors", "side_bias_mm", KH_MEMBER_DOUBLE, AT (errors.side_bias_mm), 0, 1000 },
  { "errors", "side_step_mm", KH_MEMBER_DOUBLE, AT (errors.side_step_mm), 0, 1000 },
  { "errors", "front_noise_mm", KH_MEMBER_DOUBLE, AT (errors.front_noise_mm), 0, 1000 },
  { "errors", "front_bias_mm", KH_MEMBER_DOUBLE, AT (errors.front_bias_mm), 0, 1000 },
  { "errors", "front_step_mm", KH_MEMBER_DOUBLE, AT (errors.front_step_mm), 0, 1000 },
  { "errors", "wheel_gain_percent", KH_MEMBER_DOUBLE, AT (errors.wheel_gain_percent), 0, 50 },
  { "errors", "slip_percent", KH_MEMBER_DOUBLE, AT (errors.slip_percent), 0, 50 },
  { "errors", "turn_time_percent", KH_MEMBER_DOUBLE, AT (errors.turn_time_percent), 0, 50 },
  { "errors", "start_mm", KH_MEMBER_DOUBLE, AT (errors.start_mm), 0, 1000 },
  { "errors", "start_deg", KH_MEMBER_DOUBLE, AT (errors.start_deg), 0, 90 },
  { "errors", "dropout_percent", KH_MEMBER_DOUBLE, AT (errors.dropout_percent), 0, 100 },
  { "errors", "wall_place_mm", KH_MEMBER_DOUBLE, AT (errors.wall_place_mm), 0, 100 },
};

const KhRobotMember *kh_robot_get_members (gsize *n_members)
{
  *n_members = G_N_ELEMENTS (members);
  return members;
}

/* A small club robot for a pitch of 180 mm and walls of 12 mm. */
static const KhRobot small = {
  .hand = KH_HAND_RIGHT,
  .body = { .shape = KH_BODY_DISC, .radius_mm = 50, .ahead_mm = 40, .behind_mm = 40, .half_width_mm = 42 },
  .drive = { .track_mm = 80,
             .wheel_radius_mm = 16,
             .cruise_mm_s = 200,
             .curve_mm_s = 200,
             .pivot_wheel_mm_s = 120,
             .wheel_limit_mm_s = 400,
             .lag_s = 0 },
  .front_sensor = { .ahead_mm = 40,
                    .half_beam_deg = 15,
                    .incidence_limit_deg = 35,
                    .range_mm = { 20, 400 },
                    .rate_hz = 30,
                    .n_rays = 9 },
  .side_sensors = { .front_mm = 35,
                    .rear_mm = 35,
                    .offset_mm = 35,
                    .range_mm = { 5, 150 },
                    .incidence_limit_deg = 70,
                    .rate_hz = 100 },
  .control = { .rate_hz = 100,
               .gain_per_s = 4,
               .look_ahead_mm = 40,
               .side_tolerance_mm = (double) NAN,
               .jump_mm = (double) NAN,
               .n_lost_samples = 2,
               .n_blocked_samples = 2,
               .trim = TRUE,
               .lost_by = KH_LOST_BY_FRONT },
  .errors = { .side_noise_mm = 1.5,
              .side_bias_mm = 1.5,
              .side_step_mm = 1,
              .front_noise_mm = 3,
              .front_bias_mm = 3,
              .front_step_mm = 1,
              .wheel_gain_percent = 2,
              .slip_percent = 3,
              .turn_time_percent = 3,
              .start_mm = 5,
              .start_deg = 2 },
};

void kh_robot_init (KhRobot *robot)
{
  *robot = small;
  robot->name = g_strdup ("");
}

/* The larger robot of a wide school maze: pitch 300 mm, walls of 18 mm. */
static void widen (KhRobot *robot)
{
  robot->body.radius_mm = 85;
  robot->drive.track_mm = 130;
  robot->drive.wheel_radius_mm = 33;
  robot->drive.cruise_mm_s = robot->drive.curve_mm_s = 300;
  robot->drive.pivot_wheel_mm_s = 200;
  robot->drive.wheel_limit_mm_s = 600;
  robot->front_sensor.ahead_mm = 70;
  robot->front_sensor.range_mm[1] = 600;
  robot->side_sensors.front_mm = robot->side_sensors.rear_mm = robot->side_sensors.offset_mm = 60;
  robot->side_sensors.range_mm[1] = 250;
  robot->control.gain_per_s = 6;
  robot->control.look_ahead_mm = 70;
}

void kh_robot_init_for_pitch (KhRobot *robot, int64_t pitch_nm)
{
  kh_robot_init (robot);
  if (pitch_nm > 240 * KH_NM_PER_MM)
    widen (robot);
}

/* The texts a robot owns: its name and what each object of the file holds that is not known. */
#define N_TEXTS 9
static void get_texts (KhRobot *robot, char **texts[N_TEXTS])
{
  char **all[N_TEXTS] = { &robot->name,
                          &robot->body.other,
                          &robot->drive.other,
                          &robot->front_sensor.other,
                          &robot->side_sensors.other,
                          &robot->floor_sensor.other,
                          &robot->control.other,
                          &robot->errors.other,
                          &robot->other };
  memcpy (texts, all, sizeof all);
}

void kh_robot_copy (KhRobot *robot, const KhRobot *from)
{
  char **texts[N_TEXTS];
  *robot = *from;
  get_texts (robot, texts);
  for (int i = 0; i < N_TEXTS; i++)
    *texts[i] = g_strdup (*texts[i]);
}

void kh_robot_clear (KhRobot *robot)
{
  char **texts[N_TEXTS];
  get_texts (robot, texts);
  for (int i = 0; i < N_TEXTS; i++)
    g_clear_pointer (texts[i], g_free);
}

static gboolean member_equal (const KhRobotMember *member, const KhRobot *a, const KhRobot *b)
{
  const char *at_a = (const char *)a + member->offset, *at_b = (const char *)b + member->offset;
  if (member->kind == KH_MEMBER_INT || member->kind == KH_MEMBER_BOOLEAN)
    return memcmp (at_a, at_b, sizeof (int)) == 0;
  double x, y;
  memcpy (&x, at_a, sizeof x);
  memcpy (&y, at_b, sizeof y);
  return x == y || (isnan (x) && isnan (y));
}

gboolean kh_robot_equal (const KhRobot *a, const KhRobot *b)
{
  KhRobot copy_a = *a, copy_b = *b; /* get_texts only looks */
  char **texts_a[N_TEXTS], **texts_b[N_TEXTS];
  for (gsize i = 0; i < G_N_ELEMENTS (members); i++)
    if (!member_equal (&members[i], a, b))
      return FALSE;
  get_texts (&copy_a, texts_a);
  get_texts (&copy_b, texts_b);
  for (int i = 0; i < N_TEXTS; i++)
    if (g_strcmp0 (*texts_a[i], *texts_b[i]) != 0)
      return FALSE;
  return a->hand == b->hand && a->body.shape == b->body.shape && a->control.lost_by == b->control.lost_by
         && memcmp (a->front_sensor.range_mm, b->front_sensor.range_mm, sizeof a->front_sensor.range_mm) == 0
         && memcmp (a->side_sensors.range_mm, b->side_sensors.range_mm, sizeof a->side_sensors.range_mm) == 0;
}

static double member_value (const KhRobotMember *member, const KhRobot *robot)
{
  const char *at = (const char *)robot + member->offset;
  if (member->kind == KH_MEMBER_INT || member->kind == KH_MEMBER_BOOLEAN)
    return *(const int *)(const void *)at;
  double value;
  memcpy (&value, at, sizeof value);
  return value;
}

static gboolean check_range (const char *path, const double range[2], GError **error)
{
  if (range[0] >= 0 && range[1] > range[0] && range[1] <= 20000)
    return TRUE;
  g_set_error (error, KH_ROBOT_ERROR, KH_ROBOT_ERROR_MEMBER,
               _ ("%s is [%g, %g]; give the least and the most reading in millimetres, the least first, up to 20000"),
               path, range[0], range[1]);
  return FALSE;
}

gboolean kh_robot_check (const KhRobot *robot, GError **error)
{
  for (gsize i = 0; i < G_N_ELEMENTS (members); i++)
    {
      double value = member_value (&members[i], robot);
      if (members[i].kind == KH_MEMBER_DOUBLE_OPEN && isnan (value))
        continue;
      if (!(value >= members[i].least && value <= members[i].most))
        {
          g_set_error (error, KH_ROBOT_ERROR, KH_ROBOT_ERROR_MEMBER, _ ("%s.%s is %g; give a number from %g to %g"),
                       members[i].object, members[i].name, value, members[i].least, members[i].most);
          return FALSE;
        }
    }
  if (robot->side_sensors.front_mm + robot->side_sensors.rear_mm < 1)
    {
      g_set_error (
          error, KH_ROBOT_ERROR, KH_ROBOT_ERROR_MEMBER,
          _ ("side_sensors.front_mm and rear_mm are %g and %g; the two sensors must stand at least 1 mm apart"),
          robot->side_sensors.front_mm, robot->side_sensors.rear_mm);
      return FALSE;
    }
  return check_range ("front_sensor.range_mm", robot->front_sensor.range_mm, error)
         && check_range ("side_sensors.range_mm", robot->side_sensors.range_mm, error);
}

double kh_robot_side_tolerance_mm (const KhRobot *robot, int64_t pitch_nm)
{
  double given = robot->control.side_tolerance_mm;
  return isnan (given) ? kh_mm_from_nm (pitch_nm) / 2 : given;
}

double kh_robot_jump_mm (const KhRobot *robot, int64_t pitch_nm)
{
  double given = robot->control.jump_mm;
  return isnan (given) ? 0.17 * kh_mm_from_nm (pitch_nm) : given;
}

double kh_robot_swept_radius_mm (const KhRobot *robot)
{
  const KhRobotBody *body = &robot->body;
  if (body->shape == KH_BODY_DISC)
    return body->radius_mm;
  double along = MAX (body->ahead_mm, body->behind_mm);
  return sqrt (along * along + body->half_width_mm * body->half_width_mm);
}
