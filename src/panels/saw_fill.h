/* SPDX-License-Identifier: MIT */
#pragma once
#include "panels/saw_clock.h"
#include "panels/saw_problem.h"

/* Inside the saw plan: a first plan, made strip by strip.
 *
 * LONGEST: into each strip the longest piece that fits, again and again (first
 * fit decreasing, taken strip by strip).  FULLEST: the fullest filling there is
 * (fill-up).  VALUED: the filling of most value, pieces being worth more than
 * their width the longer they are, so that long ones do not stay till last.
 * Of several stocks that is taken which costs least for what it holds. */

typedef enum { KH_SAW_FILL_LONGEST, KH_SAW_FILL_FULLEST, KH_SAW_FILL_VALUED, KH_SAW_N_FILLS } KhSawFillHow;

typedef struct
{
  KhSawFillHow how;
  int only_kind;       /* -1: all */
  const int *limits;   /* a kind each: bought pieces at most; NULL: the problem's */
  KhSawClock *clock;   /* LONGEST is quick and goes on without looking at it */
} KhSawFill;

/* NULL where the limits leave pieces over or the time is. */
KhSawDraft *kh_saw_fill (const KhSawProblem *problem, const KhSawFill *fill);

/* Puts what strips hold into cheaper stock where that fits, and buys no strip
 * that another stock has left over.  Never costs more; sets the cost. */
void kh_saw_fill_tidy (const KhSawProblem *problem, const int *limits_or_null, KhSawDraft *draft);
