/* SPDX-License-Identifier: MIT */
/* What an edit costs: the layout part of the review, at three sizes; then one
 * run, one cut list and one saw plan of the classic maze.  Prints medians and the growth. */
#include "base/units.h"
#include "files/planfile.h"
#include "plan/history.h"
#include "review/review.h"
#include <stdio.h>
#include <stdlib.h>

static int compare (const void *a, const void *b)
{
  double x = *(const double *) a, y = *(const double *) b;
  return (x > y) - (x < y);
}

/* A comb of walls from alternate sides: one long way through all cells. */
static KhPlan *comb_new (int size)
{
  KhPlan *plan = kh_plan_new (size, size, 180 * KH_NM_PER_MM, 12 * KH_NM_PER_MM, 50 * KH_NM_PER_MM);
  for (int row = 1; row < size; row++)
    for (int column = row % 2; column < size - 1 + row % 2; column++)
      plan->walled[kh_lattice_edge_index (&plan->lattice, (KhEdge){ KH_AXIS_X, column, row })] = 1;
  return plan;
}

static double median_ms (const KhPlan *plan, const KhReviewSettings *settings, int n)
{
  double *ms = g_new (double, n);
  for (int i = 0; i < n; i++)
    {
      gint64 begin = g_get_monotonic_time ();
      kh_review_free (kh_review_new (plan, settings, NULL));
      ms[i] = (double) (g_get_monotonic_time () - begin) / 1000;
    }
  qsort (ms, (gsize) n, sizeof *ms, compare);
  double median = ms[n / 2];
  g_free (ms);
  return median;
}

static void time_layout (void)
{
  double at[3];
  const int sizes[3] = { 16, 256, 512 }, repeats[3] = { 401, 21, 11 };
  for (int i = 0; i < 3; i++)
    {
      KhReviewSettings settings;
      g_autoptr (KhPlan) plan = comb_new (sizes[i]);
      kh_review_settings_init (&settings, plan);
      at[i] = median_ms (plan, &settings, repeats[i]);
      printf ("layout findings %3d x %3d: %.3f ms\n", sizes[i], sizes[i], at[i]);
    }
  printf ("growth 256 -> 512: %.2f (cells: 4)\n", at[2] / at[1]);
}

int main (int argc, char **argv)
{
  g_autoptr (GPtrArray) faults = NULL;
  time_layout ();
  g_autoptr (KhPlan) plan = kh_plan_file_load (argv[1], &faults);
  if (!plan)
    return 1;
  KhReviewSettings settings;
  kh_review_settings_init (&settings, plan);
  double layout = median_ms (plan, &settings, 201);
  settings.with_panels = TRUE;
  double panels = median_ms (plan, &settings, 21);
  settings.with_panels = FALSE;
  settings.with_run = TRUE;
  g_autoptr (KhReview) review = kh_review_new (plan, &settings, NULL);
  double run = median_ms (plan, &settings, 21);
  gsize n_ticks = kh_trace_get_n_ticks (review->traces[settings.run.hand]);
  printf ("classic maze: layout findings %.3f ms; with cut list and saw plan %.1f ms; with a run %.1f ms (%zu ticks, %.0f ns each)\n",
          layout, panels, run, n_ticks, (run - layout) * 1e6 / (double) n_ticks);
  return 0;
}
