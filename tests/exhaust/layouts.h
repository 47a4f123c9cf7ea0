/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/plan.h"

/* All layouts of a small lattice: every subset of the inner edges, boundary closed. */

/* Indices of the inner edges; returns how many. */
static inline int inner_edges (const KhPlan *plan, int edges[])
{
  int n = 0;
  for (int i = 0; i < kh_lattice_n_edges (&plan->lattice); i++)
    if (!kh_plan_is_boundary (plan, kh_lattice_edge_at (&plan->lattice, i)))
      edges[n++] = i;
  return n;
}

static inline void set_layout (KhPlan *plan, const int edges[], int n, unsigned layout)
{
  for (int i = 0; i < n; i++)
    plan->walled[edges[i]] = (layout >> i) & 1;
}

static inline KhPlan *hall_new (int columns, int rows)
{
  return kh_plan_new (columns, rows, 180000000, 12000000, 50000000);
}
