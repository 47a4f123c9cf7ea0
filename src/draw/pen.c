/* SPDX-License-Identifier: MIT */
#include "draw/pen.h"
#include <math.h>
#include <pango/pangocairo.h>

static PangoLayout *layout_new (cairo_t *cr, double size, gboolean bold, const char *text)
{
  PangoLayout *layout = pango_cairo_create_layout (cr);
  /* On paper a unit is a millimetre: glyphs must not be moved to whole ones. */
  if (cairo_surface_get_type (cairo_get_target (cr)) != CAIRO_SURFACE_TYPE_IMAGE)
    {
      PangoContext *context = pango_layout_get_context (layout);
      cairo_font_options_t *options = cairo_font_options_create ();
      cairo_font_options_set_hint_style (options, CAIRO_HINT_STYLE_NONE);
      cairo_font_options_set_hint_metrics (options, CAIRO_HINT_METRICS_OFF);
      pango_cairo_context_set_font_options (context, options);
      pango_context_set_round_glyph_positions (context, FALSE);
      cairo_font_options_destroy (options);
    }
  PangoFontDescription *font = pango_font_description_new ();
  pango_font_description_set_family_static (font, "Sans");
  pango_font_description_set_absolute_size (font, size * PANGO_SCALE);
  pango_font_description_set_weight (font, bold ? PANGO_WEIGHT_BOLD : PANGO_WEIGHT_NORMAL);
  pango_layout_set_font_description (layout, font);
  pango_font_description_free (font);
  pango_layout_set_text (layout, text, -1);
  return layout;
}

void kh_pen_words (cairo_t *cr, const KhWords *words, const char *text)
{
  int width, height;
  PangoLayout *layout = layout_new (cr, words->size, words->bold, text);
  if (words->most_width > 0)
    {
      pango_layout_set_width (layout, (int)(words->most_width * PANGO_SCALE));
      pango_layout_set_ellipsize (layout, PANGO_ELLIPSIZE_END);
      pango_layout_set_alignment (layout, words->align == KH_ALIGN_MIDDLE ? PANGO_ALIGN_CENTER
                                          : words->align == KH_ALIGN_END  ? PANGO_ALIGN_RIGHT
                                                                          : PANGO_ALIGN_LEFT);
    }
  pango_layout_get_size (layout, &width, &height);
  double w = words->most_width > 0 ? words->most_width : (double)width / PANGO_SCALE, h = (double)height / PANGO_SCALE;
  double left = words->align == KH_ALIGN_START ? 0 : words->align == KH_ALIGN_MIDDLE ? -w / 2 : -w;
  cairo_save (cr);
  cairo_translate (cr, words->x, words->y);
  if (words->turned_rad != 0)
    cairo_rotate (cr, words->turned_rad);
  cairo_move_to (cr, left, -h / 2);
  pango_cairo_show_layout (cr, layout);
  cairo_restore (cr);
  cairo_new_path (cr);
  g_object_unref (layout);
}

void kh_pen_measure (cairo_t *cr, double size, gboolean bold, const char *text, double *width, double *height)
{
  int w, h;
  PangoLayout *layout = layout_new (cr, size, bold, text);
  pango_layout_get_size (layout, &w, &h);
  g_object_unref (layout);
  *width = (double)w / PANGO_SCALE;
  *height = (double)h / PANGO_SCALE;
}

void kh_pen_box (cairo_t *cr, const KhView *view, KhBox mm)
{
  KhVec low = kh_view_to_device (view, (KhVec){ mm.x0, mm.y1 });
  cairo_rectangle (cr, low.x, low.y, (mm.x1 - mm.x0) * view->scale, (mm.y1 - mm.y0) * view->scale);
}

/* On pixels the hatch is filled from a small tile that repeats, at the cost of
 * the area: stroking hundreds of lines in a clip of many cells took 50 ms. */
static void fill_tiles (cairo_t *cr, double step, double width, gboolean crossed)
{
  double scale_x = 1, scale_y = 1, side = MAX (round (step), 2);
  cairo_surface_get_device_scale (cairo_get_target (cr), &scale_x, &scale_y);
  cairo_surface_t *tile
      = cairo_image_surface_create (CAIRO_FORMAT_ARGB32, (int)ceil (side * scale_x), (int)ceil (side * scale_y));
  cairo_surface_set_device_scale (tile, scale_x, scale_y);
  cairo_t *pen = cairo_create (tile);
  cairo_set_source (pen, cairo_get_source (cr));
  cairo_set_line_width (pen, width);
  for (int i = -1; i <= 1; i++) /* a line's ends come in from the neighbouring tiles */
    {
      cairo_move_to (pen, (i + 1) * side + side, -side);
      cairo_line_to (pen, (i - 1) * side - side, side * 3);
      if (crossed)
        {
          cairo_move_to (pen, (i - 1) * side - side, -side);
          cairo_line_to (pen, (i + 1) * side + side, side * 3);
        }
    }
  cairo_stroke (pen);
  cairo_destroy (pen);
  cairo_save (cr);
  cairo_set_source_surface (cr, tile, 0, 0);
  cairo_pattern_set_extend (cairo_get_source (cr), CAIRO_EXTEND_REPEAT);
  cairo_pattern_set_filter (cairo_get_source (cr), CAIRO_FILTER_NEAREST);
  cairo_fill_preserve (cr);
  cairo_restore (cr);
  cairo_surface_destroy (tile);
}

void kh_pen_hatch (cairo_t *cr, double step, double width, gboolean crossed)
{
  double x0, y0, x1, y1;
  if (cairo_surface_get_type (cairo_get_target (cr)) == CAIRO_SURFACE_TYPE_IMAGE
      && cairo_pattern_get_type (cairo_get_source (cr)) == CAIRO_PATTERN_TYPE_SOLID)
    {
      fill_tiles (cr, step, width, crossed);
      cairo_new_path (cr);
      return;
    }
  cairo_save (cr);
  cairo_clip (cr);
  cairo_clip_extents (cr, &x0, &y0, &x1, &y1);
  cairo_set_line_width (cr, width);
  if ((x1 - x0 + y1 - y0) / step < 20000)
    {
      double height = y1 - y0;
      for (double at = floor ((x0 + y0) / step) * step; at < x1 + y1; at += step)
        {
          /* Lines of x + y = at: the hatch runs on from one area to the next. */
          cairo_move_to (cr, at - y0, y0);
          cairo_line_to (cr, at - y0 - height, y1);
        }
      for (double at = floor ((x0 - y1) / step) * step; crossed && at < x1 - y0; at += step)
        {
          cairo_move_to (cr, at + y0, y0);
          cairo_line_to (cr, at + y1, y1);
        }
      cairo_stroke (cr);
    }
  cairo_restore (cr);
  cairo_new_path (cr);
}

gboolean kh_pen_sees (const KhView *view, KhBox mm)
{
  KhVec low = kh_view_to_device (view, (KhVec){ mm.x0, mm.y1 }),
        high = kh_view_to_device (view, (KhVec){ mm.x1, mm.y0 });
  return high.x >= 0 && low.x <= view->width && high.y >= 0 && low.y <= view->height;
}
