/* SPDX-License-Identifier: MIT */
#include "cli/command.h"
#include "cli/sawwords.h"
#include "files/answers.h"
#include "files/planfile.h"
#include "files/saworder.h"
#include "files/store.h"
#include <glib/gi18n-lib.h>

static KhSawOrder *load_order (const char *path)
{
  g_autofree char *bytes = NULL;
  g_autoptr (GError) error = NULL;
  g_autoptr (GPtrArray) faults = NULL;
  gsize n;
  if (!kh_store_load (path, KH_PLAN_FILE_MOST_BYTES, &bytes, &n, &error))
    {
      kh_command_say ("%s", error->message);
      return NULL;
    }
  KhSawOrder *order = kh_saw_order_parse (bytes, n, path, &faults);
  if (!order)
    kh_command_say_faults (faults);
  return order;
}

KhStatus kh_command_saw (int argc, char **argv)
{
  gboolean json = FALSE;
  KhSawSettings settings;
  kh_saw_settings_init (&settings);
  const GOptionEntry entries[] = {
    { "json", 'j', 0, G_OPTION_ARG_NONE, &json, N_ ("Answer as JSON"), NULL },
    { "seconds", 's', 0, G_OPTION_ARG_DOUBLE, &settings.seconds, N_ ("Search no longer than this (5)"), "N" },
    { NULL },
  };
  if (!kh_command_parse (entries, &argc, &argv, 1, 1))
    return KH_STATUS_USAGE;
  if (!(settings.seconds >= 0 && settings.seconds <= 86400))
    {
      kh_command_say (_ ("--seconds: give a number from 0 to 86400"));
      return KH_STATUS_USAGE;
    }
  g_autoptr (KhSawOrder) order = load_order (argv[1]);
  if (!order)
    return KH_STATUS_FILE;
  KhJob *job = kh_command_get_job ();
  g_autoptr (KhSawPlan) plan = kh_saw_plan_new (order, &settings, job);
  g_autofree char *answer = NULL;
  if (json)
    answer = kh_answer_dup_saw (order, plan);
  else
    {
      GString *text = g_string_new (NULL);
      kh_saw_words_append (text, order, plan, "");
      answer = g_string_free (text, FALSE);
    }
  KhStatus status = kh_job_is_stopped (job)     ? KH_STATUS_STOPPED
                    : plan->cannot_cut->len > 0 ? KH_STATUS_FOUND
                                                : KH_STATUS_DONE;
  KhStatus printed = kh_command_print (answer);
  return MAX (status, printed);
}
