/* SPDX-License-Identifier: MIT */
#include "draw/stripdata.h"
#include "base/units.h"
#include "robot/derived.h"
#include "robot/rays.h"
#include <math.h>

#define EVERY_MM 4.0

static float look_aside (const KhSolids *solids, const KhTick *tick, double side, double open)
{
  KhRayHit hit;
  kh_ray_cast (solids, (KhVec){ tick->x, tick->y }, -side * sin (tick->heading_rad), side * cos (tick->heading_rad),
               &hit);
  return hit.distance < open ? (float)hit.distance : NAN;
}

static void take_samples (KhStripData *data, const KhTrace *trace, const KhSolids *solids)
{
  double next = 0;
  gsize n = kh_trace_get_n_ticks (trace);
  int last_state = -1;
  for (gsize i = 0; i < n; i++)
    {
      const KhTick *tick = kh_trace_get_tick (trace, i);
      data->distance_of_tick[i] = tick->distance_mm;
      data->turning[i] = tick->state == KH_STATE_PIVOT;
      gboolean changed = tick->state != last_state;
      if (changed && tick->state == KH_STATE_PIVOT)
        g_array_append_val (data->turns, tick->distance_mm);
      last_state = tick->state;
      if (tick->state == KH_STATE_PIVOT || ((double)tick->distance_mm < next && !changed && i + 1 < n))
        continue;
      next = (double)tick->distance_mm + EVERY_MM;
      KhStripSample sample = { tick->distance_mm,
                               look_aside (solids, tick, 1, data->open),
                               look_aside (solids, tick, -1, data->open),
                               tick->front_mm,
                               tick->state,
                               (guint32)i };
      g_array_append_val (data->samples, sample);
    }
}

KhStripData *kh_strip_data_new (const KhPlan *plan, const KhTrace *trace)
{
  KhDerived derived;
  KhStripData *data = g_new0 (KhStripData, 1);
  g_autoptr (KhSolids) solids = kh_solids_new (plan);
  const KhRobotBody *body = &plan->robot.body;
  kh_derived_init (&derived, plan, trace->hand);
  data->samples = g_array_new (FALSE, FALSE, sizeof (KhStripSample));
  data->turns = g_array_new (FALSE, FALSE, sizeof (float));
  data->n_ticks = kh_trace_get_n_ticks (trace);
  data->distance_of_tick = g_new (float, data->n_ticks);
  data->turning = g_new (guint8, data->n_ticks);
  data->length = MAX (trace->distance_m * 1000, 1);
  data->half_width = body->shape == KH_BODY_DISC ? body->radius_mm : body->half_width_mm;
  data->middle = derived.wall_distance;
  data->threshold = derived.front_threshold;
  data->front_most = plan->robot.front_sensor.range_mm[1];
  data->open = derived.pitch;
  data->least_clearance = trace->least_clearance_mm;
  data->least_clearance_at = (double)kh_trace_get_tick (trace, trace->least_clearance_tick)->distance_mm;
  data->failed = trace->outcome != KH_OUTCOME_ARRIVED;
  take_samples (data, trace, solids);
  return data;
}

gboolean kh_strip_data_get_free (const KhStripData *data, gsize tick, double *left_mm, double *right_mm)
{
  guint low = 0, high = data->samples->len;
  if (tick >= data->n_ticks || data->turning[tick] || high == 0)
    return FALSE;
  while (high - low > 1) /* the last sample at or before the tick */
    {
      guint middle = low + (high - low) / 2;
      if (g_array_index (data->samples, KhStripSample, middle).tick <= tick)
        low = middle;
      else
        high = middle;
    }
  const KhStripSample *sample = &g_array_index (data->samples, KhStripSample, low);
  *left_mm = (double)sample->left - data->half_width;
  *right_mm = (double)sample->right - data->half_width;
  return TRUE;
}

void kh_strip_data_free (KhStripData *data)
{
  if (!data)
    return;
  g_array_unref (data->samples);
  g_array_unref (data->turns);
  g_free (data->distance_of_tick);
  g_free (data->turning);
  g_free (data);
}
