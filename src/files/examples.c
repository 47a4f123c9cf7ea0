/* SPDX-License-Identifier: MIT */
#include "files/examples.h"
#include "examplesresource.h"
#include <stdlib.h>
#include <string.h>

#define FOLDER "/org/kerfhand/Kerfhand/examples/"
#define ENDING ".mazeplan"

static int compare (const void *a, const void *b) { return strcmp (*(char *const *)a, *(char *const *)b); }

char **kh_example_dup_names (void)
{
  char **names
      = g_resource_enumerate_children (kh_examples_get_resource (), FOLDER, G_RESOURCE_LOOKUP_FLAGS_NONE, NULL);
  g_assert (names != NULL);
  for (char **name = names; *name; name++)
    if (g_str_has_suffix (*name, ENDING))
      (*name)[strlen (*name) - strlen (ENDING)] = '\0';
  qsort (names, g_strv_length (names), sizeof *names, compare);
  return names;
}

char *kh_example_dup_text (const char *name)
{
  g_autofree char *path = g_strconcat (FOLDER, name, ENDING, NULL);
  g_autoptr (GBytes) bytes
      = g_resource_lookup_data (kh_examples_get_resource (), path, G_RESOURCE_LOOKUP_FLAGS_NONE, NULL);
  gsize n;
  if (!bytes)
    return NULL;
  const char *data = g_bytes_get_data (bytes, &n);
  return g_strndup (data, n);
}
