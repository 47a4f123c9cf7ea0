/* SPDX-License-Identifier: MIT */
#include "app/runwords.h"
#include "base/units.h"
#include <glib/gi18n-lib.h>
#include <math.h>

char *kh_run_words_dup_when (const KhTrace *trace, gsize tick)
{
  return g_strdup_printf (_ ("%.1f s of %.1f s"), (double)tick * trace->tick_s, trace->time_s);
}

char *kh_run_words_dup_way (const KhTrace *trace, gsize tick)
{
  return g_strdup_printf (_ ("%.2f m of %.2f m"), (double)kh_trace_get_tick (trace, tick)->distance_mm / 1000,
                          trace->distance_m);
}

static char *dup_cell (const KhPlan *plan, const KhTick *tick)
{
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  KhCell cell = { (int)CLAMP (floor (tick->x / pitch), 0, plan->lattice.columns - 1),
                  (int)CLAMP (floor (tick->y / pitch), 0, plan->lattice.rows - 1) };
  return kh_cell_dup_name (cell);
}

static char *dup_state (KhState state, const char *cell, KhHand which)
{
  const char *hand = which == KH_HAND_RIGHT ? _ ("right hand") : _ ("left hand");
  switch (state)
    {
    case KH_STATE_FOLLOW:
      return g_strdup_printf (
          which == KH_HAND_RIGHT ? _ ("%s: follows the right wall") : _ ("%s: follows the left wall"), cell);
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
  return dup_state ((KhState)t->state, cell, trace->hand);
}

static void separate (GString *text)
{
  if (text->len > 0)
    g_string_append (text, ", ");
}

/* The hand's own side comes first and says what the numbers are. */
static void add_side (GString *text, gboolean right, double free_mm)
{
  gboolean first = text->len == 0;
  separate (text);
  if (!isfinite (free_mm))
    g_string_append (text, right ? _ ("right open") : _ ("left open"));
  else if (first)
    g_string_append_printf (text, right ? _ ("right %.0f mm free") : _ ("left %.0f mm free"), free_mm);
  else
    g_string_append_printf (text, right ? _ ("right %.0f mm") : _ ("left %.0f mm"), free_mm);
}

char *kh_run_words_dup_free (const KhStripData *lanes, const KhTrace *trace, gsize tick)
{
  const KhTick *t = kh_trace_get_tick (trace, tick);
  GString *text = g_string_new (NULL);
  double left, right;
  if (lanes && kh_strip_data_get_free (lanes, tick, &left, &right))
    {
      add_side (text, trace->hand == KH_HAND_RIGHT, trace->hand == KH_HAND_RIGHT ? right : left);
      add_side (text, trace->hand != KH_HAND_RIGHT, trace->hand == KH_HAND_RIGHT ? left : right);
    }
  if (isfinite (t->front_mm))
    {
      separate (text);
      g_string_append_printf (text, _ ("front %.0f mm"), (double)t->front_mm);
    }
  separate (text);
  g_string_append_printf (text, _ ("nearest %.0f mm"), (double)t->clearance_mm);
  return g_string_free (text, FALSE);
}
