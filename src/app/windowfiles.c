/* SPDX-License-Identifier: MIT */
#include "app/windowprivate.h"

#include "app/application.h"
#include "app/newplan.h"
#include "files/store.h"
#include <glib/gi18n-lib.h>

/* New, open, save, close: everything about the plan's own file. */

#define MEDIA_TYPE "application/vnd.kerfhand.mazeplan+json"
#define ENDING ".mazeplan"
#define RECENT_MOST 8

/* ---- names ---- */

char *kh_window_dup_file_name (KhWindow *self)
{
  const char *path = kh_session_get_path (self->session);
  const KhPlan *plan = kh_session_get_plan (self->session);
  if (path != NULL)
    return g_filename_display_basename (path);
  GString *name = g_string_new (NULL);
  for (const char *c = plan->title; *c != '\0'; c = g_utf8_next_char (c))
    {
      gunichar letter = g_utf8_get_char (c);
      if (g_unichar_isalnum (letter))
        g_string_append_unichar (name, g_unichar_tolower (letter));
      else if (name->len > 0 && name->str[name->len - 1] != '-')
        g_string_append_c (name, '-');
    }
  while (name->len > 0 && name->str[name->len - 1] == '-')
    g_string_truncate (name, name->len - 1);
  if (name->len == 0 || name->len > 80)
    g_string_assign (name, _ ("maze"));
  g_string_append (name, ENDING);
  return g_string_free (name, FALSE);
}

static void add_plan_filters (GtkFileChooser *chooser)
{
  g_autoptr (GtkFileFilter) plans = gtk_file_filter_new ();
  g_autoptr (GtkFileFilter) all = gtk_file_filter_new ();
  gtk_file_filter_set_name (plans, _ ("Maze plans"));
  gtk_file_filter_add_suffix (plans, "mazeplan");
  gtk_file_filter_set_name (all, _ ("All files"));
  gtk_file_filter_add_pattern (all, "*");
  gtk_file_chooser_add_filter (chooser, plans);
  gtk_file_chooser_add_filter (chooser, all);
}

/* ---- new ---- */

static void new_plan_cb (KhPlan *plan, gpointer data)
{
  KhWindow *self = data;
  kh_application_show_session_take (self, kh_session_new_take (plan));
}

void kh_window_ask_new (KhWindow *self) { kh_new_plan_show (GTK_WINDOW (self), new_plan_cb, self); }

/* ---- open ---- */

void kh_window_open_path (KhWindow *self, const char *path)
{
  kh_application_open_path (KH_APPLICATION (gtk_window_get_application (GTK_WINDOW (self))), path, self);
}

static void open_response_cb (GtkNativeDialog *dialog, int response, KhWindow *self)
{
  if (response == GTK_RESPONSE_ACCEPT)
    {
      g_autoptr (GListModel) files = gtk_file_chooser_get_files (GTK_FILE_CHOOSER (dialog));
      for (guint i = 0; i < g_list_model_get_n_items (files); i++)
        {
          g_autoptr (GFile) file = g_list_model_get_item (files, i);
          g_autofree char *path = g_file_get_path (file);
          if (path != NULL)
            kh_window_open_path (self, path);
          else
            kh_window_tell (GTK_WINDOW (self), _ ("Kerfhand opens files on this computer only."),
                            _ ("Copy the plan to a folder of this computer and open it there."));
        }
    }
  g_object_unref (dialog);
}

static void set_folder_of (GtkFileChooser *chooser, const char *path)
{
  if (path == NULL)
    return;
  g_autofree char *folder = g_path_get_dirname (path);
  g_autoptr (GFile) file = g_file_new_for_path (folder);
  gtk_file_chooser_set_current_folder (chooser, file, NULL);
}

void kh_window_ask_open (KhWindow *self)
{
  GtkFileChooserNative *chooser
      = gtk_file_chooser_native_new (_ ("Open Plan"), GTK_WINDOW (self), GTK_FILE_CHOOSER_ACTION_OPEN, NULL, NULL);
  gtk_native_dialog_set_modal (GTK_NATIVE_DIALOG (chooser), TRUE);
  gtk_file_chooser_set_select_multiple (GTK_FILE_CHOOSER (chooser), TRUE);
  add_plan_filters (GTK_FILE_CHOOSER (chooser));
  set_folder_of (GTK_FILE_CHOOSER (chooser), kh_session_get_path (self->session));
  g_signal_connect_object (chooser, "response", G_CALLBACK (open_response_cb), self, 0);
  gtk_native_dialog_show (GTK_NATIVE_DIALOG (chooser)); /* the reference is given back in the response */
}

/* ---- recent plans ---- */

static int newer_first (gconstpointer a, gconstpointer b)
{
  GDateTime *time_a = gtk_recent_info_get_modified (*(GtkRecentInfo *const *)a);
  GDateTime *time_b = gtk_recent_info_get_modified (*(GtkRecentInfo *const *)b);
  return g_date_time_compare (time_b, time_a);
}

void kh_window_fill_recent (KhWindow *self)
{
  g_autoptr (GMenu) menu = g_menu_new ();
  g_autoptr (GMenu) recent = g_menu_new ();
  g_autoptr (GPtrArray) found = g_ptr_array_new ();
  GList *items = gtk_recent_manager_get_items (gtk_recent_manager_get_default ());
  for (GList *item = items; item != NULL; item = item->next)
    if (g_str_has_suffix (gtk_recent_info_get_uri (item->data), ENDING) && gtk_recent_info_is_local (item->data))
      g_ptr_array_add (found, item->data);
  g_ptr_array_sort (found, newer_first);
  for (guint i = 0; i < MIN (found->len, RECENT_MOST); i++)
    {
      GtkRecentInfo *info = g_ptr_array_index (found, i);
      g_autofree char *path = g_filename_from_uri (gtk_recent_info_get_uri (info), NULL, NULL);
      g_autofree char *label = path != NULL ? g_filename_display_basename (path) : NULL;
      if (path == NULL || !g_utf8_validate (path, -1, NULL))
        continue;
      g_autoptr (GMenuItem) entry = g_menu_item_new (NULL, NULL);
      g_auto (GStrv) parts = g_strsplit (label, "_", -1); /* an underscore is no mnemonic here */
      g_autofree char *plain = g_strjoinv ("__", parts);
      g_menu_item_set_label (entry, plain);
      g_menu_item_set_action_and_target (entry, "win.open-recent", "s", path);
      g_menu_append_item (recent, entry);
    }
  g_list_free_full (items, (GDestroyNotify)gtk_recent_info_unref);
  g_menu_append (menu, _ ("Open…"), "win.open");
  g_menu_append_submenu (menu, _ ("Open an Example"), kh_application_get_examples ());
  g_menu_append_section (menu, _ ("Recent plans"), G_MENU_MODEL (recent));
  gtk_menu_button_set_menu_model (GTK_MENU_BUTTON (self->open_button), G_MENU_MODEL (menu));
}

/* ---- save ---- */

typedef struct
{
  KhWindow *self;
  KhThen then;
  gpointer data;
  char *path;
} Saving;

static Saving *saving_new (KhWindow *self, KhThen then, gpointer data)
{
  Saving *saving = g_new0 (Saving, 1);
  saving->self = g_object_ref (self);
  saving->then = then;
  saving->data = data;
  return saving;
}

static void saving_free (Saving *saving)
{
  g_object_unref (saving->self);
  g_free (saving->path);
  g_free (saving);
}

static void save_to (Saving *saving_taken, const char *path, gboolean even_if_changed);

static void drop_dialog (GtkWidget *dialog)
{
  gtk_window_set_transient_for (GTK_WINDOW (dialog), NULL); /* 4.8: the parent may be closed next */
  gtk_window_destroy (GTK_WINDOW (dialog));
}

static void changed_response_cb (GtkDialog *dialog, int response, Saving *saving)
{
  drop_dialog (GTK_WIDGET (dialog));
  if (response == GTK_RESPONSE_ACCEPT)
    save_to (saving, saving->path, TRUE);
  else if (response == GTK_RESPONSE_NO)
    {
      kh_window_ask_save_as (saving->self, saving->then, saving->data);
      saving_free (saving);
    }
  else
    saving_free (saving);
}

/* Another program wrote the file since it was read: never overwritten without asking. */
static void ask_changed (Saving *saving, const char *detail)
{
  GtkWidget *dialog = gtk_message_dialog_new (
      GTK_WINDOW (saving->self), GTK_DIALOG_MODAL | GTK_DIALOG_DESTROY_WITH_PARENT, GTK_MESSAGE_QUESTION,
      GTK_BUTTONS_NONE, "%s", _ ("Another program changed this file since it was opened here."));
  gtk_message_dialog_format_secondary_text (GTK_MESSAGE_DIALOG (dialog), "%s\n\n%s", detail,
                                            _ ("Saving over it loses what the other program wrote."));
  gtk_dialog_add_buttons (GTK_DIALOG (dialog), _ ("Cancel"), GTK_RESPONSE_CANCEL, _ ("Save Over It"),
                          GTK_RESPONSE_ACCEPT, _ ("Save Under Another Name…"), GTK_RESPONSE_NO, NULL);
  gtk_dialog_set_default_response (GTK_DIALOG (dialog), GTK_RESPONSE_NO);
  g_signal_connect (dialog, "response", G_CALLBACK (changed_response_cb), saving);
  gtk_window_present (GTK_WINDOW (dialog));
}

static void save_to (Saving *saving, const char *path_borrowed, gboolean even_if_changed)
{
  g_autoptr (GError) error = NULL;
  g_autofree char *path = g_strdup (path_borrowed);
  if (kh_session_save (saving->self->session, path, even_if_changed, &error))
    {
      kh_application_remember_path (path);
      gtk_info_bar_set_revealed (GTK_INFO_BAR (saving->self->info_bar), FALSE);
      if (saving->then != NULL)
        saving->then (saving->self, saving->data);
      saving_free (saving);
    }
  else if (g_error_matches (error, KH_STORE_ERROR, KH_STORE_ERROR_CHANGED))
    {
      g_free (saving->path);
      saving->path = g_steal_pointer (&path);
      ask_changed (saving, error->message);
    }
  else
    {
      kh_window_tell (GTK_WINDOW (saving->self), _ ("The plan could not be saved."), error->message);
      saving_free (saving);
    }
}

void kh_window_save_then (KhWindow *self, KhThen then, gpointer data)
{
  kh_window_take_typed (self);
  const char *path = kh_session_get_path (self->session);
  if (path == NULL)
    kh_window_ask_save_as (self, then, data);
  else
    save_to (saving_new (self, then, data), path, FALSE);
}

static void save_as_path_cb (KhWindow *self, const char *path, gpointer data)
{
  Saving *saving = data;
  /* overwriting was asked about already; the stamp of the plan's own file is another file's */
  const char *own = kh_session_get_path (self->session);
  if (path == NULL)
    saving_free (saving);
  else
    save_to (saving, path, g_strcmp0 (own, path) != 0);
}

void kh_window_ask_save_as (KhWindow *self, KhThen then, gpointer data)
{
  GtkFileChooserNative *chooser
      = gtk_file_chooser_native_new (_ ("Save Plan"), GTK_WINDOW (self), GTK_FILE_CHOOSER_ACTION_SAVE, NULL, NULL);
  kh_window_take_typed (self);
  g_autofree char *name = kh_window_dup_file_name (self);
  add_plan_filters (GTK_FILE_CHOOSER (chooser));
  set_folder_of (GTK_FILE_CHOOSER (chooser), kh_session_get_path (self->session));
  gtk_file_chooser_set_current_name (GTK_FILE_CHOOSER (chooser), name);
  kh_window_choose_path (self, chooser, ENDING, save_as_path_cb, saving_new (self, then, data));
}

/* ---- close ---- */

static void close_now (KhWindow *self, gpointer data)
{
  self->closing = TRUE;
  gtk_window_close (GTK_WINDOW (self));
}

static void close_response_cb (GtkDialog *dialog, int response, KhWindow *self)
{
  drop_dialog (GTK_WIDGET (dialog));
  self->asking = FALSE;
  if (response == GTK_RESPONSE_ACCEPT)
    kh_window_save_then (self, close_now, NULL);
  else if (response == GTK_RESPONSE_NO)
    close_now (self, NULL);
  else
    kh_application_stop_quitting (KH_APPLICATION (gtk_window_get_application (GTK_WINDOW (self))));
}

void kh_window_ask_close (KhWindow *self)
{
  if (self->asking)
    return;
  self->asking = TRUE;
  g_autofree char *name = kh_window_dup_file_name (self);
  GtkWidget *dialog
      = gtk_message_dialog_new (GTK_WINDOW (self), GTK_DIALOG_MODAL | GTK_DIALOG_DESTROY_WITH_PARENT,
                                GTK_MESSAGE_QUESTION, GTK_BUTTONS_NONE, _ ("Save the changes to %s?"), name);
  gtk_message_dialog_format_secondary_text (GTK_MESSAGE_DIALOG (dialog), "%s",
                                            _ ("What is not saved is lost when the window closes."));
  gtk_dialog_add_buttons (GTK_DIALOG (dialog), _ ("Discard"), GTK_RESPONSE_NO, _ ("Cancel"), GTK_RESPONSE_CANCEL,
                          _ ("Save"), GTK_RESPONSE_ACCEPT, NULL);
  gtk_dialog_set_default_response (GTK_DIALOG (dialog), GTK_RESPONSE_ACCEPT);
  gtk_widget_add_css_class (gtk_dialog_get_widget_for_response (GTK_DIALOG (dialog), GTK_RESPONSE_ACCEPT),
                            "suggested-action");
  g_signal_connect (dialog, "response", G_CALLBACK (close_response_cb), self);
  gtk_window_present (GTK_WINDOW (dialog));
}
