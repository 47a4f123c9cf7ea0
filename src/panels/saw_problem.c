/* SPDX-License-Identifier: MIT */
#include "panels/saw_problem.h"
#include <string.h>

static int compare_items (gconstpointer a, gconstpointer b)
{
  const KhSawItem *x = a, *y = b;
  return (x->length < y->length) - (x->length > y->length);
}

static void read_items (KhSawProblem *problem, const KhSawOrder *order)
{
  problem->items = g_new0 (KhSawItem, order->pieces->len);
  for (guint i = 0; i < order->pieces->len; i++)
    {
      const KhSawPiece *piece = &g_array_index (order->pieces, KhSawPiece, i);
      if (piece->count > 0)
        problem->items[problem->n_items++]
            = (KhSawItem){ piece->length_nm, piece->length_nm + order->kerf_nm, piece->count };
    }
  if (problem->n_items == 0)
    return;
  qsort (problem->items, problem->n_items, sizeof (KhSawItem), compare_items);
  int n = 1;
  for (int i = 1; i < problem->n_items; i++)
    if (problem->items[i].length == problem->items[n - 1].length)
      problem->items[n - 1].demand += problem->items[i].demand;
    else
      problem->items[n++] = problem->items[i];
  problem->n_items = n;
}

static int64_t divide_common (int64_t a, int64_t b)
{
  while (b != 0)
    {
      int64_t rest = a % b;
      a = b;
      b = rest;
    }
  return a;
}

/* Those that can be bought; what no piece fits is kept out later. */
static void read_kinds (KhSawProblem *problem, const KhSawOrder *order)
{
  gboolean priced = FALSE;
  for (guint i = 0; i < order->stock->len; i++)
    priced |= g_array_index (order->stock, KhSawStock, i).price_milli != KH_PRICE_NONE;
  problem->kinds = g_new0 (KhSawKind, order->stock->len);
  for (guint i = 0; i < order->stock->len; i++)
    {
      const KhSawStock *stock = &g_array_index (order->stock, KhSawStock, i);
      int64_t usable = stock->length_nm - 2 * order->end_trim_nm;
      if (stock->count == 0 || usable <= 0)
        continue;
      problem->kinds[problem->n_kinds++] = (KhSawKind){ .stock = (int)i,
                                                        .capacity = usable + order->kerf_nm,
                                                        .price = priced ? MAX (stock->price_milli, 0) : 1000,
                                                        .n_strips = stock->n_strips,
                                                        .limit = stock->count == KH_COUNT_ANY ? G_MAXINT : stock->count,
                                                        .pool = stock->pool };
    }
}

/* Longer than the longest strip there is; or there is no strip at all. */
static void tell_too_long (KhSawProblem *problem, const KhSawOrder *order, GArray *cannot_cut)
{
  int64_t longest = 0;
  gboolean any = FALSE;
  for (guint s = 0; s < order->stock->len; s++)
    {
      const KhSawStock *stock = &g_array_index (order->stock, KhSawStock, s);
      if (stock->count == 0)
        continue;
      any = TRUE;
      longest = MAX (longest, stock->length_nm - 2 * order->end_trim_nm);
    }
  int n = 0;
  for (int i = 0; i < problem->n_items; i++)
    {
      const KhSawItem *item = &problem->items[i];
      if (any && item->length <= longest)
        {
          problem->items[n++] = *item;
          continue;
        }
      KhCannotWhy none = order->stock->len == 0 ? KH_CANNOT_NO_STOCK : KH_CANNOT_TOO_LITTLE_STOCK;
      KhCannotCut cannot
          = { item->length, item->demand, any ? KH_CANNOT_TOO_LONG : none, any ? item->length - longest : 0 };
      g_array_append_val (cannot_cut, cannot);
    }
  problem->n_items = n;
}

static void settle (KhSawProblem *problem)
{
  int n = 0, pieces = kh_saw_problem_n_pieces (problem);
  problem->price_step = 0;
  for (int k = 0; k < problem->n_kinds; k++)
    {
      KhSawKind kind = problem->kinds[k];
      if (problem->n_items == 0 || kind.capacity < problem->items[problem->n_items - 1].width)
        continue;
      kind.limit = MIN (kind.limit, pieces);
      problem->price_step = divide_common (problem->price_step, kind.price);
      problem->kinds[n++] = kind;
    }
  problem->n_kinds = n;
  problem->price_step = MAX (problem->price_step, 1);
}

KhSawProblem *kh_saw_problem_new (const KhSawOrder *order, GArray *cannot_cut)
{
  KhSawProblem *problem = g_new0 (KhSawProblem, 1);
  read_items (problem, order);
  read_kinds (problem, order);
  tell_too_long (problem, order, cannot_cut);
  settle (problem);
  return problem;
}

KhSawProblem *kh_saw_problem_new_without (const KhSawProblem *problem, int n)
{
  KhSawProblem *rest = g_new0 (KhSawProblem, 1);
  rest->items = g_new0 (KhSawItem, MAX (problem->n_items, 1));
  for (int i = 0; i < problem->n_items; i++)
    {
      KhSawItem item = problem->items[i];
      int left_out = MIN (n, item.demand);
      n -= left_out;
      item.demand -= left_out;
      if (item.demand > 0)
        rest->items[rest->n_items++] = item;
    }
  rest->n_kinds = problem->n_kinds;
  rest->kinds = g_memdup2 (problem->kinds, sizeof (KhSawKind) * (gsize)problem->n_kinds);
  settle (rest);
  return rest;
}

void kh_saw_problem_free (KhSawProblem *problem)
{
  if (!problem)
    return;
  g_free (problem->items);
  g_free (problem->kinds);
  g_free (problem);
}

int kh_saw_problem_n_pieces (const KhSawProblem *problem)
{
  int n = 0;
  for (int i = 0; i < problem->n_items; i++)
    n += problem->items[i].demand;
  return n;
}

void kh_saw_problem_tell_short (const KhSawProblem *problem, const KhSawOutcome *outcome, GArray *cannot_cut)
{
  int n = outcome->n_short;
  for (int i = 0; i < problem->n_items && n > 0; i++)
    {
      int count = MIN (n, problem->items[i].demand);
      KhCannotCut cannot = { problem->items[i].length, count, KH_CANNOT_TOO_LITTLE_STOCK, 0 };
      g_array_append_val (cannot_cut, cannot);
      n -= count;
    }
}

KhSawWay *kh_saw_way_new (const KhSawProblem *problem, int kind, int times)
{
  KhSawWay *way = g_malloc0 (sizeof (KhSawWay) + sizeof (int) * (gsize)problem->n_items);
  way->kind = kind;
  way->times = times;
  return way;
}

KhSawDraft *kh_saw_draft_new (void)
{
  KhSawDraft *draft = g_new0 (KhSawDraft, 1);
  draft->ways = g_ptr_array_new_with_free_func (g_free);
  return draft;
}

KhSawDraft *kh_saw_draft_copy (const KhSawDraft *draft, const KhSawProblem *problem)
{
  KhSawDraft *copy = kh_saw_draft_new ();
  gsize size = sizeof (KhSawWay) + sizeof (int) * (gsize)problem->n_items;
  for (guint i = 0; i < draft->ways->len; i++)
    g_ptr_array_add (copy->ways, g_memdup2 (g_ptr_array_index (draft->ways, i), size));
  copy->cost = draft->cost;
  return copy;
}

void kh_saw_draft_free (KhSawDraft *draft)
{
  if (!draft)
    return;
  g_ptr_array_unref (draft->ways);
  g_free (draft);
}

void kh_saw_draft_merge (KhSawDraft *draft, const KhSawProblem *problem)
{
  for (guint i = 0; i < draft->ways->len; i++)
    {
      KhSawWay *way = g_ptr_array_index (draft->ways, i);
      for (guint k = draft->ways->len - 1; k > i; k--)
        {
          const KhSawWay *other = g_ptr_array_index (draft->ways, k);
          if (other->kind != way->kind || memcmp (other->take, way->take, sizeof (int) * (gsize)problem->n_items) != 0)
            continue;
          way->times += other->times;
          g_ptr_array_remove_index (draft->ways, k);
        }
    }
}

int kh_saw_draft_get_strips (const KhSawDraft *draft, int kind)
{
  int n = 0;
  for (guint i = 0; i < draft->ways->len; i++)
    {
      const KhSawWay *way = g_ptr_array_index (draft->ways, i);
      n += way->kind == kind ? way->times : 0;
    }
  return n;
}

int kh_saw_draft_get_bought (const KhSawDraft *draft, const KhSawProblem *problem, int kind)
{
  int n_strips = problem->kinds[kind].n_strips, strips = kh_saw_draft_get_strips (draft, kind);
  return strips / n_strips + (strips % n_strips != 0);
}

int64_t kh_saw_draft_get_cost (const KhSawDraft *draft, const KhSawProblem *problem)
{
  int64_t cost = 0;
  for (int k = 0; k < problem->n_kinds; k++)
    cost += kh_saw_draft_get_bought (draft, problem, k) * problem->kinds[k].price;
  return cost;
}
