/* SPDX-License-Identifier: MIT */
#pragma once
#include "draw/strippicture.h"

/* A moment of a run in words. Owned. */
char *kh_run_words_dup_when (const KhTrace *trace, gsize tick); /* "19.8 s of 34.5 s" */
char *kh_run_words_dup_way (const KhTrace *trace, gsize tick);  /* "3.30 m of 5.79 m" */
char *kh_run_words_dup_doing (const KhPlan *plan, const KhTrace *trace, gsize tick); /* "D1: follows the right wall" */
/* "right 33 mm free, left 34 mm, front 313 mm, nearest 33 mm"; lanes NULL: the sides are left out. */
char *kh_run_words_dup_free (const KhStripData *lanes, const KhTrace *trace, gsize tick);
