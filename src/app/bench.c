/* SPDX-License-Identifier: MIT */
#include "app/bench.h"

#include <glib/gi18n-lib.h>
#include <string.h>

GtkWidget *kh_bench_page_new (GtkWidget **column)
{
  GtkWidget *scrolled = gtk_scrolled_window_new ();
  *column = gtk_box_new (GTK_ORIENTATION_VERTICAL, 6);
  gtk_widget_set_margin_start (*column, 12);
  gtk_widget_set_margin_end (*column, 12);
  gtk_widget_set_margin_top (*column, 6);
  gtk_widget_set_margin_bottom (*column, 12);
  gtk_scrolled_window_set_policy (GTK_SCROLLED_WINDOW (scrolled), GTK_POLICY_NEVER, GTK_POLICY_AUTOMATIC);
  gtk_scrolled_window_set_child (GTK_SCROLLED_WINDOW (scrolled), *column);
  gtk_widget_set_vexpand (scrolled, TRUE);
  return scrolled;
}

static GtkWidget *label_new (const char *text, const char *css)
{
  GtkWidget *label = gtk_label_new (text);
  gtk_label_set_xalign (GTK_LABEL (label), 0);
  gtk_label_set_wrap (GTK_LABEL (label), TRUE);
  gtk_label_set_wrap_mode (GTK_LABEL (label), PANGO_WRAP_WORD_CHAR);
  gtk_widget_add_css_class (label, css);
  return label;
}

GtkWidget *kh_bench_heading_new (const char *text)
{
  GtkWidget *label = label_new (text, "kh-heading");
  gtk_widget_set_margin_top (label, 8);
  return label;
}

GtkWidget *kh_bench_note_new (const char *text) { return label_new (text, "kh-second"); }

/* The width of a wrapping label is the column's, never its words': GTK 4.8 finds
 * a label's own least width by laying the words out some twenty times. */
static void measure_words_cb (GtkWidget *frame, GtkOrientation orientation, int for_size, int *least, int *natural,
                              int *least_baseline, int *natural_baseline)
{
  if (orientation == GTK_ORIENTATION_HORIZONTAL)
    *least = *natural = 60;
  else
    gtk_widget_measure (gtk_widget_get_first_child (frame), orientation, MAX (for_size, 60), least, natural,
                        least_baseline, natural_baseline);
}

static void allocate_words_cb (GtkWidget *frame, int width, int height, int baseline)
{
  gtk_widget_allocate (gtk_widget_get_first_child (frame), width, height, baseline, NULL);
}

static GtkSizeRequestMode get_mode_cb (GtkWidget *frame) { return GTK_SIZE_REQUEST_HEIGHT_FOR_WIDTH; }

GtkWidget *kh_bench_words_new (const char *text, const char *css)
{
  GtkWidget *frame = gtk_box_new (GTK_ORIENTATION_VERTICAL, 0);
  gtk_box_append (GTK_BOX (frame), label_new (text, css));
  gtk_widget_set_hexpand (frame, TRUE);
  gtk_widget_set_layout_manager (frame, gtk_custom_layout_new (get_mode_cb, measure_words_cb, allocate_words_cb));
  return frame;
}

/* A page that is not shown is brought up to date when it is: an edit costs what can be seen of it. */
typedef struct
{
  GtkWidget *widget;
  void (*callback) (GtkWidget *widget);
  guint delay_ms, source;
  gboolean late;
} Follow;

static gboolean call_cb (gpointer data)
{
  Follow *follow = data;
  follow->source = 0;
  follow->late = !gtk_widget_get_mapped (follow->widget);
  if (!follow->late)
    follow->callback (follow->widget);
  return G_SOURCE_REMOVE;
}

static void follow_cb (Follow *follow)
{
  if (follow->delay_ms == 0)
    call_cb (follow);
  else if (follow->source == 0)
    follow->source = g_timeout_add (follow->delay_ms, call_cb, follow);
}

static void shown_cb (Follow *follow)
{
  if (follow->late)
    call_cb (follow);
}

static void follow_free (gpointer data, GClosure *closure)
{
  Follow *follow = data;
  g_clear_handle_id (&follow->source, g_source_remove);
  g_free (follow);
}

void kh_bench_follow_later (GtkWidget *widget, KhSession *session, const char *signal, GCallback callback_swapped,
                            guint delay_ms)
{
  Follow *follow = g_new0 (Follow, 1);
  follow->widget = widget;
  follow->callback = (void (*) (GtkWidget *))callback_swapped;
  follow->delay_ms = delay_ms;
  GClosure *closure = g_cclosure_new_swap (G_CALLBACK (follow_cb), follow, NULL);
  g_object_watch_closure (G_OBJECT (widget), closure);
  g_signal_connect_closure (session, signal, closure, FALSE);
  g_signal_connect_data (widget, "map", G_CALLBACK (shown_cb), follow, follow_free,
                         G_CONNECT_SWAPPED | G_CONNECT_AFTER);
}

void kh_bench_follow (GtkWidget *widget, KhSession *session, const char *signal, GCallback callback_swapped)
{
  kh_bench_follow_later (widget, session, signal, callback_swapped, 0);
}

/* ---- names ---- */

static const char *find_words (GtkWidget *widget)
{
  if (GTK_IS_LABEL (widget))
    return gtk_label_get_text (GTK_LABEL (widget));
  for (GtkWidget *child = gtk_widget_get_first_child (widget); child; child = gtk_widget_get_next_sibling (child))
    {
      const char *words = find_words (child);
      if (words && *words)
        return words;
    }
  return NULL;
}

void kh_bench_set_name (GtkWidget *widget, const char *name)
{
  gtk_accessible_update_property (GTK_ACCESSIBLE (widget), GTK_ACCESSIBLE_PROPERTY_LABEL, name, -1);
  g_object_set_data (G_OBJECT (widget), "kh-named", widget);
}

static void name_widget (GtkWidget *widget, const char *words)
{
  if (words && *words && !g_object_get_data (G_OBJECT (widget), "kh-named"))
    gtk_accessible_update_property (GTK_ACCESSIBLE (widget), GTK_ACCESSIBLE_PROPERTY_LABEL, words, -1);
}

void kh_bench_name_below (GtkWidget *widget)
{
  if (GTK_IS_EXPANDER (widget))
    name_widget (widget, gtk_expander_get_label (GTK_EXPANDER (widget)));
  else if (GTK_IS_BUTTON (widget) && !GTK_IS_DROP_DOWN (gtk_widget_get_parent (widget))
           && gtk_button_get_label (GTK_BUTTON (widget)) == NULL)
    name_widget (widget, gtk_widget_has_css_class (widget, "close") ? _ ("Close") : find_words (widget));
  for (GtkWidget *child = gtk_widget_get_first_child (widget); child; child = gtk_widget_get_next_sibling (child))
    kh_bench_name_below (child);
}

/* ---- entries ---- */

typedef struct
{
  KhTryText try_text;
  KhDupText dup_text;
  gpointer data;
  GDestroyNotify free_data;
  GtkWidget *text, *fault;
  char *shown; /* as it was put there: what differs was typed */
} Entry;

static Entry *entry_of (GtkWidget *widget) { return g_object_get_data (G_OBJECT (widget), "kh-entry"); }

GtkWidget *kh_bench_row_new (const char *label, GtkWidget *widget)
{
  GtkWidget *row = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 6);
  GtkWidget *name = label_new (label, "kh-running");
  gtk_widget_set_size_request (name, 112, -1);
  gtk_widget_set_valign (name, GTK_ALIGN_START);
  gtk_widget_set_margin_top (name, 7);
  gtk_widget_set_hexpand (widget, TRUE);
  /* What takes the focus: the text of an entry, the button within a list of choices. */
  GtkWidget *named = entry_of (widget) ? entry_of (widget)->text : widget;
  if (GTK_IS_DROP_DOWN (widget))
    name_widget (gtk_widget_get_first_child (widget), label);
  gtk_label_set_mnemonic_widget (GTK_LABEL (name), named);
  gtk_accessible_update_property (GTK_ACCESSIBLE (named), GTK_ACCESSIBLE_PROPERTY_LABEL, label, -1);
  gtk_box_append (GTK_BOX (row), name);
  gtk_box_append (GTK_BOX (row), widget);
  return row;
}

static void entry_free (gpointer data)
{
  Entry *entry = data;
  if (entry->free_data)
    entry->free_data (entry->data);
  g_free (entry->shown);
  g_free (entry);
}

static void show_fault (Entry *entry, const char *fault)
{
  gtk_label_set_text (GTK_LABEL (entry->fault), fault ? fault : "");
  gtk_widget_set_visible (entry->fault, fault != NULL);
  if (fault)
    gtk_widget_add_css_class (entry->text, "error");
  else
    gtk_widget_remove_css_class (entry->text, "error");
  gtk_accessible_update_state (GTK_ACCESSIBLE (entry->text), GTK_ACCESSIBLE_STATE_INVALID,
                               fault ? GTK_ACCESSIBLE_INVALID_TRUE : GTK_ACCESSIBLE_INVALID_FALSE, -1);
  if (fault)
    gtk_accessible_update_property (GTK_ACCESSIBLE (entry->text), GTK_ACCESSIBLE_PROPERTY_DESCRIPTION, fault, -1);
}

static void show_present (Entry *entry)
{
  g_free (entry->shown);
  entry->shown = entry->dup_text (entry->data);
  if (strcmp (entry->shown, gtk_editable_get_text (GTK_EDITABLE (entry->text))) != 0)
    gtk_editable_set_text (GTK_EDITABLE (entry->text), entry->shown);
  show_fault (entry, NULL);
}

static gboolean is_typed (const Entry *entry)
{
  return strcmp (entry->shown, gtk_editable_get_text (GTK_EDITABLE (entry->text))) != 0;
}

static void try_cb (Entry *entry)
{
  g_autofree char *now = entry->dup_text (entry->data);
  g_autofree char *text = g_strstrip (g_strdup (gtk_editable_get_text (GTK_EDITABLE (entry->text))));
  g_autofree char *fault = NULL;
  /* Nothing typed: what stands there may be older than an undo, and is no wish. */
  if (!is_typed (entry) || strcmp (now, text) == 0)
    show_present (entry);
  else if (entry->try_text (entry->data, text, &fault))
    show_present (entry);
  else
    show_fault (entry, fault);
}

static gboolean key_cb (GtkEventControllerKey *controller, guint keyval, guint code, GdkModifierType state,
                        Entry *entry)
{
  if (keyval != GDK_KEY_Escape)
    return FALSE;
  show_present (entry);
  return TRUE;
}

typedef struct
{
  void (*take) (GtkWidget *field);
} Typed;

void kh_bench_set_take_typed (GtkWidget *field, void (*take) (GtkWidget *field))
{
  Typed *typed = g_new (Typed, 1);
  typed->take = take;
  g_object_set_data_full (G_OBJECT (field), "kh-typed", typed, g_free);
}

void kh_bench_take_typed (GtkWidget *focus)
{
  for (GtkWidget *widget = focus; widget; widget = gtk_widget_get_parent (widget))
    {
      const Typed *typed = g_object_get_data (G_OBJECT (widget), "kh-typed");
      if (typed)
        {
          typed->take (widget);
          return;
        }
    }
}

static void take_typed (GtkWidget *box) { try_cb (entry_of (box)); }

GtkWidget *kh_bench_entry_new (KhTryText try_text, KhDupText dup_text, gpointer data, GDestroyNotify free_data)
{
  Entry *entry = g_new0 (Entry, 1);
  *entry = (Entry){ try_text, dup_text, data, free_data, gtk_entry_new (), label_new ("", "kh-fault") };
  GtkWidget *box = gtk_box_new (GTK_ORIENTATION_VERTICAL, 2);
  GtkEventController *focus = gtk_event_controller_focus_new (), *keys = gtk_event_controller_key_new ();
  gtk_editable_set_width_chars (GTK_EDITABLE (entry->text), 6);
  gtk_widget_set_visible (entry->fault, FALSE);
  gtk_box_append (GTK_BOX (box), entry->text);
  gtk_box_append (GTK_BOX (box), entry->fault);
  g_object_set_data_full (G_OBJECT (box), "kh-entry", entry, entry_free);
  kh_bench_set_take_typed (box, take_typed);
  g_signal_connect_swapped (entry->text, "activate", G_CALLBACK (try_cb), entry);
  g_signal_connect_swapped (focus, "leave", G_CALLBACK (try_cb), entry);
  g_signal_connect (keys, "key-pressed", G_CALLBACK (key_cb), entry);
  gtk_widget_add_controller (entry->text, focus);
  gtk_widget_add_controller (entry->text, keys);
  show_present (entry);
  return box;
}

void kh_bench_entry_refresh (GtkWidget *widget)
{
  Entry *entry = entry_of (widget);
  GtkWidget *focus = gtk_widget_get_root (widget) ? gtk_root_get_focus (gtk_widget_get_root (widget)) : NULL;
  gboolean typing = focus && gtk_widget_is_ancestor (focus, entry->text) && is_typed (entry);
  if (!typing)
    show_present (entry);
}

void kh_bench_forget_typed_below (GtkWidget *widget)
{
  if (entry_of (widget))
    show_present (entry_of (widget));
  else
    for (GtkWidget *child = gtk_widget_get_first_child (widget); child; child = gtk_widget_get_next_sibling (child))
      kh_bench_forget_typed_below (child);
}

void kh_bench_refresh_below (GtkWidget *widget)
{
  if (entry_of (widget))
    kh_bench_entry_refresh (widget);
  else
    for (GtkWidget *child = gtk_widget_get_first_child (widget); child; child = gtk_widget_get_next_sibling (child))
      kh_bench_refresh_below (child);
}
