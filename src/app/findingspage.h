/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>
#include "app/session.h"

/* The Findings page of the bench. Keeps a reference to the session. */
GtkWidget *kh_findings_page_new (KhSession *session);
