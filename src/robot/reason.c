/* SPDX-License-Identifier: MIT */
#include "robot/reason.h"
#include <glib/gi18n-lib.h>
#include <math.h>

static const char *part_words (const KhContact *contact, KhHand hand)
{
  gboolean left = contact->bearing_rad > 0, ahead = fabs (contact->bearing_rad) < G_PI / 2;
  switch (contact->part)
    {
    case KH_PART_FRONT:
      return _ ("front");
    case KH_PART_REAR:
      return _ ("rear");
    default:
      break;
    }
  /* On the slant it is told as a corner. */
  double slant = fabs (fabs (contact->bearing_rad) - G_PI / 2);
  if (slant > G_PI / 12)
    return ahead ? (left ? _ ("left front") : _ ("right front")) : (left ? _ ("left rear") : _ ("right rear"));
  return left ? _ ("left side") : _ ("right side");
}

static const char *doing_words (KhState state)
{
  switch (state)
    {
    case KH_STATE_FOLLOW:
      return _ ("while following the wall");
    case KH_STATE_LEAD_IN:
      return _ ("on the way past the end of a wall");
    case KH_STATE_CURVE:
      return _ ("in the curve round a wall end");
    case KH_STATE_PIVOT:
      return _ ("while turning in place");
    default:
      return _ ("while searching a wall");
    }
}

static char *dup_contact (const KhTrace *trace)
{
  const KhContact *contact = &trace->contact;
  g_autofree char *cell = kh_cell_dup_name (contact->cell);
  /* Translators: part of the body, cell, what the robot is doing: "The left rear touches a wall end in C4 while turning
   * in place." */
  return g_strdup_printf (contact->on_end ? _ ("The %s of the robot touches a wall end in %s %s.")
                                          : _ ("The %s of the robot touches a wall in %s %s."),
                          part_words (contact, trace->hand), cell, doing_words (contact->state));
}

static char *dup_left (const KhPlan *plan, const char *cell, KhEdge out_edge)
{
  const KhOpening *opening = kh_plan_get_opening (plan, out_edge);
  if (!opening)
    return g_strdup_printf (_ ("It leaves the maze at %s, where the boundary is open and no opening is declared."),
                            cell);
  switch (opening->use)
    {
    case KH_OPENING_ENTRANCE:
      return g_strdup_printf (_ ("It leaves the maze through the entrance at %s."), cell);
    case KH_OPENING_EXIT:
      return g_strdup_printf (_ ("It leaves the maze through the exit at %s without passing a mark."), cell);
    default:
      return g_strdup_printf (_ ("It leaves the maze through the opening at %s."), cell);
    }
}

char *kh_reason_dup (const KhPlan *plan, const KhTrace *trace, KhCell cell, KhEdge out_edge)
{
  g_autofree char *name = kh_cell_dup_name (cell);
  switch (trace->outcome)
    {
    case KH_OUTCOME_ARRIVED:
      return plan->marks->len > 0 ? g_strdup_printf (_ ("It arrives at the mark in %s."), name)
                                  : g_strdup_printf (_ ("It arrives: it leaves through the exit at %s."), name);
    case KH_OUTCOME_CONTACT:
      return dup_contact (trace);
      case KH_OUTCOME_LOST: {
        const KhEvent *last = &g_array_index (trace->events, KhEvent, trace->events->len - 1);
        if (last->state == KH_STATE_SEARCHING)
          return g_strdup_printf (_ ("It finds no wall to hold on to; it is still searching in %s."), name);
        return g_strdup_printf (_ ("It loses its wall in %s: four quarter circles in a row and no wall beside it."),
                                name);
      }
    case KH_OUTCOME_CIRCLES:
      return g_strdup_printf (_ ("It circles: it comes into %s by the same edge for the third time."), name);
    case KH_OUTCOME_LEFT:
      return dup_left (plan, name, out_edge);
    default:
      return g_strdup_printf (_ ("It is still driving in %s after %.1f minutes; longer runs are not followed."), name,
                              trace->time_s / 60);
    }
}
