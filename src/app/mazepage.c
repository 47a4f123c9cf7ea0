/* SPDX-License-Identifier: MIT */
#include "app/mazepage.h"
#include "app/bench.h"
#include "app/resize.h"
#include "app/settings.h"
#include <glib/gi18n-lib.h>
#include <string.h>

#define MOST_NOTES 20000 /* characters, as in a file */

typedef struct
{
  KhSession *session;
  GtkWidget *posts, *measures, *columns, *rows, *anchor, *what, *apply, *notes_fault;
  gboolean filling;
} Page;

/* ---- texts and lengths ---- */

typedef enum
{
  FIELD_TITLE,
  FIELD_PITCH,
  FIELD_THICKNESS,
  FIELD_HEIGHT
} FieldKind;

typedef struct
{
  KhSession *session;
  FieldKind kind;
} Field;

static char *dup_field (gpointer data)
{
  const Field *field = data;
  const KhPlan *plan = kh_session_get_plan (field->session);
  switch (field->kind)
    {
    case FIELD_TITLE:
      return g_strdup (plan->title);
    case FIELD_PITCH:
      return kh_length_dup_text (plan->lattice.pitch_nm, kh_settings_get_unit (), TRUE);
    case FIELD_THICKNESS:
      return kh_length_dup_text (plan->walls.thickness_nm, kh_settings_get_unit (), TRUE);
    default:
      return kh_length_dup_text (plan->walls.height_nm, kh_settings_get_unit (), TRUE);
    }
}

static gboolean try_title (const Field *field, const char *text, char **fault)
{
  if (g_utf8_strlen (text, -1) > 200)
    {
      *fault = g_strdup (_ ("A title has at most 200 characters."));
      return FALSE;
    }
  kh_session_do_take (field->session, kh_change_new_texts (text, kh_session_get_plan (field->session)->notes),
                      _ ("Title changed"));
  return TRUE;
}

/* A new pitch is a new plan of the same layout. */
static void set_pitch (KhSession *session, int64_t nm)
{
  g_autoptr (KhPlan) plan = kh_plan_copy (kh_session_get_plan (session));
  plan->lattice.pitch_nm = nm;
  kh_session_do_take (session, kh_change_new_plan (plan), _ ("Pitch changed"));
}

static gboolean check_length (const KhPlan *plan, FieldKind kind, int64_t nm, char **fault)
{
  int64_t pitch = kind == FIELD_PITCH ? nm : plan->lattice.pitch_nm;
  int64_t thickness = kind == FIELD_THICKNESS ? nm : plan->walls.thickness_nm;
  if (kind == FIELD_PITCH && (nm < 20 * KH_NM_PER_MM || nm > 5000 * KH_NM_PER_MM))
    *fault = g_strdup (_ ("The pitch can be from 20 to 5000 mm."));
  else if (kind == FIELD_HEIGHT && (nm < KH_NM_PER_MM || nm > 3000 * KH_NM_PER_MM))
    *fault = g_strdup (_ ("The height can be from 1 to 3000 mm."));
  else if (thickness <= 0 || 2 * thickness >= pitch)
    *fault = g_strdup (_ ("Walls must be thicker than nothing and thinner than half the pitch."));
  else
    return TRUE;
  return FALSE;
}

static gboolean try_field (gpointer data, const char *text, char **fault)
{
  const Field *field = data;
  const KhPlan *plan = kh_session_get_plan (field->session);
  g_autoptr (GError) error = NULL;
  int64_t nm;
  if (field->kind == FIELD_TITLE)
    return try_title (field, text, fault);
  if (!kh_length_parse (text, kh_settings_get_unit (), &nm, &error))
    {
      *fault = g_strdup (error->message);
      return FALSE;
    }
  if (!check_length (plan, field->kind, nm, fault))
    return FALSE;
  if (field->kind == FIELD_PITCH)
    set_pitch (field->session, nm);
  else if (field->kind == FIELD_THICKNESS)
    kh_session_do_take (field->session,
                        kh_change_new_wall_sizes (nm + nm % 2, plan->walls.height_nm, plan->walls.posts),
                        _ ("Thickness changed"));
  else
    kh_session_do_take (field->session, kh_change_new_wall_sizes (plan->walls.thickness_nm, nm, plan->walls.posts),
                        _ ("Height changed"));
  return TRUE;
}

static GtkWidget *field_new (KhSession *session, FieldKind kind)
{
  Field *field = g_new (Field, 1);
  *field = (Field){ session, kind };
  return kh_bench_entry_new (try_field, dup_field, field, g_free);
}

/* ---- posts and size ---- */

static void posts_cb (Page *page)
{
  const KhPlan *plan = kh_session_get_plan (page->session);
  if (!page->filling)
    kh_session_do_take (page->session,
                        kh_change_new_wall_sizes (plan->walls.thickness_nm, plan->walls.height_nm,
                                                  gtk_drop_down_get_selected (GTK_DROP_DOWN (page->posts)) == 0
                                                      ? KH_POSTS_WHERE_WALLS_MEET
                                                      : KH_POSTS_EVERYWHERE),
                        _ ("Posts changed"));
}

static KhResize wished_size (Page *page)
{
  guint anchor = gtk_drop_down_get_selected (GTK_DROP_DOWN (page->anchor));
  return (KhResize){ (int)gtk_spin_button_get_value (GTK_SPIN_BUTTON (page->columns)),
                     (int)gtk_spin_button_get_value (GTK_SPIN_BUTTON (page->rows)), anchor == 1 || anchor == 3,
                     anchor >= 2 };
}

/* What the new size would do is said before it is done. */
static void wish_cb (Page *page)
{
  if (page->filling)
    return;
  KhResize resize = wished_size (page);
  g_autofree char *what = kh_resize_dup_words (kh_session_get_plan (page->session), &resize);
  gtk_label_set_text (GTK_LABEL (page->what), what ? what : "");
  gtk_widget_set_visible (page->what, what != NULL);
  gtk_widget_set_sensitive (page->apply, what != NULL);
}

static void apply_cb (Page *page)
{
  KhResize resize = wished_size (page);
  g_autoptr (KhPlan) plan = kh_resize_plan (kh_session_get_plan (page->session), &resize);
  kh_session_do_take (page->session, kh_change_new_plan (plan), _ ("Size changed"));
}

/* ---- page ---- */

static void show_measures (GtkWidget *widget)
{
  Page *page = g_object_get_data (G_OBJECT (widget), "kh-page");
  const KhReview *review = kh_session_get_review (page->session);
  const KhMeasures *m = &review->measures;
  const KhPlan *plan = kh_session_get_plan (page->session);
  GString *text = g_string_new (NULL);
  g_autofree char *clear
      = kh_length_dup_text (plan->lattice.pitch_nm - plan->walls.thickness_nm, kh_settings_get_unit (), TRUE);
  g_string_append_printf (text, _ ("Clear width %s\n"), clear);
  g_string_append_printf (text, _ ("Dead ends %d, junctions %d\nLongest straight %d cells\n"), m->dead_ends,
                          m->junctions, m->longest_straight);
  if (m->shortest_steps >= 0)
    g_string_append_printf (text,
                            ngettext ("Shortest way %d step\n", "Shortest way %d steps\n", (gulong)m->shortest_steps),
                            m->shortest_steps);
  for (int hand = 0; hand < 2 && review->has_walks; hand++)
    g_string_append_printf (text, _ ("%s: %d steps, %d different cells\n"),
                            hand == KH_HAND_RIGHT ? _ ("Right hand") : _ ("Left hand"), review->walks[hand].n_steps,
                            review->walks[hand].n_cells);
  g_string_append_printf (text, _ ("Loops %d, islands %u, pockets %d"), review->layout->n_loops,
                          review->layout->islands->len, review->layout->n_pockets);
  gtk_label_set_text (GTK_LABEL (page->measures), text->str);
  g_string_free (text, TRUE);
}

static void fill (GtkWidget *widget)
{
  Page *page = g_object_get_data (G_OBJECT (widget), "kh-page");
  const KhPlan *plan = kh_session_get_plan (page->session);
  page->filling = TRUE;
  gtk_drop_down_set_selected (GTK_DROP_DOWN (page->posts), plan->walls.posts == KH_POSTS_EVERYWHERE ? 1 : 0);
  gtk_spin_button_set_value (GTK_SPIN_BUTTON (page->columns), plan->lattice.columns);
  gtk_spin_button_set_value (GTK_SPIN_BUTTON (page->rows), plan->lattice.rows);
  kh_bench_refresh_below (widget);
  page->filling = FALSE;
  wish_cb (page);
}

/* Notes that are too long stay as typed, with the fault beneath; the plan keeps its own. */
static void take_notes (GtkWidget *view)
{
  Page *page = g_object_get_data (G_OBJECT (view), "kh-page");
  GtkTextBuffer *buffer = gtk_text_view_get_buffer (GTK_TEXT_VIEW (view));
  GtkTextIter start, end;
  gtk_text_buffer_get_bounds (buffer, &start, &end);
  g_autofree char *text = gtk_text_buffer_get_text (buffer, &start, &end, FALSE);
  const KhPlan *plan = kh_session_get_plan (page->session);
  long over = g_utf8_strlen (text, -1) - MOST_NOTES;
  gtk_widget_set_visible (page->notes_fault, over > 0);
  if (over > 0)
    {
      g_autofree char *fault = g_strdup_printf (
          ngettext ("The notes are %ld character too long and were not taken over. Shorten them.",
                    "The notes are %ld characters too long and were not taken over. Shorten them.", (gulong)over),
          over);
      gtk_label_set_text (GTK_LABEL (page->notes_fault), fault);
      gtk_accessible_update_property (GTK_ACCESSIBLE (view), GTK_ACCESSIBLE_PROPERTY_DESCRIPTION, fault, -1);
    }
  else if (strcmp (text, plan->notes) != 0)
    kh_session_do_take (page->session, kh_change_new_texts (plan->title, text), _ ("Notes changed"));
}

static void notes_left_cb (GtkEventController *controller)
{
  take_notes (gtk_event_controller_get_widget (controller));
}

static void show_notes (GtkWidget *view)
{
  Page *page = g_object_get_data (G_OBJECT (view), "kh-page");
  GtkTextBuffer *buffer = gtk_text_view_get_buffer (GTK_TEXT_VIEW (view));
  if (!gtk_widget_has_focus (view) && !gtk_widget_get_visible (page->notes_fault))
    gtk_text_buffer_set_text (buffer, kh_session_get_plan (page->session)->notes, -1);
}

static GtkWidget *notes_new (Page *page)
{
  GtkWidget *view = gtk_text_view_new (), *frame = gtk_scrolled_window_new ();
  GtkEventController *focus = gtk_event_controller_focus_new ();
  gtk_text_view_set_wrap_mode (GTK_TEXT_VIEW (view), GTK_WRAP_WORD_CHAR);
  gtk_text_view_set_accepts_tab (GTK_TEXT_VIEW (view), FALSE);
  gtk_text_view_set_left_margin (GTK_TEXT_VIEW (view), 6);
  gtk_text_view_set_top_margin (GTK_TEXT_VIEW (view), 6);
  gtk_accessible_update_property (GTK_ACCESSIBLE (view), GTK_ACCESSIBLE_PROPERTY_LABEL, _ ("Notes"), -1);
  gtk_scrolled_window_set_min_content_height (GTK_SCROLLED_WINDOW (frame), 90);
  gtk_scrolled_window_set_child (GTK_SCROLLED_WINDOW (frame), view);
  gtk_widget_add_css_class (frame, "kh-card");
  page->notes_fault = kh_bench_note_new ("");
  gtk_widget_add_css_class (page->notes_fault, "kh-fault");
  gtk_widget_set_visible (page->notes_fault, FALSE);
  g_object_set_data (G_OBJECT (view), "kh-page", page);
  kh_bench_set_take_typed (view, take_notes);
  g_signal_connect (focus, "leave", G_CALLBACK (notes_left_cb), NULL);
  gtk_widget_add_controller (view, focus);
  kh_bench_follow (view, page->session, "plan-changed", G_CALLBACK (show_notes));
  show_notes (view);
  return frame;
}

static void page_free (gpointer data)
{
  Page *page = data;
  g_object_unref (page->session);
  g_free (page);
}

static GtkWidget *spin_new (Page *page)
{
  GtkWidget *spin = gtk_spin_button_new_with_range (1, KH_LATTICE_MOST, 1);
  g_signal_connect_swapped (spin, "value-changed", G_CALLBACK (wish_cb), page);
  return spin;
}

static void add_size (GtkWidget *column, Page *page)
{
  const char *const anchors[] = { _ ("South-west"), _ ("South-east"), _ ("North-west"), _ ("North-east"), NULL };
  page->columns = spin_new (page);
  page->rows = spin_new (page);
  page->anchor = gtk_drop_down_new_from_strings (anchors);
  page->what = kh_bench_note_new ("");
  page->apply = gtk_button_new_with_mnemonic (_ ("_Change the size"));
  g_signal_connect_swapped (page->anchor, "notify::selected", G_CALLBACK (wish_cb), page);
  g_signal_connect_swapped (page->apply, "clicked", G_CALLBACK (apply_cb), page);
  gtk_widget_set_halign (page->apply, GTK_ALIGN_END);
  gtk_box_append (GTK_BOX (column), kh_bench_heading_new (_ ("Size")));
  gtk_box_append (GTK_BOX (column), kh_bench_row_new (_ ("Columns"), page->columns));
  gtk_box_append (GTK_BOX (column), kh_bench_row_new (_ ("Rows"), page->rows));
  gtk_box_append (GTK_BOX (column), kh_bench_row_new (_ ("Corner that stays"), page->anchor));
  gtk_box_append (GTK_BOX (column), page->what);
  gtk_box_append (GTK_BOX (column), page->apply);
}

GtkWidget *kh_maze_page_new (KhSession *session)
{
  const char *const posts[] = { _ ("Where walls meet"), _ ("Everywhere"), NULL };
  Page *page = g_new0 (Page, 1);
  GtkWidget *column, *widget = kh_bench_page_new (&column);
  page->session = g_object_ref (session);
  page->filling = TRUE;
  g_object_set_data_full (G_OBJECT (widget), "kh-page", page, page_free);
  page->posts = gtk_drop_down_new_from_strings (posts);
  page->measures = kh_bench_note_new ("");
  g_signal_connect_swapped (page->posts, "notify::selected", G_CALLBACK (posts_cb), page);
  gtk_box_append (GTK_BOX (column), kh_bench_row_new (_ ("Title"), field_new (session, FIELD_TITLE)));
  gtk_box_append (GTK_BOX (column), kh_bench_row_new (_ ("Pitch"), field_new (session, FIELD_PITCH)));
  gtk_box_append (GTK_BOX (column), kh_bench_row_new (_ ("Wall thickness"), field_new (session, FIELD_THICKNESS)));
  gtk_box_append (GTK_BOX (column), kh_bench_row_new (_ ("Wall height"), field_new (session, FIELD_HEIGHT)));
  gtk_box_append (GTK_BOX (column), kh_bench_row_new (_ ("Posts"), page->posts));
  add_size (column, page);
  gtk_box_append (GTK_BOX (column), kh_bench_heading_new (_ ("Measures")));
  gtk_box_append (GTK_BOX (column), page->measures);
  gtk_box_append (GTK_BOX (column), kh_bench_heading_new (_ ("Notes")));
  gtk_box_append (GTK_BOX (column), notes_new (page));
  gtk_box_append (GTK_BOX (column), page->notes_fault);
  kh_bench_follow (widget, session, "plan-changed", G_CALLBACK (fill));
  kh_bench_follow (widget, session, "review-changed", G_CALLBACK (show_measures));
  fill (widget);
  show_measures (widget);
  return widget;
}
