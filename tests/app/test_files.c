/* SPDX-License-Identifier: MIT */
#include "driver.h"

#include "files/planfile.h"
#include <glib/gstdio.h>

/* Files that are faulty, changed meanwhile, not saved: one clear question or
 * message each, and nothing lost.  With the window's own keys. */

static KhApplication *app;

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

static KhSession *session_of (void) { return kh_window_get_session (kt_window (app)); }

static char *dup_path (const char *name) { return g_build_filename (g_getenv ("TEST_FOLDER"), name, NULL); }

static void write_text (const char *path, const char *text)
{
  g_autoptr (GError) error = NULL;
  if (!g_file_set_contents (path, text, -1, &error))
    fail_msg ("%s", error->message);
}

/* The dialog over the windows: its words, all labels in one. */
static void add_words (GtkWidget *widget, GString *words)
{
  if (GTK_IS_LABEL (widget))
    g_string_append_printf (words, "%s\n", gtk_label_get_text (GTK_LABEL (widget)));
  for (GtkWidget *child = gtk_widget_get_first_child (widget); child; child = gtk_widget_get_next_sibling (child))
    add_words (child, words);
}

static GtkWindow *dialog_of (void)
{
  g_autoptr (GListModel) tops = g_object_ref (gtk_window_get_toplevels ());
  for (guint i = 0; i < g_list_model_get_n_items (tops); i++)
    {
      g_autoptr (GtkWindow) window = g_list_model_get_item (tops, i);
      if (GTK_IS_MESSAGE_DIALOG (window) && gtk_widget_get_mapped (GTK_WIDGET (window)))
        return window;
    }
  return NULL;
}

static gboolean has_dialog (gpointer data) { return dialog_of () != NULL; }

static gboolean is_answered (gpointer dialog) { return dialog_of () != dialog; }

static char *dup_dialog_words (void)
{
  GString *words = g_string_new (NULL);
  assert_true (kt_wait (has_dialog, NULL, 3000));
  add_words (GTK_WIDGET (dialog_of ()), words);
  return g_string_free (words, FALSE);
}

static void answer (int response)
{
  GtkWindow *dialog = dialog_of ();
  gtk_dialog_response (GTK_DIALOG (dialog), response);
  assert_true (kt_wait (is_answered, dialog, 2000));
}

static gboolean shows_path (gpointer path)
{
  KhWindow *window = kt_window (app);
  return window != NULL && g_strcmp0 (kh_session_get_path (kh_window_get_session (window)), path) == 0;
}

static void open_plan (const char *path)
{
  g_autoptr (KhPlan) plan = kh_plan_new (3, 2, 180 * KH_NM_PER_MM, 12 * KH_NM_PER_MM, 50 * KH_NM_PER_MM);
  g_autofree char *text = kh_plan_file_dup_text (plan);
  write_text (path, text);
  kh_window_set_session_take (kt_window (app), kh_session_new_take (kh_plan_copy (plan)));
  kh_application_open_path (app, path, kt_window (app));
  assert_true (kt_wait (shows_path, (gpointer)path, 3000));
  kt_settle (100);
  kt_focus_window ("Kerfhand");
}

static void lay_a_wall (void)
{
  int before = kh_plan_n_walls (kh_session_get_plan (session_of ()));
  kt_drag (kt_window (app), 180, 0, 180, 180, 1);
  assert_int_equal (kh_plan_n_walls (kh_session_get_plan (session_of ())), before + 1);
}

static void faulty_files_are_told_and_nothing_is_lost (void **state)
{
  static const struct
  {
    const char *text, *words;
  } cases[] = {
    { "{\"kind\": \"kerfhand maze plan\", \"version\": 1, \"lattice\": {\"columns\": 9999, \"rows\": 3, \"pitch_mm\": "
      "1}}",
      "columns" },
    { "{\"kind\": \"kerfhand maze plan\", \"version\": 99}", "newer" },
    { "{ not json", "line 1" },
    { "", "faulty" },
  };
  const KhPlan *plan = kh_session_get_plan (session_of ());
  g_autoptr (KhPlan) before = kh_plan_copy (plan);
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      g_autofree char *path = dup_path ("faulty.mazeplan");
      write_text (path, cases[i].text);
      kh_application_open_path (app, path, kt_window (app));
      g_autofree char *words = dup_dialog_words ();
      assert_non_null (strstr (words, cases[i].words));
      if (i == 0) /* every fault, not the first only */
        assert_non_null (strstr (words, "pitch_mm"));
      answer (GTK_RESPONSE_CLOSE);
      assert_true (kh_plan_equal (before, kh_session_get_plan (session_of ())));
    }
  /* a folder, and what is not there */
  kh_application_open_path (app, g_getenv ("TEST_FOLDER"), kt_window (app));
  g_autofree char *folder_words = dup_dialog_words ();
  assert_non_null (strstr (folder_words, "folder"));
  answer (GTK_RESPONSE_CLOSE);
  kh_application_open_path (app, "/nowhere/at-all.mazeplan", kt_window (app));
  g_autofree char *nowhere_words = dup_dialog_words ();
  assert_non_null (strstr (nowhere_words, "at-all.mazeplan"));
  answer (GTK_RESPONSE_CLOSE);
}

static void a_file_changed_meanwhile_is_asked_about (void **state)
{
  g_autofree char *path = dup_path ("meanwhile.mazeplan");
  g_autofree char *on_disk = NULL;
  open_plan (path);
  lay_a_wall ();
  write_text (path, "another program was here\n");
  kt_keys ("ctrl+s");
  g_autofree char *words = dup_dialog_words ();
  assert_non_null (strstr (words, "Another program"));
  kt_picture ("changed-meanwhile");
  answer (GTK_RESPONSE_CANCEL);
  assert_true (g_file_get_contents (path, &on_disk, NULL, NULL));
  assert_string_equal (on_disk, "another program was here\n");
  assert_false (kh_session_is_saved (session_of ()));

  kt_focus_window ("Kerfhand");
  kt_keys ("ctrl+s");
  g_free (dup_dialog_words ());
  answer (GTK_RESPONSE_ACCEPT);
  assert_true (kh_session_is_saved (session_of ()));
  g_autofree char *text = kh_plan_file_dup_text (kh_session_get_plan (session_of ()));
  g_free (on_disk);
  assert_true (g_file_get_contents (path, &on_disk, NULL, NULL));
  assert_string_equal (on_disk, text);
}

static void a_file_that_cannot_be_written_is_told (void **state)
{
  g_autofree char *folder = dup_path ("gone");
  g_autofree char *path = g_build_filename (folder, "plan.mazeplan", NULL);
  g_mkdir (folder, 0700);
  open_plan (path);
  lay_a_wall ();
  g_unlink (path);
  g_rmdir (folder);
  kt_keys ("ctrl+s");
  g_autofree char *words = dup_dialog_words ();
  if (strstr (words, "Another program")) /* gone is changed, too: save over it, then */
    {
      answer (GTK_RESPONSE_ACCEPT);
      g_free (words);
      words = dup_dialog_words ();
    }
  assert_non_null (strstr (words, "could not be saved"));
  answer (GTK_RESPONSE_CLOSE);
  assert_false (kh_session_is_saved (session_of ()));
}

static gboolean is_gone (gpointer window)
{
  for (GList *item = gtk_application_get_windows (GTK_APPLICATION (app)); item != NULL; item = item->next)
    if (item->data == window)
      return FALSE;
  return TRUE;
}

static void closing_asks_once (void **state)
{
  g_autofree char *path = dup_path ("closing.mazeplan");
  g_autofree char *before = NULL, *after = NULL;
  open_plan (path);
  assert_true (g_file_get_contents (path, &before, NULL, NULL));
  lay_a_wall ();
  KhWindow *window = kt_window (app);
  g_application_hold (G_APPLICATION (app));

  kt_keys ("ctrl+w");
  g_autofree char *words = dup_dialog_words ();
  assert_non_null (strstr (words, "closing.mazeplan"));
  answer (GTK_RESPONSE_CANCEL);
  assert_false (is_gone (window));
  assert_false (kh_session_is_saved (session_of ()));

  kt_focus_window ("Kerfhand");
  kt_keys ("ctrl+w");
  g_free (dup_dialog_words ());
  answer (GTK_RESPONSE_ACCEPT);
  assert_true (kt_wait (is_gone, window, 2000));
  assert_true (g_file_get_contents (path, &after, NULL, NULL));
  assert_string_not_equal (before, after);

  /* and discard leaves the file alone */
  g_application_activate (G_APPLICATION (app));
  assert_true (kt_wait (shows_path, path, 3000)); /* the last plan comes back */
  kt_settle (200);
  kt_focus_window ("Kerfhand");
  window = kt_window (app);
  kt_keys ("ctrl+z");
  kt_drag (window, 360, 0, 360, 180, 1);
  kt_keys ("ctrl+w");
  g_free (dup_dialog_words ());
  answer (GTK_RESPONSE_NO);
  assert_true (kt_wait (is_gone, window, 2000));
  g_autofree char *last = NULL;
  assert_true (g_file_get_contents (path, &last, NULL, NULL));
  assert_string_equal (after, last);
  g_application_activate (G_APPLICATION (app));
  assert_true (kt_wait (shows_path, path, 3000));
}

/* A number that cannot be: marked in its place, no plan begun. */
static void a_new_plan_is_checked (void **state)
{
  g_autofree char *path = dup_path ("new.mazeplan");
  open_plan (path);
  kt_keys ("ctrl+n");
  kt_focus_window ("New Plan");
  kt_keys ("ctrl+a 5 Tab ctrl+a 3 Tab ctrl+a 1 0 0 Return"); /* a board of 100 mm at a pitch of 180 */
  kt_picture ("new-faulty");
  assert_true (shows_path (path));
  assert_int_equal (kh_session_get_plan (session_of ())->lattice.columns, 3);
  kt_keys ("ctrl+a 1 2 Return");
  kt_settle (300);
  KhWindow *window = NULL;
  for (GList *item = gtk_application_get_windows (GTK_APPLICATION (app)); item != NULL; item = item->next)
    if (KH_IS_WINDOW (item->data) && kh_session_get_path (kh_window_get_session (item->data)) == NULL)
      window = item->data;
  assert_non_null (window);
  const KhPlan *plan = kh_session_get_plan (kh_window_get_session (window));
  assert_int_equal (plan->lattice.columns, 5);
  assert_int_equal (plan->lattice.rows, 3);
  assert_int_equal (plan->walls.thickness_nm, 12 * KH_NM_PER_MM);
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (faulty_files_are_told_and_nothing_is_lost),
    cmocka_unit_test (a_file_changed_meanwhile_is_asked_about),
    cmocka_unit_test (a_file_that_cannot_be_written_is_told),
    cmocka_unit_test (closing_asks_once),
    cmocka_unit_test (a_new_plan_is_checked),
  };
  return cmocka_run_group_tests (tests, start_app, stop_app);
}
