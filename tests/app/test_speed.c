/* SPDX-License-Identifier: MIT */
#include "driver.h"

#include "files/examples.h"
#include "files/planfile.h"

/* What the person at the bench waits for, on the 16 by 16 example: an edit with
 * its findings within 5 ms, a frame within 16 ms while editing, hovering and
 * playing.  Medians, so that a busy machine does not fail it. */

static KhApplication *app;
static GArray *frames; /* of double, ms */
static gint64 began;

static void before_paint_cb (GdkFrameClock *clock, gpointer data) { began = g_get_monotonic_time (); }

static void after_paint_cb (GdkFrameClock *clock, gpointer data)
{
  double ms = (double)(g_get_monotonic_time () - began) / 1000;
  g_array_append_val (frames, ms);
}

static int by_size (gconstpointer a, gconstpointer b)
{
  double x = *(const double *)a, y = *(const double *)b;
  return x < y ? -1 : x > y;
}

static double report (GArray *times, const char *what)
{
  assert_true (times->len > 0);
  g_array_sort (times, by_size);
  double median = g_array_index (times, double, times->len / 2);
  print_message ("%s: median %.2f ms, worst %.2f ms of %u\n", what, median,
                 g_array_index (times, double, times->len - 1), times->len);
  return median;
}

static KhSession *session_of (void) { return kh_window_get_session (kt_window (app)); }

static int start_app (void **state)
{
  g_autofree char *text = kh_example_dup_text ("classic-16");
  GPtrArray *faults = NULL;
  app = kt_start ();
  KhPlan *plan = kh_plan_file_parse (text, strlen (text), "classic-16", &faults);
  assert_non_null (plan);
  kh_window_set_session_take (kt_window (app), kh_session_new_take (plan));
  GdkFrameClock *clock = gtk_widget_get_frame_clock (GTK_WIDGET (kt_window (app)));
  frames = g_array_new (FALSE, FALSE, sizeof (double));
  g_signal_connect (clock, "before-paint", G_CALLBACK (before_paint_cb), NULL);
  g_signal_connect (clock, "after-paint", G_CALLBACK (after_paint_cb), NULL);
  kt_settle (1500);
  return 0;
}

static int stop_app (void **state)
{
  g_array_unref (frames);
  kt_stop (app);
  return 0;
}

static void test_edits (void **state)
{
  g_autoptr (GArray) edits = g_array_new (FALSE, FALSE, sizeof (double));
  const KhPlan *plan = kh_session_get_plan (session_of ());
  g_array_set_size (frames, 0);
  for (int i = 0; i < 40; i++)
    {
      KhEdge edge = { KH_AXIS_X, 1 + i % 14, 1 + (i * 7) % 14 };
      gint64 start = g_get_monotonic_time ();
      kh_session_do_take (session_of (), kh_change_new_walls (&edge, 1, !kh_plan_has_wall (plan, edge)), "wall");
      assert_non_null (kh_session_get_review (session_of ()));
      double ms = (double)(g_get_monotonic_time () - start) / 1000;
      g_array_append_val (edits, ms);
      kt_settle (25);
    }
  assert_true (report (edits, "edit with findings, 16 x 16") < 5);
  assert_true (report (frames, "frame while editing, 16 x 16") < 16);
  for (int i = 0; i < 40; i++)
    kh_session_undo (session_of ());
  kt_settle (1500);
}

static void test_hover_and_zoom (void **state)
{
  g_array_set_size (frames, 0);
  for (int i = 0; i < 20; i++)
    kt_point (kt_window (app), 200 + 100 * i, 300 + 90 * i);
  assert_true (report (frames, "frame while the pointer moves") < 16);
  g_array_set_size (frames, 0);
  for (int i = 0; i < 20; i++)
    {
      kh_canvas_zoom (KH_CANVAS (kh_window_get_canvas (kt_window (app))), i < 10 ? 1.1 : 1 / 1.1);
      kt_settle (30);
    }
  assert_true (report (frames, "frame while zooming") < 16);
}

static void test_played_moment (void **state)
{
  const KhReview *review = kh_session_get_review (session_of ());
  const KhTrace *trace = review->traces[kh_session_get_hand (session_of ())];
  assert_non_null (trace);
  gsize n = kh_trace_get_n_ticks (trace);
  print_message ("%zu ticks\n", n);
  g_array_set_size (frames, 0);
  for (int i = 0; i < 60; i++)
    {
      kh_session_set_played_tick (session_of (), n * (gsize)i / 60);
      kt_settle (20);
    }
  assert_true (report (frames, "frame while playing") < 16);
}

static void test_idle (void **state)
{
  kt_settle (800);
  g_array_set_size (frames, 0);
  kt_settle (1500);
  print_message ("frames in 1.5 s without anything to do: %u\n", frames->len);
  assert_true (frames->len <= 2); /* the caret of a field may blink */
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (test_edits),
    cmocka_unit_test (test_hover_and_zoom),
    cmocka_unit_test (test_played_moment),
    cmocka_unit_test (test_idle),
  };
  return cmocka_run_group_tests (tests, start_app, stop_app);
}
