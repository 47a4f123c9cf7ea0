/* SPDX-License-Identifier: MIT */
#include "panels/saw_fit.h"
#include "panels/saw_lp.h"
#include "panels/saw_search.h"

#define FIT_PIECES 40 /* so few are searched through instead */
#define FIT_NODES 400

/* Diving with limited discrepancy (Harvey & Ginsberg, IJCAI 1995). */

typedef struct
{
  const KhSawProblem *problem;
  const KhSawDive *dive;
  KhSawDraft *draft;
  int *demands, *strips;
  int n_pieces, n_turns; /* left; times a part had to be rounded up */
} Descent;

static int put_way (Descent *d, const KhSawWay *way, int times)
{
  times = MIN (times, d->strips[way->kind]);
  for (int i = 0; i < d->problem->n_items; i++)
    if (way->take[i] > 0)
      times = MIN (times, d->demands[i] / way->take[i]);
  if (times == 0)
    return 0;
  KhSawWay *put = kh_saw_way_new (d->problem, way->kind, times);
  for (int i = 0; i < d->problem->n_items; i++)
    {
      put->take[i] = way->take[i];
      d->demands[i] -= times * way->take[i];
      d->n_pieces -= times * way->take[i];
    }
  d->strips[way->kind] -= times;
  g_ptr_array_add (d->draft->ways, put);
  return times;
}

static gboolean round_down (Descent *d, const KhSawLp *lp)
{
  int n = 0;
  for (guint i = 0; i < lp->ways->len; i++)
    {
      double amount = g_array_index (lp->amounts, double, i) + 1e-6;
      if (amount >= 1)
        n += put_way (d, g_ptr_array_index (lp->ways, i), (int)MIN (amount, 1e9));
    }
  return n > 0;
}

/* No part is whole: one way is used once.  The largest part, or at the turn
 * that the variant names one of the next. */
static gboolean round_up (Descent *d, const KhSawLp *lp)
{
  int rank = 0;
  if (d->dive->variant > 0 && d->n_turns == (d->dive->variant - 1) / 2)
    rank = 1 + (d->dive->variant - 1) % 2;
  d->n_turns++;
  g_autofree gboolean *passed = g_new0 (gboolean, lp->ways->len + 1);
  for (; rank >= 0; rank--)
    {
      int best = -1;
      for (guint i = 0; i < lp->ways->len; i++)
        if (!passed[i] && g_array_index (lp->amounts, double, i) > 1e-6
            && (best < 0 || g_array_index (lp->amounts, double, i) > g_array_index (lp->amounts, double, best) + 1e-9))
          best = (int)i;
      if (best < 0)
        return FALSE;
      passed[best] = TRUE;
      if (rank == 0)
        return put_way (d, g_ptr_array_index (lp->ways, (guint)best), 1) > 0;
    }
  return FALSE;
}

static gboolean descend (Descent *d, GPtrArray *pool)
{
  while (d->n_pieces > 0 && !kh_saw_clock_is_over (d->dive->clock))
    {
      if (d->n_pieces <= FIT_PIECES)
        {
          KhSawFitTask fit = { d->demands, d->strips, FIT_NODES, d->dive->clock };
          KhSawFitResult result = kh_saw_fit (d->problem, &fit, d->draft->ways);
          if (result != KH_SAW_FIT_UNKNOWN)
            return result == KH_SAW_FIT_FOUND;
        }
      KhSawLpTask task = { d->demands, d->strips, d->dive->costs, d->dive->clock };
      g_autoptr (KhSawLp) lp = kh_saw_lp_new (d->problem, &task, pool);
      if (lp->missing > 0 || (!round_down (d, lp) && !round_up (d, lp)))
        return FALSE;
    }
  return d->n_pieces == 0;
}

KhSawDraft *kh_saw_dive (const KhSawProblem *problem, const KhSawDive *dive, GPtrArray *pool)
{
  g_autoptr (KhSawDraft) draft = kh_saw_draft_new ();
  g_autofree int *demands = g_new (int, problem->n_items);
  g_autofree int *strips = g_memdup2 (dive->strips, sizeof (int) * (gsize)problem->n_kinds);
  Descent d = { problem, dive, draft, demands, strips, 0, 0 };
  for (int i = 0; i < problem->n_items; i++)
    {
      demands[i] = problem->items[i].demand;
      d.n_pieces += demands[i];
    }
  return descend (&d, pool) ? g_steal_pointer (&draft) : NULL;
}
