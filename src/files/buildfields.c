/* SPDX-License-Identifier: MIT */
/* The "build" of a plan file. */
#include "files/jsontext.h"
#include "files/planfields.h"
#include <glib/gi18n-lib.h>
#include <stddef.h>

#define ROW(type, member, name, kind, ...)                                                                             \
  {                                                                                                                    \
    name, kind, offsetof (type, member), __VA_ARGS__                                                                   \
  }
#define END                                                                                                            \
  {                                                                                                                    \
    NULL                                                                                                               \
  }
#define MOST_STOCK 200
#define MOST_KIT 2000
#define MOST_LENGTH 100000
#define MOST_COUNT 100000

static const char *const joint_choices[] = { "butt", "grooved posts", "halved", NULL };
static const char *const ends_choices[] = { "full", "flush", NULL };
static const char *const stand_choices[] = { "at every point", "where needed", NULL };
static const char *const form_choices[] = { "strip", "sheet", NULL };
static const char *const grain_choices[] = { "along", "any", NULL };

static gboolean is_sheet (gconstpointer from) { return ((const KhStock *)from)->form == KH_STOCK_SHEET; }

/* A sheet may say its thickness too. */
static gboolean has_thickness (gconstpointer from)
{
  const KhStock *stock = from;
  return stock->form == KH_STOCK_STRIP || stock->thickness_nm != KH_LENGTH_OPEN_NM;
}

static const KhField stock_rows[] = {
  ROW (KhStock, name, "name", KH_FIELD_TEXT, .most = 200),
  ROW (KhStock, form, "form", KH_FIELD_CHOICE, .choices = form_choices),
  ROW (KhStock, length_nm, "length_mm", KH_FIELD_NM, 1, MOST_LENGTH, .required = TRUE),
  ROW (KhStock, width_nm, "width_mm", KH_FIELD_NM, 1, MOST_LENGTH, .wanted = is_sheet),
  ROW (KhStock, thickness_nm, "thickness_mm", KH_FIELD_NM_OPEN, 0.01, 2500, .wanted = has_thickness),
  ROW (KhStock, grain, "grain", KH_FIELD_CHOICE, .choices = grain_choices, .wanted = is_sheet),
  ROW (KhStock, count, "count", KH_FIELD_COUNT, 0, MOST_COUNT),
  ROW (KhStock, price_milli, "price", KH_FIELD_PRICE, 0, 1000000),
  END,
};
static const KhFields stock_fields = { stock_rows, offsetof (KhStock, other) };

static const KhField kit_rows[] = {
  ROW (KhKitPanel, length_nm, "length_mm", KH_FIELD_NM, 0.1, MOST_LENGTH, .required = TRUE),
  ROW (KhKitPanel, count, "count", KH_FIELD_INT, 0, MOST_COUNT, .required = TRUE),
  END,
};
static const KhFields kit_fields = { kit_rows, offsetof (KhKitPanel, other) };

static gboolean is_list (KhReader *reader, KhNode node, gsize most)
{
  if (kh_node_is_array (node) && kh_node_get_length (node) <= most)
    return TRUE;
  kh_reader_fault (reader, node, _ ("give a list of at most %zu"), most);
  return FALSE;
}

static void read_stock (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  GArray *list = ((KhBuild *)into)->stock;
  KhStep step = { 0 };
  if (!is_list (reader, node, MOST_STOCK))
    return;
  g_array_set_size (list, 0);
  for (guint i = 0; kh_node_next (node, &step); i++)
    {
      KhStock stock = { .name = g_strdup (""),
                        .form = KH_STOCK_STRIP,
                        .thickness_nm = KH_LENGTH_OPEN_NM,
                        .count = KH_COUNT_ANY,
                        .price_milli = KH_PRICE_NONE };
      gsize mark = kh_reader_enter_index (reader, i);
      kh_fields_read (&stock_fields, reader, step.value, &stock, context);
      if (stock.form == KH_STOCK_SHEET && stock.width_nm == 0)
        kh_reader_missing (reader, "width_mm", _ ("a sheet needs its width"));
      kh_reader_leave (reader, mark);
      g_array_append_val (list, stock);
    }
}

static void write_stock (GString *json, gconstpointer from)
{
  const GArray *list = ((const KhBuild *)from)->stock;
  g_string_append_c (json, '[');
  for (guint i = 0; i < list->len; i++)
    {
      g_string_append (json, i > 0 ? ",\n      " : "\n      ");
      kh_fields_write (&stock_fields, json, &g_array_index (list, KhStock, i), -1);
    }
  g_string_append (json, list->len > 0 ? "\n    ]" : "]");
}

static void read_kit (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  GArray *list = ((KhBuild *)into)->kit;
  KhStep step = { 0 };
  if (!is_list (reader, node, MOST_KIT))
    return;
  g_array_set_size (list, 0);
  for (guint i = 0; kh_node_next (node, &step); i++)
    {
      KhKitPanel panel = { 0 };
      gsize mark = kh_reader_enter_index (reader, i);
      kh_fields_read (&kit_fields, reader, step.value, &panel, context);
      kh_reader_leave (reader, mark);
      g_array_append_val (list, panel);
    }
}

static void write_kit (GString *json, gconstpointer from)
{
  const GArray *list = ((const KhBuild *)from)->kit;
  g_string_append_c (json, '[');
  for (guint i = 0; i < list->len; i++)
    {
      g_string_append (json, i > 0 ? ", " : "");
      kh_fields_write (&kit_fields, json, &g_array_index (list, KhKitPanel, i), -1);
    }
  g_string_append_c (json, ']');
}

static void read_loose (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  GArray *list = ((KhBuild *)into)->loose_sections;
  const KhPlan *plan = context;
  KhStep step = { 0 };
  KhRun run;
  if (!is_list (reader, node, MOST_KIT))
    return;
  g_array_set_size (list, 0);
  for (guint i = 0; kh_node_next (node, &step); i++)
    {
      gsize mark = kh_reader_enter_index (reader, i);
      if (kh_plan_read_run (reader, step.value, &plan->lattice, &run))
        g_array_append_val (list, run);
      kh_reader_leave (reader, mark);
    }
}

static void write_loose (GString *json, gconstpointer from)
{
  const GArray *list = ((const KhBuild *)from)->loose_sections;
  g_string_append_c (json, '[');
  for (guint i = 0; i < list->len; i++)
    {
      g_string_append (json, i > 0 ? ", " : "");
      kh_plan_write_run (json, g_array_index (list, KhRun, i));
    }
  g_string_append_c (json, ']');
}

static const KhField saw_rows[] = {
  ROW (KhSaw, kerf_nm, "kerf_mm", KH_FIELD_NM, 0, 100),
  ROW (KhSaw, end_trim_nm, "end_trim_mm", KH_FIELD_NM, 0, 5000),
  ROW (KhSaw, keep_offcut_nm, "keep_offcut_mm", KH_FIELD_NM, 0, MOST_LENGTH),
  END,
};
static const KhFields saw_fields = { saw_rows, offsetof (KhSaw, other) };

static const KhField fittings_rows[] = {
  ROW (KhFittings, screws_per_joint, "screws_per_joint", KH_FIELD_INT, 0, 100),
  ROW (KhFittings, brackets_per_joint, "brackets_per_joint", KH_FIELD_INT, 0, 100),
  ROW (KhFittings, feet_spacing_nm, "feet_spacing_mm", KH_FIELD_NM, 0, MOST_LENGTH),
  END,
};
static const KhFields fittings_fields = { fittings_rows, offsetof (KhFittings, other) };

static const KhField build_rows[] = {
  ROW (KhBuild, joint, "joint", KH_FIELD_CHOICE, .choices = joint_choices),
  ROW (KhBuild, ends, "ends", KH_FIELD_CHOICE, .choices = ends_choices),
  ROW (KhBuild, post_nm, "post_mm", KH_FIELD_NM_OPEN, 0.1, 5000),
  ROW (KhBuild, groove_nm, "groove_mm", KH_FIELD_NM, 0, 1000),
  ROW (KhBuild, fit_nm, "fit_mm", KH_FIELD_NM, 0, 100),
  ROW (KhBuild, posts_stand, "posts_stand", KH_FIELD_CHOICE, .choices = stand_choices),
  ROW (KhBuild, slot_play_nm, "slot_play_mm", KH_FIELD_NM, 0, 100),
  ROW (KhBuild, longest_panel_nm, "longest_panel_mm", KH_FIELD_NM, 1, MOST_LENGTH),
  { "loose_sections", KH_FIELD_SPECIAL, .read = read_loose, .write = write_loose },
  ROW (KhBuild, saw, "saw", KH_FIELD_OBJECT, .object = &saw_fields),
  ROW (KhBuild, currency, "currency", KH_FIELD_TEXT, .most = 20),
  { "stock", KH_FIELD_SPECIAL, .read = read_stock, .write = write_stock },
  { "kit", KH_FIELD_SPECIAL, .read = read_kit, .write = write_kit },
  ROW (KhBuild, fittings, "fittings", KH_FIELD_OBJECT, .object = &fittings_fields),
  END,
};
const KhFields kh_plan_build_fields = { build_rows, offsetof (KhBuild, other) };
