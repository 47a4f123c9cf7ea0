/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/plan.h"

/* A perfect maze drawn evenly from all there are (Wilson, STOC 1996), the same
 * for the same seed: start in A1, a mark of half a clear width in the far corner,
 * the default robot for the pitch. Owned. */
KhPlan *kh_test_maze_new (int columns, int rows, double pitch_mm, double thickness_mm, uint64_t seed);

/* Turns the start so that a way lies ahead and a wall at the hand. */
void kh_test_maze_face (KhPlan *plan, KhHand hand);

/* The same plan seen in a mirror that swaps east and west, the other hand. Owned. */
KhPlan *kh_test_mirror_new (const KhPlan *plan);

/* Any layout: each inner edge walled with this share, gaps, openings, leaks, posts at random. Owned. */
KhPlan *kh_test_layout_new (int columns, int rows, double share, uint64_t seed);
