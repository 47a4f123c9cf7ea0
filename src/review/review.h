/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/job.h"
#include "layout/findings.h"
#include "layout/measures.h"
#include "panels/cutlist.h"
#include "robot/run.h"

/* One call: layout, a run, panels -> one numbered list of findings.  In two
 * parts, so that a window can show the first within a frame. */

typedef struct
{
  gboolean with_panels; /* cut list and saw plan */
  gboolean with_run;    /* one run a hand asked for */
  gboolean both_hands;
  KhRunSettings run;
} KhReviewSettings;

typedef struct
{
  KhLayout *layout;
  gboolean has_walks;
  KhHandWalk walks[2];   /* by KhHand */
  KhMeasures measures;
  KhTrace *traces[2];    /* by KhHand; NULL: not run */
  char *run_fault;       /* why there is no run, where one was asked for; NULL */
  KhCutList *cut_list;   /* NULL: not made */
  KhSawOrder *saw_order; /* NULL: not made */
  KhSawPlan *saw_plan;   /* NULL: not made, or nothing to saw */
  char *panels_fault;    /* why there is no cut list; NULL */
  GPtrArray *findings;   /* of KhFinding: numbered by severity, then place; those set aside last, not numbered */
  GPtrArray *sound;      /* of char *: looked at and found sound */
  int n_by_severity[3];  /* without those set aside */
  int n_set_aside;
} KhReview;

void kh_review_settings_init (KhReviewSettings *settings, const KhPlan *plan); /* layout only, the plan's hand */
/* Stopped through 'job': what was done so far. */
KhReview *kh_review_new (const KhPlan *plan, const KhReviewSettings *settings, KhJob *job);
void kh_review_free (KhReview *review);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhReview, kh_review_free)
/* "1 island · right hand arrives in 34 steps": the line in the status bar. Owned. */
char *kh_review_dup_verdict (const KhReview *review, const KhPlan *plan);
