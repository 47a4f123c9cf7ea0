/* SPDX-License-Identifier: MIT */
#include "layout/finder.h"
#include <glib/gi18n-lib.h>
#include <math.h>

/* The piece (or -1: a bare point) at the walker's rear on the hand's side: the
 * cells a hand walk visits are those of its floor with a corner in that piece
 * (the reasoning of Matthews, Mazes and Labyrinths, 1922, ch. XXI). */
static int piece_at_hand (const KhFinder *f, KhHand hand)
{
  const KhStart *start = &f->plan->start;
  KhHeading side = kh_heading_turned (start->heading, hand == KH_HAND_RIGHT ? 1 : -1),
            back = kh_heading_turned (start->heading, 2);
  int column = start->cell.column + (side == KH_HEADING_EAST || back == KH_HEADING_EAST);
  int row = start->cell.row + (side == KH_HEADING_NORTH || back == KH_HEADING_NORTH);
  return f->layout->piece_of_point[kh_lattice_point_index (&f->plan->lattice, (KhPoint){ column, row })];
}

/* Marks there are, and all of them with corners in this piece of wall only. */
static gboolean marks_touch_only (const KhFinder *f, int piece)
{
  gboolean any = FALSE;
  for (guint i = 0; i < f->plan->marks->len; i++)
    {
      KhCell cell = g_array_index (f->plan->marks, KhMark, i).cell;
      gboolean touches = FALSE;
      for (int k = 0; k < 4; k++)
        {
          KhPoint corner = { cell.column + k % 2, cell.row + k / 2 };
          int at = f->layout->piece_of_point[kh_lattice_point_index (&f->plan->lattice, corner)];
          if (at >= 0 && at != piece)
            return FALSE;
          touches |= at == piece;
        }
      any |= touches;
    }
  return any;
}

static gboolean arrives (const KhFinder *f, KhHand hand) { return f->walks[hand] && f->walks[hand]->arrives; }

/* What the island does to this robot in this plan. */
static char *dup_island_effect (const KhFinder *f, int piece, gboolean *breaks)
{
  const char *hand = kh_finder_hand_words (f->hand);
  *breaks = FALSE;
  if (!f->walks[f->hand])
    return g_strdup (_ ("A robot that holds on to them goes round them for ever."));
  if (!arrives (f, f->hand) && piece_at_hand (f, f->hand) == piece)
    {
      *breaks = TRUE;
      return g_strdup_printf (_ ("The %s holds on to them from the start and goes round them for ever."), hand);
    }
  if (!arrives (f, f->hand) && marks_touch_only (f, piece))
    {
      *breaks = TRUE;
      return g_strdup (_ ("The mark touches only this island: no hand rule from the start gets there."));
    }
  if (arrives (f, f->hand) && piece_at_hand (f, f->hand) == piece)
    return g_strdup_printf (_ ("The %s holds on to them from the start and meets its end on the way round; it is on "
                               "them alone that it depends."),
                            hand);
  if (arrives (f, f->hand))
    return g_strdup_printf (
        _ ("The %s still reaches its end; a robot that loses its wall here can circle them for ever."), hand);
  return g_strdup (_ ("A robot that loses its wall here can circle them for ever."));
}

static KhCell cell_at (const KhPlan *plan, const double at[2])
{
  return (KhCell){ MIN ((int)floor (at[0]), plan->lattice.columns - 1),
                   MIN ((int)floor (at[1]), plan->lattice.rows - 1) };
}

/* The edges of the islands told, for their outline: one pass for all of them. */
static void add_island_edges (KhFinder *f, KhFinding **finding_of_piece, int n_pieces)
{
  const KhLattice *lattice = &f->plan->lattice;
  for (int i = 0; i < kh_lattice_n_edges (lattice); i++)
    {
      KhEdge edge = kh_lattice_edge_at (lattice, i);
      KhPoint ends[2];
      kh_edge_get_points (edge, ends);
      int piece = f->layout->piece_of_point[kh_lattice_point_index (lattice, ends[0])];
      if (piece > 0 && piece < n_pieces && finding_of_piece[piece]
          && (f->plan->walled[i] || kh_plan_is_boundary (f->plan, edge)))
        g_array_append_val (finding_of_piece[piece]->edges, edge);
    }
}

static void tell_islands (KhFinder *f)
{
  const GArray *islands = f->layout->islands;
  int n_pieces = 1 + f->layout->n_points;
  g_autofree KhFinding **finding_of_piece = g_new0 (KhFinding *, n_pieces);
  KhFinding *rest = NULL;
  for (guint i = 0; i < islands->len; i++)
    {
      const KhIsland *island = &g_array_index (islands, KhIsland, i);
      gboolean breaks;
      g_autofree char *effect = dup_island_effect (f, island->piece, &breaks);
      KhCell cell = cell_at (f->plan, island->at);
      if (!breaks && i >= KH_FINDINGS_ONE_BY_ONE)
        {
          guint n = islands->len - KH_FINDINGS_ONE_BY_ONE;
          if (!rest)
            rest = kh_finder_tell (
                f, "island", KH_SEVERITY_HINDERS, island->at,
                g_strdup_printf (
                    ngettext ("%u more island of walls stands free.", "%u more islands of walls stand free.", n), n),
                g_strdup (_ ("A robot that loses its wall beside one of them can circle it for ever.")));
          kh_finder_add_cell (rest, cell);
          finding_of_piece[island->piece] = rest;
          continue;
        }
      g_autofree char *name = kh_cell_dup_name (cell);
      KhFinding *finding
          = kh_finder_tell (f, "island", breaks ? KH_SEVERITY_BREAKS : KH_SEVERITY_HINDERS, island->at,
                            g_strdup_printf (ngettext ("%d wall at %s stands free.", "%d walls round %s stand free.",
                                                       (gulong)island->n_edges),
                                             island->n_edges, name),
                            g_steal_pointer (&effect));
      kh_finder_add_cell (finding, cell);
      finding_of_piece[island->piece] = finding;
    }
  if (islands->len > 0)
    add_island_edges (f, finding_of_piece, n_pieces);
}

/* The first lattice point of a kind, and how many there are: bare ones carry a
 * lone post where posts stand everywhere. */
static int find_bare (const KhFinder *f, double at[2])
{
  const KhLattice *lattice = &f->plan->lattice;
  int n = 0;
  for (int row = 1; row < lattice->rows; row++)
    for (int column = 1; column < lattice->columns; column++)
      {
        gboolean bare = TRUE;
        for (int k = 0; k < 2 && bare; k++)
          bare = !kh_plan_has_wall (f->plan, (KhEdge){ KH_AXIS_X, column - k, row })
                 && !kh_plan_has_wall (f->plan, (KhEdge){ KH_AXIS_Y, column, row - k });
        for (int k = 0; k < 4 && bare; k++)
          bare = kh_plan_has_floor (f->plan, (KhCell){ column - k % 2, row - k / 2 });
        if (bare && n++ == 0)
          {
            at[0] = column;
            at[1] = row;
          }
      }
  return n;
}

static void tell_bare_points (KhFinder *f)
{
  double at[2];
  int n = find_bare (f, at);
  if (n == 0)
    return;
  if (f->plan->walls.posts == KH_POSTS_EVERYWHERE)
    kh_finder_tell (f, "lone-post", KH_SEVERITY_HINDERS, at,
                    g_strdup_printf (ngettext ("%d post stands alone.", "%d posts stand alone.", (gulong)n), n),
                    g_strdup (_ ("A robot that loses its wall beside one can go round it for ever.")));
  else
    kh_finder_tell (
        f, "bare-point", KH_SEVERITY_NOTES, at,
        g_strdup_printf (ngettext ("%d lattice point has floor all round and nothing on it.",
                                   "%d lattice points have floor all round and nothing on them.", (gulong)n),
                         n),
        g_strdup (_ ("A robot has nothing to hold on to there; the hand stays with the walls round the open floor.")));
}

static void tell_off_floor (KhFinder *f)
{
  double at[2] = { 0, 0 };
  int n = 0;
  for (int i = 0; i < kh_lattice_n_edges (&f->plan->lattice); i++)
    {
      KhEdge edge = kh_lattice_edge_at (&f->plan->lattice, i);
      KhCell sides[2];
      kh_edge_get_cells (edge, sides);
      if (f->plan->walled[i] && !kh_plan_has_floor (f->plan, sides[0]) && !kh_plan_has_floor (f->plan, sides[1])
          && n++ == 0)
        kh_finder_get_edge_place (edge, at);
    }
  if (n > 0)
    kh_finder_tell (f, "wall-off-floor", KH_SEVERITY_NOTES, at,
                    g_strdup_printf (ngettext ("%d wall stands where there is no floor.",
                                               "%d walls stand where there is no floor.", (gulong)n),
                                     n),
                    g_strdup (_ ("No robot meets them, but they are cut and built.")));
}

void kh_finder_look_at_walls (KhFinder *f)
{
  const double corner[2] = { 0, 0 };
  if (f->layout->n_regions == 0)
    kh_finder_tell (
        f, "empty", KH_SEVERITY_BREAKS, corner, g_strdup (_ ("The plan has no floor.")),
        g_strdup (_ ("There is nothing to build and nowhere to drive; give cells back with the Floor tool.")));
  else if (f->layout->n_walls == 0)
    kh_finder_tell (f, "empty", KH_SEVERITY_BREAKS, corner, g_strdup (_ ("The plan has no walls.")),
                    g_strdup (_ ("There is nothing to hold a hand on; lay walls, the boundary first.")));
  tell_islands (f);
  tell_bare_points (f);
  tell_off_floor (f);
  if (f->layout->islands->len == 0 && f->layout->n_lone_posts == 0 && f->layout->n_walls > 0)
    kh_finder_tell_sound (f, g_strdup (_ ("All walls hang together with the boundary.")));
}
