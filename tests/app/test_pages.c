/* SPDX-License-Identifier: MIT */
#include "driver.h"

#include "files/examples.h"
#include "files/planfile.h"

/* The bench with the real window and real keys: what is typed is taken over, said to be wrong or kept, never lost; one
 * number is one step; cards, cut list and saw plan follow one another. */

static KhApplication *app;

static KhSession *session_of (void) { return kh_window_get_session (kt_window (app)); }
static const KhPlan *plan_of (void) { return kh_session_get_plan (session_of ()); }
static gsize n_steps (void) { return kh_history_get_n_undo (kh_session_get_history (session_of ())); }

static int start_app (void **state)
{
  app = kt_start ();
  return 0;
}

static int stop_app (void **state)
{
  kt_stop (app);
  return 0;
}

static gboolean is_done (gpointer data) { return !kh_session_is_working (session_of ()); }

static int start_plan (void **state)
{
  g_autofree char *text = kh_example_dup_text ("boat-house");
  GPtrArray *faults = NULL;
  KhPlan *plan = kh_plan_file_parse (text, strlen (text), "boat-house", &faults);
  assert_non_null (plan);
  kh_window_set_session_take (kt_window (app), kh_session_new_take (plan));
  assert_true (kt_wait (is_done, NULL, 8000));
  kt_settle (100);
  return 0;
}

static void show (const char *page)
{
  g_action_group_change_action_state (G_ACTION_GROUP (kt_window (app)), "bench", g_variant_new_string (page));
  kt_settle (150);
}

/* ---- finding what a person sees ---- */

static GtkWidget *find_label (GtkWidget *from, const char *text)
{
  if (GTK_IS_LABEL (from) && strcmp (gtk_label_get_text (GTK_LABEL (from)), text) == 0 && gtk_widget_get_mapped (from))
    return from;
  GtkWidget *found = NULL;
  for (GtkWidget *child = gtk_widget_get_first_child (from); child && !found;
       child = gtk_widget_get_next_sibling (child))
    found = find_label (child, text);
  return found;
}

static GtkWidget *find_type (GtkWidget *from, GType type)
{
  if (G_TYPE_CHECK_INSTANCE_TYPE (from, type) && gtk_widget_get_mapped (from))
    return from;
  GtkWidget *found = NULL;
  for (GtkWidget *child = gtk_widget_get_first_child (from); child && !found;
       child = gtk_widget_get_next_sibling (child))
    found = find_type (child, type);
  return found;
}

static GtkWidget *window (void) { return GTK_WIDGET (kt_window (app)); }

/* The entry in the row with this label. */
static GtkWidget *entry_at (const char *label)
{
  GtkWidget *found = find_label (window (), label);
  if (!found)
    fail_msg ("no label “%s” is shown", label);
  GtkWidget *entry = find_type (gtk_widget_get_parent (found), GTK_TYPE_ENTRY);
  assert_non_null (entry);
  return entry;
}

static void type_in (GtkWidget *entry, const char *text)
{
  gtk_widget_grab_focus (entry);
  kt_settle (60);
  GString *keys = g_string_new ("key --delay 5 ctrl+a"); /* one call for all: a process a key is slow */
  for (const char *c = text; *c; c++)
    if (*c == ' ')
      g_string_append (keys, " space");
    else if (*c == '-' || *c == '/')
      g_string_append (keys, *c == '-' ? " minus" : " slash");
    else
      g_string_append_printf (keys, " %c", *c);
  kt_x (keys->str);
  g_string_free (keys, TRUE);
}

static const char *text_of (GtkWidget *entry) { return gtk_editable_get_text (GTK_EDITABLE (entry)); }

static void press (GtkWidget *button)
{
  g_signal_emit_by_name (button, "clicked");
  kt_settle (60);
}

/* ---- numbers ---- */

static void test_number (void **state)
{
  show ("maze");
  GtkWidget *pitch = entry_at ("Pitch");
  type_in (pitch, "20 cm");
  kt_keys ("Return");
  assert_int_equal (plan_of ()->lattice.pitch_nm, 200 * KH_NM_PER_MM);
  assert_string_equal (text_of (pitch), "200 mm");
  assert_int_equal (n_steps (), 1);
  /* 7 1/16 in = 179.3875 mm: 1 in = 25.4 mm exactly (international yard and pound agreement, 1959) */
  type_in (pitch, "7 1/16 in");
  kt_keys ("Return");
  assert_int_equal (plan_of ()->lattice.pitch_nm, 179387500);
  /* what cannot be read is said in place; nothing changes */
  type_in (pitch, "wide");
  kt_keys ("Return");
  assert_int_equal (plan_of ()->lattice.pitch_nm, 179387500);
  assert_int_equal (n_steps (), 2);
  assert_string_equal (text_of (pitch), "wide");
  assert_true (gtk_widget_has_css_class (pitch, "error"));
  assert_true (gtk_widget_get_mapped (gtk_widget_get_next_sibling (pitch)));
  kt_picture ("fault");
  kt_keys ("Escape");
  assert_false (gtk_widget_has_css_class (pitch, "error"));
  type_in (pitch, "1");
  kt_keys ("Return");
  assert_true (gtk_widget_has_css_class (pitch, "error")); /* out of range */
  assert_int_equal (plan_of ()->lattice.pitch_nm, 179387500);
  kt_keys ("Escape");
}

/* The field still has the focus while its number is undone: leaving it brings nothing back. */
static void test_undo_under_the_focus (void **state)
{
  show ("maze");
  GtkWidget *pitch = entry_at ("Pitch");
  type_in (pitch, "200");
  kt_keys ("Return");
  assert_int_equal (plan_of ()->lattice.pitch_nm, 200 * KH_NM_PER_MM);
  kh_session_undo (session_of ());
  kt_settle (100);
  assert_string_equal (text_of (pitch), "180 mm");
  kt_keys ("Tab");
  assert_int_equal (plan_of ()->lattice.pitch_nm, 180 * KH_NM_PER_MM);
  assert_int_equal (n_steps (), 0);
}

/* ---- typed and not yet taken over ---- */

static gboolean is_saved (gpointer data) { return kh_session_is_saved (session_of ()); }

static void save_first (const char *name)
{
  g_autofree char *path = g_build_filename (g_getenv ("TEST_FOLDER"), name, NULL);
  assert_true (kh_session_save (session_of (), path, TRUE, NULL));
}

static void test_typed_is_saved (void **state)
{
  save_first ("typed.mazeplan");
  show ("maze");
  type_in (entry_at ("Title"), "quick brown");
  kt_keys ("ctrl+s");
  assert_true (kt_wait (is_saved, NULL, 3000));
  assert_string_equal (plan_of ()->title, "quick brown");
  GtkWidget *notes = find_type (window (), GTK_TYPE_TEXT_VIEW);
  assert_non_null (notes);
  type_in (notes, "from the shed");
  kt_keys ("ctrl+s");
  kt_settle (200);
  assert_string_equal (plan_of ()->notes, "from the shed");
  g_autofree char *text = NULL;
  assert_true (g_file_get_contents (kh_session_get_path (session_of ()), &text, NULL, NULL));
  assert_non_null (strstr (text, "quick brown"));
  assert_non_null (strstr (text, "from the shed"));
}

static void test_typed_is_asked_about (void **state)
{
  save_first ("closed.mazeplan");
  show ("maze");
  type_in (entry_at ("Title"), "not yet");
  assert_true (kh_session_is_saved (session_of ()));
  gtk_window_close (GTK_WINDOW (window ()));
  kt_settle (300);
  assert_non_null (kt_window (app)); /* it asks instead of going */
  assert_string_equal (plan_of ()->title, "not yet");
  assert_false (kh_session_is_saved (session_of ()));
  kt_picture ("asks");
  kt_keys ("Escape");
  kt_settle (200);
  kt_focus_window ("Kerfhand");
}

static void test_notes_too_long (void **state)
{
  show ("maze");
  g_autofree char *was = g_strdup (plan_of ()->notes);
  GtkWidget *notes = find_type (window (), GTK_TYPE_TEXT_VIEW);
  g_autofree char *much = g_strnfill (20001, 'n');
  for (int i = 40; i < 20000; i += 40)
    much[i] = '\n';
  gtk_widget_grab_focus (notes);
  gtk_text_buffer_set_text (gtk_text_view_get_buffer (GTK_TEXT_VIEW (notes)), much, -1);
  gtk_widget_grab_focus (entry_at ("Title"));
  kt_settle (100);
  assert_string_equal (plan_of ()->notes, was);
  assert_non_null (find_label (window (), "The notes are 1 character too long and were not taken over. Shorten them."));
  /* another edit leaves them standing */
  type_in (entry_at ("Title"), "other");
  kt_keys ("Return");
  assert_int_equal (gtk_text_buffer_get_char_count (gtk_text_view_get_buffer (GTK_TEXT_VIEW (notes))), 20001);
  gtk_widget_grab_focus (notes);
  kt_keys ("ctrl+End BackSpace");
  gtk_widget_grab_focus (entry_at ("Title"));
  kt_settle (100);
  assert_int_equal (strlen (plan_of ()->notes), 20000);
  assert_null (find_label (window (), "The notes are 1 character too long and were not taken over. Shorten them."));
}

/* ---- robot ---- */

static void open_fold (const char *title)
{
  GtkWidget *label = find_label (window (), title);
  assert_non_null (label);
  gtk_expander_set_expanded (GTK_EXPANDER (gtk_widget_get_ancestor (label, GTK_TYPE_EXPANDER)), TRUE);
  kt_settle (150);
}

/* The header's button says the same word: the one on the page. */
static GtkWidget *preview_label (void)
{
  GtkWidget *page = gtk_widget_get_ancestor (find_label (window (), "Keeps on the wall"), GTK_TYPE_SCROLLED_WINDOW);
  return find_label (page, "Preview");
}

static void test_robot (void **state)
{
  show ("robot");
  open_fold ("Control");
  GtkWidget *trim = find_type (find_label (window (), "Learn the difference between the wheels"), GTK_TYPE_LABEL);
  trim = gtk_widget_get_ancestor (trim, GTK_TYPE_CHECK_BUTTON);
  gboolean was = plan_of ()->robot.control.trim;
  assert_int_equal (gtk_check_button_get_active (GTK_CHECK_BUTTON (trim)), was);
  gtk_check_button_set_active (GTK_CHECK_BUTTON (trim), !was);
  assert_int_equal (plan_of ()->robot.control.trim, !was);
  kh_session_undo (session_of ());
  kt_settle (60);
  assert_int_equal (plan_of ()->robot.control.trim, was);
  assert_int_equal (gtk_check_button_get_active (GTK_CHECK_BUTTON (trim)), was); /* shows what is so */

  /* the seed is there once errors are drawn */
  assert_null (find_label (window (), "Seed"));
  GtkWidget *errors = find_type (gtk_widget_get_parent (preview_label ()), GTK_TYPE_DROP_DOWN);
  gtk_drop_down_set_selected (GTK_DROP_DOWN (errors), 1);
  kt_settle (100);
  assert_false (kh_session_get_exact (session_of ()));
  type_in (entry_at ("Seed"), "12");
  kt_keys ("Return");
  assert_int_equal (kh_session_get_seed (session_of ()), 12);
  press (gtk_widget_get_ancestor (find_label (window (), "Draw others"), GTK_TYPE_BUTTON));
  assert_int_equal (kh_session_get_seed (session_of ()), 13);
  assert_true (kt_wait (is_done, NULL, 8000));
  assert_int_equal (kh_session_get_trace (session_of ())->seed, 13);
  kt_picture ("seed");
  type_in (entry_at ("Seed"), "-1");
  kt_keys ("Return");
  assert_int_equal (kh_session_get_seed (session_of ()), 13);
  assert_true (gtk_widget_has_css_class (entry_at ("Seed"), "error"));
}

/* ---- findings, cut list, saw plan ---- */

static void test_cards (void **state)
{
  show ("findings");
  kh_canvas_grab_cursor (KH_CANVAS (kh_window_get_canvas (kt_window (app))));
  kh_session_set_chosen_finding (session_of (), -1);
  GtkWidget *show_button = find_label (window (), "Show");
  assert_non_null (show_button);
  GtkWidget *card = gtk_widget_get_ancestor (show_button, g_type_from_name ("KhCard"));
  assert_non_null (card);
  assert_true (gtk_widget_grab_focus (card));
  kt_settle (60);
  assert_true (gtk_widget_is_focus (card)); /* the card, not a button in it */
  assert_int_equal (kh_session_get_chosen_finding (session_of ()), 0);
  assert_true (gtk_widget_has_css_class (card, "kh-chosen"));
  kt_keys ("Tab");
  assert_true (gtk_widget_is_focus (gtk_widget_get_ancestor (show_button, GTK_TYPE_BUTTON)));
  gtk_widget_grab_focus (card);
  kt_keys ("Return");
  kt_picture ("card");
  assert_int_equal (kh_session_get_chosen_finding (session_of ()), 0);
}

static void test_set_aside (void **state)
{
  show ("findings");
  int n = kh_session_get_review (session_of ())->n_set_aside;
  GtkWidget *button = gtk_widget_get_ancestor (find_label (window (), "Set aside…"), GTK_TYPE_MENU_BUTTON);
  gtk_menu_button_popup (GTK_MENU_BUTTON (button));
  kt_settle (300);
  kt_keys ("m e a n t Return");
  kt_settle (300);
  assert_int_equal (kh_session_get_review (session_of ())->n_set_aside, n + 1);
  assert_string_equal (g_array_index (plan_of ()->set_aside, KhSetAside, 0).reason, "meant");
  GtkWidget *back = gtk_widget_get_ancestor (find_label (window (), "Bring back"), GTK_TYPE_BUTTON);
  press (back);
  kt_settle (600);
  assert_int_equal (kh_session_get_review (session_of ())->n_set_aside, n);
  kh_session_undo (session_of ());
  assert_int_equal (kh_session_get_review (session_of ())->n_set_aside, n + 1);
}

static void test_cut_list (void **state)
{
  show ("panels");
  GtkWidget *table = find_type (window (), GTK_TYPE_COLUMN_VIEW);
  GtkSingleSelection *selection = GTK_SINGLE_SELECTION (gtk_column_view_get_model (GTK_COLUMN_VIEW (table)));
  assert_int_equal (kh_session_get_lit_row (session_of ()), -1);
  gtk_single_selection_set_selected (selection, 2);
  assert_int_equal (kh_session_get_lit_row (session_of ()), 2);
  kh_session_set_lit_row (session_of (), 4);
  assert_int_equal (gtk_single_selection_get_selected (selection), 4);
  kt_picture ("lit");
  kh_session_set_lit_row (session_of (), -1);
  assert_int_equal (gtk_single_selection_get_selected (selection), GTK_INVALID_LIST_POSITION);
}

/* A board goes while a field of it is being typed in: nothing of it lands on another. */
static void test_boards (void **state)
{
  show ("panels");
  open_fold ("Boards");
  guint n = plan_of ()->build.stock->len;
  press (gtk_widget_get_ancestor (find_label (window (), "Add a strip"), GTK_TYPE_BUTTON));
  kt_settle (100);
  assert_int_equal (plan_of ()->build.stock->len, n + 1);
  assert_int_equal (n_steps (), 1);
  g_autofree char *first = g_strdup (g_array_index (plan_of ()->build.stock, KhStock, 0).name);
  type_in (entry_at ("Name"), "oak"); /* the first board's; not taken over yet */
  kh_session_undo (session_of ());
  kt_settle (150);
  assert_int_equal (plan_of ()->build.stock->len, n);
  assert_string_equal (g_array_index (plan_of ()->build.stock, KhStock, 0).name, first);
  assert_int_equal (n_steps (), 0);
  /* its form: a sheet gets a width */
  GtkWidget *form = find_type (gtk_widget_get_parent (find_label (window (), "Form")), GTK_TYPE_DROP_DOWN);
  KhStockForm was = g_array_index (plan_of ()->build.stock, KhStock, 0).form;
  gtk_widget_grab_focus (form);
  kt_keys ("space");
  kt_settle (250);
  kt_keys (was == KH_STOCK_SHEET ? "Up Return" : "Down Return"); /* the list that is open goes with its card */
  kt_settle (250);
  assert_int_not_equal (g_array_index (plan_of ()->build.stock, KhStock, 0).form, was);
  assert_int_equal (n_steps (), 1);
  kt_picture ("boards");
  kh_session_undo (session_of ());
  kt_settle (150);
  assert_int_equal (g_array_index (plan_of ()->build.stock, KhStock, 0).form, was);
}

static void test_strip_keys (void **state)
{
  show ("findings");
  GtkWidget *hand = find_label (window (), "Left hand"), *area = NULL;
  for (GtkWidget *up = hand; up && !area; up = gtk_widget_get_parent (up))
    area = find_type (up, GTK_TYPE_DRAWING_AREA);
  assert_non_null (area);
  gsize last = kh_trace_get_n_ticks (kh_session_get_trace (session_of ())) - 1;
  assert_int_equal (kh_session_get_played_tick (session_of ()), last);
  gtk_widget_grab_focus (area);
  kt_keys ("Home");
  assert_int_equal (kh_session_get_played_tick (session_of ()), 0);
  kt_keys ("Right");
  gsize small = kh_session_get_played_tick (session_of ());
  assert_true (small > 0);
  kt_keys ("shift+Right");
  assert_true (kh_session_get_played_tick (session_of ()) > 2 * small);
  kt_keys ("shift+Left Left");
  assert_int_equal (kh_session_get_played_tick (session_of ()), 0);
  kt_keys ("Page_Down");
  gsize change = kh_session_get_played_tick (session_of ());
  const KhTrace *trace = kh_session_get_trace (session_of ());
  assert_true (change > 0 && change < last);
  /* the pose at a change is still the old state's last */
  assert_int_not_equal (kh_trace_get_tick (trace, change)->state, kh_trace_get_tick (trace, change + 1)->state);
  kt_keys ("End");
  assert_int_equal (kh_session_get_played_tick (session_of ()), last);
}

int main (void)
{
#define WITH_PLAN(test) cmocka_unit_test_setup (test, start_plan)
  const struct CMUnitTest tests[] = {
    WITH_PLAN (test_number),         WITH_PLAN (test_undo_under_the_focus),
    WITH_PLAN (test_typed_is_saved), WITH_PLAN (test_typed_is_asked_about),
    WITH_PLAN (test_notes_too_long), WITH_PLAN (test_robot),
    WITH_PLAN (test_cards),          WITH_PLAN (test_set_aside),
    WITH_PLAN (test_cut_list),       WITH_PLAN (test_boards),
    WITH_PLAN (test_strip_keys),
  };
  return cmocka_run_group_tests (tests, start_app, stop_app);
}
