/* SPDX-License-Identifier: MIT */
#include "robot/rays.h"
#include <math.h>

void kh_ray_cast (const KhSolids *solids, KhVec from, double dx, double dy, KhRayHit *hit)
{
  int i = kh_solids_find_band (solids, from.x, solids->n_x), j = kh_solids_find_band (solids, from.y, solids->n_y);
  const int step_i = dx > 0 ? 1 : -1, step_j = dy > 0 ? 1 : -1;
  /* The edge ahead of band i is edge_x[i + 1] or edge_x[i]. */
  const double *ahead_x = solids->edge_x + (dx > 0), *ahead_y = solids->edge_y + (dy > 0);
  const double per_x = dx != 0 ? 1 / dx : HUGE_VAL, per_y = dy != 0 ? 1 / dy : HUGE_VAL;
  const guint8 *band = solids->band + (gsize)j * (gsize)solids->n_x + i;
  const ptrdiff_t row_step = (ptrdiff_t)step_j * solids->n_x;
  double to_x = dx != 0 ? (ahead_x[i] - from.x) * per_x : HUGE_VAL;
  double to_y = dy != 0 ? (ahead_y[j] - from.y) * per_y : HUGE_VAL;
  double distance = 0, incidence = 1;
  while (*band == KH_BAND_FREE)
    {
      if (to_x < to_y)
        {
          distance = to_x;
          incidence = fabs (dx);
          i += step_i;
          band += step_i;
          to_x = (ahead_x[i] - from.x) * per_x;
        }
      else
        {
          distance = to_y;
          incidence = fabs (dy);
          j += step_j;
          band += row_step;
          to_y = (ahead_y[j] - from.y) * per_y;
        }
    }
  hit->distance = *band == KH_BAND_WALL ? distance : HUGE_VAL;
  hit->incidence = incidence;
  hit->i = i;
  hit->j = j;
}
