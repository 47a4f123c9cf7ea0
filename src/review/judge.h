/* SPDX-License-Identifier: MIT */
#pragma once
#include "review/review.h"

/* Findings that come from robot, runs and panels: appended to the review's,
 * what is sound to its sound ones. Each looks only at what the review holds. */
void kh_judge_robot (KhReview *review, const KhPlan *plan); /* told before any run */
void kh_judge_runs (KhReview *review, const KhPlan *plan, KhHand hand);
void kh_judge_panels (KhReview *review, const KhPlan *plan);
