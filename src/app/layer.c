/* SPDX-License-Identifier: MIT */
#include "app/layer.h"

#include <string.h>

#define TILE 96 /* px of the widget */

typedef struct
{
  const guint32 *pixels;
  int stride; /* in pixels */
} Raster;

static Raster raster_of (cairo_surface_t *surface)
{
  return (Raster){ (const guint32 *)(const void *)cairo_image_surface_get_data (surface),
                   cairo_image_surface_get_stride (surface) / 4 };
}

static gboolean is_empty (Raster raster, int x, int y, int width, int height)
{
  for (int row = y; row < y + height; row++)
    for (int column = x; column < x + width; column++)
      if (raster.pixels[row * raster.stride + column] != 0)
        return FALSE;
  return TRUE;
}

static gboolean is_same (Raster a, Raster b, int x, int y, int width, int height)
{
  for (int row = y; row < y + height; row++)
    if (memcmp (a.pixels + row * a.stride + x, b.pixels + row * b.stride + x, (gsize)width * 4) != 0)
      return FALSE;
  return TRUE;
}

/* The node keeps pixels of its own, so that the whole may be let go. */
static GskRenderNode *new_tile (cairo_surface_t *whole, int scale, int x, int y, int width, int height)
{
  cairo_surface_t *part = cairo_image_surface_create (CAIRO_FORMAT_ARGB32, width * scale, height * scale);
  Raster from = raster_of (whole);
  int stride = cairo_image_surface_get_stride (part);
  cairo_surface_flush (part);
  for (int row = 0; row < height * scale; row++)
    memcpy (cairo_image_surface_get_data (part) + row * stride,
            from.pixels + (y * scale + row) * from.stride + x * scale, (gsize)(width * scale) * 4);
  cairo_surface_mark_dirty (part);
  cairo_surface_set_device_scale (part, scale, scale);
  graphene_rect_t bounds = GRAPHENE_RECT_INIT ((float)x, (float)y, (float)width, (float)height);
  GskRenderNode *node = gsk_cairo_node_new (&bounds);
  cairo_t *cr = gsk_cairo_node_get_draw_context (node);
  cairo_set_source_surface (cr, part, x, y);
  cairo_pattern_set_filter (cairo_get_source (cr), CAIRO_FILTER_NEAREST);
  cairo_paint (cr);
  cairo_destroy (cr);
  cairo_surface_destroy (part);
  return node;
}

static void node_free (gpointer node)
{
  if (node != NULL)
    gsk_render_node_unref (node);
}

static void cut_tiles (KhLayer *layer, cairo_surface_t *before)
{
  int scale = layer->scale, i = 0;
  Raster now = raster_of (layer->whole);
  GPtrArray *tiles = g_ptr_array_new_with_free_func (node_free);
  for (int y = 0; y < layer->height; y += TILE)
    for (int x = 0; x < layer->width; x += TILE, i++)
      {
        int width = MIN (TILE, layer->width - x), height = MIN (TILE, layer->height - y);
        GskRenderNode *node = NULL;
        if (before != NULL && is_same (now, raster_of (before), x * scale, y * scale, width * scale, height * scale))
          node = g_steal_pointer (&g_ptr_array_index (layer->tiles, i));
        else if (!is_empty (now, x * scale, y * scale, width * scale, height * scale))
          node = new_tile (layer->whole, scale, x, y, width, height);
        g_ptr_array_add (tiles, node);
      }
  g_clear_pointer (&layer->tiles, g_ptr_array_unref);
  layer->tiles = tiles;
}

static void draw_anew (KhLayer *layer, int width, int height, int scale, KhLayerDraw draw, gpointer data)
{
  gboolean same_size
      = layer->whole != NULL && layer->width == width && layer->height == height && layer->scale == scale;
  cairo_surface_t *before = g_steal_pointer (&layer->whole);
  layer->width = width;
  layer->height = height;
  layer->scale = scale;
  layer->whole = cairo_image_surface_create (CAIRO_FORMAT_ARGB32, width * scale, height * scale);
  cairo_surface_set_device_scale (layer->whole, scale, scale);
  cairo_t *cr = cairo_create (layer->whole);
  draw (data, cr, width, height);
  cairo_destroy (cr);
  cairo_surface_flush (layer->whole);
  cut_tiles (layer, same_size ? before : NULL);
  g_clear_pointer (&before, cairo_surface_destroy);
  layer->is_good = TRUE;
}

void kh_layer_spoil (KhLayer *layer) { layer->is_good = FALSE; }

void kh_layer_clear (KhLayer *layer)
{
  g_clear_pointer (&layer->whole, cairo_surface_destroy);
  g_clear_pointer (&layer->tiles, g_ptr_array_unref);
  layer->is_good = FALSE;
}

void kh_layer_append (KhLayer *layer, GtkSnapshot *snapshot, const graphene_size_t *size, int scale, KhLayerDraw draw,
                      gpointer data)
{
  int width = (int)size->width, height = (int)size->height;
  if (!layer->is_good || layer->width != width || layer->height != height || layer->scale != scale)
    draw_anew (layer, width, height, scale, draw, data);
  for (guint i = 0; i < layer->tiles->len; i++)
    if (g_ptr_array_index (layer->tiles, i) != NULL)
      gtk_snapshot_append_node (snapshot, g_ptr_array_index (layer->tiles, i));
}
