/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/units.h"
#include "panels/saw.h"
#include <stdio.h>
#include <stdlib.h>

/* An order in one line, lengths in whole millimetres:
 *   "kerf 3 trim 5 keep 150 stock 2440@10x7/4 stock 3000 pieces 528x40 348x12"
 * stock: length, @ price in thousandths, x count, / strips of one bought piece. */
static inline KhSawOrder *saw_order_from_text (const char *text)
{
  KhSawOrder *order = kh_saw_order_new ();
  order->kerf_nm = 0;
  g_auto (GStrv) words = g_strsplit (text, " ", -1);
  const char *member = "";
  for (int i = 0; words[i]; i++)
    {
      if (g_ascii_isalpha (*words[i]))
        {
          member = words[i];
          continue;
        }
      char *end;
      int64_t nm = strtoll (words[i], &end, 10) * KH_NM_PER_MM;
      KhSawStock stock = { .length_nm = nm, .price_milli = KH_PRICE_NONE, .count = KH_COUNT_ANY, .n_strips = 1 };
      KhSawPiece piece = { nm, 1 };
      while (*end)
        {
          char mark = *end;
          long n = strtol (end + 1, &end, 10);
          if (mark == '@')
            stock.price_milli = n;
          else if (mark == 'x')
            stock.count = piece.count = (int)n;
          else if (mark == '/')
            stock.n_strips = (int)n;
          else
            g_error ("cannot read %s", words[i]);
        }
      if (g_str_equal (member, "kerf"))
        order->kerf_nm = nm;
      else if (g_str_equal (member, "trim"))
        order->end_trim_nm = nm;
      else if (g_str_equal (member, "keep"))
        order->keep_offcut_nm = nm;
      else if (g_str_equal (member, "stock"))
        g_array_append_val (order->stock, stock);
      else
        g_array_append_val (order->pieces, piece);
    }
  return order;
}

/* The plan, once order and plan have been judged. */
static inline KhSawPlan *saw_plan_judged (const KhSawOrder *order, double seconds)
{
  g_autoptr (GError) error = NULL;
  if (!kh_saw_order_check (order, &error))
    g_error ("order: %s", error->message);
  KhSawSettings settings = { seconds };
  KhSawPlan *plan = kh_saw_plan_new (order, &settings, NULL);
  if (!kh_saw_check (order, plan, &error))
    g_error ("plan: %s", error->message);
  return plan;
}
