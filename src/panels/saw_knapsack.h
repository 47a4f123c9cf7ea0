/* SPDX-License-Identifier: MIT */
#pragma once
#include "panels/saw_problem.h"

/* Inside the saw plan: the best filling of one strip, exact in whole numbers.
 * Bounded knapsack, depth first from the item of best value for its width, with
 * the fractional filling of the rest as the bound (Martello & Toth, Knapsack
 * Problems, 1990, sec. 3.4; section from memory).  Ends after 'nodes_most' steps. */

typedef struct
{
  const int64_t *value; /* an item each, 0 and more, at most 2^40 */
  const int *most;      /* an item each: taken at most so often */
  int64_t capacity;
  int64_t enough;       /* a value above which no better one is looked for; G_MAXINT64: the best */
  int nodes_most;
} KhSawFilling;

/* 'take' (an item each) gets the best found, *best its value.  Returns a value
 * that no filling exceeds; the same as *best but where steps ran out or 'enough'
 * was reached. */
int64_t kh_saw_knapsack (const KhSawProblem *problem, const KhSawFilling *filling, int *take, int64_t *best);
