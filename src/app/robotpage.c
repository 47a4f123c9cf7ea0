/* SPDX-License-Identifier: MIT */
#include "app/robotpage.h"
#include "app/bench.h"
#include "app/robotwords.h"
#include "app/settings.h"
#include <glib/gi18n-lib.h>
#include <math.h>
#include <string.h>

typedef struct
{
  KhSession *session;
  GtkWidget *hand, *shape, *exact, *draw, *trim, *outcome;
  gboolean filling; /* the page shows what is so; nobody chose anything */
} Page;

/* One number of the robot in an entry. */
typedef struct
{
  KhSession *session;
  const KhRobotMember *member;
} Number;

static gboolean is_length (const KhRobotMember *member) { return g_str_has_suffix (member->name, "_mm"); }

static double value_of (const KhRobot *robot, const KhRobotMember *member)
{
  const char *at = (const char *)robot + member->offset;
  return member->kind == KH_MEMBER_INT ? *(const int *)(const void *)at : *(const double *)(const void *)at;
}

static char *dup_number (gpointer data)
{
  const Number *number = data;
  double value = value_of (&kh_session_get_plan (number->session)->robot, number->member);
  if (isnan (value))
    return g_strdup (_ ("by pitch"));
  if (is_length (number->member))
    return kh_length_dup_text (kh_nm_from_mm (value), kh_settings_get_unit (), TRUE);
  return g_strdup_printf ("%.6g", value);
}

static gboolean read_value (const Number *number, const char *text, double *value, char **fault)
{
  g_autoptr (GError) error = NULL;
  int64_t nm;
  char *end;
  if (number->member->kind == KH_MEMBER_DOUBLE_OPEN && (*text == '\0' || strcmp (text, _ ("by pitch")) == 0))
    {
      *value = (double)NAN;
      return TRUE;
    }
  if (is_length (number->member))
    {
      if (!kh_length_parse (text, kh_settings_get_unit (), &nm, &error))
        {
          *fault = g_strdup (error->message);
          return FALSE;
        }
      *value = kh_mm_from_nm (nm);
    }
  else
    {
      g_autofree char *plain = g_strdelimit (g_strdup (text), ",", '.');
      *value = g_ascii_strtod (plain, &end);
      if (end == plain || *end != '\0')
        {
          *fault = g_strdup_printf (_ ("“%s” is not a number"), text);
          return FALSE;
        }
    }
  if (*value >= number->member->least && *value <= number->member->most
      && (number->member->kind != KH_MEMBER_INT || *value == floor (*value)))
    return TRUE;
  *fault = g_strdup_printf (_ ("Give a number from %g to %g."), number->member->least, number->member->most);
  return FALSE;
}

static gboolean try_number (gpointer data, const char *text, char **fault)
{
  const Number *number = data;
  KhRobot robot;
  g_autoptr (GError) error = NULL;
  double value;
  if (!read_value (number, text, &value, fault))
    return FALSE;
  kh_robot_copy (&robot, &kh_session_get_plan (number->session)->robot);
  char *at = (char *)&robot + number->member->offset;
  if (number->member->kind == KH_MEMBER_INT)
    *(int *)(void *)at = (int)value;
  else
    *(double *)(void *)at = value;
  gboolean good = kh_robot_check (&robot, &error);
  if (good)
    {
      g_autofree char *words = g_strdup_printf (_ ("Robot: %s"), kh_robot_words_get (number->member));
      kh_session_do_take (number->session, kh_change_new_robot (&robot), words);
    }
  else
    *fault = g_strdup (error->message);
  kh_robot_clear (&robot);
  return good;
}

/* ---- ranges of the sensors ---- */

typedef struct
{
  KhSession *session;
  gboolean side; /* else the front sensor */
  int end;       /* 0 least, 1 most */
} Range;

static double *range_of (KhRobot *robot, const Range *range)
{
  return range->side ? robot->side_sensors.range_mm : robot->front_sensor.range_mm;
}

static char *dup_range (gpointer data)
{
  const Range *range = data;
  KhRobot *robot = (KhRobot *)&kh_session_get_plan (range->session)->robot; /* only looked at */
  return kh_length_dup_text (kh_nm_from_mm (range_of (robot, range)[range->end]), kh_settings_get_unit (), TRUE);
}

static gboolean try_range (gpointer data, const char *text, char **fault)
{
  const Range *range = data;
  KhRobot robot;
  int64_t nm;
  g_autoptr (GError) error = NULL;
  if (!kh_length_parse (text, kh_settings_get_unit (), &nm, &error))
    {
      *fault = g_strdup (error->message);
      return FALSE;
    }
  kh_robot_copy (&robot, &kh_session_get_plan (range->session)->robot);
  range_of (&robot, range)[range->end] = kh_mm_from_nm (nm);
  gboolean good = kh_robot_check (&robot, &error);
  if (good)
    kh_session_do_take (range->session, kh_change_new_robot (&robot), _ ("Range of a sensor changed"));
  else
    *fault = g_strdup (error->message);
  kh_robot_clear (&robot);
  return good;
}

static void add_range (GtkWidget *column, KhSession *session, gboolean side, int end)
{
  Range *range = g_new (Range, 1);
  *range = (Range){ session, side, end };
  GtkWidget *row = kh_bench_row_new (end == 0 ? _ ("Least reading") : _ ("Most reading"),
                                     kh_bench_entry_new (try_range, dup_range, range, g_free));
  gtk_widget_set_size_request (gtk_widget_get_first_child (row), 176, -1);
  gtk_box_append (GTK_BOX (column), row);
}

/* ---- which errors are drawn ---- */

static char *dup_seed (gpointer data) { return g_strdup_printf ("%" G_GUINT64_FORMAT, kh_session_get_seed (data)); }

static gboolean try_seed (gpointer data, const char *text, char **fault)
{
  guint64 seed;
  if (!g_ascii_string_to_unsigned (text, 10, 0, G_MAXUINT64, &seed, NULL))
    {
      *fault = g_strdup_printf (_ ("“%s” is no whole number from 0 on."), text);
      return FALSE;
    }
  kh_session_set_seed (data, seed);
  return TRUE;
}

static void draw_others_cb (Page *page)
{
  kh_session_set_seed (page->session, kh_session_get_seed (page->session) + 1);
  kh_bench_refresh_below (page->draw);
}

/* One run of many that could be: the seed says which. */
static GtkWidget *draw_new (Page *page)
{
  GtkWidget *box = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 6), *others = gtk_button_new_with_label (_ ("Draw others"));
  GtkWidget *seed = kh_bench_entry_new (try_seed, dup_seed, g_object_ref (page->session), g_object_unref);
  GtkWidget *row = kh_bench_row_new (_ ("Seed"), seed);
  gtk_widget_set_hexpand (row, TRUE);
  gtk_widget_set_valign (others, GTK_ALIGN_START);
  g_signal_connect_swapped (others, "clicked", G_CALLBACK (draw_others_cb), page);
  gtk_box_append (GTK_BOX (box), row);
  gtk_box_append (GTK_BOX (box), others);
  return box;
}

/* ---- choices ---- */

static void change_robot (Page *page, void (*edit) (KhRobot *robot, guint value), guint value, const char *words)
{
  KhRobot robot;
  if (page->filling)
    return;
  kh_robot_copy (&robot, &kh_session_get_plan (page->session)->robot);
  edit (&robot, value);
  kh_session_do_take (page->session, kh_change_new_robot (&robot), words);
  kh_robot_clear (&robot);
}

static void edit_hand (KhRobot *robot, guint value) { robot->hand = value == 0 ? KH_HAND_RIGHT : KH_HAND_LEFT; }

static void edit_shape (KhRobot *robot, guint value) { robot->body.shape = value == 0 ? KH_BODY_DISC : KH_BODY_BOX; }

static void edit_trim (KhRobot *robot, guint value) { robot->control.trim = value != 0; }

/* The numbers of a preset; name, hand and what other programs keep in the plan stay. */
static void edit_preset (KhRobot *robot, guint value)
{
  KhRobot preset;
  gsize n;
  const KhRobotMember *members = kh_robot_get_members (&n);
  kh_robot_init_for_pitch (&preset, (value == 0 ? 180 : 300) * KH_NM_PER_MM);
  for (gsize i = 0; i < n; i++)
    memcpy ((char *)robot + members[i].offset, (const char *)&preset + members[i].offset,
            members[i].kind == KH_MEMBER_INT || members[i].kind == KH_MEMBER_BOOLEAN ? sizeof (int) : sizeof (double));
  memcpy (robot->front_sensor.range_mm, preset.front_sensor.range_mm, sizeof preset.front_sensor.range_mm);
  memcpy (robot->side_sensors.range_mm, preset.side_sensors.range_mm, sizeof preset.side_sensors.range_mm);
  robot->body.shape = preset.body.shape;
  kh_robot_clear (&preset);
}

static void hand_cb (Page *page)
{
  change_robot (page, edit_hand, gtk_drop_down_get_selected (GTK_DROP_DOWN (page->hand)), _ ("Hand chosen"));
}

static void shape_cb (Page *page)
{
  change_robot (page, edit_shape, gtk_drop_down_get_selected (GTK_DROP_DOWN (page->shape)),
                _ ("Shape of the body chosen"));
}

static void exact_cb (Page *page)
{
  if (page->filling)
    return;
  gboolean exact = gtk_drop_down_get_selected (GTK_DROP_DOWN (page->exact)) == 0;
  gtk_widget_set_visible (page->draw, !exact);
  kh_session_set_exact (page->session, exact);
}

static void small_cb (Page *page) { change_robot (page, edit_preset, 0, _ ("Small club robot chosen")); }

static void wide_cb (Page *page) { change_robot (page, edit_preset, 1, _ ("Larger robot chosen")); }

static void trim_cb (Page *page, GParamSpec *spec, GtkCheckButton *check)
{
  change_robot (page, edit_trim, gtk_check_button_get_active (check), _ ("Robot: trim"));
}

/* ---- page ---- */

static GtkWidget *choice_new (const char *const *choices, Page *page, GCallback callback)
{
  GtkWidget *drop_down = gtk_drop_down_new_from_strings (choices);
  g_signal_connect_swapped (drop_down, "notify::selected", callback, page);
  return drop_down;
}

static void fill (GtkWidget *widget)
{
  Page *page = g_object_get_data (G_OBJECT (widget), "kh-page");
  const KhRobot *robot = &kh_session_get_plan (page->session)->robot;
  page->filling = TRUE;
  gtk_drop_down_set_selected (GTK_DROP_DOWN (page->hand), robot->hand == KH_HAND_RIGHT ? 0 : 1);
  gtk_drop_down_set_selected (GTK_DROP_DOWN (page->shape), robot->body.shape == KH_BODY_DISC ? 0 : 1);
  gtk_drop_down_set_selected (GTK_DROP_DOWN (page->exact), kh_session_get_exact (page->session) ? 0 : 1);
  gtk_widget_set_visible (page->draw, !kh_session_get_exact (page->session));
  gtk_check_button_set_active (GTK_CHECK_BUTTON (page->trim), robot->control.trim);
  kh_bench_refresh_below (widget);
  page->filling = FALSE;
}

static void show_outcome (GtkWidget *widget)
{
  Page *page = g_object_get_data (G_OBJECT (widget), "kh-page");
  const KhReview *review = kh_session_get_review (page->session);
  GString *text = g_string_new (NULL);
  for (int hand = 0; hand < 2; hand++)
    {
      const KhTrace *trace = review->traces[hand];
      if (!trace)
        continue;
      g_string_append_printf (text, "%s%s: %s ", text->len > 0 ? "\n" : "",
                              hand == KH_HAND_RIGHT ? _ ("Right hand") : _ ("Left hand"), trace->why);
      g_string_append_printf (text, _ ("%.1f s, %.2f m, least clearance %.0f mm."), trace->time_s, trace->distance_m,
                              trace->least_clearance_mm);
    }
  if (text->len == 0)
    g_string_append (text, review->run_fault                         ? review->run_fault
                           : !kh_session_get_preview (page->session) ? _ ("The preview is off.")
                           : kh_session_is_working (page->session)   ? _ ("Driving…")
                                                                     : _ ("No run yet."));
  gtk_label_set_text (GTK_LABEL (page->outcome), text->str);
  g_string_free (text, TRUE);
}

static void page_free (gpointer data)
{
  Page *page = data;
  g_object_unref (page->session);
  g_free (page);
}

static void add_number (GtkWidget *column, KhSession *session, const KhRobotMember *member)
{
  Number *number = g_new (Number, 1);
  *number = (Number){ session, member };
  g_autofree char *unit = kh_robot_words_dup_unit (member);
  g_autofree char *label
      = unit ? g_strdup_printf ("%s, %s", kh_robot_words_get (member), unit) : g_strdup (kh_robot_words_get (member));
  GtkWidget *row = kh_bench_row_new (label, kh_bench_entry_new (try_number, dup_number, number, g_free));
  gtk_widget_set_size_request (gtk_widget_get_first_child (row), 176, -1);
  gtk_box_append (GTK_BOX (column), row);
}

/* The members of an object of the plan file under one heading that folds. */
static void add_section (GtkWidget *column, Page *page, const char *object, const char *title)
{
  gsize n;
  const KhRobotMember *members = kh_robot_get_members (&n);
  GtkWidget *expander = gtk_expander_new (title), *box = gtk_box_new (GTK_ORIENTATION_VERTICAL, 4);
  for (gsize i = 0; i < n; i++)
    {
      if (strcmp (members[i].object, object) != 0)
        continue;
      if (members[i].kind == KH_MEMBER_BOOLEAN)
        {
          GtkWidget *check = gtk_check_button_new_with_label (kh_robot_words_get (&members[i]));
          page->trim = check; /* the only one: filled with the page */
          g_signal_connect_data (check, "notify::active", G_CALLBACK (trim_cb), page, NULL, G_CONNECT_SWAPPED);
          gtk_box_append (GTK_BOX (box), check);
        }
      else
        add_number (box, page->session, &members[i]);
    }
  for (int end = 0; end < 2 && g_str_has_suffix (object, "_sensors"); end++)
    add_range (box, page->session, TRUE, end);
  for (int end = 0; end < 2 && strcmp (object, "front_sensor") == 0; end++)
    add_range (box, page->session, FALSE, end);
  gtk_widget_set_margin_top (box, 6);
  gtk_expander_set_child (GTK_EXPANDER (expander), box);
  gtk_expander_set_expanded (GTK_EXPANDER (expander), strcmp (object, "body") == 0);
  gtk_box_append (GTK_BOX (column), expander);
}

GtkWidget *kh_robot_page_new (KhSession *session)
{
  const char *const hands[] = { _ ("Right hand"), _ ("Left hand"), NULL }, *const shapes[]
                                                                           = { _ ("Disc"), _ ("Box"), NULL };
  const char *const errors[] = { _ ("No errors"), _ ("With drawn errors"), NULL };
  Page *page = g_new0 (Page, 1);
  GtkWidget *column, *widget = kh_bench_page_new (&column), *presets = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 6);
  GtkWidget *small = gtk_button_new_with_label (_ ("Small, for 180 mm")),
            *wide = gtk_button_new_with_label (_ ("Larger, for 300 mm"));
  page->session = g_object_ref (session);
  page->filling = TRUE;
  g_object_set_data_full (G_OBJECT (widget), "kh-page", page, page_free);
  page->hand = choice_new (hands, page, G_CALLBACK (hand_cb));
  page->shape = choice_new (shapes, page, G_CALLBACK (shape_cb));
  page->exact = choice_new (errors, page, G_CALLBACK (exact_cb));
  page->draw = draw_new (page);
  page->outcome = kh_bench_note_new ("");
  gtk_label_set_selectable (GTK_LABEL (page->outcome), FALSE);
  g_signal_connect_swapped (small, "clicked", G_CALLBACK (small_cb), page);
  g_signal_connect_swapped (wide, "clicked", G_CALLBACK (wide_cb), page);
  gtk_box_append (GTK_BOX (presets), small);
  gtk_box_append (GTK_BOX (presets), wide);
  gtk_box_append (GTK_BOX (column), kh_bench_row_new (_ ("Keeps on the wall"), page->hand));
  gtk_box_append (GTK_BOX (column), kh_bench_row_new (_ ("Preview"), page->exact));
  gtk_box_append (GTK_BOX (column), page->draw);
  gtk_box_append (GTK_BOX (column), page->outcome);
  gtk_box_append (GTK_BOX (column), kh_bench_heading_new (_ ("Start from a common robot")));
  gtk_box_append (GTK_BOX (column), presets);
  gtk_box_append (GTK_BOX (column), kh_bench_heading_new (_ ("Measures of your robot")));
  gtk_box_append (GTK_BOX (column), kh_bench_row_new (_ ("Shape"), page->shape));
  add_section (column, page, "body", _ ("Body"));
  add_section (column, page, "drive", _ ("Drive"));
  add_section (column, page, "front_sensor", _ ("Front sensor"));
  add_section (column, page, "side_sensors", _ ("Side sensors"));
  add_section (column, page, "floor_sensor", _ ("Floor sensor"));
  add_section (column, page, "control", _ ("Control"));
  add_section (column, page, "errors", _ ("Errors drawn, as standard deviations"));
  kh_bench_follow (widget, session, "plan-changed", G_CALLBACK (fill));
  kh_bench_follow (widget, session, "review-changed", G_CALLBACK (show_outcome));
  fill (widget);
  show_outcome (widget);
  return widget;
}
