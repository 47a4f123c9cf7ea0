/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "../saw_texts.h"
#include "base/random.h"
#include "mazes.h"
#include "panels/cutlist.h"

/* Shares, not times: a busy machine must not fail it.  Bars of the project: orders of real mazes all proven; random
 * hard orders nine in ten proven, the rest within 1 %. */

static void add_boards (KhPlan *plan)
{
  KhStock strip = { .name = g_strdup ("short strip"),
                    .form = KH_STOCK_STRIP,
                    .length_nm = 1800 * KH_NM_PER_MM,
                    .thickness_nm = KH_LENGTH_OPEN_NM,
                    .count = KH_COUNT_ANY,
                    .price_milli = 4990 };
  KhStock sheet = { .name = g_strdup ("sheet"),
                    .form = KH_STOCK_SHEET,
                    .length_nm = 2440 * KH_NM_PER_MM,
                    .width_nm = 1220 * KH_NM_PER_MM,
                    .thickness_nm = KH_LENGTH_OPEN_NM,
                    .grain = KH_GRAIN_ANY,
                    .count = KH_COUNT_ANY,
                    .price_milli = 39900 };
  g_array_index (plan->build.stock, KhStock, 0).price_milli = 6400;
  g_array_append_val (plan->build.stock, strip);
  g_array_append_val (plan->build.stock, sheet);
}

static void orders_of_real_mazes_are_all_proven (void **state)
{
  for (int several = 0; several < 2; several++)
    {
      gint64 cut_us = 0, saw_us = 0;
      for (uint64_t seed = 0; seed < 30; seed++)
        {
          g_autoptr (KhPlan) plan = kh_test_maze_new (16, 16, 180, 12, seed);
          if (several)
            add_boards (plan);
          gint64 start = g_get_monotonic_time ();
          g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
          cut_us += g_get_monotonic_time () - start;
          g_autoptr (KhSawOrder) order = kh_cut_list_dup_order (list, plan);
          start = g_get_monotonic_time ();
          g_autoptr (KhSawPlan) saw_plan = saw_plan_judged (order, 30);
          saw_us += g_get_monotonic_time () - start;
          if (!saw_plan->proven)
            fail_msg ("maze %d, %s: not proven", (int)seed, several ? "several stocks" : "one stock");
        }
      print_message ("16 x 16, %s: cut list %.2f ms, saw plan %.1f ms on average\n",
                     several ? "several stocks" : "one stock", (double)cut_us / 30000, (double)saw_us / 30000);
    }
}

/* 10 to 40 lengths, 100 to 2 000 pieces or so, 1 to 4 stocks. */
static KhSawOrder *draw_hard_order (uint64_t seed)
{
  static const int lengths_mm[] = { 2440, 3000, 1800, 1200 };
  KhRandomKey key = { seed, 77 };
  KhSawOrder *order = kh_saw_order_new ();
  uint32_t n_stock = 1 + seed % 4, n_lengths = 10 + kh_random_below (key, 0, 0, 31);
  uint32_t n_pieces = 100 + kh_random_below (key, 0, 1, 1900);
  for (uint32_t i = 0; i < n_stock; i++)
    {
      int64_t price = (lengths_mm[i] * 3 + kh_random_below (key, 1, i, 900)) / 10 * 10;
      KhSawStock stock = { .length_nm = lengths_mm[i] * KH_NM_PER_MM,
                           .price_milli = n_stock == 1 ? KH_PRICE_NONE : price,
                           .count = KH_COUNT_ANY,
                           .n_strips = 1 };
      g_array_append_val (order->stock, stock);
    }
  for (uint32_t i = 0; i < n_lengths; i++)
    {
      KhSawPiece piece = { (100 + kh_random_below (key, 2, i, 1000)) * KH_NM_PER_MM,
                           1 + (int)kh_random_below (key, 3, i, 2 * n_pieces / n_lengths) };
      g_array_append_val (order->pieces, piece);
    }
  return order;
}

#define N_HARD 40

static void nine_in_ten_hard_orders_are_proven (void **state)
{
  int n_proven = 0;
  for (uint64_t seed = 0; seed < N_HARD; seed++)
    {
      g_autoptr (KhSawOrder) order = draw_hard_order (seed);
      g_autoptr (KhSawPlan) plan = saw_plan_judged (order, 30);
      n_proven += plan->proven;
      if ((plan->cost_milli - plan->bound_milli) * 100 > plan->bound_milli)
        fail_msg ("order %d: cost %d, bound %d", (int)seed, (int)plan->cost_milli, (int)plan->bound_milli);
    }
  print_message ("%d of %d hard orders proven\n", n_proven, N_HARD);
  assert_true (n_proven * 10 >= N_HARD * 9);
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (orders_of_real_mazes_are_all_proven),
    cmocka_unit_test (nine_in_ten_hard_orders_are_proven),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
