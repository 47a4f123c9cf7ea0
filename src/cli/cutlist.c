/* SPDX-License-Identifier: MIT */
#include "panels/cutlist.h"
#include "base/units.h"
#include "cli/command.h"
#include "cli/sawwords.h"
#include "files/answers.h"
#include "files/tables.h"
#include <glib/gi18n-lib.h>

static void append_row (GString *text, const KhCutList *list, const KhCutRow *row)
{
  g_autofree char *length = kh_length_dup_text (row->length_nm, KH_LENGTH_UNIT_MM, FALSE);
  g_string_append_printf (text, "%10s  %5d  ", length, row->count);
  for (guint i = 0; i < row->panels->len; i++)
    g_string_append_printf (text, "%s%s", i > 0 ? ", " : "",
                            g_array_index (list->panels, KhPanel, g_array_index (row->panels, int, i)).label);
  g_string_append_c (text, '\n');
}

static void append_points (GString *text, const KhCutList *list)
{
  static const char *const words[] = { N_ ("ends"), N_ ("straights"), N_ ("corners"), N_ ("tees"), N_ ("crosses") };
  g_string_append_printf (text, "%s", _ ("Where walls meet:"));
  for (int kind = 0; kind < KH_N_POINT_KINDS; kind++)
    g_string_append_printf (text, "%s %d %s", kind > 0 ? "," : "", list->n_points[kind], _ (words[kind]));
  g_string_append_c (text, '\n');
  if (list->n_lone_posts > 0)
    g_string_append_printf (text,
                            ngettext ("%d post stands free.\n", "%d posts stand free.\n", (gulong)list->n_lone_posts),
                            list->n_lone_posts);
}

static char *dup_words (const KhPlan *plan, const KhCutList *list, const KhSawOrder *order, const KhSawPlan *saw)
{
  GString *text = g_string_new (NULL);
  g_autofree char *title = kh_command_dup_bold (plan->title);
  g_autofree char *total = kh_length_dup_text (list->total_nm, KH_LENGTH_UNIT_MM, TRUE);
  g_autofree char *height = kh_length_dup_text (plan->walls.height_nm, KH_LENGTH_UNIT_MM, FALSE);
  g_autofree char *thickness = kh_length_dup_text (plan->walls.thickness_nm, KH_LENGTH_UNIT_MM, TRUE);
  g_string_append_printf (text, "%s\n", title);
  g_string_append_printf (
      text, ngettext ("%u panel, %s in all, %s × %s\n", "%u panels, %s in all, %s × %s\n", list->panels->len),
      list->panels->len, total, height, thickness);
  g_string_append_printf (text, "%10s  %5s  %s\n", _ ("length"), _ ("count"), _ ("labels"));
  for (guint i = 0; i < list->rows->len; i++)
    append_row (text, list, &g_array_index (list->rows, KhCutRow, i));
  append_points (text, list);
  g_autoptr (GPtrArray) notes = kh_cut_list_dup_board_notes (plan);
  for (guint i = 0; i < notes->len; i++)
    g_string_append_printf (text, "%s\n", (const char *)g_ptr_array_index (notes, i));
  kh_saw_words_append (text, order, saw, plan->build.currency);
  g_string_append_printf (text, "%s\n%s\n",
                          _ ("At the saw: guard and riving knife fitted, push stick for short pieces, no loose "
                             "sleeves, eyes, ears and lungs protected."),
                          _ ("Local rules, the makers' manuals and trained people come before this list."));
  return g_string_free (text, FALSE);
}

KhStatus kh_command_cutlist (int argc, char **argv)
{
  gboolean json = FALSE, csv = FALSE;
  const GOptionEntry entries[] = {
    { "json", 'j', 0, G_OPTION_ARG_NONE, &json, N_ ("Answer as JSON"), NULL },
    { "csv", 'c', 0, G_OPTION_ARG_NONE, &csv, N_ ("Answer as a table (CSV, RFC 4180)"), NULL },
    { NULL },
  };
  if (!kh_command_parse (entries, &argc, &argv, 1, 1))
    return KH_STATUS_USAGE;
  if (json && csv)
    {
      kh_command_say (_ ("cutlist: --json and --csv cannot go together; give one"));
      return KH_STATUS_USAGE;
    }
  g_autoptr (KhPlan) plan = kh_command_load_plan (argv[1]);
  if (!plan)
    return KH_STATUS_FILE;
  g_autoptr (GError) error = NULL;
  g_autoptr (KhCutList) list = kh_cut_list_new (plan, &error);
  if (!list)
    {
      kh_command_say ("%s", error->message);
      return KH_STATUS_FOUND;
    }
  KhJob *job = kh_command_get_job ();
  KhSawSettings settings;
  kh_saw_settings_init (&settings);
  g_autoptr (KhSawOrder) order = kh_cut_list_dup_order (list, plan);
  g_autoptr (KhSawPlan) saw = kh_saw_plan_new (order, &settings, job);
  g_autofree char *answer = json  ? kh_answer_dup_cutlist (plan, list, saw)
                            : csv ? kh_table_dup_cutlist (plan, list)
                                  : dup_words (plan, list, order, saw);
  KhStatus status = kh_job_is_stopped (job)    ? KH_STATUS_STOPPED
                    : saw->cannot_cut->len > 0 ? KH_STATUS_FOUND
                                               : KH_STATUS_DONE;
  KhStatus printed = kh_command_print (answer);
  return MAX (status, printed);
}
