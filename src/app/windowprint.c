/* SPDX-License-Identifier: MIT */
#include "app/windowprivate.h"

#include "draw/planpicture.h"

#include <glib/gi18n-lib.h>
#include <pango/pangocairo.h>

/* The plan on one page of paper.  The toolkit's own preview hands the page to
 * another program and says it went well even where there is none, so the page
 * is shown in a window of ours, by the same drawing. */

#define HEADING 24 /* points, for the title */
#define MARGIN 40  /* points, for rulers and openings' words */

static void draw_page (KhWindow *self, cairo_t *cr, double width, double height)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  PangoLayout *layout = pango_cairo_create_layout (cr);
  PangoFontDescription *font = pango_font_description_from_string ("Sans Semi-Bold");
  KhPlanPicture picture;
  KhView view;

  pango_font_description_set_absolute_size (font, 14 * PANGO_SCALE);
  pango_layout_set_font_description (layout, font);
  pango_layout_set_text (layout, plan->title, -1);
  pango_layout_set_width (layout, (int)(width * PANGO_SCALE));
  pango_layout_set_ellipsize (layout, PANGO_ELLIPSIZE_END);
  cairo_set_source_rgb (cr, 0, 0, 0);
  cairo_move_to (cr, 0, 0);
  pango_cairo_show_layout (cr, layout);

  kh_plan_picture_init (&picture);
  picture.scheme = KH_SCHEME_PRINT;
  picture.with_rulers = picture.with_lattice = picture.with_findings = TRUE;
  picture.with_trail = picture.with_beams = FALSE;
  picture.text_size = 8;
  kh_view_fit (&view, plan, width, height - HEADING, MARGIN);
  cairo_translate (cr, 0, HEADING);
  kh_plan_picture_draw (&picture, cr, &view, plan, kh_session_get_review (self->session));
  pango_font_description_free (font);
  g_object_unref (layout);
}

static void draw_page_cb (GtkPrintOperation *operation, GtkPrintContext *context, int page, KhWindow *self)
{
  draw_page (self, gtk_print_context_get_cairo_context (context), gtk_print_context_get_width (context),
             gtk_print_context_get_height (context));
}

static void printed_cb (GtkPrintOperation *operation, GtkPrintOperationResult result, KhWindow *self)
{
  g_autoptr (GError) error = NULL;
  if (result != GTK_PRINT_OPERATION_RESULT_ERROR)
    return;
  gtk_print_operation_get_error (operation, &error);
  kh_window_tell (GTK_WINDOW (self), _ ("The plan could not be printed."), error != NULL ? error->message : NULL);
}

/* ---- preview ---- */

typedef struct
{
  KhWindow *self;                                             /* weak */
  double paper_width, paper_height, left, top, width, height; /* points */
} Sheet;

static void sheet_free (gpointer data)
{
  Sheet *sheet = data;
  g_clear_weak_pointer (&sheet->self);
  g_free (sheet);
}

static void draw_sheet_cb (GtkDrawingArea *area, cairo_t *cr, int width, int height, gpointer data)
{
  const Sheet *sheet = data;
  if (sheet->self == NULL || sheet->self->session == NULL)
    return;
  const double rim = 12;
  double scale = MIN ((width - 2 * rim) / sheet->paper_width, (height - 2 * rim) / sheet->paper_height);
  if (scale <= 0)
    return;
  cairo_translate (cr, (width - scale * sheet->paper_width) / 2, (height - scale * sheet->paper_height) / 2);
  cairo_scale (cr, scale, scale);
  cairo_rectangle (cr, 0, 0, sheet->paper_width, sheet->paper_height);
  cairo_set_source_rgb (cr, 1, 1, 1);
  cairo_fill_preserve (cr);
  cairo_clip (cr);
  cairo_translate (cr, sheet->left, sheet->top);
  draw_page (sheet->self, cr, sheet->width, sheet->height);
}

static gboolean close_cb (GtkWidget *widget, GVariant *args, gpointer data)
{
  gtk_window_close (GTK_WINDOW (widget));
  return TRUE;
}

static void show_sheet (KhWindow *self, Sheet *sheet)
{
  GtkWidget *window = gtk_window_new (), *area = gtk_drawing_area_new ();
  gboolean wide = sheet->paper_width > sheet->paper_height;
  GtkEventController *keys = gtk_shortcut_controller_new ();
  gtk_window_set_title (GTK_WINDOW (window), _ ("The Printed Page"));
  gtk_window_set_transient_for (GTK_WINDOW (window), GTK_WINDOW (self));
  gtk_window_set_destroy_with_parent (GTK_WINDOW (window), TRUE);
  gtk_window_set_default_size (GTK_WINDOW (window), wide ? 860 : 620, wide ? 640 : 820);
  gtk_widget_add_css_class (window, "kh-window");
  gtk_drawing_area_set_draw_func (GTK_DRAWING_AREA (area), draw_sheet_cb, sheet, sheet_free);
  gtk_accessible_update_property (GTK_ACCESSIBLE (area), GTK_ACCESSIBLE_PROPERTY_LABEL, _ ("The printed page"), -1);
  gtk_window_set_child (GTK_WINDOW (window), area);
  gtk_shortcut_controller_add_shortcut (
      GTK_SHORTCUT_CONTROLLER (keys),
      gtk_shortcut_new (gtk_keyval_trigger_new (GDK_KEY_Escape, 0), gtk_callback_action_new (close_cb, NULL, NULL)));
  gtk_widget_add_controller (window, keys);
  gtk_window_present (GTK_WINDOW (window));
}

static gboolean end_preview_cb (gpointer preview)
{
  gtk_print_operation_preview_end_preview (preview);
  g_object_unref (preview);
  return G_SOURCE_REMOVE;
}

static gboolean preview_cb (GtkPrintOperation *operation, GtkPrintOperationPreview *preview, GtkPrintContext *context,
                            GtkWindow *parent, KhWindow *self)
{
  GtkPageSetup *setup = gtk_print_context_get_page_setup (context);
  /* the operation wants something to draw on, even if it is told that the page is shown already */
  cairo_surface_t *nowhere = cairo_recording_surface_create (CAIRO_CONTENT_COLOR_ALPHA, NULL);
  cairo_t *cr = cairo_create (nowhere);
  gtk_print_context_set_cairo_context (context, cr, 72, 72);
  cairo_destroy (cr);
  cairo_surface_destroy (nowhere);
  Sheet *sheet = g_new0 (Sheet, 1);
  g_set_weak_pointer (&sheet->self, self);
  sheet->paper_width = gtk_page_setup_get_paper_width (setup, GTK_UNIT_POINTS);
  sheet->paper_height = gtk_page_setup_get_paper_height (setup, GTK_UNIT_POINTS);
  sheet->left = gtk_page_setup_get_left_margin (setup, GTK_UNIT_POINTS);
  sheet->top = gtk_page_setup_get_top_margin (setup, GTK_UNIT_POINTS);
  sheet->width = gtk_page_setup_get_page_width (setup, GTK_UNIT_POINTS);
  sheet->height = gtk_page_setup_get_page_height (setup, GTK_UNIT_POINTS);
  show_sheet (self, sheet);
  g_idle_add (end_preview_cb, g_object_ref (preview)); /* nothing more is asked of the operation */
  return TRUE;
}

void kh_window_print (KhWindow *self)
{
  kh_window_take_typed (self);
  const KhPlan *plan = kh_session_get_plan (self->session);
  g_autoptr (GtkPrintOperation) operation = gtk_print_operation_new ();
  g_autoptr (GtkPageSetup) setup = gtk_page_setup_new ();
  g_autofree char *name = kh_window_dup_file_name (self);
  if (plan->lattice.columns > plan->lattice.rows)
    gtk_page_setup_set_orientation (setup, GTK_PAGE_ORIENTATION_LANDSCAPE);
  gtk_print_operation_set_default_page_setup (operation, setup);
  gtk_print_operation_set_n_pages (operation, 1);
  gtk_print_operation_set_unit (operation, GTK_UNIT_POINTS);
  gtk_print_operation_set_job_name (operation, name);
  gtk_print_operation_set_allow_async (operation, TRUE);
  g_signal_connect_object (operation, "draw-page", G_CALLBACK (draw_page_cb), self, 0);
  g_signal_connect_object (operation, "preview", G_CALLBACK (preview_cb), self, 0);
  g_signal_connect_object (operation, "done", G_CALLBACK (printed_cb), self, 0);
  gtk_print_operation_run (operation, GTK_PRINT_OPERATION_ACTION_PRINT_DIALOG, GTK_WINDOW (self), NULL);
}
