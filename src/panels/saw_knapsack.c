/* SPDX-License-Identifier: MIT */
#include "panels/saw_knapsack.h"
#include "base/units.h"
#include <string.h>

#define SKIPS_A_STEP 16 /* goods passed by because they do not fit, which is work too */

typedef struct
{
  int64_t width, value;
  int item, most;
} Good;

typedef struct
{
  int n;
  Good *goods;
  int64_t *least_width; /* of this good and those behind it */
  int *taken, *best_taken;
  int64_t best, open, enough;
  int n_nodes;
} Filler;

/* More value for its width first: a / b > c / d as a * d > c * b. */
static int compare_goods (gconstpointer a, gconstpointer b)
{
  const Good *x = a, *y = b;
  KhInt128 p = (KhInt128)x->value * y->width, q = (KhInt128)y->value * x->width;
  if (p != q)
    return p > q ? -1 : 1;
  return x->width != y->width ? (x->width > y->width ? -1 : 1) : x->item - y->item;
}

/* What the rest can add at most: the goods behind as long as they last, the last one in part. */
static int64_t bound_rest (const Filler *f, int k, int64_t capacity)
{
  int64_t sum = 0;
  for (; k < f->n && capacity > 0; k++)
    {
      const Good *good = &f->goods[k];
      if (capacity < good->width * good->most)
        return sum + (int64_t)((KhInt128)capacity * good->value / good->width);
      sum += good->value * good->most;
      capacity -= good->width * good->most;
    }
  return sum;
}

static void fill (Filler *f, int k, int64_t capacity, int64_t value)
{
  if (value > f->best)
    {
      f->best = value;
      memcpy (f->best_taken, f->taken, sizeof (int) * (gsize)f->n);
    }
  int first = k;
  while (k < f->n && f->goods[k].width > capacity)
    k++;
  f->n_nodes -= (k - first) / SKIPS_A_STEP;
  if (k == f->n || f->best >= f->enough || capacity < f->least_width[k])
    return;
  int64_t bound = value + bound_rest (f, k, capacity);
  if (bound <= f->best)
    return;
  if (--f->n_nodes < 0)
    {
      f->open = MAX (f->open, bound);
      return;
    }
  const Good *good = &f->goods[k];
  for (int q = (int)MIN (good->most, capacity / good->width); q >= 0; q--)
    {
      f->taken[k] = q;
      fill (f, k + 1, capacity - q * good->width, value + q * good->value);
    }
}

int64_t kh_saw_knapsack (const KhSawProblem *problem, const KhSawFilling *filling, int *take, int64_t *best)
{
  gsize n = (gsize)problem->n_items;
  g_autofree Good *goods = g_new (Good, n + 1);
  g_autofree int64_t *least = g_new (int64_t, n + 1);
  g_autofree int *taken = g_new0 (int, n + 1), *best_taken = g_new0 (int, n + 1);
  Filler f = { .goods = goods, .least_width = least, .taken = taken, .best_taken = best_taken };
  f.enough = filling->enough;
  f.n_nodes = filling->nodes_most;
  for (int i = 0; i < problem->n_items; i++)
    {
      int64_t width = problem->items[i].width;
      int most = (int)MIN (filling->most[i], filling->capacity / width);
      if (most > 0 && filling->value[i] > 0)
        goods[f.n++] = (Good){ width, filling->value[i], i, most };
    }
  qsort (goods, (gsize)f.n, sizeof (Good), compare_goods);
  for (int k = f.n - 1; k >= 0; k--)
    least[k] = k == f.n - 1 ? goods[k].width : MIN (goods[k].width, least[k + 1]);
  fill (&f, 0, filling->capacity, 0);
  memset (take, 0, sizeof (int) * n);
  for (int k = 0; k < f.n; k++)
    take[goods[k].item] = best_taken[k];
  *best = f.best;
  return MAX (f.best, f.open);
}
