/* SPDX-License-Identifier: MIT */
#include "app/cutlistview.h"
#include "app/bench.h"
#include "app/settings.h"
#include "app/tip.h"
#include <glib/gi18n-lib.h>

/* ---- one row ---- */

#define KH_TYPE_CUT_ITEM (kh_cut_item_get_type ())
G_DECLARE_FINAL_TYPE (KhCutItem, kh_cut_item, KH, CUT_ITEM, GObject)

struct _KhCutItem
{
  GObject parent_instance;
  int row, count;
  int64_t length_nm;
  char *labels;
};

G_DEFINE_FINAL_TYPE (KhCutItem, kh_cut_item, G_TYPE_OBJECT)

static void kh_cut_item_finalize (GObject *object)
{
  g_free (KH_CUT_ITEM (object)->labels);
  G_OBJECT_CLASS (kh_cut_item_parent_class)->finalize (object);
}

static void kh_cut_item_class_init (KhCutItemClass *klass) { G_OBJECT_CLASS (klass)->finalize = kh_cut_item_finalize; }

static void kh_cut_item_init (KhCutItem *item) {}

static KhCutItem *item_new (const KhCutList *list, int row)
{
  const KhCutRow *from = &g_array_index (list->rows, KhCutRow, row);
  KhCutItem *item = g_object_new (KH_TYPE_CUT_ITEM, NULL);
  GString *labels = g_string_new (NULL);
  for (guint i = 0; i < from->panels->len; i++)
    g_string_append_printf (labels, "%s%s", i > 0 ? ", " : "",
                            g_array_index (list->panels, KhPanel, g_array_index (from->panels, int, i)).label);
  item->row = row;
  item->count = from->count;
  item->length_nm = from->length_nm;
  item->labels = g_string_free (labels, FALSE);
  return item;
}

/* ---- columns ---- */

typedef enum
{
  COLUMN_LENGTH,
  COLUMN_COUNT,
  COLUMN_LABELS
} Column;

static void setup_cb (GtkSignalListItemFactory *factory, GtkListItem *cell, gpointer column)
{
  GtkWidget *label = gtk_label_new (NULL);
  gtk_label_set_xalign (GTK_LABEL (label), GPOINTER_TO_INT (column) == COLUMN_LABELS ? 0.0f : 1.0f);
  if (GPOINTER_TO_INT (column) == COLUMN_LABELS)
    gtk_label_set_ellipsize (GTK_LABEL (label), PANGO_ELLIPSIZE_END);
  else
    gtk_widget_add_css_class (label, "kh-heading");
  gtk_list_item_set_child (cell, label);
}

/* The row, which takes the focus, is told as a whole. */
static void name_row (GtkWidget *label, const KhCutItem *item)
{
  GtkWidget *cell = gtk_widget_get_parent (label), *row = cell ? gtk_widget_get_parent (cell) : NULL;
  g_autofree char *length = kh_length_dup_text (item->length_nm, kh_settings_get_unit (), TRUE);
  g_autofree char *name = g_strdup_printf ("%s × %d: %s", length, item->count, item->labels);
  if (row)
    gtk_accessible_update_property (GTK_ACCESSIBLE (row), GTK_ACCESSIBLE_PROPERTY_LABEL, name, -1);
}

static void bind_cb (GtkSignalListItemFactory *factory, GtkListItem *cell, gpointer column)
{
  const KhCutItem *item = gtk_list_item_get_item (cell);
  GtkWidget *label = gtk_list_item_get_child (cell);
  g_autofree char *text = GPOINTER_TO_INT (column) == COLUMN_LENGTH
                              ? kh_length_dup_text (item->length_nm, kh_settings_get_unit (), FALSE)
                          : GPOINTER_TO_INT (column) == COLUMN_COUNT ? g_strdup_printf ("%d", item->count)
                                                                     : g_strdup (item->labels);
  gtk_label_set_text (GTK_LABEL (label), text);
  name_row (label, item);
  kh_tip_set (label, GPOINTER_TO_INT (column) == COLUMN_LABELS ? item->labels : NULL);
}

static int compare_items (gconstpointer a, gconstpointer b, gpointer column)
{
  const KhCutItem *x = a, *y = b;
  switch (GPOINTER_TO_INT (column))
    {
    case COLUMN_LENGTH:
      return (x->length_nm > y->length_nm) - (x->length_nm < y->length_nm);
    case COLUMN_COUNT:
      return x->count - y->count;
    default:
      return g_strcmp0 (x->labels, y->labels);
    }
}

static void add_column (GtkColumnView *view, const char *title, Column which)
{
  GtkListItemFactory *factory = gtk_signal_list_item_factory_new ();
  g_signal_connect (factory, "setup", G_CALLBACK (setup_cb), GINT_TO_POINTER (which));
  g_signal_connect (factory, "bind", G_CALLBACK (bind_cb), GINT_TO_POINTER (which));
  GtkColumnViewColumn *column = gtk_column_view_column_new (title, factory);
  g_autoptr (GtkSorter) sorter = GTK_SORTER (gtk_custom_sorter_new (compare_items, GINT_TO_POINTER (which), NULL));
  gtk_column_view_column_set_sorter (column, sorter);
  gtk_column_view_column_set_expand (column, which == COLUMN_LABELS);
  gtk_column_view_append_column (view, column);
  g_object_unref (column);
}

/* ---- view ---- */

typedef struct
{
  KhSession *session;
  GListStore *items;
  GtkSingleSelection *selection;
  gboolean filling;
} View;

static void selected_cb (View *view)
{
  KhCutItem *item = gtk_single_selection_get_selected_item (view->selection);
  if (!view->filling)
    kh_session_set_lit_row (view->session, item ? item->row : -1);
}

/* A row lit from elsewhere is chosen here too. */
static void follow_lit (GtkWidget *widget)
{
  View *view = g_object_get_data (G_OBJECT (widget), "kh-view");
  int lit = kh_session_get_lit_row (view->session);
  guint found = GTK_INVALID_LIST_POSITION;
  for (guint i = 0; i < g_list_model_get_n_items (G_LIST_MODEL (view->selection)); i++)
    {
      g_autoptr (KhCutItem) item = g_list_model_get_item (G_LIST_MODEL (view->selection), i);
      if (item->row == lit)
        found = i;
    }
  view->filling = TRUE;
  gtk_single_selection_set_selected (view->selection, found);
  view->filling = FALSE;
}

static void fill (GtkWidget *widget)
{
  View *view = g_object_get_data (G_OBJECT (widget), "kh-view");
  const KhCutList *list = kh_session_get_review (view->session)->cut_list;
  g_autoptr (GPtrArray) fresh = g_ptr_array_new_with_free_func (g_object_unref);
  if (!list && kh_session_is_working (view->session))
    return; /* what is shown stays until the new one has been worked out */
  for (guint i = 0; list && i < list->rows->len; i++)
    g_ptr_array_add (fresh, item_new (list, (int)i));
  view->filling = TRUE;
  g_list_store_splice (view->items, 0, g_list_model_get_n_items (G_LIST_MODEL (view->items)), fresh->pdata, fresh->len);
  view->filling = FALSE;
  follow_lit (widget);
}

static void view_free (gpointer data)
{
  View *view = data;
  g_object_unref (view->session);
  g_object_unref (view->items);
  g_free (view);
}

GtkWidget *kh_cut_list_view_new (KhSession *session)
{
  View *view = g_new0 (View, 1);
  GtkWidget *table = gtk_column_view_new (NULL), *scrolled = gtk_scrolled_window_new ();
  view->session = g_object_ref (session);
  view->items = g_list_store_new (KH_TYPE_CUT_ITEM);
  add_column (GTK_COLUMN_VIEW (table), _ ("Length"), COLUMN_LENGTH);
  add_column (GTK_COLUMN_VIEW (table), _ ("Count"), COLUMN_COUNT);
  add_column (GTK_COLUMN_VIEW (table), _ ("Labels"), COLUMN_LABELS);
  GtkSortListModel *sorted = gtk_sort_list_model_new (
      G_LIST_MODEL (g_object_ref (view->items)), g_object_ref (gtk_column_view_get_sorter (GTK_COLUMN_VIEW (table))));
  view->selection = gtk_single_selection_new (G_LIST_MODEL (sorted));
  gtk_single_selection_set_autoselect (view->selection, FALSE);
  gtk_single_selection_set_can_unselect (view->selection, TRUE);
  gtk_column_view_set_model (GTK_COLUMN_VIEW (table), GTK_SELECTION_MODEL (view->selection));
  g_signal_connect_swapped (view->selection, "notify::selected-item", G_CALLBACK (selected_cb), view);
  g_object_unref (view->selection);
  gtk_accessible_update_property (GTK_ACCESSIBLE (table), GTK_ACCESSIBLE_PROPERTY_LABEL, _ ("Cut list"), -1);
  gtk_scrolled_window_set_policy (GTK_SCROLLED_WINDOW (scrolled), GTK_POLICY_NEVER, GTK_POLICY_AUTOMATIC);
  gtk_scrolled_window_set_min_content_height (GTK_SCROLLED_WINDOW (scrolled), 220);
  gtk_scrolled_window_set_max_content_height (GTK_SCROLLED_WINDOW (scrolled), 340);
  gtk_scrolled_window_set_propagate_natural_height (GTK_SCROLLED_WINDOW (scrolled), TRUE);
  gtk_scrolled_window_set_child (GTK_SCROLLED_WINDOW (scrolled), table);
  g_object_set_data_full (G_OBJECT (scrolled), "kh-view", view, view_free);
  kh_bench_follow (scrolled, session, "review-changed", G_CALLBACK (fill));
  kh_bench_follow (scrolled, session, "selection-changed", G_CALLBACK (follow_lit));
  fill (scrolled);
  return scrolled;
}
