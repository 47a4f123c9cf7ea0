/* SPDX-License-Identifier: MIT */
#include "panels/saw_search.h"
#include "panels/saw_bound.h"
#include "panels/saw_fill.h"

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
static KhSawDraft *fill_all (const KhSawProblem *problem)
{
  KhSawDraft *best = NULL;
  for (int only = problem->n_kinds > 1 ? -1 : 0; only < problem->n_kinds; only++)
    for (int how = 0; how < KH_SAW_N_FILLS; how++)
      {
        KhSawFill fill = { (KhSawFillHow)how, only, NULL, NULL };
        keep_cheaper (&best, kh_saw_fill (problem, &fill));
      }
  return best;
}

/* The fewest pieces that must be left out, longest first, so that the rest can be met. */
static int count_short (const KhSawProblem *problem)
{
  int low = 0, high = kh_saw_problem_n_pieces (problem);
  while (high - low > 1)
    {
      int middle = low + (high - low) / 2;
      g_autoptr (KhSawProblem) rest = kh_saw_problem_new_without (problem, middle);
      g_autoptr (KhSawDraft) draft = fill_all (rest);
      if (draft)
        high = middle;
      else
        low = middle;
    }
  return high;
}

void kh_saw_search (const KhSawProblem *problem, double seconds, KhJob *job, KhSawOutcome *outcome)
{
  outcome->draft = problem->n_items > 0 ? fill_all (problem) : kh_saw_draft_new ();
  if (!outcome->draft)
    {
      outcome->n_short = count_short (problem);
      return;
    }
  if (problem->n_items == 0)
    return;
  g_autoptr (KhSawBound) bound = kh_saw_bound_new (problem);
  g_autofree int64_t *value = g_new (int64_t, problem->n_items);
  g_autofree int *bought = g_new (int, problem->n_kinds);
  for (int i = 0; i < problem->n_items; i++)
    value[i] = problem->items[i].width;
  kh_saw_bound_add_cut (bound, value);
  kh_saw_bound_update (bound, bought);
  outcome->bound = bound->bound;
}
