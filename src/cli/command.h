/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include "base/job.h"
#include "plan/plan.h"

/* What the commands of kerfhand-cli share: exit statuses, options, reading and
 * writing.  Results go to standard output, messages to standard error. */

typedef enum
{
  KH_STATUS_DONE = 0,
  KH_STATUS_FOUND = 1,   /* a finding that breaks, a run that does not arrive, something that cannot be cut */
  KH_STATUS_USAGE = 2,
  KH_STATUS_FILE = 3,    /* could not be read, understood or written */
  KH_STATUS_STOPPED = 4  /* by a signal; what was done so far was said */
} KhStatus;

typedef struct
{
  const char *name;
  const char *arguments; /* "PLAN…": shown in the usage line */
  const char *summary;   /* marked for translation */
  KhStatus (*run) (int argc, char **argv); /* argv[0] is the command's name */
} KhCommand;

KhStatus kh_command_check (int argc, char **argv);
KhStatus kh_command_follow (int argc, char **argv);
KhStatus kh_command_cutlist (int argc, char **argv);
KhStatus kh_command_saw (int argc, char **argv);
KhStatus kh_command_draw (int argc, char **argv);
KhStatus kh_command_example (int argc, char **argv);

const KhCommand *kh_command_find (const char *name); /* NULL: no such command */

/* Reads the options of a command; what is left are its operands, *argc of them
 * from argv[1] on, at least 'least' and at most 'most'.  On a wrong use says
 * what is wrong on standard error and returns FALSE. */
gboolean kh_command_parse (const GOptionEntry *entries, int *argc, char ***argv, int least, int most);

/* A message on standard error, "kerfhand-cli: …", with a newline. */
void kh_command_say (const char *format, ...) G_GNUC_PRINTF (1, 2);
void kh_command_say_faults (const GPtrArray *faults);

/* The plan, or NULL once its faults have been said. */
KhPlan *kh_command_load_plan (const char *path);

/* DONE, or FILE once the reason has been said. */
KhStatus kh_command_write (const char *path, const char *bytes, gsize n);
KhStatus kh_command_print (const char *text);

/* The hand named, or the plan's where name is NULL.  FALSE once said. */
gboolean kh_command_read_hand (const char *name, KhHand *hand);

/* A job that SIGINT and SIGTERM stop.  One for the whole program. */
KhJob *kh_command_get_job (void);

/* Words in bold on a terminal, unless NO_COLOR is set. Owned. */
char *kh_command_dup_bold (const char *words);
