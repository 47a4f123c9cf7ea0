/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/plan.h"

/* A plan of another size: lines are added or taken away on the sides that do not stay. */
typedef struct
{
  int columns, rows;
  gboolean east_stays, north_stays; /* else west, south */
} KhResize;

/* The plan at its new size: a new boundary is walled where the old one was moved away. Owned. */
KhPlan *kh_resize_plan (const KhPlan *plan, const KhResize *resize);
/* What this changes and what would be lost; NULL where it changes nothing. Owned. */
char *kh_resize_dup_words (const KhPlan *plan, const KhResize *resize);
