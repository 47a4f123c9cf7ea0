/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/geometry.h"
#include "plan/plan.h"

/* Plane (mm, y north) <-> device (pixels or points, y down). */
typedef struct
{
  double scale;       /* device units a mm */
  double origin_x, origin_y; /* device position of the datum */
  double width, height; /* device size of what can be seen */
} KhView;

void kh_view_fit (KhView *view, const KhPlan *plan, double width, double height, double margin);
void kh_view_zoom_at (KhView *view, double device_x, double device_y, double factor); /* clamped to sane scales */
KhVec kh_view_to_device (const KhView *view, KhVec mm);
KhVec kh_view_to_mm (const KhView *view, double device_x, double device_y);
