/* SPDX-License-Identifier: MIT */
#include "cli/sawwords.h"
#include "base/units.h"
#include <glib/gi18n-lib.h>

static char *dup_length (int64_t nm) { return kh_length_dup_text (nm, KH_LENGTH_UNIT_MM, FALSE); }

static void append_cannot (GString *text, const GArray *cannot)
{
  for (guint i = 0; i < cannot->len; i++)
    {
      const KhCannotCut *c = &g_array_index (cannot, KhCannotCut, i);
      g_autofree char *length = dup_length (c->length_nm), *over = dup_length (c->over_nm);
      switch (c->why)
        {
        case KH_CANNOT_TOO_LONG:
          g_string_append_printf (text,
                                  _ ("Cannot be cut: %d × %s mm, %s mm longer than any usable stock; use longer boards "
                                     "or a smaller longest panel.\n"),
                                  c->count, length, over);
          break;
        case KH_CANNOT_TOO_LITTLE_STOCK:
          g_string_append_printf (text, _ ("Cannot be cut: %d × %s mm, too little stock; allow more pieces.\n"),
                                  c->count, length);
          break;
        case KH_CANNOT_NO_STOCK:
          g_string_append_printf (text, _ ("Cannot be cut: %d × %s mm, no boards are listed; add one to the stock.\n"),
                                  c->count, length);
          break;
        }
    }
}

static gboolean has_prices (const KhSawOrder *order)
{
  for (guint i = 0; i < order->stock->len; i++)
    if (g_array_index (order->stock, KhSawStock, i).price_milli != KH_PRICE_NONE)
      return TRUE;
  return FALSE;
}

static void append_buy (GString *text, const KhSawOrder *order, const KhSawPlan *plan, const char *currency)
{
  for (guint i = 0; i < order->stock->len; i++)
    {
      const KhSawStock *stock = &g_array_index (order->stock, KhSawStock, i);
      int n = g_array_index (plan->n_bought, int, i);
      g_autofree char *length = dup_length (stock->length_nm);
      if (n > 0)
        g_string_append_printf (text, "  %d × %s mm%s%s\n", n, length, stock->name ? "  " : "",
                                stock->name ? stock->name : "");
    }
  double cost = (double)plan->cost_milli / 1000, over = (double)(plan->cost_milli - plan->bound_milli) / 1000;
  if (has_prices (order))
    g_string_append_printf (text, _ ("Cost %.2f%s%s. "), cost, *currency ? " " : "", currency);
  if (plan->proven)
    g_string_append (text, _ ("No plan costs less.\n"));
  else if (has_prices (order))
    g_string_append_printf (text, _ ("At most %.2f above the least.\n"), over);
  else
    g_string_append_printf (text, _ ("At most %.0f pieces above the fewest.\n"), over);
}

static void append_pattern (GString *text, const KhSawOrder *order, const KhPattern *pattern)
{
  g_autofree char *stock = dup_length (g_array_index (order->stock, KhSawStock, pattern->stock).length_nm);
  g_autofree char *left = dup_length (pattern->left_nm);
  g_string_append_printf (text, _ ("  %d × from %s:"), pattern->count, stock);
  for (guint i = 0; i < pattern->cuts->len; i++)
    {
      const KhSawCut *cut = &g_array_index (pattern->cuts, KhSawCut, i);
      g_autofree char *length = dup_length (cut->length_nm);
      g_string_append_printf (text, "%s %d × %s", i > 0 ? "," : "", cut->count, length);
    }
  g_string_append_printf (text, _ ("; left %s\n"), left);
}

void kh_saw_words_append (GString *text, const KhSawOrder *order, const KhSawPlan *plan, const char *currency)
{
  append_cannot (text, plan->cannot_cut);
  if (plan->cannot_cut->len > 0)
    return;
  g_autofree char *kerf = dup_length (order->kerf_nm), *trim = dup_length (order->end_trim_nm);
  g_string_append_printf (text, "%s\n", _ ("To buy:"));
  append_buy (text, order, plan, currency);
  g_string_append_printf (text, _ ("Saw plan (kerf %s mm between cuts, %s mm trimmed from each end):\n"), kerf, trim);
  for (guint i = 0; i < plan->patterns->len; i++)
    append_pattern (text, order, &g_array_index (plan->patterns, KhPattern, i));
}
