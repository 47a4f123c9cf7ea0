/* SPDX-License-Identifier: MIT */
#include "app/sawstrip.h"
#include "app/bench.h"
#include "app/sawwords.h"
#include "app/scheme.h"
#include "draw/sawpicture.h"
#include <glib/gi18n-lib.h>

typedef struct
{
  KhSession *session;
  GtkWidget *sum, *area;
} Strip;

static KhSawPicture picture_of (Strip *strip, double width)
{
  return (KhSawPicture){ kh_scheme_get (), width, 11, kh_session_get_lit_row (strip->session) };
}

static void draw_cb (GtkDrawingArea *area, cairo_t *cr, int width, int height, gpointer data)
{
  Strip *strip = data;
  KhSawPicture picture = picture_of (strip, width);
  kh_saw_picture_draw (&picture, cr, kh_session_get_review (strip->session));
}

static void show_plan (GtkWidget *widget)
{
  Strip *strip = g_object_get_data (G_OBJECT (widget), "kh-strip");
  const KhReview *review = kh_session_get_review (strip->session);
  if (!review->cut_list && !review->panels_fault)
    return; /* being worked out */
  KhSawPicture picture = picture_of (strip, 800);
  g_autofree char *cannot = kh_saw_words_dup_cannot (review),
                  *sum = kh_saw_words_dup_sum (review, kh_session_get_plan (strip->session));
  const char *words = cannot ? cannot : *sum ? sum : _ ("Nothing to saw.");
  gtk_label_set_text (GTK_LABEL (strip->sum), words);
  gtk_drawing_area_set_content_height (GTK_DRAWING_AREA (strip->area),
                                       (int)kh_saw_picture_get_height (&picture, review));
  gtk_widget_queue_draw (strip->area);
  g_autofree char *name = g_strdup_printf ("%s. %s", _ ("Saw plan"), words);
  gtk_accessible_update_property (GTK_ACCESSIBLE (strip->area), GTK_ACCESSIBLE_PROPERTY_LABEL, name, -1);
}

static void show_lit (GtkWidget *widget)
{
  Strip *strip = g_object_get_data (G_OBJECT (widget), "kh-strip");
  gtk_widget_queue_draw (strip->area);
}

static void pressed_cb (GtkGestureClick *click, int n, double x, double y, Strip *strip)
{
  KhSawPicture picture = picture_of (strip, gtk_widget_get_width (strip->area));
  gtk_widget_grab_focus (strip->area);
  kh_session_set_lit_row (strip->session,
                          kh_saw_picture_row_at (&picture, kh_session_get_review (strip->session), x, y));
}

/* Up and down go through the rows of the cut list. */
static gboolean key_cb (GtkEventControllerKey *controller, guint keyval, guint code, GdkModifierType state,
                        Strip *strip)
{
  const KhCutList *list = kh_session_get_review (strip->session)->cut_list;
  int step = keyval == GDK_KEY_Down || keyval == GDK_KEY_Right ? 1
             : keyval == GDK_KEY_Up || keyval == GDK_KEY_Left  ? -1
                                                               : 0;
  if (step == 0 || !list || list->rows->len == 0)
    return FALSE;
  kh_session_set_lit_row (strip->session,
                          CLAMP (kh_session_get_lit_row (strip->session) + step, 0, (int)list->rows->len - 1));
  return TRUE;
}

static void strip_free (gpointer data)
{
  Strip *strip = data;
  g_object_unref (strip->session);
  g_free (strip);
}

GtkWidget *kh_saw_strip_new (KhSession *session)
{
  Strip *strip = g_new0 (Strip, 1);
  GtkWidget *widget = gtk_box_new (GTK_ORIENTATION_VERTICAL, 6), *head = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 12);
  GtkWidget *scrolled = gtk_scrolled_window_new (), *title = gtk_label_new (_ ("Saw plan"));
  GtkGesture *click = gtk_gesture_click_new ();
  GtkEventController *keys = gtk_event_controller_key_new ();
  strip->session = g_object_ref (session);
  g_object_set_data_full (G_OBJECT (widget), "kh-strip", strip, strip_free);
  gtk_widget_add_css_class (widget, "kh-strip");
  gtk_widget_add_css_class (title, "kh-title");
  strip->sum = gtk_label_new ("");
  gtk_label_set_xalign (GTK_LABEL (strip->sum), 0);
  gtk_label_set_wrap (GTK_LABEL (strip->sum), TRUE);
  gtk_widget_set_hexpand (strip->sum, TRUE);
  strip->area = gtk_drawing_area_new ();
  gtk_widget_set_focusable (strip->area, TRUE);
  gtk_drawing_area_set_draw_func (GTK_DRAWING_AREA (strip->area), draw_cb, strip, NULL);
  g_signal_connect (click, "pressed", G_CALLBACK (pressed_cb), strip);
  g_signal_connect (keys, "key-pressed", G_CALLBACK (key_cb), strip);
  gtk_widget_add_controller (strip->area, GTK_EVENT_CONTROLLER (click));
  gtk_widget_add_controller (strip->area, keys);
  gtk_scrolled_window_set_policy (GTK_SCROLLED_WINDOW (scrolled), GTK_POLICY_NEVER, GTK_POLICY_AUTOMATIC);
  gtk_scrolled_window_set_child (GTK_SCROLLED_WINDOW (scrolled), strip->area);
  gtk_widget_set_vexpand (scrolled, TRUE);
  gtk_widget_set_margin_start (head, 12);
  gtk_widget_set_margin_end (head, 12);
  gtk_widget_set_margin_top (head, 8);
  gtk_box_append (GTK_BOX (head), title);
  gtk_box_append (GTK_BOX (head), strip->sum);
  gtk_box_append (GTK_BOX (widget), head);
  gtk_box_append (GTK_BOX (widget), scrolled);
  gtk_accessible_update_property (GTK_ACCESSIBLE (strip->area), GTK_ACCESSIBLE_PROPERTY_LABEL, _ ("Saw plan"), -1);
  kh_bench_follow (widget, session, "review-changed", G_CALLBACK (show_plan));
  kh_bench_follow (widget, session, "selection-changed", G_CALLBACK (show_lit));
  g_signal_connect_object (gtk_settings_get_default (), "notify::gtk-application-prefer-dark-theme",
                           G_CALLBACK (gtk_widget_queue_draw), strip->area, G_CONNECT_SWAPPED);
  show_plan (widget);
  return widget;
}
