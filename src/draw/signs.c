/* SPDX-License-Identifier: MIT */
/* Openings, marks, start, and the badges of findings. */
#include "draw/ground.h"
#include <glib/gi18n-lib.h>
#include <math.h>

static KhVec cell_middle (const KhGround *g, KhCell cell)
{
  return kh_view_to_device (g->view, (KhVec){ (cell.column + 0.5) * g->pitch, (cell.row + 0.5) * g->pitch });
}

/* A double-ended arrow of this length about a place. */
static void draw_arrow (const KhGround *g, KhVec at, gboolean along_x, double length)
{
  double head = length * 0.2;
  cairo_save (g->cr);
  cairo_translate (g->cr, at.x, at.y);
  if (!along_x)
    cairo_rotate (g->cr, G_PI / 2);
  cairo_move_to (g->cr, -length / 2, 0);
  cairo_line_to (g->cr, length / 2, 0);
  for (int end = -1; end <= 1; end += 2)
    {
      cairo_move_to (g->cr, end * (length / 2 - head), -head);
      cairo_line_to (g->cr, end * length / 2, 0);
      cairo_line_to (g->cr, end * (length / 2 - head), head);
    }
  cairo_restore (g->cr);
  cairo_set_line_width (g->cr, 2 * g->px);
  cairo_stroke (g->cr);
}

static void draw_opening_words (const KhGround *g, const KhOpening *opening, KhVec at, double length)
{
  static const char *const names[] = { N_ ("entrance"), N_ ("exit"), N_ ("opening") };
  KhCell sides[2];
  kh_edge_get_cells (opening->edge, sides);
  gboolean low_out = !kh_plan_has_floor (g->plan, sides[0]);
  double sign = low_out ? -1 : 1, off = length / 2 + 6 * g->px;
  KhWords words = { .size = g->picture->text_size };
  if (opening->edge.axis == KH_AXIS_Y)
    {
      words.x = at.x + sign * off;
      words.y = at.y;
      words.align = low_out ? KH_ALIGN_END : KH_ALIGN_START;
    }
  else
    {
      words.x = at.x;
      words.y = at.y - sign * (off + 4 * g->px);
      words.align = KH_ALIGN_MIDDLE;
    }
  kh_ground_set_ink (g, KH_INK_SIGN_WORDS, 1);
  kh_pen_words (g->cr, &words, _ (names[opening->use]));
}

static void draw_opening (const KhGround *g, const KhOpening *opening)
{
  const double dash[] = { 2 * g->px, 3 * g->px };
  KhPoint ends[2];
  kh_edge_get_points (opening->edge, ends);
  KhVec a = kh_view_to_device (g->view, (KhVec){ ends[0].column * g->pitch, ends[0].row * g->pitch });
  KhVec b = kh_view_to_device (g->view, (KhVec){ ends[1].column * g->pitch, ends[1].row * g->pitch });
  KhVec at = { (a.x + b.x) / 2, (a.y + b.y) / 2 };
  double length = MIN (36 * g->px, 0.5 * g->pitch * g->view->scale);
  kh_ground_set_ink (g, KH_INK_SIGN, 1);
  cairo_set_line_width (g->cr, 1.6 * g->px);
  cairo_set_dash (g->cr, dash, 2, 0);
  cairo_move_to (g->cr, a.x, a.y);
  cairo_line_to (g->cr, b.x, b.y);
  cairo_stroke (g->cr);
  cairo_set_dash (g->cr, NULL, 0, 0);
  if (g->cell_px < 14)
    return;
  draw_arrow (g, at, opening->edge.axis == KH_AXIS_Y, length);
  if (g->cell_px > 34)
    draw_opening_words (g, opening, at, length);
}

static void draw_mark (const KhGround *g, const KhMark *mark)
{
  const double dash[] = { 3 * g->px, 2 * g->px };
  KhVec at = cell_middle (g, mark->cell);
  at.x += (double)mark->offset_nm[0] / 1e6 * g->view->scale;
  at.y -= (double)mark->offset_nm[1] / 1e6 * g->view->scale;
  double w = (double)mark->size_nm[0] / 1e6 * g->view->scale, h = (double)mark->size_nm[1] / 1e6 * g->view->scale;
  cairo_rectangle (g->cr, at.x - w / 2, at.y - h / 2, w, h);
  kh_ground_set_ink (g, KH_INK_SIGN, 0.22);
  cairo_fill_preserve (g->cr);
  kh_ground_set_ink (g, KH_INK_SIGN, 1);
  cairo_set_line_width (g->cr, 1.3 * g->px);
  cairo_set_dash (g->cr, dash, 2, 0);
  cairo_stroke (g->cr);
  cairo_set_dash (g->cr, NULL, 0, 0);
  double radius = MIN (8 * g->px, 0.42 * MIN (w, h));
  cairo_arc (g->cr, at.x, at.y, radius, 0, 2 * G_PI);
  cairo_set_line_width (g->cr, 0.24 * radius);
  cairo_stroke (g->cr);
  cairo_arc (g->cr, at.x, at.y, radius * 0.5, 0, 2 * G_PI);
  cairo_fill (g->cr);
}

/* A flag with its cloth toward the heading. */
static void draw_start (const KhGround *g)
{
  KhVec at = cell_middle (g, g->plan->start.cell);
  double size = MIN (24 * g->px, 0.5 * g->pitch * g->view->scale);
  cairo_save (g->cr);
  cairo_translate (g->cr, at.x, at.y);
  cairo_rotate (g->cr, -kh_heading_get_angle_rad (g->plan->start.heading));
  cairo_move_to (g->cr, -size * 0.25, size / 2);
  cairo_line_to (g->cr, -size * 0.25, -size / 2);
  cairo_restore (g->cr);
  kh_ground_set_ink (g, KH_INK_SIGN, 1);
  cairo_set_line_width (g->cr, 2 * g->px);
  cairo_stroke (g->cr);
  cairo_save (g->cr);
  cairo_translate (g->cr, at.x, at.y);
  cairo_rotate (g->cr, -kh_heading_get_angle_rad (g->plan->start.heading));
  cairo_move_to (g->cr, -size * 0.25, -size / 2);
  cairo_line_to (g->cr, size * 0.45, -size * 0.25);
  cairo_line_to (g->cr, -size * 0.25, 0);
  cairo_close_path (g->cr);
  cairo_move_to (g->cr, -size * 0.25, size * 0.12);
  cairo_line_to (g->cr, size * 0.15, size * 0.3);
  cairo_line_to (g->cr, -size * 0.25, size * 0.48);
  cairo_close_path (g->cr);
  cairo_restore (g->cr);
  cairo_fill (g->cr);
}

void kh_ground_draw_signs (const KhGround *g)
{
  for (guint i = 0; i < g->plan->openings->len; i++)
    draw_opening (g, &g_array_index (g->plan->openings, KhOpening, i));
  for (guint i = 0; i < g->plan->marks->len; i++)
    draw_mark (g, &g_array_index (g->plan->marks, KhMark, i));
  if (g->plan->has_start)
    draw_start (g);
}

static void add_badge_shape (const KhGround *g, KhSeverity severity, KhVec at, double radius)
{
  const int n = severity == KH_SEVERITY_BREAKS ? 8 : 3;
  if (severity == KH_SEVERITY_NOTES)
    {
      cairo_arc (g->cr, at.x, at.y, radius, 0, 2 * G_PI);
      return;
    }
  double from = severity == KH_SEVERITY_BREAKS ? G_PI / 8 : -G_PI / 2,
         size = severity == KH_SEVERITY_BREAKS ? radius * 1.08 : radius * 1.5;
  for (int k = 0; k < n; k++)
    cairo_line_to (g->cr, at.x + size * cos (from + k * 2 * G_PI / n),
                   at.y + (n == 3 ? radius * 0.25 : 0) + size * sin (from + k * 2 * G_PI / n));
  cairo_close_path (g->cr);
}

/* Shape by severity, number inside. Those at one place stand beside each other. */
void kh_ground_draw_badges (const KhGround *g)
{
  KhVec last = { -1e9, -1e9 };
  double radius = 8.5 * g->px;
  for (guint i = 0; g->review && i < g->review->findings->len; i++)
    {
      const KhFinding *finding = g_ptr_array_index (g->review->findings, i);
      gboolean chosen = (int)i == g->picture->chosen_finding;
      if (finding->reason || (finding->severity == KH_SEVERITY_NOTES && !chosen))
        continue;
      KhVec at = kh_view_to_device (g->view, (KhVec){ finding->at[0] * g->pitch, finding->at[1] * g->pitch });
      if (fabs (at.x - last.x) < 2 * radius && fabs (at.y - last.y) < radius)
        at.x = last.x + 2.6 * radius;
      last = at;
      if (chosen)
        {
          cairo_arc (g->cr, at.x, at.y, 1.9 * radius, 0, 2 * G_PI);
          kh_ground_set_ink (g, KH_INK_LIT, 1);
          cairo_set_line_width (g->cr, 2 * g->px);
          cairo_stroke (g->cr);
        }
      add_badge_shape (g, finding->severity, at, radius);
      kh_ground_set_ink (g,
                         finding->severity == KH_SEVERITY_BREAKS    ? KH_INK_CONTACT
                         : finding->severity == KH_SEVERITY_HINDERS ? KH_INK_BADGE
                                                                    : KH_INK_TEXT_SECOND,
                         1);
      cairo_fill (g->cr);
      g_autofree char *number = g_strdup_printf ("%d", finding->number);
      KhWords words = { at.x,
                        at.y + (finding->severity == KH_SEVERITY_HINDERS ? 0.2 * radius : 0),
                        10.5 * g->px,
                        TRUE,
                        KH_ALIGN_MIDDLE,
                        0,
                        0 };
      kh_ground_set_ink (g, KH_INK_FLOOR, 1);
      kh_pen_words (g->cr, &words, number);
    }
}
