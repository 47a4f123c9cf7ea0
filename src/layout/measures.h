/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/plan.h"

/* Counts of a layout for people and for check --json.  -1 where there is no answer. */
typedef struct
{
  int shortest_steps;   /* start to the nearest mark (no mark: out by an exit), breadth first */
  int dead_ends;        /* cells of the start's region with one way out (openings and leaks are ways) */
  int junctions;        /* with three or four */
  int longest_straight; /* cells in a row without a wall between */
  int points_by_kind[5]; /* end, straight, corner, tee, cross */
} KhMeasures;

void kh_measures (const KhPlan *plan, KhMeasures *measures);
