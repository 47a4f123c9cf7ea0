/* SPDX-License-Identifier: MIT */
#include "layout/handwalk.h"

/* Quarter turns to the right, in the order they are tried. */
static const int turns[2][4] = { { 1, 0, -1, 2 }, { -1, 0, 1, 2 } };

static guint8 *dup_marked (const KhPlan *plan)
{
  guint8 *marked = g_malloc0 ((gsize)kh_lattice_n_cells (&plan->lattice));
  for (guint i = 0; i < plan->marks->len; i++)
    marked[kh_lattice_cell_index (&plan->lattice, g_array_index (plan->marks, KhMark, i).cell)] = 1;
  return marked;
}

/* The next heading, or FALSE where there are walls on all sides. */
static gboolean choose (const KhPlan *plan, KhHand hand, KhCell cell, KhHeading *heading)
{
  for (int i = 0; i < 4; i++)
    {
      KhHeading tried = kh_heading_turned (*heading, turns[hand][i]);
      if (!kh_plan_has_wall (plan, kh_cell_edge (cell, tried)))
        {
          *heading = tried;
          return TRUE;
        }
    }
  return FALSE;
}

static gboolean arrives_out (const KhPlan *plan, KhEdge edge)
{
  const KhOpening *opening = kh_plan_get_opening (plan, edge);
  return plan->marks->len == 0 && opening && opening->use == KH_OPENING_EXIT;
}

static KhWalkEnd go (const KhPlan *plan, KhHand hand, const guint8 *marked, KhHandWalk *walk)
{
  /* A bit a heading: states stood in. */
  g_autofree guint8 *stood = g_malloc0 ((gsize)kh_lattice_n_cells (&plan->lattice));
  KhCell cell = plan->start.cell;
  KhHeading heading = plan->start.heading;
  while (TRUE)
    {
      int at = kh_lattice_cell_index (&plan->lattice, cell);
      if (stood[at] & (1 << heading))
        return KH_WALK_ENDS_CIRCLES;
      walk->n_cells += stood[at] == 0;
      stood[at] |= (guint8)(1 << heading);
      if (marked[at])
        return KH_WALK_ENDS_MARK;
      if (!choose (plan, hand, cell, &heading))
        return KH_WALK_ENDS_CIRCLES;
      KhCell next = kh_cell_neighbour (cell, heading);
      if (!kh_plan_has_floor (plan, next))
        {
          walk->out_edge = kh_cell_edge (cell, heading);
          return KH_WALK_ENDS_OUT;
        }
      cell = next;
      walk->n_steps++;
      g_array_append_val (walk->path, cell);
    }
}

gboolean kh_hand_walk (const KhPlan *plan, KhHand hand, KhHandWalk *walk)
{
  if (!plan->has_start || !kh_plan_has_floor (plan, plan->start.cell))
    return FALSE;
  g_autofree guint8 *marked = dup_marked (plan);
  *walk = (KhHandWalk){ .path = g_array_new (FALSE, FALSE, sizeof (KhCell)) };
  g_array_append_val (walk->path, plan->start.cell);
  walk->ends = go (plan, hand, marked, walk);
  walk->arrives
      = walk->ends == KH_WALK_ENDS_MARK || (walk->ends == KH_WALK_ENDS_OUT && arrives_out (plan, walk->out_edge));
  return TRUE;
}

void kh_hand_walk_clear (KhHandWalk *walk) { g_clear_pointer (&walk->path, g_array_unref); }
