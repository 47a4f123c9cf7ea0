/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>
#include "app/session.h"

/* One window with one plan.  Its commands, all in its action map, for pages,
 * strips, menus, tests and the accessibility bus alike:
 *
 *   new, open, open-recent (s: path), save, save-as, close, print,
 *   export-plan, export-cut-list
 *   undo, redo, preview (toggle)
 *   tool (s: walls, floor, mark, start, opening), walls-mode (s: lay, away)
 *   place-wall (b: lay), place-opening (s: entrance, exit, plain, closed),
 *   place-start (s: north, ..., away), place-mark (b), place-floor (b): at the
 *   place the canvas's menu was opened for, else at the lattice cursor
 *   bench (s: findings, robot, panels, maze), strip (toggle)
 *   zoom-in, zoom-out, zoom-fit
 *   next-finding, previous-finding, show-finding (i: index): choose and show
 *   next-region, previous-region: the focus goes round the window */

#define KH_TYPE_WINDOW (kh_window_get_type ())
G_DECLARE_FINAL_TYPE (KhWindow, kh_window, KH, WINDOW, GtkApplicationWindow)

KhWindow *kh_window_new_take (GtkApplication *app, KhSession *session);
KhSession *kh_window_get_session (KhWindow *self);
void kh_window_set_session_take (KhWindow *self, KhSession *session); /* the one before is let go */
gboolean kh_window_is_untouched (KhWindow *self); /* may be used for another plan without asking */
/* Says that the plan was brought back after a crash, with a way to the saved one. */
void kh_window_say_recovered (KhWindow *self);
void kh_window_save_recovery (KhWindow *self); /* now, whatever is unsaved */
GtkWidget *kh_window_get_canvas (KhWindow *self); /* borrowed; a KhCanvas */
void kh_window_update (KhWindow *self);        /* units changed */
/* A message that must be read: what happened, and the details (may be NULL, may be long). */
void kh_window_tell (GtkWindow *parent, const char *heading, const char *detail);
