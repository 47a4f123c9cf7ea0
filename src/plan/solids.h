/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/geometry.h"
#include "plan/plan.h"

/* The wall figure a robot drives among, exact, as a grid of bands.
 *
 *        post  panel   post  panel   post          Bands along x and along y are
 *        +--+---------+--+---------+--+            alternately t (posts, and panels
 *  post  |##|#########|##|         |##|            across) and p - t wide. A post square
 *        +--+---------+--+---------+--+            is filled when a wall touches its
 *  panel |##|  floor  |  |  floor  |##|            point, or where posts stand
 *        +--+---------+--+---------+--+            everywhere and it touches floor.
 *  post  |##|#########|##|#########|##|
 *        +--+---------+--+---------+--+            Round it lies one ring of KH_BAND_OUTSIDE,
 *                                                  so that a ray needs no test of bounds.
 *
 * Millimetres. n_x = 2 columns + 3 bands along x, the ring included; band i
 * lies between edge_x[i] and edge_x[i + 1]. Owned by the caller; holds no
 * pointer into the plan; may be read by any number of threads. */

enum { KH_BAND_FREE = 0, KH_BAND_WALL = 1, KH_BAND_OUTSIDE = 2 };

typedef struct
{
  int n_x, n_y;
  double pitch, thickness;
  double *edge_x, *edge_y; /* n_x + 1 and n_y + 1 of them */
  guint8 *band;            /* [j * n_x + i] */
} KhSolids;

KhSolids *kh_solids_new (const KhPlan *plan);
void kh_solids_free (KhSolids *solids);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhSolids, kh_solids_free)

/* The band a coordinate lies in; 0 or n - 1 (the ring) when outside. */
int kh_solids_find_band (const KhSolids *solids, double mm, int n_bands);
KhBox kh_solids_get_box (const KhSolids *solids, int i, int j);
/* All filled bands as boxes: for tests and drawings. Owned, of KhBox. */
GArray *kh_solids_dup_boxes (const KhSolids *solids);
