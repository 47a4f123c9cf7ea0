/* SPDX-License-Identifier: MIT */
/* The window's model without a window: edits, findings at once, the rest in the background, what is saved. */
#include "../cmocka_all.h"
#include "app/session.h"
#include "base/units.h"
#include "files/examples.h"
#include "files/planfile.h"
#include "files/store.h"
#include <glib/gstdio.h>
#include <string.h>

static KhSession *session_new (const char *name)
{
  g_autofree char *text = kh_example_dup_text (name);
  g_autoptr (GPtrArray) faults = NULL;
  KhPlan *plan = kh_plan_file_parse (text, strlen (text), name, &faults);
  assert_non_null (plan);
  return kh_session_new_take (plan);
}

/* Runs the main loop until nothing is worked out any more; at most ten seconds. */
static void wait_for (KhSession *session)
{
  gint64 end = g_get_monotonic_time () + 10 * G_USEC_PER_SEC;
  while (kh_session_is_working (session) && g_get_monotonic_time () < end)
    g_main_context_iteration (NULL, FALSE);
  assert_false (kh_session_is_working (session));
}

static void count_cb (KhSession *session, int *n) { (*n)++; }

static gboolean edit_wall (KhSession *session, KhEdge edge, gboolean walled)
{
  return kh_session_do_take (session, kh_change_new_walls (&edge, 1, walled), "one wall");
}

static void findings_follow_at_once_and_the_run_later (void **state)
{
  g_autoptr (KhSession) session = session_new ("boat-house");
  wait_for (session);
  const KhReview *review = kh_session_get_review (session);
  assert_non_null (review->traces[KH_HAND_RIGHT]);
  assert_non_null (review->traces[KH_HAND_LEFT]);
  assert_non_null (review->saw_plan);
  assert_non_null (kh_session_get_strip (session, KH_HAND_RIGHT));
  assert_int_equal (review->layout->n_leaks, 0);
  assert_true (edit_wall (session, (KhEdge){ KH_AXIS_X, 3, 0 }, FALSE));
  review = kh_session_get_review (session);
  assert_int_equal (review->layout->n_leaks, 1);
  assert_null (review->traces[KH_HAND_RIGHT]); /* not that of the plan before */
  assert_null (kh_session_get_strip (session, KH_HAND_RIGHT));
  wait_for (session);
  review = kh_session_get_review (session);
  assert_int_equal (review->layout->n_leaks, 1);
  assert_non_null (review->traces[KH_HAND_RIGHT]);
}

/* Whenever results come, they are of the plan as it stands, not of one before. */
static void check_walls_cb (KhSession *session, int *n)
{
  const KhPlan *plan = kh_session_get_plan (session);
  assert_int_equal (kh_session_get_review (session)->layout->n_walls, kh_plan_n_walls (plan));
  (*n)++;
}

/* A burst of edits: what was asked for first never comes. */
static void older_results_are_dropped (void **state)
{
  g_autoptr (KhSession) session = session_new ("classic-16");
  int n_reviews = 0;
  g_signal_connect (session, "review-changed", G_CALLBACK (check_walls_cb), &n_reviews);
  for (int i = 0; i < 15; i++)
    {
      gint64 until = g_get_monotonic_time () + 15000 * (i % 5); /* some have begun, some have not */
      edit_wall (session, (KhEdge){ KH_AXIS_X, i, 8 },
                 !kh_plan_has_wall (kh_session_get_plan (session), (KhEdge){ KH_AXIS_X, i, 8 }));
      while (g_get_monotonic_time () < until)
        g_main_context_iteration (NULL, FALSE);
    }
  wait_for (session);
  const KhReview *review = kh_session_get_review (session);
  g_autoptr (KhLayout) layout = kh_layout_new (kh_session_get_plan (session));
  assert_int_equal (review->layout->n_walls, layout->n_walls);
  assert_int_equal (review->layout->n_regions, layout->n_regions);
  assert_non_null (review->cut_list);
  assert_true (n_reviews >= 16);
}

static void saved_is_what_is_in_the_file (void **state)
{
  g_autoptr (KhSession) session = session_new ("first-maze");
  g_autofree char *folder = g_dir_make_tmp ("kerfhand-session-XXXXXX", NULL),
                  *path = g_build_filename (folder, "a.mazeplan", NULL);
  g_autoptr (GError) error = NULL;
  KhEdge edge = { KH_AXIS_X, 2, 2 };
  assert_false (kh_session_is_saved (session));
  assert_true (kh_session_save (session, path, FALSE, NULL));
  assert_true (kh_session_is_saved (session));
  gboolean walled = kh_plan_has_wall (kh_session_get_plan (session), edge);
  assert_true (edit_wall (session, edge, !walled));
  assert_false (kh_session_is_saved (session));
  kh_session_undo (session);
  assert_true (kh_session_is_saved (session));
  kh_session_redo (session);
  assert_false (kh_session_is_saved (session));
  assert_string_equal (kh_history_get_undo_words (kh_session_get_history (session)), "one wall");
  /* Another program writes the file: it is not written over unasked. */
  assert_true (g_file_set_contents (path, "theirs", -1, NULL));
  assert_false (kh_session_save (session, path, FALSE, &error));
  assert_true (g_error_matches (error, KH_STORE_ERROR, KH_STORE_ERROR_CHANGED));
  assert_false (kh_session_is_saved (session));
  assert_true (kh_session_save (session, path, TRUE, NULL));
  assert_true (kh_session_is_saved (session));
  g_unlink (path);
  g_rmdir (folder);
}

static void nothing_is_no_step (void **state)
{
  g_autoptr (KhSession) session = session_new ("first-maze");
  int n_plans = 0;
  g_signal_connect (session, "plan-changed", G_CALLBACK (count_cb), &n_plans);
  assert_false (edit_wall (session, (KhEdge){ KH_AXIS_X, 0, 0 }, TRUE));
  kh_session_undo (session);
  kh_session_redo (session);
  assert_int_equal (n_plans, 0);
}

static void the_player_stays_within_the_run (void **state)
{
  g_autoptr (KhSession) session = session_new ("first-maze");
  wait_for (session);
  gsize last = kh_trace_get_n_ticks (kh_session_get_trace (session)) - 1;
  assert_int_equal (kh_session_get_played_tick (session), last);
  kh_session_set_played_tick (session, G_MAXSIZE);
  assert_int_equal (kh_session_get_played_tick (session), last);
  kh_session_set_playing (session, TRUE);
  assert_int_equal (kh_session_get_played_tick (session), 0);
  kh_session_set_hand (session, KH_HAND_LEFT);
  assert_false (kh_session_get_playing (session));
  kh_session_set_preview (session, FALSE);
  wait_for (session);
  assert_null (kh_session_get_trace (session));
  kh_session_set_playing (session, TRUE);
  assert_false (kh_session_get_playing (session));
}

/* A run shown whole is shown whole again, however long the next one is; a place looked at is kept. */
static void the_played_place_survives_an_edit (void **state)
{
  g_autoptr (KhSession) session = session_new ("first-maze");
  wait_for (session);
  gsize before = kh_trace_get_n_ticks (kh_session_get_trace (session));
  KhMark mark = g_array_index (kh_session_get_plan (session)->marks, KhMark, 0);
  /* Without its marks the run goes on past where it ended. */
  assert_true (kh_session_do_take (session, kh_change_new_marks (NULL, 0), "no mark"));
  wait_for (session);
  gsize after = kh_trace_get_n_ticks (kh_session_get_trace (session));
  assert_true (after > before);
  assert_int_equal (kh_session_get_played_tick (session), after - 1);
  kh_session_set_played_tick (session, 0);
  assert_true (kh_session_do_take (session, kh_change_new_marks (&mark, 1), "mark"));
  kh_session_set_played_tick (session, 40); /* no run yet: nothing to move in */
  wait_for (session);
  assert_int_equal (kh_session_get_played_tick (session), 0);
}

static const KhFinding *chosen_of (KhSession *session)
{
  int chosen = kh_session_get_chosen_finding (session);
  return chosen < 0 ? NULL : g_ptr_array_index (kh_session_get_review (session)->findings, chosen);
}

/* The run's findings come in between later: the one that was chosen stays chosen, under its new number. */
static void the_chosen_finding_keeps_being_it (void **state)
{
  g_autoptr (KhSession) session = session_new ("island");
  int n_selections = 0, last;
  wait_for (session);
  assert_true (edit_wall (session, (KhEdge){ KH_AXIS_X, 3, 0 }, FALSE));
  last = (int)kh_session_get_review (session)->findings->len - 1;
  kh_session_set_chosen_finding (session, last);
  g_autofree char *wrong = g_strdup (chosen_of (session)->wrong);
  g_signal_connect (session, "selection-changed", G_CALLBACK (count_cb), &n_selections);
  wait_for (session);
  assert_int_not_equal (kh_session_get_chosen_finding (session), last);
  assert_string_equal (chosen_of (session)->wrong, wrong);
  assert_int_equal (n_selections, 1);
  /* Gone with the edit that mends it. */
  for (guint i = 0; i < kh_session_get_review (session)->findings->len; i++)
    if (strcmp (((KhFinding *)g_ptr_array_index (kh_session_get_review (session)->findings, i))->code, "leak") == 0)
      kh_session_set_chosen_finding (session, (int)i);
  assert_string_equal (chosen_of (session)->code, "leak");
  kh_session_undo (session);
  assert_null (chosen_of (session));
}

/* Another seed, another run; the same seed, the same bits. */
static void the_seed_says_which_errors_are_drawn (void **state)
{
  g_autoptr (KhSession) session = session_new ("first-maze");
  guint64 hashes[3];
  wait_for (session);
  guint64 exact = kh_trace_hash (kh_session_get_trace (session));
  kh_session_set_seed (session, 7);
  assert_false (kh_session_is_working (session)); /* nothing is drawn: nothing to do */
  kh_session_set_exact (session, FALSE);
  for (int i = 0; i < 3; i++)
    {
      kh_session_set_seed (session, i == 1 ? 8 : 7);
      wait_for (session);
      assert_int_equal (kh_session_get_trace (session)->seed, i == 1 ? 8 : 7);
      hashes[i] = kh_trace_hash (kh_session_get_trace (session));
    }
  assert_true (hashes[0] == hashes[2]);
  assert_true (hashes[0] != hashes[1]);
  assert_true (hashes[0] != exact);
}

/* Thrown away while work is under way: nothing is touched afterwards (seen by the sanitizers). */
static void a_session_can_go_at_any_time (void **state)
{
  for (int i = 0; i < 6; i++)
    {
      KhSession *session = session_new ("classic-16");
      gint64 until = g_get_monotonic_time () + 12000 * i;
      while (g_get_monotonic_time () < until)
        g_main_context_iteration (NULL, FALSE);
      g_object_unref (session);
    }
  gint64 until = g_get_monotonic_time () + 300000;
  while (g_get_monotonic_time () < until)
    g_main_context_iteration (NULL, FALSE);
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (findings_follow_at_once_and_the_run_later),
    cmocka_unit_test (older_results_are_dropped),
    cmocka_unit_test (saved_is_what_is_in_the_file),
    cmocka_unit_test (nothing_is_no_step),
    cmocka_unit_test (the_played_place_survives_an_edit),
    cmocka_unit_test (the_chosen_finding_keeps_being_it),
    cmocka_unit_test (the_seed_says_which_errors_are_drawn),
    cmocka_unit_test (the_player_stays_within_the_run),
    cmocka_unit_test (a_session_can_go_at_any_time),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
