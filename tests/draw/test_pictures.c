/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "base/units.h"
#include "draw/export.h"
#include "draw/sawpicture.h"
#include "draw/strippicture.h"
#include "files/planfile.h"
#include <math.h>
#include <string.h>

static char *folder;

/* Relative luminance and contrast: WCAG 2.1, definitions of both. */
static double part (double c)
{
  return c <= 0.03928 ? c / 12.92 : pow ((c + 0.055) / 1.055, 2.4);
}

static double luminance (KhColour c)
{
  return 0.2126 * part (c.red) + 0.7152 * part (c.green) + 0.0722 * part (c.blue);
}

static double contrast (KhScheme scheme, KhInk a, KhInk b)
{
  double x = luminance (kh_palette_get (scheme, a)), y = luminance (kh_palette_get (scheme, b));
  return (MAX (x, y) + 0.05) / (MIN (x, y) + 0.05);
}

static void every_meaning_stands_out (void **state)
{
  static const KhInk graphics[] = { KH_INK_WALL, KH_INK_SIGN, KH_INK_ISLAND, KH_INK_FOLLOW, KH_INK_CURVE, KH_INK_TURN, KH_INK_SEARCHING, KH_INK_CONTACT, KH_INK_BADGE, KH_INK_LIT };
  static const KhInk words[] = { KH_INK_TEXT, KH_INK_TEXT_SECOND, KH_INK_SIGN_WORDS, KH_INK_CONTACT, KH_INK_BADGE };
  for (int scheme = 0; scheme < 3; scheme++)
    {
      for (gsize i = 0; i < G_N_ELEMENTS (graphics); i++)
        if (contrast ((KhScheme) scheme, graphics[i], KH_INK_FLOOR) < 4)
          fail_msg ("scheme %d, ink %d: %.2f on the floor", scheme, graphics[i], contrast ((KhScheme) scheme, graphics[i], KH_INK_FLOOR));
      for (gsize i = 0; i < G_N_ELEMENTS (words); i++)
        for (int on = KH_INK_FLOOR; on <= KH_INK_DESK; on++)
          if (contrast ((KhScheme) scheme, words[i], (KhInk) on) < 4.5)
            fail_msg ("scheme %d, words %d on %d: %.2f", scheme, words[i], on, contrast ((KhScheme) scheme, words[i], (KhInk) on));
      assert_true (contrast ((KhScheme) scheme, KH_INK_TEXT, KH_INK_PANEL) >= 4.5);
    }
}

static KhPlan *load (const char *name)
{
  g_autoptr (GPtrArray) faults = NULL;
  g_autofree char *path = g_strdup_printf ("%s/%s.mazeplan", folder, name);
  KhPlan *plan = kh_plan_file_load (path, &faults);
  assert_non_null (plan);
  return plan;
}

static KhReview *look_at (const KhPlan *plan)
{
  KhReviewSettings settings;
  kh_review_settings_init (&settings, plan);
  settings.with_panels = settings.with_run = settings.both_hands = TRUE;
  return kh_review_new (plan, &settings, NULL);
}

static void a_view_goes_there_and_back (void **state)
{
  g_autoptr (KhPlan) plan = load ("boat-house");
  KhView view;
  kh_view_fit (&view, plan, 900, 600, 40);
  KhVec low = kh_view_to_device (&view, (KhVec){ -6, -6 }), high = kh_view_to_device (&view, (KhVec){ 1446, 1086 });
  assert_true (low.x >= 39.9 && low.y <= 560.1 && high.x <= 860.1 && high.y >= 39.9);
  for (int i = 0; i < 20; i++)
    {
      KhVec before = kh_view_to_mm (&view, 300, 200);
      kh_view_zoom_at (&view, 300, 200, i % 2 ? 1.7 : 0.8);
      KhVec after = kh_view_to_mm (&view, 300, 200), back;
      assert_true (fabs (before.x - after.x) < 1e-6 && fabs (before.y - after.y) < 1e-6);
      back = kh_view_to_device (&view, (KhVec){ 123, 456 });
      back = kh_view_to_mm (&view, back.x, back.y);
      assert_true (fabs (back.x - 123) < 1e-6 && fabs (back.y - 456) < 1e-6);
    }
}

/* What is drawn stays within what was asked for. */
static void the_strip_stays_in_its_place (void **state)
{
  static const double sizes[][2] = { { 900, 140 }, { 300, 90 }, { 1800, 300 }, { 60, 40 } };
  g_autoptr (KhPlan) plan = load ("boat-house");
  g_autoptr (KhReview) review = look_at (plan);
  KhStripData *data = kh_strip_data_new (plan, review->traces[KH_HAND_RIGHT]);
  for (gsize i = 0; i < G_N_ELEMENTS (sizes); i++)
    {
      double x, y, w, h;
      KhStripPicture picture = { KH_SCHEME_LIGHT, sizes[i][0], sizes[i][1], 11, 400 };
      cairo_surface_t *surface = cairo_recording_surface_create (CAIRO_CONTENT_COLOR_ALPHA, NULL);
      cairo_t *cr = cairo_create (surface);
      kh_strip_picture_draw (&picture, cr, data);
      assert_int_equal (cairo_status (cr), CAIRO_STATUS_SUCCESS);
      cairo_recording_surface_ink_extents (surface, &x, &y, &w, &h);
      assert_true (w == 0 || (x >= -2 && y >= -2 && x + w <= sizes[i][0] + 24 && y + h <= sizes[i][1] + 30));
      cairo_destroy (cr);
      cairo_surface_destroy (surface);
    }
  /* A click anywhere names a tick; left to right they only rise. */
  KhStripPicture picture = { KH_SCHEME_LIGHT, 900, 140, 11, 0 };
  gsize last = 0, n = kh_trace_get_n_ticks (review->traces[KH_HAND_RIGHT]);
  for (double x = -50; x < 1000; x += 7)
    {
      gsize tick = kh_strip_picture_tick_at (&picture, data, x);
      assert_true (tick >= last && tick < n);
      last = tick;
    }
  assert_true (last > n - 20);
  kh_strip_data_free (data);
}

/* Between two walls the free widths and the body fill the way: right + left + width = clear width, over the cosine of
 * the heading's angle to the walls (plane geometry). The nearest wall is never farther than the nearer side. */
static void free_widths_fill_the_way (void **state)
{
  g_autoptr (KhPlan) plan = load ("boat-house");
  g_autoptr (KhReview) review = look_at (plan);
  const KhTrace *trace = review->traces[KH_HAND_RIGHT];
  KhStripData *data = kh_strip_data_new (plan, trace);
  double clear = kh_mm_from_nm (plan->lattice.pitch_nm - plan->walls.thickness_nm), left, right;
  int n_between = 0, n_open = 0, n_turning = 0;
  for (gsize i = 0; i < kh_trace_get_n_ticks (trace); i++)
    {
      const KhTick *tick = kh_trace_get_tick (trace, i);
      gboolean turning = tick->state == KH_STATE_PIVOT;
      assert_int_equal (kh_strip_data_get_free (data, i, &left, &right), !turning);
      n_turning += turning;
      if (turning || tick->state != KH_STATE_FOLLOW)
        continue;
      double off = remainder (tick->heading_rad, G_PI / 2);
      n_open += !isfinite (left);
      if (!isfinite (left) || !isfinite (right) || fabs (off) > 0.1 || left + right > clear)
        continue;
      n_between++;
      assert_true (fabs (left + right + 2 * plan->robot.body.radius_mm - clear / cos (off)) < 1);
      assert_true ((double)tick->clearance_mm < MIN (left, right) + 3);
    }
  assert_true (n_between > 100 && n_open > 0 && n_turning > 0);
  assert_false (kh_strip_data_get_free (data, kh_trace_get_n_ticks (trace), &left, &right));
  kh_strip_data_free (data);
}

/* Every piece of the saw plan is found where it is drawn. */
static void the_saw_plan_answers_clicks (void **state)
{
  g_autoptr (KhPlan) plan = load ("boat-house");
  g_autoptr (KhReview) review = look_at (plan);
  KhSawPicture picture = { KH_SCHEME_LIGHT, 900, 11, -1 };
  double height = kh_saw_picture_get_height (&picture, review);
  g_autofree gboolean *seen = g_new0 (gboolean, review->cut_list->rows->len);
  assert_true (height >= 5 * 36);
  for (double y = 5; y < height; y += 8)
    for (double x = 0; x < 900; x += 2)
      {
        int row = kh_saw_picture_row_at (&picture, review, x, y);
        assert_true (row >= -1 && row < (int) review->cut_list->rows->len);
        if (row >= 0)
          seen[row] = TRUE;
      }
  for (guint i = 0; i < review->cut_list->rows->len; i++)
    assert_true (seen[i]);
}

static void every_example_is_drawn_in_every_way (void **state)
{
  static const char *const names[] = { "boat-house", "first-maze", "classic-16", "wide-hall", "island" };
  for (gsize i = 0; i < G_N_ELEMENTS (names); i++)
    {
      g_autoptr (KhPlan) plan = load (names[i]);
      g_autoptr (KhReview) review = look_at (plan);
      for (int kind = 0; kind < 3; kind++)
        for (int what = 0; what < 3; what++)
          {
            g_autoptr (GError) error = NULL;
            g_autoptr (GBytes) once = kh_export ((KhExportKind) kind, (KhExportWhat) what, plan, review, 700, &error);
            g_autoptr (GBytes) twice = kh_export ((KhExportKind) kind, (KhExportWhat) what, plan, review, 700, NULL);
            assert_non_null (once);
            assert_true (g_bytes_get_size (once) > 1000);
            if (kind != KH_EXPORT_SVG) /* its inner names carry a number that counts on */
              assert_true (g_bytes_equal (once, twice));
          }
    }
}

int main (int argc, char **argv)
{
  folder = argv[1];
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (every_meaning_stands_out),      cmocka_unit_test (a_view_goes_there_and_back),
    cmocka_unit_test (the_strip_stays_in_its_place),  cmocka_unit_test (free_widths_fill_the_way),
    cmocka_unit_test (the_saw_plan_answers_clicks),
    cmocka_unit_test (every_example_is_drawn_in_every_way),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
