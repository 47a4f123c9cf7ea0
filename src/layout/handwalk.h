/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/plan.h"

/* The hand rule on cells alone: at each step try the hand's side, ahead, the
 * other side, back; turning costs no step.  Ends at the first of: a cell that
 * holds a mark; an open boundary edge passed; a state met before. */

typedef enum { KH_WALK_ENDS_MARK, KH_WALK_ENDS_OUT, KH_WALK_ENDS_CIRCLES } KhWalkEnd;

typedef struct
{
  KhWalkEnd ends;
  gboolean arrives; /* mark; or out by an exit of a plan with no mark */
  int n_steps;      /* moves from cell to cell up to the end */
  int n_cells;      /* different cells stood on, the start's included */
  GArray *path;     /* of KhCell: the cells in order, the start's first */
  KhEdge out_edge;  /* ends out: the edge passed */
} KhHandWalk;

/* FALSE, *walk untouched: the plan has no start or its cell no floor.  Linear in the cells. */
gboolean kh_hand_walk (const KhPlan *plan, KhHand hand, KhHandWalk *walk);
void kh_hand_walk_clear (KhHandWalk *walk);
