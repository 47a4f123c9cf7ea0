/* SPDX-License-Identifier: MIT */
#include "app/newplan.h"

#include "app/settings.h"
#include "app/words.h"
#include <glib/gi18n-lib.h>

typedef enum
{
  PITCH,
  CLEAR,
  THICKNESS,
  HEIGHT,
  N_FIELDS
} Field;

typedef struct
{
  GtkWidget *window, *columns, *rows, *preset, *create, *sentence;
  GtkWidget *entries[N_FIELDS], *faults[N_FIELDS];
  int64_t values_nm[N_FIELDS];
  gboolean good[N_FIELDS];
  gboolean filling; /* entries are set by the program */
  KhLengthUnit unit;
  KhWithPlan with_plan;
  gpointer data;
} Dialog;

/* Sizes in use at school and contest mazes; *common practice, no source*. */
static const struct
{
  const char *label;
  int64_t pitch_mm, thickness_mm, height_mm;
} presets[] = {
  { N_ ("Classic contest, 180 mm"), 180, 12, 50 },
  { N_ ("Half size, 90 mm"), 90, 6, 25 },
  { N_ ("Wide school maze, 300 mm"), 300, 18, 100 },
};

static void mark (Dialog *dialog, Field field, const char *fault)
{
  dialog->good[field] = fault == NULL;
  gtk_label_set_text (GTK_LABEL (dialog->faults[field]), fault != NULL ? fault : "");
  gtk_widget_set_visible (dialog->faults[field], fault != NULL);
  if (fault != NULL)
    gtk_widget_add_css_class (dialog->entries[field], "error");
  else
    gtk_widget_remove_css_class (dialog->entries[field], "error");
  gtk_accessible_update_state (GTK_ACCESSIBLE (dialog->entries[field]), GTK_ACCESSIBLE_STATE_INVALID,
                               fault != NULL ? GTK_ACCESSIBLE_INVALID_TRUE : GTK_ACCESSIBLE_INVALID_FALSE, -1);
}

static void set_entry (Dialog *dialog, Field field, int64_t nm)
{
  g_autofree char *text = kh_length_dup_text (nm, dialog->unit, TRUE);
  dialog->filling = TRUE;
  gtk_editable_set_text (GTK_EDITABLE (dialog->entries[field]), text);
  dialog->filling = FALSE;
  dialog->values_nm[field] = nm;
}

/* Each length by itself: readable, and within what a plan file takes. */
static void check_range (Dialog *dialog, Field field, int64_t least_nm, int64_t most_nm)
{
  g_autoptr (GError) error = NULL;
  int64_t nm;
  if (!kh_length_parse (gtk_editable_get_text (GTK_EDITABLE (dialog->entries[field])), dialog->unit, &nm, &error))
    {
      mark (dialog, field, error->message);
      return;
    }
  if (nm < least_nm || nm > most_nm)
    {
      g_autofree char *least = kh_length_dup_text (least_nm, dialog->unit, TRUE);
      g_autofree char *most = kh_length_dup_text (most_nm, dialog->unit, TRUE);
      g_autofree char *fault = g_strdup_printf (_ ("From %s to %s."), least, most);
      mark (dialog, field, fault);
      return;
    }
  dialog->values_nm[field] = nm;
  mark (dialog, field, NULL);
}

static void check_all (Dialog *dialog)
{
  check_range (dialog, THICKNESS, KH_NM_PER_MM / 2, 500 * KH_NM_PER_MM);
  check_range (dialog, PITCH, 20 * KH_NM_PER_MM, 5000 * KH_NM_PER_MM);
  check_range (dialog, HEIGHT, KH_NM_PER_MM, 3000 * KH_NM_PER_MM);
  if (dialog->good[THICKNESS])
    {
      if (dialog->values_nm[THICKNESS] % 2 != 0)
        dialog->values_nm[THICKNESS] += 1; /* a half thickness must be whole, too: under a millionth of a millimetre */
      if (dialog->good[PITCH] && 2 * dialog->values_nm[THICKNESS] >= dialog->values_nm[PITCH])
        mark (dialog, THICKNESS, _ ("Under half the pitch, so that a cell stays open."));
    }
}

static void show_sentence (Dialog *dialog)
{
  gboolean good = dialog->good[PITCH] && dialog->good[THICKNESS] && dialog->good[HEIGHT];
  gtk_widget_set_sensitive (dialog->create, good);
  if (!good)
    {
      gtk_label_set_text (GTK_LABEL (dialog->sentence), _ ("Set right what is marked to go on."));
      return;
    }
  g_autoptr (KhPlan) plan
      = kh_plan_new (gtk_spin_button_get_value_as_int (GTK_SPIN_BUTTON (dialog->columns)),
                     gtk_spin_button_get_value_as_int (GTK_SPIN_BUTTON (dialog->rows)), dialog->values_nm[PITCH],
                     dialog->values_nm[THICKNESS], dialog->values_nm[HEIGHT]);
  g_autofree char *pitch = kh_length_dup_text (dialog->values_nm[PITCH], dialog->unit, TRUE);
  g_autofree char *size = kh_words_dup_size (plan, dialog->unit);
  int64_t spare_nm = kh_plan_clear_width_nm (plan) / 2 - (int64_t)(kh_robot_swept_radius_mm (&plan->robot) * 1e6);
  g_autofree char *spare = kh_length_dup_text (ABS (spare_nm) / KH_NM_PER_MM * KH_NM_PER_MM, dialog->unit, TRUE);
  g_autofree char *text
      = spare_nm >= 0
            ? g_strdup_printf (_ ("%s gives %s over all; the robot has %s on each side."), pitch, size, spare)
            : g_strdup_printf (_ ("%s gives %s over all; the robot is %s too wide on each side."), pitch, size, spare);
  gtk_label_set_text (GTK_LABEL (dialog->sentence), text);
}

/* Pitch and clear width say the same: the one typed sets the other. */
static void entry_changed_cb (GtkEditable *entry, Dialog *dialog)
{
  if (dialog->filling)
    return;
  int64_t thickness, length;
  g_autoptr (GError) error = NULL;
  gboolean has_thickness = kh_length_parse (gtk_editable_get_text (GTK_EDITABLE (dialog->entries[THICKNESS])),
                                            dialog->unit, &thickness, NULL);
  if (GTK_WIDGET (entry) == dialog->entries[CLEAR])
    {
      if (!kh_length_parse (gtk_editable_get_text (entry), dialog->unit, &length, &error))
        {
          mark (dialog, CLEAR, error->message);
          gtk_widget_set_sensitive (dialog->create, FALSE);
          return;
        }
      if (has_thickness)
        set_entry (dialog, PITCH, length + thickness);
    }
  mark (dialog, CLEAR, NULL);
  check_all (dialog);
  if (GTK_WIDGET (entry) != dialog->entries[CLEAR] && has_thickness &&
      kh_length_parse (gtk_editable_get_text (GTK_EDITABLE (dialog->entries[PITCH])), dialog->unit, &length, NULL) &&
      length > thickness)
    set_entry (dialog, CLEAR, length - thickness);
  show_sentence (dialog);
}

static void size_changed_cb (GtkWidget *spin, Dialog *dialog) { show_sentence (dialog); }

static void preset_cb (GtkDropDown *drop_down, GParamSpec *spec, Dialog *dialog)
{
  guint i = gtk_drop_down_get_selected (drop_down);
  if (i >= G_N_ELEMENTS (presets))
    return;
  set_entry (dialog, PITCH, presets[i].pitch_mm * KH_NM_PER_MM);
  set_entry (dialog, THICKNESS, presets[i].thickness_mm * KH_NM_PER_MM);
  set_entry (dialog, HEIGHT, presets[i].height_mm * KH_NM_PER_MM);
  set_entry (dialog, CLEAR, (presets[i].pitch_mm - presets[i].thickness_mm) * KH_NM_PER_MM);
  mark (dialog, CLEAR, NULL);
  check_all (dialog);
  show_sentence (dialog);
}

static void create_cb (GtkButton *button, Dialog *dialog)
{
  KhPlan *plan = kh_plan_new (gtk_spin_button_get_value_as_int (GTK_SPIN_BUTTON (dialog->columns)),
                              gtk_spin_button_get_value_as_int (GTK_SPIN_BUTTON (dialog->rows)),
                              dialog->values_nm[PITCH], dialog->values_nm[THICKNESS], dialog->values_nm[HEIGHT]);
  KhWithPlan with_plan = dialog->with_plan;
  gpointer data = dialog->data;
  gtk_window_set_transient_for (GTK_WINDOW (dialog->window), NULL);
  gtk_window_destroy (GTK_WINDOW (dialog->window)); /* frees the dialog */
  with_plan (plan, data);
}

static void cancel_cb (GtkButton *button, Dialog *dialog) { gtk_window_destroy (GTK_WINDOW (dialog->window)); }

static void add_row (GtkGrid *grid, int row, const char *words, GtkWidget *widget, GtkWidget *fault)
{
  GtkWidget *label = gtk_label_new_with_mnemonic (words);
  gtk_label_set_xalign (GTK_LABEL (label), 0);
  gtk_label_set_mnemonic_widget (GTK_LABEL (label), widget);
  gtk_widget_set_hexpand (widget, TRUE);
  gtk_grid_attach (grid, label, 0, 2 * row, 1, 1);
  gtk_grid_attach (grid, widget, 1, 2 * row, 1, 1);
  if (fault != NULL)
    gtk_grid_attach (grid, fault, 1, 2 * row + 1, 1, 1);
}

static void add_length (Dialog *dialog, GtkGrid *grid, int row, Field field, const char *words)
{
  GtkWidget *fault = gtk_label_new ("");
  dialog->entries[field] = gtk_entry_new ();
  dialog->faults[field] = fault;
  gtk_label_set_xalign (GTK_LABEL (fault), 0);
  gtk_label_set_wrap (GTK_LABEL (fault), TRUE);
  gtk_label_set_max_width_chars (GTK_LABEL (fault), 36);
  gtk_widget_add_css_class (fault, "kh-fault");
  gtk_widget_set_visible (fault, FALSE);
  gtk_entry_set_activates_default (GTK_ENTRY (dialog->entries[field]), TRUE);
  add_row (grid, row, words, dialog->entries[field], fault);
  g_signal_connect (dialog->entries[field], "changed", G_CALLBACK (entry_changed_cb), dialog);
}

static GtkWidget *new_fields (Dialog *dialog)
{
  GtkWidget *grid = gtk_grid_new ();
  gtk_grid_set_row_spacing (GTK_GRID (grid), 4);
  gtk_grid_set_column_spacing (GTK_GRID (grid), 12);
  GtkStringList *names = gtk_string_list_new (NULL);
  for (gsize i = 0; i < G_N_ELEMENTS (presets); i++)
    gtk_string_list_append (names, _ (presets[i].label));
  dialog->preset = gtk_drop_down_new (G_LIST_MODEL (names), NULL);
  dialog->columns = gtk_spin_button_new_with_range (1, KH_LATTICE_MOST, 1);
  dialog->rows = gtk_spin_button_new_with_range (1, KH_LATTICE_MOST, 1);
  gtk_spin_button_set_value (GTK_SPIN_BUTTON (dialog->columns), 8);
  gtk_spin_button_set_value (GTK_SPIN_BUTTON (dialog->rows), 6);
  gtk_text_set_activates_default (GTK_TEXT (gtk_editable_get_delegate (GTK_EDITABLE (dialog->columns))), TRUE);
  gtk_text_set_activates_default (GTK_TEXT (gtk_editable_get_delegate (GTK_EDITABLE (dialog->rows))), TRUE);
  add_row (GTK_GRID (grid), 0, _ ("_Begin with"), dialog->preset, NULL);
  add_row (GTK_GRID (grid), 1, _ ("_Columns"), dialog->columns, NULL);
  add_row (GTK_GRID (grid), 2, _ ("_Rows"), dialog->rows, NULL);
  add_length (dialog, GTK_GRID (grid), 3, THICKNESS, _ ("Board _thickness, as measured"));
  add_length (dialog, GTK_GRID (grid), 4, PITCH, _ ("_Pitch, from wall to wall"));
  add_length (dialog, GTK_GRID (grid), 5, CLEAR, _ ("or clear _width between walls"));
  add_length (dialog, GTK_GRID (grid), 6, HEIGHT, _ ("Wall _height"));
  return grid;
}

static GtkWidget *new_buttons (Dialog *dialog)
{
  GtkWidget *buttons = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 6);
  GtkWidget *cancel = gtk_button_new_with_mnemonic (_ ("C_ancel"));
  dialog->create = gtk_button_new_with_mnemonic (_ ("_Begin This Plan"));
  gtk_widget_add_css_class (dialog->create, "suggested-action");
  gtk_widget_set_halign (buttons, GTK_ALIGN_END);
  gtk_widget_set_margin_top (buttons, 6);
  gtk_box_append (GTK_BOX (buttons), cancel);
  gtk_box_append (GTK_BOX (buttons), dialog->create);
  g_signal_connect (cancel, "clicked", G_CALLBACK (cancel_cb), dialog);
  g_signal_connect (dialog->create, "clicked", G_CALLBACK (create_cb), dialog);
  return buttons;
}

static gboolean escape_cb (GtkWidget *widget, GVariant *args, gpointer data)
{
  gtk_window_close (GTK_WINDOW (widget));
  return TRUE;
}

void kh_new_plan_show (GtkWindow *parent, KhWithPlan with_plan, gpointer data)
{
  Dialog *dialog = g_new0 (Dialog, 1);
  dialog->unit = kh_settings_get_unit ();
  dialog->with_plan = with_plan;
  dialog->data = data;
  dialog->window = gtk_window_new ();
  gtk_window_set_title (GTK_WINDOW (dialog->window), _ ("New Plan"));
  gtk_window_set_transient_for (GTK_WINDOW (dialog->window), parent);
  gtk_window_set_destroy_with_parent (GTK_WINDOW (dialog->window), TRUE);
  gtk_window_set_modal (GTK_WINDOW (dialog->window), TRUE);
  gtk_window_set_resizable (GTK_WINDOW (dialog->window), FALSE);
  gtk_widget_add_css_class (dialog->window, "kh-window");
  g_object_set_data_full (G_OBJECT (dialog->window), "kh-dialog", dialog, g_free);

  GtkWidget *box = gtk_box_new (GTK_ORIENTATION_VERTICAL, 12);
  gtk_widget_add_css_class (box, "kh-dialog");
  gtk_box_append (GTK_BOX (box), new_fields (dialog));
  dialog->sentence = gtk_label_new ("");
  gtk_label_set_wrap (GTK_LABEL (dialog->sentence), TRUE);
  gtk_label_set_xalign (GTK_LABEL (dialog->sentence), 0);
  gtk_label_set_max_width_chars (GTK_LABEL (dialog->sentence), 52);
  gtk_widget_add_css_class (dialog->sentence, "kh-answer");
  gtk_box_append (GTK_BOX (box), dialog->sentence);
  gtk_box_append (GTK_BOX (box), new_buttons (dialog));
  gtk_window_set_child (GTK_WINDOW (dialog->window), box);
  gtk_window_set_default_widget (GTK_WINDOW (dialog->window), dialog->create);

  g_signal_connect (dialog->columns, "value-changed", G_CALLBACK (size_changed_cb), dialog);
  g_signal_connect (dialog->rows, "value-changed", G_CALLBACK (size_changed_cb), dialog);
  g_signal_connect (dialog->preset, "notify::selected", G_CALLBACK (preset_cb), dialog);
  preset_cb (GTK_DROP_DOWN (dialog->preset), NULL, dialog);

  GtkEventController *keys = gtk_shortcut_controller_new ();
  gtk_shortcut_controller_add_shortcut (
      GTK_SHORTCUT_CONTROLLER (keys),
      gtk_shortcut_new (gtk_keyval_trigger_new (GDK_KEY_Escape, 0), gtk_callback_action_new (escape_cb, NULL, NULL)));
  gtk_widget_add_controller (dialog->window, keys);
  gtk_window_present (GTK_WINDOW (dialog->window));
  gtk_widget_grab_focus (dialog->columns);
}
