/* SPDX-License-Identifier: MIT */
#include "panels/saw_bound.h"
#include "base/units.h"
#include "panels/saw_knapsack.h"
#include <string.h>

#define KNAPSACK_NODES 200000
#define LOOKS_AT_CLOCK 1024 /* nodes between two looks */
#define COUNT_NODES 5000000

KhSawBound *kh_saw_bound_new (const KhSawProblem *problem, KhSawClock *clock)
{
  KhSawBound *bound = g_new0 (KhSawBound, 1);
  bound->problem = problem;
  bound->clock = clock;
  bound->cuts = g_ptr_array_new_with_free_func (g_free);
  bound->no_goods = g_ptr_array_new_with_free_func (g_free);
  return bound;
}

void kh_saw_bound_free (KhSawBound *bound)
{
  g_ptr_array_unref (bound->cuts);
  g_ptr_array_unref (bound->no_goods);
  g_free (bound);
}

gboolean kh_saw_bound_add_cut (KhSawBound *bound, const int64_t *value)
{
  const KhSawProblem *problem = bound->problem;
  g_autofree int64_t *cut = g_new0 (int64_t, problem->n_kinds + 1);
  g_autofree int *most = g_new (int, problem->n_items + 1), *take = g_new (int, problem->n_items + 1);
  for (int i = 0; i < problem->n_items; i++)
    {
      most[i] = problem->items[i].demand;
      cut[problem->n_kinds] += value[i] * most[i];
    }
  if (cut[problem->n_kinds] == 0)
    return FALSE;
  for (int k = 0; k < problem->n_kinds; k++)
    {
      int64_t best;
      KhSawFilling filling = { value, most, problem->kinds[k].capacity, G_MAXINT64, KNAPSACK_NODES };
      cut[k] = kh_saw_knapsack (problem, &filling, take, &best) * problem->kinds[k].n_strips;
    }
  g_ptr_array_add (bound->cuts, g_steal_pointer (&cut));
  return TRUE;
}

void kh_saw_bound_add_no_good (KhSawBound *bound, const int *bought)
{
  g_ptr_array_add (bound->no_goods, g_memdup2 (bought, sizeof (int) * (gsize)bound->problem->n_kinds));
}

static KhInt128 get_missing (const KhSawBound *bound, const int64_t *cut, const int *bought, int n)
{
  KhInt128 missing = cut[bound->problem->n_kinds];
  for (int k = 0; k < n; k++)
    missing -= (KhInt128)cut[k] * bought[k];
  return missing;
}

/* TRUE when 'bought' is within a no-good, the kinds from n on left aside. */
static gboolean is_within (const int *no_good, const int *bought, int n)
{
  for (int k = 0; k < n; k++)
    if (bought[k] > no_good[k])
      return FALSE;
  return TRUE;
}

gboolean kh_saw_bound_allows (const KhSawBound *bound, const int *bought)
{
  int n = bound->problem->n_kinds;
  for (guint i = 0; i < bound->cuts->len; i++)
    if (get_missing (bound, g_ptr_array_index (bound->cuts, i), bought, n) > 0)
      return FALSE;
  for (guint i = 0; i < bound->no_goods->len; i++)
    if (is_within (g_ptr_array_index (bound->no_goods, i), bought, n))
      return FALSE;
  return TRUE;
}

typedef struct
{
  const KhSawBound *bound;
  int *bought, *best_bought;
  int64_t cost, best;
  int n_nodes;
} Count;

static KhInt128 divide_up (KhInt128 a, KhInt128 b) { return (a + b - 1) / b; }

/* What the kinds from k on must cost at least, by each cut alone and in parts. */
static KhInt128 bound_rest (const Count *c, int k)
{
  const KhSawProblem *problem = c->bound->problem;
  KhInt128 least = 0;
  for (guint i = 0; i < c->bound->cuts->len; i++)
    {
      const int64_t *cut = g_ptr_array_index (c->bound->cuts, i);
      KhInt128 missing = get_missing (c->bound, cut, c->bought, k);
      if (missing <= 0)
        continue;
      int cheapest = -1;
      for (int s = k; s < problem->n_kinds; s++)
        if (cut[s] > 0
            && (cheapest < 0
                || (KhInt128)problem->kinds[s].price * cut[cheapest]
                       < (KhInt128)problem->kinds[cheapest].price * cut[s]))
          cheapest = s;
      if (cheapest < 0)
        return (KhInt128)G_MAXINT64;
      KhInt128 cost = divide_up (missing * problem->kinds[cheapest].price, cut[cheapest]);
      least = MAX (least, cost);
    }
  return divide_up (least, problem->price_step) * problem->price_step;
}

/* How many of kind k could be of use, and how many it must be when it is the last. */
static int count_useful (const Count *c, int k, gboolean is_last)
{
  KhInt128 most = 0;
  for (guint i = 0; i < c->bound->cuts->len; i++)
    {
      const int64_t *cut = g_ptr_array_index (c->bound->cuts, i);
      KhInt128 missing = get_missing (c->bound, cut, c->bought, k);
      if (missing > 0)
        most = MAX (most, cut[k] > 0 ? divide_up (missing, cut[k]) : is_last ? (KhInt128)G_MAXINT : 0);
    }
  for (guint i = 0; i < c->bound->no_goods->len; i++)
    {
      const int *no_good = g_ptr_array_index (c->bound->no_goods, i);
      if (is_within (no_good, c->bought, k))
        most = MAX (most, no_good[k] + 1);
    }
  return (int)MIN (most, (KhInt128)G_MAXINT);
}

static int get_limit (const Count *c, int k)
{
  const KhSawKind *kinds = c->bound->problem->kinds;
  int limit = kinds[k].limit;
  for (int i = 0; i < k && kinds[k].pool != 0; i++)
    limit -= kinds[i].pool == kinds[k].pool ? c->bought[i] : 0;
  return MAX (limit, 0);
}

static void count (Count *c, int k)
{
  const KhSawProblem *problem = c->bound->problem;
  if (c->n_nodes % LOOKS_AT_CLOCK == 0 && kh_saw_clock_is_over (c->bound->clock))
    c->n_nodes = 0;
  if (--c->n_nodes < 0 || c->cost + bound_rest (c, k) >= c->best)
    return;
  if (k == problem->n_kinds)
    {
      if (!kh_saw_bound_allows (c->bound, c->bought))
        return;
      c->best = c->cost;
      memcpy (c->best_bought, c->bought, sizeof (int) * (gsize)k);
      return;
    }
  gboolean is_last = k == problem->n_kinds - 1;
  int limit = get_limit (c, k), useful = count_useful (c, k, is_last), high = MIN (limit, useful), low = 0;
  if (is_last && useful > limit)
    return;
  if (is_last)
    low = high;
  if (problem->kinds[k].price == 0 && problem->kinds[k].pool == 0)
    low = high = limit; /* what costs nothing is there in full */
  for (int n = high; n >= low; n--)
    {
      int64_t before = c->cost;
      c->bought[k] = n;
      c->cost += n * problem->kinds[k].price;
      count (c, k + 1);
      c->cost = before;
      c->bought[k] = 0;
    }
}

/* What everything together costs that could be bought. */
static int64_t count_most (const KhSawProblem *problem)
{
  KhInt128 most = 0;
  for (int k = 0; k < problem->n_kinds; k++)
    most += (KhInt128)problem->kinds[k].price * problem->kinds[k].limit;
  return (int64_t)MIN (most, (KhInt128)G_MAXINT64 / 4);
}

/* The least cost from 'low' to under 'high'; looks in windows that grow, so that
 * the first find is near the bound and the tree stays small. */
KhSawBoundResult kh_saw_bound_update (KhSawBound *bound, int64_t below, int *bought)
{
  gsize n = (gsize)bound->problem->n_kinds;
  g_autofree int *trial = g_new0 (int, n + 1);
  Count c = { bound, trial, bought, 0, G_MAXINT64, COUNT_NODES };
  KhInt128 parts = bound_rest (&c, 0);
  if (parts >= G_MAXINT64)
    return KH_SAW_BOUND_IMPOSSIBLE;
  bound->bound = MAX (bound->bound, (int64_t)parts);
  int64_t most = count_most (bound->problem), window = bound->problem->price_step;
  while (bound->bound < below && bound->bound <= most)
    {
      int64_t high = MIN (below, bound->bound + window);
      c.best = high;
      count (&c, 0);
      if (c.n_nodes < 0)
        return KH_SAW_BOUND_UNKNOWN;
      bound->bound = c.best;
      if (c.best < high)
        return KH_SAW_BOUND_RAISED;
      window = MIN (window * 2, most + 1);
    }
  return bound->bound >= below ? KH_SAW_BOUND_CLOSED : KH_SAW_BOUND_IMPOSSIBLE;
}
