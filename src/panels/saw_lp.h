/* SPDX-License-Identifier: MIT */
#pragma once
#include "panels/saw_clock.h"
#include "panels/saw_problem.h"

/* Inside the saw plan: how often each way of cutting is used if parts of a strip
 * were allowed, by column generation (Gilmore & Gomory, Operations Research 9,
 * 1961, and 11, 1963): a small linear programme over the ways known so far; its
 * prices ask the knapsack for a better way, until there is none.  Ways never
 * take more of an item than is asked for.
 *
 * Reckoned in doubles by the revised simplex method with the inverse kept whole;
 * nothing is proven by it: its prices, scaled and rounded down, go through the
 * whole-number cut of saw_bound.h. */

typedef struct
{
  const int *demands;   /* an item each; 0: left out */
  const int *strips;    /* a kind each: at most */
  const double *costs;  /* a kind each: of a strip, 0 to 1 */
  KhSawClock *clock;
} KhSawLpTask;

typedef struct
{
  GPtrArray *ways;   /* of KhSawWay ('times' unused) */
  GArray *amounts;   /* of double, a way each */
  int64_t *values;   /* an item each, at most 2^38: for a cut */
  double missing;    /* pieces that the strips cannot hold even in parts; 0 within 1e-6 */
  gboolean is_ended; /* FALSE: out of steps or time; amounts and values are what stood then */
} KhSawLp;

#define KH_SAW_LP_ROWS 1000 /* items with demand and kinds together; with more it
                               * gives no way and no value, not ended */

/* Adds to 'pool' (of KhSawWay, borrowed) what it finds; ways of the pool are
 * taken in, cut down to the demands. */
KhSawLp *kh_saw_lp_new (const KhSawProblem *problem, const KhSawLpTask *task, GPtrArray *pool);
void kh_saw_lp_free (KhSawLp *lp);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhSawLp, kh_saw_lp_free)
