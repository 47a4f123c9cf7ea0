/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include <stdint.h>

/* Plane geometry in doubles: millimetres and radians.
 *
 *        y (north)
 *        |
 *        |   heading: counter-clockwise from x
 *        |  /
 *        | / )
 *  datum +------- x (east)
 */

typedef struct
{
  double x, y;
} KhVec;

typedef struct
{
  double x, y;        /* mm */
  double heading_rad; /* counter-clockwise from east; not wrapped */
} KhPose;

typedef struct
{
  double x0, y0, x1, y1; /* x0 <= x1, y0 <= y1 */
} KhBox;

/* Where a unicycle is after driving v and turning at omega for dt: the exact
 * arc (Dudek & Jenkin, Computational Principles of Mobile Robotics, sec. 3.1.5),
 * a straight line in the limit.  Uses base/elementary only: the same bits everywhere. */
KhPose kh_pose_advance (KhPose pose, double v_mm_s, double omega_rad_s, double dt_s);

/* A point given in the robot's frame (ahead, left) put into the plane. */
KhVec kh_pose_place (KhPose pose, double ahead_mm, double left_mm);

/* Distance from a point to the nearest point of a box; 0 inside. */
double kh_box_distance (KhBox box, KhVec point);
