/* SPDX-License-Identifier: MIT */
#include "draw/page.h"
#include "base/units.h"
#include "draw/pen.h"
#include <glib/gi18n-lib.h>

#define MARGIN 10.0
#define HEAD 18.0  /* title and what is under it */
#define BLOCK 30.0 /* title block */
#define FOOT 14.0  /* check bar above the block */
#define RULER 13.0 /* running dimensions beside the plan */
#define SIDE 12.0  /* words of openings on the other sides */

/* ISO 5455:1979, reduction scales, and three steps beyond for very large halls. */
static const int scales[] = { 1, 2, 5, 10, 20, 50, 100, 200, 500, 1000 };

static int fitting_scale (double room_x, double room_y, double width, double depth)
{
  for (gsize i = 0; i < G_N_ELEMENTS (scales); i++)
    if (width / scales[i] <= room_x && depth / scales[i] <= room_y)
      return scales[i];
  return scales[G_N_ELEMENTS (scales) - 1];
}

static void place (KhPage *page, const KhPlan *plan)
{
  double width = kh_mm_from_nm (kh_plan_width_nm (plan)) / page->scale,
         depth = kh_mm_from_nm (kh_plan_depth_nm (plan)) / page->scale;
  double half = kh_mm_from_nm (plan->walls.thickness_nm) / 2 / page->scale;
  double room_x = page->width_mm - 2 * MARGIN - RULER - SIDE,
         room_y = page->height_mm - 2 * MARGIN - HEAD - BLOCK - FOOT - RULER;
  page->view.scale = 1.0 / page->scale;
  page->view.width = page->width_mm;
  page->view.height = page->height_mm;
  page->view.origin_x = MARGIN + RULER + (room_x - width) / 2 + half;
  page->view.origin_y = MARGIN + HEAD + (room_y + depth) / 2 - half;
}

void kh_page_choose (KhPage *page, const KhPlan *plan)
{
  static const struct
  {
    const char *name;
    double width, height;
  } papers[] = { { "A4", 210, 297 }, { "A4", 297, 210 }, { "A3", 297, 420 }, { "A3", 420, 297 } };
  double width = kh_mm_from_nm (kh_plan_width_nm (plan)), depth = kh_mm_from_nm (kh_plan_depth_nm (plan));
  *page = (KhPage){ .scale = 0 };
  for (gsize i = 0; i < G_N_ELEMENTS (papers); i++)
    {
      int scale = fitting_scale (papers[i].width - 2 * MARGIN - RULER - SIDE,
                                 papers[i].height - 2 * MARGIN - HEAD - BLOCK - FOOT - RULER, width, depth);
      /* A3 only where A4 would shrink it past 1 : 20. */
      if (page->scale == 0 || (scale < page->scale && (i < 2 || page->scale > 20)))
        {
          page->paper = papers[i].name;
          page->width_mm = papers[i].width;
          page->height_mm = papers[i].height;
          page->scale = scale;
        }
    }
  page->text_mm = 2.9;
  page->bar_mm = 100;
  place (page, plan);
}

static void say (cairo_t *cr, double x, double y, double size, gboolean bold, const char *text)
{
  KhWords words = { x, y, size, bold, KH_ALIGN_START, 0, 0 };
  kh_pen_words (cr, &words, text);
}

static void draw_field (cairo_t *cr, double x, double y, double width, const char *name, const char *value)
{
  KhWords words = { x + 2, y + 3.5, 2.3, FALSE, KH_ALIGN_START, 0, 0 };
  kh_pen_words (cr, &words, name);
  words = (KhWords){ x + 2, y + 9.5, 3.9, TRUE, KH_ALIGN_START, 0, width - 4 };
  kh_pen_words (cr, &words, value);
}

static void draw_block (const KhPage *page, cairo_t *cr, const KhPlan *plan, const KhReview *review, const char *title)
{
  double x = MARGIN, y = page->height_mm - MARGIN - BLOCK, width = page->width_mm - 2 * MARGIN;
  const double columns[] = { 0, 0.41 * width, 0.61 * width, 0.81 * width, width };
  g_autofree char *w = kh_length_dup_text (kh_plan_width_nm (plan), KH_LENGTH_UNIT_MM, FALSE);
  g_autofree char *d = kh_length_dup_text (kh_plan_depth_nm (plan), KH_LENGTH_UNIT_MM, TRUE);
  g_autofree char *p = kh_length_dup_text (plan->lattice.pitch_nm, KH_LENGTH_UNIT_MM, FALSE);
  g_autofree char *t = kh_length_dup_text (plan->walls.thickness_nm, KH_LENGTH_UNIT_MM, TRUE);
  g_autofree char *h = kh_length_dup_text (plan->walls.height_nm, KH_LENGTH_UNIT_MM, TRUE);
  g_autofree char *scale = g_strdup_printf (_ ("1 : %d on %s"), page->scale, page->paper);
  g_autofree char *maze
      = g_strdup_printf (_ ("%d × %d cells, %s × %s over all"), plan->lattice.columns, plan->lattice.rows, w, d);
  g_autofree char *pitch = g_strdup_printf (_ ("%s and %s"), p, t);
  g_autofree char *panels = review && review->cut_list
                                ? g_strdup_printf ("%u", review->cut_list->panels->len)
                                : g_strdup_printf (ngettext ("%d wall", "%d walls", (gulong)kh_plan_n_walls (plan)),
                                                   kh_plan_n_walls (plan));
  draw_field (cr, x + columns[0], y, columns[1] - columns[0], _ ("Plan"), plan->title);
  draw_field (cr, x + columns[1], y, columns[2] - columns[1], _ ("Page"), title);
  draw_field (cr, x + columns[2], y, columns[3] - columns[2], _ ("Scale"), scale);
  draw_field (cr, x + columns[3], y, columns[4] - columns[3], _ ("Sheet"), _ ("1 of 1"));
  draw_field (cr, x + columns[0], y + BLOCK / 2, columns[1] - columns[0], _ ("Maze"), maze);
  draw_field (cr, x + columns[1], y + BLOCK / 2, columns[2] - columns[1], _ ("Pitch and wall"), pitch);
  draw_field (cr, x + columns[2], y + BLOCK / 2, columns[3] - columns[2],
              review && review->cut_list ? _ ("Panels") : _ ("Walls"), panels);
  draw_field (cr, x + columns[3], y + BLOCK / 2, columns[4] - columns[3], _ ("Height"), h);
  cairo_set_line_width (cr, 0.5);
  cairo_rectangle (cr, MARGIN, MARGIN, page->width_mm - 2 * MARGIN, page->height_mm - 2 * MARGIN);
  cairo_stroke (cr);
  cairo_set_line_width (cr, 0.3);
  for (int i = 0; i < 3; i++)
    {
      cairo_move_to (cr, x, y + i * BLOCK / 2);
      cairo_line_to (cr, x + width, y + i * BLOCK / 2);
    }
  for (int i = 1; i < 4; i++)
    {
      cairo_move_to (cr, x + columns[i], y);
      cairo_line_to (cr, x + columns[i], y + BLOCK);
    }
  cairo_stroke (cr);
}

/* Tells whether the printer kept the scale. */
static void draw_bar (const KhPage *page, cairo_t *cr)
{
  double x = MARGIN + 5, y = page->height_mm - MARGIN - BLOCK - 8, step = page->bar_mm / 10;
  cairo_set_line_width (cr, 0.3);
  cairo_move_to (cr, x, y);
  cairo_line_to (cr, x + page->bar_mm, y);
  for (int i = 0; i <= 10; i++)
    {
      double half = i % 5 == 0 ? 1.6 : 0.9;
      cairo_move_to (cr, x + i * step, y - half);
      cairo_line_to (cr, x + i * step, y + half);
    }
  cairo_stroke (cr);
  g_autofree char *text = g_strdup_printf (
      _ ("%g mm: measure this bar. If it is off, print at 100 %%, not fitted to the page."), page->bar_mm);
  say (cr, x, y + 4.2, 2.5, FALSE, text);
}

void kh_page_draw_frame (const KhPage *page, cairo_t *cr, const KhPlan *plan, const KhReview *review, const char *title)
{
  cairo_set_source_rgb (cr, 0, 0, 0);
  say (cr, MARGIN + 5, MARGIN + 7, 6, TRUE, title);
  say (cr, MARGIN + 5, MARGIN + 13, 2.9, FALSE,
       _ ("Seen from above. All lengths in millimetres, measured from the datum, the south-west lattice point."));
  draw_block (page, cr, plan, review, title);
  draw_bar (page, cr);
  say (cr, MARGIN, page->height_mm - MARGIN + 4, 2.3, FALSE,
       _ ("Drawn with Kerfhand. Local rules, the makers’ manuals and trained people come before this print."));
}
