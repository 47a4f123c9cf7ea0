/* SPDX-License-Identifier: MIT */
#pragma once
#include "draw/planpicture.h"

/* One printed page: paper, scale, frame, title block, check bar. Millimetres of
 * paper, y down. A4 or A3 (ISO 216), upright or lying, the largest scale of the
 * series of ISO 5455 at which the plan fits. */
#define KH_PT_PER_MM (72.0 / 25.4)

typedef struct
{
  const char *paper;      /* "A4" */
  double width_mm, height_mm;
  int scale;              /* 1 : scale */
  double text_mm;         /* height of the type */
  double bar_mm;          /* length of the check bar */
  KhView view;            /* of the plan on the paper */
} KhPage;

void kh_page_choose (KhPage *page, const KhPlan *plan);
void kh_page_draw_frame (const KhPage *page, cairo_t *cr, const KhPlan *plan, const KhReview *review, const char *title);
