/* SPDX-License-Identifier: MIT */
#include "app/windowprivate.h"

#include "app/readout.h"
#include "app/settings.h"
#include "app/timing.h"
#include "app/tip.h"
#include "app/words.h"
#include <glib/gi18n-lib.h>

G_DEFINE_FINAL_TYPE (KhWindow, kh_window, GTK_TYPE_APPLICATION_WINDOW)

/* ---- header ---- */

static void show_title (KhWindow *self)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  g_autofree char *name = kh_window_dup_file_name (self);
  const char *title = *plan->title != '\0' ? plan->title : _ ("Plan without a title");
  gboolean saved = !kh_session_is_at_stake (self->session);
  gboolean has_file = kh_session_get_path (self->session) != NULL;
  g_autofree char *file = NULL;
  if (!saved)
    /* Translators: under the title: not saved, then the file's name */
    file = has_file ? g_strdup_printf (_ ("not saved · %s"), name) : g_strdup (_ ("not saved yet"));
  else
    file = has_file ? g_strdup (name) : g_strdup (_ ("no file yet"));
  gtk_label_set_text (GTK_LABEL (self->title_label), title);
  gtk_label_set_text (GTK_LABEL (self->file_label), file);
  g_autofree char *whole = g_strdup_printf ("%s – %s – Kerfhand", title, file);
  gtk_window_set_title (GTK_WINDOW (self), whole);
}

static void show_undo (KhWindow *self)
{
  KhHistory *history = kh_session_get_history (self->session);
  const char *undo = kh_history_get_undo_words (history), *redo = kh_history_get_redo_words (history);
  g_autofree char *undo_text = undo != NULL ? g_strdup_printf (_ ("Undo: %s"), undo) : g_strdup ("");
  g_autofree char *redo_text = redo != NULL ? g_strdup_printf (_ ("Redo: %s"), redo) : g_strdup (_ ("Nothing to redo"));
  kh_readout_set_text (KH_READOUT (self->undo_label), undo_text);
  kh_tip_set (self->undo_button, undo != NULL ? undo_text : _ ("Nothing to undo"));
  kh_tip_set (self->redo_button, redo_text);
  gtk_accessible_update_property (GTK_ACCESSIBLE (self->undo_button), GTK_ACCESSIBLE_PROPERTY_LABEL,
                                  undo != NULL ? undo_text : _ ("Undo"), -1);
  gtk_accessible_update_property (GTK_ACCESSIBLE (self->redo_button), GTK_ACCESSIBLE_PROPERTY_LABEL,
                                  redo != NULL ? redo_text : _ ("Redo"), -1);
}

/* ---- status bar ---- */

static void show_pointed (KhWindow *self)
{
  if (self->notice_source == 0)
    kh_readout_set_text (KH_READOUT (self->pointed_label), kh_canvas_get_pointed_text (KH_CANVAS (self->canvas)));
}

static gboolean end_notice_cb (gpointer data)
{
  KhWindow *self = data;
  self->notice_source = 0;
  gtk_widget_remove_css_class (self->pointed_label, "kh-notice");
  gtk_widget_remove_css_class (self->pointed_label, "kh-care-words");
  show_pointed (self);
  return G_SOURCE_REMOVE;
}

void kh_window_say (KhWindow *self, const char *text, gboolean is_care)
{
  g_clear_handle_id (&self->notice_source, g_source_remove);
  if (is_care)
    gtk_widget_add_css_class (self->pointed_label, "kh-care-words");
  else
    gtk_widget_remove_css_class (self->pointed_label, "kh-care-words");
  kh_readout_set_text (KH_READOUT (self->pointed_label), text);
  gtk_widget_add_css_class (self->pointed_label, "kh-notice");
  self->notice_source = g_timeout_add_seconds (6, end_notice_cb, self);
}

static void notice_cb (KhCanvas *canvas, const char *text, KhWindow *self) { kh_window_say (self, text, TRUE); }

static void show_panels (KhWindow *self, const KhReview *review)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  g_autofree char *text = NULL;
  if (review != NULL && review->cut_list != NULL)
    {
      int n = (int)review->cut_list->panels->len;
      double metres = (double)review->cut_list->total_nm / 1e9;
      /* Translators: number of panels, metres of wall in all */
      text = g_strdup_printf (ngettext ("%d panel, %.1f m of wall", "%d panels, %.1f m of wall", n), n, metres);
    }
  else
    {
      int n = kh_plan_n_walls (plan);
      text = g_strdup_printf (ngettext ("%d wall", "%d walls", n), n);
    }
  kh_readout_set_text (KH_READOUT (self->panels_label), text);
}

static void show_size (KhWindow *self)
{
  g_autofree char *size = kh_words_dup_size (kh_session_get_plan (self->session), kh_settings_get_unit ());
  kh_readout_set_text (KH_READOUT (self->size_label), size);
}

static void show_verdict (KhWindow *self, const KhReview *review)
{
  gboolean bad = FALSE;
  g_autofree char *words = NULL;
  if (review != NULL)
    {
      words = kh_review_dup_verdict (review, kh_session_get_plan (self->session));
      bad = review->n_by_severity[KH_SEVERITY_BREAKS] + review->n_by_severity[KH_SEVERITY_HINDERS] > 0;
    }
  gtk_label_set_text (GTK_LABEL (self->verdict_label), words != NULL ? words : "");
  kh_tip_set (self->verdict_label, words);
  gtk_image_set_from_icon_name (GTK_IMAGE (self->verdict_image), bad ? "kh-care-symbolic" : "kh-sound-symbolic");
  if (bad)
    gtk_widget_add_css_class (self->status_bar, "kh-care");
  else
    gtk_widget_remove_css_class (self->status_bar, "kh-care");
}

static void show_count (KhWindow *self, const KhReview *review)
{
  int n = review != NULL ? (int)review->findings->len - review->n_set_aside : 0;
  g_autofree char *text = g_strdup_printf ("%d", n);
  gtk_label_set_text (GTK_LABEL (self->count_badge), text);
  gtk_widget_set_visible (self->count_badge, n > 0);
  g_autofree char *name = n > 0 ? g_strdup_printf (_ ("Findings, %d"), n) : g_strdup (_ ("Findings, none"));
  gtk_accessible_update_property (GTK_ACCESSIBLE (self->bench_buttons[0]), GTK_ACCESSIBLE_PROPERTY_LABEL, name, -1);
}

/* ---- model ---- */

static void plan_changed_cb (KhWindow *self)
{
  show_title (self);
  show_undo (self);
  show_size (self);
  kh_window_sync_actions (self);
}

static void review_changed_cb (KhWindow *self)
{
  const KhReview *review = kh_session_get_review (self->session);
  show_panels (self, review);
  show_verdict (self, review);
  show_count (self, review);
}

static void file_changed_cb (KhWindow *self)
{
  show_title (self);
  kh_window_sync_actions (self);
}

static void player_changed_cb (KhWindow *self) { kh_window_sync_actions (self); }

static void let_session_go (KhWindow *self)
{
  if (self->session == NULL)
    return;
  g_signal_handlers_disconnect_by_data (self->session, self);
  g_clear_pointer (&self->recovery, kh_recovery_forget_free);
  g_clear_object (&self->session);
}

void kh_window_set_session_take (KhWindow *self, KhSession *session)
{
  let_session_go (self);
  self->session = session;
  self->recovery = kh_recovery_new (session);
  g_signal_connect_swapped (session, "plan-changed", G_CALLBACK (plan_changed_cb), self);
  g_signal_connect_swapped (session, "review-changed", G_CALLBACK (review_changed_cb), self);
  g_signal_connect_swapped (session, "file-changed", G_CALLBACK (file_changed_cb), self);
  g_signal_connect_swapped (session, "player-changed", G_CALLBACK (player_changed_cb), self);
  kh_canvas_set_session (KH_CANVAS (self->canvas), session);
  kh_window_fill_bench (self);
  gtk_info_bar_set_revealed (GTK_INFO_BAR (self->info_bar), FALSE);
  plan_changed_cb (self);
  review_changed_cb (self);
}

KhSession *kh_window_get_session (KhWindow *self) { return self->session; }

GtkWidget *kh_window_get_canvas (KhWindow *self) { return self->canvas; }

gboolean kh_window_is_untouched (KhWindow *self)
{
  kh_window_take_typed (self);
  KhHistory *history = kh_session_get_history (self->session);
  return kh_session_get_path (self->session) == NULL && kh_history_get_undo_words (history) == NULL
         && kh_history_get_redo_words (history) == NULL;
}

void kh_window_update (KhWindow *self)
{
  kh_canvas_set_unit (KH_CANVAS (self->canvas), kh_settings_get_unit ());
  show_size (self);
}

/* ---- recovery ---- */

void kh_window_say_recovered (KhWindow *self)
{
  gboolean has_file = kh_session_get_path (self->session) != NULL;
  gtk_label_set_text (GTK_LABEL (self->info_label),
                      has_file
                          ? _ ("Recovered: these changes were not saved when Kerfhand last ended. Save to keep them.")
                          : _ ("Recovered: this plan was not saved when Kerfhand last ended. Save it to keep it."));
  gtk_widget_set_visible (self->info_discard, has_file);
  gtk_info_bar_set_revealed (GTK_INFO_BAR (self->info_bar), TRUE);
}

static void info_response_cb (GtkInfoBar *bar, int response, KhWindow *self)
{
  gtk_info_bar_set_revealed (bar, FALSE);
  if (response == 1)
    kh_session_undo (self->session); /* the recovered plan came as one step over the saved one */
}

void kh_window_save_recovery (KhWindow *self)
{
  kh_window_take_typed (self);
  if (self->recovery != NULL)
    kh_recovery_save_now (self->recovery);
}

/* ---- messages ---- */

static void told_cb (GtkDialog *dialog, int response, gpointer data)
{
  gtk_window_set_transient_for (GTK_WINDOW (dialog), NULL); /* 4.8: the parent may close meanwhile */
  gtk_window_destroy (GTK_WINDOW (dialog));
}

/* Many faults: all of them, in a box that scrolls. */
static void add_long_detail (GtkMessageDialog *dialog, const char *detail)
{
  GtkWidget *label = gtk_label_new (detail);
  GtkWidget *scrolled = gtk_scrolled_window_new ();
  gtk_label_set_wrap (GTK_LABEL (label), TRUE);
  gtk_label_set_wrap_mode (GTK_LABEL (label), PANGO_WRAP_WORD_CHAR);
  gtk_label_set_selectable (GTK_LABEL (label), TRUE);
  gtk_label_set_xalign (GTK_LABEL (label), 0);
  gtk_label_set_yalign (GTK_LABEL (label), 0);
  gtk_scrolled_window_set_child (GTK_SCROLLED_WINDOW (scrolled), label);
  gtk_scrolled_window_set_policy (GTK_SCROLLED_WINDOW (scrolled), GTK_POLICY_NEVER, GTK_POLICY_AUTOMATIC);
  gtk_scrolled_window_set_min_content_height (GTK_SCROLLED_WINDOW (scrolled), 260);
  gtk_scrolled_window_set_min_content_width (GTK_SCROLLED_WINDOW (scrolled), 520);
  gtk_box_append (GTK_BOX (gtk_message_dialog_get_message_area (dialog)), scrolled);
}

void kh_window_tell (GtkWindow *parent, const char *heading, const char *detail)
{
  GtkWidget *dialog = gtk_message_dialog_new (parent, GTK_DIALOG_MODAL | GTK_DIALOG_DESTROY_WITH_PARENT,
                                              GTK_MESSAGE_WARNING, GTK_BUTTONS_CLOSE, "%s", heading);
  if (detail != NULL && strlen (detail) < 400)
    gtk_message_dialog_format_secondary_text (GTK_MESSAGE_DIALOG (dialog), "%s", detail);
  else if (detail != NULL)
    add_long_detail (GTK_MESSAGE_DIALOG (dialog), detail);
  g_signal_connect (dialog, "response", G_CALLBACK (told_cb), NULL);
  gtk_window_present (GTK_WINDOW (dialog));
}

/* ---- life ---- */

static gboolean close_request (GtkWindow *window)
{
  KhWindow *self = KH_WINDOW (window);
  if (!self->closing)
    kh_window_take_typed (self);
  if (!self->closing && kh_session_is_at_stake (self->session))
    {
      kh_window_ask_close (self);
      return TRUE;
    }
  if (gtk_widget_get_width (GTK_WIDGET (self)) > 0 && !gtk_window_is_maximized (window))
    {
      int width, height;
      gtk_window_get_default_size (window, &width, &height);
      kh_settings_set_int ("window-width", width);
      kh_settings_set_int ("window-height", height);
    }
  return GTK_WINDOW_CLASS (kh_window_parent_class)->close_request (window);
}

static gboolean drop_cb (GtkDropTarget *target, const GValue *value, double x, double y, KhWindow *self)
{
  const GSList *files = g_value_get_boxed (value);
  for (const GSList *item = files; item != NULL; item = item->next)
    {
      g_autofree char *path = g_file_get_path (item->data);
      if (path != NULL)
        kh_window_open_path (self, path);
    }
  return files != NULL;
}

static void strip_moved_cb (KhWindow *self)
{
  int height = gtk_widget_get_height (self->strip_stack);
  if (gtk_widget_get_mapped (self->strip_stack) && height > 0)
    kh_settings_set_int ("strip-height", height);
}

static void dispose (GObject *object)
{
  KhWindow *self = KH_WINDOW (object);
  g_clear_handle_id (&self->notice_source, g_source_remove);
  if (self->canvas != NULL)
    {
      g_signal_handlers_disconnect_by_data (self->canvas, self);
      kh_canvas_set_session (KH_CANVAS (self->canvas), NULL);
      self->canvas = NULL;
    }
  let_session_go (self);
  G_OBJECT_CLASS (kh_window_parent_class)->dispose (object);
}

static void kh_window_class_init (KhWindowClass *class)
{
  GtkWidgetClass *widget_class = GTK_WIDGET_CLASS (class);
  G_OBJECT_CLASS (class)->dispose = dispose;
  GTK_WINDOW_CLASS (class)->close_request = close_request;
  gtk_widget_class_set_template_from_resource (widget_class, "/org/kerfhand/Kerfhand/window.ui");
#define CHILD(name) gtk_widget_class_bind_template_child (widget_class, KhWindow, name)
  CHILD (header);
  CHILD (title_label);
  CHILD (file_label);
  CHILD (open_button);
  CHILD (undo_button);
  CHILD (redo_button);
  CHILD (undo_label);
  CHILD (info_bar);
  CHILD (info_label);
  CHILD (info_discard);
  CHILD (tool_box);
  CHILD (canvas_overlay);
  CHILD (strip_paned);
  CHILD (strip_stack);
  CHILD (bench_box);
  CHILD (bench_switcher);
  CHILD (bench_stack);
  CHILD (status_bar);
  CHILD (pointed_label);
  CHILD (size_label);
  CHILD (panels_label);
  CHILD (verdict_image);
  CHILD (verdict_label);
#undef CHILD
  gtk_widget_class_bind_template_callback (widget_class, info_response_cb);
}

static void kh_window_init (KhWindow *self)
{
  g_type_ensure (KH_TYPE_READOUT); /* named by the template */
  gtk_widget_init_template (GTK_WIDGET (self));
  self->canvas = kh_canvas_new ();
  gtk_overlay_set_child (GTK_OVERLAY (self->canvas_overlay), self->canvas);
  g_signal_connect_swapped (self->canvas, "pointed", G_CALLBACK (show_pointed), self);
  g_signal_connect (self->canvas, "notice", G_CALLBACK (notice_cb), self);
  kh_canvas_set_unit (KH_CANVAS (self->canvas), kh_settings_get_unit ());
  kh_window_init_tools (self);
  kh_window_init_bench (self);
  kh_window_init_actions (self);
  kh_window_fill_recent (self);
  g_signal_connect_object (gtk_recent_manager_get_default (), "changed", G_CALLBACK (kh_window_fill_recent), self,
                           G_CONNECT_SWAPPED);

  GtkDropTarget *drop = gtk_drop_target_new (GDK_TYPE_FILE_LIST, GDK_ACTION_COPY);
  g_signal_connect (drop, "drop", G_CALLBACK (drop_cb), self);
  gtk_widget_add_controller (GTK_WIDGET (self), GTK_EVENT_CONTROLLER (drop));

  int width = kh_settings_get_int ("window-width", 1360), height = kh_settings_get_int ("window-height", 860);
  int strip = kh_settings_get_int ("strip-height", 178);
  gtk_window_set_default_size (GTK_WINDOW (self), CLAMP (width, 640, 8192), CLAMP (height, 480, 8192));
  gtk_widget_set_size_request (self->strip_stack, -1, 120);
  gtk_paned_set_position (GTK_PANED (self->strip_paned), CLAMP (height - 48 - 30 - strip, 160, 8192));
  g_signal_connect_swapped (self->strip_paned, "notify::position", G_CALLBACK (strip_moved_cb), self);
  g_autofree char *page = kh_settings_dup_string ("bench-page", "findings");
  kh_window_show_bench (self, page);
  kh_timing_watch (GTK_WIDGET (self));
}

KhWindow *kh_window_new_take (GtkApplication *app, KhSession *session)
{
  KhWindow *self = g_object_new (KH_TYPE_WINDOW, "application", app, NULL);
  kh_window_set_session_take (self, session);
  kh_canvas_grab_cursor (KH_CANVAS (self->canvas)); /* arrows and tool letters work at once */
  gtk_window_set_focus_visible (GTK_WINDOW (self), FALSE);
  return self;
}
