/* SPDX-License-Identifier: MIT */
#pragma once
#include "draw/palette.h"
#include "draw/view.h"

/* Small strokes and words that the pictures share. Lengths in device units. */

typedef enum { KH_ALIGN_START, KH_ALIGN_MIDDLE, KH_ALIGN_END } KhAlign;

typedef struct
{
  double x, y;      /* of the anchor; vertically the text's middle */
  double size;      /* height of the type */
  gboolean bold;
  KhAlign align;
  double turned_rad; /* about the anchor, clockwise on screen */
  double most_width; /* 0: any; longer text ends in an ellipsis */
} KhWords;

void kh_pen_words (cairo_t *cr, const KhWords *words, const char *text);
void kh_pen_measure (cairo_t *cr, double size, gboolean bold, const char *text, double *width, double *height);

/* A rectangle given in the plane's millimetres, as a path. */
void kh_pen_box (cairo_t *cr, const KhView *view, KhBox mm);
/* Diagonal hatch over the current path (which is consumed): lines 'step' apart, 'width' wide. */
void kh_pen_hatch (cairo_t *cr, double step, double width, gboolean crossed);
/* Is anything of the box to be seen? */
gboolean kh_pen_sees (const KhView *view, KhBox mm);
