/* SPDX-License-Identifier: MIT */
#include "layout/finder.h"
#include <glib/gi18n-lib.h>

#define MOST_CELLS_NAMED 12

static void tell_pockets (KhFinder *f)
{
  const KhLayout *layout = f->layout;
  if (layout->start_region < 0)
    return;
  if (layout->n_pockets == 0)
    {
      int n = layout->n_cells;
      for (int i = 0; i < layout->n_cells; i++)
        n -= f->plan->gap[i];
      kh_finder_tell_sound (f, g_strdup_printf (ngettext ("The one cell is the start's.",
                                                          "All %d cells can be reached from the start.", (gulong)n),
                                                n));
      return;
    }
  int first = 0;
  while (layout->region_of_cell[first] < 0 || layout->region_of_cell[first] == layout->start_region)
    first++;
  KhCell cell = kh_lattice_cell_at (&f->plan->lattice, first);
  const double at[2] = { cell.column + 0.5, cell.row + 0.5 };
  g_autofree char *name = kh_cell_dup_name (cell);
  KhFinding *finding
      = kh_finder_tell (f, "pocket", KH_SEVERITY_HINDERS, at,
                        g_strdup_printf (ngettext ("%d cell cannot be reached from the start: %s.",
                                                   "%d cells cannot be reached from the start, %s among them.",
                                                   (gulong)layout->n_pocket_cells),
                                         layout->n_pocket_cells, name),
                        g_strdup (_ ("No robot gets there. Take a wall away to open it, or take its floor away.")));
  for (int i = first; i < layout->n_cells && finding->cells->len < MOST_CELLS_NAMED; i++)
    if (layout->region_of_cell[i] >= 0 && layout->region_of_cell[i] != layout->start_region)
      kh_finder_add_cell (finding, kh_lattice_cell_at (&f->plan->lattice, i));
}

/* Floor that does not hang together even without its walls. */
static int count_floor_pieces (const KhPlan *plan, double at[2])
{
  const KhLattice *lattice = &plan->lattice;
  gsize n = (gsize)kh_lattice_n_cells (lattice), n_pieces = 0;
  g_autofree guint8 *seen = g_malloc0 (n);
  g_autofree int *stack = g_new (int, n);
  for (gsize from = 0; from < n; from++)
    {
      gsize depth = 0;
      if (plan->gap[from] || seen[from])
        continue;
      if (++n_pieces == 2)
        {
          KhCell cell = kh_lattice_cell_at (lattice, (int)from);
          at[0] = cell.column + 0.5;
          at[1] = cell.row + 0.5;
        }
      seen[from] = 1;
      stack[depth++] = (int)from;
      while (depth > 0)
        {
          KhCell cell = kh_lattice_cell_at (lattice, stack[--depth]);
          for (int h = 0; h < KH_N_HEADINGS; h++)
            {
              KhCell next = kh_cell_neighbour (cell, (KhHeading)h);
              int to = kh_plan_has_floor (plan, next) ? kh_lattice_cell_index (lattice, next) : -1;
              if (to >= 0 && !seen[to])
                {
                  seen[to] = 1;
                  stack[depth++] = to;
                }
            }
        }
    }
  return (int)n_pieces;
}

static void tell_pieces (KhFinder *f)
{
  double at[2];
  int n = count_floor_pieces (f->plan, at);
  if (n > 1)
    kh_finder_tell (
        f, "floor-in-pieces", KH_SEVERITY_HINDERS, at, g_strdup_printf (_ ("The floor is in %d pieces."), n),
        g_strdup (
            _ ("No robot comes from one to another; give back the cells between them, or make a plan for each.")));
}

static gboolean walk_leaves_at (const KhFinder *f, KhEdge edge)
{
  const KhHandWalk *walk = f->walks[f->hand];
  return walk && walk->ends == KH_WALK_ENDS_OUT && walk->out_edge.axis == edge.axis
         && walk->out_edge.column == edge.column && walk->out_edge.row == edge.row;
}

static void tell_leaks (KhFinder *f)
{
  const GArray *leaks = f->layout->leaks;
  if (leaks->len == 0 && f->layout->n_regions > 0)
    kh_finder_tell_sound (f, g_strdup (_ ("No edge of the floor is open without being declared.")));
  KhFinding *rest = NULL;
  for (guint i = 0; i < leaks->len; i++)
    {
      KhEdge edge = g_array_index (leaks, KhEdge, i);
      double at[2];
      kh_finder_get_edge_place (edge, at);
      gboolean leaves = walk_leaves_at (f, edge);
      KhFinding *finding = rest;
      if (leaves || i < KH_FINDINGS_ONE_BY_ONE)
        {
          g_autofree char *name = kh_finder_dup_edge_name (f->plan, edge);
          finding = kh_finder_tell (
              f, "leak", leaves ? KH_SEVERITY_BREAKS : KH_SEVERITY_HINDERS, at,
              g_strdup_printf (_ ("The boundary is open at %s and no opening is declared there."), name),
              leaves ? g_strdup_printf (_ ("The %s leaves the maze here. Lay a wall, or declare an opening."),
                                        kh_finder_hand_words (f->hand))
                     : g_strdup (_ ("A robot that comes by can leave the maze. Lay a wall, or declare an opening.")));
        }
      else if (!rest)
        {
          guint n = leaks->len - i;
          rest = finding = kh_finder_tell (
              f, "leak", KH_SEVERITY_HINDERS, at,
              g_strdup_printf (
                  ngettext ("The boundary is open at %u more edge.", "The boundary is open at %u more edges.", n), n),
              g_strdup (_ ("A robot that comes by can leave the maze. Lay walls, or declare openings.")));
        }
      g_array_append_val (finding->edges, edge);
    }
}

static const char *use_words (KhOpeningUse use)
{
  static const char *const words[] = { N_ ("entrance"), N_ ("exit"), N_ ("opening") };
  return _ (words[use]);
}

static void tell_openings (KhFinder *f)
{
  for (guint i = 0; i < f->plan->openings->len; i++)
    {
      const KhOpening *opening = &g_array_index (f->plan->openings, KhOpening, i);
      gboolean boundary = kh_plan_is_boundary (f->plan, opening->edge);
      double at[2];
      if (boundary && !kh_plan_has_wall (f->plan, opening->edge))
        continue;
      kh_finder_get_edge_place (opening->edge, at);
      g_autofree char *name = kh_finder_dup_edge_name (f->plan, opening->edge);
      KhFinding *finding = boundary ? kh_finder_tell (
                               f, "opening-walled", KH_SEVERITY_HINDERS, at,
                               g_strdup_printf (_ ("The %s at %s has a wall in it."), use_words (opening->use), name),
                               g_strdup (_ ("No robot gets through. Take the wall away, or the opening.")))
                                    : kh_finder_tell (f, "opening-inside", KH_SEVERITY_HINDERS, at,
                                                      g_strdup_printf (_ ("The %s at %s is no longer on the boundary."),
                                                                       use_words (opening->use), name),
                                                      g_strdup (_ ("It has no meaning inside; take it away.")));
      g_array_append_val (finding->edges, opening->edge);
    }
}

void kh_finder_look_at_floor (KhFinder *f)
{
  tell_pieces (f);
  tell_pockets (f);
  tell_leaks (f);
  tell_openings (f);
}
