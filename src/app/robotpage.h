/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>
#include "app/session.h"

/* The Robot page of the bench. Keeps a reference to the session. */
GtkWidget *kh_robot_page_new (KhSession *session);
