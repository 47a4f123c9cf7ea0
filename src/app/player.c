/* SPDX-License-Identifier: MIT */
#include "app/player.h"

typedef struct
{
  KhSession *session;
  guint callback;
  gint64 last_us;  /* frame time of the last step */
  double moment_s; /* the played moment, finer than a tick */
  gsize set_tick;  /* as the player left it: moved by others, it starts from there */
} Player;

static gboolean tick_cb (GtkWidget *widget, GdkFrameClock *clock, gpointer data)
{
  Player *player = data;
  const KhTrace *trace = kh_session_get_trace (player->session);
  gint64 now_us = gdk_frame_clock_get_frame_time (clock);
  if (!trace)
    {
      player->callback = 0;
      return G_SOURCE_REMOVE;
    }
  gsize tick = kh_session_get_played_tick (player->session), last = kh_trace_get_n_ticks (trace) - 1;
  if (tick != player->set_tick)
    player->moment_s = (double)tick * trace->tick_s;
  player->moment_s += (double)(now_us - player->last_us) * 1e-6 * kh_session_get_speed (player->session);
  player->last_us = now_us;
  player->set_tick = MIN ((gsize)(player->moment_s / trace->tick_s), last);
  kh_session_set_played_tick (player->session, player->set_tick);
  if (player->set_tick >= last)
    kh_session_set_playing (player->session, FALSE); /* takes this callback away, too */
  return G_SOURCE_CONTINUE;
}

static void follow (GtkWidget *widget)
{
  Player *player = g_object_get_data (G_OBJECT (widget), "kh-player");
  gboolean playing = kh_session_get_playing (player->session);
  if (playing && player->callback == 0)
    {
      GdkFrameClock *clock = gtk_widget_get_frame_clock (widget);
      player->last_us = clock ? gdk_frame_clock_get_frame_time (clock) : g_get_monotonic_time ();
      player->set_tick = G_MAXSIZE;
      player->callback = gtk_widget_add_tick_callback (widget, tick_cb, player, NULL);
    }
  else if (!playing && player->callback != 0)
    {
      gtk_widget_remove_tick_callback (widget, player->callback);
      player->callback = 0;
    }
}

static void player_free (gpointer data)
{
  Player *player = data;
  g_object_unref (player->session);
  g_free (player);
}

void kh_player_attach (GtkWidget *widget, KhSession *session)
{
  Player *player = g_new0 (Player, 1);
  player->session = g_object_ref (session);
  g_object_set_data_full (G_OBJECT (widget), "kh-player", player, player_free);
  g_signal_connect_object (session, "player-changed", G_CALLBACK (follow), widget, G_CONNECT_SWAPPED);
}
