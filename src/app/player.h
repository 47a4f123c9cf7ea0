/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>
#include "app/session.h"

/* Moves the session's played moment while it plays: a tick callback on 'widget'
 * that is there only then, so that nothing costs when nothing plays. */
void kh_player_attach (GtkWidget *widget, KhSession *session);
