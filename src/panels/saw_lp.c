/* SPDX-License-Identifier: MIT */
#include "panels/saw_lp.h"
#include "panels/saw_knapsack.h"
#include <string.h>

#define MISSING_COST 100.0 /* a piece that is not cut, where a strip costs at most 1 */
#define EPSILON 1e-9
#define VALUE_SCALE 1073741824.0 /* 2^30 */
#define KNAPSACK_NODES 50000
#define REFRESH 100 /* pivots after which the inverse is made anew */

/* Rows: an item with demand each, then a kind each.  Basis members: a way (0
 * and up), or of row r the slack ~r (surplus of an item, idle strips of a kind),
 * or the missing pieces ~(n_rows + r). */
typedef struct
{
  const KhSawProblem *problem;
  const KhSawLpTask *task;
  KhSawLp *lp;
  GHashTable *known; /* of KhSawWay: no way twice */
  int n_items, n_rows;
  int *item_of;
  double *inverse, *right, *amount, *price, *column, *step;
  int *basis;
} Simplex;

static guint hash_way (gconstpointer data, int n)
{
  const KhSawWay *way = data;
  guint hash = 17u + (guint)way->kind;
  for (int i = 0; i < n; i++)
    hash = hash * 31u + (guint)way->take[i];
  return hash;
}

/* TRUE when the way was not there. */
static gboolean add_way_take (Simplex *s, KhSawWay *way)
{
  int n = s->problem->n_items;
  gpointer key = GUINT_TO_POINTER (hash_way (way, n));
  GSList *alike = g_hash_table_lookup (s->known, key);
  for (GSList *l = alike; l; l = l->next)
    {
      const KhSawWay *other = l->data;
      if (other->kind == way->kind && memcmp (other->take, way->take, sizeof (int) * (gsize)n) == 0)
        {
          g_free (way);
          return FALSE;
        }
    }
  if (alike)
    alike = g_slist_insert (alike, way, 1);
  else
    g_hash_table_insert (s->known, key, g_slist_prepend (NULL, way));
  g_ptr_array_add (s->lp->ways, way);
  return TRUE;
}

static void take_pool (Simplex *s, const GPtrArray *pool)
{
  for (guint i = 0; i < pool->len; i++)
    {
      const KhSawWay *way = g_ptr_array_index (pool, i);
      KhSawWay *capped = kh_saw_way_new (s->problem, way->kind, 0);
      gboolean any = FALSE;
      for (int k = 0; k < s->problem->n_items; k++)
        {
          capped->take[k] = MIN (way->take[k], s->task->demands[k]);
          any |= capped->take[k] > 0;
        }
      if (any)
        add_way_take (s, capped);
      else
        g_free (capped);
    }
}

static double get_cost (const Simplex *s, int member)
{
  if (member >= 0)
    return s->task->costs[((const KhSawWay *)g_ptr_array_index (s->lp->ways, member))->kind];
  return ~member >= s->n_rows ? MISSING_COST : 0;
}

static void get_column (const Simplex *s, int member, double *column)
{
  memset (column, 0, sizeof (double) * (gsize)s->n_rows);
  if (member < 0)
    {
      int row = ~member >= s->n_rows ? ~member - s->n_rows : ~member;
      column[row] = ~member < s->n_rows && row < s->n_items ? -1 : 1;
      return;
    }
  const KhSawWay *way = g_ptr_array_index (s->lp->ways, member);
  for (int row = 0; row < s->n_items; row++)
    column[row] = way->take[s->item_of[row]];
  column[s->n_items + way->kind] = 1;
}

static void eliminate (Simplex *s, double *matrix, int pivot_row, const double *column)
{
  int n = s->n_rows;
  double *pivot = matrix + (gsize)pivot_row * (gsize)n;
  for (int k = 0; k < n; k++)
    pivot[k] /= column[pivot_row];
  for (int row = 0; row < n; row++)
    if (row != pivot_row && (column[row] > 0 || column[row] < 0))
      {
        double *other = matrix + (gsize)row * (gsize)n;
        for (int k = 0; k < n; k++)
          other[k] -= column[row] * pivot[k];
      }
}

static void multiply (const Simplex *s, const double *vector, double *product)
{
  for (int row = 0; row < s->n_rows; row++)
    {
      const double *line = s->inverse + (gsize)row * (gsize)s->n_rows;
      double sum = 0;
      for (int k = 0; k < s->n_rows; k++)
        sum += line[k] * vector[k];
      product[row] = sum;
    }
}

/* The inverse from the basis alone, so that what rounding left goes.  Each
 * member is put into the row, of those still free, where it stands out most. */
static gboolean refresh (Simplex *s)
{
  int n = s->n_rows;
  g_autofree int *members = g_memdup2 (s->basis, sizeof (int) * (gsize)n);
  g_autofree gboolean *done = g_new0 (gboolean, n);
  memset (s->inverse, 0, sizeof (double) * (gsize)n * (gsize)n);
  for (int row = 0; row < n; row++)
    s->inverse[(gsize)row * (gsize)n + (gsize)row] = 1;
  for (int k = 0; k < n && !kh_saw_clock_is_over (s->task->clock); k++)
    {
      get_column (s, members[k], s->column);
      multiply (s, s->column, s->step);
      int best = -1;
      for (int row = 0; row < n; row++)
        if (!done[row] && (best < 0 || ABS (s->step[row]) > ABS (s->step[best])))
          best = row;
      if (ABS (s->step[best]) < EPSILON)
        return FALSE;
      eliminate (s, s->inverse, best, s->step);
      done[best] = TRUE;
      s->basis[best] = members[k];
    }
  multiply (s, s->right, s->amount);
  return !s->task->clock->is_over;
}

static void set_prices (Simplex *s)
{
  memset (s->price, 0, sizeof (double) * (gsize)s->n_rows);
  for (int row = 0; row < s->n_rows; row++)
    {
      double cost = get_cost (s, s->basis[row]);
      const double *line = s->inverse + (gsize)row * (gsize)s->n_rows;
      if (cost > 0)
        for (int k = 0; k < s->n_rows; k++)
          s->price[k] += cost * line[k];
    }
}

static double get_gain (const Simplex *s, const KhSawWay *way)
{
  double gain = s->price[s->n_items + way->kind] - s->task->costs[way->kind];
  for (int row = 0; row < s->n_items; row++)
    gain += way->take[s->item_of[row]] * s->price[row];
  return gain;
}

/* What is not a number comes out as 0: the cut made of it is weak, not false. */
static int64_t scale_price (double price)
{
  return price > 0 ? (int64_t)((price < MISSING_COST ? price : MISSING_COST) * VALUE_SCALE) : 0;
}

/* A way not known yet that gains; FALSE where no kind has one. */
static gboolean find_way (Simplex *s, int *member)
{
  gsize n = (gsize)s->problem->n_items;
  g_autofree int64_t *value = g_new0 (int64_t, n);
  for (int row = 0; row < s->n_items; row++)
    value[s->item_of[row]] = scale_price (s->price[row]);
  double most = EPSILON * 100;
  gboolean found = FALSE;
  for (int kind = 0; kind < s->problem->n_kinds; kind++)
    {
      if (s->task->strips[kind] == 0)
        continue;
      KhSawWay *way = kh_saw_way_new (s->problem, kind, 0);
      int64_t best;
      KhSawFilling filling = { value, s->task->demands, s->problem->kinds[kind].capacity, G_MAXINT64, KNAPSACK_NODES };
      kh_saw_knapsack (s->problem, &filling, way->take, &best);
      double gain = get_gain (s, way);
      if (gain <= EPSILON * 100)
        {
          g_free (way);
          continue;
        }
      if (add_way_take (s, way) && gain > most)
        {
          most = gain;
          *member = (int)s->lp->ways->len - 1;
          found = TRUE;
        }
    }
  return found;
}

/* What comes into the basis: the most gain of slacks and known ways, else a new way. */
static gboolean find_entering (Simplex *s, int *member)
{
  double most = EPSILON * 100;
  gboolean found = FALSE;
  for (int row = 0; row < s->n_rows; row++)
    {
      double gain = row < s->n_items ? -s->price[row] : s->price[row];
      if (gain <= most)
        continue;
      most = gain;
      *member = ~row;
      found = TRUE;
    }
  for (guint i = 0; i < s->lp->ways->len; i++)
    {
      double gain = get_gain (s, g_ptr_array_index (s->lp->ways, i));
      if (gain <= most)
        continue;
      most = gain;
      *member = (int)i;
      found = TRUE;
    }
  return found || find_way (s, member);
}

/* The row that gives way: the least quotient, missing pieces first, then the larger step. */
static int find_leaving (const Simplex *s)
{
  int best = -1;
  double least = 0;
  for (int row = 0; row < s->n_rows; row++)
    {
      if (s->step[row] <= EPSILON * 10)
        continue;
      double quotient = MAX (s->amount[row], 0) / s->step[row];
      gboolean is_missing = s->basis[row] < 0 && ~s->basis[row] >= s->n_rows;
      gboolean was_missing = best >= 0 && s->basis[best] < 0 && ~s->basis[best] >= s->n_rows;
      if (best < 0 || quotient < least - EPSILON
          || (quotient <= least + EPSILON && (is_missing != was_missing ? is_missing : s->step[row] > s->step[best])))
        {
          best = row;
          least = quotient;
        }
    }
  return best;
}

static void pivot (Simplex *s, int row, int member)
{
  double amount = MAX (s->amount[row], 0) / s->step[row];
  for (int k = 0; k < s->n_rows; k++)
    s->amount[k] -= amount * s->step[k];
  s->amount[row] = amount;
  eliminate (s, s->inverse, row, s->step);
  s->basis[row] = member;
}

static gboolean run (Simplex *s)
{
  int steps = 50 * s->n_rows + 2000;
  for (int k = 1; k <= steps && !kh_saw_clock_is_over (s->task->clock); k++)
    {
      int member = 0;
      set_prices (s);
      if (!find_entering (s, &member))
        return TRUE;
      get_column (s, member, s->column);
      multiply (s, s->column, s->step);
      int row = find_leaving (s);
      if (row < 0)
        return FALSE;
      pivot (s, row, member);
      if (k % REFRESH == 0 && !refresh (s))
        return FALSE;
    }
  return FALSE;
}

static void number_rows (Simplex *s)
{
  s->item_of = g_new (int, s->problem->n_items + 1);
  for (int i = 0; i < s->problem->n_items; i++)
    if (s->task->demands[i] > 0)
      s->item_of[s->n_items++] = i;
  s->n_rows = s->n_items + s->problem->n_kinds;
}

static void set_up (Simplex *s)
{
  gsize rows = (gsize)s->n_rows;
  s->inverse = g_new0 (double, rows *rows);
  s->right = g_new0 (double, rows * 5);
  s->amount = s->right + rows;
  s->price = s->amount + rows;
  s->column = s->price + rows;
  s->step = s->column + rows;
  s->basis = g_new (int, rows);
  for (int row = 0; row < s->n_rows; row++)
    {
      gboolean is_item = row < s->n_items;
      s->inverse[(gsize)row * rows + (gsize)row] = 1;
      s->right[row] = s->amount[row] = is_item ? s->task->demands[s->item_of[row]] : s->task->strips[row - s->n_items];
      s->basis[row] = is_item ? ~(s->n_rows + row) : ~row;
    }
}

static void read_result (Simplex *s)
{
  KhSawLp *lp = s->lp;
  g_array_set_size (lp->amounts, lp->ways->len);
  for (int row = 0; row < s->n_rows; row++)
    {
      int member = s->basis[row];
      if (member >= 0)
        g_array_index (lp->amounts, double, member) = MAX (s->amount[row], 0);
      else if (~member >= s->n_rows && s->amount[row] > 1e-6)
        lp->missing += s->amount[row];
    }
  set_prices (s);
  for (int row = 0; row < s->n_items; row++)
    lp->values[s->item_of[row]] = scale_price (s->price[row]);
}

static void free_list (gpointer list) { g_slist_free (list); }

KhSawLp *kh_saw_lp_new (const KhSawProblem *problem, const KhSawLpTask *task, GPtrArray *pool)
{
  KhSawLp *lp = g_new0 (KhSawLp, 1);
  lp->ways = g_ptr_array_new_with_free_func (g_free);
  lp->amounts = g_array_new (FALSE, TRUE, sizeof (double));
  lp->values = g_new0 (int64_t, problem->n_items + 1);
  g_autoptr (GHashTable) known = g_hash_table_new_full (NULL, NULL, NULL, free_list);
  Simplex s = { .problem = problem, .task = task, .lp = lp, .known = known };
  number_rows (&s);
  if (s.n_rows > KH_SAW_LP_ROWS)
    {
      g_free (s.item_of);
      return lp;
    }
  set_up (&s);
  take_pool (&s, pool);
  guint n_taken = lp->ways->len;
  lp->is_ended = run (&s);
  read_result (&s);
  gsize size = sizeof (KhSawWay) + sizeof (int) * (gsize)problem->n_items;
  for (guint i = n_taken; i < lp->ways->len; i++)
    g_ptr_array_add (pool, g_memdup2 (g_ptr_array_index (lp->ways, i), size));
  g_free (s.item_of);
  g_free (s.inverse);
  g_free (s.right);
  g_free (s.basis);
  return lp;
}

void kh_saw_lp_free (KhSawLp *lp)
{
  if (!lp)
    return;
  g_ptr_array_unref (lp->ways);
  g_array_unref (lp->amounts);
  g_free (lp->values);
  g_free (lp);
}
