/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/robot.h"

/* What people read for a number of the robot. */
const char *kh_robot_words_get (const KhRobotMember *member);  /* "track"; translated */
char *kh_robot_words_dup_unit (const KhRobotMember *member);   /* "mm/s"; NULL where the number says it, or has none */
