/* SPDX-License-Identifier: MIT */
#include "app/tip.h"

#define KEY "kh-tip"

static gboolean query_cb (GtkWidget *widget, int x, int y, gboolean keyboard, GtkTooltip *tooltip, gpointer data)
{
  const char *text = g_object_get_data (G_OBJECT (widget), KEY);
  gtk_tooltip_set_text (tooltip, text);
  return text != NULL && *text != '\0';
}

void kh_tip_set (GtkWidget *widget, const char *text)
{
  if (!gtk_widget_get_has_tooltip (widget))
    {
      gtk_widget_set_has_tooltip (widget, TRUE);
      g_signal_connect (widget, "query-tooltip", G_CALLBACK (query_cb), NULL);
    }
  g_object_set_data_full (G_OBJECT (widget), KEY, g_strdup (text), g_free);
}
