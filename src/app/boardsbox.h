/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>
#include "app/session.h"

/* The boards to buy from, and the saw: each number an entry. */
GtkWidget *kh_boards_box_new (KhSession *session);
GtkWidget *kh_saw_box_new (KhSession *session);
