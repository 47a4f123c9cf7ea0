/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/job.h"
#include "plan/solids.h"
#include "robot/trace.h"

/* One run: the follower of plan->robot driven through the walls until it ends. */

typedef struct
{
  KhHand hand;
  gboolean exact;  /* every member of 'errors' taken as 0, the steps too */
  guint64 seed, trial; /* which errors are drawn */
} KhRunSettings;

void kh_run_settings_init (KhRunSettings *settings, const KhPlan *plan); /* the plan's hand, exact, seed 1, trial 0 */

#define KH_RUN_ERROR (kh_run_error_quark ())
GQuark kh_run_error_quark (void);
typedef enum { KH_RUN_ERROR_NO_START, KH_RUN_ERROR_ROBOT, KH_RUN_ERROR_STOPPED } KhRunError;

/* NULL with *error set: no start on floor, a robot that kh_robot_check refuses,
 * or stopped through 'job'.  Cost: ticks; at 16 x 16 some 27 000. */
KhTrace *kh_run (const KhPlan *plan, const KhSolids *solids, const KhRunSettings *settings, KhJob *job, GError **error);
