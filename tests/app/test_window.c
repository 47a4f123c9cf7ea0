/* SPDX-License-Identifier: MIT */
#include "driver.h"

#include "files/planfile.h"
#include <glib/gstdio.h>

/* The main job with the real window, its pointer and its keys: draw a wall,
 * undo, redo, place a mark, break the boundary, see the finding appear, play
 * the run, save, open again: the same bytes. */

static KhApplication *app;

static const KhPlan *plan_of (void) { return kh_session_get_plan (kh_window_get_session (kt_window (app))); }

static KhSession *session_of (void) { return kh_window_get_session (kt_window (app)); }

static gboolean has_finding (const char *code)
{
  const KhReview *review = kh_session_get_review (session_of ());
  for (guint i = 0; review != NULL && i < review->findings->len; i++)
    if (strcmp (((KhFinding *)g_ptr_array_index (review->findings, i))->code, code) == 0)
      return TRUE;
  return FALSE;
}

static double pitch_mm (void) { return kh_mm_from_nm (plan_of ()->lattice.pitch_nm); }

/* A free inner place of the first example, found and not assumed: two edges in a row without walls. */
static KhPoint free_row (void)
{
  const KhLattice *lattice = &plan_of ()->lattice;
  for (int r = 1; r < lattice->rows; r++)
    for (int c = 1; c + 2 < lattice->columns; c++)
      if (!kh_plan_has_wall (plan_of (), (KhEdge){ KH_AXIS_X, c, r })
          && !kh_plan_has_wall (plan_of (), (KhEdge){ KH_AXIS_X, c + 1, r }))
        return (KhPoint){ c, r };
  fail_msg ("the first example has no free row");
  return (KhPoint){ 0, 0 };
}

static int start_app (void **state)
{
  app = kt_start ();
  return 0;
}

static int stop_app (void **state)
{
  kt_stop (app);
  return 0;
}

static void test_walls (void **state)
{
  double p = pitch_mm ();
  KhPoint at = free_row ();
  int before = kh_plan_n_walls (plan_of ());
  KhHistory *history = kh_session_get_history (session_of ());

  kt_drag (kt_window (app), at.column * p, at.row * p + 6, (at.column + 2) * p, at.row * p - 9, 1);
  kt_picture ("walls-laid");
  assert_int_equal (kh_plan_n_walls (plan_of ()), before + 2);
  assert_true (kh_plan_has_wall (plan_of (), (KhEdge){ KH_AXIS_X, at.column, at.row }));
  assert_int_equal (kh_history_get_n_undo (history), 1);
  assert_non_null (strstr (kh_history_get_undo_words (history), "2 walls laid"));
  assert_false (kh_session_is_saved (session_of ()));

  kt_keys ("ctrl+z");
  assert_int_equal (kh_plan_n_walls (plan_of ()), before);
  kt_keys ("ctrl+shift+z");
  assert_int_equal (kh_plan_n_walls (plan_of ()), before + 2);

  /* the right button takes away, in one step */
  kt_drag (kt_window (app), at.column * p, at.row * p, (at.column + 2) * p, at.row * p, 3);
  assert_int_equal (kh_plan_n_walls (plan_of ()), before);
  assert_int_equal (kh_history_get_n_undo (history), 2);

  /* a click toggles one */
  kt_click (kt_window (app), (at.column + 0.5) * p, at.row * p, 1);
  assert_int_equal (kh_plan_n_walls (plan_of ()), before + 1);
  kt_click (kt_window (app), (at.column + 0.5) * p, at.row * p, 1);
  assert_int_equal (kh_plan_n_walls (plan_of ()), before);
}

static void test_escape (void **state)
{
  double p = pitch_mm ();
  KhPoint at = free_row ();
  int before = kh_plan_n_walls (plan_of ());
  gsize steps = kh_history_get_n_undo (kh_session_get_history (session_of ()));
  kt_point (kt_window (app), at.column * p, at.row * p);
  kt_x ("mousedown 1");
  kt_point (kt_window (app), (at.column + 1) * p, at.row * p);
  kt_point (kt_window (app), (at.column + 2) * p, at.row * p);
  kt_keys ("Escape");
  kt_x ("mouseup 1");
  assert_int_equal (kh_plan_n_walls (plan_of ()), before);
  assert_int_equal (kh_history_get_n_undo (kh_session_get_history (session_of ())), steps);
}

static void test_mark_and_start (void **state)
{
  double p = pitch_mm ();
  guint before = plan_of ()->marks->len;
  KhCell cell = { 1, 1 };
  kt_keys ("m");
  kt_click (kt_window (app), (cell.column + 0.5) * p, (cell.row + 0.5) * p, 1);
  assert_int_equal (plan_of ()->marks->len, before + 1);
  kt_click (kt_window (app), (cell.column + 0.5) * p, (cell.row + 0.5) * p, 1);
  assert_int_equal (plan_of ()->marks->len, before);
  /* dragging gives the size */
  kt_drag (kt_window (app), (cell.column + 0.3) * p, (cell.row + 0.3) * p, (cell.column + 0.6) * p,
           (cell.row + 0.7) * p, 1);
  assert_int_equal (plan_of ()->marks->len, before + 1);
  const KhMark *mark = &g_array_index (plan_of ()->marks, KhMark, before);
  assert_true (ABS (kh_mm_from_nm (mark->size_nm[0]) - 0.3 * p) < 4);
  assert_true (ABS (kh_mm_from_nm (mark->size_nm[1]) - 0.4 * p) < 4);
  kt_keys ("ctrl+z");

  kt_keys ("s");
  kt_click (kt_window (app), 0.5 * p, 0.5 * p, 1);
  KhHeading heading = plan_of ()->start.heading;
  assert_true (plan_of ()->has_start);
  assert_int_equal (plan_of ()->start.cell.column, 0);
  kt_click (kt_window (app), 0.5 * p, 0.5 * p, 1);
  assert_int_equal (plan_of ()->start.heading, kh_heading_turned (heading, 1));
  kt_keys ("w");
}

static void test_leak_is_found (void **state)
{
  double p = pitch_mm ();
  /* an edge of the northern boundary that is a wall */
  int column = 0, row = plan_of ()->lattice.rows;
  while (!kh_plan_has_wall (plan_of (), (KhEdge){ KH_AXIS_X, column, row }))
    column++;
  assert_false (has_finding ("leak"));
  kt_click (kt_window (app), (column + 0.5) * p, row * p, 1);
  assert_false (kh_plan_has_wall (plan_of (), (KhEdge){ KH_AXIS_X, column, row }));
  assert_true (has_finding ("leak")); /* at once: in the same turn as the edit */
  kt_picture ("leak");
  kt_keys ("F8");
  assert_true (kh_session_get_chosen_finding (session_of ()) >= 0);
  kt_keys ("ctrl+z");
  assert_false (has_finding ("leak"));
  /* declared an opening instead: the wall goes and there is no leak */
  kt_keys ("ctrl+0 o");
  kt_click (kt_window (app), (column + 0.5) * p, row * p, 1);
  assert_non_null (kh_plan_get_opening (plan_of (), (KhEdge){ KH_AXIS_X, column, row }));
  assert_false (kh_plan_has_wall (plan_of (), (KhEdge){ KH_AXIS_X, column, row }));
  assert_false (has_finding ("leak"));
  kt_keys ("ctrl+z w");
}

static gboolean has_run (gpointer data)
{
  const KhReview *review = kh_session_get_review (session_of ());
  return !kh_session_is_working (session_of ()) && review != NULL && review->traces[plan_of ()->robot.hand] != NULL;
}

static void test_keyboard (void **state)
{
  int before = kh_plan_n_walls (plan_of ());
  KhPoint at = free_row ();
  kh_canvas_grab_cursor (KH_CANVAS (kh_window_get_canvas (kt_window (app))));
  kt_keys ("w");
  for (int i = 0; i < 8; i++)
    kt_keys ("Left Down");
  for (int i = 0; i < at.column; i++)
    kt_keys ("Right");
  for (int i = 0; i < at.row; i++)
    kt_keys ("Up");
  kt_keys ("shift+Right");
  assert_int_equal (kh_plan_n_walls (plan_of ()), before + 1);
  assert_true (kh_plan_has_wall (plan_of (), (KhEdge){ KH_AXIS_X, at.column, at.row }));
  kt_keys ("alt+Left");
  assert_int_equal (kh_plan_n_walls (plan_of ()), before);
  kt_keys ("Return");
  assert_int_equal (kh_plan_n_walls (plan_of ()), before + 1);
  kt_keys ("ctrl+z");
  kt_picture ("keyboard");
}

static gboolean is_saved (gpointer data)
{
  return kh_session_get_path (session_of ()) != NULL && kh_session_is_saved (session_of ());
}

static gboolean is_reopened (gpointer data)
{
  KhWindow *window = kt_window (app);
  return window != NULL && g_strcmp0 (kh_session_get_path (kh_window_get_session (window)), data) == 0;
}

static void test_save_and_open_again (void **state)
{
  g_autofree char *typed = g_build_filename (g_getenv ("TEST_FOLDER"), "drawn", NULL);
  g_autofree char *path = g_strconcat (typed, ".mazeplan", NULL);
  g_autofree char *line = g_strdup_printf ("type --delay 15 %s", typed);
  g_autofree char *first = NULL, *second = NULL;
  double p = pitch_mm ();
  KhPoint at = free_row ();
  kt_drag (kt_window (app), at.column * p, at.row * p, (at.column + 1) * p, at.row * p, 1);

  kt_keys ("ctrl+s");
  kt_focus_window ("Save Plan");
  kt_keys ("ctrl+a");
  kt_x (line);
  kt_picture ("save");
  kt_keys ("Return");
  assert_true (kt_wait (is_saved, NULL, 5000));
  assert_string_equal (kh_session_get_path (session_of ()), path);
  assert_true (g_file_get_contents (path, &first, NULL, NULL));
  g_autofree char *text = kh_plan_file_dup_text (plan_of ());
  assert_string_equal (first, text);

  /* closed, opened again from its file, saved under another name */
  kh_window_set_session_take (kt_window (app), kh_session_new_take (kh_plan_new (
                                                   2, 2, 180 * KH_NM_PER_MM, 12 * KH_NM_PER_MM, 50 * KH_NM_PER_MM)));
  kh_application_open_path (app, path, kt_window (app));
  assert_true (kt_wait (is_reopened, path, 5000));
  g_autofree char *other = g_build_filename (g_getenv ("TEST_FOLDER"), "again.mazeplan", NULL);
  g_autoptr (GError) error = NULL;
  assert_true (kh_session_save (session_of (), other, TRUE, &error));
  assert_true (g_file_get_contents (other, &second, NULL, NULL));
  assert_string_equal (first, second);
  kt_settle (200);
}

static gboolean is_playing_on (gpointer from) { return kh_session_get_played_tick (session_of ()) > *(gsize *)from; }

static void test_play (void **state)
{
  assert_true (kt_wait (has_run, NULL, 8000));
  kh_session_set_played_tick (session_of (), 0);
  kh_session_set_speed (session_of (), 1); /* so that a slow machine does not come to the end meanwhile */
  gsize from = 0;
  g_action_group_activate_action (G_ACTION_GROUP (kt_window (app)), "play", NULL);
  assert_true (kt_wait (is_playing_on, &from, 3000));
  kt_picture ("playing");
  g_action_group_activate_action (G_ACTION_GROUP (kt_window (app)), "play", NULL);
  from = kh_session_get_played_tick (session_of ());
  kt_settle (300);
  assert_int_equal (kh_session_get_played_tick (session_of ()), from);
}

static KhVec seen_at (double x_mm, double y_mm)
{
  KhVec at;
  kh_canvas_locate (KH_CANVAS (kh_window_get_canvas (kt_window (app))), (KhVec){ x_mm, y_mm }, &at.x, &at.y);
  return at;
}

/* The wheel zooms about the pointer; middle drag and space-drag move the paper; a key shows all again. */
static void test_view (void **state)
{
  double p = pitch_mm ();
  kt_keys ("ctrl+0");
  KhVec pointed = seen_at (2 * p, 2 * p), far = seen_at (0, 0);
  kt_point (kt_window (app), 2 * p, 2 * p);
  kt_x ("click 4");
  kt_x ("click 4");
  KhVec pointed_after = seen_at (2 * p, 2 * p), far_after = seen_at (0, 0);
  assert_true (ABS (pointed_after.x - pointed.x) < 2 && ABS (pointed_after.y - pointed.y) < 2);
  double grown = (pointed_after.x - far_after.x) / (pointed.x - far.x);
  assert_true (grown > 1.3 && grown < 1.6); /* twice 1.2, snapped to whole pixels of wall */

  int walls = kh_plan_n_walls (plan_of ());
  KhVec before = seen_at (2 * p, 2 * p);
  kt_drag (kt_window (app), 2 * p, 2 * p, 2.5 * p, 2 * p, 2);
  assert_true (seen_at (2 * p, 2 * p).x > before.x + 20);
  before = seen_at (2 * p, 2 * p);
  kt_x ("keydown space");
  kt_drag (kt_window (app), 2 * p, 2 * p, 2 * p, 2.5 * p, 1);
  kt_x ("keyup space");
  assert_true (seen_at (2 * p, 2 * p).y < before.y - 20);
  assert_int_equal (kh_plan_n_walls (plan_of ()), walls);
  kt_keys ("ctrl+0");
  assert_true (ABS (seen_at (0, 0).x - far.x) < 1);
}

static GtkWidget *open_menu (void)
{
  for (GtkWidget *child = gtk_widget_get_first_child (gtk_widget_get_parent (kh_window_get_canvas (kt_window (app))));
       child != NULL; child = gtk_widget_get_next_sibling (child))
    if (GTK_IS_POPOVER_MENU (child) && gtk_widget_get_mapped (child))
      return child;
  return NULL;
}

/* A secondary click, and the Menu key: what is there can be done from the menu, as one step. */
static void test_menu_of_a_place (void **state)
{
  double p = pitch_mm ();
  guint marks = plan_of ()->marks->len;
  int walls = kh_plan_n_walls (plan_of ());
  kt_click (kt_window (app), 1.5 * p, 1.5 * p, 3);
  kt_settle (300);
  kt_picture ("menu");
  assert_non_null (open_menu ());
  g_action_group_activate_action (G_ACTION_GROUP (kt_window (app)), "place-mark", g_variant_new_boolean (TRUE));
  assert_int_equal (plan_of ()->marks->len, marks + 1);
  assert_int_equal (kh_plan_n_walls (plan_of ()), walls);
  kt_keys ("Escape");
  kt_settle (300);
  assert_null (open_menu ());
  kt_keys ("ctrl+z");
  assert_int_equal (plan_of ()->marks->len, marks);
  kh_canvas_grab_cursor (KH_CANVAS (kh_window_get_canvas (kt_window (app))));
  kt_keys ("shift+F10");
  kt_settle (300);
  assert_non_null (open_menu ());
  kt_keys ("Escape");
  kt_settle (300);
}

/* F6 goes round: header, tools, canvas, strip, bench, and comes back. */
static void test_regions (void **state)
{
  GtkWindow *window = GTK_WINDOW (kt_window (app));
  GtkWidget *canvas = kh_window_get_canvas (kt_window (app));
  kh_canvas_grab_cursor (KH_CANVAS (canvas));
  g_autoptr (GHashTable) stops = g_hash_table_new (NULL, NULL);
  for (int i = 0; i < 5; i++)
    {
      kt_keys ("F6");
      GtkWidget *focus = gtk_window_get_focus (window);
      assert_non_null (focus);
      g_hash_table_add (stops, focus);
    }
  assert_int_equal (g_hash_table_size (stops), 5);
  assert_true (gtk_widget_is_ancestor (gtk_window_get_focus (window), canvas));
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (test_walls),          cmocka_unit_test (test_escape),
    cmocka_unit_test (test_mark_and_start), cmocka_unit_test (test_leak_is_found),
    cmocka_unit_test (test_keyboard),       cmocka_unit_test (test_save_and_open_again),
    cmocka_unit_test (test_view),           cmocka_unit_test (test_menu_of_a_place),
    cmocka_unit_test (test_regions),        cmocka_unit_test (test_play),
  };
  return cmocka_run_group_tests (tests, start_app, stop_app);
}
