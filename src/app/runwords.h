/* SPDX-License-Identifier: MIT */
#pragma once
#include "review/review.h"

/* A moment of a run in words. Owned. */
char *kh_run_words_dup_when (const KhTrace *trace, gsize tick);   /* "19.8 s of 34.5 s\n3.30 m of 5.79 m" */
char *kh_run_words_dup_doing (const KhPlan *plan, const KhTrace *trace, gsize tick); /* "D1: follows the right wall" */
char *kh_run_words_dup_free (const KhPlan *plan, const KhTrace *trace, gsize tick);  /* "right 33 mm free, front 313 mm" */
