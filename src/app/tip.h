/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>

/* A tooltip whose text changes often.  gtk_widget_set_tooltip_text asks the
 * display server where the pointer is at each call and waits for the answer
 * (GTK 4.8 on X11: some 0.3 ms); this keeps the text until the tip is wanted.
 * Names for assistive technology are set apart from it. */
void kh_tip_set (GtkWidget *widget, const char *text_or_null);
