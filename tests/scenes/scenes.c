/* SPDX-License-Identifier: MIT */
/* Runs whose every pose is known to the last bit. A hash that changes means that runs changed: on purpose, or not.
 * "scenes print" prints today's. */
#include "mazes.h"
#include "robot/run.h"
#include <stdio.h>
#include <string.h>

static const struct
{
  const char *name;
  int columns, rows;
  double pitch, thickness;
  guint64 seed, trial;
  KhHand hand;
  gboolean exact, box;
  guint64 hash;
} scenes[] = {
#include "hashes.h"
};

int main (int argc, char **argv)
{
  gboolean print = argc > 1 && strcmp (argv[1], "print") == 0;
  int failed = 0;
  for (gsize i = 0; i < G_N_ELEMENTS (scenes); i++)
    {
      g_autoptr (KhPlan) plan = kh_test_maze_new (scenes[i].columns, scenes[i].rows, scenes[i].pitch, scenes[i].thickness, scenes[i].seed);
      kh_test_maze_face (plan, scenes[i].hand);
      if (scenes[i].box)
        plan->robot.body.shape = KH_BODY_BOX;
      g_autoptr (KhSolids) solids = kh_solids_new (plan);
      const KhRunSettings settings = { scenes[i].hand, scenes[i].exact, 1, scenes[i].trial };
      g_autoptr (KhTrace) trace = kh_run (plan, solids, &settings, NULL, NULL);
      guint64 hash = kh_trace_hash (trace);
      if (print)
        printf ("%s: %s, 0x%016" G_GINT64_MODIFIER "x\n", scenes[i].name, kh_outcome_get_name (trace->outcome), hash);
      else if (hash != scenes[i].hash)
        {
          printf ("%s: hash 0x%016" G_GINT64_MODIFIER "x, stored 0x%016" G_GINT64_MODIFIER "x (%s)\n", scenes[i].name, hash, scenes[i].hash, trace->why);
          failed++;
        }
    }
  printf ("%d of %d scenes differ\n", failed, (int) G_N_ELEMENTS (scenes));
  return failed > 0;
}
