/* SPDX-License-Identifier: MIT */
#include "app/robotwords.h"
#include <glib/gi18n-lib.h>
#include <string.h>

static const struct
{
  const char *object, *name, *words;
} words[] = {
  { "body", "radius_mm", N_ ("Radius of the disc") },
  { "body", "ahead_mm", N_ ("Box, ahead of the axle") },
  { "body", "behind_mm", N_ ("Box, behind the axle") },
  { "body", "half_width_mm", N_ ("Box, half its width") },
  { "drive", "track_mm", N_ ("Track, wheel to wheel") },
  { "drive", "wheel_radius_mm", N_ ("Wheel radius") },
  { "drive", "cruise_mm_s", N_ ("Speed along a wall") },
  { "drive", "curve_mm_s", N_ ("Speed in a curve") },
  { "drive", "pivot_wheel_mm_s", N_ ("Wheel speed in a turn") },
  { "drive", "wheel_limit_mm_s", N_ ("Fastest wheel speed") },
  { "drive", "lag_s", N_ ("Motor lag") },
  { "front_sensor", "ahead_mm", N_ ("Ahead of the axle") },
  { "front_sensor", "half_beam_deg", N_ ("Half the beam") },
  { "front_sensor", "incidence_limit_deg", N_ ("Echo up to an angle of") },
  { "front_sensor", "rate_hz", N_ ("Readings") },
  { "front_sensor", "rays", N_ ("Rays drawn") },
  { "side_sensors", "front_mm", N_ ("Front one, ahead of the axle") },
  { "side_sensors", "rear_mm", N_ ("Rear one, behind the axle") },
  { "side_sensors", "offset_mm", N_ ("From the centre line") },
  { "side_sensors", "incidence_limit_deg", N_ ("Echo up to an angle of") },
  { "side_sensors", "rate_hz", N_ ("Readings") },
  { "floor_sensor", "ahead_mm", N_ ("Ahead of the axle") },
  { "control", "rate_hz", N_ ("Control ticks") },
  { "control", "gain_per_s", N_ ("Gain") },
  { "control", "look_ahead_mm", N_ ("Look ahead") },
  { "control", "side_tolerance_mm", N_ ("Wall up to this farther off") },
  { "control", "jump_mm", N_ ("A jump is no wall from") },
  { "control", "lost_samples", N_ ("Readings until lost") },
  { "control", "blocked_samples", N_ ("Readings until blocked") },
  { "control", "trim", N_ ("Learn the difference between the wheels") },
  { "control", "lead_in_add_mm", N_ ("Added before a curve") },
  { "errors", "side_noise_mm", N_ ("Side, each reading") },
  { "errors", "side_bias_mm", N_ ("Side, once a run") },
  { "errors", "side_step_mm", N_ ("Side, resolution") },
  { "errors", "front_noise_mm", N_ ("Front, each reading") },
  { "errors", "front_bias_mm", N_ ("Front, once a run") },
  { "errors", "front_step_mm", N_ ("Front, resolution") },
  { "errors", "wheel_gain_percent", N_ ("Wheels, once a run") },
  { "errors", "slip_percent", N_ ("Slip, each tick") },
  { "errors", "turn_time_percent", N_ ("Time of a turn") },
  { "errors", "start_mm", N_ ("Place of the start") },
  { "errors", "start_deg", N_ ("Heading of the start") },
  { "errors", "dropout_percent", N_ ("Readings that drop out") },
  { "errors", "wall_place_mm", N_ ("Place of the panels") },
};

const char *kh_robot_words_get (const KhRobotMember *member)
{
  for (gsize i = 0; i < G_N_ELEMENTS (words); i++)
    if (strcmp (words[i].object, member->object) == 0 && strcmp (words[i].name, member->name) == 0)
      return _ (words[i].words);
  return member->name;
}

char *kh_robot_words_dup_unit (const KhRobotMember *member)
{
  static const char *const units[][2] = { { "_mm_s", "mm/s" }, { "_deg", "°" },     { "_hz", N_ ("a second") },
                                          { "_percent", "%" }, { "_per_s", "1/s" }, { "_s", "s" } };
  for (gsize i = 0; i < G_N_ELEMENTS (units); i++)
    if (g_str_has_suffix (member->name, units[i][0]))
      return g_strdup (_ (units[i][1]));
  return NULL;
}
