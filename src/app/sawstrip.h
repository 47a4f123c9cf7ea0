/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>
#include "app/session.h"

/* The strip under the canvas: the saw plan, piece by piece. */
GtkWidget *kh_saw_strip_new (KhSession *session);
