/* SPDX-License-Identifier: MIT */
#include "draw/export.h"
#include "base/units.h"
#include "draw/page.h"
#include <cairo-pdf.h>
#include <cairo-svg.h>
#include <glib/gi18n-lib.h>
#include <math.h>

G_DEFINE_QUARK (kh - export - error - quark, kh_export_error)

#define SVG_TEXT_SHARE 75.0 /* longer side of the plan over the height of the type */
#define SVG_LEAST_TEXT 4.0
#define PNG_LOOK 1200.0 /* pixels at which type is as on the screen */

gboolean kh_export_kind_from_path (const char *path, KhExportKind *kind)
{
  static const char *const endings[] = { ".svg", ".pdf", ".png" };
  g_autofree char *lower = g_ascii_strdown (path, -1);
  for (int i = 0; i < 3; i++)
    if (g_str_has_suffix (lower, endings[i]))
      {
        *kind = (KhExportKind)i;
        return TRUE;
      }
  return FALSE;
}

static cairo_status_t append_bytes (void *closure, const unsigned char *data, unsigned int length)
{
  g_byte_array_append (closure, data, length);
  return CAIRO_STATUS_SUCCESS;
}

/* Bytes once the surface is finished and nothing went wrong on the way. */
static GBytes *finish (cairo_t *cr, cairo_surface_t *surface, GByteArray *bytes, GError **error)
{
  cairo_status_t status = cairo_status (cr);
  cairo_destroy (cr);
  cairo_surface_finish (surface);
  if (status == CAIRO_STATUS_SUCCESS)
    status = cairo_surface_status (surface);
  cairo_surface_destroy (surface);
  if (status == CAIRO_STATUS_SUCCESS)
    return g_byte_array_free_to_bytes (bytes);
  g_set_error (error, KH_EXPORT_ERROR, KH_EXPORT_ERROR_CAIRO, "%s", cairo_status_to_string (status));
  g_byte_array_unref (bytes);
  return NULL;
}

/* The plan in the view with what was asked for, on paper. */
static void draw_what (cairo_t *cr, KhView *view, KhExportWhat what, KhScheme scheme, const KhPlan *plan,
                       const KhReview *review, double text)
{
  KhPlanPicture picture;
  kh_plan_picture_init (&picture);
  picture.scheme = scheme;
  picture.text_size = text;
  picture.with_rulers = TRUE;
  picture.with_labels = what == KH_EXPORT_WHAT_ASSEMBLY;
  picture.with_trail = what == KH_EXPORT_WHAT_RUN;
  picture.with_findings = what == KH_EXPORT_WHAT_PLAN;
  if (review && !review->traces[picture.hand])
    picture.hand = KH_HAND_LEFT;
  kh_plan_picture_draw (&picture, cr, view, plan, review);
}

static GBytes *export_svg (KhExportWhat what, const KhPlan *plan, const KhReview *review, GError **error)
{
  double width = kh_mm_from_nm (kh_plan_width_nm (plan)), depth = kh_mm_from_nm (kh_plan_depth_nm (plan));
  double text = MAX (MAX (width, depth) / SVG_TEXT_SHARE, SVG_LEAST_TEXT), margin = 7 * text;
  double half = kh_mm_from_nm (plan->walls.thickness_nm) / 2;
  GByteArray *bytes = g_byte_array_new ();
  cairo_surface_t *surface
      = cairo_svg_surface_create_for_stream (append_bytes, bytes, width + 2 * margin, depth + 2 * margin);
  cairo_svg_surface_set_document_unit (surface, CAIRO_SVG_UNIT_MM);
  cairo_t *cr = cairo_create (surface);
  KhView view = { 1, margin + half, margin + depth - half, width + 2 * margin, depth + 2 * margin };
  draw_what (cr, &view, what, KH_SCHEME_LIGHT, plan, review, text);
  return finish (cr, surface, bytes, error);
}

static GBytes *export_png (KhExportWhat what, const KhPlan *plan, const KhReview *review, int pixels, GError **error)
{
  double width = kh_mm_from_nm (kh_plan_width_nm (plan)), depth = kh_mm_from_nm (kh_plan_depth_nm (plan));
  double text = 11 * MAX (pixels / PNG_LOOK, 0.7), margin = 7.5 * text;
  double scale = (pixels - 2 * margin) / MAX (width, depth);
  int w = (int)ceil (width * scale + 2 * margin), h = (int)ceil (depth * scale + 2 * margin);
  if (scale <= 0)
    {
      g_set_error (error, KH_EXPORT_ERROR, KH_EXPORT_ERROR_SIZE, _ ("%d pixels are too few for this plan"), pixels);
      return NULL;
    }
  GByteArray *bytes = g_byte_array_new ();
  cairo_surface_t *surface = cairo_image_surface_create (CAIRO_FORMAT_RGB24, w, h);
  cairo_t *cr = cairo_create (surface);
  KhView view;
  kh_view_fit (&view, plan, w, h, margin);
  kh_palette_set_source (cr, KH_SCHEME_LIGHT, KH_INK_DESK, 1);
  cairo_paint (cr);
  draw_what (cr, &view, what, KH_SCHEME_LIGHT, plan, review, text);
  cairo_status_t status
      = cairo_status (cr) ? cairo_status (cr) : cairo_surface_write_to_png_stream (surface, append_bytes, bytes);
  if (status != CAIRO_STATUS_SUCCESS)
    {
      g_set_error (error, KH_EXPORT_ERROR, KH_EXPORT_ERROR_CAIRO, "%s", cairo_status_to_string (status));
      cairo_destroy (cr);
      cairo_surface_destroy (surface);
      g_byte_array_unref (bytes);
      return NULL;
    }
  return finish (cr, surface, bytes, error);
}

static GBytes *export_pdf (KhExportWhat what, const KhPlan *plan, const KhReview *review, GError **error)
{
  KhPage page;
  GByteArray *bytes = g_byte_array_new ();
  kh_page_choose (&page, plan);
  cairo_surface_t *surface = cairo_pdf_surface_create_for_stream (append_bytes, bytes, page.width_mm * KH_PT_PER_MM,
                                                                  page.height_mm * KH_PT_PER_MM);
  cairo_pdf_surface_set_metadata (surface, CAIRO_PDF_METADATA_TITLE, plan->title);
  /* The same plan gives the same bytes: the day it was printed stands on no page and in no file. */
  cairo_pdf_surface_set_metadata (surface, CAIRO_PDF_METADATA_CREATE_DATE, "2000-01-01T00:00:00Z");
  cairo_t *cr = cairo_create (surface);
  cairo_scale (cr, KH_PT_PER_MM, KH_PT_PER_MM);
  static const char *const titles[] = { N_ ("Plan"), N_ ("Assembly map"), N_ ("Run") };
  kh_page_draw_frame (&page, cr, plan, review, _ (titles[what]));
  draw_what (cr, &page.view, what, KH_SCHEME_PRINT, plan, review, page.text_mm);
  cairo_show_page (cr);
  return finish (cr, surface, bytes, error);
}

GBytes *kh_export (KhExportKind kind, KhExportWhat what, const KhPlan *plan, const KhReview *review, int pixels,
                   GError **error)
{
  switch (kind)
    {
    case KH_EXPORT_SVG:
      return export_svg (what, plan, review, error);
    case KH_EXPORT_PDF:
      return export_pdf (what, plan, review, error);
    default:
      return export_png (what, plan, review, pixels, error);
    }
}
