/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include <stdint.h>
#include <stdatomic.h>

/* The rope between long work and who waits for it: progress comes out, a wish
 * to stop goes in.  Both ends may be on different threads.  All functions take
 * NULL for "nobody waits". */

typedef struct
{
  _Atomic (uint32_t) stop;     /* not 0: end soon, keep what is done */
  _Atomic (uint32_t) permille; /* 0 to 1000 */
} KhJob;

void kh_job_init (KhJob *job);
void kh_job_stop (KhJob *job);
gboolean kh_job_is_stopped (const KhJob *job);
void kh_job_set_progress (KhJob *job, double share); /* 0 to 1 */
double kh_job_get_progress (const KhJob *job);
