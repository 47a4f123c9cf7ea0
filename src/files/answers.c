/* SPDX-License-Identifier: MIT */
/* check and follow; cutlist and saw stand in sawanswers.c. */
#include "files/answers.h"
#include "base/units.h"
#include "files/jsontext.h"
#include <math.h>

#define HEAD "{\"answer_version\": 1, "

static void append_cell (GString *json, KhCell cell)
{
  g_autofree char *name = kh_cell_dup_name (cell);
  kh_json_append_text (json, name);
}

static void append_size (GString *json, const KhPlan *plan)
{
  g_string_append_printf (json, "\"size\": {\"columns\": %d, \"rows\": %d, \"cells\": %d, \"width_mm\": ",
                          plan->lattice.columns, plan->lattice.rows, kh_lattice_n_cells (&plan->lattice));
  kh_json_append_nm (json, kh_plan_width_nm (plan));
  g_string_append (json, ", \"depth_mm\": ");
  kh_json_append_nm (json, kh_plan_depth_nm (plan));
  g_string_append (json, ", \"clear_width_mm\": ");
  kh_json_append_nm (json, kh_plan_clear_width_nm (plan));
  g_string_append (json, "},\n ");
}

static void append_layout (GString *json, const KhPlan *plan, const KhLayout *layout)
{
  g_string_append_printf (json, "\"walls\": {\"edges\": %d, \"length_mm\": ", layout->n_walls);
  kh_json_append_nm (json, layout->n_walls * plan->lattice.pitch_nm);
  g_string_append_printf (json, ", \"components\": %d, \"islands\": %u, \"island_edges\": [", layout->n_components,
                          layout->islands->len);
  for (guint i = 0; i < layout->islands->len; i++)
    g_string_append_printf (json, "%s%d", i > 0 ? ", " : "", g_array_index (layout->islands, KhIsland, i).n_edges);
  g_string_append_printf (json, "], \"lone_posts\": %d},\n ", layout->n_lone_posts);
  g_string_append_printf (json,
                          "\"floor\": {\"regions\": %d, \"pockets\": %d, \"pocket_cells\": %d, \"loops\": %d},\n ",
                          layout->n_regions, layout->n_pockets, layout->n_pocket_cells, layout->n_loops);
  g_string_append_printf (json, "\"openings\": {\"declared\": %d, \"leaks\": %d},\n \"simply_connected\": ",
                          layout->n_openings, layout->n_leaks);
  kh_json_append_boolean (json, layout->simply_connected);
}

static void append_walk (GString *json, const KhReview *review, KhHand hand)
{
  static const char *const ends[] = { "mark", "out", "circles" };
  const KhHandWalk *walk = &review->walks[hand];
  if (!review->has_walks)
    {
      g_string_append (json, "null");
      return;
    }
  g_string_append_printf (json, "{\"arrives\": %s, \"steps\": %d, \"cells\": %d, \"ends\": \"%s\"}",
                          walk->arrives ? "true" : "false", walk->n_steps, walk->n_cells, ends[walk->ends]);
}

static void append_or_null (GString *json, const char *name, int value)
{
  if (value < 0)
    g_string_append_printf (json, "\"%s\": null", name);
  else
    g_string_append_printf (json, "\"%s\": %d", name, value);
}

static void append_finding (GString *json, const KhFinding *finding)
{
  g_autofree char *text = kh_finding_dup_text (finding);
  g_string_append_printf (json, "{\"code\": \"%s\", \"severity\": \"%s\", \"at\": [", finding->code,
                          kh_severity_get_name (finding->severity));
  kh_json_append_number (json, finding->at[0]);
  g_string_append (json, ", ");
  kh_json_append_number (json, finding->at[1]);
  g_string_append (json, "], \"cells\": [");
  for (guint i = 0; i < finding->cells->len; i++)
    {
      g_string_append (json, i > 0 ? ", " : "");
      append_cell (json, g_array_index (finding->cells, KhCell, i));
    }
  g_string_append (json, "], \"text\": ");
  kh_json_append_text (json, text);
  g_string_append (json, ", \"remedies\": []");
  if (finding->reason)
    {
      g_string_append (json, ", \"set_aside\": ");
      kh_json_append_text (json, finding->reason);
    }
  g_string_append_c (json, '}');
}

char *kh_answer_dup_check (const KhPlan *plan, const KhReview *review, const char *file)
{
  GString *json = g_string_new (HEAD "\"plan\": ");
  kh_json_append_text (json, plan->title);
  g_string_append (json, ", \"file\": ");
  kh_json_append_text (json, file);
  g_string_append (json, ",\n ");
  append_size (json, plan);
  append_layout (json, plan, review->layout);
  g_string_append (json, ",\n \"hand_walk\": {\"right\": ");
  append_walk (json, review, KH_HAND_RIGHT);
  g_string_append (json, ", \"left\": ");
  append_walk (json, review, KH_HAND_LEFT);
  g_string_append (json, "},\n ");
  append_or_null (json, "shortest_steps", review->measures.shortest_steps);
  g_string_append_printf (json, ", \"dead_ends\": %d, \"junctions\": %d, \"longest_straight\": %d,\n \"findings\": [",
                          review->measures.dead_ends, review->measures.junctions, review->measures.longest_straight);
  for (guint i = 0; i < review->findings->len; i++)
    {
      g_string_append (json, i > 0 ? ",\n  " : "\n  ");
      append_finding (json, g_ptr_array_index (review->findings, i));
    }
  g_string_append (json, "],\n \"sound\": [");
  for (guint i = 0; i < review->sound->len; i++)
    {
      g_string_append (json, i > 0 ? ",\n  " : "\n  ");
      kh_json_append_text (json, g_ptr_array_index (review->sound, i));
    }
  g_string_append (json, "]}\n");
  return g_string_free (json, FALSE);
}

char *kh_answer_dup_faults (const char *file, const GPtrArray *faults)
{
  GString *json = g_string_new ("{\"file\": ");
  kh_json_append_text (json, file);
  g_string_append (json, ", \"faults\": [");
  for (guint i = 0; i < faults->len; i++)
    {
      g_string_append (json, i > 0 ? ", " : "");
      kh_json_append_text (json, g_ptr_array_index (faults, i));
    }
  g_string_append (json, "]}\n");
  return g_string_free (json, FALSE);
}

char *kh_answer_dup_many (const GPtrArray *answers)
{
  GString *json = g_string_new (HEAD "\"plans\": [");
  for (guint i = 0; i < answers->len; i++)
    {
      g_autofree char *answer = g_strchomp (g_strdup (g_ptr_array_index (answers, i)));
      g_string_append_printf (json, "%s%s", i > 0 ? ",\n" : "\n", answer);
    }
  g_string_append (json, "]}\n");
  return g_string_free (json, FALSE);
}

static void append_event (GString *json, const KhTrace *trace, const KhEvent *event)
{
  g_string_append (json, "{\"t\": ");
  kh_json_append_fixed (json, (double)event->tick * trace->tick_s, 6);
  g_string_append_printf (json, ", \"state\": \"%s\", \"x\": ", kh_state_get_name (event->state));
  kh_json_append_fixed (json, event->pose.x, 3);
  g_string_append (json, ", \"y\": ");
  kh_json_append_fixed (json, event->pose.y, 3);
  g_string_append (json, ", \"heading_deg\": ");
  kh_json_append_fixed (json, remainder (event->pose.heading_rad, 2 * G_PI) * 180 / G_PI, 3);
  g_string_append (json, ", \"cell\": ");
  append_cell (json, event->cell);
  g_string_append_c (json, '}');
}

char *kh_answer_dup_follow (const KhPlan *plan, const KhTrace *trace)
{
  GString *json = g_string_new (HEAD "\"hand\": ");
  g_string_append_printf (json,
                          "\"%s\", \"seed\": %" G_GUINT64_FORMAT ", \"trial\": %" G_GUINT64_FORMAT
                          ", \"exact\": %s, \"outcome\": \"%s\", \"time_s\": ",
                          trace->hand == KH_HAND_RIGHT ? "right" : "left", trace->seed, trace->trial,
                          trace->exact ? "true" : "false", kh_outcome_get_name (trace->outcome));
  kh_json_append_fixed (json, trace->time_s, 6);
  g_string_append (json, ", \"distance_m\": ");
  kh_json_append_fixed (json, trace->distance_m, 6);
  g_string_append (json, ",\n \"least_clearance_mm\": ");
  kh_json_append_fixed (json, trace->least_clearance_mm, 3);
  g_string_append_printf (json, ", \"ticks\": %" G_GSIZE_FORMAT ", \"cells\": [", kh_trace_get_n_ticks (trace) - 1);
  for (guint i = 0; i < trace->cells->len; i++)
    {
      g_string_append (json, i > 0 ? ", " : "");
      append_cell (json, g_array_index (trace->cells, KhCell, i));
    }
  g_string_append (json, "],\n \"events\": [");
  for (guint i = 0; i < trace->events->len; i++)
    {
      g_string_append (json, i > 0 ? ",\n  " : "\n  ");
      append_event (json, trace, &g_array_index (trace->events, KhEvent, i));
    }
  g_string_append (json, "],\n \"why\": ");
  kh_json_append_text (json, trace->why);
  g_string_append (json, "}\n");
  return g_string_free (json, FALSE);
}
