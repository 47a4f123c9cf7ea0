/* SPDX-License-Identifier: MIT */
#include "plan/solids.h"
#include "base/units.h"
#include <math.h>

#define FAR 1e9

static double *dup_edges (int n_lines, double pitch, double thickness)
{
  int n = 2 * n_lines + 2;
  double *edges = g_new (double, n);
  edges[0] = -FAR;
  for (int line = 0; line < n_lines; line++)
    {
      edges[1 + 2 * line] = line * pitch - thickness / 2;
      edges[2 + 2 * line] = line * pitch + thickness / 2;
    }
  edges[n - 1] = FAR;
  return edges;
}

static gboolean has_post (const KhPlan *plan, int column, int row)
{
  const KhEdge edges[4] = { { KH_AXIS_X, column, row },
                            { KH_AXIS_X, column - 1, row },
                            { KH_AXIS_Y, column, row },
                            { KH_AXIS_Y, column, row - 1 } };
  for (int k = 0; k < 4; k++)
    if (kh_plan_has_wall (plan, edges[k]))
      return TRUE;
  if (plan->walls.posts != KH_POSTS_EVERYWHERE)
    return FALSE;
  for (int k = 0; k < 4; k++)
    if (kh_plan_has_floor (plan, (KhCell){ column - k % 2, row - k / 2 }))
      return TRUE;
  return FALSE;
}

KhSolids *kh_solids_new (const KhPlan *plan)
{
  const KhLattice *lattice = &plan->lattice;
  KhSolids *solids = g_new (KhSolids, 1);
  solids->n_x = 2 * lattice->columns + 3;
  solids->n_y = 2 * lattice->rows + 3;
  solids->pitch = kh_mm_from_nm (lattice->pitch_nm);
  solids->thickness = kh_mm_from_nm (plan->walls.thickness_nm);
  solids->edge_x = dup_edges (lattice->columns + 1, solids->pitch, solids->thickness);
  solids->edge_y = dup_edges (lattice->rows + 1, solids->pitch, solids->thickness);
  solids->band = g_new (guint8, (gsize)solids->n_x * (gsize)solids->n_y);
  for (int j = 0; j < solids->n_y; j++)
    for (int i = 0; i < solids->n_x; i++)
      {
        guint8 *band = &solids->band[(gsize)j * (gsize)solids->n_x + (gsize)i];
        int column = (i - 1) / 2, row = (j - 1) / 2;
        gboolean post_x = i % 2 == 1, post_y = j % 2 == 1;
        if (i == 0 || j == 0 || i == solids->n_x - 1 || j == solids->n_y - 1)
          *band = KH_BAND_OUTSIDE;
        else if (post_x && post_y)
          *band = has_post (plan, column, row) ? KH_BAND_WALL : KH_BAND_FREE;
        else if (post_y)
          *band = kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_X, column, row }) ? KH_BAND_WALL : KH_BAND_FREE;
        else if (post_x)
          *band = kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_Y, column, row }) ? KH_BAND_WALL : KH_BAND_FREE;
        else
          *band = KH_BAND_FREE;
      }
  return solids;
}

void kh_solids_free (KhSolids *solids)
{
  if (!solids)
    return;
  g_free (solids->edge_x);
  g_free (solids->edge_y);
  g_free (solids->band);
  g_free (solids);
}

int kh_solids_find_band (const KhSolids *solids, double mm, int n_bands)
{
  double from = mm + solids->thickness / 2;
  double line = floor (from / solids->pitch);
  if (!(line >= 0))
    return 0;
  if (line > n_bands)
    return n_bands - 1;
  int band = 1 + 2 * (int)line + (from - line * solids->pitch >= solids->thickness);
  return MIN (band, n_bands - 1);
}

KhBox kh_solids_get_box (const KhSolids *solids, int i, int j)
{
  return (KhBox){ solids->edge_x[i], solids->edge_y[j], solids->edge_x[i + 1], solids->edge_y[j + 1] };
}

GArray *kh_solids_dup_boxes (const KhSolids *solids)
{
  GArray *boxes = g_array_new (FALSE, FALSE, sizeof (KhBox));
  for (int j = 1; j < solids->n_y - 1; j++)
    for (int i = 1; i < solids->n_x - 1; i++)
      if (solids->band[(gsize)j * (gsize)solids->n_x + (gsize)i] == KH_BAND_WALL)
        {
          KhBox box = kh_solids_get_box (solids, i, j);
          g_array_append_val (boxes, box);
        }
  return boxes;
}
