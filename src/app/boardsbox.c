/* SPDX-License-Identifier: MIT */
#include "app/boardsbox.h"
#include "app/bench.h"
#include "app/settings.h"
#include <glib/gi18n-lib.h>
#include <math.h>
#include <string.h>

#define MOST_LENGTH_NM (100000 * KH_NM_PER_MM)

typedef enum
{
  FIELD_NAME,
  FIELD_LENGTH,
  FIELD_WIDTH,
  FIELD_THICKNESS,
  FIELD_COUNT,
  FIELD_PRICE,
  FIELD_KERF,
  FIELD_TRIM,
  FIELD_KEEP,
  FIELD_LONGEST
} FieldKind;

/* One number of the build; 'index' is the board's. */
typedef struct
{
  KhSession *session;
  FieldKind kind;
  guint index;
} Field;

static int64_t *length_at (KhBuild *build, const Field *field)
{
  KhStock *stock = field->kind <= FIELD_PRICE ? &g_array_index (build->stock, KhStock, field->index) : NULL;
  switch (field->kind)
    {
    case FIELD_LENGTH:
      return &stock->length_nm;
    case FIELD_WIDTH:
      return &stock->width_nm;
    case FIELD_THICKNESS:
      return &stock->thickness_nm;
    case FIELD_KERF:
      return &build->saw.kerf_nm;
    case FIELD_TRIM:
      return &build->saw.end_trim_nm;
    case FIELD_KEEP:
      return &build->saw.keep_offcut_nm;
    case FIELD_LONGEST:
      return &build->longest_panel_nm;
    default:
      return NULL;
    }
}

static char *dup_field (gpointer data)
{
  const Field *field = data;
  KhBuild *build = (KhBuild *)&kh_session_get_plan (field->session)->build; /* only looked at */
  if (field->kind <= FIELD_PRICE && field->index >= build->stock->len)
    return g_strdup ("");
  const KhStock *stock = field->kind <= FIELD_PRICE ? &g_array_index (build->stock, KhStock, field->index) : NULL;
  switch (field->kind)
    {
    case FIELD_NAME:
      return g_strdup (stock->name);
    case FIELD_COUNT:
      return stock->count == KH_COUNT_ANY ? g_strdup (_ ("any")) : g_strdup_printf ("%d", stock->count);
    case FIELD_PRICE:
      return stock->price_milli == KH_PRICE_NONE ? g_strdup (_ ("none"))
                                                 : g_strdup_printf ("%.2f", (double)stock->price_milli / 1000);
    case FIELD_THICKNESS:
      if (stock->thickness_nm == KH_LENGTH_OPEN_NM)
        return g_strdup (_ ("as the walls"));
      break;
    default:
      break;
    }
  return kh_length_dup_text (*length_at (build, field), kh_settings_get_unit (), TRUE);
}

static gboolean is_left_open (const char *text, const char *words)
{
  return *text == '\0' || strcmp (text, words) == 0;
}

static gboolean read_number (const char *text, double most, double *value, char **fault)
{
  char *end;
  g_autofree char *plain = g_strdelimit (g_strdup (text), ",", '.');
  *value = g_ascii_strtod (plain, &end);
  if (end != plain && *end == '\0' && *value >= 0 && *value <= most)
    return TRUE;
  *fault = g_strdup_printf (_ ("“%s” is not a number from 0 to %g."), text, most);
  return FALSE;
}

static gboolean read_length (const Field *field, const char *text, int64_t *nm, char **fault)
{
  g_autoptr (GError) error = NULL;
  gboolean may_be_none = field->kind == FIELD_KERF || field->kind == FIELD_TRIM || field->kind == FIELD_KEEP;
  if (field->kind == FIELD_THICKNESS && is_left_open (text, _ ("as the walls")))
    {
      *nm = KH_LENGTH_OPEN_NM;
      return TRUE;
    }
  if (!kh_length_parse (text, kh_settings_get_unit (), nm, &error))
    {
      *fault = g_strdup (error->message);
      return FALSE;
    }
  if (*nm < (may_be_none ? 0 : KH_NM_PER_MM) || *nm > MOST_LENGTH_NM
      || (field->kind == FIELD_KERF && *nm > 100 * KH_NM_PER_MM))
    {
      *fault = g_strdup (field->kind == FIELD_KERF ? _ ("A kerf can be from 0 to 100 mm.")
                         : may_be_none             ? _ ("Give a length from 0 to 100 m.")
                                                   : _ ("Give a length from 1 mm to 100 m."));
      return FALSE;
    }
  return TRUE;
}

/* Puts the text into a copy of the build; FALSE with the fault. */
static gboolean put_text (KhBuild *build, const Field *field, const char *text, char **fault)
{
  KhStock *stock = field->kind <= FIELD_PRICE ? &g_array_index (build->stock, KhStock, field->index) : NULL;
  double number;
  switch (field->kind)
    {
    case FIELD_NAME:
      if (g_utf8_strlen (text, -1) > 200)
        {
          *fault = g_strdup (_ ("A name has at most 200 characters."));
          return FALSE;
        }
      g_free (stock->name);
      stock->name = g_strdup (text);
      return TRUE;
    case FIELD_COUNT:
      if (is_left_open (text, _ ("any")))
        {
          stock->count = KH_COUNT_ANY;
          return TRUE;
        }
      if (!read_number (text, 100000, &number, fault))
        return FALSE;
      if (number != floor (number))
        {
          *fault = g_strdup (_ ("Give a whole number, or leave it empty for any."));
          return FALSE;
        }
      stock->count = (int)number;
      return TRUE;
    case FIELD_PRICE:
      if (is_left_open (text, _ ("none")))
        {
          stock->price_milli = KH_PRICE_NONE;
          return TRUE;
        }
      if (!read_number (text, 1000000, &number, fault))
        return FALSE;
      stock->price_milli = (int64_t)llround (number * 1000);
      return TRUE;
    default:
      return read_length (field, text, length_at (build, field), fault);
    }
}

static gboolean try_field (gpointer data, const char *text, char **fault)
{
  const Field *field = data;
  KhBuild build;
  if (field->kind <= FIELD_PRICE && field->index >= kh_session_get_plan (field->session)->build.stock->len)
    return TRUE; /* its board has just gone */
  kh_build_copy (&build, &kh_session_get_plan (field->session)->build);
  gboolean good = put_text (&build, field, text, fault);
  if (good)
    kh_session_do_take (field->session, kh_change_new_build (&build),
                        field->kind <= FIELD_PRICE ? _ ("Board changed") : _ ("Saw changed"));
  kh_build_clear (&build);
  return good;
}

static GtkWidget *field_new (KhSession *session, FieldKind kind, guint index)
{
  Field *field = g_new (Field, 1);
  *field = (Field){ session, kind, index };
  return kh_bench_entry_new (try_field, dup_field, field, g_free);
}

GtkWidget *kh_saw_box_new (KhSession *session)
{
  GtkWidget *box = gtk_box_new (GTK_ORIENTATION_VERTICAL, 6);
  gtk_box_append (GTK_BOX (box), kh_bench_row_new (_ ("Longest panel"), field_new (session, FIELD_LONGEST, 0)));
  gtk_box_append (GTK_BOX (box), kh_bench_row_new (_ ("Kerf"), field_new (session, FIELD_KERF, 0)));
  gtk_box_append (GTK_BOX (box), kh_bench_row_new (_ ("End trim"), field_new (session, FIELD_TRIM, 0)));
  gtk_box_append (GTK_BOX (box), kh_bench_row_new (_ ("Keep offcuts from"), field_new (session, FIELD_KEEP, 0)));
  return box;
}

/* ---- boards ---- */

typedef struct
{
  KhSession *session;
  GtkWidget *list;
  guint n_shown;
  guint forms; /* a bit a board: what is shown must be built anew when it changes */
} Boards;

static void edit_stock (KhSession *session, int remove, const KhStock *add, const char *words)
{
  KhBuild build;
  kh_build_copy (&build, &kh_session_get_plan (session)->build);
  if (remove >= 0)
    g_array_remove_index (build.stock, (guint)remove);
  if (add)
    {
      KhStock stock = *add;
      stock.name = g_strdup (add->name);
      g_array_append_val (build.stock, stock);
    }
  kh_session_do_take (session, kh_change_new_build (&build), words);
  kh_build_clear (&build);
}

static void remove_cb (GtkButton *button, Boards *boards)
{
  edit_stock (boards->session, GPOINTER_TO_INT (g_object_get_data (G_OBJECT (button), "kh-index")), NULL,
              _ ("Board removed"));
}

static void add_strip_cb (Boards *boards)
{
  const KhStock strip = { .name = (char *)"",
                          .form = KH_STOCK_STRIP,
                          .length_nm = 2440 * KH_NM_PER_MM,
                          .thickness_nm = KH_LENGTH_OPEN_NM,
                          .count = KH_COUNT_ANY,
                          .price_milli = KH_PRICE_NONE };
  edit_stock (boards->session, -1, &strip, _ ("Strip added"));
}

static void add_sheet_cb (Boards *boards)
{
  const KhStock sheet = { .name = (char *)"",
                          .form = KH_STOCK_SHEET,
                          .length_nm = 2440 * KH_NM_PER_MM,
                          .width_nm = 1220 * KH_NM_PER_MM,
                          .thickness_nm = KH_LENGTH_OPEN_NM,
                          .count = KH_COUNT_ANY,
                          .price_milli = KH_PRICE_NONE };
  edit_stock (boards->session, -1, &sheet, _ ("Sheet added"));
}

static void form_cb (GtkDropDown *choice, GParamSpec *spec, Boards *boards)
{
  KhBuild build;
  guint index = GPOINTER_TO_UINT (g_object_get_data (G_OBJECT (choice), "kh-index"));
  kh_build_copy (&build, &kh_session_get_plan (boards->session)->build);
  if (index < build.stock->len)
    {
      KhStock *stock = &g_array_index (build.stock, KhStock, index);
      stock->form = gtk_drop_down_get_selected (choice) == 0 ? KH_STOCK_STRIP : KH_STOCK_SHEET;
      stock->width_nm = stock->form == KH_STOCK_STRIP ? 0 : 1220 * KH_NM_PER_MM;
      kh_session_do_take (boards->session, kh_change_new_build (&build), _ ("Board changed"));
    }
  kh_build_clear (&build);
}

static GtkWidget *form_new (Boards *boards, const KhStock *stock, guint index)
{
  const char *const forms[] = { _ ("Strip"), _ ("Sheet, ripped into strips"), NULL };
  GtkWidget *choice = gtk_drop_down_new_from_strings (forms);
  gtk_drop_down_set_selected (GTK_DROP_DOWN (choice), stock->form == KH_STOCK_SHEET ? 1 : 0);
  g_object_set_data (G_OBJECT (choice), "kh-index", GUINT_TO_POINTER (index));
  g_signal_connect (choice, "notify::selected", G_CALLBACK (form_cb), boards);
  return choice;
}

static GtkWidget *board_new (Boards *boards, const KhStock *stock, guint index)
{
  KhSession *session = boards->session;
  GtkWidget *card = gtk_box_new (GTK_ORIENTATION_VERTICAL, 4),
            *remove = gtk_button_new_with_label (_ ("Remove this board"));
  gtk_widget_add_css_class (card, "kh-card");
  gtk_box_append (GTK_BOX (card), kh_bench_row_new (_ ("Name"), field_new (session, FIELD_NAME, index)));
  gtk_box_append (GTK_BOX (card), kh_bench_row_new (_ ("Form"), form_new (boards, stock, index)));
  gtk_box_append (GTK_BOX (card), kh_bench_row_new (_ ("Length"), field_new (session, FIELD_LENGTH, index)));
  if (stock->form == KH_STOCK_SHEET)
    gtk_box_append (GTK_BOX (card), kh_bench_row_new (_ ("Width"), field_new (session, FIELD_WIDTH, index)));
  gtk_box_append (GTK_BOX (card),
                  kh_bench_row_new (_ ("Thickness, measured"), field_new (session, FIELD_THICKNESS, index)));
  gtk_box_append (GTK_BOX (card), kh_bench_row_new (_ ("Pieces to hand"), field_new (session, FIELD_COUNT, index)));
  gtk_box_append (GTK_BOX (card), kh_bench_row_new (_ ("Price"), field_new (session, FIELD_PRICE, index)));
  gtk_widget_set_halign (remove, GTK_ALIGN_END);
  g_object_set_data (G_OBJECT (remove), "kh-index", GINT_TO_POINTER ((int)index));
  g_signal_connect (remove, "clicked", G_CALLBACK (remove_cb), boards);
  gtk_box_append (GTK_BOX (card), remove);
  return card;
}

static void fill (GtkWidget *widget)
{
  Boards *boards = g_object_get_data (G_OBJECT (widget), "kh-boards");
  const GArray *stock = kh_session_get_plan (boards->session)->build.stock;
  guint forms = 0;
  GtkWidget *child;
  for (guint i = 0; i < stock->len; i++)
    forms = forms * 31 + (guint)g_array_index (stock, KhStock, i).form + 1;
  if (forms == boards->forms && stock->len == boards->n_shown)
    {
      kh_bench_refresh_below (boards->list);
      return;
    }
  boards->forms = forms;
  boards->n_shown = stock->len;
  kh_bench_forget_typed_below (boards->list);
  while ((child = gtk_widget_get_first_child (boards->list)) != NULL)
    gtk_box_remove (GTK_BOX (boards->list), child);
  for (guint i = 0; i < stock->len; i++)
    gtk_box_append (GTK_BOX (boards->list), board_new (boards, &g_array_index (stock, KhStock, i), i));
}

GtkWidget *kh_boards_box_new (KhSession *session)
{
  Boards *boards = g_new0 (Boards, 1);
  GtkWidget *box = gtk_box_new (GTK_ORIENTATION_VERTICAL, 6), *buttons = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 6);
  GtkWidget *strip = gtk_button_new_with_label (_ ("Add a strip")),
            *sheet = gtk_button_new_with_label (_ ("Add a sheet"));
  boards->session = session;
  boards->n_shown = G_MAXUINT;
  boards->list = gtk_box_new (GTK_ORIENTATION_VERTICAL, 6);
  g_object_set_data_full (G_OBJECT (box), "kh-boards", boards, g_free);
  g_signal_connect_swapped (strip, "clicked", G_CALLBACK (add_strip_cb), boards);
  g_signal_connect_swapped (sheet, "clicked", G_CALLBACK (add_sheet_cb), boards);
  gtk_box_append (GTK_BOX (buttons), strip);
  gtk_box_append (GTK_BOX (buttons), sheet);
  gtk_box_append (GTK_BOX (box), boards->list);
  gtk_box_append (GTK_BOX (box), buttons);
  kh_bench_follow_later (box, session, "plan-changed", G_CALLBACK (fill),
                         1); /* a card is not taken away by its own choice */
  fill (box);
  return box;
}
