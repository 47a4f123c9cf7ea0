/* SPDX-License-Identifier: MIT */
#include "cli/command.h"
#include "files/examples.h"
#include <glib/gi18n-lib.h>
#include <string.h>

KhStatus kh_command_example (int argc, char **argv)
{
  g_autofree char *output = NULL;
  gboolean list = FALSE;
  const GOptionEntry entries[] = {
    { "output", 'o', 0, G_OPTION_ARG_FILENAME, &output, N_ ("Where to (standard output)"), "FILE" },
    { "list", 'l', 0, G_OPTION_ARG_NONE, &list, N_ ("List the examples"), NULL },
    { NULL },
  };
  if (!kh_command_parse (entries, &argc, &argv, 0, 1))
    return KH_STATUS_USAGE;
  g_auto (GStrv) names = kh_example_dup_names ();
  if (list)
    {
      g_autofree char *lines = g_strjoinv ("\n", names);
      g_autofree char *text = g_strconcat (lines, "\n", NULL);
      return kh_command_print (text);
    }
  g_autofree char *plan = kh_example_dup_text (argc > 1 ? argv[1] : KH_EXAMPLE_FIRST);
  if (!plan)
    {
      g_autofree char *all = g_strjoinv (", ", names);
      kh_command_say (_ ("there is no example “%s”; there are %s"), argv[1], all);
      return KH_STATUS_USAGE;
    }
  return kh_command_write (output ? output : "-", plan, strlen (plan));
}
