/* SPDX-License-Identifier: MIT */
#pragma once
#include "app/canvas.h"
#include "app/layer.h"
#include "draw/planpicture.h"

/* What the canvas's files share. */

#define KH_RULER_TOP 22
#define KH_RULER_LEFT 24

struct _KhCanvas
{
  GtkWidget parent_instance;

  KhSession *session;
  KhView view;      /* of the part right of and below the rulers */
  int shown_columns, shown_rows; /* what the rulers were drawn for */
  int64_t shown_pitch_nm;
  gboolean fitted;  /* keeps showing all when the size changes */
  KhToolId tool;
  gboolean take_away;
  gboolean with_panels;
  KhLengthUnit unit;

  KhLayer ground, run, rulers;

  /* pointer, in the view's coordinates */
  gboolean pointer_in;
  double pointer_x, pointer_y;
  char *pointed_text;

  /* gesture under way */
  gboolean gesturing, panning, space_down;
  KhGesture gesture;
  GtkGesture *drag;
  double pan_x, pan_y; /* origin of the view when the pan began */
  double pinch_scale;

  /* lattice cursor */
  GtkWidget *cursor;
  KhPoint point;  /* for tools that work on edges */
  KhEdge edge;    /* the one passed last */
  KhCell cell;    /* for tools that work on cells */

  gboolean has_menu_place;
  KhEdge menu_edge;
  KhCell menu_cell;
};

/* canvas.c */
void kh_canvas_drop_layers (KhCanvas *self); /* the view or the plan changed */
KhVec kh_canvas_pointer_mm (KhCanvas *self);
void kh_canvas_say_pointed (KhCanvas *self, char *text_taken);
void kh_canvas_notice (KhCanvas *self, const char *text);
void kh_canvas_place_menu (KhCanvas *self, double x, double y, KhEdge edge, KhCell cell);
void kh_canvas_wish_tool (KhCanvas *self, const char *name);
void kh_canvas_zoom_at (KhCanvas *self, double x, double y, double factor);

/* canvasinput.c */
void kh_canvas_init_input (KhCanvas *self);
void kh_canvas_cancel (KhCanvas *self); /* leaves a gesture without a trace */

/* canvascursor.c */
void kh_canvas_class_init_cursor (GtkWidgetClass *widget_class);
void kh_canvas_init_cursor (KhCanvas *self);
void kh_canvas_clamp_cursor (KhCanvas *self); /* the lattice may be smaller now */
void kh_canvas_name_cursor (KhCanvas *self);
void kh_canvas_draw_cursor (KhCanvas *self, cairo_t *cr);
void kh_canvas_get_cursor_box (KhCanvas *self, KhBox *device);

/* canvasrulers.c */
void kh_canvas_draw_rulers (gpointer canvas, cairo_t *cr, int width, int height);
void kh_canvas_draw_ruler_top_pointer (KhCanvas *self, cairo_t *cr);
void kh_canvas_draw_ruler_left_pointer (KhCanvas *self, cairo_t *cr);
