/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>
#include "app/session.h"
#include "app/tool.h"
#include "base/units.h"

/* The drawing of the plan that can be worked on: rulers, the plan, the run,
 * the robot at the played moment, and the ghost of what a gesture would do.
 * Keeps its own zoom and pan.  What did not change is kept as a picture.
 *
 * Signals: "pointed" (what is under the pointer or the lattice cursor
 * changed), "notice" (const char *: why an edit could not be made), "menu"
 * (double x, double y: the menu of the place was asked for), "tool-wished"
 * (const char *: a tool's name, by its single letter).
 *
 * The lattice cursor is the only focus stop; its name says where it is and
 * what stands there. */

#define KH_TYPE_CANVAS (kh_canvas_get_type ())
G_DECLARE_FINAL_TYPE (KhCanvas, kh_canvas, KH, CANVAS, GtkWidget)

GtkWidget *kh_canvas_new (void);
void kh_canvas_set_session (KhCanvas *self, KhSession *session);
void kh_canvas_set_tool (KhCanvas *self, KhToolId tool);
void kh_canvas_set_take_away (KhCanvas *self, gboolean take_away); /* the Walls tool's mode */
void kh_canvas_set_unit (KhCanvas *self, KhLengthUnit unit);
void kh_canvas_set_with_panels (KhCanvas *self, gboolean with_panels); /* labels of panels instead of trail and robot */

void kh_canvas_fit (KhCanvas *self);
void kh_canvas_zoom (KhCanvas *self, double factor); /* about the pointer, else the middle */
void kh_canvas_show_finding (KhCanvas *self, int index);

/* Where the menu was opened, else the lattice cursor. */
void kh_canvas_get_place (KhCanvas *self, KhEdge *edge, KhCell *cell);
void kh_canvas_take_edit (KhCanvas *self, KhEdit *edit); /* NULL is taken, too: nothing to do */
const char *kh_canvas_get_pointed_text (KhCanvas *self); /* for the status bar; borrowed */
/* Where a place of the plan is seen, in the canvas's own coordinates. */
void kh_canvas_locate (KhCanvas *self, KhVec mm, double *x, double *y);
void kh_canvas_grab_cursor (KhCanvas *self); /* focus to the lattice cursor */
