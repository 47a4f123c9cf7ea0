/* SPDX-License-Identifier: MIT */
#include "app/tool.h"
#include "app/words.h"

#include <glib/gi18n-lib.h>
#include <math.h>

/* A straight row of edges from the lattice point nearest to where the drag
 * began to the one the pointer has reached along the longer way. */
static GArray *edges_along (const KhPlan *plan, const KhGesture *gesture)
{
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  GArray *edges = g_array_new (FALSE, FALSE, sizeof (KhEdge));
  int columns = plan->lattice.columns, rows = plan->lattice.rows;
  int c0 = (int)CLAMP (round (gesture->from.x / pitch), 0, columns);
  int r0 = (int)CLAMP (round (gesture->from.y / pitch), 0, rows);
  gboolean along_x = fabs (gesture->to.x - c0 * pitch) >= fabs (gesture->to.y - r0 * pitch);
  int c1 = along_x ? (int)CLAMP (round (gesture->to.x / pitch), 0, columns) : c0;
  int r1 = along_x ? r0 : (int)CLAMP (round (gesture->to.y / pitch), 0, rows);
  for (int c = MIN (c0, c1); along_x && c < MAX (c0, c1); c++)
    g_array_append_val (edges, ((KhEdge){ KH_AXIS_X, c, r0 }));
  for (int r = MIN (r0, r1); !along_x && r < MAX (r0, r1); r++)
    g_array_append_val (edges, ((KhEdge){ KH_AXIS_Y, c0, r }));
  return edges;
}

static GArray *edges_of (const KhPlan *plan, const KhGesture *gesture, gboolean *walled)
{
  *walled = !gesture->take_away;
  if (gesture->dragged)
    return edges_along (plan, gesture);
  GArray *edges = g_array_new (FALSE, FALSE, sizeof (KhEdge));
  KhEdge edge;
  if (kh_place_get_edge (plan, gesture->from, 0.35, &edge))
    {
      g_array_append_val (edges, edge);
      *walled = !kh_plan_has_wall (plan, edge); /* a click toggles, in either mode */
    }
  return edges;
}

/* Laying a wall over an opening closes it: both go in one step. */
static KhChange *close_openings (const KhPlan *plan, const KhEdge *edges, gsize n, int *n_closed)
{
  g_autoptr (GArray) kept = g_array_new (FALSE, FALSE, sizeof (KhOpening));
  for (guint i = 0; i < plan->openings->len; i++)
    {
      const KhOpening *opening = &g_array_index (plan->openings, KhOpening, i);
      gboolean closed = FALSE;
      for (gsize k = 0; k < n && !closed; k++)
        closed = opening->edge.axis == edges[k].axis && opening->edge.column == edges[k].column
                 && opening->edge.row == edges[k].row;
      if (!closed)
        g_array_append_val (kept, *opening);
    }
  *n_closed = (int)(plan->openings->len - kept->len);
  if (*n_closed == 0)
    return NULL;
  return kh_change_new_openings ((const KhOpening *)(void *)kept->data, kept->len);
}

KhEdit *kh_edit_walls (const KhPlan *plan, const KhEdge *edges, gsize n, gboolean walled)
{
  int n_changed = 0, n_closed = 0;
  KhEdge first = { KH_AXIS_X, 0, 0 };
  for (gsize i = 0; i < n; i++)
    if (kh_plan_has_wall (plan, edges[i]) != walled && n_changed++ == 0)
      first = edges[i];
  g_autoptr (KhChange) closing = walled ? close_openings (plan, edges, n, &n_closed) : NULL;
  if (n_changed == 0)
    return NULL;
  g_autofree char *cell = kh_words_dup_edge_cell (&plan->lattice, first);
  char *words = g_strdup_printf (walled ? ngettext ("%d wall laid at %s", "%d walls laid at %s", n_changed)
                                        : ngettext ("%d wall taken away at %s", "%d walls taken away at %s", n_changed),
                                 n_changed, cell);
  KhChange *change = kh_change_new_walls (edges, n, walled);
  if (closing != NULL)
    {
      GPtrArray *group = g_ptr_array_new ();
      g_ptr_array_add (group, g_steal_pointer (&closing));
      g_ptr_array_add (group, change);
      change = kh_change_new_group_take (group);
    }
  return kh_edit_new_take (change, words);
}

static KhEdit *make (const KhPlan *plan, const KhGesture *gesture)
{
  gboolean walled;
  g_autoptr (GArray) edges = edges_of (plan, gesture, &walled);
  if (edges->len == 0)
    return NULL;
  return kh_edit_walls (plan, (const KhEdge *)(void *)edges->data, edges->len, walled);
}

static void draw (const KhGhostScene *scene, const KhGesture *gesture, cairo_t *cr)
{
  gboolean walled;
  g_autoptr (GArray) edges = edges_of (scene->plan, gesture, &walled);
  int n_changed = 0;
  for (guint i = 0; i < edges->len; i++)
    {
      KhEdge edge = g_array_index (edges, KhEdge, i);
      KhBox box;
      if (kh_plan_has_wall (scene->plan, edge) == walled)
        continue;
      kh_edge_get_box_mm (scene->plan, edge, &box);
      kh_ghost_box (scene, cr, box, !walled);
      n_changed++;
    }
  if (gesture->dragged && n_changed > 0)
    {
      g_autofree char *text = g_strdup_printf (walled ? ngettext ("%d wall", "%d walls", n_changed)
                                                      : ngettext ("%d wall away", "%d walls away", n_changed),
                                               n_changed);
      double up = 16 / scene->view->scale;
      kh_ghost_label (scene, cr, (KhVec){ gesture->to.x, gesture->to.y + up }, text);
    }
}

const KhTool kh_tool_walls = {
  .name = "walls",
  .label = N_ ("Walls"),
  .tooltip = N_ ("Lay walls: drag along lattice lines, or click an edge (W)"),
  .icon_name = "kh-walls-symbolic",
  .key = "w",
  .on_edges = TRUE,
  .make = make,
  .draw = draw,
};
