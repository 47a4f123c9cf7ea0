/* SPDX-License-Identifier: MIT */
#pragma once
#include "../cmocka_all.h"

#include "app/application.h"
#include "app/canvas.h"

/* Drives the real window: pointer and keys go the long way, through the X
 * server (xdotool), and come back as events; what they did is asked of the
 * session.  Run through in-x.sh. */

KhApplication *kt_start (void);             /* with the first example; its window stands and has the focus */
void kt_stop (KhApplication *app);
KhWindow *kt_window (KhApplication *app);   /* the first one */
void kt_settle (int ms);                    /* the main loop runs this long, and on until nothing is pending */
typedef gboolean (*KtTest) (gpointer data);
gboolean kt_wait (KtTest test, gpointer data, int most_ms);

void kt_x (const char *arguments);          /* xdotool with these, split at spaces */
void kt_keys (const char *keys);            /* "ctrl+z", several separated by spaces */
void kt_point (KhWindow *window, double x_mm, double y_mm);
void kt_click (KhWindow *window, double x_mm, double y_mm, int button);
void kt_drag (KhWindow *window, double x0_mm, double y0_mm, double x1_mm, double y1_mm, int button);
void kt_focus_window (const char *title);   /* no window manager: the focus is given by hand */
void kt_picture (const char *name);         /* of the whole screen, into $TEST_PICTURES, where that is set */
