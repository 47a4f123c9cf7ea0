/* SPDX-License-Identifier: MIT */
#include "panels/saw_fit.h"
#include "base/units.h"
#include <string.h>

#define FILLINGS_MOST 2000 /* at one strip; more are not looked at, and then nothing is proven */
#define STEPS_A_NODE 20000 /* of the listing of fillings */
#define FAILED_MOST 200000 /* states remembered */

typedef struct
{
  const KhSawProblem *problem;
  const KhSawFitTask *task;
  GPtrArray *ways;    /* so far */
  GHashTable *failed; /* of GBytes */
  int *left, *strips;
  KhInt128 spare; /* capacity of the strips left less width of the pieces left */
  int n_nodes;
  gboolean cut_short; /* something was not looked at */
} Fit;

typedef struct
{
  Fit *fit;
  int kind, first;     /* the item that must be in it */
  KhSawWay *way;       /* so far */
  GPtrArray *fillings; /* of KhSawWay */
  int n_steps;
} Listing;

/* Every item between behind and ahead of 'item' that is left and fits must be taken: else not full. */
static gboolean is_full (const Listing *l, int64_t room)
{
  const KhSawProblem *problem = l->fit->problem;
  for (int i = problem->n_items - 1; i >= l->first; i--)
    if (l->fit->left[i] > l->way->take[i])
      return problem->items[i].width > room; /* the shortest that is left over */
  return TRUE;
}

static void list_fillings (Listing *l, int item, int64_t room)
{
  Fit *fit = l->fit;
  if (++l->n_steps > STEPS_A_NODE || l->fillings->len >= FILLINGS_MOST)
    {
      fit->cut_short = TRUE;
      return;
    }
  if (item == fit->problem->n_items)
    {
      if (room > fit->spare || !is_full (l, room))
        return;
      gsize size = sizeof (KhSawWay) + sizeof (int) * (gsize)fit->problem->n_items;
      g_ptr_array_add (l->fillings, g_memdup2 (l->way, size));
      return;
    }
  int64_t width = fit->problem->items[item].width;
  int least = item == l->first;
  for (int n = (int)MIN (fit->left[item], room / width); n >= least; n--)
    {
      l->way->take[item] = n;
      list_fillings (l, item + 1, room - n * width);
    }
  l->way->take[item] = 0;
}

static int64_t get_width (const KhSawProblem *problem, const KhSawWay *way)
{
  int64_t width = 0;
  for (int i = 0; i < problem->n_items; i++)
    width += way->take[i] * problem->items[i].width;
  return width;
}

/* Least waste first; among those the one with the longer pieces. */
static int compare_fillings (gconstpointer a, gconstpointer b, gpointer data)
{
  const KhSawProblem *problem = data;
  const KhSawWay *x = *(KhSawWay *const *)a, *y = *(KhSawWay *const *)b;
  int64_t waste_x = problem->kinds[x->kind].capacity - get_width (problem, x);
  int64_t waste_y = problem->kinds[y->kind].capacity - get_width (problem, y);
  if (waste_x != waste_y)
    return waste_x < waste_y ? -1 : 1;
  for (int i = 0; i < problem->n_items; i++)
    if (x->take[i] != y->take[i])
      return x->take[i] > y->take[i] ? -1 : 1;
  return x->kind - y->kind;
}

static GBytes *dup_state (const Fit *fit)
{
  gsize items = sizeof (int) * (gsize)fit->problem->n_items, kinds = sizeof (int) * (gsize)fit->problem->n_kinds;
  guint8 *data = g_malloc (items + kinds);
  memcpy (data, fit->left, items);
  memcpy (data + items, fit->strips, kinds);
  return g_bytes_new_take (data, items + kinds);
}

static void put (Fit *fit, const KhSawWay *way, int sign)
{
  for (int i = 0; i < fit->problem->n_items; i++)
    fit->left[i] -= sign * way->take[i];
  fit->strips[way->kind] -= sign;
  fit->spare -= sign * (fit->problem->kinds[way->kind].capacity - get_width (fit->problem, way));
}

static GPtrArray *dup_fillings (Fit *fit, int first)
{
  GPtrArray *fillings = g_ptr_array_new_with_free_func (g_free);
  for (int kind = 0; kind < fit->problem->n_kinds; kind++)
    {
      if (fit->strips[kind] == 0)
        continue;
      g_autofree KhSawWay *way = kh_saw_way_new (fit->problem, kind, 1);
      Listing listing = { fit, kind, first, way, fillings, 0 };
      list_fillings (&listing, first, fit->problem->kinds[kind].capacity);
    }
  g_ptr_array_sort_with_data (fillings, compare_fillings, (gpointer)fit->problem);
  return fillings;
}

static gboolean search (Fit *fit)
{
  int first = 0;
  while (first < fit->problem->n_items && fit->left[first] == 0)
    first++;
  if (first == fit->problem->n_items)
    return TRUE;
  if (fit->spare < 0)
    return FALSE;
  if (fit->cut_short && fit->n_nodes < 0)
    return FALSE;
  if (--fit->n_nodes < 0 || kh_saw_clock_is_over (fit->task->clock))
    {
      fit->cut_short = TRUE;
      fit->n_nodes = -1;
      return FALSE;
    }
  g_autoptr (GBytes) state = dup_state (fit);
  if (g_hash_table_contains (fit->failed, state))
    return FALSE;
  g_autoptr (GPtrArray) fillings = dup_fillings (fit, first);
  for (guint i = 0; i < fillings->len; i++)
    {
      KhSawWay *way = g_ptr_array_index (fillings, i);
      put (fit, way, 1);
      if (search (fit))
        {
          put (fit, way, -1);
          g_ptr_array_add (fit->ways, g_steal_pointer (&g_ptr_array_index (fillings, i)));
          return TRUE;
        }
      put (fit, way, -1);
      if (fit->n_nodes < 0)
        return FALSE;
    }
  if (!fit->cut_short && g_hash_table_size (fit->failed) < FAILED_MOST)
    g_hash_table_add (fit->failed, g_steal_pointer (&state));
  return FALSE;
}

KhSawFitResult kh_saw_fit (const KhSawProblem *problem, const KhSawFitTask *task, GPtrArray *ways)
{
  g_autofree int *left = g_memdup2 (task->demands, sizeof (int) * (gsize)MAX (problem->n_items, 1));
  g_autofree int *strips = g_memdup2 (task->strips, sizeof (int) * (gsize)MAX (problem->n_kinds, 1));
  g_autoptr (GHashTable) failed
      = g_hash_table_new_full (g_bytes_hash, g_bytes_equal, (GDestroyNotify)g_bytes_unref, NULL);
  Fit fit = { problem, task, ways, failed, left, strips, 0, task->nodes_most, FALSE };
  for (int k = 0; k < problem->n_kinds; k++)
    fit.spare += (KhInt128)strips[k] * problem->kinds[k].capacity;
  for (int i = 0; i < problem->n_items; i++)
    fit.spare -= (KhInt128)left[i] * problem->items[i].width;
  if (search (&fit))
    return KH_SAW_FIT_FOUND;
  return fit.cut_short ? KH_SAW_FIT_UNKNOWN : KH_SAW_FIT_NONE;
}
