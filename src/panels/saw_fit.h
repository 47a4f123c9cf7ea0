/* SPDX-License-Identifier: MIT */
#pragma once
#include "panels/saw_clock.h"
#include "panels/saw_problem.h"

/* Inside the saw plan: do these pieces go into these strips?  Strip by strip,
 * the longest piece left being put into each kind in turn, with every filling
 * that leaves no room for another piece and wastes no more than can be spared
 * (bin completion: Korf, AAAI 2002; Martello & Toth 1990, ch. 8, chapter from
 * memory); states that have failed are remembered. */

typedef enum { KH_SAW_FIT_FOUND, KH_SAW_FIT_NONE, KH_SAW_FIT_UNKNOWN } KhSawFitResult;

typedef struct
{
  const int *demands; /* an item each */
  const int *strips;  /* a kind each */
  int nodes_most;
  KhSawClock *clock;
} KhSawFitTask;

/* Appends the ways to 'ways' (of KhSawWay) when found, else leaves it alone. */
KhSawFitResult kh_saw_fit (const KhSawProblem *problem, const KhSawFitTask *task, GPtrArray *ways);
