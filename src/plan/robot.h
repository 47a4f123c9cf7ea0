/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>

/* The robot as a plan describes it: numbers only, nothing derived.
 * Lengths mm, speeds mm/s, times s, angles degrees, as in the plan file.
 * Members marked "NAN = left open" take a value from the pitch.  Each 'other'
 * keeps, as source text, the members of that object that are not known. */

typedef enum { KH_HAND_RIGHT, KH_HAND_LEFT } KhHand;
typedef enum { KH_BODY_DISC, KH_BODY_BOX } KhBodyShape;
typedef enum { KH_LOST_BY_FRONT, KH_LOST_BY_REAR, KH_LOST_BY_EITHER } KhLostBy;

typedef struct
{
  KhBodyShape shape;
  double radius_mm;                               /* disc, about the axle's centre */
  double ahead_mm, behind_mm, half_width_mm;      /* box, from the axle's centre */
  char *other;
} KhRobotBody;

typedef struct
{
  double track_mm;          /* between the wheels' contact points */
  double wheel_radius_mm;
  double cruise_mm_s, curve_mm_s;
  double pivot_wheel_mm_s;  /* rim speed of each wheel while turning in place */
  double wheel_limit_mm_s;
  double lag_s;             /* motors: first order */
  char *other;
} KhRobotDrive;

typedef struct
{
  double ahead_mm;            /* ahead of the axle */
  double half_beam_deg;
  double incidence_limit_deg; /* of the wall's normal to the ray */
  double range_mm[2];         /* least, most */
  double rate_hz;
  int n_rays;
  char *other;
} KhFrontSensor;

typedef struct
{
  double front_mm, rear_mm;   /* ahead of and behind the axle, both positive */
  double offset_mm;           /* from the centre line */
  double range_mm[2];
  double incidence_limit_deg;
  double rate_hz;
  char *other;
} KhSideSensors;

typedef struct
{
  double ahead_mm;
  char *other;
} KhFloorSensor;

typedef struct
{
  double rate_hz;
  double gain_per_s;
  double look_ahead_mm;
  double side_tolerance_mm;   /* NAN = left open: half the pitch */
  double jump_mm;             /* NAN = left open: 0.17 of the pitch */
  int n_lost_samples, n_blocked_samples;
  gboolean trim;
  KhLostBy lost_by;
  double lead_in_add_mm;
  char *other;
} KhRobotControl;

/* Standard deviations, but for the three steps (resolution) and the dropout share. */
typedef struct
{
  double side_noise_mm, side_bias_mm, side_step_mm;
  double front_noise_mm, front_bias_mm, front_step_mm;
  double wheel_gain_percent, slip_percent, turn_time_percent;
  double start_mm, start_deg;
  double dropout_percent;
  double wall_place_mm;
  char *other;
} KhRobotErrors;

typedef struct
{
  char *name;
  KhHand hand;
  KhRobotBody body;
  KhRobotDrive drive;
  KhFrontSensor front_sensor;
  KhSideSensors side_sensors;
  KhFloorSensor floor_sensor;
  KhRobotControl control;
  KhRobotErrors errors;
  char *other;
} KhRobot;

void kh_robot_init (KhRobot *robot); /* the small robot for a pitch of 180 mm: the file's defaults */
void kh_robot_init_for_pitch (KhRobot *robot, int64_t pitch_nm); /* small or wide, whichever pitch is nearer */
void kh_robot_copy (KhRobot *robot, const KhRobot *from); /* deep; 'robot' uninitialised */
void kh_robot_clear (KhRobot *robot);
gboolean kh_robot_equal (const KhRobot *a, const KhRobot *b);

/* Names the first member at fault by its path ("drive.track_mm"), what stands
 * there and what is asked for.  FALSE with *error set. */
gboolean kh_robot_check (const KhRobot *robot, GError **error);

#define KH_ROBOT_ERROR (kh_robot_error_quark ())
GQuark kh_robot_error_quark (void);
typedef enum { KH_ROBOT_ERROR_MEMBER } KhRobotErrorCode;

double kh_robot_side_tolerance_mm (const KhRobot *robot, int64_t pitch_nm);
double kh_robot_jump_mm (const KhRobot *robot, int64_t pitch_nm);
double kh_robot_swept_radius_mm (const KhRobot *robot); /* of the body about the axle's centre */

/* Every number of a robot, one row each, in file order: what files, the bench
 * and error texts share.  'offset' is into KhRobot; kind tells the type there. */
typedef enum { KH_MEMBER_DOUBLE, KH_MEMBER_DOUBLE_OPEN /* NAN written as null */, KH_MEMBER_INT, KH_MEMBER_BOOLEAN } KhMemberKind;
typedef struct
{
  const char *object; /* "" for the robot itself, else "drive", ... */
  const char *name;   /* "track_mm" */
  KhMemberKind kind;
  gsize offset;
  double least, most; /* allowed, ends included */
} KhRobotMember;
const KhRobotMember *kh_robot_get_members (gsize *n_members); /* borrowed, static; ranges and text members are not in it */
