/* SPDX-License-Identifier: MIT */
#pragma once
#include "panels/saw_clock.h"
#include "panels/saw_problem.h"

/* Inside the saw plan: the search for the least cost, and its proof.
 *
 * The bound (saw_bound.h) names how much of each stock the least cost that is
 * still allowed would buy; that is tried: by filling strip by strip, by rounding
 * the linear programme down and what is left again (saw_dive.c), by searching it
 * through.  Either a plan is found, and nothing costs less; or what was found
 * wanting becomes a cut or a no-good, and the bound rises.  Where neither comes of
 * it within the steps allowed, the bound stays where it was and dearer plans are
 * tried: the plan may then be the best, but it is not called so. */

void kh_saw_search (const KhSawProblem *problem, double seconds, KhJob *job, KhSawOutcome *outcome);

/* One descent: the linear programme's ways rounded down, again and again, for
 * exactly these strips (a kind each).  'variant' 0 and up: where it departs from
 * the largest part first.  NULL where it does not come out. */
typedef struct
{
  const int *strips;
  const double *costs; /* of a strip, a kind each */
  int variant;
  KhSawClock *clock;
} KhSawDive;
KhSawDraft *kh_saw_dive (const KhSawProblem *problem, const KhSawDive *dive, GPtrArray *pool);
