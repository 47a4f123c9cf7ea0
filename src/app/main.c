/* SPDX-License-Identifier: MIT */
#include "app/application.h"

#include "config.h"
#include <glib/gi18n-lib.h>
#include <locale.h>

int main (int argc, char **argv)
{
  setlocale (LC_ALL, "");
  const char *catalogues = g_getenv ("KERFHAND_LOCALE_DIR"); /* a run out of the build folder */
  bindtextdomain (GETTEXT_PACKAGE, catalogues ? catalogues : KH_LOCALE_DIR);
  bind_textdomain_codeset (GETTEXT_PACKAGE, "UTF-8");
  textdomain (GETTEXT_PACKAGE);
  g_autoptr (KhApplication) application = kh_application_new ();
  return g_application_run (G_APPLICATION (application), argc, argv);
}
