/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>
#include "app/window.h"

/* The program: its windows, what it opens when, the commands that belong to
 * no window (app.quit, about, help, example, units, scheme), and what happens
 * when it is killed. */

#define KH_TYPE_APPLICATION (kh_application_get_type ())
G_DECLARE_FINAL_TYPE (KhApplication, kh_application, KH, APPLICATION, GtkApplication)

KhApplication *kh_application_new (void);
/* Read by another thread; shown in 'near' where that window is untouched, else
 * in one of its own; a window that shows this file already comes to the front.
 * Faults are shown, all of them. */
void kh_application_open_path (KhApplication *self, const char *path, KhWindow *near_or_null);
void kh_application_show_session_take (KhWindow *near, KhSession *session);
void kh_application_remember_path (const char *path); /* recent plans, last plan */
void kh_application_stop_quitting (KhApplication *self); /* a window wants to stay */
GMenuModel *kh_application_get_examples (void); /* borrowed */
