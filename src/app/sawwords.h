/* SPDX-License-Identifier: MIT */
#pragma once
#include "review/review.h"

/* What the window says of a saw plan. Owned. */
char *kh_saw_words_dup_sum (const KhReview *review, const KhPlan *plan);   /* "5 strips, 32.00 in all. No plan costs less." */
char *kh_saw_words_dup_buy (const KhReview *review, const KhPlan *plan);   /* a line a board */
char *kh_saw_words_dup_cannot (const KhReview *review);                    /* NULL: all can be cut */
