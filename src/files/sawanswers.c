/* SPDX-License-Identifier: MIT */
#include "files/answers.h"
#include "files/jsontext.h"
#include "files/planfields.h"

#define HEAD "{\"answer_version\": 1, "

static void append_cut (GString *json, const KhSawCut *cut)
{
  g_string_append (json, "{\"length_mm\": ");
  kh_json_append_nm (json, cut->length_nm);
  g_string_append_printf (json, ", \"count\": %d}", cut->count);
}

static void append_pattern (GString *json, const KhPattern *pattern)
{
  g_string_append_printf (json, "{\"stock\": %d, \"count\": %d, \"cuts\": [", pattern->stock, pattern->count);
  for (guint i = 0; i < pattern->cuts->len; i++)
    {
      g_string_append (json, i > 0 ? ", " : "");
      append_cut (json, &g_array_index (pattern->cuts, KhSawCut, i));
    }
  g_string_append (json, "], \"left_mm\": ");
  kh_json_append_nm (json, pattern->left_nm);
  g_string_append_c (json, '}');
}

static void append_saw_plan (GString *json, const KhSawPlan *plan)
{
  g_string_append (json, "\"saw_plan\": ");
  if (plan->cannot_cut->len > 0)
    {
      g_string_append (json, "null");
      return;
    }
  g_string_append_printf (json, "{\"pieces_of_stock\": %d, \"cost\": ", plan->n_pieces_of_stock);
  kh_json_append_milli (json, plan->cost_milli);
  g_string_append_printf (json, ", \"proven\": %s, \"bound\": ", plan->proven ? "true" : "false");
  kh_json_append_milli (json, plan->bound_milli);
  if (!plan->proven && plan->ended_by_limit)
    g_string_append (json, ", \"ended\": \"limit\"");
  g_string_append (json, ", \"used_mm\": ");
  kh_json_append_nm (json, plan->used_nm);
  g_string_append (json, ", \"offcuts_mm\": [");
  for (guint i = 0; i < plan->offcuts_nm->len; i++)
    {
      g_string_append (json, i > 0 ? ", " : "");
      kh_json_append_nm (json, g_array_index (plan->offcuts_nm, int64_t, i));
    }
  g_string_append (json, "],\n  \"patterns\": [");
  for (guint i = 0; i < plan->patterns->len; i++)
    {
      g_string_append (json, i > 0 ? ",\n   " : "\n   ");
      append_pattern (json, &g_array_index (plan->patterns, KhPattern, i));
    }
  g_string_append (json, "]}");
}

static void append_cannot (GString *json, const GArray *cannot)
{
  static const char *const why[] = { "too long", "too little stock", "too little stock" };
  g_string_append (json, "\"cannot_cut\": [");
  for (guint i = 0; i < cannot->len; i++)
    {
      const KhCannotCut *c = &g_array_index (cannot, KhCannotCut, i);
      g_string_append (json, i > 0 ? ", {\"length_mm\": " : "{\"length_mm\": ");
      kh_json_append_nm (json, c->length_nm);
      g_string_append_printf (json, ", \"count\": %d, \"why\": \"%s\", \"over_mm\": ", c->count, why[c->why]);
      kh_json_append_nm (json, c->over_nm);
      g_string_append_c (json, '}');
    }
  g_string_append_c (json, ']');
}

static void append_row (GString *json, const KhCutList *list, const KhCutRow *row)
{
  g_string_append (json, "{\"length_mm\": ");
  kh_json_append_nm (json, row->length_nm);
  g_string_append (json, ", \"height_mm\": ");
  kh_json_append_nm (json, row->height_nm);
  g_string_append (json, ", \"thickness_mm\": ");
  kh_json_append_nm (json, row->thickness_nm);
  g_string_append_printf (json, ", \"count\": %d, \"slots_mm\": [], \"labels\": [", row->count);
  for (guint i = 0; i < row->panels->len; i++)
    g_string_append_printf (json, "%s\"%s\"", i > 0 ? ", " : "",
                            g_array_index (list->panels, KhPanel, g_array_index (row->panels, int, i)).label);
  g_string_append (json, "], \"places\": [");
  for (guint i = 0; i < row->panels->len; i++)
    {
      g_string_append (json, i > 0 ? ", " : "");
      kh_plan_write_run (json, g_array_index (list->panels, KhPanel, g_array_index (row->panels, int, i)).run);
    }
  g_string_append (json, "]}");
}

char *kh_answer_dup_cutlist (const KhPlan *plan, const KhCutList *list, const KhSawPlan *saw_plan)
{
  static const char *const joints[] = { "butt", "grooved posts", "halved" };
  gboolean first = TRUE;
  GString *json = g_string_new (HEAD);
  g_string_append_printf (json, "\"joint\": \"%s\",\n \"panels\": [", joints[list->joint]);
  for (guint i = 0; i < list->rows->len; i++)
    {
      g_string_append (json, i > 0 ? ",\n  " : "\n  ");
      append_row (json, list, &g_array_index (list->rows, KhCutRow, i));
    }
  g_string_append (json, "],\n \"posts\": [");
  for (int kind = 0; kind < KH_N_POINT_KINDS; kind++)
    if (list->n_points[kind] > 0)
      {
        g_string_append_printf (json, "%s{\"kind\": \"%s\", \"count\": %d}", first ? "" : ", ",
                                kh_point_kind_get_name ((KhPointKind)kind), list->n_points[kind]);
        first = FALSE;
      }
  if (list->n_lone_posts > 0)
    g_string_append_printf (json, "%s{\"kind\": \"lone\", \"count\": %d}", first ? "" : ", ", list->n_lone_posts);
  g_string_append (json, "], \"total_length_mm\": ");
  kh_json_append_nm (json, list->total_nm);
  g_string_append (json, ",\n ");
  append_saw_plan (json, saw_plan);
  g_string_append (json, ",\n \"from_kit\": [], ");
  append_cannot (json, saw_plan->cannot_cut);
  g_string_append (json, "}\n");
  return g_string_free (json, FALSE);
}

char *kh_answer_dup_saw (const KhSawOrder *order, const KhSawPlan *plan)
{
  GString *json = g_string_new (HEAD);
  append_saw_plan (json, plan);
  g_string_append (json, ",\n ");
  append_cannot (json, plan->cannot_cut);
  g_string_append (json, "}\n");
  return g_string_free (json, FALSE);
}
