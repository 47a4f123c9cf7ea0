/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/finding.h"
#include "plan/plan.h"

/* What a layout is: pieces of wall, regions of floor, loops, the verdict.
 *
 * Walls hang together through lattice points they share.  For this a boundary
 * edge (floor on one side, none on the other) counts as wall, open or not; the
 * four corners of a gap hang together; all points on the lattice's border hang
 * together with the outside.  With posts everywhere a bare inner point that
 * touches floor carries a lone post, a piece of its own.  The piece with the
 * outside is the boundary piece; each other piece of walls is an island.
 * Union-find over points and cells, one pass each (Tarjan 1975): linear. */

typedef struct
{
  int n_edges; /* walled edges of the island (a gap in the floor: its boundary edges count too) */
  int piece;   /* as in piece_of_point */
  KhCell cell; /* a cell of floor beside it: the place people are told */
  double at[2]; /* lattice units, its middle */
} KhIsland;

typedef struct
{
  int n_walls;
  int n_components;    /* 1 + islands */
  GArray *islands;     /* of KhIsland, largest first */
  int n_lone_posts;
  int n_regions;       /* of floor */
  int n_pockets, n_pocket_cells;
  int n_loops;         /* of the region of the start */
  int n_openings, n_leaks;
  gboolean simply_connected;
  int start_region;    /* -1: no start, or it has no floor */
  int *piece_of_point; /* a number a point; 0 = boundary piece; -1 = bare */
  int *region_of_cell; /* a number a cell; -1 = gap */
  int *loops_of_region; /* n_regions of them */
  int n_bare_points;   /* inner points with floor all round and nothing on them */
  GArray *leaks;       /* of KhEdge */
  int n_points, n_cells;
} KhLayout;

KhLayout *kh_layout_new (const KhPlan *plan);
void kh_layout_free (KhLayout *layout);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhLayout, kh_layout_free)
