/* SPDX-License-Identifier: MIT */
#include "cli/command.h"
#include "files/planfile.h"
#include "files/store.h"
#include <glib/gi18n-lib.h>
#include <signal.h>
#include <stdio.h>
#include <string.h>
#include <unistd.h>

static const KhCommand commands[] = {
  { "check", N_ ("PLAN…"), N_ ("findings, verdicts and measures of a layout"), kh_command_check },
  { "follow", N_ ("PLAN"), N_ ("one run of the follower through a plan"), kh_command_follow },
  { "cutlist", N_ ("PLAN"), N_ ("panels, posts and what to buy"), kh_command_cutlist },
  { "saw", N_ ("ORDER"), N_ ("the saw plan of a bare order"), kh_command_saw },
  { "draw", N_ ("PLAN"), N_ ("a picture of a plan: SVG, PDF or PNG"), kh_command_draw },
  { "example", N_ ("[NAME]"), N_ ("writes a drawn example plan"), kh_command_example },
  { NULL },
};

const KhCommand *kh_command_find (const char *name)
{
  for (const KhCommand *command = commands; command->name; command++)
    if (name == NULL || strcmp (command->name, name) == 0)
      return command;
  return NULL;
}

void kh_command_say (const char *format, ...)
{
  va_list args;
  va_start (args, format);
  g_autofree char *message = g_strdup_vprintf (format, args);
  va_end (args);
  g_printerr ("kerfhand-cli: %s\n", message);
}

void kh_command_say_faults (const GPtrArray *faults)
{
  for (guint i = 0; i < faults->len; i++)
    kh_command_say ("%s", (const char *)g_ptr_array_index (faults, i));
}

gboolean kh_command_parse (const GOptionEntry *entries, int *argc, char ***argv, int least, int most)
{
  const KhCommand *command = kh_command_find ((*argv)[0]);
  g_autofree char *usage = g_strdup_printf ("%s — %s", _ (command->arguments), _ (command->summary));
  g_autofree char *program = g_strdup_printf ("kerfhand-cli %s", command->name);
  g_autoptr (GOptionContext) context = g_option_context_new (usage);
  g_autoptr (GError) error = NULL;
  g_set_prgname (program);
  g_option_context_set_translation_domain (context, GETTEXT_PACKAGE);
  g_option_context_add_main_entries (context, entries, GETTEXT_PACKAGE);
  if (!g_option_context_parse (context, argc, argv, &error))
    {
      kh_command_say (_ ("%s: %s; “kerfhand-cli %s --help” lists the options"), command->name, error->message,
                      command->name);
      return FALSE;
    }
  /* GOption leaves a "--" that it has passed over in its place. */
  if (*argc > 1 && strcmp ((*argv)[1], "--") == 0)
    {
      memmove (*argv + 1, *argv + 2, sizeof (char *) * (gsize)(*argc - 1));
      (*argc)--;
    }
  int n = *argc - 1;
  if (n < least || n > most)
    {
      kh_command_say (n < least ? _ ("%s: name what to read: kerfhand-cli %s %s")
                                : _ ("%s: too many files named: kerfhand-cli %s %s"),
                      command->name, command->name, _ (command->arguments));
      return FALSE;
    }
  return TRUE;
}

KhPlan *kh_command_load_plan (const char *path)
{
  g_autoptr (GPtrArray) faults = NULL;
  KhPlan *plan = kh_plan_file_load (path, &faults);
  if (!plan)
    kh_command_say_faults (faults);
  return plan;
}

KhStatus kh_command_write (const char *path, const char *bytes, gsize n)
{
  g_autoptr (GError) error = NULL;
  if (kh_store_save (path, bytes, n, NULL, &error))
    return KH_STATUS_DONE;
  kh_command_say ("%s", error->message);
  return KH_STATUS_FILE;
}

KhStatus kh_command_print (const char *text) { return kh_command_write ("-", text, strlen (text)); }

gboolean kh_command_read_hand (const char *name, KhHand *hand)
{
  if (name == NULL)
    return TRUE;
  if (strcmp (name, "right") == 0)
    *hand = KH_HAND_RIGHT;
  else if (strcmp (name, "left") == 0)
    *hand = KH_HAND_LEFT;
  else
    {
      kh_command_say (_ ("--hand: “%s” is no hand; give right or left"), name);
      return FALSE;
    }
  return TRUE;
}

static KhJob the_job;

static void stop_cb (int signal_number) { kh_job_stop (&the_job); }

KhJob *kh_command_get_job (void)
{
  static gboolean ready = FALSE;
  if (!ready)
    {
      struct sigaction action = { .sa_handler = stop_cb };
      kh_job_init (&the_job);
      sigemptyset (&action.sa_mask);
      sigaction (SIGINT, &action, NULL);
      sigaction (SIGTERM, &action, NULL);
      ready = TRUE;
    }
  return &the_job;
}

char *kh_command_dup_bold (const char *words)
{
  const char *no_colour = g_getenv ("NO_COLOR");
  gboolean plain = !isatty (STDOUT_FILENO) || (no_colour && *no_colour);
  return plain ? g_strdup (words) : g_strdup_printf ("\033[1m%s\033[0m", words);
}
