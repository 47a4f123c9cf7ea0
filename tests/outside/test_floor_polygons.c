/* SPDX-License-Identifier: MIT */
/* The floor as a polygon (GEOS): as many outer rings as regions of floor, as many holes as pieces of wall but the boundary's. */
#include "../cmocka_all.h"
#include "../exhaust/layouts.h"
#include "layout/layout.h"
#include "mazes.h"
#include <geos_c.h>

static GEOSGeometry *box_new (double x0, double y0, double x1, double y1)
{
  GEOSCoordSequence *s = GEOSCoordSeq_create (5, 2);
  const double x[5] = { x0, x1, x1, x0, x0 }, y[5] = { y0, y0, y1, y1, y0 };
  for (unsigned i = 0; i < 5; i++)
    GEOSCoordSeq_setXY (s, i, x[i], y[i]);
  return GEOSGeom_createPolygon (GEOSGeom_createLinearRing (s), NULL, 0);
}

static GEOSGeometry *union_take (GPtrArray *boxes)
{
  GEOSGeometry *all = GEOSGeom_createCollection (GEOS_MULTIPOLYGON, (GEOSGeometry **) boxes->pdata, boxes->len);
  GEOSGeometry *one = GEOSUnaryUnion (all);
  GEOSGeom_destroy (all);
  g_ptr_array_unref (boxes);
  return one;
}

/* Cells of floor as whole squares, in units of half a wall: pitch 30, thickness 2. */
static GEOSGeometry *floor_new (const KhPlan *plan)
{
  GPtrArray *boxes = g_ptr_array_new ();
  for (int i = 0; i < kh_lattice_n_cells (&plan->lattice); i++)
    if (!plan->gap[i])
      {
        KhCell c = kh_lattice_cell_at (&plan->lattice, i);
        g_ptr_array_add (boxes, box_new (30 * c.column, 30 * c.row, 30 * c.column + 30, 30 * c.row + 30));
      }
  return union_take (boxes);
}

/* All that counts as wall: walled edges, the boundary open or not, lone posts. */
static GEOSGeometry *walls_new (const KhPlan *plan)
{
  GPtrArray *boxes = g_ptr_array_new ();
  for (int i = 0; i < kh_lattice_n_edges (&plan->lattice); i++)
    {
      KhEdge e = kh_lattice_edge_at (&plan->lattice, i);
      if (plan->walled[i] || kh_plan_is_boundary (plan, e))
        g_ptr_array_add (boxes, box_new (30 * e.column - 1, 30 * e.row - 1, 30 * e.column + (e.axis == KH_AXIS_X ? 31 : 1), 30 * e.row + (e.axis == KH_AXIS_Y ? 31 : 1)));
    }
  for (int i = 0; plan->walls.posts == KH_POSTS_EVERYWHERE && i < kh_lattice_n_points (&plan->lattice); i++)
    {
      KhPoint p = kh_lattice_point_at (&plan->lattice, i);
      g_ptr_array_add (boxes, box_new (30 * p.column - 1, 30 * p.row - 1, 30 * p.column + 1, 30 * p.row + 1));
    }
  return union_take (boxes);
}

static void assert_as_polygon (const KhPlan *plan)
{
  g_autoptr (KhLayout) layout = kh_layout_new (plan);
  if (layout->n_regions == 0)
    return;
  GEOSGeometry *ground = floor_new (plan), *walls = walls_new (plan), *open = GEOSDifference (ground, walls);
  int n_rings = GEOSGetNumGeometries (open), n_holes = 0;
  for (int i = 0; i < n_rings; i++)
    n_holes += GEOSGetNumInteriorRings (GEOSGetGeometryN (open, i));
  assert_int_equal (n_rings, layout->n_regions);
  assert_int_equal (n_holes, layout->n_components - 1 + layout->n_lone_posts);
  GEOSGeom_destroy (open);
  GEOSGeom_destroy (walls);
  GEOSGeom_destroy (ground);
}

static void every_layout_of_three_by_three (void **state)
{
  int edges[16];
  g_autoptr (KhPlan) plan = hall_new (3, 3);
  int n = inner_edges (plan, edges);
  for (unsigned layout = 0; layout < 1u << n; layout++)
    {
      set_layout (plan, edges, n, layout);
      assert_as_polygon (plan);
    }
}

/* With gaps, openings, leaks, lone posts. */
static void random_layouts_of_eight_by_eight (void **state)
{
  for (uint64_t seed = 1; seed <= 250; seed++)
    {
      g_autoptr (KhPlan) plan = kh_test_layout_new (8, 8, 0.15 + 0.5 * (double) (seed % 10) / 10, seed);
      assert_as_polygon (plan);
    }
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (every_layout_of_three_by_three),
    cmocka_unit_test (random_layouts_of_eight_by_eight),
  };
  initGEOS (NULL, NULL);
  int failed = cmocka_run_group_tests (tests, NULL, NULL);
  finishGEOS ();
  return failed;
}
