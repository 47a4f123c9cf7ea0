/* SPDX-License-Identifier: MIT */
#include "base/units.h"
#include "panels/saw.h"

/* The judge.  Everything is worked out anew from the order and the plan, with
 * nothing taken over from the search: what fits, what is cut how often, what is
 * bought, what it costs, what is left.  What it says is for whoever mends the
 * program, so it is not translated. */

#define REFUSE(...) (g_set_error (error, KH_SAW_ERROR, KH_SAW_ERROR_CHECK, __VA_ARGS__), FALSE)

static gboolean judge_pattern (const KhSawOrder *order, const KhSawPlan *plan, guint index, GError **error)
{
  const KhPattern *pattern = &g_array_index (plan->patterns, KhPattern, index);
  if (pattern->stock < 0 || pattern->stock >= (int)order->stock->len)
    return REFUSE ("pattern %u names stock %d, which the order does not have", index, pattern->stock);
  if (pattern->count < 1 || pattern->cuts->len == 0)
    return REFUSE ("pattern %u is cut no time, or has no piece", index);
  KhInt128 sum = 0;
  int64_t n = 0;
  for (guint i = 0; i < pattern->cuts->len; i++)
    {
      const KhSawCut *cut = &g_array_index (pattern->cuts, KhSawCut, i);
      if (cut->count < 1 || cut->length_nm < 1)
        return REFUSE ("pattern %u has a cut without a count or a length", index);
      if (i > 0 && cut->length_nm >= g_array_index (pattern->cuts, KhSawCut, i - 1).length_nm)
        return REFUSE ("pattern %u does not have its cuts longest first", index);
      sum += (KhInt128)cut->length_nm * cut->count;
      n += cut->count;
    }
  KhInt128 left = (KhInt128)g_array_index (order->stock, KhSawStock, pattern->stock).length_nm - 2 * order->end_trim_nm
                  - sum - (KhInt128)(n - 1) * order->kerf_nm;
  if (left < 0)
    return REFUSE ("pattern %u does not fit its stock: %" G_GINT64_FORMAT " nm too much", index, (int64_t)-left);
  if (left != pattern->left_nm)
    return REFUSE ("pattern %u says %" G_GINT64_FORMAT " nm are left, but it is %" G_GINT64_FORMAT " nm", index,
                   pattern->left_nm, (int64_t)left);
  return TRUE;
}

static void add_count (GHashTable *counts, const int64_t *length, int64_t count)
{
  int64_t *sum = g_hash_table_lookup (counts, length);
  if (!sum)
    {
      sum = g_new0 (int64_t, 1);
      g_hash_table_insert (counts, g_memdup2 (length, sizeof *length), sum);
    }
  *sum += count;
}

/* Pieces asked for count up, pieces cut count down: all must come to nothing. */
static gboolean judge_pieces (const KhSawOrder *order, const KhSawPlan *plan, GError **error)
{
  g_autoptr (GHashTable) counts = g_hash_table_new_full (g_int64_hash, g_int64_equal, g_free, g_free);
  int64_t used = 0;
  for (guint i = 0; i < order->pieces->len; i++)
    {
      const KhSawPiece *piece = &g_array_index (order->pieces, KhSawPiece, i);
      add_count (counts, &piece->length_nm, piece->count);
      used += piece->length_nm * piece->count;
    }
  for (guint i = 0; i < plan->patterns->len; i++)
    {
      const KhPattern *pattern = &g_array_index (plan->patterns, KhPattern, i);
      for (guint k = 0; k < pattern->cuts->len; k++)
        {
          const KhSawCut *cut = &g_array_index (pattern->cuts, KhSawCut, k);
          add_count (counts, &cut->length_nm, -(int64_t)cut->count * pattern->count);
        }
    }
  GHashTableIter iter;
  gpointer length, count;
  g_hash_table_iter_init (&iter, counts);
  while (g_hash_table_iter_next (&iter, &length, &count))
    if (*(int64_t *)count != 0)
      return REFUSE ("pieces of %" G_GINT64_FORMAT " nm: %" G_GINT64_FORMAT " too few are cut", *(int64_t *)length,
                     *(int64_t *)count);
  if (used != plan->used_nm)
    return REFUSE ("the lengths cut add up to %" G_GINT64_FORMAT " nm, not %" G_GINT64_FORMAT " nm", used,
                   plan->used_nm);
  return TRUE;
}

static gboolean judge_stock (const KhSawOrder *order, const KhSawPlan *plan, guint s, GError **error)
{
  const KhSawStock *stock = &g_array_index (order->stock, KhSawStock, s);
  int64_t strips = 0, bought = g_array_index (plan->n_bought, int, s), pool = bought;
  for (guint i = 0; i < plan->patterns->len; i++)
    {
      const KhPattern *pattern = &g_array_index (plan->patterns, KhPattern, i);
      strips += pattern->stock == (int)s ? pattern->count : 0;
    }
  for (guint i = 0; i < order->stock->len; i++)
    if (i != s && stock->pool != 0 && g_array_index (order->stock, KhSawStock, i).pool == stock->pool)
      pool += g_array_index (plan->n_bought, int, i);
  if (bought < 0 || bought * stock->n_strips < strips || (bought > 0 && (bought - 1) * stock->n_strips >= strips))
    return REFUSE ("stock %u gives %d strips a piece; for %" G_GINT64_FORMAT " strips %" G_GINT64_FORMAT
                   " pieces are bought",
                   s, stock->n_strips, strips, bought);
  if (stock->count != KH_COUNT_ANY && (stock->pool != 0 ? pool : bought) > stock->count)
    return REFUSE ("of stock %u there are only %d", s, stock->count);
  return TRUE;
}

static gboolean judge_cost (const KhSawOrder *order, const KhSawPlan *plan, GError **error)
{
  KhInt128 cost = 0;
  int64_t n = 0;
  gboolean priced = FALSE;
  for (guint s = 0; s < order->stock->len; s++)
    priced |= g_array_index (order->stock, KhSawStock, s).price_milli != KH_PRICE_NONE;
  for (guint s = 0; s < order->stock->len; s++)
    {
      int64_t price = g_array_index (order->stock, KhSawStock, s).price_milli;
      int bought = g_array_index (plan->n_bought, int, s);
      n += bought;
      cost += (KhInt128)bought * (!priced ? 1000 : price == KH_PRICE_NONE ? 0 : price);
    }
  if (n != plan->n_pieces_of_stock || cost != plan->cost_milli)
    return REFUSE ("what is bought adds up to %" G_GINT64_FORMAT " pieces at %" G_GINT64_FORMAT
                   " thousandths, not %d at %" G_GINT64_FORMAT,
                   n, (int64_t)cost, plan->n_pieces_of_stock, plan->cost_milli);
  if (plan->bound_milli > plan->cost_milli || plan->proven != (plan->bound_milli == plan->cost_milli))
    return REFUSE ("the plan's bound of %" G_GINT64_FORMAT " does not go with its cost of %" G_GINT64_FORMAT,
                   plan->bound_milli, plan->cost_milli);
  return TRUE;
}

/* Every offcut must be left somewhere, and every piece left that is worth keeping must be named. */
static gboolean judge_offcuts (const KhSawOrder *order, const KhSawPlan *plan, GError **error)
{
  g_autoptr (GHashTable) counts = g_hash_table_new_full (g_int64_hash, g_int64_equal, g_free, g_free);
  g_autofree int64_t *strips = g_new0 (int64_t, order->stock->len + 1);
  for (guint i = 0; i < plan->patterns->len; i++)
    {
      const KhPattern *pattern = &g_array_index (plan->patterns, KhPattern, i);
      int64_t offcut = pattern->left_nm - order->kerf_nm;
      strips[pattern->stock] += pattern->count;
      if (offcut > 0 && offcut >= order->keep_offcut_nm)
        add_count (counts, &offcut, pattern->count);
    }
  for (guint s = 0; s < order->stock->len; s++)
    {
      const KhSawStock *stock = &g_array_index (order->stock, KhSawStock, s);
      int64_t whole = stock->length_nm - 2 * order->end_trim_nm;
      int64_t idle = (int64_t)g_array_index (plan->n_bought, int, s) * stock->n_strips - strips[s];
      if (idle > 0 && whole > 0 && whole >= order->keep_offcut_nm)
        add_count (counts, &whole, idle);
    }
  for (guint i = 0; i < plan->offcuts_nm->len; i++)
    {
      int64_t offcut = g_array_index (plan->offcuts_nm, int64_t, i);
      if (i > 0 && offcut > g_array_index (plan->offcuts_nm, int64_t, i - 1))
        return REFUSE ("the offcuts are not named longest first");
      add_count (counts, &offcut, -1);
    }
  GHashTableIter iter;
  gpointer length, count;
  g_hash_table_iter_init (&iter, counts);
  while (g_hash_table_iter_next (&iter, &length, &count))
    if (*(int64_t *)count != 0)
      return REFUSE ("offcuts of %" G_GINT64_FORMAT " nm: %" G_GINT64_FORMAT " too few are named", *(int64_t *)length,
                     *(int64_t *)count);
  return TRUE;
}

/* What cannot be cut: told of pieces the order has, and for the reason given. */
static gboolean judge_cannot (const KhSawOrder *order, const KhSawPlan *plan, GError **error)
{
  int64_t longest = 0;
  gboolean any = FALSE;
  for (guint s = 0; s < order->stock->len; s++)
    {
      const KhSawStock *stock = &g_array_index (order->stock, KhSawStock, s);
      if (stock->count == 0)
        continue;
      longest = MAX (longest, stock->length_nm - 2 * order->end_trim_nm);
      any = TRUE;
    }
  for (guint i = 0; i < plan->cannot_cut->len; i++)
    {
      const KhCannotCut *cannot = &g_array_index (plan->cannot_cut, KhCannotCut, i);
      int64_t asked = 0;
      for (guint k = 0; k < order->pieces->len; k++)
        if (g_array_index (order->pieces, KhSawPiece, k).length_nm == cannot->length_nm)
          asked += g_array_index (order->pieces, KhSawPiece, k).count;
      gboolean too_long = any && cannot->length_nm > longest;
      gboolean holds = FALSE;
      if (cannot->why == KH_CANNOT_NO_STOCK)
        holds = order->stock->len == 0 && cannot->count == asked;
      else if (cannot->why == KH_CANNOT_TOO_LONG)
        holds = too_long && cannot->count == asked && cannot->over_nm == cannot->length_nm - longest;
      else
        holds = order->stock->len > 0 && !too_long && cannot->count <= asked && (any || cannot->count == asked);
      if (cannot->count < 1 || !holds)
        return REFUSE ("what is said to be impossible of pieces of %" G_GINT64_FORMAT " nm does not hold",
                       cannot->length_nm);
    }
  return plan->patterns->len == 0 || REFUSE ("a plan that cannot cut everything has patterns");
}

gboolean kh_saw_check (const KhSawOrder *order, const KhSawPlan *plan, GError **error)
{
  if (plan->n_bought->len != order->stock->len)
    return REFUSE ("the plan does not count what is bought of each stock");
  if (plan->cannot_cut->len > 0)
    return judge_cannot (order, plan, error);
  for (guint i = 0; i < plan->patterns->len; i++)
    if (!judge_pattern (order, plan, i, error))
      return FALSE;
  for (guint s = 0; s < order->stock->len; s++)
    if (!judge_stock (order, plan, s, error))
      return FALSE;
  return judge_pieces (order, plan, error) && judge_cost (order, plan, error) && judge_offcuts (order, plan, error);
}
