/* SPDX-License-Identifier: MIT */
#include "panels/saw_fill.h"
#include "base/units.h"
#include "panels/saw_knapsack.h"
#include <string.h>

#define NODES_MOST 5000 /* steps for one filling */

/* Room for bought pieces: of a kind by itself, and of its pool. */
static int get_room (const KhSawProblem *problem, const int *limits, const int *bought, int kind)
{
  const KhSawKind *k = &problem->kinds[kind];
  int room = (limits ? limits[kind] : k->limit) - bought[kind];
  if (k->pool == 0 || k->limit == G_MAXINT)
    return room;
  int pool = k->limit;
  for (int i = 0; i < problem->n_kinds; i++)
    if (problem->kinds[i].pool == k->pool)
      pool -= bought[i];
  return MIN (room, pool);
}

typedef struct
{
  const KhSawProblem *problem;
  const KhSawFill *fill;
  int *left;            /* pieces still to cut */
  int *strips, *bought; /* a kind each */
  int64_t *value;       /* of an item, VALUED only */
} Filling;

static void fill_longest (Filling *f, int64_t capacity, int *take)
{
  for (int i = 0; i < f->problem->n_items; i++)
    {
      const KhSawItem *item = &f->problem->items[i];
      take[i] = (int)MIN (f->left[i], capacity / item->width);
      capacity -= take[i] * item->width;
    }
}

static void fill_strip (Filling *f, int64_t capacity, int *take)
{
  if (f->fill->how == KH_SAW_FILL_LONGEST)
    {
      fill_longest (f, capacity, take);
      return;
    }
  int64_t best;
  KhSawFilling filling = { f->value, f->left, capacity, G_MAXINT64, NODES_MOST };
  kh_saw_knapsack (f->problem, &filling, take, &best);
}

static int64_t get_width (const Filling *f, const int *take)
{
  int64_t width = 0;
  for (int i = 0; i < f->problem->n_items; i++)
    width += take[i] * f->problem->items[i].width;
  return width;
}

/* How often the same filling can be repeated. */
static int count_times (const Filling *f, const KhSawWay *way)
{
  const KhSawKind *kind = &f->problem->kinds[way->kind];
  int64_t strips = (int64_t)get_room (f->problem, f->fill->limits, f->bought, way->kind) * kind->n_strips
                   + (int64_t)f->bought[way->kind] * kind->n_strips - f->strips[way->kind];
  for (int i = 0; i < f->problem->n_items; i++)
    if (way->take[i] > 0)
      strips = MIN (strips, f->left[i] / way->take[i]);
  return (int)strips;
}

static gboolean has_idle_strip (const Filling *f, int kind)
{
  return (int64_t)f->bought[kind] * f->problem->kinds[kind].n_strips > f->strips[kind];
}

/* Price of a strip for what it holds, as two factors to be compared crosswise;
 * a strip left over of what is bought costs nothing more. */
static gboolean is_cheaper (const Filling *f, const KhSawWay *a, const KhSawWay *b)
{
  const KhSawKind *x = &f->problem->kinds[a->kind], *y = &f->problem->kinds[b->kind];
  int64_t price_a = has_idle_strip (f, a->kind) ? 0 : x->price, price_b = has_idle_strip (f, b->kind) ? 0 : y->price;
  int64_t holds_a = get_width (f, a->take), holds_b = get_width (f, b->take);
  KhInt128 p = (KhInt128)price_a * y->n_strips * holds_b, q = (KhInt128)price_b * x->n_strips * holds_a;
  return p != q ? p < q : holds_a > holds_b;
}

static KhSawWay *choose_way (Filling *f)
{
  KhSawWay *best = NULL;
  for (int k = 0; k < f->problem->n_kinds; k++)
    {
      if (f->fill->only_kind >= 0 && f->fill->only_kind != k)
        continue;
      if (get_room (f->problem, f->fill->limits, f->bought, k) <= 0 && !has_idle_strip (f, k))
        continue;
      KhSawWay *way = kh_saw_way_new (f->problem, k, 0);
      fill_strip (f, f->problem->kinds[k].capacity, way->take);
      if (get_width (f, way->take) > 0 && (!best || is_cheaper (f, way, best)))
        {
          KhSawWay *worse = best;
          best = way;
          way = worse;
        }
      g_free (way);
    }
  return best;
}

static gboolean apply (Filling *f, KhSawWay *way)
{
  int n_strips = f->problem->kinds[way->kind].n_strips;
  way->times = count_times (f, way);
  g_assert (way->times > 0);
  f->strips[way->kind] += way->times;
  f->bought[way->kind] = f->strips[way->kind] / n_strips + (f->strips[way->kind] % n_strips != 0);
  gboolean more = FALSE;
  for (int i = 0; i < f->problem->n_items; i++)
    {
      f->left[i] -= way->times * way->take[i];
      more |= f->left[i] > 0;
    }
  return more;
}

KhSawDraft *kh_saw_fill (const KhSawProblem *problem, const KhSawFill *fill)
{
  gsize n = (gsize)problem->n_items, n_kinds = (gsize)problem->n_kinds;
  g_autofree int *left = g_new0 (int, n + 1), *strips = g_new0 (int, n_kinds + 1), *bought = g_new0 (int, n_kinds + 1);
  g_autofree int64_t *value = g_new0 (int64_t, n + 1);
  Filling f = { problem, fill, left, strips, bought, value };
  gboolean more = FALSE;
  for (gsize i = 0; i < n; i++)
    {
      left[i] = problem->items[i].demand;
      more |= left[i] > 0;
      int64_t width = problem->items[i].width;
      value[i] = width;
      if (fill->how == KH_SAW_FILL_VALUED)
        value[i] += (int64_t)((KhInt128)width * width / problem->items[0].width / 32);
    }
  g_autoptr (KhSawDraft) draft = kh_saw_draft_new ();
  while (more)
    {
      if (fill->how != KH_SAW_FILL_LONGEST && kh_saw_clock_is_over (fill->clock))
        return NULL;
      KhSawWay *way = choose_way (&f);
      if (!way)
        return NULL;
      g_ptr_array_add (draft->ways, way);
      more = apply (&f, way);
    }
  kh_saw_fill_tidy (problem, fill->limits, draft);
  return g_steal_pointer (&draft);
}

/* Moves one strip of 'way' to 'kind' when the whole costs less by it. */
static gboolean try_move (const KhSawProblem *problem, const int *limits, KhSawDraft *draft, guint index, int kind)
{
  KhSawWay *way = g_ptr_array_index (draft->ways, index);
  int64_t width = 0;
  for (int i = 0; i < problem->n_items; i++)
    width += way->take[i] * problem->items[i].width;
  if (way->kind == kind || width > problem->kinds[kind].capacity)
    return FALSE;
  g_autofree int *bought = g_new (int, problem->n_kinds);
  for (int k = 0; k < problem->n_kinds; k++)
    bought[k] = kh_saw_draft_get_bought (draft, problem, k);
  int old_kind = way->kind, n = way->times, bought_before = bought[kind];
  for (int times = n; times > 0; times = times == n && n > 1 ? 1 : 0)
    {
      KhSawWay *moved = g_memdup2 (way, sizeof (KhSawWay) + sizeof (int) * (gsize)problem->n_items);
      moved->kind = kind;
      moved->times = times;
      way->times -= times;
      g_ptr_array_add (draft->ways, moved);
      int grown = kh_saw_draft_get_bought (draft, problem, kind) - bought_before;
      bought[old_kind] = kh_saw_draft_get_bought (draft, problem, old_kind);
      if (grown <= get_room (problem, limits, bought, kind) && kh_saw_draft_get_cost (draft, problem) < draft->cost)
        {
          draft->cost = kh_saw_draft_get_cost (draft, problem);
          if (way->times == 0)
            g_ptr_array_remove_index (draft->ways, index);
          return TRUE;
        }
      g_ptr_array_remove_index (draft->ways, draft->ways->len - 1);
      way->times += times;
    }
  return FALSE;
}

void kh_saw_fill_tidy (const KhSawProblem *problem, const int *limits, KhSawDraft *draft)
{
  draft->cost = kh_saw_draft_get_cost (draft, problem);
  for (guint i = 0; i < draft->ways->len && problem->n_kinds > 1; i++)
    for (int kind = 0; kind < problem->n_kinds; kind++)
      if (try_move (problem, limits, draft, i, kind))
        {
          i = (guint)-1; /* the list has changed: from the start, each time cheaper */
          break;
        }
}
