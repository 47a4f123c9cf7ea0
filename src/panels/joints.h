/* SPDX-License-Identifier: MIT */
#pragma once
#include "panels/cutlist.h"

/* Inside panels: where the butt joints go.
 *
 * Every unbroken straight line of walls is cut into panels.  At its ends and
 * where it is cut a panel gains or loses half a thickness, so that the panels
 * fill the wall figure with no gap and no overlap:
 *
 *   free end       +1  (0 where ends are flush with the lattice point)
 *   corner         +1 for the one that owns it, -1 for the other
 *   stem of a tee  -1
 *   cross          the line that is broken there: -1 on both sides; where the
 *                  other line is broken too, that one meets in the middle: 0
 *   splice          0  in a straight line or in the bar of a tee
 *
 * Rules, the earlier one first:
 * 1. no panel longer than the limit, joints at the ends of loose sections;
 * 2. the fewest panels (see "Fewest panels" in joints.c for when this is exact);
 * 3. at a cross the longer line goes through; corners are owned the same way
 *    round along an open chain of lines joined by corners, so that the inner
 *    ones are exactly n * pitch; in a closed ring those along x own both;
 * 4. splices where another wall meets (its corners take the brackets), but not
 *    at the price of a stub: a panel under two thirds of an even share counts as
 *    much as a splice where nothing meets;
 * 5. panels of equal length;
 * 6. of the two ways round an open chain the one with fewer different lengths.
 *
 * Cost: linear in the lattice for mazes as they are built. */

/* Appends KhPanel (label NULL, row 0) in file order of the runs.  FALSE with
 * *error set, nothing appended, where a single wall is longer than the limit. */
gboolean kh_joints_lay_butt (const KhPlan *plan, GArray *panels, GError **error);

/* Lattice points touched by a wall, by kind (KH_N_POINT_KINDS), and lone posts. */
void kh_joints_count_points (const KhPlan *plan, int n_points[KH_N_POINT_KINDS], int *n_lone_posts);

/* Arms of a lattice point: bit 0 north, 1 east, 2 south, 3 west (as KhHeading). */
unsigned kh_joints_get_arms (const KhPlan *plan, KhPoint point);
