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

/* What stands in the order, and what must be named. */
static void a_faulty_order_is_refused_by_its_member (void **state)
{
  static const struct
  {
    const char *order, *member;
  } cases[] = {
    { "kerf -1 stock 100 pieces 10x1", "kerf_mm" },
    { "trim -2 stock 100 pieces 10x1", "end_trim_mm" },
    { "keep -2 stock 100 pieces 10x1", "keep_offcut_mm" },
    { "stock 100 stock 0 pieces 10x1", "stock[1].length_mm" },
    { "stock 2000000 pieces 10x1", "stock[0].length_mm" },
    { "stock 100x-2 pieces 10x1", "stock[0].count" },
    { "stock 100/0 pieces 10x1", "stock[0].strips" },
    { "stock 100@-5 pieces 10x1", "stock[0].price" },
    { "stock 100@5 stock 90 pieces 10x1", "stock[1].price" },
    { "stock 100 stock 90@5 pieces 10x1", "stock[1].price" },
    { "stock 100 pieces 10x1 0x1", "pieces[1].length_mm" },
    { "stock 100 pieces 10x-1", "pieces[0].count" },
    { "stock 100 pieces 10x900000 20x100001", "pieces[1].count" },
  };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      g_autoptr (KhSawOrder) order = saw_order_from_text (cases[i].order);
      g_autoptr (GError) error = NULL;
      if (kh_saw_order_check (order, &error))
        fail_msg ("%s was taken", cases[i].order);
      assert_true (g_error_matches (error, KH_SAW_ERROR, KH_SAW_ERROR_ORDER));
      if (!g_str_has_prefix (error->message, cases[i].member))
        fail_msg ("%s: %s", cases[i].order, error->message);
    }
}

static void what_cannot_be_cut_is_said (void **state)
{
  static const struct
  {
    const char *order;
    KhCannotWhy why;
    int length_mm, count, over_mm;
  } cases[] = {
    { "stock 2440 pieces 2441x2 500x3", KH_CANNOT_TOO_LONG, 2441, 2, 1 },
    { "trim 5 stock 2440 pieces 2431x2 500x3", KH_CANNOT_TOO_LONG, 2431, 2, 1 },
    { "stock 2440x0 stock 1200 pieces 1300x1", KH_CANNOT_TOO_LONG, 1300, 1, 100 },
    { "stock 2440x0 pieces 500x3", KH_CANNOT_TOO_LITTLE_STOCK, 500, 3, 0 },
    { "pieces 500x3", KH_CANNOT_NO_STOCK, 500, 3, 0 },
    { "trim 50 stock 100 pieces 5x3", KH_CANNOT_TOO_LONG, 5, 3, 5 },
    { "kerf 3 stock 2440x2 pieces 1219x3 1216x1 600x1", KH_CANNOT_TOO_LITTLE_STOCK, 1219, 1, 0 },
    { "kerf 3 stock 2440x1 pieces 1220x2", KH_CANNOT_TOO_LITTLE_STOCK, 1220, 1, 0 },
    { "kerf 3 stock 2440x1/2 pieces 1220x3", KH_CANNOT_TOO_LITTLE_STOCK, 1220, 1, 0 },
  };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      g_autoptr (KhSawOrder) order = saw_order_from_text (cases[i].order);
      g_autoptr (KhSawPlan) plan = saw_plan_judged (order, 1);
      print_message ("%s\n", cases[i].order);
      assert_int_equal (plan->patterns->len, 0);
      assert_int_equal (plan->cannot_cut->len, 1);
      const KhCannotCut *cannot = &g_array_index (plan->cannot_cut, KhCannotCut, 0);
      assert_int_equal (cannot->why, cases[i].why);
      assert_int_equal (cannot->length_nm, cases[i].length_mm * KH_NM_PER_MM);
      assert_int_equal (cannot->count, cases[i].count);
      assert_int_equal (cannot->over_nm, cases[i].over_mm * KH_NM_PER_MM);
      assert_false (plan->ended_by_limit);
    }
}

static void too_long_and_too_little_are_both_said (void **state)
{
  g_autoptr (KhSawOrder) order = saw_order_from_text ("stock 1000x2 pieces 1001x1 900x1 800x2 100x1");
  g_autoptr (KhSawPlan) plan = saw_plan_judged (order, 1);
  assert_int_equal (plan->cannot_cut->len, 2);
  assert_int_equal (g_array_index (plan->cannot_cut, KhCannotCut, 0).why, KH_CANNOT_TOO_LONG);
  assert_int_equal (g_array_index (plan->cannot_cut, KhCannotCut, 1).length_nm, 900 * KH_NM_PER_MM);
  assert_int_equal (g_array_index (plan->cannot_cut, KhCannotCut, 1).count, 1);
}

/* 2 440 less 5 at both ends is 2 430: 2 x 900, 360, 192 and three kerfs of 3 leave 69; 2 250 leaves 180, and cutting
 * that off takes 3 of it.  2 250 and 192 do not go together. */
static void patterns_go_long_first_and_offcuts_are_named (void **state)
{
  g_autoptr (KhSawOrder) order
      = saw_order_from_text ("kerf 3 trim 5 keep 150 stock 2440 pieces 360x1 900x2 192x1 2250x1");
  g_autoptr (KhSawPlan) plan = saw_plan_judged (order, 1);
  assert_int_equal (plan->patterns->len, 2);
  const KhPattern *first = &g_array_index (plan->patterns, KhPattern, 0);
  const KhPattern *second = &g_array_index (plan->patterns, KhPattern, 1);
  assert_int_equal (g_array_index (first->cuts, KhSawCut, 0).length_nm, 2250 * KH_NM_PER_MM);
  assert_int_equal (g_array_index (second->cuts, KhSawCut, 0).length_nm, 900 * KH_NM_PER_MM);
  assert_int_equal (g_array_index (second->cuts, KhSawCut, 0).count, 2);
  assert_int_equal (plan->used_nm, 4602 * KH_NM_PER_MM);
  assert_int_equal (first->left_nm, 180 * KH_NM_PER_MM);
  assert_int_equal (second->left_nm, 69 * KH_NM_PER_MM);
  assert_int_equal (plan->offcuts_nm->len, 1);
  assert_int_equal (g_array_index (plan->offcuts_nm, int64_t, 0), 177 * KH_NM_PER_MM);
}

static void sheets_are_bought_whole (void **state)
{
  /* Four strips a sheet: five full strips are two sheets, and three strips are left over whole. */
  g_autoptr (KhSawOrder) order = saw_order_from_text ("keep 150 stock 1000@8000/4 pieces 1000x5");
  g_autoptr (KhSawPlan) plan = saw_plan_judged (order, 1);
  assert_int_equal (plan->n_pieces_of_stock, 2);
  assert_int_equal (plan->cost_milli, 16000);
  assert_true (plan->proven);
  assert_int_equal (plan->offcuts_nm->len, 3);
}

static void a_sheet_ripped_either_way_has_one_count (void **state)
{
  /* Two sheets of 1000 x 500 in all, each three strips of 1000 or six of 500.  Four of 1000 take both one way round,
   * and the two strips left over hold four of 500, not five. */
  static const struct
  {
    const char *order;
    int n_bought;
  } cases[] = { { "stock 1000x2/3 stock 500x2/6 pieces 1000x3 500x6", 2 },
                { "stock 1000x2/3 stock 500x2/6 pieces 1000x4 500x4", 2 },
                { "stock 1000x2/3 stock 500x2/6 pieces 1000x4 500x5", 0 } };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      g_autoptr (KhSawOrder) order = saw_order_from_text (cases[i].order);
      g_array_index (order->stock, KhSawStock, 0).pool = g_array_index (order->stock, KhSawStock, 1).pool = 1;
      g_autoptr (KhSawPlan) plan = saw_plan_judged (order, 1);
      print_message ("%s\n", cases[i].order);
      assert_int_equal (plan->n_pieces_of_stock, cases[i].n_bought);
      assert_int_equal (plan->cannot_cut->len, cases[i].n_bought == 0);
    }
}

static void a_stopped_search_gives_what_it_has (void **state)
{
  g_autoptr (KhSawOrder) order = saw_order_from_text ("stock 2440 pieces 800x97 531x88 623x91 377x83 1207x19");
  KhJob job;
  kh_job_init (&job);
  kh_job_stop (&job);
  KhSawSettings settings;
  kh_saw_settings_init (&settings);
  g_autoptr (KhSawPlan) plan = kh_saw_plan_new (order, &settings, &job);
  g_autoptr (GError) error = NULL;
  assert_true (kh_saw_check (order, plan, &error));
  assert_true (plan->proven || plan->ended_by_limit);
  assert_true (plan->patterns->len > 0);
}

/* Lengths of 1/64 inch are whole nanometres: 64 pieces of 1 1/64 in and no kerf need exactly 65 in. */
static void sixty_fourths_of_an_inch_are_exact (void **state)
{
  for (int less = 0; less < 2; less++)
    {
      g_autoptr (KhSawOrder) order = saw_order_from_text ("stock 1 pieces 1x64");
      g_array_index (order->stock, KhSawStock, 0).length_nm = 65 * KH_NM_PER_INCH - less;
      g_array_index (order->pieces, KhSawPiece, 0).length_nm = KH_NM_PER_INCH * 65 / 64;
      g_autoptr (KhSawPlan) plan = saw_plan_judged (order, 1);
      assert_int_equal (plan->n_pieces_of_stock, 1 + less);
    }
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (kerf_decides_how_many_fit),
    cmocka_unit_test (a_faulty_order_is_refused_by_its_member),
    cmocka_unit_test (what_cannot_be_cut_is_said),
    cmocka_unit_test (too_long_and_too_little_are_both_said),
    cmocka_unit_test (patterns_go_long_first_and_offcuts_are_named),
    cmocka_unit_test (sheets_are_bought_whole),
    cmocka_unit_test (a_sheet_ripped_either_way_has_one_count),
    cmocka_unit_test (a_stopped_search_gives_what_it_has),
    cmocka_unit_test (sixty_fourths_of_an_inch_are_exact),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
