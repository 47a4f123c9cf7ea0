/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>

/* A layer of a drawing that is kept from frame to frame, in tiles.  When it is
 * drawn anew, tiles whose pixels stayed keep their render node, so that the
 * window paints only what changed: where the played moment moved on, or where
 * one wall was laid.  Empty tiles cost nothing.
 *
 * (A GdkTexture would be the plain way, but GTK 4.8's software renderer converts
 * it pixel by pixel in every frame: 20 ms.) */

typedef struct
{
  cairo_surface_t *whole; /* what was drawn last; NULL: nothing yet */
  GPtrArray *tiles;       /* of GskRenderNode, rows first; NULL: empty */
  int width, height, scale;
  gboolean is_good;       /* nothing to draw anew */
} KhLayer;

typedef void (*KhLayerDraw) (gpointer data, cairo_t *cr, int width, int height);

void kh_layer_spoil (KhLayer *layer); /* to be drawn anew */
void kh_layer_clear (KhLayer *layer);
/* Draws anew where needed, then appends it. */
void kh_layer_append (KhLayer *layer, GtkSnapshot *snapshot, const graphene_size_t *size, int scale, KhLayerDraw draw,
                      gpointer data);
