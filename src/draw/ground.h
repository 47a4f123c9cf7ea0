/* SPDX-License-Identifier: MIT */
#pragma once
#include "draw/planpicture.h"
#include "draw/pen.h"

/* The layers of the ground, from below. 'px' is what one pixel of the look is in device units. */
typedef struct
{
  const KhPlanPicture *picture;
  cairo_t *cr;
  const KhView *view;
  const KhPlan *plan;
  const KhReview *review; /* may be NULL */
  double px, pitch, thickness;
  double cell_px;         /* a cell's size in pixels of the look: details go when it is small */
  int c0, c1, r0, r1;     /* cells that can be seen: c0 <= c < c1 */
} KhGround;

void kh_ground_draw_floor (const KhGround *g);
void kh_ground_draw_walls (const KhGround *g);
void kh_ground_draw_panels (const KhGround *g);
void kh_ground_draw_signs (const KhGround *g);
void kh_ground_draw_badges (const KhGround *g);
void kh_ground_draw_rulers (const KhGround *g);
void kh_ground_set_ink (const KhGround *g, KhInk ink, double alpha);
