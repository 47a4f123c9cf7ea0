/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "../saw_texts.h"

/* p pieces fit exactly when their lengths and p - 1 kerfs do: kerf 3 mm, and 0 (computed). */
static void kerf_decides_how_many_fit (void **state)
{
  static const struct
  {
    int stock, piece, with_kerf, without;
  } cases[]
      = { { 2440, 610, 3, 4 }, { 2440, 1220, 1, 2 }, { 2440, 487, 4, 5 }, { 1220, 150, 7, 8 }, { 2440, 168, 14, 14 } };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    for (int with = 0; with < 2; with++)
      for (int more = 0; more < 2; more++)
        {
          int n = (with ? cases[i].with_kerf : cases[i].without) + more;
          g_autofree char *text
              = g_strdup_printf ("kerf %d stock %d pieces %dx%d", with ? 3 : 0, cases[i].stock, cases[i].piece, n);
          g_autoptr (KhSawOrder) order = saw_order_from_text (text);
          g_autoptr (KhSawPlan) plan = saw_plan_judged (order, 1);
          assert_int_equal (plan->n_pieces_of_stock, 1 + more);
          assert_true (plan->proven);
        }
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (kerf_decides_how_many_fit),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
