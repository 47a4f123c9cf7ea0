/* SPDX-License-Identifier: MIT */
#include "draw/planpicture.h"
#include "base/units.h"
#include "draw/ground.h"
#include <math.h>

void kh_plan_picture_init (KhPlanPicture *picture)
{
  *picture = (KhPlanPicture){
    .with_lattice = TRUE, .played_tick = G_MAXSIZE, .lit_row = -1, .chosen_finding = -1, .text_size = 11
  };
}

static KhGround ground_of (const KhPlanPicture *picture, cairo_t *cr, const KhView *view, const KhPlan *plan,
                           const KhReview *review)
{
  KhGround g = { picture,
                 cr,
                 view,
                 plan,
                 review,
                 picture->text_size / 11,
                 kh_mm_from_nm (plan->lattice.pitch_nm),
                 kh_mm_from_nm (plan->walls.thickness_nm),
                 0,
                 0,
                 0,
                 0,
                 0 };
  KhVec low = kh_view_to_mm (view, 0, view->height), high = kh_view_to_mm (view, view->width, 0);
  g.cell_px = g.pitch * view->scale / g.px;
  g.c0 = (int)CLAMP (floor (low.x / g.pitch), 0, plan->lattice.columns);
  g.c1 = (int)CLAMP (ceil (high.x / g.pitch), 0, plan->lattice.columns);
  g.r0 = (int)CLAMP (floor (low.y / g.pitch), 0, plan->lattice.rows);
  g.r1 = (int)CLAMP (ceil (high.y / g.pitch), 0, plan->lattice.rows);
  return g;
}

void kh_plan_picture_draw_ground (const KhPlanPicture *picture, cairo_t *cr, const KhView *view, const KhPlan *plan,
                                  const KhReview *review)
{
  KhGround g = ground_of (picture, cr, view, plan, review);
  cairo_save (cr);
  kh_ground_draw_floor (&g);
  if (picture->with_labels)
    kh_ground_draw_panels (&g);
  else
    kh_ground_draw_walls (&g);
  kh_ground_draw_signs (&g);
  if (picture->with_rulers)
    kh_ground_draw_rulers (&g);
  if (picture->with_findings)
    kh_ground_draw_badges (&g);
  cairo_restore (cr);
}

void kh_plan_picture_draw (const KhPlanPicture *picture, cairo_t *cr, const KhView *view, const KhPlan *plan,
                           const KhReview *review)
{
  kh_plan_picture_draw_ground (picture, cr, view, plan, review);
  kh_plan_picture_draw_run (picture, cr, view, plan, review);
  const KhTrace *trace = review ? review->traces[picture->hand] : NULL;
  if (trace && picture->with_beams)
    kh_plan_picture_draw_robot (picture, cr, view, plan, trace, picture->played_tick);
}
