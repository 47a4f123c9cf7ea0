/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/solids.h"

/* A ray among the walls: two-axis traversal of the bands (Amanatides & Woo,
 * "A fast voxel traversal algorithm for ray tracing", Eurographics 1987). No
 * allocation; cost: bands crossed. */
typedef struct
{
  double distance;  /* mm; infinite: nothing is hit */
  double incidence; /* cosine of the angle between ray and the face's normal; 1 when the origin lies in a wall */
  int i, j;         /* the band hit */
} KhRayHit;

/* (dx, dy) of length 1. */
void kh_ray_cast (const KhSolids *solids, KhVec from, double dx, double dy, KhRayHit *hit);
