/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "../saw_texts.h"
#include <string.h>

/* Many small orders against brute force: the cost is never under the optimum,
 * the bound never over it, and what is called proven is the optimum. */

#define N_ITEMS 4
#define N_KINDS 2
#define MOST 9 /* pieces */

typedef struct
{
  const KhSawOrder *order;
  int lengths[N_ITEMS]; /* mm, as in the order */
  GHashTable *known;    /* packed state -> 1 no, 2 yes */
} Brute;

static gboolean fits (const Brute *b, const int *left, const int *strips);

/* Fills one strip with every set of pieces, item by item. */
static gboolean fits_with (const Brute *b, int *left, const int *strips, int item, int64_t room)
{
  if (item == N_ITEMS)
    return fits (b, left, strips);
  int64_t width = b->lengths[item] * KH_NM_PER_MM + b->order->kerf_nm;
  int had = left[item];
  for (int n = 0; n <= had && n * width <= room; n++)
    {
      left[item] = had - n;
      if (fits_with (b, left, strips, item + 1, room - n * width))
        {
          left[item] = had;
          return TRUE;
        }
    }
  left[item] = had;
  return FALSE;
}

static gboolean fits (const Brute *b, const int *left, const int *strips)
{
  gsize key = 1, any = 0;
  for (int i = 0; i < N_ITEMS; i++)
    {
      key = key * 16 + (gsize)left[i];
      any += (gsize)left[i];
    }
  for (int k = 0; k < N_KINDS; k++)
    key = key * 32 + (gsize)strips[k];
  if (any == 0)
    return TRUE;
  gsize known = GPOINTER_TO_SIZE (g_hash_table_lookup (b->known, GSIZE_TO_POINTER (key)));
  if (known)
    return known == 2;
  gboolean answer = FALSE;
  for (int k = 0; k < (int)b->order->stock->len && !answer; k++)
    {
      int rest[N_KINDS] = { strips[0], strips[1] }, copy[N_ITEMS];
      if (rest[k] == 0)
        continue;
      rest[k]--;
      memcpy (copy, left, sizeof copy);
      int64_t usable = g_array_index (b->order->stock, KhSawStock, k).length_nm - 2 * b->order->end_trim_nm;
      answer = fits_with (b, copy, rest, 0, usable + b->order->kerf_nm);
    }
  g_hash_table_insert (b->known, GSIZE_TO_POINTER (key), GSIZE_TO_POINTER (answer ? 2 : 1));
  return answer;
}

/* Least cost over everything that could be bought; -1 = impossible. */
static int64_t find_optimum (Brute *b, const int *demands)
{
  const KhSawStock *stock = &g_array_index (b->order->stock, KhSawStock, 0);
  int n_stock = (int)b->order->stock->len;
  int64_t best = -1;
  for (int x = 0; x <= MOST; x++)
    for (int y = 0; y <= (n_stock > 1 ? MOST : 0); y++)
      {
        int bought[N_KINDS] = { x, y }, strips[N_KINDS] = { 0, 0 };
        int64_t cost = 0;
        gboolean allowed = TRUE;
        for (int k = 0; k < n_stock; k++)
          {
            int shared = stock[k].pool ? x + y : bought[k];
            allowed &= stock[k].count == KH_COUNT_ANY || shared <= stock[k].count;
            strips[k] = MIN (bought[k] * stock[k].n_strips, MOST);
            cost += bought[k] * (stock[k].price_milli == KH_PRICE_NONE ? 1000 : stock[k].price_milli);
          }
        if (allowed && (best < 0 || cost < best) && fits (b, demands, strips))
          best = cost;
      }
  return best;
}

/* The fewest pieces to leave out, longest first, so that the rest can be met. */
static int find_short (Brute *b, const int *demands)
{
  int left[N_ITEMS], n = 0;
  memcpy (left, demands, sizeof left);
  while (find_optimum (b, left) < 0)
    {
      int longest = 0;
      while (left[longest] == 0)
        longest++;
      left[longest]--;
      n++;
    }
  return n;
}

static void compare (const char *text, const int lengths[N_ITEMS], const int demands[N_ITEMS])
{
  g_autoptr (KhSawOrder) order = saw_order_from_text (text);
  g_autoptr (GHashTable) known = g_hash_table_new (NULL, NULL);
  Brute b = { order, { 0 }, known };
  memcpy (b.lengths, lengths, sizeof b.lengths);
  for (guint s = 0; s < order->stock->len && strstr (text, "pool"); s++)
    g_array_index (order->stock, KhSawStock, s).pool = 1;
  g_autoptr (KhSawPlan) plan = saw_plan_judged (order, 5);
  int64_t optimum = find_optimum (&b, demands);
  int n_short = 0;
  for (guint i = 0; i < plan->cannot_cut->len; i++)
    n_short += g_array_index (plan->cannot_cut, KhCannotCut, i).count;
  if (optimum < 0 ? n_short != find_short (&b, demands) : n_short > 0)
    fail_msg ("%s: %d pieces cannot be cut, but should be %d", text, n_short,
              optimum < 0 ? find_short (&b, demands) : 0);
  if (optimum < 0)
    return;
  if (plan->cost_milli < optimum || plan->bound_milli > optimum || (plan->proven && plan->cost_milli != optimum))
    fail_msg ("%s: cost %d, bound %d, optimum %d", text, (int)plan->cost_milli, (int)plan->bound_milli, (int)optimum);
  if (!plan->proven)
    fail_msg ("%s: cost %d not proven, optimum %d", text, (int)plan->cost_milli, (int)optimum);
}

static void many_small_orders_agree_with_brute_force (void **state)
{
  static const char *const stocks[] = {
    "stock 11",
    "stock 11/2",
    "stock 11 stock 8",
    "stock 11@10 stock 8@7",
    "stock 11@9 stock 8@7",
    "stock 11@10x1 stock 8@7",
    "stock 11@10x2 stock 8@9x2",
    "stock 11@23/3 stock 8@7",
    "stock 11@23/3 stock 8@15/2",
    "stock 11@0x1 stock 8@7",
    "pool stock 11x2/2 stock 8x2/3",
    "pool stock 11@5x1/2 stock 8@5x1/3",
  };
  static const int lengths[N_ITEMS] = { 8, 5, 3, 2 };
  for (gsize s = 0; s < G_N_ELEMENTS (stocks); s++)
    for (int kerf = 0; kerf < 2; kerf++)
      for (int code = 1; code < 3 * 3 * 4 * 4; code++)
        {
          int demands[N_ITEMS] = { code % 3, code / 3 % 3, code / 9 % 4, code / 36 };
          if (demands[0] + demands[1] + demands[2] + demands[3] > MOST)
            continue;
          g_autoptr (GString) text = g_string_new (stocks[s]);
          g_string_append_printf (text, " kerf %d pieces", kerf);
          for (int i = 0; i < N_ITEMS; i++)
            if (demands[i] > 0)
              g_string_append_printf (text, " %dx%d", lengths[i], demands[i]);
          compare (text->str, lengths, demands);
        }
}

int main (void)
{
  const struct CMUnitTest tests[] = { cmocka_unit_test (many_small_orders_agree_with_brute_force) };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
