/* SPDX-License-Identifier: MIT */
#include "draw/ground.h"
#include <math.h>

void kh_ground_set_ink (const KhGround *g, KhInk ink, double alpha)
{
  kh_palette_set_source (g->cr, g->picture->scheme, ink, alpha);
}

/* Cells of a kind, as one path: a rectangle for each run in a row. */
static gboolean add_cells (const KhGround *g, gboolean (*is) (const KhGround *g, int cell))
{
  gboolean any = FALSE;
  for (int r = g->r0; r < g->r1; r++)
    for (int c = g->c0; c < g->c1; c++)
      {
        int from = c, base = r * g->plan->lattice.columns;
        while (c < g->c1 && is (g, base + c))
          c++;
        if (c == from)
          continue;
        kh_pen_box (g->cr, g->view, (KhBox){ from * g->pitch, r * g->pitch, c * g->pitch, (r + 1) * g->pitch });
        any = TRUE;
      }
  return any;
}

static gboolean is_floor (const KhGround *g, int cell) { return !g->plan->gap[cell]; }

static gboolean is_gap (const KhGround *g, int cell) { return g->plan->gap[cell]; }

static gboolean is_pocket (const KhGround *g, int cell)
{
  int region = g->review->layout->region_of_cell[cell];
  return region >= 0 && region != g->review->layout->start_region;
}

static void draw_lattice (const KhGround *g)
{
  cairo_set_line_width (g->cr, 0.6 * g->px);
  kh_ground_set_ink (g, KH_INK_LINE, 0.7);
  for (int c = g->c0; c <= g->c1; c++)
    {
      KhVec a = kh_view_to_device (g->view, (KhVec){ c * g->pitch, g->r0 * g->pitch });
      KhVec b = kh_view_to_device (g->view, (KhVec){ c * g->pitch, g->r1 * g->pitch });
      cairo_move_to (g->cr, a.x, a.y);
      cairo_line_to (g->cr, b.x, b.y);
    }
  for (int r = g->r0; r <= g->r1; r++)
    {
      KhVec a = kh_view_to_device (g->view, (KhVec){ g->c0 * g->pitch, r * g->pitch });
      KhVec b = kh_view_to_device (g->view, (KhVec){ g->c1 * g->pitch, r * g->pitch });
      cairo_move_to (g->cr, a.x, a.y);
      cairo_line_to (g->cr, b.x, b.y);
    }
  cairo_stroke (g->cr);
}

void kh_ground_draw_floor (const KhGround *g)
{
  double step = (g->picture->high_contrast ? 16 : 8) * g->px;
  kh_ground_set_ink (g, KH_INK_FLOOR, 1);
  if (add_cells (g, is_floor))
    cairo_fill (g->cr);
  if (g->cell_px > 4 && add_cells (g, is_gap))
    {
      kh_ground_set_ink (g, KH_INK_LINE, 1);
      kh_pen_hatch (g->cr, step, 0.8 * g->px, FALSE);
    }
  if (g->picture->with_lattice && g->cell_px > 12)
    draw_lattice (g);
  if (g->review && g->review->layout->n_pockets > 0 && add_cells (g, is_pocket))
    {
      kh_ground_set_ink (g, KH_INK_ISLAND, 0.55);
      kh_pen_hatch (g->cr, step, 0.8 * g->px, TRUE);
    }
}
