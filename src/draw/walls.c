/* SPDX-License-Identifier: MIT */
#include "draw/ground.h"
#include <math.h>

/* A run of walls at true thickness, its ends at the outer faces of its end
 * points; never thinner than a pixel. */
static KhBox run_box (const KhGround *g, KhRun run)
{
  double half = MAX (g->thickness / 2, 0.5 * g->px / g->view->scale);
  double from = run.from * g->pitch - g->thickness / 2, to = run.to * g->pitch + g->thickness / 2,
         line = run.line * g->pitch;
  return run.axis == KH_AXIS_X ? (KhBox){ from, line - half, to, line + half }
                               : (KhBox){ line - half, from, line + half, to };
}

static KhRun run_of_edge (KhEdge edge)
{
  gboolean x = edge.axis == KH_AXIS_X;
  int from = x ? edge.column : edge.row;
  return (KhRun){ edge.axis, x ? edge.row : edge.column, from, from + 1 };
}

/* Saw teeth along both long sides of an edge: what stands free is told by its outline. */
static void add_teeth (const KhGround *g, KhEdge edge)
{
  KhBox box = run_box (g, run_of_edge (edge));
  double tooth = MAX (4 * g->px / g->view->scale, g->pitch / 24);
  gboolean x = edge.axis == KH_AXIS_X;
  double length = x ? box.x1 - box.x0 : box.y1 - box.y0;
  int n = MAX (2, (int)floor (length / tooth));
  double step = length / n;
  for (int side = 0; side < 2; side++)
    for (int i = 0; i <= 2 * n; i++)
      {
        double along = (side == 0 ? i : 2 * n - i) * step / 2, out = i % 2 ? 0.55 * tooth : 0;
        double across = side == 0 ? (x ? box.y0 : box.x0) - out : (x ? box.y1 : box.x1) + out;
        KhVec at
            = kh_view_to_device (g->view, x ? (KhVec){ box.x0 + along, across } : (KhVec){ across, box.y0 + along });
        if (side == 0 && i == 0)
          cairo_move_to (g->cr, at.x, at.y);
        else
          cairo_line_to (g->cr, at.x, at.y);
      }
  cairo_close_path (g->cr);
}

static void draw_islands (const KhGround *g)
{
  kh_ground_set_ink (g, KH_INK_ISLAND, 1);
  for (guint i = 0; i < g->review->findings->len; i++)
    {
      const KhFinding *finding = g_ptr_array_index (g->review->findings, i);
      if (g_strcmp0 (finding->code, "island") != 0)
        continue;
      for (guint k = 0; k < finding->edges->len; k++)
        {
          KhEdge edge = g_array_index (finding->edges, KhEdge, k);
          if (kh_plan_has_wall (g->plan, edge) && kh_pen_sees (g->view, run_box (g, run_of_edge (edge))))
            {
              add_teeth (g, edge);
              cairo_fill (g->cr);
            }
        }
    }
}

static void draw_leaks (const KhGround *g)
{
  const double dash[] = { 2 * g->px, 4 * g->px };
  const GArray *leaks = g->review->layout->leaks;
  for (guint i = 0; i < leaks->len; i++)
    {
      KhPoint ends[2];
      kh_edge_get_points (g_array_index (leaks, KhEdge, i), ends);
      KhVec a = kh_view_to_device (g->view, (KhVec){ ends[0].column * g->pitch, ends[0].row * g->pitch });
      KhVec b = kh_view_to_device (g->view, (KhVec){ ends[1].column * g->pitch, ends[1].row * g->pitch });
      cairo_move_to (g->cr, a.x, a.y);
      cairo_line_to (g->cr, b.x, b.y);
    }
  kh_ground_set_ink (g, KH_INK_ISLAND, 1);
  cairo_set_line_width (g->cr, 2 * g->px);
  cairo_set_dash (g->cr, dash, 2, 0);
  cairo_stroke (g->cr);
  cairo_set_dash (g->cr, NULL, 0, 0);
}

/* Posts that stand where no wall is. */
static void add_posts (const KhGround *g)
{
  double half = MAX (g->thickness / 2, 0.5 * g->px / g->view->scale);
  for (int r = g->r0; r <= g->r1; r++)
    for (int c = g->c0; c <= g->c1; c++)
      {
        gboolean floor = FALSE;
        for (int k = 0; k < 4; k++)
          floor |= kh_plan_has_floor (g->plan, (KhCell){ c - k % 2, r - k / 2 });
        if (floor)
          kh_pen_box (g->cr, g->view,
                      (KhBox){ c * g->pitch - half, r * g->pitch - half, c * g->pitch + half, r * g->pitch + half });
      }
}

void kh_ground_draw_walls (const KhGround *g)
{
  g_autoptr (GArray) runs = kh_plan_dup_runs (g->plan, g->plan->walled);
  for (guint i = 0; i < runs->len; i++)
    {
      KhBox box = run_box (g, g_array_index (runs, KhRun, i));
      if (kh_pen_sees (g->view, box))
        kh_pen_box (g->cr, g->view, box);
    }
  if (g->plan->walls.posts == KH_POSTS_EVERYWHERE && g->cell_px > 4)
    add_posts (g);
  kh_ground_set_ink (g, KH_INK_WALL, 1);
  cairo_fill (g->cr);
  if (g->review)
    {
      draw_islands (g);
      draw_leaks (g);
    }
}

static KhBox panel_box (const KhGround *g, const KhPanel *panel)
{
  int64_t nm[4];
  kh_panel_get_box_nm (panel, g->plan, nm);
  return (KhBox){ (double)nm[0] / 1e6, (double)nm[1] / 1e6, (double)nm[2] / 1e6, (double)nm[3] / 1e6 };
}

static void draw_label (const KhGround *g, const KhPanel *panel, KhBox box, gboolean lit)
{
  double size = 10 * g->px, width, height;
  gboolean x = panel->run.axis == KH_AXIS_X;
  kh_pen_measure (g->cr, size, lit, panel->label, &width, &height);
  if (width > (x ? box.x1 - box.x0 : box.y1 - box.y0) * g->view->scale || height * 1.6 > g->pitch * g->view->scale)
    return;
  /* Beside the middle of an edge, where no other wall meets; inside the plan on its south and west sides. */
  double along = (panel->run.from + (panel->run.to - panel->run.from) / 2 + ((panel->run.to - panel->run.from) % 2 ? 0.5 : -0.5)) * g->pitch;
  double line = panel->run.line * g->pitch, off = (g->thickness * g->view->scale + height) / 2 + 1.5 * g->px;
  KhVec at = kh_view_to_device (g->view, x ? (KhVec){ along, line } : (KhVec){ line, along });
  if (panel->run.line == 0)
    off = -off;
  KhWords words = { x ? at.x : at.x - off, x ? at.y + off : at.y, size, lit, KH_ALIGN_MIDDLE, x ? 0 : -G_PI / 2, 0 };
  kh_ground_set_ink (g, lit ? KH_INK_SIGN_WORDS : KH_INK_TEXT_SECOND, 1);
  kh_pen_words (g->cr, &words, panel->label);
}

/* Panels apart from one another, so that the joints are seen; the lit ones hatched. */
void kh_ground_draw_panels (const KhGround *g)
{
  const KhCutList *list = g->review ? g->review->cut_list : NULL;
  gboolean print = g->picture->scheme == KH_SCHEME_PRINT;
  if (!list || g->cell_px < 6)
    {
      kh_ground_draw_walls (g);
      return;
    }
  for (guint i = 0; i < list->panels->len; i++)
    {
      const KhPanel *panel = &g_array_index (list->panels, KhPanel, i);
      KhBox box = panel_box (g, panel);
      gboolean lit = panel->row == g->picture->lit_row;
      if (!kh_pen_sees (g->view, (KhBox){ box.x0 - g->pitch, box.y0 - g->pitch, box.x1, box.y1 }))
        continue;
      kh_pen_box (g->cr, g->view, box);
      if (lit)
        {
          kh_ground_set_ink (g, KH_INK_LIT, 1);
          cairo_fill (g->cr);
          kh_pen_box (g->cr, g->view, box);
          kh_ground_set_ink (g, KH_INK_FLOOR, 0.7);
          kh_pen_hatch (g->cr, 5 * g->px, 1 * g->px, FALSE);
        }
      else if (print && panel->run.axis == KH_AXIS_X)
        {
          kh_ground_set_ink (g, KH_INK_WALL, 1);
          kh_pen_hatch (g->cr, 4 * g->px, 0.7 * g->px, FALSE);
        }
      else
        {
          kh_ground_set_ink (g, KH_INK_WALL, 1);
          cairo_fill (g->cr);
        }
      kh_pen_box (g->cr, g->view, box);
      kh_ground_set_ink (g, print ? KH_INK_WALL : KH_INK_FLOOR, 1);
      cairo_set_line_width (g->cr, 0.9 * g->px);
      cairo_stroke (g->cr);
      draw_label (g, panel, box, lit);
    }
}
