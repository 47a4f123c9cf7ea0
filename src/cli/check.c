/* SPDX-License-Identifier: MIT */
#include "base/units.h"
#include "cli/command.h"
#include "files/answers.h"
#include "files/planfile.h"
#include <glib/gi18n-lib.h>
#include <limits.h>

static void append_length (GString *text, int64_t nm)
{
  g_autofree char *length = kh_length_dup_text (nm, KH_LENGTH_UNIT_MM, TRUE);
  g_string_append (text, length);
}

static void append_size (GString *text, const KhPlan *plan, const KhLayout *layout)
{
  g_string_append_printf (text, _ ("%d × %d cells, "), plan->lattice.columns, plan->lattice.rows);
  append_length (text, kh_plan_width_nm (plan));
  g_string_append (text, " × ");
  append_length (text, kh_plan_depth_nm (plan));
  g_string_append (text, _ (", clear width "));
  append_length (text, kh_plan_clear_width_nm (plan));
  g_string_append_c (text, '\n');
  g_string_append_printf (text, ngettext ("%d wall, ", "%d walls, ", (gulong)layout->n_walls), layout->n_walls);
  append_length (text, layout->n_walls * plan->lattice.pitch_nm);
  g_string_append_c (text, '\n');
}

static void append_walk (GString *text, const char *hand, const KhHandWalk *walk)
{
  static const char *const ends[]
      = { N_ ("reaches the mark"), N_ ("leaves through an opening"), N_ ("goes round for ever") };
  g_string_append_printf (text,
                          ngettext ("%s: %s, %d step, %d different cells\n", "%s: %s, %d steps, %d different cells\n",
                                    (gulong)walk->n_steps),
                          hand, _ (ends[walk->ends]), walk->n_steps, walk->n_cells);
}

static void append_measures (GString *text, const KhReview *review)
{
  if (review->has_walks)
    {
      append_walk (text, _ ("Right hand"), &review->walks[KH_HAND_RIGHT]);
      append_walk (text, _ ("Left hand"), &review->walks[KH_HAND_LEFT]);
    }
  if (review->measures.shortest_steps >= 0)
    g_string_append_printf (
        text, ngettext ("Shortest way: %d step\n", "Shortest way: %d steps\n", (gulong)review->measures.shortest_steps),
        review->measures.shortest_steps);
  g_string_append_printf (text, _ ("Dead ends: %d, junctions: %d, longest straight: %d cells\n"),
                          review->measures.dead_ends, review->measures.junctions, review->measures.longest_straight);
}

static void append_finding (GString *text, const KhFinding *finding)
{
  static const char *const words[] = { N_ ("stops the build or the run"), N_ ("hinders"), N_ ("note") };
  g_autofree char *head = finding->reason ? g_strdup (_ ("set aside"))
                                          : g_strdup_printf ("%d, %s", finding->number, _ (words[finding->severity]));
  g_autofree char *bold = kh_command_dup_bold (head);
  g_string_append_printf (text, "[%s] %s\n", bold, finding->wrong);
  if (*finding->effect)
    g_string_append_printf (text, "    %s\n", finding->effect);
  if (finding->reason)
    g_string_append_printf (text, "    %s\n", finding->reason);
}

static char *dup_words (const char *path, const KhPlan *plan, const KhReview *review)
{
  GString *text = g_string_new (NULL);
  g_autofree char *title = kh_command_dup_bold (*plan->title ? plan->title : path);
  g_string_append_printf (text, "%s\n", title);
  append_size (text, plan, review->layout);
  g_string_append_printf (text, "%s\n",
                          review->layout->simply_connected ? _ ("Simply connected.") : _ ("Not simply connected."));
  append_measures (text, review);
  g_string_append_c (text, '\n');
  for (guint i = 0; i < review->findings->len; i++)
    append_finding (text, g_ptr_array_index (review->findings, i));
  if (review->sound->len > 0)
    g_string_append_printf (text, "%s\n", _ ("Looked at and found sound:"));
  for (guint i = 0; i < review->sound->len; i++)
    g_string_append_printf (text, "  %s\n", (const char *)g_ptr_array_index (review->sound, i));
  return g_string_free (text, FALSE);
}

/* One plan: its answer, and the status it alone would give. */
static char *answer_plan (const char *path, gboolean json, KhStatus *status)
{
  g_autoptr (GPtrArray) faults = NULL;
  g_autoptr (KhPlan) plan = kh_plan_file_load (path, &faults);
  if (!plan)
    {
      kh_command_say_faults (faults);
      *status = KH_STATUS_FILE;
      return json ? kh_answer_dup_faults (path, faults) : NULL;
    }
  KhReviewSettings settings;
  kh_review_settings_init (&settings, plan);
  g_autoptr (KhReview) review = kh_review_new (plan, &settings, NULL);
  *status = review->n_by_severity[KH_SEVERITY_BREAKS] > 0 ? KH_STATUS_FOUND : KH_STATUS_DONE;
  return json ? kh_answer_dup_check (plan, review, path) : dup_words (path, plan, review);
}

KhStatus kh_command_check (int argc, char **argv)
{
  gboolean json = FALSE;
  const GOptionEntry entries[] = {
    { "json", 'j', 0, G_OPTION_ARG_NONE, &json, N_ ("Answer as JSON"), NULL },
    { NULL },
  };
  if (!kh_command_parse (entries, &argc, &argv, 1, INT_MAX))
    return KH_STATUS_USAGE;
  g_autoptr (GPtrArray) answers = g_ptr_array_new_with_free_func (g_free);
  KhStatus status = KH_STATUS_DONE;
  for (int i = 1; i < argc; i++)
    {
      KhStatus one;
      char *answer = answer_plan (argv[i], json, &one);
      if (answer)
        g_ptr_array_add (answers, answer);
      status = MAX (status, one);
    }
  g_autofree char *all = NULL;
  if (json)
    all = argc > 2 ? kh_answer_dup_many (answers) : g_strdup (g_ptr_array_index (answers, 0));
  else
    {
      g_ptr_array_add (answers, NULL);
      all = g_strjoinv ("\n", (char **)answers->pdata);
      g_ptr_array_set_size (answers, (int)answers->len - 1);
    }
  KhStatus printed = kh_command_print (all);
  return MAX (status, printed);
}
