/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/job.h"
#include <glib.h>

/* Inside the saw plan: when to end.  The only place where time comes in; a
 * search that ends before it is the same on every machine. */

typedef struct
{
  gint64 end_us; /* monotonic */
  KhJob *job;
  gboolean is_over;
} KhSawClock;

static inline gboolean kh_saw_clock_is_over (KhSawClock *clock)
{
  if (!clock->is_over)
    clock->is_over = kh_job_is_stopped (clock->job) || g_get_monotonic_time () >= clock->end_us;
  return clock->is_over;
}
