/* SPDX-License-Identifier: MIT */
/* The run on the plan: trail of the hand-side flank, place touched, robot, key. */
#include "base/units.h"
#include "draw/pen.h"
#include "draw/planpicture.h"
#include <glib/gi18n-lib.h>
#include <math.h>

#define FAINT 0.38      /* what is not yet played */
#define ARROW_EVERY 150 /* px along the trail */

typedef struct
{
  KhInk ink;
  double width, dash[4];
  int n_dash;
  gboolean round;
} Style;

static const Style styles[] = {
  [KH_STATE_FOLLOW] = { KH_INK_FOLLOW, 2.2, { 0 }, 0, FALSE },
  [KH_STATE_LEAD_IN] = { KH_INK_CURVE, 2.2, { 10, 3, 2, 3 }, 4, FALSE },
  [KH_STATE_CURVE] = { KH_INK_CURVE, 2.2, { 7, 4 }, 2, FALSE },
  [KH_STATE_PIVOT] = { KH_INK_TURN, 3, { 0.01, 4.6 }, 2, TRUE },
  [KH_STATE_SEARCHING] = { KH_INK_SEARCHING, 2.2, { 16, 6 }, 2, FALSE },
  [KH_STATE_STOPPED] = { KH_INK_FOLLOW, 2.2, { 0 }, 0, FALSE },
};

static void set_style (cairo_t *cr, const KhPlanPicture *picture, int state, double alpha)
{
  const Style *style = &styles[state];
  double px = picture->text_size / 11, dash[4];
  for (int i = 0; i < style->n_dash; i++)
    dash[i] = style->dash[i] * px;
  kh_palette_set_source (cr, picture->scheme, style->ink, alpha);
  cairo_set_line_width (cr, (style->width + (picture->high_contrast ? 1 : 0)) * px);
  cairo_set_dash (cr, dash, style->n_dash, 0);
  cairo_set_line_cap (cr, style->round ? CAIRO_LINE_CAP_ROUND : CAIRO_LINE_CAP_BUTT);
  cairo_set_line_join (cr, CAIRO_LINE_JOIN_BEVEL);
}

/* Half the body's width: how far its flank is from the axle. */
static double flank_mm (const KhPlan *plan)
{
  const KhRobotBody *body = &plan->robot.body;
  return body->shape == KH_BODY_DISC ? body->radius_mm : body->half_width_mm;
}

static KhVec flank_at (const KhView *view, const KhTick *tick, double aside)
{
  KhVec mm = { tick->x - aside * sin (tick->heading_rad), tick->y + aside * cos (tick->heading_rad) };
  return kh_view_to_device (view, mm);
}

static void add_arrow (cairo_t *cr, KhVec at, double dx, double dy, double size)
{
  double length = sqrt (dx * dx + dy * dy);
  if (length < 1e-9)
    return;
  dx *= size / length;
  dy *= size / length;
  cairo_move_to (cr, at.x + dx, at.y + dy);
  cairo_line_to (cr, at.x - dx * 0.6 - dy * 0.7, at.y - dy * 0.6 + dx * 0.7);
  cairo_line_to (cr, at.x - dx * 0.6 + dy * 0.7, at.y - dy * 0.6 - dx * 0.7);
  cairo_close_path (cr);
}

/* Ticks from .. to of one state. Points near the last are left out: along a wall the
 * line hardly bends, in turns and curves it does; strokes cost by the point. */
static void stroke_piece (cairo_t *cr, const KhPlanPicture *picture, const KhView *view, const KhTrace *trace,
                          double aside, gsize range[2], double alpha)
{
  double px = picture->text_size / 11;
  const KhTick *first = kh_trace_get_tick (trace, range[0]);
  int state = kh_trace_get_tick (trace, range[1])->state;
  double least = (state == KH_STATE_CURVE || state == KH_STATE_PIVOT ? 1.5 : 6) * px;
  KhVec last = flank_at (view, first, aside);
  cairo_move_to (cr, last.x, last.y);
  for (gsize i = range[0] + 1; i <= range[1]; i++)
    {
      KhVec at = flank_at (view, kh_trace_get_tick (trace, i), aside);
      if (i == range[1] || fabs (at.x - last.x) + fabs (at.y - last.y) >= least)
        {
          cairo_line_to (cr, at.x, at.y);
          last = at;
        }
    }
  set_style (cr, picture, state, alpha);
  cairo_stroke (cr);
}

static void draw_arrows (cairo_t *cr, const KhPlanPicture *picture, const KhView *view, const KhTrace *trace,
                         double aside)
{
  double px = picture->text_size / 11, every = ARROW_EVERY * px / view->scale, next = every / 2;
  gsize n = kh_trace_get_n_ticks (trace);
  for (gsize i = 1; i + 1 < n; i++)
    {
      const KhTick *tick = kh_trace_get_tick (trace, i);
      if ((double)tick->distance_mm < next || tick->state != KH_STATE_FOLLOW)
        continue;
      next = (double)tick->distance_mm + every;
      double alpha = i <= picture->played_tick ? 1 : FAINT;
      add_arrow (cr, flank_at (view, tick, aside), cos (tick->heading_rad), -sin (tick->heading_rad), 5 * px);
      kh_palette_set_source (cr, picture->scheme, KH_INK_FOLLOW, alpha);
      cairo_fill (cr);
    }
}

static void draw_contact (cairo_t *cr, const KhPlanPicture *picture, KhVec at)
{
  double px = picture->text_size / 11, radius = 7 * px;
  kh_palette_set_source (cr, picture->scheme, KH_INK_CONTACT, 1);
  cairo_set_dash (cr, NULL, 0, 0);
  cairo_set_line_width (cr, 2 * px);
  cairo_arc (cr, at.x, at.y, radius, 0, 2 * G_PI);
  cairo_stroke (cr);
  for (int k = 0; k < 4; k++)
    {
      double angle = G_PI / 4 + k * G_PI / 2;
      cairo_move_to (cr, at.x + radius * cos (angle), at.y + radius * sin (angle));
      cairo_line_to (cr, at.x + 1.7 * radius * cos (angle), at.y + 1.7 * radius * sin (angle));
    }
  cairo_stroke (cr);
  cairo_arc (cr, at.x, at.y, 2.2 * px, 0, 2 * G_PI);
  cairo_fill (cr);
}

void kh_plan_picture_draw_run (const KhPlanPicture *picture, cairo_t *cr, const KhView *view, const KhPlan *plan,
                               const KhReview *review)
{
  const KhTrace *trace = review ? review->traces[picture->hand] : NULL;
  if (!trace || !picture->with_trail)
    return;
  double aside = (picture->hand == KH_HAND_RIGHT ? -1 : 1) * flank_mm (plan);
  gsize n = kh_trace_get_n_ticks (trace);
  cairo_save (cr);
  for (gsize from = 0; from + 1 < n;)
    {
      gsize to = from + 1;
      int state = kh_trace_get_tick (trace, to)->state;
      /* A piece ends with its state, and where the played part ends. */
      while (to + 1 < n && kh_trace_get_tick (trace, to + 1)->state == state && to != picture->played_tick)
        to++;
      stroke_piece (cr, picture, view, trace, aside, (gsize[2]){ from, to }, to <= picture->played_tick ? 1 : FAINT);
      from = to;
    }
  draw_arrows (cr, picture, view, trace, aside);
  if (trace->has_contact)
    draw_contact (cr, picture, kh_view_to_device (view, trace->contact.at));
  cairo_restore (cr);
}

static void draw_beam (cairo_t *cr, const KhView *view, KhPose pose, double ahead, double side, double reading,
                       double px)
{
  double s = sin (pose.heading_rad), c = cos (pose.heading_rad);
  KhVec from = { pose.x + ahead * c - side * s, pose.y + ahead * s + side * c };
  double way = copysign (reading, side);
  KhVec a = kh_view_to_device (view, from), b = kh_view_to_device (view, (KhVec){ from.x - way * s, from.y + way * c });
  cairo_rectangle (cr, a.x - 2.5 * px, a.y - 2.5 * px, 5 * px, 5 * px);
  cairo_fill (cr);
  if (!isfinite (reading))
    return;
  cairo_move_to (cr, a.x, a.y);
  cairo_line_to (cr, b.x, b.y);
  cairo_set_line_width (cr, 1.4 * px);
  cairo_stroke (cr);
  cairo_arc (cr, b.x, b.y, 2.6 * px, 0, 2 * G_PI);
  cairo_stroke (cr);
}

static void draw_cone (cairo_t *cr, const KhPlanPicture *picture, const KhView *view, const KhPlan *plan,
                       const KhTick *tick)
{
  const KhFrontSensor *front = &plan->robot.front_sensor;
  double half = front->half_beam_deg * G_PI / 180, px = picture->text_size / 11;
  double reach = isfinite (tick->front_mm) ? (double)tick->front_mm : front->range_mm[1];
  KhVec from
      = { tick->x + front->ahead_mm * cos (tick->heading_rad), tick->y + front->ahead_mm * sin (tick->heading_rad) };
  KhVec at = kh_view_to_device (view, from);
  cairo_move_to (cr, at.x, at.y);
  cairo_arc (cr, at.x, at.y, reach * view->scale, -tick->heading_rad - half, -tick->heading_rad + half);
  cairo_close_path (cr);
  kh_palette_set_source (cr, picture->scheme, KH_INK_FOLLOW, 0.16);
  cairo_fill_preserve (cr);
  kh_palette_set_source (cr, picture->scheme, KH_INK_FOLLOW, isfinite (tick->front_mm) ? 0.6 : 0.25);
  cairo_set_line_width (cr, 0.8 * px);
  cairo_stroke (cr);
}

static void add_body (cairo_t *cr, const KhRobotBody *body, double scale)
{
  if (body->shape == KH_BODY_DISC)
    cairo_arc (cr, 0, 0, body->radius_mm * scale, 0, 2 * G_PI);
  else
    cairo_rectangle (cr, -body->behind_mm * scale, -body->half_width_mm * scale,
                     (body->ahead_mm + body->behind_mm) * scale, 2 * body->half_width_mm * scale);
}

static void draw_body (cairo_t *cr, const KhPlanPicture *picture, const KhView *view, const KhPlan *plan,
                       const KhTick *tick)
{
  const KhRobotDrive *drive = &plan->robot.drive;
  double px = picture->text_size / 11, scale = view->scale, flank = flank_mm (plan);
  KhVec at = kh_view_to_device (view, (KhVec){ tick->x, tick->y });
  cairo_save (cr);
  cairo_translate (cr, at.x, at.y);
  cairo_rotate (cr, -tick->heading_rad);
  add_body (cr, &plan->robot.body, scale);
  kh_palette_set_source (cr, picture->scheme, KH_INK_FLOOR, 0.92);
  cairo_fill_preserve (cr);
  kh_palette_set_source (cr, picture->scheme, KH_INK_TEXT, 1);
  cairo_set_line_width (cr, 1.6 * px);
  cairo_stroke (cr);
  double wheel = MIN (drive->wheel_radius_mm, flank * 0.5) * scale, aside = MIN (drive->track_mm / 2, flank) * scale;
  for (int side = -1; side <= 1; side += 2)
    cairo_rectangle (cr, -wheel, side * aside - 0.08 * flank * scale, 2 * wheel, 0.16 * flank * scale);
  cairo_fill (cr);
  /* Nose: an arrowhead before the axle. */
  double nose = 0.42 * flank * scale;
  cairo_move_to (cr, nose * 1.5, 0);
  cairo_line_to (cr, nose * 0.5, -nose * 0.5);
  cairo_line_to (cr, nose * 0.75, 0);
  cairo_line_to (cr, nose * 0.5, nose * 0.5);
  cairo_close_path (cr);
  cairo_fill (cr);
  cairo_restore (cr);
}

void kh_plan_picture_draw_robot (const KhPlanPicture *picture, cairo_t *cr, const KhView *view, const KhPlan *plan,
                                 const KhTrace *trace, gsize tick)
{
  const KhTick *t = kh_trace_get_tick (trace, tick);
  const KhSideSensors *side = &plan->robot.side_sensors;
  double px = picture->text_size / 11, aside = (trace->hand == KH_HAND_RIGHT ? -1 : 1) * MAX (side->offset_mm, 1e-3);
  KhPose pose = { t->x, t->y, t->heading_rad };
  cairo_save (cr);
  cairo_set_dash (cr, NULL, 0, 0);
  if (picture->with_beams)
    draw_cone (cr, picture, view, plan, t);
  draw_body (cr, picture, view, plan, t);
  if (picture->with_beams)
    {
      kh_palette_set_source (cr, picture->scheme, KH_INK_FOLLOW, 1);
      draw_beam (cr, view, pose, side->front_mm, aside, (double)t->side_front_mm, px);
      draw_beam (cr, view, pose, -side->rear_mm, aside, (double)t->side_rear_mm, px);
    }
  if (trace->has_contact) /* over the body that touches */
    draw_contact (cr, picture, kh_view_to_device (view, trace->contact.at));
  cairo_restore (cr);
}

void kh_plan_picture_draw_key (const KhPlanPicture *picture, cairo_t *cr, double x, double y, KhHand hand)
{
  static const int states[] = { KH_STATE_FOLLOW, KH_STATE_LEAD_IN, KH_STATE_CURVE, KH_STATE_PIVOT, KH_STATE_SEARCHING };
  double px = picture->text_size / 11, step = 20 * px;
  KhWords words = { x, y - 1 * px, picture->text_size, FALSE, KH_ALIGN_START, 0, 0 };
  cairo_save (cr);
  kh_palette_set_source (cr, picture->scheme, KH_INK_TEXT_SECOND, 1);
  kh_pen_words (cr, &words, hand == KH_HAND_RIGHT ? _ ("Trail of the\nright flank") : _ ("Trail of the\nleft flank"));
  words.x = x + 32 * px;
  words.y += 8 * px; /* the heading has two lines */
  for (gsize i = 0; i <= G_N_ELEMENTS (states); i++)
    {
      gboolean touched = i == G_N_ELEMENTS (states);
      words.y += step;
      if (touched)
        draw_contact (cr, picture, (KhVec){ x + 12 * px, words.y });
      else
        {
          cairo_move_to (cr, x, words.y);
          cairo_line_to (cr, x + 25 * px, words.y);
          set_style (cr, picture, states[i], 1);
          cairo_stroke (cr);
        }
      kh_palette_set_source (cr, picture->scheme, KH_INK_TEXT, 1);
      kh_pen_words (cr, &words, touched ? _ ("touched") : kh_state_get_words ((KhState)states[i]));
    }
  cairo_restore (cr);
}
