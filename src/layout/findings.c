/* SPDX-License-Identifier: MIT */
#include "layout/finder.h"
#include <glib/gi18n-lib.h>

GPtrArray *kh_layout_find (const KhPlan *plan, const KhLayout *layout, const KhHandWalk *right, const KhHandWalk *left,
                           GPtrArray *sound)
{
  KhFinder finder = {
    plan, layout, { right, left }, plan->robot.hand, g_ptr_array_new_with_free_func ((GDestroyNotify)kh_finding_free),
    sound
  };
  kh_finder_look_at_walls (&finder);
  kh_finder_look_at_floor (&finder);
  kh_finder_look_at_start (&finder);
  kh_finder_look_at_marks (&finder);
  kh_finder_look_at_hands (&finder);
  return finder.findings;
}

KhFinding *kh_finder_tell (KhFinder *finder, const char *code, KhSeverity severity, const double at[2], char *wrong,
                           char *effect)
{
  KhFinding *finding = kh_finding_new (code, severity, at[0], at[1]);
  g_free (finding->wrong);
  g_free (finding->effect);
  finding->wrong = wrong;
  finding->effect = effect;
  g_ptr_array_add (finder->findings, finding);
  return finding;
}

void kh_finder_tell_sound (KhFinder *finder, char *text_taken) { g_ptr_array_add (finder->sound, text_taken); }

const char *kh_finder_hand_words (KhHand hand) { return hand == KH_HAND_RIGHT ? _ ("right hand") : _ ("left hand"); }

void kh_finder_add_cell (KhFinding *finding, KhCell cell) { g_array_append_val (finding->cells, cell); }

void kh_finder_get_edge_place (KhEdge edge, double at[2])
{
  at[0] = edge.column + (edge.axis == KH_AXIS_X ? 0.5 : 0);
  at[1] = edge.row + (edge.axis == KH_AXIS_Y ? 0.5 : 0);
}

char *kh_finder_dup_edge_name (const KhPlan *plan, KhEdge edge)
{
  KhCell sides[2];
  kh_edge_get_cells (edge, sides);
  gboolean low = kh_plan_has_floor (plan, sides[0]) || !kh_lattice_has_cell (&plan->lattice, sides[1]);
  g_autofree char *name = kh_cell_dup_name (sides[low ? 0 : 1]);
  const char *side = edge.axis == KH_AXIS_X ? (low ? _ ("north") : _ ("south")) : (low ? _ ("east") : _ ("west"));
  return g_strdup_printf ("%s %s", name, side);
}
