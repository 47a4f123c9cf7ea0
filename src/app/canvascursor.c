/* SPDX-License-Identifier: MIT */
#include "app/canvasprivate.h"

#include "app/scheme.h"
#include "app/words.h"
#include <glib/gi18n-lib.h>

/* The lattice cursor: the keyboard's way over the plan, and the one thing on
 * the canvas that assistive technology can stand on.  It is a child widget
 * without a drawing of its own; the canvas draws it and allocates it where it
 * is, and its name says what is there.
 *
 * Tools on edges: the cursor stands on a lattice point and looks back at the
 * edge it passed last.  Tools on cells: it stands in a cell. */

#define KH_TYPE_LATTICE_CURSOR (kh_lattice_cursor_get_type ())
G_DECLARE_FINAL_TYPE (KhLatticeCursor, kh_lattice_cursor, KH, LATTICE_CURSOR, GtkWidget)
struct _KhLatticeCursor
{
  GtkWidget parent_instance;
};
G_DEFINE_FINAL_TYPE (KhLatticeCursor, kh_lattice_cursor, GTK_TYPE_WIDGET)

static void kh_lattice_cursor_class_init (KhLatticeCursorClass *class)
{
  gtk_widget_class_set_accessible_role (GTK_WIDGET_CLASS (class), GTK_ACCESSIBLE_ROLE_IMG);
}

static void kh_lattice_cursor_init (KhLatticeCursor *self)
{
  gtk_widget_set_focusable (GTK_WIDGET (self), TRUE);
  gtk_widget_set_can_target (GTK_WIDGET (self), FALSE);
}

static gboolean on_edges (KhCanvas *self) { return kh_tool_get (self->tool)->on_edges; }

void kh_canvas_get_cursor_box (KhCanvas *self, KhBox *device)
{
  *device = (KhBox){ 0, 0, 1, 1 };
  if (self->session == NULL)
    return;
  const KhPlan *plan = kh_session_get_plan (self->session);
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  KhBox mm = { self->cell.column * pitch, self->cell.row * pitch, (self->cell.column + 1) * pitch,
               (self->cell.row + 1) * pitch };
  if (on_edges (self))
    kh_edge_get_box_mm (plan, self->edge, &mm);
  KhVec a = kh_view_to_device (&self->view, (KhVec){ mm.x0, mm.y1 });
  KhVec b = kh_view_to_device (&self->view, (KhVec){ mm.x1, mm.y0 });
  /* may lie outside what is seen, but not beyond what a coordinate can hold */
  *device = (KhBox){ CLAMP (a.x, -30000, 30000), CLAMP (a.y, -30000, 30000), CLAMP (b.x, -30000, 30000),
                     CLAMP (b.y, -30000, 30000) };
}

void kh_canvas_draw_cursor (KhCanvas *self, cairo_t *cr)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  KhBox box;
  kh_canvas_get_cursor_box (self, &box);
  double out = on_edges (self) ? 4 : -3;
  cairo_rectangle (cr, box.x0 - out, box.y0 - out, box.x1 - box.x0 + 2 * out, box.y1 - box.y0 + 2 * out);
  kh_palette_set_source (cr, kh_scheme_get (), KH_INK_SIGN, 1);
  cairo_set_line_width (cr, 2);
  cairo_stroke (cr);
  if (on_edges (self))
    {
      KhVec at = kh_view_to_device (&self->view, (KhVec){ self->point.column * pitch, self->point.row * pitch });
      cairo_arc (cr, at.x, at.y, 6, 0, 2 * G_PI);
      kh_palette_set_source (cr, kh_scheme_get (), KH_INK_FLOOR, 1);
      cairo_fill_preserve (cr);
      kh_palette_set_source (cr, kh_scheme_get (), KH_INK_SIGN, 1);
      cairo_stroke (cr);
    }
}

void kh_canvas_name_cursor (KhCanvas *self)
{
  if (self->session == NULL)
    return;
  const KhPlan *plan = kh_session_get_plan (self->session);
  g_autofree char *name
      = on_edges (self) ? kh_words_dup_edge_state (plan, self->edge) : kh_words_dup_cell_state (plan, self->cell);
  gtk_accessible_update_property (GTK_ACCESSIBLE (self->cursor), GTK_ACCESSIBLE_PROPERTY_LABEL, name, -1);
  if (gtk_widget_has_visible_focus (self->cursor))
    /* Translators: the lattice cursor, moved by the arrow keys, then where it is */
    kh_canvas_say_pointed (self, g_strdup_printf (_ ("Cursor: %s"), name));
}

void kh_canvas_clamp_cursor (KhCanvas *self)
{
  const KhLattice *lattice = &kh_session_get_plan (self->session)->lattice;
  self->cell.column = MIN (self->cell.column, lattice->columns - 1);
  self->cell.row = MIN (self->cell.row, lattice->rows - 1);
  self->point.column = MIN (self->point.column, lattice->columns);
  self->point.row = MIN (self->point.row, lattice->rows);
  if (!kh_lattice_has_edge (lattice, self->edge))
    {
      self->point = (KhPoint){ 0, 0 };
      self->edge = (KhEdge){ KH_AXIS_X, 0, 0 };
    }
}

/* Moves the paper so that the cursor is seen. */
static void bring_into_view (KhCanvas *self)
{
  KhBox box;
  double dx = 0, dy = 0, keep = 24;
  kh_canvas_get_cursor_box (self, &box);
  if (box.x0 < keep)
    dx = keep - box.x0;
  else if (box.x1 > self->view.width - keep)
    dx = self->view.width - keep - box.x1;
  if (box.y0 < keep)
    dy = keep - box.y0;
  else if (box.y1 > self->view.height - keep)
    dy = self->view.height - keep - box.y1;
  if (dx == 0 && dy == 0)
    return;
  if (!self->fitted)
    {
      self->view.origin_x += (int)dx;
      self->view.origin_y += (int)dy;
      kh_canvas_drop_layers (self);
    }
}

static void after_move (KhCanvas *self)
{
  self->has_menu_place = FALSE;
  gtk_widget_grab_focus (self->cursor);
  if (GTK_IS_WINDOW (gtk_widget_get_root (GTK_WIDGET (self))))
    gtk_window_set_focus_visible (GTK_WINDOW (gtk_widget_get_root (GTK_WIDGET (self))), TRUE);
  bring_into_view (self);
  kh_canvas_name_cursor (self);
  gtk_widget_queue_allocate (GTK_WIDGET (self));
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

typedef enum
{
  MOVE_ONLY,
  MOVE_LAY,
  MOVE_TAKE_AWAY
} MoveKind;

static void move_on_edges (KhCanvas *self, int columns, int rows, MoveKind kind)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  KhPoint to = { self->point.column + columns, self->point.row + rows };
  if (!kh_lattice_has_point (&plan->lattice, to))
    return;
  self->edge = (KhEdge){ columns != 0 ? KH_AXIS_X : KH_AXIS_Y, MIN (self->point.column, to.column),
                         MIN (self->point.row, to.row) };
  self->point = to;
  if (kind != MOVE_ONLY)
    kh_canvas_take_edit (self, kh_edit_walls (plan, &self->edge, 1, kind == MOVE_LAY));
}

static void move_on_cells (KhCanvas *self, int columns, int rows, MoveKind kind)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  KhCell to = { self->cell.column + columns, self->cell.row + rows };
  if (!kh_lattice_has_cell (&plan->lattice, to))
    return;
  self->cell = to;
  if (self->tool == KH_TOOL_FLOOR && kind != MOVE_ONLY)
    kh_canvas_take_edit (self, kh_edit_floor (plan, (KhCellBlock){ to.column, to.row, 1, 1 }, kind == MOVE_LAY));
}

static gboolean move_cb (GtkWidget *widget, GVariant *args, gpointer data)
{
  KhCanvas *self = KH_CANVAS (widget);
  int columns, rows, kind;
  g_variant_get (args, "(iii)", &columns, &rows, &kind);
  if (self->session == NULL || self->gesturing)
    return GDK_EVENT_STOP;
  if (on_edges (self))
    move_on_edges (self, columns, rows, (MoveKind)kind);
  else
    move_on_cells (self, columns, rows, (MoveKind)kind);
  after_move (self);
  return GDK_EVENT_STOP;
}

/* Enter does what a click there does. */
static gboolean act_cb (GtkWidget *widget, GVariant *args, gpointer data)
{
  KhCanvas *self = KH_CANVAS (widget);
  const KhPlan *plan = kh_session_get_plan (self->session);
  KhVec at = on_edges (self) ? kh_edge_middle_mm (plan, self->edge) : kh_cell_middle_mm (plan, self->cell);
  KhGesture gesture = { .from = at, .to = at };
  kh_canvas_take_edit (self, kh_tool_get (self->tool)->make (plan, &gesture));
  after_move (self);
  return GDK_EVENT_STOP;
}

static gboolean cancel_cb (GtkWidget *widget, GVariant *args, gpointer data)
{
  KhCanvas *self = KH_CANVAS (widget);
  if (!self->gesturing && !self->panning)
    return GDK_EVENT_PROPAGATE;
  kh_canvas_cancel (self);
  return GDK_EVENT_STOP;
}

static gboolean menu_cb (GtkWidget *widget, GVariant *args, gpointer data)
{
  KhCanvas *self = KH_CANVAS (widget);
  const KhPlan *plan = kh_session_get_plan (self->session);
  KhBox box;
  KhCell cell = self->cell;
  KhEdge edge = self->edge;
  kh_canvas_get_cursor_box (self, &box);
  if (on_edges (self))
    {
      KhCell sides[2];
      kh_edge_get_cells (edge, sides);
      cell = kh_lattice_has_cell (&plan->lattice, sides[0]) ? sides[0] : sides[1];
    }
  else
    edge = kh_cell_edge (cell, KH_HEADING_NORTH);
  kh_canvas_place_menu (self, (box.x0 + box.x1) / 2, (box.y0 + box.y1) / 2, edge, cell);
  return GDK_EVENT_STOP;
}

static gboolean tool_cb (GtkWidget *widget, GVariant *args, gpointer data)
{
  kh_canvas_wish_tool (KH_CANVAS (widget), g_variant_get_string (args, NULL));
  return GDK_EVENT_STOP;
}

static gboolean zoom_cb (GtkWidget *widget, GVariant *args, gpointer data)
{
  double factor = g_variant_get_double (args);
  if (factor > 0)
    kh_canvas_zoom (KH_CANVAS (widget), factor);
  else
    kh_canvas_fit (KH_CANVAS (widget));
  return GDK_EVENT_STOP;
}

void kh_canvas_class_init_cursor (GtkWidgetClass *class)
{
  static const struct
  {
    guint keys[2];
    int columns, rows;
  } arrows[] = {
    { { GDK_KEY_Left, GDK_KEY_KP_Left }, -1, 0 },
    { { GDK_KEY_Right, GDK_KEY_KP_Right }, 1, 0 },
    { { GDK_KEY_Up, GDK_KEY_KP_Up }, 0, 1 },
    { { GDK_KEY_Down, GDK_KEY_KP_Down }, 0, -1 },
  };
  static const GdkModifierType kinds[] = { 0, GDK_SHIFT_MASK, GDK_ALT_MASK }; /* by MoveKind */
  static const struct
  {
    guint key;
    double factor; /* 0: fit */
  } zooms[] = {
    { GDK_KEY_plus, 1.2 },      { GDK_KEY_equal, 1.2 },           { GDK_KEY_KP_Add, 1.2 },
    { GDK_KEY_minus, 1 / 1.2 }, { GDK_KEY_KP_Subtract, 1 / 1.2 }, { GDK_KEY_0, 0 },
    { GDK_KEY_KP_0, 0 },
  };
  for (gsize i = 0; i < G_N_ELEMENTS (arrows); i++)
    for (int k = 0; k < 2; k++)
      for (int m = 0; m < 3; m++)
        gtk_widget_class_add_binding (class, arrows[i].keys[k], kinds[m], move_cb, "(iii)", arrows[i].columns,
                                      arrows[i].rows, m);
  for (gsize i = 0; i < G_N_ELEMENTS (zooms); i++)
    gtk_widget_class_add_binding (class, zooms[i].key, 0, zoom_cb, "d", zooms[i].factor);
  for (int i = 0; i < KH_N_TOOLS; i++)
    gtk_widget_class_add_binding (class, gdk_keyval_from_name (kh_tool_get ((KhToolId)i)->key), 0, tool_cb, "s",
                                  kh_tool_get ((KhToolId)i)->name);
  gtk_widget_class_add_binding (class, GDK_KEY_Return, 0, act_cb, NULL);
  gtk_widget_class_add_binding (class, GDK_KEY_KP_Enter, 0, act_cb, NULL);
  gtk_widget_class_add_binding (class, GDK_KEY_ISO_Enter, 0, act_cb, NULL);
  gtk_widget_class_add_binding (class, GDK_KEY_Escape, 0, cancel_cb, NULL);
  gtk_widget_class_add_binding (class, GDK_KEY_Menu, 0, menu_cb, NULL);
  gtk_widget_class_add_binding (class, GDK_KEY_F10, GDK_SHIFT_MASK, menu_cb, NULL);
}

static void focus_changed_cb (KhCanvas *self)
{
  kh_canvas_name_cursor (self);
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

void kh_canvas_init_cursor (KhCanvas *self)
{
  self->cursor = g_object_new (KH_TYPE_LATTICE_CURSOR, NULL);
  gtk_widget_set_parent (self->cursor, GTK_WIDGET (self));
  g_signal_connect_swapped (self->cursor, "notify::has-focus", G_CALLBACK (focus_changed_cb), self);
}
