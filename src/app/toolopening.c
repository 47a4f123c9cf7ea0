/* SPDX-License-Identifier: MIT */
#include "app/tool.h"
#include "app/words.h"

#include <glib/gi18n-lib.h>

static gboolean same_edge (KhEdge a, KhEdge b) { return a.axis == b.axis && a.column == b.column && a.row == b.row; }

static gboolean has_use (const KhPlan *plan, KhOpeningUse use)
{
  for (guint i = 0; i < plan->openings->len; i++)
    if (g_array_index (plan->openings, KhOpening, i).use == use)
      return TRUE;
  return FALSE;
}

/* entrance, exit, other, closed; the first that the plan lacks to begin with. */
static int next_use (const KhPlan *plan, KhEdge edge)
{
  const KhOpening *opening = kh_plan_get_opening (plan, edge);
  if (opening == NULL)
    return has_use (plan, KH_OPENING_ENTRANCE) ? KH_OPENING_EXIT : KH_OPENING_ENTRANCE;
  switch (opening->use)
    {
    case KH_OPENING_ENTRANCE:
      return KH_OPENING_EXIT;
    case KH_OPENING_EXIT:
      return KH_OPENING_PLAIN;
    case KH_OPENING_PLAIN:
    default:
      return -1;
    }
}

KhEdit *kh_edit_opening (const KhPlan *plan, KhEdge edge, int use_or_minus_1)
{
  g_autofree char *place = kh_words_dup_edge (&plan->lattice, edge);
  const KhOpening *before = kh_plan_get_opening (plan, edge);
  if (use_or_minus_1 >= 0 && !kh_plan_is_boundary (plan, edge))
    return kh_edit_new_notice_take (
        g_strdup_printf (_ ("%s is not on the boundary: an opening lies between floor and no floor."), place));
  if (use_or_minus_1 < 0 && before == NULL)
    return NULL;

  g_autoptr (GArray) openings = g_array_new (FALSE, FALSE, sizeof (KhOpening));
  for (guint i = 0; i < plan->openings->len; i++)
    {
      KhOpening opening = g_array_index (plan->openings, KhOpening, i);
      if (same_edge (opening.edge, edge))
        {
          if (use_or_minus_1 < 0)
            continue;
          opening.use = (KhOpeningUse)use_or_minus_1;
        }
      g_array_append_val (openings, opening);
    }
  if (use_or_minus_1 >= 0 && before == NULL)
    {
      KhOpening opening = { .edge = edge, .use = (KhOpeningUse)use_or_minus_1 };
      g_array_append_val (openings, opening);
    }
  GPtrArray *group = g_ptr_array_new ();
  g_ptr_array_add (group, kh_change_new_openings ((const KhOpening *)(void *)openings->data, openings->len));
  g_ptr_array_add (group, kh_change_new_walls (&edge, 1, use_or_minus_1 < 0));
  char *words;
  if (use_or_minus_1 < 0)
    words = g_strdup_printf (_ ("Opening closed at %s"), place);
  else
    /* Translators: "Entrance at A1 west": first the use, then the edge */
    words = g_strdup_printf (_ ("Opening at %s: %s"), place, kh_words_get_opening ((KhOpeningUse)use_or_minus_1));
  return kh_edit_new_take (kh_change_new_group_take (group), words);
}

static gboolean edge_of (const KhPlan *plan, const KhGesture *gesture, KhEdge *edge)
{
  if (kh_place_get_edge (plan, gesture->from, 0.35, edge))
    return TRUE;
  /* just outside the border is near enough for who aims at it */
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  KhVec in = { CLAMP (gesture->from.x, 0, plan->lattice.columns * pitch),
               CLAMP (gesture->from.y, 0, plan->lattice.rows * pitch) };
  if (in.x == gesture->from.x && in.y == gesture->from.y)
    return FALSE;
  if (ABS (in.x - gesture->from.x) > pitch / 2 || ABS (in.y - gesture->from.y) > pitch / 2)
    return FALSE;
  return kh_place_get_edge (plan, in, 0.35, edge);
}

static KhEdit *make (const KhPlan *plan, const KhGesture *gesture)
{
  KhEdge edge;
  if (!edge_of (plan, gesture, &edge))
    return NULL;
  return kh_edit_opening (plan, edge, gesture->take_away ? -1 : next_use (plan, edge));
}

static void draw (const KhGhostScene *scene, const KhGesture *gesture, cairo_t *cr)
{
  KhEdge edge;
  if (!edge_of (scene->plan, gesture, &edge) || !kh_plan_is_boundary (scene->plan, edge))
    return;
  int use = gesture->take_away ? -1 : next_use (scene->plan, edge);
  if (use < 0 && kh_plan_get_opening (scene->plan, edge) == NULL)
    return;
  KhBox box;
  kh_edge_get_box_mm (scene->plan, edge, &box);
  kh_ghost_box (scene, cr, box, FALSE);
  KhVec at = kh_edge_middle_mm (scene->plan, edge);
  at.y += 16 / scene->view->scale;
  kh_ghost_label (scene, cr, at, use < 0 ? _ ("close") : kh_words_get_opening ((KhOpeningUse)use));
}

const KhTool kh_tool_opening = {
  .name = "opening",
  .label = N_ ("Opening"),
  .tooltip = N_ ("Entrance, exit, other opening: click an edge of the boundary until it is what you want (O)"),
  .icon_name = "kh-opening-symbolic",
  .key = "o",
  .on_edges = TRUE,
  .make = make,
  .draw = draw,
};
