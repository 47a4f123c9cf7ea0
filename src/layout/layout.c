/* SPDX-License-Identifier: MIT */
#include "layout/layout.h"
#include <string.h>

/* Union-find with path halving (Tarjan & van Leeuwen, J. ACM 31, 1984). */
static int find (int *parent, int i)
{
  while (parent[i] != i)
    i = parent[i] = parent[parent[i]];
  return i;
}

static void join (int *parent, int a, int b)
{
  a = find (parent, a);
  b = find (parent, b);
  if (a != b)
    parent[MAX (a, b)] = MIN (a, b);
}

/* What an edge is, worked out once for all that follows. */
enum
{
  EDGE_STANDS = 1, /* walled, or boundary: counts as wall */
  EDGE_LEAKS = 2,  /* boundary, open and not declared */
  EDGE_OPENING = 4 /* boundary and declared */
};

typedef struct
{
  const KhPlan *plan;
  KhLayout *layout;
  guint8 *edges;
  int *parent;     /* points, and the outside as the last */
  guint8 *touched; /* a point each: something stands on it */
} Work;

static void look_at_edges (Work *w)
{
  const KhLattice *lattice = &w->plan->lattice;
  int n = kh_lattice_n_edges (lattice);
  g_autofree guint8 *declared = g_malloc0 ((gsize)n);
  for (guint i = 0; i < w->plan->openings->len; i++)
    declared[kh_lattice_edge_index (lattice, g_array_index (w->plan->openings, KhOpening, i).edge)] = 1;
  for (int i = 0; i < n; i++)
    {
      KhEdge edge = kh_lattice_edge_at (lattice, i);
      gboolean boundary = kh_plan_is_boundary (w->plan, edge);
      w->layout->n_walls += w->plan->walled[i];
      if (w->plan->walled[i] || boundary)
        w->edges[i] |= EDGE_STANDS;
      if (boundary && declared[i])
        {
          w->edges[i] |= EDGE_OPENING;
          w->layout->n_openings++;
        }
      else if (boundary && !w->plan->walled[i])
        {
          w->edges[i] |= EDGE_LEAKS;
          w->layout->n_leaks++;
          g_array_append_val (w->layout->leaks, edge);
        }
    }
}

static void touch (Work *w, int point, int with)
{
  w->touched[point] = 1;
  join (w->parent, point, with);
}

static void join_points (Work *w)
{
  const KhLattice *lattice = &w->plan->lattice;
  int outside = kh_lattice_n_points (lattice);
  for (int c = 0; c <= lattice->columns; c++)
    {
      touch (w, kh_lattice_point_index (lattice, (KhPoint){ c, 0 }), outside);
      touch (w, kh_lattice_point_index (lattice, (KhPoint){ c, lattice->rows }), outside);
    }
  for (int r = 0; r <= lattice->rows; r++)
    {
      touch (w, kh_lattice_point_index (lattice, (KhPoint){ 0, r }), outside);
      touch (w, kh_lattice_point_index (lattice, (KhPoint){ lattice->columns, r }), outside);
    }
  for (int i = 0; i < kh_lattice_n_edges (lattice); i++)
    if (w->edges[i] & EDGE_STANDS)
      {
        KhPoint ends[2];
        kh_edge_get_points (kh_lattice_edge_at (lattice, i), ends);
        int low = kh_lattice_point_index (lattice, ends[0]), high = kh_lattice_point_index (lattice, ends[1]);
        touch (w, low, high);
        touch (w, high, low);
      }
  for (int i = 0; i < kh_lattice_n_cells (lattice); i++)
    if (w->plan->gap[i])
      {
        KhCell cell = kh_lattice_cell_at (lattice, i);
        int first = kh_lattice_point_index (lattice, (KhPoint){ cell.column, cell.row });
        const int corners[3] = { first + 1, first + lattice->columns + 1, first + lattice->columns + 2 };
        w->touched[first] = 1;
        for (int k = 0; k < 3; k++)
          touch (w, corners[k], first);
      }
}

/* Pieces numbered in the order of their first point; the boundary piece is 0.
 * A bare point carries a lone post where posts stand everywhere. */
static int number_pieces (Work *w)
{
  KhLayout *layout = w->layout;
  int outside = layout->n_points, n = 1;
  g_autofree int *number = g_new (int, outside + 1);
  memset (number, -1, sizeof (int) * (gsize)(outside + 1));
  number[find (w->parent, outside)] = 0;
  for (int point = 0; point < outside; point++)
    {
      gboolean lone = !w->touched[point] && w->plan->walls.posts == KH_POSTS_EVERYWHERE;
      if (!w->touched[point] && !lone)
        {
          layout->piece_of_point[point] = -1;
          layout->n_bare_points++;
          continue;
        }
      int root = find (w->parent, point);
      if (number[root] < 0)
        number[root] = n++;
      layout->piece_of_point[point] = number[root];
      layout->n_lone_posts += lone;
    }
  return n;
}

/* A cell of floor at the edge; where there is none, the cell north-east of its low end. */
static KhCell cell_beside (const KhPlan *plan, KhEdge edge)
{
  KhCell sides[2];
  kh_edge_get_cells (edge, sides);
  return kh_plan_has_floor (plan, sides[0]) && !kh_plan_has_floor (plan, sides[1]) ? sides[0] : sides[1];
}

static int compare_islands (gconstpointer a, gconstpointer b)
{
  const KhIsland *x = a, *y = b;
  return x->n_edges != y->n_edges ? y->n_edges - x->n_edges : x->piece - y->piece;
}

static void find_islands (Work *w, int n_pieces)
{
  const KhLattice *lattice = &w->plan->lattice;
  g_autofree KhIsland *all = g_new0 (KhIsland, n_pieces);
  g_autofree int *bounds = g_new (int, 4 * n_pieces); /* least and most column, row of points */
  for (int i = 0; i < kh_lattice_n_edges (lattice); i++)
    {
      if (!(w->edges[i] & EDGE_STANDS))
        continue;
      KhEdge edge = kh_lattice_edge_at (lattice, i);
      KhPoint ends[2];
      kh_edge_get_points (edge, ends);
      int piece = w->layout->piece_of_point[kh_lattice_point_index (lattice, ends[0])];
      int *b = bounds + 4 * piece;
      if (all[piece].n_edges++ == 0)
        {
          all[piece].cell = cell_beside (w->plan, edge);
          b[0] = b[1] = ends[0].column;
          b[2] = b[3] = ends[0].row;
        }
      for (int k = 0; k < 2; k++)
        {
          b[0] = MIN (b[0], ends[k].column);
          b[1] = MAX (b[1], ends[k].column);
          b[2] = MIN (b[2], ends[k].row);
          b[3] = MAX (b[3], ends[k].row);
        }
    }
  for (int piece = 1; piece < n_pieces; piece++)
    if (all[piece].n_edges > 0)
      {
        const int *b = bounds + 4 * piece;
        all[piece].piece = piece;
        all[piece].at[0] = 0.5 * (b[0] + b[1]);
        all[piece].at[1] = 0.5 * (b[2] + b[3]);
        g_array_append_val (w->layout->islands, all[piece]);
      }
  g_array_sort (w->layout->islands, compare_islands);
  w->layout->n_components = 1 + (int)w->layout->islands->len;
}

/* Regions of floor, numbered in the order of their first cell, and the cells in
 * the order of their regions (counting sort). */
static int *find_regions (Work *w)
{
  const KhLattice *lattice = &w->plan->lattice;
  KhLayout *layout = w->layout;
  int n = layout->n_cells;
  g_autofree int *parent = g_new (int, n);
  g_autofree int *number = g_new (int, n);
  for (int i = 0; i < n; i++)
    {
      parent[i] = i;
      number[i] = -1;
    }
  for (int i = 0; i < n; i++)
    {
      KhCell cell = kh_lattice_cell_at (lattice, i);
      if (kh_plan_has_passage (w->plan, kh_cell_edge (cell, KH_HEADING_EAST)))
        join (parent, i, i + 1);
      if (kh_plan_has_passage (w->plan, kh_cell_edge (cell, KH_HEADING_NORTH)))
        join (parent, i, i + lattice->columns);
    }
  g_autoptr (GArray) sizes = g_array_new (FALSE, TRUE, sizeof (int));
  for (int i = 0; i < n; i++)
    {
      layout->region_of_cell[i] = -1;
      if (w->plan->gap[i])
        continue;
      int root = find (parent, i);
      if (number[root] < 0)
        {
          number[root] = layout->n_regions++;
          g_array_set_size (sizes, (guint)layout->n_regions);
        }
      layout->region_of_cell[i] = number[root];
      g_array_index (sizes, int, number[root])++;
    }
  int *order = g_new (int, n), at = 0;
  for (int r = 0; r < layout->n_regions; r++)
    {
      int size = g_array_index (sizes, int, r);
      g_array_index (sizes, int, r) = at;
      at += size;
    }
  for (int i = 0; i < n; i++)
    if (layout->region_of_cell[i] >= 0)
      order[g_array_index (sizes, int, layout->region_of_cell[i])++] = i;
  return order;
}

/* Loops of a region: the pieces that touch it, less one. */
static void count_loops (Work *w, const int *order, int n_pieces)
{
  const KhLattice *lattice = &w->plan->lattice;
  KhLayout *layout = w->layout;
  g_autofree int *seen = g_new (int, n_pieces);
  memset (seen, -1, sizeof (int) * (gsize)n_pieces);
  layout->loops_of_region = g_new (int, MAX (layout->n_regions, 1));
  for (int r = 0; r < layout->n_regions; r++)
    layout->loops_of_region[r] = -1;
  int n_floor = 0;
  for (int i = 0; i < layout->n_cells; i++)
    n_floor += layout->region_of_cell[i] >= 0;
  for (int i = 0; i < n_floor; i++)
    {
      KhCell cell = kh_lattice_cell_at (lattice, order[i]);
      int region = layout->region_of_cell[order[i]];
      int first = kh_lattice_point_index (lattice, (KhPoint){ cell.column, cell.row });
      const int corners[4] = { first, first + 1, first + lattice->columns + 1, first + lattice->columns + 2 };
      for (int k = 0; k < 4; k++)
        {
          int piece = layout->piece_of_point[corners[k]];
          if (piece >= 0 && seen[piece] != region)
            {
              seen[piece] = region;
              layout->loops_of_region[region]++;
            }
        }
    }
}

static void sum_up (KhLayout *layout, const KhPlan *plan)
{
  layout->start_region = -1;
  if (plan->has_start && kh_plan_has_floor (plan, plan->start.cell))
    layout->start_region = layout->region_of_cell[kh_lattice_cell_index (&plan->lattice, plan->start.cell)];
  for (int r = 0; r < layout->n_regions; r++)
    if (layout->start_region < 0 || r == layout->start_region)
      layout->n_loops += layout->loops_of_region[r];
  if (layout->start_region >= 0)
    {
      layout->n_pockets = layout->n_regions - 1;
      for (int i = 0; i < layout->n_cells; i++)
        layout->n_pocket_cells += layout->region_of_cell[i] >= 0 && layout->region_of_cell[i] != layout->start_region;
    }
  layout->simply_connected = layout->n_regions == 1 && layout->islands->len == 0 && layout->n_lone_posts == 0;
}

KhLayout *kh_layout_new (const KhPlan *plan)
{
  KhLayout *layout = g_new0 (KhLayout, 1);
  layout->n_points = kh_lattice_n_points (&plan->lattice);
  layout->n_cells = kh_lattice_n_cells (&plan->lattice);
  layout->islands = g_array_new (FALSE, FALSE, sizeof (KhIsland));
  layout->leaks = g_array_new (FALSE, FALSE, sizeof (KhEdge));
  layout->piece_of_point = g_new (int, layout->n_points);
  layout->region_of_cell = g_new (int, layout->n_cells);
  Work w = { plan, layout, g_malloc0 ((gsize)kh_lattice_n_edges (&plan->lattice)), g_new (int, layout->n_points + 1),
             g_malloc0 ((gsize)layout->n_points) };
  for (int i = 0; i <= layout->n_points; i++)
    w.parent[i] = i;
  look_at_edges (&w);
  join_points (&w);
  int n_pieces = number_pieces (&w);
  find_islands (&w, n_pieces);
  g_autofree int *order = find_regions (&w);
  count_loops (&w, order, n_pieces);
  sum_up (layout, plan);
  g_free (w.edges);
  g_free (w.parent);
  g_free (w.touched);
  return layout;
}

void kh_layout_free (KhLayout *layout)
{
  if (!layout)
    return;
  g_array_unref (layout->islands);
  g_array_unref (layout->leaks);
  g_free (layout->piece_of_point);
  g_free (layout->region_of_cell);
  g_free (layout->loops_of_region);
  g_free (layout);
}
