/* SPDX-License-Identifier: MIT */
#include "panels/saw.h"
#include "base/units.h"
#include "panels/saw_problem.h"
#include "panels/saw_search.h"
#include <glib/gi18n-lib.h>
#include <inttypes.h>

G_DEFINE_QUARK (kh - saw - error - quark, kh_saw_error)

#define LENGTH_MOST_NM (G_GINT64_CONSTANT (1000000) * KH_NM_PER_MM)
#define PRICE_MOST_MILLI (G_GINT64_CONSTANT (1000000000) * 1000)
#define PIECES_MOST 1000000
#define STRIPS_MOST 10000
#define ROWS_MOST 4000 /* of pieces: more lengths than any saw list has */

static void stock_clear (gpointer data) { g_free (((KhSawStock *)data)->name); }

static void pattern_clear (gpointer data) { g_array_unref (((KhPattern *)data)->cuts); }

KhSawOrder *kh_saw_order_new (void)
{
  KhSawOrder *order = g_new0 (KhSawOrder, 1);
  order->kerf_nm = 3 * KH_NM_PER_MM;
  order->keep_offcut_nm = 150 * KH_NM_PER_MM;
  order->stock = g_array_new (FALSE, TRUE, sizeof (KhSawStock));
  g_array_set_clear_func (order->stock, stock_clear);
  order->pieces = g_array_new (FALSE, TRUE, sizeof (KhSawPiece));
  return order;
}

void kh_saw_order_free (KhSawOrder *order)
{
  if (!order)
    return;
  g_array_unref (order->stock);
  g_array_unref (order->pieces);
  g_free (order);
}

static gboolean refuse_length (GError **error, const char *path, int64_t nm, gboolean over_zero)
{
  g_autofree char *stands = kh_nm_dup_file_text (nm);
  g_autofree char *most = kh_nm_dup_file_text (LENGTH_MOST_NM);
  g_set_error (error, KH_SAW_ERROR, KH_SAW_ERROR_ORDER,
               /* TRANSLATORS: path of a member, what stands there, the most it may be */
               over_zero ? _ ("%s is %s; it must be over 0 and at most %s") : _ ("%s is %s; it must be 0 to %s"), path,
               stands, most);
  return FALSE;
}

static gboolean refuse_number (GError **error, const char *path, int64_t stands, int64_t least, int64_t most)
{
  g_set_error (error, KH_SAW_ERROR, KH_SAW_ERROR_ORDER,
               /* TRANSLATORS: path of a member, what stands there, the least and the most it may be */
               _ ("%s is %" PRId64 "; it must be %" PRId64 " to %" PRId64), path, stands, least, most);
  return FALSE;
}

static gboolean check_saw (const KhSawOrder *order, GError **error)
{
  const struct
  {
    const char *path;
    int64_t nm;
  } members[] = { { "kerf_mm", order->kerf_nm },
                  { "end_trim_mm", order->end_trim_nm },
                  { "keep_offcut_mm", order->keep_offcut_nm } };
  for (gsize i = 0; i < G_N_ELEMENTS (members); i++)
    if (members[i].nm < 0 || members[i].nm > LENGTH_MOST_NM)
      return refuse_length (error, members[i].path, members[i].nm, FALSE);
  return TRUE;
}

static gboolean check_stock (const KhSawOrder *order, guint i, GError **error)
{
  const KhSawStock *stock = &g_array_index (order->stock, KhSawStock, i);
  g_autofree char *length = g_strdup_printf ("stock[%u].length_mm", i);
  g_autofree char *count = g_strdup_printf ("stock[%u].count", i);
  g_autofree char *strips = g_strdup_printf ("stock[%u].strips", i);
  g_autofree char *price = g_strdup_printf ("stock[%u].price", i);
  if (stock->length_nm <= 0 || stock->length_nm > LENGTH_MOST_NM)
    return refuse_length (error, length, stock->length_nm, TRUE);
  if (stock->count != KH_COUNT_ANY && (stock->count < 0 || stock->count > PIECES_MOST))
    return refuse_number (error, count, stock->count, 0, PIECES_MOST);
  if (stock->n_strips < 1 || stock->n_strips > STRIPS_MOST)
    return refuse_number (error, strips, stock->n_strips, 1, STRIPS_MOST);
  if (stock->price_milli != KH_PRICE_NONE && (stock->price_milli < 0 || stock->price_milli > PRICE_MOST_MILLI))
    {
      g_autofree char *stands = kh_number_dup_file_text ((double)stock->price_milli / 1000);
      g_set_error (error, KH_SAW_ERROR, KH_SAW_ERROR_ORDER, _ ("%s is %s; it must be 0 to %d"), price, stands,
                   (int)(PRICE_MOST_MILLI / 1000));
      return FALSE;
    }
  gboolean first_has = g_array_index (order->stock, KhSawStock, 0).price_milli != KH_PRICE_NONE;
  if ((stock->price_milli != KH_PRICE_NONE) != first_has)
    {
      g_set_error (error, KH_SAW_ERROR, KH_SAW_ERROR_ORDER,
                   _ ("%s: some stock has a price and some has none; give each a price (0 for what is there already) "
                      "or leave all out"),
                   price);
      return FALSE;
    }
  return TRUE;
}

gboolean kh_saw_order_check (const KhSawOrder *order, GError **error)
{
  if (!check_saw (order, error))
    return FALSE;
  for (guint i = 0; i < order->stock->len; i++)
    if (!check_stock (order, i, error))
      return FALSE;
  if (order->pieces->len > ROWS_MOST)
    {
      g_set_error (error, KH_SAW_ERROR, KH_SAW_ERROR_ORDER, _ ("pieces has %u entries; it may have %d"),
                   order->pieces->len, ROWS_MOST);
      return FALSE;
    }
  int64_t n = 0;
  for (guint i = 0; i < order->pieces->len; i++)
    {
      const KhSawPiece *piece = &g_array_index (order->pieces, KhSawPiece, i);
      g_autofree char *length = g_strdup_printf ("pieces[%u].length_mm", i);
      g_autofree char *count = g_strdup_printf ("pieces[%u].count", i);
      if (piece->length_nm <= 0 || piece->length_nm > LENGTH_MOST_NM)
        return refuse_length (error, length, piece->length_nm, TRUE);
      n += MAX (piece->count, 0);
      if (piece->count < 0 || n > PIECES_MOST)
        return refuse_number (error, count, piece->count, 0, PIECES_MOST - (n - MAX (piece->count, 0)));
    }
  return TRUE;
}

void kh_saw_settings_init (KhSawSettings *settings) { settings->seconds = 5; }

static KhSawPlan *plan_new (const KhSawOrder *order)
{
  KhSawPlan *plan = g_new0 (KhSawPlan, 1);
  plan->patterns = g_array_new (FALSE, TRUE, sizeof (KhPattern));
  g_array_set_clear_func (plan->patterns, pattern_clear);
  plan->n_bought = g_array_sized_new (FALSE, TRUE, sizeof (int), order->stock->len);
  g_array_set_size (plan->n_bought, order->stock->len);
  plan->offcuts_nm = g_array_new (FALSE, TRUE, sizeof (int64_t));
  plan->cannot_cut = g_array_new (FALSE, TRUE, sizeof (KhCannotCut));
  return plan;
}

void kh_saw_plan_free (KhSawPlan *plan)
{
  if (!plan)
    return;
  g_array_unref (plan->patterns);
  g_array_unref (plan->n_bought);
  g_array_unref (plan->offcuts_nm);
  g_array_unref (plan->cannot_cut);
  g_free (plan);
}

static int compare_patterns (gconstpointer a, gconstpointer b)
{
  const KhPattern *x = a, *y = b;
  if (x->stock != y->stock)
    return x->stock - y->stock;
  for (guint i = 0; i < MIN (x->cuts->len, y->cuts->len); i++)
    {
      const KhSawCut *p = &g_array_index (x->cuts, KhSawCut, i), *q = &g_array_index (y->cuts, KhSawCut, i);
      if (p->length_nm != q->length_nm)
        return p->length_nm > q->length_nm ? -1 : 1;
      if (p->count != q->count)
        return q->count - p->count;
    }
  return (int)y->cuts->len - (int)x->cuts->len;
}

static int compare_nm_down (gconstpointer a, gconstpointer b)
{
  int64_t x = *(const int64_t *)a, y = *(const int64_t *)b;
  return (x < y) - (x > y);
}

static void append_pattern (KhSawPlan *plan, const KhSawProblem *problem, const KhSawWay *way)
{
  const KhSawKind *kind = &problem->kinds[way->kind];
  KhPattern pattern = { kind->stock, way->times, g_array_new (FALSE, FALSE, sizeof (KhSawCut)), kind->capacity };
  for (int i = 0; i < problem->n_items; i++)
    if (way->take[i] > 0)
      {
        KhSawCut cut = { problem->items[i].length, way->take[i] };
        g_array_append_val (pattern.cuts, cut);
        pattern.left_nm -= way->take[i] * problem->items[i].width;
        plan->used_nm += (int64_t)way->times * way->take[i] * cut.length_nm;
      }
  g_array_append_val (plan->patterns, pattern);
}

/* What is left of a strip is an offcut once it is cut off, which takes a kerf;
 * a strip not cut at all of a sheet that had to be bought is one as it is. */
static void gather_offcuts (KhSawPlan *plan, const KhSawOrder *order)
{
  g_autofree int *idle = g_new (int, order->stock->len);
  for (guint s = 0; s < order->stock->len; s++)
    idle[s] = g_array_index (plan->n_bought, int, s) * g_array_index (order->stock, KhSawStock, s).n_strips;
  for (guint i = 0; i < plan->patterns->len; i++)
    {
      const KhPattern *pattern = &g_array_index (plan->patterns, KhPattern, i);
      int64_t offcut = pattern->left_nm - order->kerf_nm;
      idle[pattern->stock] -= pattern->count;
      for (int k = 0; k < pattern->count && offcut > 0 && offcut >= order->keep_offcut_nm; k++)
        g_array_append_val (plan->offcuts_nm, offcut);
    }
  for (guint s = 0; s < order->stock->len; s++)
    {
      int64_t offcut = g_array_index (order->stock, KhSawStock, s).length_nm - 2 * order->end_trim_nm;
      for (int k = 0; k < idle[s] && offcut > 0 && offcut >= order->keep_offcut_nm; k++)
        g_array_append_val (plan->offcuts_nm, offcut);
    }
  g_array_sort (plan->offcuts_nm, compare_nm_down);
}

static void write_down (KhSawPlan *plan, const KhSawOrder *order, const KhSawProblem *problem, KhSawDraft *draft)
{
  kh_saw_draft_merge (draft, problem);
  for (guint i = 0; i < draft->ways->len; i++)
    append_pattern (plan, problem, g_ptr_array_index (draft->ways, i));
  g_array_sort (plan->patterns, compare_patterns);
  for (int k = 0; k < problem->n_kinds; k++)
    {
      int bought = kh_saw_draft_get_bought (draft, problem, k);
      g_array_index (plan->n_bought, int, problem->kinds[k].stock) += bought;
      plan->n_pieces_of_stock += bought;
      plan->cost_milli += bought * problem->kinds[k].price;
    }
  gather_offcuts (plan, order);
}

KhSawPlan *kh_saw_plan_new (const KhSawOrder *order, const KhSawSettings *settings, KhJob *job)
{
  KhSawPlan *plan = plan_new (order);
  g_autoptr (KhSawProblem) problem = kh_saw_problem_new (order, plan->cannot_cut);
  KhSawOutcome outcome = { 0 };
  kh_saw_search (problem, settings->seconds, job, &outcome);
  g_autoptr (KhSawDraft) draft = outcome.draft;
  kh_saw_problem_tell_short (problem, &outcome, plan->cannot_cut);
  plan->ended_by_limit = outcome.ended_by_limit;
  if (plan->cannot_cut->len > 0)
    return plan;
  write_down (plan, order, problem, draft);
  g_assert (outcome.bound <= plan->cost_milli);
  plan->bound_milli = outcome.bound;
  plan->proven = plan->bound_milli == plan->cost_milli;
  g_autoptr (GError) error = NULL;
  if (!kh_saw_check (order, plan, &error))
    g_error ("the saw plan does not pass its check: %s", error->message);
  kh_job_set_progress (job, 1);
  return plan;
}
