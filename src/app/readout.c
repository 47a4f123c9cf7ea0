/* SPDX-License-Identifier: MIT */
#include "app/readout.h"

#include <math.h>

struct _KhReadout
{
  GtkWidget parent_instance;
  char *text;
  int least_chars, natural_chars;
  double xalign;
};

G_DEFINE_FINAL_TYPE (KhReadout, kh_readout, GTK_TYPE_WIDGET)

enum
{
  PROPERTY_NONE,
  LEAST_CHARS,
  NATURAL_CHARS,
  XALIGN,
  N_PROPERTIES
};

static void measure (GtkWidget *widget, GtkOrientation orientation, int for_size, int *least, int *natural,
                     int *least_baseline, int *natural_baseline)
{
  KhReadout *self = KH_READOUT (widget);
  PangoContext *context = gtk_widget_get_pango_context (widget);
  PangoFontMetrics *metrics = pango_context_get_metrics (context, NULL, NULL);
  if (orientation == GTK_ORIENTATION_HORIZONTAL)
    {
      double wide = (double)pango_font_metrics_get_approximate_char_width (metrics) / PANGO_SCALE;
      *least = (int)ceil (self->least_chars * wide);
      *natural = (int)ceil (MAX (self->natural_chars, self->least_chars) * wide);
    }
  else
    {
      *least = *natural = PANGO_PIXELS_CEIL (pango_font_metrics_get_height (metrics));
      *least_baseline = *natural_baseline = PANGO_PIXELS_CEIL (pango_font_metrics_get_ascent (metrics));
    }
  pango_font_metrics_unref (metrics);
}

static void snapshot (GtkWidget *widget, GtkSnapshot *snapshot)
{
  KhReadout *self = KH_READOUT (widget);
  int room = gtk_widget_get_width (widget), width, height;
  if (self->text == NULL || *self->text == '\0' || room < 1)
    return;
  PangoLayout *layout = gtk_widget_create_pango_layout (widget, self->text);
  pango_layout_set_width (layout, room * PANGO_SCALE);
  pango_layout_set_ellipsize (layout, PANGO_ELLIPSIZE_END);
  pango_layout_set_single_paragraph_mode (layout, TRUE);
  pango_layout_get_pixel_size (layout, &width, &height);
  gboolean from_right = gtk_widget_get_direction (widget) == GTK_TEXT_DIR_RTL;
  pango_layout_set_alignment (layout, self->xalign > 0.9   ? PANGO_ALIGN_RIGHT
                                      : self->xalign < 0.1 ? PANGO_ALIGN_LEFT
                                                           : PANGO_ALIGN_CENTER);
  if (from_right)
    pango_layout_set_auto_dir (layout, TRUE);
  gtk_snapshot_render_layout (snapshot, gtk_widget_get_style_context (widget), 0,
                              floor ((gtk_widget_get_height (widget) - height) / 2.0), layout);
  g_object_unref (layout);
}

static void set_property (GObject *object, guint id, const GValue *value, GParamSpec *spec)
{
  KhReadout *self = KH_READOUT (object);
  switch (id)
    {
    case LEAST_CHARS:
      self->least_chars = g_value_get_int (value);
      break;
    case NATURAL_CHARS:
      self->natural_chars = g_value_get_int (value);
      break;
    case XALIGN:
      self->xalign = g_value_get_double (value);
      break;
    default:
      G_OBJECT_WARN_INVALID_PROPERTY_ID (object, id, spec);
      return;
    }
  gtk_widget_queue_resize (GTK_WIDGET (self));
}

static void finalize (GObject *object)
{
  g_free (KH_READOUT (object)->text);
  G_OBJECT_CLASS (kh_readout_parent_class)->finalize (object);
}

static void kh_readout_class_init (KhReadoutClass *class)
{
  GObjectClass *object_class = G_OBJECT_CLASS (class);
  GtkWidgetClass *widget_class = GTK_WIDGET_CLASS (class);
  const GParamFlags flags = G_PARAM_WRITABLE | G_PARAM_STATIC_STRINGS;
  object_class->set_property = set_property;
  object_class->finalize = finalize;
  widget_class->measure = measure;
  widget_class->snapshot = snapshot;
  g_object_class_install_property (object_class, LEAST_CHARS,
                                   g_param_spec_int ("least-chars", NULL, NULL, 0, 1000, 4, flags));
  g_object_class_install_property (object_class, NATURAL_CHARS,
                                   g_param_spec_int ("natural-chars", NULL, NULL, 0, 1000, 20, flags));
  g_object_class_install_property (object_class, XALIGN, g_param_spec_double ("xalign", NULL, NULL, 0, 1, 0, flags));
  gtk_widget_class_set_css_name (widget_class, "label");
  gtk_widget_class_set_accessible_role (widget_class, GTK_ACCESSIBLE_ROLE_LABEL);
}

static void kh_readout_init (KhReadout *self)
{
  self->least_chars = 4;
  self->natural_chars = 20;
  gtk_widget_set_overflow (GTK_WIDGET (self), GTK_OVERFLOW_HIDDEN);
}

GtkWidget *kh_readout_new (int least_chars, int natural_chars, double xalign)
{
  return g_object_new (KH_TYPE_READOUT, "least-chars", least_chars, "natural-chars", natural_chars, "xalign", xalign,
                       NULL);
}

void kh_readout_set_text (KhReadout *self, const char *text)
{
  if (g_strcmp0 (text, self->text) == 0)
    return;
  g_free (self->text);
  self->text = g_strdup (text);
  gtk_accessible_update_property (GTK_ACCESSIBLE (self), GTK_ACCESSIBLE_PROPERTY_LABEL, text, -1);
  gtk_widget_queue_draw (GTK_WIDGET (self));
}
