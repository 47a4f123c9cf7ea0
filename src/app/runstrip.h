/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>
#include "app/session.h"

/* The strip under the canvas: the run unrolled, with its player. */
GtkWidget *kh_run_strip_new (KhSession *session);
