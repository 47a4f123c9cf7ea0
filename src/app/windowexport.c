/* SPDX-License-Identifier: MIT */
#include "app/windowprivate.h"

#include "draw/export.h"
#include "files/store.h"
#include "files/tables.h"
#include <glib/gi18n-lib.h>

/* Choosing where to write, and what is written besides the plan's own file:
 * pictures of the plan, the cut list as a table. */

/* ---- a path, with its ending, not overwritten without asking ---- */

typedef struct
{
  KhWindow *self;
  GtkFileChooserNative *chooser;
  char *ending;
  char *path;
  KhWithPath with_path;
  gpointer data;
} Choosing;

static void end_choosing (Choosing *choosing, gboolean chosen)
{
  choosing->with_path (choosing->self, chosen ? choosing->path : NULL, choosing->data);
  g_object_unref (choosing->chooser);
  g_object_unref (choosing->self);
  g_free (choosing->ending);
  g_free (choosing->path);
  g_free (choosing);
}

static void overwrite_response_cb (GtkDialog *dialog, int response, Choosing *choosing)
{
  gtk_window_set_transient_for (GTK_WINDOW (dialog), NULL);
  gtk_window_destroy (GTK_WINDOW (dialog));
  end_choosing (choosing, response == GTK_RESPONSE_ACCEPT);
}

/* The chooser asked about the name as it was typed; with the ending it may be another file. */
static void ask_overwrite (Choosing *choosing)
{
  g_autofree char *name = g_filename_display_basename (choosing->path);
  GtkWidget *dialog = gtk_message_dialog_new (
      GTK_WINDOW (choosing->self), GTK_DIALOG_MODAL | GTK_DIALOG_DESTROY_WITH_PARENT, GTK_MESSAGE_QUESTION,
      GTK_BUTTONS_NONE, _ ("A file named %s is there already. Write over it?"), name);
  gtk_dialog_add_buttons (GTK_DIALOG (dialog), _ ("Cancel"), GTK_RESPONSE_CANCEL, _ ("Write Over It"),
                          GTK_RESPONSE_ACCEPT, NULL);
  gtk_dialog_set_default_response (GTK_DIALOG (dialog), GTK_RESPONSE_CANCEL);
  g_signal_connect (dialog, "response", G_CALLBACK (overwrite_response_cb), choosing);
  gtk_window_present (GTK_WINDOW (dialog));
}

static gboolean has_ending (const char *path, const char *endings)
{
  g_auto (GStrv) list = g_strsplit (endings, " ", -1);
  g_autofree char *lower = g_ascii_strdown (path, -1);
  for (int i = 0; list[i] != NULL; i++)
    if (g_str_has_suffix (lower, list[i]))
      return TRUE;
  return FALSE;
}

static void chosen_cb (GtkNativeDialog *dialog, int response, Choosing *choosing)
{
  g_autoptr (GFile) file = NULL;
  if (response == GTK_RESPONSE_ACCEPT)
    file = gtk_file_chooser_get_file (GTK_FILE_CHOOSER (dialog));
  choosing->path = file != NULL ? g_file_get_path (file) : NULL;
  if (file != NULL && choosing->path == NULL)
    kh_window_tell (GTK_WINDOW (choosing->self), _ ("Kerfhand writes files on this computer only."),
                    _ ("Choose a folder of this computer."));
  if (choosing->path == NULL)
    {
      end_choosing (choosing, FALSE);
      return;
    }
  if (has_ending (choosing->path, choosing->ending))
    {
      end_choosing (choosing, TRUE);
      return;
    }
  g_auto (GStrv) endings = g_strsplit (choosing->ending, " ", 2);
  char *whole = g_strconcat (choosing->path, endings[0], NULL);
  g_free (choosing->path);
  choosing->path = whole;
  if (g_file_test (whole, G_FILE_TEST_EXISTS))
    ask_overwrite (choosing);
  else
    end_choosing (choosing, TRUE);
}

void kh_window_choose_path (KhWindow *self, GtkFileChooserNative *chooser, const char *ending, KhWithPath with_path,
                            gpointer data)
{
  Choosing *choosing = g_new0 (Choosing, 1);
  choosing->self = g_object_ref (self);
  choosing->chooser = chooser;
  choosing->ending = g_strdup (ending);
  choosing->with_path = with_path;
  choosing->data = data;
  gtk_native_dialog_set_modal (GTK_NATIVE_DIALOG (chooser), TRUE);
  g_signal_connect (chooser, "response", G_CALLBACK (chosen_cb), choosing);
  gtk_native_dialog_show (GTK_NATIVE_DIALOG (chooser));
}

static GtkFileChooserNative *new_save_chooser (KhWindow *self, const char *title, const char *ending)
{
  GtkFileChooserNative *chooser
      = gtk_file_chooser_native_new (title, GTK_WINDOW (self), GTK_FILE_CHOOSER_ACTION_SAVE, NULL, NULL);
  const char *path = kh_session_get_path (self->session);
  g_autofree char *plan_name = kh_window_dup_file_name (self);
  char *dot = strrchr (plan_name, '.');
  if (dot != NULL && dot != plan_name)
    *dot = '\0';
  g_autofree char *name = g_strconcat (plan_name, ending, NULL);
  if (path != NULL)
    {
      g_autofree char *folder = g_path_get_dirname (path);
      g_autoptr (GFile) file = g_file_new_for_path (folder);
      gtk_file_chooser_set_current_folder (GTK_FILE_CHOOSER (chooser), file, NULL);
    }
  gtk_file_chooser_set_current_name (GTK_FILE_CHOOSER (chooser), name);
  return chooser;
}

/* ---- pictures of the plan, drawn and written by another thread ---- */

typedef struct
{
  KhPlan *plan;
  char *path;
} Drawing;

static void drawing_free (Drawing *drawing)
{
  kh_plan_free (drawing->plan);
  g_free (drawing->path);
  g_free (drawing);
}

static void draw_thread (GTask *task, gpointer source, gpointer data, GCancellable *cancellable)
{
  Drawing *drawing = data;
  GError *error = NULL;
  KhExportKind kind = KH_EXPORT_PDF;
  KhReviewSettings settings;
  kh_export_kind_from_path (drawing->path, &kind);
  kh_review_settings_init (&settings, drawing->plan);
  g_autoptr (KhReview) review = kh_review_new (drawing->plan, &settings, NULL);
  g_autoptr (GBytes) bytes = kh_export (kind, KH_EXPORT_WHAT_PLAN, drawing->plan, review, 2000, &error);
  gsize n = 0;
  const char *start = bytes != NULL ? g_bytes_get_data (bytes, &n) : NULL;
  if (bytes == NULL || !kh_store_save (drawing->path, start, n, NULL, &error))
    g_task_return_error (task, error);
  else
    g_task_return_boolean (task, TRUE);
}

static void say_written (KhWindow *self, const char *path)
{
  g_autofree char *name = g_filename_display_name (path);
  g_autofree char *text = g_strdup_printf (_ ("Written: %s"), name);
  kh_window_say (self, text, FALSE);
}

static void drawn_cb (GObject *source, GAsyncResult *result, gpointer data)
{
  KhWindow *self = KH_WINDOW (source);
  g_autoptr (GError) error = NULL;
  const Drawing *drawing = g_task_get_task_data (G_TASK (result));
  if (self->session == NULL)
    return; /* closed meanwhile */
  if (!g_task_propagate_boolean (G_TASK (result), &error))
    kh_window_tell (GTK_WINDOW (self), _ ("The picture could not be written."), error->message);
  else
    say_written (self, drawing->path);
}

static void export_plan_path_cb (KhWindow *self, const char *path, gpointer data)
{
  if (path == NULL)
    return;
  Drawing *drawing = g_new0 (Drawing, 1);
  drawing->plan = kh_plan_copy (kh_session_get_plan (self->session));
  drawing->path = g_strdup (path);
  GTask *task = g_task_new (self, NULL, drawn_cb, NULL);
  g_task_set_task_data (task, drawing, (GDestroyNotify)drawing_free);
  g_task_run_in_thread (task, draw_thread);
  g_object_unref (task);
}

void kh_window_ask_export_plan (KhWindow *self)
{
  kh_window_take_typed (self);
  GtkFileChooserNative *chooser = new_save_chooser (self, _ ("Export Plan as PDF, SVG or PNG"), ".pdf");
  static const char *const endings[] = { "pdf", "svg", "png" };
  const char *const names[] = { _ ("PDF, to scale on a page"), _ ("SVG, true size"), _ ("PNG, a picture") };
  for (int i = 0; i < 3; i++)
    {
      g_autoptr (GtkFileFilter) filter = gtk_file_filter_new ();
      gtk_file_filter_set_name (filter, names[i]);
      gtk_file_filter_add_suffix (filter, endings[i]);
      gtk_file_chooser_add_filter (GTK_FILE_CHOOSER (chooser), filter);
    }
  kh_window_choose_path (self, chooser, ".pdf .svg .png", export_plan_path_cb, NULL);
}

/* ---- cut list ---- */

static void export_cut_list_path_cb (KhWindow *self, const char *path, gpointer data)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  g_autoptr (GError) error = NULL;
  if (path == NULL)
    return;
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, &error);
  g_autofree char *text = list != NULL ? kh_table_dup_cutlist (plan, list) : NULL;
  if (text == NULL || !kh_store_save (path, text, strlen (text), NULL, &error))
    kh_window_tell (GTK_WINDOW (self), _ ("The cut list could not be written."), error->message);
  else
    say_written (self, path);
}

void kh_window_ask_export_cut_list (KhWindow *self)
{
  kh_window_take_typed (self);
  GtkFileChooserNative *chooser = new_save_chooser (self, _ ("Export Cut List"), ".csv");
  g_autoptr (GtkFileFilter) filter = gtk_file_filter_new ();
  gtk_file_filter_set_name (filter, _ ("Table (CSV)"));
  gtk_file_filter_add_suffix (filter, "csv");
  gtk_file_chooser_add_filter (GTK_FILE_CHOOSER (chooser), filter);
  kh_window_choose_path (self, chooser, ".csv", export_cut_list_path_cb, NULL);
}
