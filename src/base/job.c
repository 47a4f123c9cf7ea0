/* SPDX-License-Identifier: MIT */
#include "base/job.h"

#define PERMILLE 1000.0

void kh_job_init (KhJob *job)
{
  atomic_store (&job->stop, 0);
  atomic_store (&job->permille, 0);
}

void kh_job_stop (KhJob *job)
{
  if (job)
    atomic_store (&job->stop, 1);
}

gboolean kh_job_is_stopped (const KhJob *job) { return job && atomic_load (&job->stop) != 0; }

void kh_job_set_progress (KhJob *job, double share)
{
  if (job)
    atomic_store (&job->permille, (uint32_t)(CLAMP (share, 0.0, 1.0) * PERMILLE));
}

double kh_job_get_progress (const KhJob *job) { return job ? atomic_load (&job->permille) / PERMILLE : 0.0; }
