/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>
#include "app/session.h"

/* The cut list as a table that can be sorted; the chosen row is the session's lit row. */
GtkWidget *kh_cut_list_view_new (KhSession *session);
