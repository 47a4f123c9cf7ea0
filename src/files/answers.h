/* SPDX-License-Identifier: MIT */
#pragma once
#include "review/review.h"

/* The JSON answers of the command line, one object each, ending in a newline. Owned. */
char *kh_answer_dup_check (const KhPlan *plan, const KhReview *review, const char *file);
char *kh_answer_dup_faults (const char *file, const GPtrArray *faults);
char *kh_answer_dup_many (const GPtrArray *answers); /* of char *, as made by the two above */
char *kh_answer_dup_follow (const KhPlan *plan, const KhTrace *trace);
char *kh_answer_dup_cutlist (const KhPlan *plan, const KhCutList *list, const KhSawPlan *saw_plan);
char *kh_answer_dup_saw (const KhSawOrder *order, const KhSawPlan *plan);
