/* SPDX-License-Identifier: MIT */
#pragma once
#include "draw/palette.h"
#include "review/review.h"

/* The run strip: the run unrolled along its distance.  Lanes from the top: free
 * width on the left (upward), the body, free width on the right (downward),
 * front range with its threshold dashed, states with a diamond for each turn. */

typedef struct KhStripData KhStripData; /* free widths and lanes worked out once a run, at any thread */
KhStripData *kh_strip_data_new (const KhPlan *plan, const KhTrace *trace);
void kh_strip_data_free (KhStripData *data);
/* From the body to the walls beside it at a tick, mm; NAN: open on that side.
 * FALSE while it turns in place: the sides are not looked at then. */
gboolean kh_strip_data_get_free (const KhStripData *data, gsize tick, double *left_mm, double *right_mm);

typedef struct { KhScheme scheme; double width, height, text_size; gsize played_tick; } KhStripPicture;
void kh_strip_picture_draw (const KhStripPicture *picture, cairo_t *cr, const KhStripData *data);
/* The parts, for a strip that keeps what did not change: the run, and the mark of the played moment. */
void kh_strip_picture_draw_lanes (const KhStripPicture *picture, cairo_t *cr, const KhStripData *data);
void kh_strip_picture_draw_played (const KhStripPicture *picture, cairo_t *cr, const KhStripData *data);
gsize kh_strip_picture_tick_at (const KhStripPicture *picture, const KhStripData *data, double x); /* under the pointer */
