/* SPDX-License-Identifier: MIT */
#include "files/tables.h"
#include "base/units.h"
#include <math.h>
#include <string.h>

#define LINE_END "\r\n"

/* RFC 4180, 2.6 and 2.7: quoted where it holds a comma, a quote or a line break; quotes doubled. */
static void append_text (GString *csv, const char *text)
{
  if (!strpbrk (text, ",\"\r\n"))
    {
      g_string_append (csv, text);
      return;
    }
  g_string_append_c (csv, '"');
  for (; *text; text++)
    {
      if (*text == '"')
        g_string_append_c (csv, '"');
      g_string_append_c (csv, *text);
    }
  g_string_append_c (csv, '"');
}

static void append_nm (GString *csv, int64_t nm)
{
  g_autofree char *text = kh_nm_dup_file_text (nm);
  g_string_append (csv, text);
}

/* Rounded to micrometres or so: more decimals would promise what no sensor gives. Not finite: left empty. */
static void append_number (GString *csv, double value)
{
  if (!isfinite (value))
    return;
  g_autofree char *text = kh_number_dup_file_text (round (value * 1e4) / 1e4);
  g_string_append (csv, text);
}

char *kh_table_dup_cutlist (const KhPlan *plan, const KhCutList *list)
{
  GString *csv = g_string_new ("length_mm,height_mm,thickness_mm,count,labels" LINE_END);
  for (guint i = 0; i < list->rows->len; i++)
    {
      const KhCutRow *row = &g_array_index (list->rows, KhCutRow, i);
      g_autoptr (GString) labels = g_string_new (NULL);
      for (guint k = 0; k < row->panels->len; k++)
        g_string_append_printf (labels, "%s%s", k > 0 ? ", " : "",
                                g_array_index (list->panels, KhPanel, g_array_index (row->panels, int, k)).label);
      append_nm (csv, row->length_nm);
      g_string_append_c (csv, ',');
      append_nm (csv, row->height_nm);
      g_string_append_c (csv, ',');
      append_nm (csv, row->thickness_nm);
      g_string_append_printf (csv, ",%d,", row->count);
      append_text (csv, labels->str);
      g_string_append (csv, LINE_END);
    }
  return g_string_free (csv, FALSE);
}

char *kh_table_dup_track (const KhTrace *trace)
{
  GString *csv = g_string_new (
      "time_s,x_mm,y_mm,heading_deg,distance_mm,state,front_mm,side_front_mm,side_rear_mm,clearance_mm" LINE_END);
  for (gsize i = 0; i < kh_trace_get_n_ticks (trace); i++)
    {
      const KhTick *tick = kh_trace_get_tick (trace, i);
      const double numbers[]
          = { (double)i * trace->tick_s, tick->x, tick->y, tick->heading_rad * 180 / G_PI, (double)tick->distance_mm };
      const double readings[] = { (double)tick->front_mm, (double)tick->side_front_mm, (double)tick->side_rear_mm,
                                  (double)tick->clearance_mm };
      for (gsize k = 0; k < G_N_ELEMENTS (numbers); k++)
        {
          append_number (csv, numbers[k]);
          g_string_append_c (csv, ',');
        }
      g_string_append (csv, kh_state_get_name ((KhState)tick->state));
      for (gsize k = 0; k < G_N_ELEMENTS (readings); k++)
        {
          g_string_append_c (csv, ',');
          append_number (csv, readings[k]);
        }
      g_string_append (csv, LINE_END);
    }
  return g_string_free (csv, FALSE);
}
