/* SPDX-License-Identifier: MIT */
/* The drawn examples: as our writer writes them, with notes, and doing what their notes say. */
#include "../cmocka_all.h"
#include "files/examples.h"
#include "files/planfile.h"
#include "review/review.h"
#include <string.h>

static char *folder;

static void each_is_as_it_would_be_written (void **state)
{
  g_auto (GStrv) names = kh_example_dup_names ();
  assert_true (g_strv_length (names) >= 4);
  for (int i = 0; names[i]; i++)
    {
      g_autoptr (GPtrArray) faults = NULL;
      g_autofree char *path = g_strdup_printf ("%s/%s.mazeplan", folder, names[i]), *bytes = NULL;
      g_autofree char *carried = kh_example_dup_text (names[i]);
      assert_true (g_file_get_contents (path, &bytes, NULL, NULL));
      assert_string_equal (bytes, carried);
      g_autoptr (KhPlan) plan = kh_plan_file_load (path, &faults);
      assert_non_null (plan);
      g_autofree char *written = kh_plan_file_dup_text (plan);
      assert_string_equal (bytes, written);
      assert_true (strlen (plan->notes) > 60 && strlen (plan->title) > 5);
    }
}

static void what_they_are_for_is_true (void **state)
{
  static const struct { const char *name; int columns, rows; gboolean simple, arrives; } wanted[] = {
    { "first-maze", 6, 4, TRUE, TRUE }, { "classic-16", 16, 16, TRUE, TRUE }, { "wide-hall", 8, 6, TRUE, TRUE },
    { "island", 7, 5, FALSE, FALSE },   { "boat-house", 8, 6, FALSE, TRUE },
  };
  for (gsize i = 0; i < G_N_ELEMENTS (wanted); i++)
    {
      KhReviewSettings settings;
      g_autofree char *text = kh_example_dup_text (wanted[i].name);
      g_autoptr (GPtrArray) faults = NULL;
      g_autoptr (KhPlan) plan = kh_plan_file_parse (text, strlen (text), wanted[i].name, &faults);
      assert_non_null (plan);
      kh_review_settings_init (&settings, plan);
      settings.with_run = settings.with_panels = TRUE;
      g_autoptr (KhReview) review = kh_review_new (plan, &settings, NULL);
      assert_int_equal (plan->lattice.columns, wanted[i].columns);
      assert_int_equal (plan->lattice.rows, wanted[i].rows);
      assert_int_equal (review->layout->simply_connected, wanted[i].simple);
      assert_int_equal (review->traces[plan->robot.hand]->outcome == KH_OUTCOME_ARRIVED, wanted[i].arrives);
      assert_int_equal (review->n_by_severity[KH_SEVERITY_BREAKS] == 0, wanted[i].arrives);
      assert_true (review->saw_plan->cannot_cut->len == 0 && review->saw_plan->proven);
    }
}

/* Classic contest maze: pitch 180, wall 12, height 50, at least one wall at every lattice point (IEEE Region 1 /
 * APEC MicroMouse contest rules, maze specification 1-6). */
static void the_classic_maze_has_a_wall_at_every_point (void **state)
{
  g_autofree char *text = kh_example_dup_text ("classic-16");
  g_autoptr (GPtrArray) faults = NULL;
  g_autoptr (KhPlan) plan = kh_plan_file_parse (text, strlen (text), "classic-16", &faults);
  g_autoptr (KhLayout) layout = kh_layout_new (plan);
  assert_int_equal (layout->n_bare_points, 0);
  assert_int_equal (plan->lattice.pitch_nm, 180000000);
  assert_int_equal (plan->walls.thickness_nm, 12000000);
  assert_int_equal (plan->walls.height_nm, 50000000);
  assert_int_equal (kh_plan_width_nm (plan), 2892000000);
}

int main (int argc, char **argv)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (each_is_as_it_would_be_written),
    cmocka_unit_test (what_they_are_for_is_true),
    cmocka_unit_test (the_classic_maze_has_a_wall_at_every_point),
  };
  folder = argv[1];
  return cmocka_run_group_tests (tests, NULL, NULL);
}
