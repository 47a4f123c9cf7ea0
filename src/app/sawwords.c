/* SPDX-License-Identifier: MIT */
#include "app/sawwords.h"
#include "app/settings.h"
#include <glib/gi18n-lib.h>

static gboolean has_prices (const KhSawOrder *order)
{
  for (guint i = 0; i < order->stock->len; i++)
    if (g_array_index (order->stock, KhSawStock, i).price_milli != KH_PRICE_NONE)
      return TRUE;
  return FALSE;
}

static char *dup_money (int64_t milli, const char *currency)
{
  return g_strdup_printf ("%.2f%s%s", (double)milli / 1000, *currency ? " " : "", currency);
}

char *kh_saw_words_dup_sum (const KhReview *review, const KhPlan *plan)
{
  const KhSawPlan *saw = review->saw_plan;
  GString *text = g_string_new (NULL);
  if (!saw || saw->cannot_cut->len > 0)
    return g_string_free (text, FALSE);
  gboolean priced = has_prices (review->saw_order);
  g_autofree char *cost = dup_money (saw->cost_milli, plan->build.currency);
  g_autofree char *over = dup_money (saw->cost_milli - saw->bound_milli, plan->build.currency);
  int n_over = (int)((saw->cost_milli - saw->bound_milli) / 1000); /* without prices each board costs 1 */
  g_string_append_printf (text, ngettext ("%d board", "%d boards", (gulong)saw->n_pieces_of_stock),
                          saw->n_pieces_of_stock);
  if (priced)
    g_string_append_printf (text, _ (", %s in all"), cost);
  g_string_append (text, ". ");
  if (saw->proven)
    g_string_append (text, _ ("No plan costs less."));
  else if (priced)
    g_string_append_printf (text, _ ("At most %s above the least."), over);
  else
    g_string_append_printf (
        text, ngettext ("At most %d board above the fewest.", "At most %d boards above the fewest.", (gulong)n_over),
        n_over);
  return g_string_free (text, FALSE);
}

char *kh_saw_words_dup_buy (const KhReview *review, const KhPlan *plan)
{
  GString *text = g_string_new (NULL);
  const KhSawPlan *saw = review->saw_plan;
  for (guint i = 0; saw && i < saw->n_bought->len; i++)
    {
      const KhSawStock *stock = &g_array_index (review->saw_order->stock, KhSawStock, i);
      int n = g_array_index (saw->n_bought, int, i);
      g_autofree char *length = kh_length_dup_text (stock->length_nm, kh_settings_get_unit (), TRUE);
      if (n > 0)
        g_string_append_printf (text, "%s%d × %s  %s", text->len > 0 ? "\n" : "", n, length,
                                stock->name ? stock->name : "");
    }
  return g_string_free (text, FALSE);
}

char *kh_saw_words_dup_cannot (const KhReview *review)
{
  GString *text = g_string_new (NULL);
  if (review->panels_fault)
    g_string_append (text, review->panels_fault);
  for (guint i = 0; review->saw_plan && i < review->saw_plan->cannot_cut->len; i++)
    {
      const KhCannotCut *c = &g_array_index (review->saw_plan->cannot_cut, KhCannotCut, i);
      g_autofree char *length = kh_length_dup_text (c->length_nm, kh_settings_get_unit (), TRUE);
      g_autofree char *over = kh_length_dup_text (c->over_nm, kh_settings_get_unit (), TRUE);
      g_string_append (text, text->len > 0 ? "\n" : "");
      if (c->why == KH_CANNOT_TOO_LONG)
        g_string_append_printf (text, _ ("%d × %s cannot be cut: %s longer than any board gives."), c->count, length,
                                over);
      else if (c->why == KH_CANNOT_TOO_LITTLE_STOCK)
        g_string_append_printf (text, _ ("%d × %s cannot be cut: too few boards to hand."), c->count, length);
      else
        g_string_append_printf (text, _ ("%d × %s cannot be cut: no board suits these walls."), c->count, length);
    }
  if (text->len == 0)
    {
      g_string_free (text, TRUE);
      return NULL;
    }
  return g_string_free (text, FALSE);
}
