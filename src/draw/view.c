/* SPDX-License-Identifier: MIT */
#include "draw/view.h"
#include "base/units.h"
#include <math.h>

#define LEAST_SCALE 0.0005
#define MOST_SCALE 40.0

void kh_view_fit (KhView *view, const KhPlan *plan, double width, double height, double margin)
{
  double plan_width = kh_mm_from_nm (kh_plan_width_nm (plan)), plan_depth = kh_mm_from_nm (kh_plan_depth_nm (plan));
  double half = kh_mm_from_nm (plan->walls.thickness_nm) / 2;
  double room_x = MAX (width - 2 * margin, 1), room_y = MAX (height - 2 * margin, 1);
  view->width = width;
  view->height = height;
  view->scale = CLAMP (MIN (room_x / plan_width, room_y / plan_depth), LEAST_SCALE, MOST_SCALE);
  view->origin_x = (width - plan_width * view->scale) / 2 + half * view->scale;
  view->origin_y = (height + plan_depth * view->scale) / 2 - half * view->scale;
}

void kh_view_zoom_at (KhView *view, double device_x, double device_y, double factor)
{
  double scale = CLAMP (view->scale * factor, LEAST_SCALE, MOST_SCALE), by = scale / view->scale;
  view->origin_x = device_x + (view->origin_x - device_x) * by;
  view->origin_y = device_y + (view->origin_y - device_y) * by;
  view->scale = scale;
}

KhVec kh_view_to_device (const KhView *view, KhVec mm)
{
  return (KhVec){ view->origin_x + mm.x * view->scale, view->origin_y - mm.y * view->scale };
}

KhVec kh_view_to_mm (const KhView *view, double device_x, double device_y)
{
  return (KhVec){ (device_x - view->origin_x) / view->scale, (view->origin_y - device_y) / view->scale };
}
