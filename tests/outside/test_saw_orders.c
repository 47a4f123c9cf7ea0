/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "../saw_texts.h"

/* Published orders: their optimum, reached, proven, and never said to be less. */
static const struct
{
  const char *source, *order;
  int64_t cost;
} published[] = {
  { "Chvatal, Linear Programming, 1983, p. 195-198; solved again with two MIP solvers",
    "stock 100 pieces 45x97 36x610 31x395 14x211", 453000 },
  { "the paper-machine example of the Wikipedia article 'Cutting stock problem'; solved again",
    "stock 5600 pieces 1380x22 1520x25 1560x12 1710x14 1820x18 1880x18 1930x20 2000x10 2050x12 2100x14 2140x16 2150x18 "
    "2200x20",
    73000 },
  { "Winston, Operations Research (data from a lecture note); solved again", "stock 17 pieces 3x25 5x20 9x15", 19000 },
  { "tight case for 11/9 OPT + 6/9 of first fit decreasing: Dosa, ESCAPE 2007",
    "stock 400 pieces 204x6 108x6 104x6 92x12", 9000 },
  { "Gau 1994, cited by Ripatti, Kartak 2020 (data from memory); the linear programme rounds up to 2; solved again",
    "stock 132 pieces 44x2 33x3 12x6", 3000 },
  { "Gilmore, Gomory 1961 (attribution from memory); solved again", "stock 5@6000 6@7000 9@10000 pieces 2x20 3x10 4x20",
    170000 },
  { "course note, solved again: stock to hand, cheapest by its length",
    "stock 15@15000x3 10@10000x3 pieces 7x3 6x2 4x6 3x1", 60000 },
};

static void published_orders_come_out_and_are_proven (void **state)
{
  for (gsize i = 0; i < G_N_ELEMENTS (published); i++)
    {
      g_autoptr (KhSawOrder) order = saw_order_from_text (published[i].order);
      gint64 before = g_get_monotonic_time ();
      g_autoptr (KhSawPlan) plan = saw_plan_judged (order, 5);
      print_message ("cost %g, bound %g, %s, %.1f ms: %s\n", (double)plan->cost_milli / 1000,
                     (double)plan->bound_milli / 1000, plan->proven ? "proven" : "not proven",
                     (double)(g_get_monotonic_time () - before) / 1000, published[i].source);
      assert_int_equal (plan->cannot_cut->len, 0);
      assert_true (plan->cost_milli >= published[i].cost);
      assert_true (plan->bound_milli <= published[i].cost);
      assert_true (plan->proven);
    }
}

int main (void)
{
  const struct CMUnitTest tests[] = { cmocka_unit_test (published_orders_come_out_and_are_proven) };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
