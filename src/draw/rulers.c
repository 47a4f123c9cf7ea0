/* SPDX-License-Identifier: MIT */
/* Running dimensions from the datum and the names of the cells, outside the
 * plan's south and west edges: on paper a chain of single lengths would add up
 * its errors (ISO 129-1, running dimensioning; from memory). */
#include "base/units.h"
#include "draw/ground.h"
#include <math.h>

/* Every how many lattice lines a number has room. */
static int thin_out (const KhGround *g, double room)
{
  static const int steps[] = { 1, 2, 4, 5, 10, 20, 50, 100 };
  double cell = g->pitch * g->view->scale;
  for (gsize i = 0; i < G_N_ELEMENTS (steps); i++)
    if (cell * steps[i] >= room)
      return steps[i];
  return 200;
}

static void draw_line_number (const KhGround *g, int line, KhVec at, double turned)
{
  g_autofree char *text = kh_length_dup_text (line * g->plan->lattice.pitch_nm, KH_LENGTH_UNIT_MM, FALSE);
  KhWords words = { at.x, at.y, 0.92 * g->picture->text_size, FALSE, KH_ALIGN_MIDDLE, turned, 0 };
  kh_ground_set_ink (g, KH_INK_TEXT, 1);
  kh_pen_words (g->cr, &words, text);
}

static void draw_cell_name (const KhGround *g, char *name_taken, KhVec at)
{
  g_autofree char *name = name_taken;
  KhWords words = { at.x, at.y, 0.92 * g->picture->text_size, TRUE, KH_ALIGN_MIDDLE, 0, 0 };
  kh_ground_set_ink (g, KH_INK_TEXT_SECOND, 1);
  kh_pen_words (g->cr, &words, name);
}

void kh_ground_draw_rulers (const KhGround *g)
{
  double text = g->picture->text_size, off = g->thickness / 2 * g->view->scale + 1.2 * text, tick = 0.5 * text;
  int every_x = thin_out (g, 3.6 * text), every_y = thin_out (g, 3.6 * text);
  gboolean names = g->pitch * g->view->scale > 2.2 * text;
  for (int c = 0; c <= g->plan->lattice.columns; c += every_x)
    {
      KhVec at = kh_view_to_device (g->view, (KhVec){ c * g->pitch, 0 });
      cairo_move_to (g->cr, at.x, at.y + off);
      cairo_line_to (g->cr, at.x, at.y + off + tick);
      draw_line_number (g, c, (KhVec){ at.x, at.y + off + tick + 0.8 * text }, 0);
      cairo_move_to (g->cr, at.x, at.y + off);
      cairo_line_to (g->cr, at.x, at.y + off + tick);
      kh_ground_set_ink (g, KH_INK_TEXT, 1);
      cairo_set_line_width (g->cr, 0.8 * g->px);
      cairo_stroke (g->cr);
    }
  for (int r = 0; r <= g->plan->lattice.rows; r += every_y)
    {
      KhVec at = kh_view_to_device (g->view, (KhVec){ 0, r * g->pitch });
      draw_line_number (g, r, (KhVec){ at.x - off - tick - 0.8 * text, at.y }, -G_PI / 2);
      cairo_move_to (g->cr, at.x - off, at.y);
      cairo_line_to (g->cr, at.x - off - tick, at.y);
      kh_ground_set_ink (g, KH_INK_TEXT, 1);
      cairo_set_line_width (g->cr, 0.8 * g->px);
      cairo_stroke (g->cr);
    }
  for (int c = 0; names && c < g->plan->lattice.columns; c++)
    {
      KhVec at = kh_view_to_device (g->view, (KhVec){ (c + 0.5) * g->pitch, 0 });
      draw_cell_name (g, kh_column_dup_letters (c), (KhVec){ at.x, at.y + off - 0.3 * text });
    }
  for (int r = 0; names && r < g->plan->lattice.rows; r++)
    {
      KhVec at = kh_view_to_device (g->view, (KhVec){ 0, (r + 0.5) * g->pitch });
      draw_cell_name (g, g_strdup_printf ("%d", r + 1), (KhVec){ at.x - off + 0.3 * text, at.y });
    }
}
