/* SPDX-License-Identifier: MIT */
#pragma once
#include "draw/strippicture.h"

/* A run unrolled: one sample a few millimetres, and for each turn in place its place. */
typedef struct
{
  float distance;    /* mm along the run */
  float left, right; /* axle to wall, square to the heading; NAN: open */
  float front;       /* front reading; NAN: none */
  guint8 state;
  guint32 tick;
} KhStripSample;

struct KhStripData
{
  GArray *samples;   /* of KhStripSample, by distance */
  GArray *turns;     /* of float: where turns in place stand */
  double length;     /* mm */
  double half_width; /* of the body */
  double middle;     /* axle to wall in the middle of the way */
  double threshold;  /* of the front reading */
  double front_most; /* its range */
  double open;       /* further off than this a side is open */
  double least_clearance_at, least_clearance;
  gboolean failed;   /* did not arrive */
  gsize n_ticks;
  float *distance_of_tick;
  guint8 *turning;   /* by tick */
};
