/* SPDX-License-Identifier: MIT */
#include "files/jsontext.h"
#include "files/planfields.h"
#include "files/planfile.h"

static void append_runs (GString *json, const KhPlan *plan, const guint8 *edges, const char *gap)
{
  g_autoptr (GArray) runs = kh_plan_dup_runs (plan, edges);
  g_string_append_c (json, '[');
  for (guint i = 0; i < runs->len; i++)
    {
      g_string_append_printf (json, "%s%s  ", i > 0 ? "," : "", gap);
      kh_plan_write_run (json, g_array_index (runs, KhRun, i));
    }
  g_string_append_printf (json, "%s]", runs->len > 0 ? gap : "");
}

static void append_walls (GString *json, const KhPlan *plan)
{
  static const char *const posts[] = { "where walls meet", "everywhere" };
  g_string_append (json, ",\n  \"walls\": {\n    \"thickness_mm\": ");
  kh_json_append_nm (json, plan->walls.thickness_nm);
  g_string_append (json, ",\n    \"height_mm\": ");
  kh_json_append_nm (json, plan->walls.height_nm);
  g_string_append_printf (json, ",\n    \"posts\": \"%s\",\n    \"runs\": ", posts[plan->walls.posts]);
  append_runs (json, plan, plan->walled, "\n    ");
  if (plan->walls.other)
    g_string_append_printf (json, ",\n    %s", plan->walls.other);
  g_string_append (json, "\n  }");
}

static void append_gaps (GString *json, const KhPlan *plan)
{
  g_autoptr (GArray) blocks = kh_plan_dup_gap_blocks (plan);
  g_string_append (json, ",\n  \"gaps\": [");
  for (guint i = 0; i < blocks->len; i++)
    {
      KhCellBlock block = g_array_index (blocks, KhCellBlock, i);
      g_string_append_printf (json, "%s[%d, %d, %d, %d]",
                              i == 0       ? ""
                              : i % 8 == 0 ? ",\n    "
                                           : ", ",
                              block.column, block.row, block.columns, block.rows);
    }
  g_string_append_c (json, ']');
}

/* One object stands beside the name, several a line each. */
static void append_list (GString *json, const char *name, const GArray *list, const KhFields *fields)
{
  gsize size = g_array_get_element_size ((GArray *)list);
  g_string_append_printf (json, ",\n  \"%s\": [", name);
  for (guint i = 0; i < list->len; i++)
    {
      g_string_append (json, list->len == 1 ? "" : i > 0 ? ",\n    " : "\n    ");
      kh_fields_write (fields, json, list->data + i * size, -1);
    }
  g_string_append (json, list->len > 1 ? "\n  ]" : "]");
}

static gboolean has_locked (const KhPlan *plan)
{
  for (int i = 0; plan->locked && i < kh_lattice_n_edges (&plan->lattice); i++)
    if (plan->locked[i])
      return TRUE;
  return FALSE;
}

static void append_object (GString *json, const char *name, const KhFields *fields, gconstpointer from, int indent)
{
  g_string_append_printf (json, ",\n  \"%s\": ", name);
  kh_fields_write (fields, json, from, indent);
}

char *kh_plan_file_dup_text (const KhPlan *plan)
{
  GString *json = g_string_new ("{\n  \"kind\": \"kerfhand maze plan\",\n  \"version\": 1,\n  \"title\": ");
  kh_json_append_text (json, plan->title);
  g_string_append (json, ",\n  \"notes\": ");
  kh_json_append_text (json, plan->notes);
  append_object (json, "lattice", &kh_plan_lattice_fields, &plan->lattice, -1);
  append_walls (json, plan);
  append_gaps (json, plan);
  append_list (json, "openings", plan->openings, &kh_plan_opening_fields);
  append_list (json, "marks", plan->marks, &kh_plan_mark_fields);
  if (plan->has_start)
    append_object (json, "start", &kh_plan_start_fields, &plan->start, -1);
  if (plan->has_site)
    append_object (json, "site", &kh_plan_site_fields, &plan->site, -1);
  if (plan->set_aside->len > 0)
    append_list (json, "set_aside", plan->set_aside, &kh_plan_set_aside_fields);
  if (has_locked (plan))
    {
      g_string_append (json, ",\n  \"locked\": ");
      append_runs (json, plan, plan->locked, "\n  ");
    }
  append_object (json, "robot", &kh_plan_robot_fields, &plan->robot, 4);
  append_object (json, "build", &kh_plan_build_fields, &plan->build, 4);
  if (plan->other)
    g_string_append_printf (json, ",\n  %s", plan->other);
  g_string_append (json, "\n}\n");
  return g_string_free (json, FALSE);
}
