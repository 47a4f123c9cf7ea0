/* SPDX-License-Identifier: MIT */
#pragma once
#include "layout/handwalk.h"
#include "layout/layout.h"

/* The findings of a layout and what was looked at and found sound.  Texts are
 * true for this plan: what an island does to the robot is taken from the hand
 * walk.  'walks' holds right and left; NULL where there is no walk.
 * Returns KhFinding *, owned, without numbers; 'sound' (of char *, owned) is appended to. */
GPtrArray *kh_layout_find (const KhPlan *plan, const KhLayout *layout, const KhHandWalk *right,
                           const KhHandWalk *left, GPtrArray *sound);
