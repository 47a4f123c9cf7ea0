/* SPDX-License-Identifier: MIT */
#include "app/timing.h"

gboolean kh_timing_is_on (void)
{
  static int on = -1;
  if (on < 0)
    on = !g_log_writer_default_would_drop (G_LOG_LEVEL_DEBUG, KH_TIMING_DOMAIN);
  return on;
}

void kh_timing_say (const char *what, gint64 since_us)
{
  if (kh_timing_is_on ())
    g_log (KH_TIMING_DOMAIN, G_LOG_LEVEL_DEBUG, "%s %.2f ms", what,
           (double)(g_get_monotonic_time () - since_us) / 1000);
}

static void before_paint_cb (GdkFrameClock *clock, gint64 *began) { *began = g_get_monotonic_time (); }

static void after_paint_cb (GdkFrameClock *clock, gint64 *began)
{
  if (*began != 0)
    kh_timing_say ("frame", *began);
  *began = 0;
}

static void realize_cb (GtkWidget *window, gpointer data)
{
  GdkFrameClock *clock = gtk_widget_get_frame_clock (window);
  gint64 *began = g_new0 (gint64, 1);
  g_object_set_data_full (G_OBJECT (clock), "kh-began", began, g_free);
  g_signal_connect (clock, "before-paint", G_CALLBACK (before_paint_cb), began);
  g_signal_connect (clock, "after-paint", G_CALLBACK (after_paint_cb), began);
}

void kh_timing_watch (GtkWidget *window)
{
  if (kh_timing_is_on ())
    g_signal_connect (window, "realize", G_CALLBACK (realize_cb), NULL);
}
