/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "../saw_texts.h"
#include "panels/saw_fit.h"
#include "panels/saw_knapsack.h"
#include "panels/saw_lp.h"

/* The parts of the saw plan by themselves: what they promise when steps run out. */

static KhSawProblem *problem_from_text (const char *text)
{
  g_autoptr (KhSawOrder) order = saw_order_from_text (text);
  g_autoptr (GArray) cannot_cut = g_array_new (FALSE, FALSE, sizeof (KhCannotCut));
  KhSawProblem *problem = kh_saw_problem_new (order, cannot_cut);
  assert_int_equal (cannot_cut->len, 0);
  return problem;
}

/* Values are widths in mm, so that the fullest strip is looked for; out of steps it must say at least that. */
static void a_knapsack_out_of_steps_says_too_much_never_too_little (void **state)
{
  g_autoptr (KhSawProblem) problem = problem_from_text ("stock 101 pieces 34x3 29x3 13x7 7x3 3x2");
  int64_t value[] = { 34, 29, 13, 7, 3 }, exact = 0;
  int most[] = { 3, 3, 7, 3, 2 }, take[5];
  KhSawFilling filling = { value, most, problem->kinds[0].capacity, G_MAXINT64, 1000000 };
  int64_t most_value = kh_saw_knapsack (problem, &filling, take, &exact);
  assert_int_equal (most_value, exact);
  assert_int_equal (exact, 101); /* 34 + 34 + 13 + 13 + 7 */
  for (int nodes = 0; nodes < 40; nodes++)
    {
      int64_t best, width = 0, sum = 0;
      filling.nodes_most = nodes;
      assert_true (kh_saw_knapsack (problem, &filling, take, &best) >= exact);
      for (int i = 0; i < 5; i++)
        {
          assert_in_range (take[i], 0, most[i]);
          width += take[i] * problem->items[i].width;
          sum += take[i] * value[i];
        }
      assert_true (width <= problem->kinds[0].capacity);
      assert_int_equal (sum, best);
      assert_true (best <= exact);
    }
}

static void a_fit_out_of_steps_proves_nothing (void **state)
{
  /* Three strips hold it, two do not (Gau 1994, data from memory); four strips of 101 hold the other. */
  static const struct
  {
    const char *order;
    int strips;
    KhSawFitResult result;
  } cases[] = { { "stock 132 pieces 44x2 33x3 12x6", 2, KH_SAW_FIT_NONE },
                { "stock 132 pieces 44x2 33x3 12x6", 3, KH_SAW_FIT_FOUND },
                { "stock 101 pieces 34x3 29x3 13x7 7x3 3x2", 4, KH_SAW_FIT_FOUND },
                { "stock 101 pieces 51x5 26x4 24x5", 5, KH_SAW_FIT_FOUND },
                { "stock 101 pieces 51x5 27x4 24x5", 5, KH_SAW_FIT_NONE } };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      g_autoptr (KhSawProblem) problem = problem_from_text (cases[i].order);
      KhSawClock clock = { G_MAXINT64, NULL, FALSE };
      int demands[5];
      for (int k = 0; k < problem->n_items; k++)
        demands[k] = problem->items[k].demand;
      for (int nodes = 0; nodes < 1000; nodes = nodes * 2 + 1)
        {
          g_autoptr (KhSawDraft) draft = kh_saw_draft_new ();
          KhSawFitTask task = { demands, &cases[i].strips, nodes, &clock };
          KhSawFitResult result = kh_saw_fit (problem, &task, draft->ways);
          if (result != cases[i].result && (result != KH_SAW_FIT_UNKNOWN || nodes > 500))
            fail_msg ("%s in %d strips, %d steps: %d", cases[i].order, cases[i].strips, nodes, (int)result);
          if (nodes == 0)
            assert_int_equal (result, KH_SAW_FIT_UNKNOWN);
          assert_int_equal (draft->ways->len > 0, result == KH_SAW_FIT_FOUND);
        }
    }
}

/* The linear programme's least number of strips: 452.25 for Chvatal's order (Linear Programming, 1983, p. 195-198),
 * 72.9167 for the paper machine of the Wikipedia article "Cutting stock problem"; by its ways and by its values. */
static void the_programme_agrees_with_published_values (void **state)
{
  static const struct
  {
    const char *order;
    double strips;
  } cases[] = { { "stock 100 pieces 45x97 36x610 31x395 14x211", 452.25 },
                { "stock 5600 pieces 1380x22 1520x25 1560x12 1710x14 1820x18 1880x18 1930x20 2000x10 2050x12 2100x14 "
                  "2140x16 2150x18 2200x20",
                  72.916667 } };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      g_autoptr (KhSawProblem) problem = problem_from_text (cases[i].order);
      g_autoptr (GPtrArray) pool = g_ptr_array_new_with_free_func (g_free);
      KhSawClock clock = { G_MAXINT64, NULL, FALSE };
      int demands[16], take[16], strips = 100000;
      double cost = 1, amounts = 0, worth = 0;
      for (int k = 0; k < problem->n_items; k++)
        demands[k] = problem->items[k].demand;
      KhSawLpTask task = { demands, &strips, &cost, &clock };
      g_autoptr (KhSawLp) lp = kh_saw_lp_new (problem, &task, pool);
      assert_true (lp->is_ended);
      assert_true (lp->missing < 1e-9);
      for (guint k = 0; k < lp->amounts->len; k++)
        amounts += g_array_index (lp->amounts, double, k);
      for (int k = 0; k < problem->n_items; k++)
        worth += (double)lp->values[k] * demands[k];
      int64_t best;
      KhSawFilling filling = { lp->values, demands, problem->kinds[0].capacity, G_MAXINT64, 1000000 };
      worth /= (double)kh_saw_knapsack (problem, &filling, take, &best);
      assert_true (ABS (amounts - cases[i].strips) < 1e-5);
      assert_true (ABS (worth - cases[i].strips) < 1e-5);
    }
}

/* Too few strips: the pieces that are missing are counted, and the values show that it cannot be. */
static void the_programme_tells_what_is_missing (void **state)
{
  g_autoptr (KhSawProblem) problem = problem_from_text ("stock 100 pieces 60x4");
  g_autoptr (GPtrArray) pool = g_ptr_array_new_with_free_func (g_free);
  KhSawClock clock = { G_MAXINT64, NULL, FALSE };
  int demands[] = { 4 }, strips = 3;
  double cost = 1;
  KhSawLpTask task = { demands, &strips, &cost, &clock };
  g_autoptr (KhSawLp) lp = kh_saw_lp_new (problem, &task, pool);
  assert_true (ABS (lp->missing - 1) < 1e-9);
  assert_true (lp->values[0] > 0);
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (a_knapsack_out_of_steps_says_too_much_never_too_little),
    cmocka_unit_test (a_fit_out_of_steps_proves_nothing),
    cmocka_unit_test (the_programme_agrees_with_published_values),
    cmocka_unit_test (the_programme_tells_what_is_missing),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
