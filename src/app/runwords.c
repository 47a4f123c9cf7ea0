/* SPDX-License-Identifier: MIT */
#include "app/runwords.h"
#include "base/units.h"
#include <glib/gi18n-lib.h>
#include <math.h>

char *kh_run_words_dup_when (const KhTrace *trace, gsize tick)
{
  const KhTick *t = kh_trace_get_tick (trace, tick);
  return g_strdup_printf (_ ("%.1f s of %.1f s\n%.2f m of %.2f m"), (double)tick * trace->tick_s, trace->time_s,
                          (double)t->distance_mm / 1000, trace->distance_m);
}

static char *dup_cell (const KhPlan *plan, const KhTick *tick)
{
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  KhCell cell = { (int)CLAMP (floor (tick->x / pitch), 0, plan->lattice.columns - 1),
                  (int)CLAMP (floor (tick->y / pitch), 0, plan->lattice.rows - 1) };
  return kh_cell_dup_name (cell);
}

static char *dup_state (KhState state, const char *cell, const char *hand)
{
  switch (state)
    {
    case KH_STATE_FOLLOW:
      return g_strdup_printf (_ ("%s: follows the wall at the %s"), cell, hand);
    case KH_STATE_LEAD_IN:
      return g_strdup_printf (_ ("%s: has lost the wall at the %s, drives straight on to its end"), cell, hand);
    case KH_STATE_CURVE:
      return g_strdup_printf (_ ("%s: curves round the wall end at the %s"), cell, hand);
    case KH_STATE_PIVOT:
      return g_strdup_printf (_ ("%s: turns before a wall, away from the %s"), cell, hand);
    case KH_STATE_SEARCHING:
      return g_strdup_printf (_ ("%s: searches a wall for the %s"), cell, hand);
    default:
      return g_strdup_printf (_ ("%s: has arrived"), cell);
    }
}

char *kh_run_words_dup_doing (const KhPlan *plan, const KhTrace *trace, gsize tick)
{
  const KhTick *t = kh_trace_get_tick (trace, tick);
  if (tick + 1 >= kh_trace_get_n_ticks (trace))
    return g_strdup (trace->why);
  g_autofree char *cell = dup_cell (plan, t);
  return dup_state ((KhState) t->state, cell, trace->hand == KH_HAND_RIGHT ? _ ("right hand") : _ ("left hand"));
}

char *kh_run_words_dup_free (const KhPlan *plan, const KhTrace *trace, gsize tick)
{
  const KhTick *t = kh_trace_get_tick (trace, tick);
  GString *text = g_string_new (NULL);
  g_string_append_printf (text, _ ("%.0f mm clear of the nearest wall"), (double)t->clearance_mm);
  if (isfinite (t->side_front_mm))
    g_string_append_printf (text, _ (", side reads %.0f mm"), (double)t->side_front_mm);
  if (isfinite (t->front_mm))
    g_string_append_printf (text, _ (", front %.0f mm"), (double)t->front_mm);
  return g_string_free (text, FALSE);
}
