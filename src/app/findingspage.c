/* SPDX-License-Identifier: MIT */
#include "app/findingspage.h"
#include "app/bench.h"
#include "app/tip.h"
#include <glib/gi18n-lib.h>
#include <math.h>

typedef struct
{
  KhSession *session;
  GtkWidget *count, *cards, *aside_heading, *aside, *sound;
} Page;

static const char *const severity_words[] = { N_ ("stops the build or the run"), N_ ("hinders"), N_ ("note") };

static void clear (GtkWidget *box)
{
  GtkWidget *child;
  while ((child = gtk_widget_get_first_child (box)) != NULL)
    gtk_box_remove (GTK_BOX (box), child);
}

/* The finding's shape, as on the canvas and on paper, with its number. */
typedef struct
{
  KhSeverity severity;
  int number;
} Badge;

static void draw_badge_cb (GtkDrawingArea *area, cairo_t *cr, int width, int height, gpointer data)
{
  const Badge *badge = data;
  GdkRGBA colour;
  const char *const classes[] = { "kh_breaks", "kh_badge", "kh_second" };
  const int n = badge->severity == KH_SEVERITY_BREAKS ? 8 : 3;
  double x = width / 2.0, y = height / 2.0, radius = 10;
  if (!gtk_style_context_lookup_color (gtk_widget_get_style_context (GTK_WIDGET (area)), classes[badge->severity],
                                       &colour))
    colour = (GdkRGBA){ 0.5f, 0.3f, 0, 1 };
  gdk_cairo_set_source_rgba (cr, &colour);
  if (badge->severity == KH_SEVERITY_NOTES)
    cairo_arc (cr, x, y, radius - 1, 0, 2 * G_PI);
  else
    for (int k = 0; k < n; k++)
      {
        double from = n == 8 ? G_PI / 8 : -G_PI / 2, size = n == 8 ? radius : 1.25 * radius;
        cairo_line_to (cr, x + size * cos (from + k * 2 * G_PI / n),
                       y + (n == 3 ? 3 : 0) + size * sin (from + k * 2 * G_PI / n));
      }
  cairo_close_path (cr);
  cairo_fill (cr);
  g_autofree char *text = g_strdup_printf ("%d", badge->number);
  g_autoptr (PangoLayout) layout = gtk_widget_create_pango_layout (GTK_WIDGET (area), text);
  g_autoptr (PangoAttrList) attributes = pango_attr_list_new ();
  pango_attr_list_insert (attributes, pango_attr_weight_new (PANGO_WEIGHT_BOLD));
  pango_attr_list_insert (attributes, pango_attr_scale_new (0.8));
  pango_layout_set_attributes (layout, attributes);
  int w, h;
  pango_layout_get_pixel_size (layout, &w, &h);
  GdkRGBA paper = { 1, 1, 1, 1 };
  gtk_style_context_lookup_color (gtk_widget_get_style_context (GTK_WIDGET (area)), "kh_on_badge", &paper);
  gdk_cairo_set_source_rgba (cr, &paper);
  cairo_move_to (cr, x - w / 2.0, y - h / 2.0 + (n == 3 && badge->severity == KH_SEVERITY_HINDERS ? 2 : 0));
  pango_cairo_show_layout (cr, layout);
}

static GtkWidget *badge_new (const KhFinding *finding)
{
  Badge *badge = g_new (Badge, 1);
  *badge = (Badge){ finding->severity, finding->number };
  GtkWidget *area = gtk_drawing_area_new ();
  gtk_drawing_area_set_content_width (GTK_DRAWING_AREA (area), 26);
  gtk_drawing_area_set_content_height (GTK_DRAWING_AREA (area), 24);
  gtk_drawing_area_set_draw_func (GTK_DRAWING_AREA (area), draw_badge_cb, badge, g_free);
  g_object_set_data (G_OBJECT (area), "kh-drawn", badge);
  gtk_widget_set_valign (area, GTK_ALIGN_START);
  kh_tip_set (area, _ (severity_words[finding->severity]));
  return area;
}

/* ---- a card ---- */

/* A card takes the focus before its buttons do, and is told as a whole. */
#define KH_TYPE_CARD (kh_card_get_type ())
G_DECLARE_FINAL_TYPE (KhCard, kh_card, KH, CARD, GtkBox)

struct _KhCard
{
  GtkBox parent_instance;
};

G_DEFINE_FINAL_TYPE (KhCard, kh_card, GTK_TYPE_BOX)

static void kh_card_class_init (KhCardClass *class)
{
  GtkWidgetClass *plain = g_type_class_ref (GTK_TYPE_WIDGET); /* a box itself passes the focus on */
  GTK_WIDGET_CLASS (class)->focus = plain->focus;
  GTK_WIDGET_CLASS (class)->grab_focus = plain->grab_focus;
  gtk_widget_class_set_accessible_role (GTK_WIDGET_CLASS (class), GTK_ACCESSIBLE_ROLE_GROUP);
  g_type_class_unref (plain);
}

static void kh_card_init (KhCard *card)
{
  gtk_orientable_set_orientation (GTK_ORIENTABLE (card), GTK_ORIENTATION_VERTICAL);
  gtk_widget_set_focusable (GTK_WIDGET (card), TRUE);
  gtk_widget_add_css_class (GTK_WIDGET (card), "kh-card");
}

/* What a button does, with what it does it to. */
static void name_button (GtkWidget *button, const char *words, const KhFinding *finding)
{
  g_autofree char *name = g_strdup_printf ("%s: %s", words, finding->wrong);
  kh_bench_set_name (button, name);
}

/* ---- set aside, bring back ---- */

typedef struct
{
  KhSession *session;
  char *code;
  double at[2];
} Place;

static void place_free (gpointer data, GClosure *closure)
{
  Place *place = data;
  g_free (place->code);
  g_free (place);
}

static Place *place_new (KhSession *session, const KhFinding *finding)
{
  Place *place = g_new (Place, 1);
  *place = (Place){ session, g_strdup (finding->code), { finding->at[0], finding->at[1] } };
  return place;
}

static gboolean is_place (const KhSetAside *entry, const Place *place)
{
  return g_strcmp0 (entry->code, place->code) == 0 && entry->at[0] == place->at[0] && entry->at[1] == place->at[1];
}

/* The plan's list without the place, with it again where a reason is given. */
static void set_aside (const Place *place, const char *reason)
{
  const GArray *now = kh_session_get_plan (place->session)->set_aside;
  g_autoptr (GArray) list = g_array_new (FALSE, FALSE, sizeof (KhSetAside));
  for (guint i = 0; i < now->len; i++)
    if (!is_place (&g_array_index (now, KhSetAside, i), place))
      g_array_append_val (list, g_array_index (now, KhSetAside, i));
  KhSetAside entry = { place->code, { place->at[0], place->at[1] }, (char *)reason, NULL };
  if (reason)
    g_array_append_val (list, entry);
  kh_session_do_take (place->session, kh_change_new_set_aside ((const KhSetAside *)(void *)list->data, list->len),
                      reason ? _ ("Finding set aside") : _ ("Finding brought back"));
}

static void bring_back_cb (GtkButton *button, Place *place) { set_aside (place, NULL); }

static void reason_cb (GtkEntry *entry, Place *place)
{
  g_autofree char *reason = g_strstrip (g_strdup (gtk_editable_get_text (GTK_EDITABLE (entry))));
  if (*reason == '\0')
    return;
  gtk_popover_popdown (GTK_POPOVER (gtk_widget_get_ancestor (GTK_WIDGET (entry), GTK_TYPE_POPOVER)));
  set_aside (place, reason);
}

static void activate_entry_cb (GtkWidget *entry) { g_signal_emit_by_name (entry, "activate"); }

/* Made when it is opened: a popover is a window of its own, too dear for each card. */
static void make_reason_popover (GtkMenuButton *button, gpointer data)
{
  const Place *place = data;
  GtkWidget *popover = gtk_popover_new (), *box = gtk_box_new (GTK_ORIENTATION_VERTICAL, 6);
  GtkWidget *entry = gtk_entry_new (), *done = gtk_button_new_with_mnemonic (_ ("_Set aside"));
  Place *own = g_new (Place, 1);
  *own = (Place){ place->session, g_strdup (place->code), { place->at[0], place->at[1] } };
  gtk_entry_set_placeholder_text (GTK_ENTRY (entry), _ ("meant so"));
  gtk_accessible_update_property (GTK_ACCESSIBLE (entry), GTK_ACCESSIBLE_PROPERTY_LABEL, _ ("Reason"), -1);
  gtk_box_append (GTK_BOX (box), kh_bench_words_new (_ ("Why it is sound as it is; kept in the plan:"), "kh-second"));
  gtk_box_append (GTK_BOX (box), entry);
  gtk_box_append (GTK_BOX (box), done);
  gtk_popover_set_child (GTK_POPOVER (popover), box);
  g_signal_connect_data (entry, "activate", G_CALLBACK (reason_cb), own, place_free, 0);
  g_signal_connect_swapped (done, "clicked", G_CALLBACK (activate_entry_cb), entry);
  gtk_menu_button_set_popover (button, popover);
}

static void place_destroy (gpointer place) { place_free (place, NULL); }

static GtkWidget *set_aside_button_new (KhSession *session, const KhFinding *finding)
{
  GtkWidget *button = gtk_menu_button_new ();
  gtk_menu_button_set_label (GTK_MENU_BUTTON (button), _ ("Set aside…"));
  name_button (button, _ ("Set aside…"), finding);
  name_button (gtk_widget_get_first_child (button), _ ("Set aside…"), finding); /* this one has the focus */
  gtk_menu_button_set_create_popup_func (GTK_MENU_BUTTON (button), make_reason_popover, place_new (session, finding),
                                         place_destroy);
  return button;
}

/* ---- one finding ---- */

static void chosen_cb (GtkEventController *controller, Page *page)
{
  GtkWidget *card = gtk_event_controller_get_widget (controller);
  kh_session_set_chosen_finding (page->session, GPOINTER_TO_INT (g_object_get_data (G_OBJECT (card), "kh-index")));
}

/* Enter on a card does what its first button does. */
static gboolean card_key_cb (GtkEventControllerKey *controller, guint keyval, guint code, GdkModifierType state)
{
  GtkWidget *card = gtk_event_controller_get_widget (GTK_EVENT_CONTROLLER (controller));
  if (!gtk_widget_is_focus (card) || (keyval != GDK_KEY_Return && keyval != GDK_KEY_KP_Enter))
    return FALSE;
  return gtk_widget_activate (g_object_get_data (G_OBJECT (card), "kh-show"));
}

static GtkWidget *show_button_new (const KhFinding *finding, int index)
{
  GtkWidget *show = gtk_button_new_with_label (_ ("Show"));
  name_button (show, _ ("Show"), finding);
  gtk_actionable_set_action_name (GTK_ACTIONABLE (show), "win.show-finding");
  gtk_actionable_set_action_target (GTK_ACTIONABLE (show), "i", index);
  return show;
}

/* A card says this; its number may change beneath it. */
static char *dup_card_key (const KhFinding *finding)
{
  return g_strdup_printf ("%s|%s|%s|%d|%g|%g", finding->code, finding->wrong, finding->effect, (int)finding->severity,
                          finding->at[0], finding->at[1]);
}

static void number_card (GtkWidget *card, const KhFinding *finding, int index)
{
  GtkWidget *badge = g_object_get_data (G_OBJECT (card), "kh-badge"),
            *show = g_object_get_data (G_OBJECT (card), "kh-show");
  Badge *drawn = g_object_get_data (G_OBJECT (badge), "kh-drawn");
  g_autofree char *name = g_strdup_printf ("%d, %s. %s %s", finding->number, _ (severity_words[finding->severity]),
                                           finding->wrong, finding->effect);
  g_object_set_data (G_OBJECT (card), "kh-index", GINT_TO_POINTER (index));
  gtk_actionable_set_action_target (GTK_ACTIONABLE (show), "i", index);
  gtk_accessible_update_property (GTK_ACCESSIBLE (card), GTK_ACCESSIBLE_PROPERTY_LABEL, name, -1);
  drawn->number = finding->number;
  gtk_widget_queue_draw (badge);
}

static GtkWidget *card_new (Page *page, const KhFinding *finding, int index)
{
  GtkWidget *card = g_object_new (KH_TYPE_CARD, "spacing", 6, NULL),
            *head = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 8);
  GtkWidget *texts = gtk_box_new (GTK_ORIENTATION_VERTICAL, 3), *buttons = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 6);
  GtkWidget *badge = badge_new (finding), *show = show_button_new (finding, index);
  g_object_set_data (G_OBJECT (card), "kh-badge", badge);
  g_object_set_data (G_OBJECT (card), "kh-show", show);
  g_object_set_data_full (G_OBJECT (card), "kh-key", dup_card_key (finding), g_free);
  gtk_box_append (GTK_BOX (head), badge);
  gtk_widget_set_hexpand (texts, TRUE);
  gtk_box_append (GTK_BOX (texts), kh_bench_words_new (finding->wrong, "kh-heading"));
  gtk_box_append (GTK_BOX (texts), kh_bench_words_new (_ (severity_words[finding->severity]), "kh-second"));
  if (*finding->effect)
    gtk_box_append (GTK_BOX (texts), kh_bench_words_new (finding->effect, "kh-running"));
  gtk_box_append (GTK_BOX (head), texts);
  gtk_box_append (GTK_BOX (card), head);
  gtk_widget_set_margin_start (buttons, 34);
  gtk_box_append (GTK_BOX (buttons), show);
  gtk_box_append (GTK_BOX (buttons), set_aside_button_new (page->session, finding));
  gtk_box_append (GTK_BOX (card), buttons);
  GtkEventController *focus = gtk_event_controller_focus_new ();
  g_signal_connect (focus, "enter", G_CALLBACK (chosen_cb), page);
  GtkEventController *keys = gtk_event_controller_key_new ();
  g_signal_connect (keys, "key-pressed", G_CALLBACK (card_key_cb), NULL);
  gtk_widget_add_controller (card, focus);
  gtk_widget_add_controller (card, keys);
  number_card (card, finding, index);
  return card;
}

static GtkWidget *aside_new (Page *page, const KhFinding *finding)
{
  GtkWidget *card = gtk_box_new (GTK_ORIENTATION_VERTICAL, 3), *back = gtk_button_new_with_label (_ ("Bring back"));
  name_button (back, _ ("Bring back"), finding);
  gtk_widget_add_css_class (card, "kh-card");
  gtk_widget_set_halign (back, GTK_ALIGN_START);
  gtk_box_append (GTK_BOX (card), kh_bench_words_new (finding->wrong, "kh-running"));
  gtk_box_append (GTK_BOX (card), kh_bench_words_new (finding->reason, "kh-second"));
  gtk_box_append (GTK_BOX (card), back);
  g_signal_connect_data (back, "clicked", G_CALLBACK (bring_back_cb), place_new (page->session, finding), place_free,
                         0);
  return card;
}

static GtkWidget *sound_new (const char *text)
{
  GtkWidget *row = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 8), *tick = gtk_label_new ("✓");
  gtk_widget_add_css_class (tick, "kh-answer");
  gtk_widget_set_valign (tick, GTK_ALIGN_START);
  gtk_box_append (GTK_BOX (row), tick);
  gtk_box_append (GTK_BOX (row), kh_bench_words_new (text, "kh-running"));
  return row;
}

static char *dup_count (const KhReview *review)
{
  const int *n = review->n_by_severity;
  g_autoptr (GPtrArray) parts = g_ptr_array_new_with_free_func (g_free);
  if (n[0] > 0)
    g_ptr_array_add (parts, g_strdup_printf (ngettext ("%d stops", "%d stop", (gulong)n[0]), n[0]));
  if (n[1] > 0)
    g_ptr_array_add (parts, g_strdup_printf (ngettext ("%d hinders", "%d hinder", (gulong)n[1]), n[1]));
  if (n[2] > 0)
    g_ptr_array_add (parts, g_strdup_printf (ngettext ("%d note", "%d notes", (gulong)n[2]), n[2]));
  if (review->n_set_aside > 0)
    g_ptr_array_add (parts, g_strdup_printf (ngettext ("%d set aside", "%d set aside", (gulong)review->n_set_aside),
                                             review->n_set_aside));
  if (parts->len == 0)
    return g_strdup (_ ("Nothing to say"));
  g_ptr_array_add (parts, NULL);
  return g_strjoinv (", ", (char **)parts->pdata);
}

/* Cards are kept where their words did not change, so that the focus stays. */
static char *dup_key (const KhReview *review)
{
  GString *key = g_string_new (NULL);
  for (guint i = 0; i < review->findings->len; i++)
    {
      const KhFinding *finding = g_ptr_array_index (review->findings, i);
      g_string_append_printf (key, "%s|%s|%s|%d|%g|%g\n", finding->wrong, finding->effect,
                              finding->reason ? finding->reason : "-", (int)finding->severity, finding->at[0],
                              finding->at[1]);
    }
  for (guint i = 0; i < review->sound->len; i++)
    g_string_append_printf (key, "%s\n", (const char *)g_ptr_array_index (review->sound, i));
  return g_string_free (key, FALSE);
}

/* The card of this finding among those from 'from' on; NULL: none yet. */
static GtkWidget *find_card (GtkWidget *from, const KhFinding *finding)
{
  g_autofree char *key = dup_card_key (finding);
  for (GtkWidget *card = from; card != NULL; card = gtk_widget_get_next_sibling (card))
    if (g_strcmp0 (g_object_get_data (G_OBJECT (card), "kh-key"), key) == 0)
      return card;
  return NULL;
}

/* Cards whose words stay are kept, so that the focus stays and only what is new
 * has its text laid out. */
static void fill_cards (Page *page, const KhReview *review)
{
  GtkWidget *last = NULL, *card;
  for (guint i = 0; i < review->findings->len; i++)
    {
      const KhFinding *finding = g_ptr_array_index (review->findings, i);
      GtkWidget *next = last ? gtk_widget_get_next_sibling (last) : gtk_widget_get_first_child (page->cards);
      if (finding->reason)
        continue;
      card = find_card (next, finding);
      if (card == NULL)
        {
          card = card_new (page, finding, (int)i);
          gtk_box_insert_child_after (GTK_BOX (page->cards), card, last);
        }
      else
        {
          if (card != next)
            gtk_box_reorder_child_after (GTK_BOX (page->cards), card, last);
          number_card (card, finding, (int)i);
        }
      last = card;
    }
  while ((card = last ? gtk_widget_get_next_sibling (last) : gtk_widget_get_first_child (page->cards)) != NULL)
    gtk_box_remove (GTK_BOX (page->cards), card);
}

static void mark_chosen (GtkWidget *widget)
{
  Page *page = g_object_get_data (G_OBJECT (widget), "kh-page");
  int chosen = kh_session_get_chosen_finding (page->session);
  for (GtkWidget *card = gtk_widget_get_first_child (page->cards); card; card = gtk_widget_get_next_sibling (card))
    if (GPOINTER_TO_INT (g_object_get_data (G_OBJECT (card), "kh-index")) == chosen)
      gtk_widget_add_css_class (card, "kh-chosen");
    else
      gtk_widget_remove_css_class (card, "kh-chosen");
}

static void fill (GtkWidget *widget)
{
  Page *page = g_object_get_data (G_OBJECT (widget), "kh-page");
  const KhReview *review = kh_session_get_review (page->session);
  g_autofree char *count = dup_count (review);
  char *key = dup_key (review);
  if (g_strcmp0 (key, g_object_get_data (G_OBJECT (widget), "kh-key")) == 0)
    {
      g_free (key);
      return;
    }
  g_object_set_data_full (G_OBJECT (widget), "kh-key", key, g_free);
  gtk_label_set_text (GTK_LABEL (page->count), count);
  kh_tip_set (page->count, count);
  clear (page->aside);
  clear (page->sound);
  fill_cards (page, review);
  for (guint i = 0; i < review->findings->len; i++)
    if (((const KhFinding *)g_ptr_array_index (review->findings, i))->reason)
      gtk_box_append (GTK_BOX (page->aside), aside_new (page, g_ptr_array_index (review->findings, i)));
  for (guint i = 0; i < review->sound->len; i++)
    gtk_box_append (GTK_BOX (page->sound), sound_new (g_ptr_array_index (review->sound, i)));
  gtk_widget_set_visible (page->aside_heading, review->n_set_aside > 0);
  mark_chosen (widget);
}

static void page_free (gpointer data)
{
  Page *page = data;
  g_object_unref (page->session);
  g_free (page);
}

GtkWidget *kh_findings_page_new (KhSession *session)
{
  Page *page = g_new0 (Page, 1);
  GtkWidget *column, *widget = kh_bench_page_new (&column);
  GtkWidget *head = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 6), *next = kh_bench_note_new (_ ("Next finding F8"));
  page->session = g_object_ref (session);
  page->count = kh_bench_heading_new ("");
  gtk_label_set_wrap (GTK_LABEL (page->count), FALSE); /* it changes with each edit: cheap to lay out */
  gtk_label_set_ellipsize (GTK_LABEL (page->count), PANGO_ELLIPSIZE_END);
  page->cards = gtk_box_new (GTK_ORIENTATION_VERTICAL, 10);
  page->aside = gtk_box_new (GTK_ORIENTATION_VERTICAL, 6);
  page->sound = gtk_box_new (GTK_ORIENTATION_VERTICAL, 4);
  page->aside_heading = kh_bench_heading_new (_ ("Set aside"));
  gtk_widget_set_hexpand (page->count, TRUE);
  gtk_label_set_wrap (GTK_LABEL (next), FALSE);
  gtk_widget_set_valign (next, GTK_ALIGN_BASELINE);
  gtk_widget_set_valign (page->count, GTK_ALIGN_BASELINE);
  gtk_box_append (GTK_BOX (head), page->count);
  gtk_box_append (GTK_BOX (head), next);
  gtk_box_append (GTK_BOX (column), head);
  gtk_box_append (GTK_BOX (column), page->cards);
  gtk_box_append (GTK_BOX (column), page->aside_heading);
  gtk_box_append (GTK_BOX (column), page->aside);
  gtk_box_append (GTK_BOX (column), kh_bench_heading_new (_ ("Looked at and found sound")));
  gtk_box_append (GTK_BOX (column), page->sound);
  g_object_set_data_full (G_OBJECT (widget), "kh-page", page, page_free);
  kh_bench_follow_later (widget, session, "review-changed", G_CALLBACK (fill), 20);
  kh_bench_follow (widget, session, "selection-changed", G_CALLBACK (mark_chosen));
  fill (widget);
  return widget;
}
