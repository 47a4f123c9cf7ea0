/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/robot.h"
#include "plan/solids.h"

/* How far the body is from the nearest wall, and where that is. Exact up to
 * about a pitch; beyond, a lower bound. No allocation. */
typedef struct
{
  double distance; /* 0 when they touch or overlap */
  KhVec at;        /* the nearest place on the wall */
  int i, j;        /* its band; -1: none near */
} KhClearance;

void kh_clearance (const KhSolids *solids, const KhRobotBody *body, KhPose pose, KhClearance *clearance);
