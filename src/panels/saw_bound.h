/* SPDX-License-Identifier: MIT */
#pragma once
#include "panels/saw_clock.h"
#include "panels/saw_problem.h"

/* Inside the saw plan: what any plan must cost, in whole numbers.
 *
 * Give every item a value v (0 and more).  Let K(s) be the most value one strip
 * of stock s can hold.  A plan that buys x(s) of each then holds at most
 * sum n_strips(s) * K(s) * x(s), and it must hold V = sum v * demand: a cut.
 * Any values make a true cut, good ones (the prices of a linear programme,
 * scaled and rounded down) a strong one; K is found by a knapsack in whole
 * numbers, and where that runs out of steps, what it returns is too large, which
 * only weakens the cut.  (Duality of Gilmore & Gomory's programme, 1961; Farley
 * 1990.)  A no-good says that x, and so anything not larger in any stock, was
 * searched through and holds no plan.
 *
 * The bound is the least cost of whole numbers x within the limits that all cuts
 * and no-goods allow. */

typedef struct
{
  const KhSawProblem *problem;
  GPtrArray *cuts;     /* of int64_t *: held by a bought piece of each kind, then V */
  GPtrArray *no_goods; /* of int *: a kind each */
  KhSawClock *clock;   /* borrowed */
  int64_t bound;       /* so far, 0 at first */
} KhSawBound;

KhSawBound *kh_saw_bound_new (const KhSawProblem *problem, KhSawClock *clock);
void kh_saw_bound_free (KhSawBound *bound);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhSawBound, kh_saw_bound_free)

/* Values at most 2^40, an item each.  FALSE where all are 0: no cut. */
gboolean kh_saw_bound_add_cut (KhSawBound *bound, const int64_t *value);
void kh_saw_bound_add_no_good (KhSawBound *bound, const int *bought);
gboolean kh_saw_bound_allows (const KhSawBound *bound, const int *bought);

typedef enum
{
  KH_SAW_BOUND_RAISED,     /* 'bought' costs 'bound', and nothing that is allowed costs less */
  KH_SAW_BOUND_CLOSED,     /* nothing that is allowed costs less than 'below' */
  KH_SAW_BOUND_IMPOSSIBLE, /* nothing is allowed at all */
  KH_SAW_BOUND_UNKNOWN     /* out of steps; 'bound' holds as far as it got */
} KhSawBoundResult;

/* Raises 'bound' and gives what would be bought for it (a kind each).  Looks only
 * for costs under 'below' (G_MAXINT64: any). */
KhSawBoundResult kh_saw_bound_update (KhSawBound *bound, int64_t below, int *bought);
