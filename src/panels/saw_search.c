/* SPDX-License-Identifier: MIT */
#include "panels/saw_search.h"
#include "panels/saw_bound.h"
#include "panels/saw_fill.h"
#include "panels/saw_fit.h"
#include "panels/saw_lp.h"

#define VARIANTS 9
#define FIT_STRIPS 300 /* so many at most are searched through */
#define FIT_NODES 20000
#define OPEN_MOST 40 /* purchases that come to nothing either way before it ends */

typedef struct
{
  const KhSawProblem *problem;
  KhSawClock *clock;
  KhSawBound *bound;
  GPtrArray *pool; /* of KhSawWay: all ways met */
  KhSawDraft *best;
  double *prices, *capacities; /* of a strip, a kind each; the largest is 1 */
  gboolean is_claimed;         /* the bound's no-goods are all proven */
  gboolean is_impossible;      /* proven: the stock there is will not do */
} Search;

static void keep_cheaper (KhSawDraft **best, KhSawDraft *draft)
{
  if (draft && (!*best || draft->cost < (*best)->cost))
    {
      kh_saw_draft_free (*best);
      *best = draft;
    }
  else
    kh_saw_draft_free (draft);
}

/* The cheapest of all fillings, of all stock together and of each alone. */
static KhSawDraft *fill_all (const KhSawProblem *problem, const int *limits, KhSawClock *clock)
{
  KhSawDraft *best = NULL;
  for (int only = problem->n_kinds > 1 ? -1 : 0; only < problem->n_kinds; only++)
    for (int how = 0; how < KH_SAW_N_FILLS; how++)
      {
        KhSawFill fill = { (KhSawFillHow)how, only, limits, clock };
        keep_cheaper (&best, kh_saw_fill (problem, &fill));
      }
  return best;
}

static int *dup_strips (const KhSawProblem *problem, const int *bought)
{
  int *strips = g_new (int, problem->n_kinds);
  int n_pieces = kh_saw_problem_n_pieces (problem);
  for (int k = 0; k < problem->n_kinds; k++)
    {
      int n = bought ? bought[k] : problem->kinds[k].limit;
      strips[k] = (int)MIN ((int64_t)n * problem->kinds[k].n_strips, n_pieces);
    }
  return strips;
}

/* Cuts out of what the linear programme says the pieces are worth; TRUE when the strips could hold them in parts. */
static gboolean cut_by_programme (Search *s, const int *strips, const double *costs)
{
  g_autofree int *demands = g_new (int, s->problem->n_items);
  for (int i = 0; i < s->problem->n_items; i++)
    demands[i] = s->problem->items[i].demand;
  KhSawLpTask task = { demands, strips, costs, s->clock };
  g_autoptr (KhSawLp) lp = kh_saw_lp_new (s->problem, &task, s->pool);
  kh_saw_bound_add_cut (s->bound, lp->values);
  return !(lp->missing > 0);
}

static void keep_tidy (Search *s, KhSawDraft *draft, const int *limits)
{
  if (!draft)
    return;
  kh_saw_fill_tidy (s->problem, limits, draft);
  keep_cheaper (&s->best, draft);
}

/* Tries to cut everything out of what is bought.  NONE is proven. */
static KhSawFitResult try_bought (Search *s, const int *bought)
{
  int64_t cost = 0;
  int n_strips = 0;
  g_autofree int *strips = dup_strips (s->problem, bought);
  for (int k = 0; k < s->problem->n_kinds; k++)
    {
      cost += bought[k] * s->problem->kinds[k].price;
      n_strips += strips[k];
    }
  keep_cheaper (&s->best, fill_all (s->problem, bought, s->clock));
  if (s->best && s->best->cost <= cost)
    return KH_SAW_FIT_FOUND;
  gboolean in_parts = cut_by_programme (s, strips, s->capacities);
  if (!kh_saw_bound_allows (s->bound, bought))
    return KH_SAW_FIT_NONE;
  for (int variant = 0; in_parts && variant < VARIANTS && !kh_saw_clock_is_over (s->clock); variant++)
    {
      KhSawDive dive = { strips, s->capacities, variant, s->clock };
      keep_tidy (s, kh_saw_dive (s->problem, &dive, s->pool), bought);
      if (s->best && s->best->cost <= cost)
        return KH_SAW_FIT_FOUND;
    }
  if (n_strips > FIT_STRIPS)
    return KH_SAW_FIT_UNKNOWN;
  g_autofree int *demands = g_new (int, s->problem->n_items);
  for (int i = 0; i < s->problem->n_items; i++)
    demands[i] = s->problem->items[i].demand;
  g_autoptr (KhSawDraft) draft = kh_saw_draft_new ();
  KhSawFitTask fit = { demands, strips, FIT_NODES, s->clock };
  KhSawFitResult result = kh_saw_fit (s->problem, &fit, draft->ways);
  if (result == KH_SAW_FIT_FOUND)
    keep_tidy (s, g_steal_pointer (&draft), bought);
  return result;
}

/* One purchase after the other, from the bound up. */
static void climb (Search *s, gboolean any_will_do, int64_t *bound)
{
  g_autofree int *bought = g_new0 (int, s->problem->n_kinds);
  for (int open = 0; open < OPEN_MOST && !kh_saw_clock_is_over (s->clock);)
    {
      if (s->best && any_will_do)
        return;
      KhSawBoundResult result = kh_saw_bound_update (s->bound, s->best ? s->best->cost : G_MAXINT64, bought);
      if (s->is_claimed && result != KH_SAW_BOUND_IMPOSSIBLE)
        *bound = s->bound->bound;
      s->is_impossible = result == KH_SAW_BOUND_IMPOSSIBLE && s->is_claimed && !s->best;
      if (result != KH_SAW_BOUND_RAISED)
        return;
      KhSawFitResult fit = try_bought (s, bought);
      if (fit == KH_SAW_FIT_FOUND || !kh_saw_bound_allows (s->bound, bought))
        continue;
      if (fit == KH_SAW_FIT_UNKNOWN)
        {
          s->is_claimed = FALSE;
          open++;
        }
      kh_saw_bound_add_no_good (s->bound, bought);
    }
}

/* The best plan, or with 'any_will_do' the first.  No plan where none was found;
 * it then ended by a limit unless it is proven that there is none. */
static void search_problem (const KhSawProblem *problem, KhSawClock *clock, gboolean any_will_do, KhSawOutcome *outcome)
{
  g_autoptr (KhSawBound) cuts = kh_saw_bound_new (problem, clock);
  g_autoptr (GPtrArray) pool = g_ptr_array_new_with_free_func (g_free);
  g_autofree double *prices = g_new0 (double, problem->n_kinds + 1),
                    *capacities = g_new0 (double, problem->n_kinds + 1);
  g_autofree int64_t *value = g_new0 (int64_t, problem->n_items + 1);
  Search s = { problem, clock, cuts, pool, fill_all (problem, NULL, clock), prices, capacities, TRUE, FALSE };
  double most_price = 0, most_capacity = 0;
  for (int k = 0; k < problem->n_kinds; k++)
    {
      prices[k] = (double)problem->kinds[k].price / problem->kinds[k].n_strips;
      capacities[k] = (double)problem->kinds[k].capacity;
      most_price = MAX (most_price, prices[k]);
      most_capacity = MAX (most_capacity, capacities[k]);
    }
  for (int k = 0; k < problem->n_kinds; k++)
    {
      prices[k] /= most_price > 0 ? most_price : 1;
      capacities[k] /= most_capacity;
    }
  for (int i = 0; i < problem->n_items; i++)
    value[i] = problem->items[i].width;
  kh_saw_bound_add_cut (cuts, value);
  g_autofree int *bought = g_new0 (int, problem->n_kinds + 1);
  KhSawBoundResult first = kh_saw_bound_update (cuts, s.best ? s.best->cost : G_MAXINT64, bought);
  s.is_impossible = first == KH_SAW_BOUND_IMPOSSIBLE;
  outcome->bound = cuts->bound;
  if (first == KH_SAW_BOUND_RAISED || first == KH_SAW_BOUND_UNKNOWN)
    if (!s.best || !any_will_do)
      {
        g_autofree int *strips = dup_strips (problem, NULL);
        cut_by_programme (&s, strips, prices);
        climb (&s, any_will_do, &outcome->bound);
      }
  outcome->draft = s.best;
  outcome->ended_by_limit = s.best ? outcome->bound < s.best->cost : !s.is_impossible;
}

/* The fewest pieces that must be left out, longest first, so that the rest can be met. */
static void count_short (const KhSawProblem *problem, KhSawClock *clock, KhSawOutcome *outcome)
{
  int low = 0, high = kh_saw_problem_n_pieces (problem);
  while (high - low > 1)
    {
      int middle = low + (high - low) / 2;
      KhSawOutcome trial = { 0 };
      g_autoptr (KhSawProblem) rest = kh_saw_problem_new_without (problem, middle);
      search_problem (rest, clock, TRUE, &trial);
      if (trial.draft)
        high = middle;
      else
        {
          low = middle;
          outcome->ended_by_limit = trial.ended_by_limit;
        }
      kh_saw_draft_free (trial.draft);
    }
  outcome->n_short = high;
}

void kh_saw_search (const KhSawProblem *problem, double seconds, KhJob *job, KhSawOutcome *outcome)
{
  KhSawClock clock = { g_get_monotonic_time () + (gint64)(CLAMP (seconds, 0, 1e6) * 1e6), job, FALSE };
  *outcome = (KhSawOutcome){ 0 };
  if (problem->n_items == 0)
    {
      outcome->draft = kh_saw_draft_new ();
      return;
    }
  search_problem (problem, &clock, FALSE, outcome);
  if (!outcome->draft)
    count_short (problem, &clock, outcome);
}
