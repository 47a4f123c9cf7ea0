/* SPDX-License-Identifier: MIT */
#include "draw/strippicture.h"
#include "draw/pen.h"
#include "draw/stripdata.h"
#include <glib/gi18n-lib.h>
#include <math.h>

/* Where the lanes lie, in device units. */
typedef struct
{
  const KhStripPicture *picture;
  const KhStripData *data;
  cairo_t *cr;
  double px, x0, x1;
  double left0, left1, body1, right1; /* left lane, body, right lane: from the top */
  double front0, front1, state0, state1, axis;
  double per_mm; /* of free width */
} Lanes;

static Lanes lanes_of (const KhStripPicture *picture, const KhStripData *data, cairo_t *cr)
{
  double px = picture->text_size / 11, height = picture->height;
  Lanes l = { picture, data, cr, px, 78 * px, picture->width - 12 * px };
  double axis = 14 * px, state = 11 * px, rest = MAX (height - axis - state - 10 * px, 20 * px);
  double front = 0.2 * rest, sides = rest - front - 4 * px;
  l.left0 = 2 * px;
  l.per_mm = sides / (2 * data->middle * 1.35 + 1);
  l.left1 = l.left0 + (data->middle * 1.35 - data->half_width) * l.per_mm;
  l.body1 = l.left1 + 2 * data->half_width * l.per_mm;
  l.right1 = l.left0 + sides;
  l.front0 = l.right1 + 4 * px;
  l.front1 = l.front0 + front;
  l.state0 = l.front1 + 4 * px;
  l.state1 = l.state0 + state;
  l.axis = l.state1 + 7 * px;
  return l;
}

static double x_of (const Lanes *l, double distance) { return l->x0 + distance / l->data->length * (l->x1 - l->x0); }

static void ink (const Lanes *l, KhInk which, double alpha)
{
  kh_palette_set_source (l->cr, l->picture->scheme, which, alpha);
}

static void say (const Lanes *l, double y, const char *text)
{
  KhWords words = { l->x0 - 8 * l->px, y, l->picture->text_size, FALSE, KH_ALIGN_END, 0, 0 };
  ink (l, KH_INK_TEXT_SECOND, 1);
  kh_pen_words (l->cr, &words, text);
}

/* A line sample by sample: it stops where there is no value (NAN), and leaves
 * out what lies within a pixel of the last. */
typedef struct
{
  cairo_t *cr;
  double px, x, y;
  gboolean on;
} Line;

static void add_sample (Line *line, double x, double y)
{
  gboolean is = isfinite (y) != 0;
  if (is && line->on && fabs (x - line->x) < line->px && fabs (y - line->y) < line->px)
    return;
  if (is && line->on)
    cairo_line_to (line->cr, x, y);
  else if (is)
    cairo_move_to (line->cr, x, y);
  line->on = is;
  line->x = x;
  line->y = y;
}

/* The line of one side: distance from the axle, upward on the left. It stops where the side is open. */
static void draw_side (const Lanes *l, gboolean left)
{
  Line line = { .cr = l->cr, .px = l->px };
  double middle = (l->left1 + l->body1) / 2;
  cairo_save (l->cr);
  cairo_rectangle (l->cr, l->x0, left ? l->left0 : l->body1, l->x1 - l->x0,
                   left ? l->left1 - l->left0 : l->right1 - l->body1);
  ink (l, KH_INK_FLOOR, 1);
  cairo_fill_preserve (l->cr);
  cairo_clip (l->cr);
  for (guint i = 0; i < l->data->samples->len; i++)
    {
      const KhStripSample *s = &g_array_index (l->data->samples, KhStripSample, i);
      double mm = (double)(left ? s->left : s->right);
      add_sample (&line, x_of (l, (double)s->distance), middle + (left ? -1 : 1) * mm * l->per_mm);
    }
  ink (l, KH_INK_WALL, 1);
  cairo_set_line_width (l->cr, 1.5 * l->px);
  cairo_stroke (l->cr);
  cairo_restore (l->cr);
}

static void draw_body (const Lanes *l)
{
  const double dash[] = { 1.5 * l->px, 2.5 * l->px };
  cairo_rectangle (l->cr, l->x0, l->left1, l->x1 - l->x0, l->body1 - l->left1);
  ink (l, KH_INK_PANEL, 1);
  cairo_fill (l->cr);
  double y = (l->left1 + l->body1) / 2;
  cairo_move_to (l->cr, l->x0, y);
  cairo_line_to (l->cr, l->x1, y);
  ink (l, KH_INK_TEXT_SECOND, 0.8);
  cairo_set_line_width (l->cr, l->px);
  cairo_set_dash (l->cr, dash, 2, 0);
  cairo_stroke (l->cr);
  cairo_set_dash (l->cr, NULL, 0, 0);
}

static void draw_front (const Lanes *l)
{
  const double dash[] = { 4 * l->px, 3 * l->px };
  Line line = { .cr = l->cr, .px = l->px };
  double per = (l->front1 - l->front0) / l->data->front_most;
  for (guint i = 0; i < l->data->samples->len; i++)
    {
      const KhStripSample *s = &g_array_index (l->data->samples, KhStripSample, i);
      add_sample (&line, x_of (l, (double)s->distance), l->front1 - (double)s->front * per);
    }
  ink (l, KH_INK_FOLLOW, 1);
  cairo_set_line_width (l->cr, 1.3 * l->px);
  cairo_stroke (l->cr);
  cairo_move_to (l->cr, l->x0, l->front1 - l->data->threshold * per);
  cairo_line_to (l->cr, l->x1, l->front1 - l->data->threshold * per);
  cairo_set_dash (l->cr, dash, 2, 0);
  ink (l, KH_INK_TEXT_SECOND, 1);
  cairo_set_line_width (l->cr, l->px);
  cairo_stroke (l->cr);
  cairo_set_dash (l->cr, NULL, 0, 0);
}

static void fill_state (const Lanes *l, int state, double from, double to)
{
  static const KhInk inks[] = { KH_INK_FOLLOW, KH_INK_CURVE, KH_INK_CURVE, KH_INK_TURN, KH_INK_SEARCHING, KH_INK_SIGN };
  cairo_rectangle (l->cr, x_of (l, from), l->state0, MAX (x_of (l, to) - x_of (l, from), 0.5 * l->px),
                   l->state1 - l->state0);
  ink (l, inks[state], 1);
  if (state == KH_STATE_CURVE)
    kh_pen_hatch (l->cr, 4 * l->px, 1.6 * l->px, FALSE);
  else if (state == KH_STATE_SEARCHING)
    kh_pen_hatch (l->cr, 4 * l->px, 1.6 * l->px, TRUE);
  else
    cairo_fill (l->cr);
}

static void draw_states (const Lanes *l)
{
  const GArray *samples = l->data->samples;
  double size = 5.5 * l->px, y = (l->state0 + l->state1) / 2;
  for (guint i = 0; i < samples->len;)
    {
      guint from = i;
      int state = g_array_index (samples, KhStripSample, i).state;
      while (i < samples->len && g_array_index (samples, KhStripSample, i).state == state)
        i++;
      double end = i < samples->len ? (double)g_array_index (samples, KhStripSample, i).distance : l->data->length;
      fill_state (l, state, (double)g_array_index (samples, KhStripSample, from).distance, end);
    }
  for (guint i = 0; i < l->data->turns->len; i++)
    {
      double x = x_of (l, (double)g_array_index (l->data->turns, float, i));
      cairo_move_to (l->cr, x, y - size);
      cairo_line_to (l->cr, x + size, y);
      cairo_line_to (l->cr, x, y + size);
      cairo_line_to (l->cr, x - size, y);
      cairo_close_path (l->cr);
      ink (l, KH_INK_TURN, 1);
      cairo_fill_preserve (l->cr);
      ink (l, KH_INK_FLOOR, 1);
      cairo_set_line_width (l->cr, l->px);
      cairo_stroke (l->cr);
    }
  /* How it ends: the sign of a mark, or that of a failure. */
  cairo_arc (l->cr, x_of (l, l->data->length), y, 4.5 * l->px, 0, 2 * G_PI);
  ink (l, KH_INK_FLOOR, 1);
  cairo_fill_preserve (l->cr);
  ink (l, l->data->failed ? KH_INK_CONTACT : KH_INK_SIGN, 1);
  cairo_set_line_width (l->cr, 2 * l->px);
  cairo_stroke (l->cr);
}

static void draw_axis (const Lanes *l)
{
  static const double steps[] = { 0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 50, 100, 200, 500, 1000 };
  double step = steps[G_N_ELEMENTS (steps) - 1];
  for (gsize i = G_N_ELEMENTS (steps); i > 0; i--)
    if (steps[i - 1] * 1000 / l->data->length * (l->x1 - l->x0) >= 90 * l->px)
      step = steps[i - 1];
  for (int i = 0; i * step * 1000 <= l->data->length; i++)
    {
      double x = x_of (l, i * step * 1000);
      g_autofree char *text = g_strdup_printf ("%g m", i * step);
      KhWords words = { x, l->axis, 0.91 * l->picture->text_size, FALSE, KH_ALIGN_MIDDLE, 0, 0 };
      ink (l, KH_INK_TEXT_SECOND, 1);
      kh_pen_words (l->cr, &words, text);
      cairo_move_to (l->cr, x, l->left0);
      cairo_line_to (l->cr, x, l->state0);
      ink (l, KH_INK_LINE, 0.6);
      cairo_set_line_width (l->cr, 0.8 * l->px);
      cairo_stroke (l->cr);
    }
}

static void draw_least (const Lanes *l)
{
  double x = CLAMP (x_of (l, l->data->least_clearance_at), l->x0 + 6 * l->px, l->x1 - 60 * l->px),
         y = l->right1 - 4 * l->px, size = 4 * l->px;
  cairo_move_to (l->cr, x, y - size);
  cairo_line_to (l->cr, x + size, y + size);
  cairo_line_to (l->cr, x - size, y + size);
  cairo_close_path (l->cr);
  ink (l, KH_INK_CONTACT, 1);
  cairo_fill (l->cr);
  g_autofree char *text = g_strdup_printf (_ ("least %.0f mm"), l->data->least_clearance);
  KhWords words = { x + 8 * l->px, y + l->px, l->picture->text_size, TRUE, KH_ALIGN_START, 0, 0 };
  kh_pen_words (l->cr, &words, text);
}

static void draw_played (const Lanes *l)
{
  gsize tick = MIN (l->picture->played_tick, l->data->n_ticks - 1);
  double x = x_of (l, (double)l->data->distance_of_tick[tick]), size = 6 * l->px;
  ink (l, KH_INK_TEXT, 1);
  cairo_move_to (l->cr, x, l->left0);
  cairo_line_to (l->cr, x, l->state1);
  cairo_set_line_width (l->cr, 1.6 * l->px);
  cairo_stroke (l->cr);
  cairo_move_to (l->cr, x - size, 0);
  cairo_line_to (l->cr, x + size, 0);
  cairo_line_to (l->cr, x, size);
  cairo_close_path (l->cr);
  cairo_fill (l->cr);
}

void kh_strip_picture_draw_lanes (const KhStripPicture *picture, cairo_t *cr, const KhStripData *data)
{
  Lanes l = lanes_of (picture, data, cr);
  if (l.x1 <= l.x0 + 20)
    return;
  cairo_save (cr);
  draw_side (&l, TRUE);
  draw_side (&l, FALSE);
  draw_body (&l);
  draw_front (&l);
  draw_axis (&l);
  draw_states (&l);
  draw_least (&l);
  say (&l, MIN ((l.left0 + l.left1) / 2, l.left0 + 0.25 * (l.right1 - l.left0)), _ ("left, mm"));
  if (l.right1 - l.left0 > 46 * l.px) /* else the three names would run into each other */
    say (&l, (l.left1 + l.body1) / 2, _ ("body"));
  say (&l, MAX ((l.body1 + l.right1) / 2, l.right1 - 0.25 * (l.right1 - l.left0)), _ ("right, mm"));
  say (&l, (l.front0 + l.front1) / 2, _ ("front, mm"));
  say (&l, (l.state0 + l.state1) / 2, _ ("state"));
  cairo_restore (cr);
}

void kh_strip_picture_draw_played (const KhStripPicture *picture, cairo_t *cr, const KhStripData *data)
{
  Lanes l = lanes_of (picture, data, cr);
  if (l.x1 <= l.x0 + 20)
    return;
  cairo_save (cr);
  draw_played (&l);
  cairo_restore (cr);
}

void kh_strip_picture_draw (const KhStripPicture *picture, cairo_t *cr, const KhStripData *data)
{
  kh_strip_picture_draw_lanes (picture, cr, data);
  kh_strip_picture_draw_played (picture, cr, data);
}

gsize kh_strip_picture_tick_at (const KhStripPicture *picture, const KhStripData *data, double x)
{
  Lanes l = lanes_of (picture, data, NULL);
  double distance = (x - l.x0) / MAX (l.x1 - l.x0, 1) * data->length;
  gsize low = 0, high = data->n_ticks - 1;
  while (low < high)
    {
      gsize middle = low + (high - low) / 2;
      if ((double)data->distance_of_tick[middle] < distance)
        low = middle + 1;
      else
        high = middle;
    }
  return low;
}
