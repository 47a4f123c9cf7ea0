/* SPDX-License-Identifier: MIT */
#include "robot/trace.h"
#include <glib/gi18n-lib.h>
#include <math.h>
#include <string.h>

void kh_trace_free (KhTrace *trace)
{
  if (!trace)
    return;
  g_array_unref (trace->ticks);
  g_array_unref (trace->events);
  g_array_unref (trace->cells);
  g_free (trace->why);
  g_free (trace);
}

const KhTick *kh_trace_get_tick (const KhTrace *trace, gsize index)
{
  return &g_array_index (trace->ticks, KhTick, MIN (index, trace->ticks->len - 1));
}

gsize kh_trace_get_n_ticks (const KhTrace *trace) { return trace->ticks->len; }

gsize kh_trace_find_time (const KhTrace *trace, double time_s)
{
  double tick = floor (time_s / trace->tick_s + 0.5);
  return (gsize)CLAMP (tick, 0.0, (double)(trace->ticks->len - 1));
}

gsize kh_trace_find_distance (const KhTrace *trace, double distance_mm)
{
  gsize low = 0, high = trace->ticks->len - 1;
  while (low < high)
    {
      gsize middle = low + (high - low) / 2;
      if ((double)kh_trace_get_tick (trace, middle)->distance_mm < distance_mm)
        low = middle + 1;
      else
        high = middle;
    }
  return low;
}

const char *kh_state_get_name (KhState state)
{
  static const char *const names[] = { "follow", "lead_in", "curve", "pivot", "searching", "stopped" };
  return names[state];
}

const char *kh_state_get_words (KhState state)
{
  static const char *const words[]
      = { N_ ("follow"), N_ ("wall lost"), N_ ("curve"), N_ ("turn"), N_ ("searching"), N_ ("stop") };
  return _ (words[state]);
}

const char *kh_outcome_get_name (KhOutcome outcome)
{
  static const char *const names[] = { "arrived", "contact", "lost", "circles", "left", "time" };
  return names[outcome];
}

/* FNV-1a (Fowler, Noll, Vo), a byte at a time. */
static guint64 hash_bytes (guint64 hash, const void *bytes, gsize n)
{
  const guint8 *b = bytes;
  for (gsize i = 0; i < n; i++)
    hash = (hash ^ b[i]) * G_GUINT64_CONSTANT (0x100000001b3);
  return hash;
}

guint64 kh_trace_hash (const KhTrace *trace)
{
  guint64 hash = G_GUINT64_CONSTANT (0xcbf29ce484222325);
  for (guint i = 0; i < trace->ticks->len; i++)
    {
      const KhTick *tick = &g_array_index (trace->ticks, KhTick, i);
      const double pose[3] = { tick->x, tick->y, tick->heading_rad };
      hash = hash_bytes (hash, pose, sizeof pose);
      hash = hash_bytes (hash, &tick->state, 1);
    }
  return hash;
}
