/* SPDX-License-Identifier: MIT */
#include "app/panelspage.h"
#include "app/bench.h"
#include "app/boardsbox.h"
#include "app/cutlistview.h"
#include "app/sawwords.h"
#include "app/settings.h"
#include <glib/gi18n-lib.h>

typedef struct
{
  KhSession *session;
  GtkWidget *ends, *count, *lit, *cannot, *sum, *buy;
  gboolean filling;
} Page;

static void ends_cb (Page *page)
{
  KhBuild build;
  if (page->filling)
    return;
  kh_build_copy (&build, &kh_session_get_plan (page->session)->build);
  build.joint = KH_JOINT_BUTT;
  build.ends = gtk_drop_down_get_selected (GTK_DROP_DOWN (page->ends)) == 0 ? KH_ENDS_FULL : KH_ENDS_FLUSH;
  kh_session_do_take (page->session, kh_change_new_build (&build), _ ("Joint changed"));
  kh_build_clear (&build);
}

static void show_joint (GtkWidget *widget)
{
  Page *page = g_object_get_data (G_OBJECT (widget), "kh-page");
  const KhBuild *build = &kh_session_get_plan (page->session)->build;
  page->filling = TRUE;
  gtk_drop_down_set_selected (GTK_DROP_DOWN (page->ends), build->joint != KH_JOINT_BUTT ? GTK_INVALID_LIST_POSITION
                                                          : build->ends == KH_ENDS_FULL ? 0
                                                                                        : 1);
  kh_bench_refresh_below (widget);
  page->filling = FALSE;
}

static void show_lit (GtkWidget *widget)
{
  Page *page = g_object_get_data (G_OBJECT (widget), "kh-page");
  const KhCutList *list = kh_session_get_review (page->session)->cut_list;
  int lit = kh_session_get_lit_row (page->session);
  if (!list || lit < 0 || lit >= (int)list->rows->len)
    {
      gtk_label_set_text (GTK_LABEL (page->lit),
                          _ ("Choose a row to light its panels on the plan and on the saw plan."));
      return;
    }
  const KhCutRow *row = &g_array_index (list->rows, KhCutRow, lit);
  g_autofree char *length = kh_length_dup_text (row->length_nm, kh_settings_get_unit (), TRUE);
  g_autofree char *text
      = g_strdup_printf (ngettext ("%d panel of %s is lit on the plan and on the saw plan.",
                                   "%d panels of %s are lit on the plan and on the saw plan.", (gulong)row->count),
                         row->count, length);
  gtk_label_set_text (GTK_LABEL (page->lit), text);
}

static void show_panels (GtkWidget *widget)
{
  Page *page = g_object_get_data (G_OBJECT (widget), "kh-page");
  const KhReview *review = kh_session_get_review (page->session);
  const KhPlan *plan = kh_session_get_plan (page->session);
  if (!review->cut_list && !review->panels_fault)
    return; /* being worked out: what is shown stays */
  g_autofree char *cannot = kh_saw_words_dup_cannot (review), *sum = kh_saw_words_dup_sum (review, plan),
                  *buy = kh_saw_words_dup_buy (review, plan);
  guint panels = review->cut_list ? review->cut_list->panels->len : 0,
        lengths = review->cut_list ? review->cut_list->rows->len : 0;
  g_autofree char *n_panels = g_strdup_printf (ngettext ("%u panel", "%u panels", panels), panels);
  g_autofree char *n_lengths = g_strdup_printf (ngettext ("%u length", "%u lengths", lengths), lengths);
  g_autofree char *count = g_strdup_printf ("%s, %s", n_panels, n_lengths);
  gtk_label_set_text (GTK_LABEL (page->count), count);
  gtk_label_set_text (GTK_LABEL (page->cannot), cannot ? cannot : "");
  gtk_widget_set_visible (page->cannot, cannot != NULL);
  gtk_label_set_text (GTK_LABEL (page->sum), sum);
  gtk_label_set_text (GTK_LABEL (page->buy), buy);
  show_lit (widget);
}

static void page_free (gpointer data)
{
  Page *page = data;
  g_object_unref (page->session);
  g_free (page);
}

static GtkWidget *action_button_new (const char *label, const char *action, gboolean filled)
{
  GtkWidget *button = gtk_button_new_with_mnemonic (label);
  gtk_actionable_set_action_name (GTK_ACTIONABLE (button), action);
  gtk_widget_set_hexpand (button, TRUE);
  if (filled)
    gtk_widget_add_css_class (button, "suggested-action");
  return button;
}

static void add_cut_list (GtkWidget *column, Page *page)
{
  GtkWidget *head = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 6), *title = kh_bench_heading_new (_ ("Cut list"));
  GtkWidget *buttons = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 6);
  page->count = kh_bench_note_new ("");
  page->lit = kh_bench_note_new ("");
  page->cannot = kh_bench_note_new ("");
  gtk_widget_add_css_class (page->cannot, "kh-fault");
  gtk_widget_set_hexpand (title, TRUE);
  gtk_widget_set_valign (page->count, GTK_ALIGN_END);
  gtk_box_append (GTK_BOX (head), title);
  gtk_box_append (GTK_BOX (head), page->count);
  gtk_box_append (GTK_BOX (buttons), action_button_new (_ ("_Print plan…"), "win.export-plan", TRUE));
  gtk_box_append (GTK_BOX (buttons), action_button_new (_ ("Save as _table…"), "win.export-cut-list", FALSE));
  gtk_box_append (GTK_BOX (column), head);
  gtk_box_append (GTK_BOX (column), kh_cut_list_view_new (page->session));
  gtk_box_append (GTK_BOX (column), page->lit);
  gtk_box_append (GTK_BOX (column), page->cannot);
  gtk_box_append (GTK_BOX (column), buttons);
}

GtkWidget *kh_panels_page_new (KhSession *session)
{
  const char *const ends[] = { _ ("Butt, full ends"), _ ("Butt, flush ends"), NULL };
  Page *page = g_new0 (Page, 1);
  GtkWidget *column, *widget = kh_bench_page_new (&column), *boards = gtk_expander_new (_ ("Boards"));
  page->session = g_object_ref (session);
  g_object_set_data_full (G_OBJECT (widget), "kh-page", page, page_free);
  page->filling = TRUE;
  page->ends = gtk_drop_down_new_from_strings (ends);
  page->sum = kh_bench_note_new ("");
  page->buy = kh_bench_note_new ("");
  g_signal_connect_swapped (page->ends, "notify::selected", G_CALLBACK (ends_cb), page);
  GtkWidget *boards_box = kh_boards_box_new (session);
  gtk_widget_set_margin_top (boards_box, 6);
  gtk_expander_set_child (GTK_EXPANDER (boards), boards_box);
  gtk_box_append (GTK_BOX (column), kh_bench_row_new (_ ("Joint"), page->ends));
  gtk_box_append (GTK_BOX (column), kh_saw_box_new (session));
  gtk_box_append (GTK_BOX (column), boards);
  add_cut_list (column, page);
  gtk_box_append (GTK_BOX (column), kh_bench_heading_new (_ ("To buy")));
  gtk_box_append (GTK_BOX (column), page->sum);
  gtk_box_append (GTK_BOX (column), page->buy);
  gtk_box_append (GTK_BOX (column), kh_bench_heading_new (_ ("At the saw")));
  gtk_box_append (GTK_BOX (column),
                  kh_bench_note_new (_ ("Guard and riving knife fitted, push stick for short pieces, no loose sleeves, "
                                        "eyes, ears and lungs protected. Two people carry a sheet. "
                                        "Local rules, the makers’ manuals and trained people come before this list.")));
  kh_bench_follow (widget, session, "plan-changed", G_CALLBACK (show_joint));
  kh_bench_follow (widget, session, "review-changed", G_CALLBACK (show_panels));
  kh_bench_follow (widget, session, "selection-changed", G_CALLBACK (show_lit));
  show_joint (widget);
  show_panels (widget);
  show_lit (widget);
  return widget;
}
