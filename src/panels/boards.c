/* SPDX-License-Identifier: MIT */
#include "base/units.h"
#include "panels/cutlist.h"
#include <glib/gi18n-lib.h>

/* From the boards of a plan to stock for the saw: strips as they are, sheets
 * ripped into strips of the walls' height. */

/* Strips of the wanted width across a sheet: all four edges are trimmed, and
 * each strip but the last costs a kerf. */
static int64_t count_strips (const KhPlan *plan, int64_t across_nm)
{
  const KhSaw *saw = &plan->build.saw;
  int64_t usable = across_nm - 2 * saw->end_trim_nm;
  return usable < plan->walls.height_nm ? 0 : (usable + saw->kerf_nm) / (plan->walls.height_nm + saw->kerf_nm);
}

static gboolean has_other_thickness (const KhStock *board, const KhPlan *plan)
{
  return board->thickness_nm > 0 && board->thickness_nm != plan->walls.thickness_nm;
}

static void append_stock (KhSawOrder *order, const KhStock *board, int64_t length_nm, int64_t n_strips)
{
  KhSawStock stock = { .name = g_strdup (board->name),
                       .length_nm = length_nm,
                       .price_milli = board->price_milli,
                       .count = n_strips > 0 ? board->count : 0,
                       .n_strips = (int)CLAMP (n_strips, 1, 10000) };
  g_array_append_val (order->stock, stock);
}

static gboolean is_turned_too (const KhStock *board)
{
  return board->form == KH_STOCK_SHEET && board->grain == KH_GRAIN_ANY && board->width_nm != board->length_nm;
}

/* Strips along the other edge of sheets whose grain does not matter: one more
 * stock behind those of the plan, bought out of the same count. */
static void append_turned (KhSawOrder *order, const KhPlan *plan)
{
  for (guint i = 0; i < plan->build.stock->len; i++)
    {
      const KhStock *board = &g_array_index (plan->build.stock, KhStock, i);
      int64_t n_strips = is_turned_too (board) ? count_strips (plan, board->length_nm) : 0;
      if (n_strips == 0 || has_other_thickness (board, plan))
        continue;
      append_stock (order, board, board->width_nm, n_strips);
      if (count_strips (plan, board->width_nm) == 0)
        continue; /* only this way round: the count is its own */
      int pool = (int)i + 1;
      g_array_index (order->stock, KhSawStock, i).pool = pool;
      g_array_index (order->stock, KhSawStock, order->stock->len - 1).pool = pool;
    }
}

KhSawOrder *kh_cut_list_dup_order (const KhCutList *list, const KhPlan *plan)
{
  KhSawOrder *order = kh_saw_order_new ();
  order->kerf_nm = plan->build.saw.kerf_nm;
  order->end_trim_nm = plan->build.saw.end_trim_nm;
  order->keep_offcut_nm = plan->build.saw.keep_offcut_nm;
  for (guint i = 0; i < plan->build.stock->len; i++)
    {
      const KhStock *board = &g_array_index (plan->build.stock, KhStock, i);
      int64_t n_strips = board->form == KH_STOCK_STRIP ? 1 : count_strips (plan, board->width_nm);
      append_stock (order, board, board->length_nm, has_other_thickness (board, plan) ? 0 : n_strips);
    }
  append_turned (order, plan);
  for (guint i = 0; i < list->rows->len; i++)
    {
      const KhCutRow *row = &g_array_index (list->rows, KhCutRow, i);
      KhSawPiece piece = { row->length_nm, row->count };
      g_array_append_val (order->pieces, piece);
    }
  return order;
}

static gboolean some_have_a_price (const KhPlan *plan)
{
  for (guint i = 0; i < plan->build.stock->len; i++)
    if (g_array_index (plan->build.stock, KhStock, i).price_milli != KH_PRICE_NONE)
      return TRUE;
  return FALSE;
}

static char *dup_note (const KhPlan *plan, guint i)
{
  const KhStock *board = &g_array_index (plan->build.stock, KhStock, i);
  g_autofree char *name = board->name && *board->name ? g_strdup (board->name) : g_strdup_printf ("%u", i + 1);
  if (has_other_thickness (board, plan))
    {
      g_autofree char *has = kh_length_dup_text (board->thickness_nm, KH_LENGTH_UNIT_MM, TRUE);
      g_autofree char *wanted = kh_length_dup_text (plan->walls.thickness_nm, KH_LENGTH_UNIT_MM, TRUE);
      /* TRANSLATORS: name of a board, its thickness, the walls' thickness */
      return g_strdup_printf (_ ("Board %s is not used: it is %s thick and the walls are %s."), name, has, wanted);
    }
  if (board->form == KH_STOCK_SHEET && count_strips (plan, board->width_nm) == 0
      && !(is_turned_too (board) && count_strips (plan, board->length_nm) > 0))
    {
      g_autofree char *height = kh_length_dup_text (plan->walls.height_nm, KH_LENGTH_UNIT_MM, TRUE);
      /* TRANSLATORS: name of a sheet, the walls' height */
      return g_strdup_printf (_ ("Sheet %s is not used: no strip of %s comes out of its width once it is trimmed."),
                              name, height);
    }
  if (board->price_milli == KH_PRICE_NONE && some_have_a_price (plan))
    /* TRANSLATORS: name of a board */
    return g_strdup_printf (_ ("Board %s has no price where others have one: it is counted as costing nothing."), name);
  return NULL;
}

GPtrArray *kh_cut_list_dup_board_notes (const KhPlan *plan)
{
  GPtrArray *notes = g_ptr_array_new_with_free_func (g_free);
  for (guint i = 0; i < plan->build.stock->len; i++)
    {
      char *note = dup_note (plan, i);
      if (note)
        g_ptr_array_add (notes, note);
    }
  return notes;
}
