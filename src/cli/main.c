/* SPDX-License-Identifier: MIT */
/* kerfhand-cli: the same core as the desktop program, without a display. */
#include "cli/command.h"
#include "config.h"
#include <glib/gi18n-lib.h>
#include <locale.h>
#include <stdio.h>
#include <string.h>

static char *dup_usage (void)
{
  GString *text = g_string_new (NULL);
  g_string_append_printf (text, "%s\n\n%s\n", _ ("Usage: kerfhand-cli COMMAND [OPTION…] [FILE…]"),
                          _ ("Checks, drives, draws and cuts maze plans without a display."));
  g_string_append_printf (text, "\n%s\n", _ ("Commands:"));
  for (const KhCommand *command = kh_command_find (NULL); command->name; command++)
    g_string_append_printf (text, "  %-8s %-9s %s\n", command->name, _ (command->arguments), _ (command->summary));
  g_string_append_printf (
      text, "\n%s\n%s\n", _ ("“kerfhand-cli COMMAND --help” lists a command's options; - is standard input or output."),
      _ ("Status: 0 done; 1 something breaks, does not arrive or cannot be cut; 2 wrong use; 3 a file; 4 stopped."));
  return g_string_free (text, FALSE);
}

int main (int argc, char **argv)
{
  setlocale (LC_ALL, "");
  bindtextdomain (GETTEXT_PACKAGE, g_getenv ("KERFHAND_LOCALE_DIR") ? g_getenv ("KERFHAND_LOCALE_DIR") : KH_LOCALE_DIR);
  bind_textdomain_codeset (GETTEXT_PACKAGE, "UTF-8");
  textdomain (GETTEXT_PACKAGE);

  const char *first = argc > 1 ? argv[1] : NULL;
  g_autofree char *usage = dup_usage ();
  if (first == NULL)
    {
      g_printerr ("%s", usage);
      return KH_STATUS_USAGE;
    }
  if (strcmp (first, "--help") == 0 || strcmp (first, "-h") == 0 || strcmp (first, "help") == 0)
    return (int)kh_command_print (usage);
  if (strcmp (first, "--version") == 0)
    return (int)kh_command_print ("kerfhand-cli " KH_VERSION "\n");
  const KhCommand *command = kh_command_find (first);
  if (!command)
    {
      kh_command_say (_ ("“%s” is no command; “kerfhand-cli --help” lists them"), first);
      return KH_STATUS_USAGE;
    }
  return (int)command->run (argc - 1, argv + 1);
}
