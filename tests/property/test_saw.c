/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "../saw_texts.h"
#include "base/random.h"

/* Random orders: every plan passes the judge, the same order gives the same
 * plan, and a plan that is changed in any one thing is refused. */

/* Whole millimetres, one to four stocks, prices, counts and strips now and then. */
static KhSawOrder *draw_order (uint64_t seed)
{
  KhRandomKey key = { seed, 7 };
  KhSawOrder *order = kh_saw_order_new ();
  order->kerf_nm = kh_random_below (key, 0, 0, 5) * KH_NM_PER_MM;
  order->end_trim_nm = kh_random_below (key, 0, 1, 3) * 5 * KH_NM_PER_MM;
  gboolean priced = kh_random_below (key, 0, 2, 2) == 1;
  uint32_t n_stock = 1 + kh_random_below (key, 0, 3, 4), n_pieces = 1 + kh_random_below (key, 0, 4, 12);
  for (uint32_t i = 0; i < n_stock; i++)
    {
      KhSawStock stock
          = { .length_nm = (600 + kh_random_below (key, 1, i, 2400)) * KH_NM_PER_MM,
              .price_milli = KH_PRICE_NONE,
              .count = KH_COUNT_ANY,
              .n_strips = kh_random_below (key, 2, i, 3) == 0 ? 1 + (int)kh_random_below (key, 3, i, 6) : 1 };
      if (priced)
        stock.price_milli = (stock.length_nm / KH_NM_PER_MM + kh_random_below (key, 4, i, 900)) * 3 * stock.n_strips;
      if (kh_random_below (key, 5, i, 4) == 0)
        stock.count = (int)kh_random_below (key, 6, i, 20);
      g_array_append_val (order->stock, stock);
    }
  for (uint32_t i = 0; i < n_pieces; i++)
    {
      KhSawPiece piece
          = { (60 + kh_random_below (key, 7, i, 1100)) * KH_NM_PER_MM, (int)kh_random_below (key, 8, i, 25) };
      g_array_append_val (order->pieces, piece);
    }
  return order;
}

static gboolean is_same (const KhSawPlan *a, const KhSawPlan *b)
{
  if (a->patterns->len != b->patterns->len || a->cost_milli != b->cost_milli || a->bound_milli != b->bound_milli)
    return FALSE;
  for (guint i = 0; i < a->patterns->len; i++)
    {
      const KhPattern *x = &g_array_index (a->patterns, KhPattern, i), *y = &g_array_index (b->patterns, KhPattern, i);
      if (x->stock != y->stock || x->count != y->count || x->left_nm != y->left_nm || x->cuts->len != y->cuts->len)
        return FALSE;
      for (guint k = 0; k < x->cuts->len; k++)
        if (g_array_index (x->cuts, KhSawCut, k).length_nm != g_array_index (y->cuts, KhSawCut, k).length_nm
            || g_array_index (x->cuts, KhSawCut, k).count != g_array_index (y->cuts, KhSawCut, k).count)
          return FALSE;
    }
  return TRUE;
}

#define N_ORDERS 150

static void plans_pass_the_judge_and_come_out_alike (void **state)
{
  int n_proven = 0, n_planned = 0;
  for (uint64_t seed = 0; seed < N_ORDERS; seed++)
    {
      g_autoptr (KhSawOrder) order = draw_order (seed);
      gint64 before = g_get_monotonic_time ();
      g_autoptr (KhSawPlan) plan = saw_plan_judged (order, 5);
      gboolean was_quick = g_get_monotonic_time () - before < 1000000;
      if (plan->cannot_cut->len > 0)
        continue;
      n_planned++;
      n_proven += plan->proven;
      if (!was_quick)
        continue; /* ended by its time, perhaps */
      g_autoptr (KhSawPlan) again = saw_plan_judged (order, 5);
      assert_true (is_same (plan, again));
    }
  print_message ("%d of %d orders could be cut, %d plans proven\n", n_planned, N_ORDERS, n_proven);
  assert_true (n_planned > N_ORDERS / 3);
}

typedef void (*Change) (KhSawPlan *plan);

static KhPattern *first_pattern (KhSawPlan *plan) { return &g_array_index (plan->patterns, KhPattern, 0); }

static KhSawCut *first_cut (KhSawPlan *plan) { return &g_array_index (first_pattern (plan)->cuts, KhSawCut, 0); }

static void cut_once_more (KhSawPlan *plan) { first_pattern (plan)->count++; }

static void cut_longer (KhSawPlan *plan) { first_cut (plan)->length_nm++; }

static void cut_one_more (KhSawPlan *plan) { first_cut (plan)->count++; }

static void cut_none (KhSawPlan *plan) { first_cut (plan)->count = 0; }

static void leave_more (KhSawPlan *plan) { first_pattern (plan)->left_nm++; }

static void take_other_stock (KhSawPlan *plan) { first_pattern (plan)->stock = 99; }

static void forget_a_pattern (KhSawPlan *plan) { g_array_remove_index (plan->patterns, 0); }

static void cost_less (KhSawPlan *plan) { plan->cost_milli--; }

static void claim_too_much (KhSawPlan *plan) { plan->bound_milli = plan->cost_milli + 1; }

static void claim_without_bound (KhSawPlan *plan) { plan->proven = !plan->proven; }

static void use_less (KhSawPlan *plan) { plan->used_nm--; }

static void buy_fewer (KhSawPlan *plan) { g_array_index (plan->n_bought, int, first_pattern (plan)->stock)--; }

static void buy_more (KhSawPlan *plan) { g_array_index (plan->n_bought, int, first_pattern (plan)->stock)++; }

static void count_other (KhSawPlan *plan) { plan->n_pieces_of_stock++; }

static void add_offcut (KhSawPlan *plan)
{
  int64_t offcut = 1;
  g_array_append_val (plan->offcuts_nm, offcut);
}

static void a_changed_plan_is_refused (void **state)
{
  static const Change changes[]
      = { cut_once_more,    cut_longer,       cut_one_more, cut_none,       leave_more,
          take_other_stock, forget_a_pattern, cost_less,    claim_too_much, claim_without_bound,
          use_less,         buy_fewer,        buy_more,     count_other,    add_offcut };
  int n = 0;
  for (uint64_t seed = 0; seed < 40; seed++)
    for (gsize i = 0; i < G_N_ELEMENTS (changes); i++)
      {
        g_autoptr (KhSawOrder) order = draw_order (seed);
        g_autoptr (KhSawPlan) plan = saw_plan_judged (order, 0.02);
        if (plan->patterns->len == 0)
          continue;
        g_autoptr (GError) error = NULL;
        changes[i](plan);
        if (kh_saw_check (order, plan, &error))
          fail_msg ("seed %d: change %d was not noticed", (int)seed, (int)i);
        assert_true (g_error_matches (error, KH_SAW_ERROR, KH_SAW_ERROR_CHECK));
        n++;
      }
  assert_true (n > 100);
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (plans_pass_the_judge_and_come_out_alike),
    cmocka_unit_test (a_changed_plan_is_refused),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
