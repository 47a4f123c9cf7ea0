/* SPDX-License-Identifier: MIT */
/* Start, marks, and where the hands end. */
#include "layout/finder.h"
#include <glib/gi18n-lib.h>

static void get_middle (KhCell cell, double at[2])
{
  at[0] = cell.column + 0.5;
  at[1] = cell.row + 0.5;
}

static gboolean has_wall_at (const KhPlan *plan, KhHand hand)
{
  KhHeading side = kh_heading_turned (plan->start.heading, hand == KH_HAND_RIGHT ? 1 : -1);
  return kh_plan_has_wall (plan, kh_cell_edge (plan->start.cell, side));
}

void kh_finder_look_at_start (KhFinder *f)
{
  const KhPlan *plan = f->plan;
  double at[2] = { 0, 0 };
  if (!plan->has_start)
    {
      kh_finder_tell (f, "no-start", KH_SEVERITY_BREAKS, at, g_strdup (_ ("The plan has no start.")),
                      g_strdup (_ ("No run can be shown; place one with the Start tool.")));
      return;
    }
  get_middle (plan->start.cell, at);
  g_autofree char *name = kh_cell_dup_name (plan->start.cell);
  if (!kh_plan_has_floor (plan, plan->start.cell))
    {
      KhFinding *finding
          = kh_finder_tell (f, "start-on-gap", KH_SEVERITY_BREAKS, at,
                            g_strdup_printf (_ ("The start at %s stands where there is no floor."), name),
                            g_strdup (_ ("No run can be shown; move the start, or give the floor back.")));
      kh_finder_add_cell (finding, plan->start.cell);
      return;
    }
  if (has_wall_at (plan, f->hand))
    return;
  KhFinding *finding = kh_finder_tell (
      f, "no-wall-at-hand", KH_SEVERITY_HINDERS, at,
      g_strdup_printf (_ ("At the start in %s there is no wall at the %s."), name, kh_finder_hand_words (f->hand)),
      g_strdup (_ ("The robot drives straight on until a wall stands at its hand or ahead. Turn the start, or lay a "
                   "wall there.")));
  kh_finder_add_cell (finding, plan->start.cell);
}

/* A mark should lie within its cell's clear square. */
static gboolean is_clear (const KhPlan *plan, const KhMark *mark)
{
  int64_t half = kh_plan_clear_width_nm (plan) / 2;
  for (int axis = 0; axis < 2; axis++)
    if (ABS (mark->offset_nm[axis]) + mark->size_nm[axis] / 2 > half)
      return FALSE;
  return TRUE;
}

static gboolean is_bare (const KhFinder *f, KhCell cell)
{
  for (int k = 0; k < 4; k++)
    {
      KhPoint corner = { cell.column + k % 2, cell.row + k / 2 };
      if (f->layout->piece_of_point[kh_lattice_point_index (&f->plan->lattice, corner)] >= 0)
        return FALSE;
    }
  return TRUE;
}

static gboolean is_reached (const KhFinder *f, KhCell cell)
{
  return f->layout->start_region >= 0
         && f->layout->region_of_cell[kh_lattice_cell_index (&f->plan->lattice, cell)] == f->layout->start_region;
}

static void tell_mark (KhFinder *f, const KhMark *mark, gboolean only)
{
  KhFinding *finding = NULL;
  double at[2];
  get_middle (mark->cell, at);
  g_autofree char *name = kh_cell_dup_name (mark->cell);
  KhSeverity severity = only ? KH_SEVERITY_BREAKS : KH_SEVERITY_HINDERS;
  if (!kh_plan_has_floor (f->plan, mark->cell))
    finding = kh_finder_tell (f, "mark-unreachable", severity, at,
                              g_strdup_printf (_ ("The mark in %s lies where there is no floor."), name),
                              g_strdup (_ ("No robot gets there; move the mark, or give the floor back.")));
  else if (f->layout->start_region >= 0 && !is_reached (f, mark->cell))
    finding
        = kh_finder_tell (f, "mark-unreachable", severity, at,
                          g_strdup_printf (_ ("The mark in %s cannot be reached from the start."), name),
                          g_strdup (_ ("Walls or gaps part them on all ways; take a wall away, or move the mark.")));
  else if (is_bare (f, mark->cell))
    finding = kh_finder_tell (
        f, "bare-point", severity, at, g_strdup_printf (_ ("No wall touches the mark's cell, %s."), name),
        g_strdup (_ ("A robot that keeps a hand on the wall never comes there; move the mark beside a wall.")));
  else if (!is_clear (f->plan, mark))
    finding = kh_finder_tell (
        f, "mark-in-wall", KH_SEVERITY_HINDERS, at,
        g_strdup_printf (_ ("The mark in %s reaches under a wall or beyond its cell."), name),
        g_strdup (_ ("What lies under a wall is not seen by the robot; make the mark smaller, or move it.")));
  if (finding)
    kh_finder_add_cell (finding, mark->cell);
}

static gboolean has_exit (const KhPlan *plan)
{
  for (guint i = 0; i < plan->openings->len; i++)
    if (g_array_index (plan->openings, KhOpening, i).use == KH_OPENING_EXIT)
      return TRUE;
  return FALSE;
}

void kh_finder_look_at_marks (KhFinder *f)
{
  const double corner[2] = { 0, 0 };
  const GArray *marks = f->plan->marks;
  if (marks->len == 0 && has_exit (f->plan))
    kh_finder_tell (
        f, "no-mark", KH_SEVERITY_NOTES, corner, g_strdup (_ ("The plan has no mark.")),
        g_strdup (
            _ ("A run counts as arrived when the robot leaves by the exit; a mark would tell the robot itself.")));
  else if (marks->len == 0)
    kh_finder_tell (f, "no-mark", KH_SEVERITY_BREAKS, corner, g_strdup (_ ("The plan has neither a mark nor an exit.")),
                    g_strdup (_ ("Nothing tells the robot that it has arrived; place a mark, or declare an exit.")));
  for (guint i = 0; i < marks->len && i < 50; i++)
    tell_mark (f, &g_array_index (marks, KhMark, i), marks->len == 1);
}

static char *dup_end (const KhFinder *f, const KhHandWalk *walk)
{
  if (walk->ends == KH_WALK_ENDS_OUT)
    {
      g_autofree char *name = kh_finder_dup_edge_name (f->plan, walk->out_edge);
      return g_strdup_printf (_ ("It leaves the maze at %s."), name);
    }
  if (walk->n_steps == 0)
    return g_strdup (_ ("It is walled in on all sides."));
  return g_strdup_printf (ngettext ("It goes round for ever and sees %d cell.",
                                    "It goes round for ever and sees %d cells.", (gulong)walk->n_cells),
                          walk->n_cells);
}

static const char *goal_words (const KhFinder *f) { return f->plan->marks->len > 0 ? _ ("mark") : _ ("exit"); }

static void tell_failing (KhFinder *f, KhHand hand)
{
  const KhHandWalk *walk = f->walks[hand];
  KhCell cell = g_array_index (walk->path, KhCell, walk->path->len - 1);
  double at[2];
  get_middle (cell, at);
  KhFinding *finding = kh_finder_tell (
      f, "hand-fails", hand == f->hand ? KH_SEVERITY_BREAKS : KH_SEVERITY_NOTES, at,
      g_strdup_printf (_ ("The %s does not reach the %s."), kh_finder_hand_words (hand), goal_words (f)),
      dup_end (f, walk));
  kh_finder_add_cell (finding, cell);
}

/* The hand that was not chosen arrives: on cells, which is not yet on the floor. */
static void tell_other (KhFinder *f, KhHand other, const KhHandWalk *mine, const KhHandWalk *theirs)
{
  double at[2];
  const char *words = kh_finder_hand_words (other);
  get_middle (g_array_index (theirs->path, KhCell, theirs->path->len - 1), at);
  GString *effect = g_string_new (NULL);
  if (mine->arrives)
    g_string_append_printf (
        effect, ngettext ("It takes %d step, the %s %d.", "It takes %d steps, the %s %d.", (gulong)theirs->n_steps),
        theirs->n_steps, kh_finder_hand_words (f->hand), mine->n_steps);
  else
    g_string_append_printf (effect, ngettext ("It takes %d step.", "It takes %d steps.", (gulong)theirs->n_steps),
                            theirs->n_steps);
  if (!has_wall_at (f->plan, other))
    g_string_append_printf (
        effect, " %s",
        _ ("But at the start no wall stands at that hand: a robot would drive straight on until it finds one."));
  kh_finder_tell (f, "other-hand", KH_SEVERITY_NOTES, at,
                  g_strdup_printf (mine->arrives ? _ ("On cells the %s reaches the %s too.")
                                                 : _ ("On cells the %s reaches the %s."),
                                   words, goal_words (f)),
                  g_string_free (effect, FALSE));
}

void kh_finder_look_at_hands (KhFinder *f)
{
  KhHand other = f->hand == KH_HAND_RIGHT ? KH_HAND_LEFT : KH_HAND_RIGHT;
  const KhHandWalk *mine = f->walks[f->hand], *theirs = f->walks[other];
  if (!mine || !theirs || (f->plan->marks->len == 0 && !has_exit (f->plan)))
    return;
  if (!mine->arrives)
    tell_failing (f, f->hand);
  else
    kh_finder_tell_sound (
        f, g_strdup_printf (ngettext ("On cells the %s reaches the %s in %d step.",
                                      "On cells the %s reaches the %s in %d steps.", (gulong)mine->n_steps),
                            kh_finder_hand_words (f->hand), goal_words (f), mine->n_steps));
  if (!theirs->arrives)
    tell_failing (f, other);
  else
    tell_other (f, other, mine, theirs);
}
