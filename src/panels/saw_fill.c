/* SPDX-License-Identifier: MIT */
#include "panels/saw_fill.h"
#include "base/units.h"
#include "panels/saw_knapsack.h"
#include <string.h>

#define NODES_MOST 5000 /* steps for one filling */
#define PASSES_MOST 8   /* over all ways, while something is saved */

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

typedef struct
{
  const KhSawProblem *problem;
  const int *limits;
  KhSawDraft *draft;
  int *strips, *bought; /* a kind each */
} Tidying;

static int count_bought (const Tidying *t, int kind, int strips)
{
  int n = t->problem->kinds[kind].n_strips;
  return strips / n + (strips % n != 0);
}

/* What is saved when so many strips go from one kind to another; 0 where there is no room for them. */
static int64_t get_saving (const Tidying *t, int from, int to, int times)
{
  int less = t->bought[from] - count_bought (t, from, t->strips[from] - times);
  int more = count_bought (t, to, t->strips[to] + times) - t->bought[to];
  int room = get_room (t->problem, t->limits, t->bought, to);
  if (t->problem->kinds[from].pool != 0 && t->problem->kinds[from].pool == t->problem->kinds[to].pool)
    room += less;
  if (t->limits)
    room = MIN (room, t->limits[to] - t->bought[to]);
  room = MIN (room, t->problem->kinds[to].limit - t->bought[to]);
  return more > room ? 0 : less * t->problem->kinds[from].price - more * t->problem->kinds[to].price;
}

/* Moves all strips of a way, or else one, to the kind where most is saved. */
static gboolean try_move (Tidying *t, guint index)
{
  KhSawWay *way = g_ptr_array_index (t->draft->ways, index);
  int64_t width = 0, most = 0;
  int best = -1, best_times = 0, from = way->kind;
  for (int i = 0; i < t->problem->n_items; i++)
    width += way->take[i] * t->problem->items[i].width;
  for (int kind = 0; kind < t->problem->n_kinds; kind++)
    for (int times = way->times; times > 0; times = times == way->times && times > 1 ? 1 : 0)
      {
        if (kind == from || width > t->problem->kinds[kind].capacity)
          continue;
        int64_t saving = get_saving (t, from, kind, times);
        if (saving <= most)
          continue;
        most = saving;
        best = kind;
        best_times = times;
      }
  if (best < 0)
    return FALSE;
  KhSawWay *moved = g_memdup2 (way, sizeof (KhSawWay) + sizeof (int) * (gsize)t->problem->n_items);
  moved->kind = best;
  moved->times = best_times;
  way->times -= best_times;
  t->strips[from] -= best_times;
  t->strips[best] += best_times;
  t->bought[from] = count_bought (t, from, t->strips[from]);
  t->bought[best] = count_bought (t, best, t->strips[best]);
  if (way->times == 0)
    g_ptr_array_remove_index (t->draft->ways, index);
  g_ptr_array_add (t->draft->ways, moved);
  return TRUE;
}

void kh_saw_fill_tidy (const KhSawProblem *problem, const int *limits, KhSawDraft *draft)
{
  g_autofree int *strips = g_new0 (int, problem->n_kinds + 1), *bought = g_new0 (int, problem->n_kinds + 1);
  Tidying t = { problem, limits, draft, strips, bought };
  for (int k = 0; k < problem->n_kinds; k++)
    {
      strips[k] = kh_saw_draft_get_strips (draft, k);
      bought[k] = count_bought (&t, k, strips[k]);
    }
  gboolean moved = problem->n_kinds > 1;
  for (int pass = 0; pass < PASSES_MOST && moved; pass++)
    {
      moved = FALSE;
      for (guint i = 0; i < draft->ways->len; i++)
        moved |= try_move (&t, i);
    }
  draft->cost = kh_saw_draft_get_cost (draft, problem);
}
