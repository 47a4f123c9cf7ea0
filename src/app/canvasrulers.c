/* SPDX-License-Identifier: MIT */
#include "app/canvasprivate.h"

#include "app/scheme.h"
#include <math.h>
#include <pango/pangocairo.h>

/* Rulers along the top and the left: running lengths from the datum at lattice
 * lines, letters and numbers of the cells between them.  Where lines stand too
 * close, every second, fifth, tenth, ... is named. */

typedef struct
{
  cairo_t *cr;
  KhScheme scheme;
  PangoLayout *layout;
  PangoFontDescription *plain, *bold;
} Pen;

static void pen_init (Pen *pen, cairo_t *cr)
{
  pen->cr = cr;
  pen->scheme = kh_scheme_get ();
  pen->layout = pango_cairo_create_layout (cr);
  pen->plain = pango_font_description_from_string ("Sans");
  pango_font_description_set_absolute_size (pen->plain, 10 * PANGO_SCALE);
  pen->bold = pango_font_description_copy (pen->plain);
  pango_font_description_set_weight (pen->bold, PANGO_WEIGHT_SEMIBOLD);
}

static void pen_clear (Pen *pen)
{
  g_object_unref (pen->layout);
  pango_font_description_free (pen->plain);
  pango_font_description_free (pen->bold);
}

/* Centred on (x, y); turned: reads upward. */
static void write_text (Pen *pen, double x, double y, const char *text, gboolean bold, gboolean turned)
{
  int width, height;
  pango_layout_set_font_description (pen->layout, bold ? pen->bold : pen->plain);
  pango_layout_set_text (pen->layout, text, -1);
  pango_layout_get_pixel_size (pen->layout, &width, &height);
  kh_palette_set_source (pen->cr, pen->scheme, bold ? KH_INK_TEXT_SECOND : KH_INK_TEXT, 1);
  cairo_save (pen->cr);
  cairo_translate (pen->cr, x, y);
  if (turned)
    cairo_rotate (pen->cr, -G_PI / 2);
  cairo_move_to (pen->cr, -width / 2.0, -height / 2.0);
  pango_cairo_show_layout (pen->cr, pen->layout);
  cairo_restore (pen->cr);
}

/* The smallest of 1, 2, 5, 10, 20, ... steps of 'step' px that leaves 'room' px. */
static int stride_for (double step, double room)
{
  static const int leads[] = { 1, 2, 5 };
  for (int ten = 1; ten <= 1000; ten *= 10)
    for (int i = 0; i < 3; i++)
      if (leads[i] * ten * step >= room)
        return leads[i] * ten;
  return 1000;
}

static void draw_axis (KhCanvas *self, Pen *pen, gboolean top, double length)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  double step = pitch * self->view.scale;
  int n = top ? plan->lattice.columns : plan->lattice.rows;
  int line_stride = stride_for (step, 52), cell_stride = stride_for (step, 26);
  for (int i = 0; i <= n; i++)
    {
      double at = top ? self->view.origin_x + i * step : self->view.origin_y - i * step;
      if (at < -step || at > length + step)
        continue;
      gboolean named = i % line_stride == 0;
      kh_palette_set_source (pen->cr, pen->scheme, named ? KH_INK_TEXT : KH_INK_TEXT_SECOND, 1);
      cairo_set_line_width (pen->cr, named ? 1.5 : 1);
      double tick = named ? 6 : 3;
      double crisp = floor (at) + 0.5;
      if (at >= 0 && at <= length && (named || step >= 4))
        {
          cairo_move_to (pen->cr, top ? KH_RULER_LEFT + crisp : KH_RULER_LEFT - tick,
                         top ? KH_RULER_TOP - tick : KH_RULER_TOP + crisp);
          cairo_line_to (pen->cr, top ? KH_RULER_LEFT + crisp : KH_RULER_LEFT,
                         top ? KH_RULER_TOP : KH_RULER_TOP + crisp);
          cairo_stroke (pen->cr);
        }
      if (named)
        {
          g_autofree char *text = kh_length_dup_text (i * plan->lattice.pitch_nm, self->unit, FALSE);
          write_text (pen, top ? KH_RULER_LEFT + at : 9, top ? 8 : KH_RULER_TOP + at, text, FALSE, !top);
        }
      if (i < n && i % cell_stride == 0 && step >= 6 && (line_stride == 1 || step * line_stride > 70))
        {
          double middle = top ? at + step / 2 : at - step / 2;
          g_autofree char *name = top ? kh_column_dup_letters (i) : g_strdup_printf ("%d", i + 1);
          if (line_stride == 1)
            write_text (pen, top ? KH_RULER_LEFT + middle : 9, top ? 8 : KH_RULER_TOP + middle, name, TRUE, FALSE);
        }
    }
}

/* Small ticks at round lengths between the lines, where they do not crowd. */
static void draw_fine_ticks (KhCanvas *self, Pen *pen, gboolean top, double length)
{
  double steps_mm[] = { 5, 10, 20, 50, 100, 200, 500, 1000 };
  double origin = top ? self->view.origin_x : self->view.origin_y, step = 0;
  for (gsize i = 0; i < G_N_ELEMENTS (steps_mm) && step < 9; i++)
    step = steps_mm[i] * self->view.scale;
  if (step < 9)
    return;
  kh_palette_set_source (pen->cr, pen->scheme, KH_INK_LINE, 1);
  cairo_set_line_width (pen->cr, 1);
  for (double at = fmod (origin, step); at < length; at += step)
    {
      double crisp = floor (at) + 0.5;
      if (at < 0)
        continue;
      cairo_move_to (pen->cr, top ? KH_RULER_LEFT + crisp : KH_RULER_LEFT - 3,
                     top ? KH_RULER_TOP - 3 : KH_RULER_TOP + crisp);
      cairo_line_to (pen->cr, top ? KH_RULER_LEFT + crisp : KH_RULER_LEFT, top ? KH_RULER_TOP : KH_RULER_TOP + crisp);
    }
  cairo_stroke (pen->cr);
}

static void set_chrome_source (KhCanvas *self, cairo_t *cr)
{
  GtkStyleContext *style = gtk_widget_get_style_context (GTK_WIDGET (self));
  GdkRGBA colour;
  if (!gtk_style_context_lookup_color (style, "kh_chrome", &colour))
    gdk_rgba_parse (&colour, "#F4F2ED");
  gdk_cairo_set_source_rgba (cr, &colour);
}

void kh_canvas_draw_rulers (gpointer canvas, cairo_t *cr, int width, int height)
{
  KhCanvas *self = canvas;
  Pen pen;
  set_chrome_source (self, cr);
  cairo_rectangle (cr, 0, 0, width, KH_RULER_TOP);
  cairo_rectangle (cr, 0, 0, KH_RULER_LEFT, height);
  cairo_fill (cr);
  pen_init (&pen, cr);
  cairo_save (cr);
  cairo_rectangle (cr, KH_RULER_LEFT, 0, width - KH_RULER_LEFT, KH_RULER_TOP);
  cairo_clip (cr);
  draw_fine_ticks (self, &pen, TRUE, width - KH_RULER_LEFT);
  draw_axis (self, &pen, TRUE, width - KH_RULER_LEFT);
  cairo_restore (cr);
  cairo_save (cr);
  cairo_rectangle (cr, 0, KH_RULER_TOP, KH_RULER_LEFT, height - KH_RULER_TOP);
  cairo_clip (cr);
  draw_fine_ticks (self, &pen, FALSE, height - KH_RULER_TOP);
  draw_axis (self, &pen, FALSE, height - KH_RULER_TOP);
  cairo_restore (cr);

  write_text (&pen, KH_RULER_LEFT / 2.0, KH_RULER_TOP / 2.0, self->unit == KH_LENGTH_UNIT_MM ? "mm" : "in", TRUE,
              FALSE);
  kh_palette_set_source (cr, pen.scheme, KH_INK_LINE, 1);
  cairo_set_line_width (cr, 1);
  cairo_move_to (cr, 0, KH_RULER_TOP - 0.5);
  cairo_line_to (cr, width, KH_RULER_TOP - 0.5);
  cairo_move_to (cr, KH_RULER_LEFT - 0.5, 0);
  cairo_line_to (cr, KH_RULER_LEFT - 0.5, height);
  cairo_stroke (cr);
  pen_clear (&pen);
}

void kh_canvas_draw_ruler_top_pointer (KhCanvas *self, cairo_t *cr)
{
  if (!self->pointer_in || self->pointer_x < 0 || self->pointer_y < 0)
    return;
  double x = KH_RULER_LEFT + self->pointer_x;
  kh_palette_set_source (cr, kh_scheme_get (), KH_INK_SIGN, 1);
  cairo_move_to (cr, x - 5, KH_RULER_TOP - 7);
  cairo_line_to (cr, x + 5, KH_RULER_TOP - 7);
  cairo_line_to (cr, x, KH_RULER_TOP);
  cairo_close_path (cr);
  cairo_fill (cr);
}

void kh_canvas_draw_ruler_left_pointer (KhCanvas *self, cairo_t *cr)
{
  if (!self->pointer_in || self->pointer_x < 0 || self->pointer_y < 0)
    return;
  double y = KH_RULER_TOP + self->pointer_y;
  kh_palette_set_source (cr, kh_scheme_get (), KH_INK_SIGN, 1);
  cairo_move_to (cr, KH_RULER_LEFT - 7, y - 5);
  cairo_line_to (cr, KH_RULER_LEFT - 7, y + 5);
  cairo_line_to (cr, KH_RULER_LEFT, y);
  cairo_close_path (cr);
  cairo_fill (cr);
}
