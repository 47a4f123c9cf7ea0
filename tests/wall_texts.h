/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/plan.h"
#include <stdio.h>

/* A plan of 180/12/50 mm with the walls named by labels, "X0:0-3 Y1:0-2", and no others. */
static inline KhPlan *plan_from_runs (int columns, int rows, const char *runs)
{
  KhPlan *plan = kh_plan_new (columns, rows, 180000000, 12000000, 50000000);
  for (int i = 0; i < kh_lattice_n_edges (&plan->lattice); i++)
    plan->walled[i] = 0;
  g_auto (GStrv) labels = g_strsplit (runs, " ", -1);
  for (int i = 0; labels[i]; i++)
    {
      char axis;
      int line, from, to;
      if (sscanf (labels[i], "%c%d:%d-%d", &axis, &line, &from, &to) != 4)
        g_error ("no label: %s", labels[i]);
      for (int k = from; k < to; k++)
        {
          KhEdge edge = axis == 'X' ? (KhEdge){ KH_AXIS_X, k, line } : (KhEdge){ KH_AXIS_Y, line, k };
          plan->walled[kh_lattice_edge_index (&plan->lattice, edge)] = 1;
        }
    }
  return plan;
}
