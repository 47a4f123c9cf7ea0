/* SPDX-License-Identifier: MIT */
#include "app/windowprivate.h"

#include "app/bench.h"
#include "app/findingspage.h"
#include "app/mazepage.h"
#include "app/panelspage.h"
#include "app/robotpage.h"
#include "app/runstrip.h"
#include "app/sawstrip.h"
#include "app/settings.h"
#include "app/words.h"
#include <glib/gi18n-lib.h>

/* The window's furniture: the tool column, the bench with its switcher and the
 * strip that follows it, the menu of a place on the canvas, the round of regions. */

/* ---- tools ---- */

static GtkWidget *new_tool_button (const KhTool *tool)
{
  GtkWidget *button = gtk_toggle_button_new ();
  GtkWidget *box = gtk_box_new (GTK_ORIENTATION_VERTICAL, 3);
  GtkWidget *image = gtk_image_new_from_icon_name (tool->icon_name);
  gtk_image_set_pixel_size (GTK_IMAGE (image), 20);
  gtk_box_append (GTK_BOX (box), image);
  gtk_box_append (GTK_BOX (box), gtk_label_new (_ (tool->label)));
  gtk_button_set_child (GTK_BUTTON (button), box);
  gtk_widget_add_css_class (button, "kh-tool");
  gtk_widget_set_tooltip_text (button, _ (tool->tooltip));
  gtk_actionable_set_action_name (GTK_ACTIONABLE (button), "win.tool");
  gtk_actionable_set_action_target (GTK_ACTIONABLE (button), "s", tool->name);
  return button;
}

static GtkWidget *new_mode_button (const char *label, const char *mode, const char *tooltip)
{
  GtkWidget *button = gtk_toggle_button_new_with_label (label);
  gtk_widget_add_css_class (button, "kh-mode");
  gtk_widget_set_tooltip_text (button, tooltip);
  gtk_actionable_set_action_name (GTK_ACTIONABLE (button), "win.walls-mode");
  gtk_actionable_set_action_target (GTK_ACTIONABLE (button), "s", mode);
  return button;
}

static void tool_wished_cb (KhCanvas *canvas, const char *name, KhWindow *self)
{
  g_action_group_activate_action (G_ACTION_GROUP (self), "tool", g_variant_new_string (name));
}

static void menu_wished_cb (KhCanvas *canvas, double x, double y, KhWindow *self)
{
  kh_window_open_place_menu (self, x, y);
}

void kh_window_init_tools (KhWindow *self)
{
  for (int i = 0; i < KH_N_TOOLS; i++)
    {
      gtk_box_append (GTK_BOX (self->tool_box), new_tool_button (kh_tool_get ((KhToolId)i)));
      if (i == KH_TOOL_WALLS)
        {
          self->modes = gtk_box_new (GTK_ORIENTATION_VERTICAL, 2);
          gtk_widget_add_css_class (self->modes, "kh-modes");
          gtk_box_append (GTK_BOX (self->modes), new_mode_button (_ ("Lay"), "lay", _ ("A drag lays walls")));
          gtk_box_append (GTK_BOX (self->modes),
                          new_mode_button (_ ("Take away"), "away",
                                           _ ("A drag takes walls away, as the right button always does")));
          gtk_box_append (GTK_BOX (self->tool_box), self->modes);
        }
    }
  g_signal_connect (self->canvas, "tool-wished", G_CALLBACK (tool_wished_cb), self);
  g_signal_connect (self->canvas, "menu", G_CALLBACK (menu_wished_cb), self);
}

/* ---- bench ---- */

static const struct
{
  const char *name, *label, *strip;
  GtkWidget *(*new_page) (KhSession *session);
} pages[KH_N_BENCH_PAGES] = {
  { "findings", N_ ("Findings"), "run", kh_findings_page_new },
  { "robot", N_ ("Robot"), "run", kh_robot_page_new },
  { "panels", N_ ("Panels"), "saw", kh_panels_page_new },
  { "maze", N_ ("Maze"), "run", kh_maze_page_new },
};

void kh_window_init_bench (KhWindow *self)
{
  for (int i = 0; i < KH_N_BENCH_PAGES; i++)
    {
      GtkWidget *button = gtk_toggle_button_new ();
      GtkWidget *box = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 6);
      gtk_widget_set_halign (box, GTK_ALIGN_CENTER);
      gtk_box_append (GTK_BOX (box), gtk_label_new (_ (pages[i].label)));
      if (i == 0)
        {
          self->count_badge = gtk_label_new ("");
          gtk_widget_add_css_class (self->count_badge, "kh-badge");
          gtk_widget_set_valign (self->count_badge, GTK_ALIGN_CENTER);
          gtk_box_append (GTK_BOX (box), self->count_badge);
        }
      gtk_button_set_child (GTK_BUTTON (button), box);
      gtk_widget_set_hexpand (button, TRUE);
      gtk_actionable_set_action_name (GTK_ACTIONABLE (button), "win.bench");
      gtk_actionable_set_action_target (GTK_ACTIONABLE (button), "s", pages[i].name);
      gtk_box_append (GTK_BOX (self->bench_switcher), button);
      self->bench_buttons[i] = button;
    }
}

static void empty_stack (GtkWidget *stack)
{
  GtkWidget *child;
  while ((child = gtk_widget_get_first_child (stack)) != NULL)
    gtk_stack_remove (GTK_STACK (stack), child);
}

void kh_window_fill_bench (KhWindow *self)
{
  g_autoptr (GVariant) page = g_action_group_get_action_state (G_ACTION_GROUP (self), "bench");
  empty_stack (self->bench_stack);
  empty_stack (self->strip_stack);
  for (int i = 0; i < KH_N_BENCH_PAGES; i++)
    gtk_stack_add_named (GTK_STACK (self->bench_stack), pages[i].new_page (self->session), pages[i].name);
  gtk_stack_add_named (GTK_STACK (self->strip_stack), kh_run_strip_new (self->session), "run");
  gtk_stack_add_named (GTK_STACK (self->strip_stack), kh_saw_strip_new (self->session), "saw");
  kh_window_show_bench (self, g_variant_get_string (page, NULL));
  kh_bench_name_below (GTK_WIDGET (self));
}

void kh_window_show_bench (KhWindow *self, const char *page)
{
  for (int i = 0; i < KH_N_BENCH_PAGES; i++)
    if (strcmp (pages[i].name, page) == 0)
      {
        GAction *action = g_action_map_lookup_action (G_ACTION_MAP (self), "bench");
        g_simple_action_set_state (G_SIMPLE_ACTION (action), g_variant_new_string (page));
        kh_settings_set_string ("bench-page", page);
        kh_canvas_set_with_panels (KH_CANVAS (self->canvas), strcmp (pages[i].strip, "saw") == 0);
        if (gtk_stack_get_child_by_name (GTK_STACK (self->bench_stack), page) != NULL)
          {
            gtk_stack_set_visible_child_name (GTK_STACK (self->bench_stack), page);
            gtk_stack_set_visible_child_name (GTK_STACK (self->strip_stack), pages[i].strip);
          }
        return;
      }
}

/* ---- menu of a place ---- */

static void add_item (GMenu *menu, const char *label, const char *detailed_action)
{
  g_menu_append (menu, label, detailed_action);
}

static GMenuModel *new_place_menu (KhWindow *self)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  KhEdge edge;
  KhCell cell;
  kh_canvas_get_place (KH_CANVAS (self->canvas), &edge, &cell);
  GMenu *menu = g_menu_new ();
  g_autoptr (GMenu) on_edge = g_menu_new ();
  g_autoptr (GMenu) in_cell = g_menu_new ();
  g_autofree char *edge_name = kh_words_dup_edge (&plan->lattice, edge);
  g_autofree char *cell_name = kh_cell_dup_name (cell);
  const KhOpening *opening = kh_plan_get_opening (plan, edge);

  if (opening == NULL)
    add_item (on_edge, kh_plan_has_wall (plan, edge) ? _ ("Take this wall away") : _ ("Lay a wall here"),
              kh_plan_has_wall (plan, edge) ? "win.place-wall(false)" : "win.place-wall(true)");
  if (kh_plan_is_boundary (plan, edge))
    {
      add_item (on_edge, _ ("Entrance"), "win.place-opening::entrance");
      add_item (on_edge, _ ("Exit"), "win.place-opening::exit");
      add_item (on_edge, _ ("Other opening"), "win.place-opening::plain");
      if (opening != NULL)
        add_item (on_edge, _ ("Close this opening"), "win.place-opening::closed");
    }
  g_menu_append_section (menu, edge_name, G_MENU_MODEL (on_edge));

  gboolean has_mark = FALSE;
  for (guint i = 0; i < plan->marks->len; i++)
    {
      KhCell at = g_array_index (plan->marks, KhMark, i).cell;
      has_mark = has_mark || (at.column == cell.column && at.row == cell.row);
    }
  if (kh_plan_has_floor (plan, cell))
    {
      g_autoptr (GMenu) start = g_menu_new ();
      add_item (start, _ ("Facing north"), "win.place-start::north");
      add_item (start, _ ("Facing east"), "win.place-start::east");
      add_item (start, _ ("Facing south"), "win.place-start::south");
      add_item (start, _ ("Facing west"), "win.place-start::west");
      g_menu_append_submenu (in_cell, _ ("Start here"), G_MENU_MODEL (start));
    }
  if (plan->has_start && plan->start.cell.column == cell.column && plan->start.cell.row == cell.row)
    add_item (in_cell, _ ("Take the start away"), "win.place-start::away");
  add_item (in_cell, has_mark ? _ ("Take the mark away") : _ ("Place a mark"),
            has_mark ? "win.place-mark(false)" : "win.place-mark(true)");
  add_item (in_cell,
            kh_plan_has_floor (plan, cell) ? _ ("Take this cell's floor away") : _ ("Give this cell its floor back"),
            kh_plan_has_floor (plan, cell) ? "win.place-floor(false)" : "win.place-floor(true)");
  g_menu_append_section (menu, cell_name, G_MENU_MODEL (in_cell));
  return G_MENU_MODEL (menu);
}

/* Not in the handler itself: the item's action is activated after it. */
static gboolean unparent_cb (gpointer popover)
{
  if (gtk_widget_get_parent (popover) != NULL)
    gtk_widget_unparent (popover);
  g_object_unref (popover);
  return G_SOURCE_REMOVE;
}

static void closed_cb (GtkPopover *popover, gpointer data) { g_idle_add (unparent_cb, g_object_ref (popover)); }

void kh_window_open_place_menu (KhWindow *self, double x, double y)
{
  g_autoptr (GMenuModel) model = new_place_menu (self);
  GtkWidget *popover = gtk_popover_menu_new_from_model (model);
  gtk_widget_set_parent (popover, self->canvas_overlay);
  gtk_popover_set_has_arrow (GTK_POPOVER (popover), FALSE);
  gtk_widget_set_halign (popover, GTK_ALIGN_START);
  gtk_popover_set_pointing_to (GTK_POPOVER (popover), &(GdkRectangle){ (int)x, (int)y, 1, 1 });
  g_signal_connect (popover, "closed", G_CALLBACK (closed_cb), NULL);
  gtk_popover_popup (GTK_POPOVER (popover));
}

/* ---- regions ---- */

void kh_window_take_typed (KhWindow *self) { kh_bench_take_typed (gtk_window_get_focus (GTK_WINDOW (self))); }

void kh_window_go_round (KhWindow *self, int step)
{
  GtkWidget *regions[] = { self->header, self->tool_box, self->canvas, self->strip_stack, self->bench_box };
  int n = G_N_ELEMENTS (regions), now = 0;
  GtkWidget *focus = gtk_window_get_focus (GTK_WINDOW (self));
  for (int i = 0; i < n; i++)
    if (focus != NULL && (focus == regions[i] || gtk_widget_is_ancestor (focus, regions[i])))
      now = i;
  for (int k = 1; k <= n; k++)
    {
      GtkWidget *region = regions[((now + step * k) % n + n) % n];
      if (!gtk_widget_get_mapped (region))
        continue;
      if (region == self->canvas)
        {
          kh_canvas_grab_cursor (KH_CANVAS (self->canvas));
          gtk_window_set_focus_visible (GTK_WINDOW (self), TRUE);
          return;
        }
      gtk_window_set_focus (GTK_WINDOW (self), NULL); /* so that it begins at the region's first */
      if (gtk_widget_child_focus (region, GTK_DIR_TAB_FORWARD))
        {
          gtk_window_set_focus_visible (GTK_WINDOW (self), TRUE);
          return;
        }
    }
}
