/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>

/* One line of words that changes often: with each movement of the pointer, with
 * each moment played.  A label would have the whole window measured anew each
 * time; this has a size of its own ("least-chars", "natural-chars") and is only
 * drawn again.  What does not fit ends in an ellipsis.  For assistive
 * technology it is a label with these words. */

#define KH_TYPE_READOUT (kh_readout_get_type ())
G_DECLARE_FINAL_TYPE (KhReadout, kh_readout, KH, READOUT, GtkWidget)

GtkWidget *kh_readout_new (int least_chars, int natural_chars, double xalign);
void kh_readout_set_text (KhReadout *self, const char *text);
