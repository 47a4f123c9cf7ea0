/* SPDX-License-Identifier: MIT */
#pragma once
#include "draw/palette.h"

/* Light, dark, or as the desktop says.  GTK does not follow the desktop's
 * preference itself: the settings portal (org.freedesktop.appearance,
 * color-scheme) is asked asynchronously, and its changes are followed.
 *
 * Widgets that draw ask kh_scheme_get () and redraw on the GtkSettings
 * property gtk-application-prefer-dark-theme. */

void kh_scheme_start (void);                 /* once, with a display */
void kh_scheme_choose (const char *name);    /* "follow", "light", "dark" */
KhScheme kh_scheme_get (void);
gboolean kh_scheme_is_high_contrast (void);
