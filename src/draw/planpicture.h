/* SPDX-License-Identifier: MIT */
#pragma once
#include "draw/palette.h"
#include "draw/view.h"
#include "review/review.h"

/* The plan as a picture: one renderer for screen, print and files.  Widths are
 * in device units ("px") where the look asks for them, in mm where they are wood. */

typedef struct
{
  KhScheme scheme;
  gboolean high_contrast;
  gboolean with_rulers;     /* running dimensions and cell names along the west and south (screen: top and left) edges */
  gboolean with_lattice;    /* hairlines between cells */
  gboolean with_trail, with_beams, with_labels /* panel labels */, with_findings;
  KhHand hand;              /* whose trace is shown */
  gsize played_tick;        /* the trail beyond it is faint; G_MAXSIZE = all played */
  int lit_row;              /* row of the cut list whose panels are lit; -1 */
  int chosen_finding;       /* index; -1 */
  double text_size;         /* device units of 11 px text */
} KhPlanPicture;

void kh_plan_picture_init (KhPlanPicture *picture);
/* 'review' may be NULL.  Draws into the view's rectangle. */
void kh_plan_picture_draw (const KhPlanPicture *picture, cairo_t *cr, const KhView *view, const KhPlan *plan, const KhReview *review);
/* The parts, for a canvas that keeps what did not change. */
void kh_plan_picture_draw_ground (const KhPlanPicture *picture, cairo_t *cr, const KhView *view, const KhPlan *plan, const KhReview *review);
void kh_plan_picture_draw_run (const KhPlanPicture *picture, cairo_t *cr, const KhView *view, const KhPlan *plan, const KhReview *review);
void kh_plan_picture_draw_robot (const KhPlanPicture *picture, cairo_t *cr, const KhView *view, const KhPlan *plan, const KhTrace *trace, gsize tick);
void kh_plan_picture_draw_key (const KhPlanPicture *picture, cairo_t *cr, double x, double y, KhHand hand); /* key of the trail's styles */
