/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>

/* What frames and edits cost, as debug messages: run with
 * G_MESSAGES_DEBUG=kerfhand-timing.  Costs nothing otherwise.
 *
 *   frame 2.31 ms          before-paint to after-paint of the frame clock
 *   edit 0.42 ms           a change applied, with the layout's findings */

#define KH_TIMING_DOMAIN "kerfhand-timing"

gboolean kh_timing_is_on (void);
void kh_timing_watch (GtkWidget *window); /* before it is realized */
void kh_timing_say (const char *what, gint64 since_us); /* since: g_get_monotonic_time () */
