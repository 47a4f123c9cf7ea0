/* SPDX-License-Identifier: MIT */
#include "cli/command.h"
#include "files/answers.h"
#include "files/tables.h"
#include "robot/run.h"
#include <inttypes.h>
#include <glib/gi18n-lib.h>
#include <string.h>

typedef struct
{
  char *hand, *seed, *trial, *track;
  gboolean exact, json;
} Options;

static void options_clear (Options *options)
{
  g_free (options->hand);
  g_free (options->seed);
  g_free (options->trial);
  g_free (options->track);
}
G_DEFINE_AUTO_CLEANUP_CLEAR_FUNC (Options, options_clear)

static gboolean read_count (const char *option, const char *text, guint64 *count)
{
  g_autoptr (GError) error = NULL;
  if (text == NULL || g_ascii_string_to_unsigned (text, 10, 0, G_MAXUINT64, count, &error))
    return TRUE;
  kh_command_say (_ ("%s: “%s” is no whole number from 0 on"), option, text);
  return FALSE;
}

static char *dup_words (const KhPlan *plan, const KhTrace *trace)
{
  GString *text = g_string_new (NULL);
  g_autofree char *head = kh_command_dup_bold (trace->hand == KH_HAND_RIGHT ? _ ("Right hand") : _ ("Left hand"));
  g_string_append_printf (text, "%s: %s\n", head, trace->why);
  g_string_append_printf (text, _ ("Time %.1f s, way %.2f m, least clearance %.1f mm, %u cells driven.\n"),
                          trace->time_s, trace->distance_m, trace->least_clearance_mm, trace->cells->len);
  if (trace->exact)
    g_string_append_printf (text, "%s\n", _ ("No errors drawn."));
  else
    g_string_append_printf (text, _ ("Errors drawn: seed %" PRIu64 ", trial %" PRIu64 ".\n"),
                            trace->seed, trace->trial);
  g_string_append_printf (text, "%s", _ ("Cells:"));
  for (guint i = 0; i < trace->cells->len; i++)
    {
      g_autofree char *name = kh_cell_dup_name (g_array_index (trace->cells, KhCell, i));
      g_string_append_printf (text, "%s%s", i > 0 && i % 20 == 0 ? "\n       " : " ", name);
    }
  g_string_append_c (text, '\n');
  return g_string_free (text, FALSE);
}

/* The run and what is said of it; plan and options are sound. */
static KhStatus follow (const KhPlan *plan, const KhRunSettings *settings, const Options *options)
{
  g_autoptr (GError) error = NULL;
  g_autoptr (KhSolids) solids = kh_solids_new (plan);
  g_autoptr (KhTrace) trace = kh_run (plan, solids, settings, kh_command_get_job (), &error);
  if (!trace)
    {
      kh_command_say ("%s", error->message);
      return g_error_matches (error, KH_RUN_ERROR, KH_RUN_ERROR_STOPPED) ? KH_STATUS_STOPPED : KH_STATUS_FOUND;
    }
  KhStatus status = trace->outcome == KH_OUTCOME_ARRIVED ? KH_STATUS_DONE : KH_STATUS_FOUND;
  if (options->track)
    {
      g_autofree char *track = kh_table_dup_track (trace);
      KhStatus written = kh_command_write (options->track, track, strlen (track));
      status = MAX (status, written);
    }
  g_autofree char *answer = options->json ? kh_answer_dup_follow (plan, trace) : dup_words (plan, trace);
  KhStatus printed = kh_command_print (answer);
  return MAX (status, printed);
}

KhStatus kh_command_follow (int argc, char **argv)
{
  g_auto (Options) options = { 0 };
  const GOptionEntry entries[] = {
    { "hand", 0, 0, G_OPTION_ARG_STRING, &options.hand, N_ ("The hand kept on the wall: right or left (the plan's)"),
      "HAND" },
    { "seed", 0, 0, G_OPTION_ARG_STRING, &options.seed, N_ ("Errors drawn from this seed (1)"), "N" },
    { "trial", 0, 0, G_OPTION_ARG_STRING, &options.trial, N_ ("Errors of this trial of the seed (0)"), "N" },
    { "exact", 0, 0, G_OPTION_ARG_NONE, &options.exact, N_ ("No errors, no resolution"), NULL },
    { "json", 'j', 0, G_OPTION_ARG_NONE, &options.json, N_ ("Answer as JSON"), NULL },
    { "track", 0, 0, G_OPTION_ARG_FILENAME, &options.track, N_ ("Write each tick to a CSV file"), "FILE" },
    { NULL },
  };
  if (!kh_command_parse (entries, &argc, &argv, 1, 1))
    return KH_STATUS_USAGE;
  KhRunSettings given = { .seed = 1 };
  if (!kh_command_read_hand (options.hand, &given.hand) || !read_count ("--seed", options.seed, &given.seed)
      || !read_count ("--trial", options.trial, &given.trial))
    return KH_STATUS_USAGE;
  g_autoptr (KhPlan) plan = kh_command_load_plan (argv[1]);
  if (!plan)
    return KH_STATUS_FILE;
  KhRunSettings settings;
  kh_run_settings_init (&settings, plan);
  if (options.hand)
    settings.hand = given.hand;
  settings.exact = options.exact;
  settings.seed = given.seed;
  settings.trial = given.trial;
  return follow (plan, &settings, &options);
}
