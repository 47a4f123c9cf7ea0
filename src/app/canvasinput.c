/* SPDX-License-Identifier: MIT */
#include "app/canvasprivate.h"

#include "app/words.h"
#include <glib/gi18n-lib.h>
#include <math.h>

/* Pointer, touch and wheel.  A drag is one gesture and at most one edit; what
 * it would do is drawn until the button is let go; Escape leaves it. */

#define DRAG_THRESHOLD 5 /* px; less is a click */

static void point_at (KhCanvas *self, double x, double y)
{
  self->pointer_in = TRUE;
  self->pointer_x = x - KH_RULER_LEFT;
  self->pointer_y = y - KH_RULER_TOP;
}

/* "D3 · 634 mm east, 452 mm north of the datum", or the edge where a tool works on edges. */
static void describe_pointer (KhCanvas *self)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  KhVec mm = kh_canvas_pointer_mm (self);
  KhEdge edge;
  KhCell cell;
  g_autofree char *place = NULL;
  if (kh_tool_get (self->tool)->on_edges && kh_place_get_edge (plan, mm, 0.2, &edge))
    place = kh_words_dup_edge_state (plan, edge);
  else if (kh_place_get_cell (plan, mm, &cell))
    place = kh_cell_dup_name (cell);
  else
    place = g_strdup (_ ("outside"));
  g_autofree char *east = kh_length_dup_text ((int64_t)round (mm.x) * KH_NM_PER_MM, self->unit, TRUE);
  g_autofree char *north = kh_length_dup_text ((int64_t)round (mm.y) * KH_NM_PER_MM, self->unit, TRUE);
  /* Translators: what is under the pointer, then its distances from the datum */
  kh_canvas_say_pointed (self,
                         g_strdup_printf (_ ("Pointer: %s · %s east, %s north of the datum"), place, east, north));
}

static void motion_cb (GtkEventControllerMotion *motion, double x, double y, KhCanvas *self)
{
  if (self->session == NULL)
    return;
  /* the toolkit tells the place again after each layout: no movement */
  if (self->pointer_in && x == self->pointer_x + KH_RULER_LEFT && y == self->pointer_y + KH_RULER_TOP)
    return;
  point_at (self, x, y);
  describe_pointer (self);
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

static void leave_cb (GtkEventControllerMotion *motion, KhCanvas *self)
{
  self->pointer_in = FALSE;
  kh_canvas_say_pointed (self, g_strdup (""));
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

/* ---- zoom ---- */

static gboolean scroll_cb (GtkEventControllerScroll *scroll, double dx, double dy, KhCanvas *self)
{
  GdkModifierType state = gtk_event_controller_get_current_event_state (GTK_EVENT_CONTROLLER (scroll));
  gboolean fingers = gtk_event_controller_scroll_get_unit (scroll) == GDK_SCROLL_UNIT_SURFACE;
  if (fingers && !(state & GDK_CONTROL_MASK))
    {
      /* two fingers on a touchpad move the paper; pinching zooms */
      self->view.origin_x -= round (dx);
      self->view.origin_y -= round (dy);
      self->fitted = FALSE;
      kh_canvas_drop_layers (self);
    }
  else if (dy != 0)
    kh_canvas_zoom (self, pow (fingers ? 1.005 : 1.2, -dy));
  return GDK_EVENT_STOP;
}

static void pinch_begin_cb (GtkGesture *pinch, GdkEventSequence *sequence, KhCanvas *self)
{
  self->pinch_scale = 1;
  gtk_gesture_set_state (pinch, GTK_EVENT_SEQUENCE_CLAIMED);
}

static void pinch_cb (GtkGestureZoom *pinch, double scale, KhCanvas *self)
{
  double x, y;
  if (!gtk_gesture_get_bounding_box_center (GTK_GESTURE (pinch), &x, &y) || scale <= 0)
    return;
  kh_canvas_zoom_at (self, x - KH_RULER_LEFT, y - KH_RULER_TOP, scale / self->pinch_scale);
  self->pinch_scale = scale;
}

/* ---- drags and clicks ---- */

static void end_gesture (KhCanvas *self)
{
  self->gesturing = self->panning = FALSE;
  gtk_widget_set_cursor_from_name (GTK_WIDGET (self), NULL);
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

static void leave_gesture (KhCanvas *self)
{
  if (self->panning)
    {
      self->view.origin_x = self->pan_x;
      self->view.origin_y = self->pan_y;
      kh_canvas_drop_layers (self);
    }
  if (self->gesturing || self->panning)
    end_gesture (self);
}

void kh_canvas_cancel (KhCanvas *self)
{
  if (!self->gesturing && !self->panning)
    return;
  leave_gesture (self);
  gtk_event_controller_reset (GTK_EVENT_CONTROLLER (self->drag));
}

static void drag_begin_cb (GtkGestureDrag *drag, double x, double y, KhCanvas *self)
{
  guint button = gtk_gesture_single_get_current_button (GTK_GESTURE_SINGLE (drag));
  if (self->session == NULL || x < KH_RULER_LEFT || y < KH_RULER_TOP || button > 3)
    {
      gtk_gesture_set_state (GTK_GESTURE (drag), GTK_EVENT_SEQUENCE_DENIED);
      return;
    }
  gtk_gesture_set_state (GTK_GESTURE (drag), GTK_EVENT_SEQUENCE_CLAIMED);
  kh_canvas_grab_cursor (self);
  point_at (self, x, y);
  self->has_menu_place = FALSE;
  if (button == GDK_BUTTON_MIDDLE || self->space_down)
    {
      self->panning = TRUE;
      self->pan_x = self->view.origin_x;
      self->pan_y = self->view.origin_y;
      gtk_widget_set_cursor_from_name (GTK_WIDGET (self), "grabbing");
      return;
    }
  self->gesturing = TRUE;
  self->gesture.from = self->gesture.to = kh_canvas_pointer_mm (self);
  self->gesture.dragged = FALSE;
  self->gesture.take_away = button == GDK_BUTTON_SECONDARY || (self->take_away && self->tool == KH_TOOL_WALLS);
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

static void drag_update_cb (GtkGestureDrag *drag, double dx, double dy, KhCanvas *self)
{
  double x, y;
  gtk_gesture_drag_get_start_point (drag, &x, &y);
  point_at (self, x + dx, y + dy);
  if (self->panning)
    {
      self->view.origin_x = self->pan_x + round (dx);
      self->view.origin_y = self->pan_y + round (dy);
      self->fitted = FALSE;
      kh_canvas_drop_layers (self);
    }
  else if (self->gesturing)
    {
      self->gesture.to = kh_canvas_pointer_mm (self);
      if (hypot (dx, dy) > DRAG_THRESHOLD)
        self->gesture.dragged = TRUE;
      describe_pointer (self);
      gtk_widget_queue_draw (GTK_WIDGET (self));
    }
}

static void open_menu_at_pointer (KhCanvas *self)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  KhVec mm = kh_canvas_pointer_mm (self);
  KhEdge edge;
  KhCell cell;
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  KhVec in = { CLAMP (mm.x, 1, plan->lattice.columns * pitch - 1), CLAMP (mm.y, 1, plan->lattice.rows * pitch - 1) };
  if (!kh_place_get_edge (plan, in, 0.5, &edge) || !kh_place_get_cell (plan, in, &cell))
    return;
  kh_canvas_place_menu (self, self->pointer_x, self->pointer_y, edge, cell);
}

static void drag_end_cb (GtkGestureDrag *drag, double dx, double dy, KhCanvas *self)
{
  guint button = gtk_gesture_single_get_current_button (GTK_GESTURE_SINGLE (drag));
  gboolean gesturing = self->gesturing;
  KhGesture gesture = self->gesture;
  drag_update_cb (drag, dx, dy, self);
  gesture = self->gesture;
  if (!gesture.dragged)
    gesture.to = gesture.from; /* the hand's tremble is no drag */
  end_gesture (self);
  if (!gesturing)
    return;
  if (button == GDK_BUTTON_SECONDARY && !gesture.dragged)
    open_menu_at_pointer (self);
  else
    kh_canvas_take_edit (self, kh_tool_get (self->tool)->make (kh_session_get_plan (self->session), &gesture));
}

static void drag_cancel_cb (GtkGesture *drag, GdkEventSequence *sequence, KhCanvas *self)
{
  leave_gesture (self); /* the toolkit is resetting the gesture already */
}

static void long_press_cb (GtkGestureLongPress *press, double x, double y, KhCanvas *self)
{
  kh_canvas_cancel (self);
  point_at (self, x, y);
  open_menu_at_pointer (self);
}

/* ---- space held down moves the paper ---- */

static gboolean key_pressed_cb (GtkEventControllerKey *keys, guint keyval, guint keycode, GdkModifierType state,
                                KhCanvas *self)
{
  if (keyval != GDK_KEY_space || self->gesturing)
    return GDK_EVENT_PROPAGATE;
  if (!self->space_down)
    {
      self->space_down = TRUE;
      gtk_widget_set_cursor_from_name (GTK_WIDGET (self), "grab");
      gtk_widget_queue_draw (GTK_WIDGET (self));
    }
  return GDK_EVENT_STOP;
}

static void release_space (KhCanvas *self)
{
  if (!self->space_down)
    return;
  self->space_down = FALSE;
  gtk_widget_set_cursor_from_name (GTK_WIDGET (self), NULL);
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

static void key_released_cb (GtkEventControllerKey *keys, guint keyval, guint keycode, GdkModifierType state,
                             KhCanvas *self)
{
  if (keyval == GDK_KEY_space)
    release_space (self);
}

static void focus_left_cb (GtkEventControllerFocus *focus, KhCanvas *self)
{
  release_space (self);
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

static void focus_entered_cb (GtkEventControllerFocus *focus, KhCanvas *self)
{
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

void kh_canvas_init_input (KhCanvas *self)
{
  GtkWidget *widget = GTK_WIDGET (self);
  GtkEventController *motion = gtk_event_controller_motion_new ();
  g_signal_connect (motion, "enter", G_CALLBACK (motion_cb), self);
  g_signal_connect (motion, "motion", G_CALLBACK (motion_cb), self);
  g_signal_connect (motion, "leave", G_CALLBACK (leave_cb), self);
  gtk_widget_add_controller (widget, motion);

  GtkEventController *scroll = gtk_event_controller_scroll_new (GTK_EVENT_CONTROLLER_SCROLL_BOTH_AXES);
  g_signal_connect (scroll, "scroll", G_CALLBACK (scroll_cb), self);
  gtk_widget_add_controller (widget, scroll);

  GtkGesture *pinch = gtk_gesture_zoom_new ();
  g_signal_connect (pinch, "begin", G_CALLBACK (pinch_begin_cb), self);
  g_signal_connect (pinch, "scale-changed", G_CALLBACK (pinch_cb), self);
  gtk_widget_add_controller (widget, GTK_EVENT_CONTROLLER (pinch));

  self->drag = gtk_gesture_drag_new ();
  gtk_gesture_single_set_button (GTK_GESTURE_SINGLE (self->drag), 0);
  g_signal_connect (self->drag, "drag-begin", G_CALLBACK (drag_begin_cb), self);
  g_signal_connect (self->drag, "drag-update", G_CALLBACK (drag_update_cb), self);
  g_signal_connect (self->drag, "drag-end", G_CALLBACK (drag_end_cb), self);
  g_signal_connect (self->drag, "cancel", G_CALLBACK (drag_cancel_cb), self);
  gtk_widget_add_controller (widget, GTK_EVENT_CONTROLLER (self->drag));

  GtkGesture *press = gtk_gesture_long_press_new ();
  gtk_gesture_single_set_touch_only (GTK_GESTURE_SINGLE (press), TRUE);
  g_signal_connect (press, "pressed", G_CALLBACK (long_press_cb), self);
  gtk_widget_add_controller (widget, GTK_EVENT_CONTROLLER (press));

  GtkEventController *keys = gtk_event_controller_key_new ();
  g_signal_connect (keys, "key-pressed", G_CALLBACK (key_pressed_cb), self);
  g_signal_connect (keys, "key-released", G_CALLBACK (key_released_cb), self);
  gtk_widget_add_controller (widget, keys);

  GtkEventController *focus = gtk_event_controller_focus_new ();
  g_signal_connect (focus, "leave", G_CALLBACK (focus_left_cb), self);
  g_signal_connect (focus, "enter", G_CALLBACK (focus_entered_cb), self);
  gtk_widget_add_controller (widget, focus);
}
