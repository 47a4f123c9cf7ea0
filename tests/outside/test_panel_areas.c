/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "base/random.h"
#include "base/units.h"
#include "panels/cutlist.h"
#include <geos_c.h>

/* Butt joints against a polygon library (GEOS): the panels of random wall sets
 * together are the wall figure, with no gap, no overlap and nothing outside. */

static GEOSGeometry *make_box (GEOSContextHandle_t geos, const int64_t nm[4])
{
  return GEOSGeom_createRectangle_r (geos, kh_mm_from_nm (nm[0]), kh_mm_from_nm (nm[1]), kh_mm_from_nm (nm[2]),
                                     kh_mm_from_nm (nm[3]));
}

static GEOSGeometry *unite_take (GEOSContextHandle_t geos, GEOSGeometry **parts, guint n)
{
  GEOSGeometry *all = GEOSGeom_createCollection_r (geos, GEOS_GEOMETRYCOLLECTION, parts, n);
  GEOSGeometry *united = GEOSUnaryUnion_r (geos, all);
  GEOSGeom_destroy_r (geos, all);
  return united;
}

static double get_area (GEOSContextHandle_t geos, const GEOSGeometry *geometry)
{
  double area = -1;
  assert_int_equal (GEOSArea_r (geos, geometry, &area), 1);
  return area;
}

static int count_walls (const KhPlan *plan, KhPoint p)
{
  return kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_X, p.column, p.row })
         + kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_X, p.column - 1, p.row })
         + kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_Y, p.column, p.row })
         + kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_Y, p.column, p.row - 1 });
}

/* The figure, wall by wall: half a thickness round each, but for free ends that are flush. */
static GEOSGeometry *make_figure (GEOSContextHandle_t geos, const KhPlan *plan)
{
  g_autoptr (GPtrArray) boxes = g_ptr_array_new ();
  int64_t half = plan->walls.thickness_nm / 2, pitch = plan->lattice.pitch_nm;
  for (int i = 0; i < kh_lattice_n_edges (&plan->lattice); i++)
    {
      KhEdge edge = kh_lattice_edge_at (&plan->lattice, i);
      KhPoint ends[2];
      if (!plan->walled[i])
        continue;
      kh_edge_get_points (edge, ends);
      int64_t more[2];
      for (int k = 0; k < 2; k++)
        more[k] = plan->build.ends == KH_ENDS_FLUSH && count_walls (plan, ends[k]) == 1 ? 0 : half;
      gboolean x = edge.axis == KH_AXIS_X;
      int64_t box[4] = { ends[0].column * pitch - (x ? more[0] : half), ends[0].row * pitch - (x ? half : more[0]),
                         ends[1].column * pitch + (x ? more[1] : half), ends[1].row * pitch + (x ? half : more[1]) };
      g_ptr_array_add (boxes, make_box (geos, box));
    }
  return unite_take (geos, (GEOSGeometry **)boxes->pdata, boxes->len);
}

static void compare (GEOSContextHandle_t geos, const KhPlan *plan, unsigned seed)
{
  g_autoptr (GError) error = NULL;
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, &error);
  if (!list)
    fail_msg ("seed %u: %s", seed, error->message);
  g_autoptr (GPtrArray) boxes = g_ptr_array_new ();
  double sum = 0;
  for (guint i = 0; i < list->panels->len; i++)
    {
      int64_t box[4];
      kh_panel_get_box_nm (&g_array_index (list->panels, KhPanel, i), plan, box);
      g_ptr_array_add (boxes, make_box (geos, box));
      sum += get_area (geos, g_ptr_array_index (boxes, i));
    }
  GEOSGeometry *panels = unite_take (geos, (GEOSGeometry **)boxes->pdata, boxes->len);
  GEOSGeometry *figure = make_figure (geos, plan);
  GEOSGeometry *apart = GEOSSymDifference_r (geos, panels, figure);
  /* Whole and half millimetres: the library's doubles are exact. */
  if (get_area (geos, apart) > 0 || get_area (geos, panels) < sum || get_area (geos, panels) > sum)
    fail_msg ("seed %u: panels %g in all, %g together, %g beside the figure", seed, sum, get_area (geos, panels),
              get_area (geos, apart));
  GEOSGeom_destroy_r (geos, panels);
  GEOSGeom_destroy_r (geos, figure);
  GEOSGeom_destroy_r (geos, apart);
}

static void panels_are_the_figure (void **state)
{
  GEOSContextHandle_t geos = GEOS_init_r ();
  for (unsigned seed = 0; seed < 300; seed++)
    {
      KhRandomKey key = { 20250 + seed, 0 };
      int columns = 1 + (int)kh_random_below (key, 0, 0, 8), rows = 1 + (int)kh_random_below (key, 0, 1, 8);
      g_autoptr (KhPlan) plan = kh_plan_new (columns, rows, 180 * KH_NM_PER_MM, 12 * KH_NM_PER_MM, 50 * KH_NM_PER_MM);
      uint32_t share = 10 + kh_random_below (key, 0, 2, 90);
      int n_walls = 0;
      for (int i = 0; i < kh_lattice_n_edges (&plan->lattice); i++)
        n_walls += plan->walled[i] = kh_random_below (key, 1, (uint64_t)i, 100) < share;
      if (n_walls == 0)
        continue;
      plan->walls.thickness_nm = (2 + kh_random_below (key, 0, 3, 60)) * KH_NM_PER_MM;
      plan->build.ends = kh_random_below (key, 0, 4, 2) ? KH_ENDS_FULL : KH_ENDS_FLUSH;
      plan->build.longest_panel_nm = (250 + kh_random_below (key, 0, 5, 1500)) * KH_NM_PER_MM;
      compare (geos, plan, seed);
    }
  GEOS_finish_r (geos);
}

/* 3 x 3, 180/12: boundary only 25 920 mm2; with one wall (1,1)-(2,1) 28 224 mm2 (computed for this project; GEOS here).
 */
static void areas_of_the_3_by_3 (void **state)
{
  GEOSContextHandle_t geos = GEOS_init_r ();
  g_autoptr (KhPlan) plan = kh_plan_new (3, 3, 180 * KH_NM_PER_MM, 12 * KH_NM_PER_MM, 50 * KH_NM_PER_MM);
  for (int with = 0; with < 2; with++)
    {
      plan->walled[kh_lattice_edge_index (&plan->lattice, (KhEdge){ KH_AXIS_X, 1, 1 })] = (guint8)with;
      GEOSGeometry *figure = make_figure (geos, plan);
      assert_true (get_area (geos, figure) == (with ? 28224.0 : 25920.0));
      GEOSGeom_destroy_r (geos, figure);
      compare (geos, plan, 0);
    }
  GEOS_finish_r (geos);
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (panels_are_the_figure),
    cmocka_unit_test (areas_of_the_3_by_3),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
