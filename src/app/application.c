/* SPDX-License-Identifier: MIT */
#include "app/application.h"

#include "app/recovery.h"
#include "app/scheme.h"
#include "app/settings.h"
#include "app/windowprivate.h"
#include "config.h"
#include "files/examples.h"
#include "files/planfile.h"
#include <glib-unix.h>
#include <glib/gi18n-lib.h>

struct _KhApplication
{
  GtkApplication parent_instance;
  gboolean quitting;
  guint signals[3];
};

G_DEFINE_FINAL_TYPE (KhApplication, kh_application, GTK_TYPE_APPLICATION)

/* ---- windows ---- */

static GList *windows_of (KhApplication *self) { return gtk_application_get_windows (GTK_APPLICATION (self)); }

/* Dialogs are in that list, too. */
static KhWindow *first_window (KhApplication *self)
{
  for (GList *item = windows_of (self); item != NULL; item = item->next)
    if (KH_IS_WINDOW (item->data))
      return item->data;
  return NULL;
}

static KhWindow *window_with_path (KhApplication *self, const char *path)
{
  for (GList *item = windows_of (self); item != NULL; item = item->next)
    if (KH_IS_WINDOW (item->data) && g_strcmp0 (kh_session_get_path (kh_window_get_session (item->data)), path) == 0)
      return item->data;
  return NULL;
}

static KhWindow *show_session_take (KhApplication *self, KhSession *session, KhWindow *near)
{
  KhWindow *window = near;
  if (window != NULL && kh_window_is_untouched (window))
    kh_window_set_session_take (window, session);
  else
    window = kh_window_new_take (GTK_APPLICATION (self), session);
  gtk_window_present (GTK_WINDOW (window));
  return window;
}

void kh_application_show_session_take (KhWindow *near, KhSession *session)
{
  show_session_take (KH_APPLICATION (gtk_window_get_application (GTK_WINDOW (near))), session, near);
}

static void new_empty_window (KhApplication *self)
{
  KhPlan *plan = kh_plan_new (6, 4, 180 * KH_NM_PER_MM, 12 * KH_NM_PER_MM, 50 * KH_NM_PER_MM);
  show_session_take (self, kh_session_new_take (plan), NULL);
}

/* ---- opening ---- */

typedef struct
{
  char *path; /* or, for an example, its name: it has no file, saving asks where to */
  KhPlan *plan;
  GPtrArray *faults;
  KhWindow *near; /* weak */
  gboolean is_example;
  gboolean quietly; /* a plan that is gone is no message: the last one, at the start */
} Opening;

static void opening_free (Opening *opening)
{
  g_clear_pointer (&opening->plan, kh_plan_free);
  g_clear_pointer (&opening->faults, g_ptr_array_unref);
  g_clear_weak_pointer (&opening->near);
  g_free (opening->path);
  g_free (opening);
}

static void load_thread (GTask *task, gpointer source, gpointer data, GCancellable *cancellable)
{
  Opening *opening = data;
  g_autofree char *text = opening->is_example ? kh_example_dup_text (opening->path) : NULL;
  if (text != NULL)
    opening->plan = kh_plan_file_parse (text, strlen (text), opening->path, &opening->faults);
  else
    opening->plan = kh_plan_file_load (opening->path, &opening->faults);
  g_task_return_boolean (task, opening->plan != NULL);
}

static void tell_faults (KhApplication *self, const Opening *opening)
{
  GString *text = g_string_new (NULL);
  g_autofree char *name = g_filename_display_basename (opening->path);
  g_autofree char *heading = g_strdup_printf (_ ("%s could not be opened."), name);
  for (guint i = 0; opening->faults != NULL && i < opening->faults->len; i++)
    g_string_append_printf (text, "%s%s", i > 0 ? "\n\n" : "", (char *)g_ptr_array_index (opening->faults, i));
  if (first_window (self) == NULL)
    new_empty_window (self);
  KhWindow *parent = opening->near != NULL ? opening->near : first_window (self);
  kh_window_tell (GTK_WINDOW (parent), heading, text->str);
  g_string_free (text, TRUE);
}

void kh_application_remember_path (const char *path)
{
  g_autoptr (GFile) file = g_file_new_for_path (path);
  g_autofree char *uri = g_file_get_uri (file);
  GtkRecentData data = {
    .mime_type = (char *)"application/vnd.kerfhand.mazeplan+json",
    .app_name = (char *)"Kerfhand",
    .app_exec = (char *)"kerfhand %f",
  };
  gtk_recent_manager_add_full (gtk_recent_manager_get_default (), uri, &data);
  if (g_utf8_validate (path, -1, NULL))
    kh_settings_set_string ("last-plan", path);
}

static void open_example (KhApplication *self, const char *name, KhWindow *near);

static void loaded_cb (GObject *source, GAsyncResult *result, gpointer data)
{
  KhApplication *self = KH_APPLICATION (source);
  Opening *opening = g_task_get_task_data (G_TASK (result));
  if (opening->plan == NULL)
    {
      if (opening->quietly && !g_file_test (opening->path, G_FILE_TEST_EXISTS))
        open_example (self, KH_EXAMPLE_FIRST, NULL);
      else
        tell_faults (self, opening);
    }
  else
    {
      KhSession *session = kh_session_new_take (g_steal_pointer (&opening->plan));
      if (!opening->is_example)
        {
          kh_session_set_file (session, opening->path);
          kh_application_remember_path (opening->path);
        }
      show_session_take (self, session, opening->near);
    }
  g_application_release (G_APPLICATION (self));
}

static void load (KhApplication *self, Opening *opening)
{
  g_autoptr (GTask) task = g_task_new (self, NULL, loaded_cb, NULL);
  g_task_set_task_data (task, opening, (GDestroyNotify)opening_free);
  g_application_hold (G_APPLICATION (self)); /* until the window stands */
  g_task_run_in_thread (task, load_thread);
}

void kh_application_open_path (KhApplication *self, const char *path, KhWindow *near)
{
  g_autofree char *whole = g_canonicalize_filename (path, NULL);
  KhWindow *shown = window_with_path (self, whole);
  if (shown != NULL)
    {
      gtk_window_present (GTK_WINDOW (shown));
      return;
    }
  Opening *opening = g_new0 (Opening, 1);
  opening->path = g_steal_pointer (&whole);
  g_set_weak_pointer (&opening->near, near);
  load (self, opening);
}

static void open_example (KhApplication *self, const char *name, KhWindow *near)
{
  Opening *opening = g_new0 (Opening, 1);
  opening->path = g_strdup (name);
  opening->is_example = TRUE;
  g_set_weak_pointer (&opening->near, near);
  load (self, opening);
}

/* ---- recovery ---- */

static void show_recovered (KhApplication *self, KhRecovered *recovered)
{
  /* over the saved plan as one step, so that there is a way back to it */
  GPtrArray *faults = NULL;
  KhPlan *base = recovered->path != NULL ? kh_plan_file_load (recovered->path, &faults) : NULL;
  gboolean has_file = base != NULL;
  g_clear_pointer (&faults, g_ptr_array_unref);
  if (base == NULL)
    base = kh_plan_new (recovered->plan->lattice.columns, recovered->plan->lattice.rows,
                        recovered->plan->lattice.pitch_nm, recovered->plan->walls.thickness_nm,
                        recovered->plan->walls.height_nm);
  KhSession *session = kh_session_new_take (base);
  if (has_file)
    kh_session_set_file (session, recovered->path);
  kh_session_do_take (session, kh_change_new_plan (recovered->plan), _ ("Plan recovered"));
  KhWindow *window = show_session_take (self, session, NULL);
  if (!kh_session_is_saved (session))
    {
      kh_window_say_recovered (window);
      kh_window_save_recovery (window);
    }
  kh_recovered_forget (recovered);
}

static gboolean recover (KhApplication *self)
{
  g_autoptr (GPtrArray) left = kh_recovery_find_left ();
  for (guint i = 0; i < left->len; i++)
    show_recovered (self, g_ptr_array_index (left, i));
  return left->len > 0;
}

/* Killed: what is not saved is kept for the next start, nobody is asked. */
static gboolean killed_cb (gpointer data)
{
  KhApplication *self = data;
  for (GList *item = windows_of (self); item != NULL; item = item->next)
    if (KH_IS_WINDOW (item->data))
      kh_window_save_recovery (item->data);
  g_application_quit (G_APPLICATION (self));
  return G_SOURCE_CONTINUE;
}

/* ---- commands ---- */

static void quit_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  KhApplication *self = data;
  self->quitting = TRUE;
  if (first_window (self) != NULL)
    gtk_window_close (GTK_WINDOW (first_window (self)));
}

void kh_application_stop_quitting (KhApplication *self) { self->quitting = FALSE; }

/* One after the other: the next window asks once the one before was answered. */
static void window_removed_cb (KhApplication *self, GtkWindow *window)
{
  if (self->quitting && KH_IS_WINDOW (window) && first_window (self) != NULL)
    gtk_window_close (GTK_WINDOW (first_window (self)));
}

static void about_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  gtk_show_about_dialog (gtk_application_get_active_window (data), "program-name", "Kerfhand", "version", KH_VERSION,
                         "logo-icon-name", KH_APP_ID, "comments",
                         _ ("Practice mazes from boards for robots that follow a wall: drawn, tried, cut."),
                         "license-type", GTK_LICENSE_MIT_X11, NULL);
}

static void help_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  gtk_show_uri (gtk_application_get_active_window (data), "help:kerfhand", GDK_CURRENT_TIME);
}

static void example_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  GtkWindow *active = gtk_application_get_active_window (data);
  g_auto (GStrv) names = kh_example_dup_names ();
  const char *name = g_variant_get_string (target, NULL);
  if (g_strv_contains ((const char *const *)names, name))
    open_example (data, name, KH_IS_WINDOW (active) ? KH_WINDOW (active) : NULL);
}

static void set_units_cb (GSimpleAction *action, GVariant *state, gpointer data)
{
  kh_settings_set_string ("units", g_variant_get_string (state, NULL));
  g_simple_action_set_state (action, state);
  for (GList *item = windows_of (data); item != NULL; item = item->next)
    if (KH_IS_WINDOW (item->data))
      kh_window_update (item->data);
}

static void set_scheme_cb (GSimpleAction *action, GVariant *state, gpointer data)
{
  kh_scheme_choose (g_variant_get_string (state, NULL));
  g_simple_action_set_state (action, state);
}

static const GActionEntry entries[] = {
  { "quit", quit_cb },
  { "about", about_cb },
  { "help", help_cb },
  { "example", example_cb, "s" },
  { "units", NULL, "s", "'mm'", set_units_cb },
  { "scheme", NULL, "s", "'follow'", set_scheme_cb },
};

static void set_state_from_settings (KhApplication *self, const char *action, const char *fallback)
{
  g_autofree char *value = kh_settings_dup_string (action, fallback);
  g_simple_action_set_state (G_SIMPLE_ACTION (g_action_map_lookup_action (G_ACTION_MAP (self), action)),
                             g_variant_new_string (value));
}

/* The examples under their own titles, for every window's menus. */
GMenuModel *kh_application_get_examples (void)
{
  static GMenu *menu;
  if (menu != NULL)
    return G_MENU_MODEL (menu);
  g_auto (GStrv) names = kh_example_dup_names ();
  menu = g_menu_new ();
  for (int i = 0; names[i] != NULL; i++)
    {
      g_autofree char *text = kh_example_dup_text (names[i]);
      GPtrArray *faults = NULL;
      g_autoptr (KhPlan) plan = text != NULL ? kh_plan_file_parse (text, strlen (text), names[i], &faults) : NULL;
      g_autoptr (GMenuItem) item = g_menu_item_new (plan != NULL ? plan->title : names[i], NULL);
      g_clear_pointer (&faults, g_ptr_array_unref);
      g_menu_item_set_action_and_target (item, "app.example", "s", names[i]);
      g_menu_append_item (menu, item);
    }
  return G_MENU_MODEL (menu);
}

/* ---- life ---- */

static void startup (GApplication *application)
{
  static const int numbers[] = { SIGTERM, SIGINT, SIGHUP };
  KhApplication *self = KH_APPLICATION (application);
  G_APPLICATION_CLASS (kh_application_parent_class)->startup (application);
  g_set_application_name ("Kerfhand");
  gtk_window_set_default_icon_name (KH_APP_ID);
  kh_scheme_start ();
  g_action_map_add_action_entries (G_ACTION_MAP (self), entries, G_N_ELEMENTS (entries), self);
  set_state_from_settings (self, "units", "mm");
  set_state_from_settings (self, "scheme", "follow");
  kh_window_set_accels (GTK_APPLICATION (self));
  for (int i = 0; i < 3; i++)
    self->signals[i] = g_unix_signal_add (numbers[i], killed_cb, self);
  g_signal_connect (self, "window-removed", G_CALLBACK (window_removed_cb), NULL);
}

static void shutdown (GApplication *application)
{
  KhApplication *self = KH_APPLICATION (application);
  for (int i = 0; i < 3; i++)
    g_clear_handle_id (&self->signals[i], g_source_remove);
  G_APPLICATION_CLASS (kh_application_parent_class)->shutdown (application);
}

static void activate (GApplication *application)
{
  KhApplication *self = KH_APPLICATION (application);
  if (first_window (self) != NULL)
    {
      gtk_window_present (GTK_WINDOW (first_window (self)));
      return;
    }
  if (recover (self))
    return;
  g_autofree char *last = kh_settings_dup_string ("last-plan", "");
  if (*last != '\0')
    {
      Opening *opening = g_new0 (Opening, 1);
      opening->path = g_strdup (last);
      opening->quietly = TRUE;
      load (self, opening);
    }
  else
    open_example (self, KH_EXAMPLE_FIRST, NULL);
}

static void open_files (GApplication *application, GFile **files, int n, const char *hint)
{
  KhApplication *self = KH_APPLICATION (application);
  if (first_window (self) == NULL)
    recover (self);
  for (int i = 0; i < n; i++)
    {
      g_autofree char *path = g_file_get_path (files[i]);
      if (path != NULL)
        kh_application_open_path (self, path, NULL);
    }
}

static void kh_application_class_init (KhApplicationClass *class)
{
  G_APPLICATION_CLASS (class)->startup = startup;
  G_APPLICATION_CLASS (class)->shutdown = shutdown;
  G_APPLICATION_CLASS (class)->activate = activate;
  G_APPLICATION_CLASS (class)->open = open_files;
}

static void kh_application_init (KhApplication *self)
{
  g_application_set_option_context_parameter_string (G_APPLICATION (self), _ ("[PLAN…]"));
  g_application_set_option_context_summary (
      G_APPLICATION (self), _ ("Draw practice mazes for wall-following robots, try them, cut them.\n"
                               "Without a plan it opens the last one, or an example on the first start."));
}

KhApplication *kh_application_new (void)
{
  return g_object_new (KH_TYPE_APPLICATION, "application-id", KH_APP_ID, "flags", G_APPLICATION_HANDLES_OPEN,
                       "resource-base-path", "/org/kerfhand/Kerfhand", NULL);
}
