/* SPDX-License-Identifier: MIT */
/* The window as a reader of the screen meets it, over the accessibility bus: no focus stop without a name, or with
 * that of a type.  The program runs as a process of its own: test_names PROGRAM PLAN. */
#include <atspi/atspi.h>
#include <gio/gio.h>
#include <signal.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

G_DEFINE_AUTOPTR_CLEANUP_FUNC (AtspiAccessible, g_object_unref)
G_DEFINE_AUTOPTR_CLEANUP_FUNC (AtspiStateSet, g_object_unref)

static int n_stops, n_nameless;

static gboolean is_nameless (const char *name)
{
  return name == NULL || *name == '\0' || g_str_has_prefix (name, "Gtk") || g_str_has_prefix (name, "Kh");
}

/* A row of a table that holds nothing yet: its list makes rows before it has what to show. */
static gboolean is_empty_row (AtspiAccessible *node, const char *role)
{
  g_autoptr (AtspiAccessible) cell = atspi_accessible_get_child_at_index (node, 0, NULL);
  g_autoptr (AtspiAccessible) label = cell ? atspi_accessible_get_child_at_index (cell, 0, NULL) : NULL;
  g_autofree char *words = label ? atspi_accessible_get_name (label, NULL) : NULL;
  return role && strcmp (role, "table row") == 0 && is_nameless (words);
}

static void walk (AtspiAccessible *node, int depth)
{
  g_autoptr (AtspiStateSet) states = atspi_accessible_get_state_set (node);
  g_autofree char *name = atspi_accessible_get_name (node, NULL), *role = atspi_accessible_get_role_name (node, NULL);
  gboolean stop = states && atspi_state_set_contains (states, ATSPI_STATE_FOCUSABLE) && atspi_state_set_contains (states, ATSPI_STATE_SENSITIVE);
  /* Containers that only hold stops, and the window itself. (GTK 4.8 does not say what is showing: all are looked at.) */
  gboolean holder = role && (strcmp (role, "frame") == 0 || strcmp (role, "scroll pane") == 0 || strcmp (role, "list") == 0 || strcmp (role, "filler") == 0 || strcmp (role, "panel") == 0);
  if (stop && !holder && !is_empty_row (node, role))
    {
      n_stops++;
      if (is_nameless (name))
        {
          n_nameless++;
          g_autoptr (AtspiAccessible) parent = atspi_accessible_get_parent (node, NULL);
          g_autofree char *above = parent ? atspi_accessible_get_name (parent, NULL) : NULL;
          printf ("no name: %s below “%s”\n", role, above ? above : "");
        }
    }
  int n = atspi_accessible_get_child_count (node, NULL);
  for (int i = 0; i < n && depth < 60; i++)
    {
      g_autoptr (AtspiAccessible) child = atspi_accessible_get_child_at_index (node, i, NULL);
      if (child)
        walk (child, depth + 1);
    }
}

static AtspiAccessible *find_program (void)
{
  g_autoptr (AtspiAccessible) desktop = atspi_get_desktop (0);
  int n = desktop ? atspi_accessible_get_child_count (desktop, NULL) : 0;
  for (int i = 0; i < n; i++)
    {
      AtspiAccessible *child = atspi_accessible_get_child_at_index (desktop, i, NULL);
      g_autofree char *name = child ? atspi_accessible_get_name (child, NULL) : NULL;
      if (name && strstr (name, "erfhand") && atspi_accessible_get_child_count (child, NULL) > 0)
        return child;
      g_clear_object (&child);
    }
  return NULL;
}

int main (int argc, char **argv)
{
  g_autoptr (GError) error = NULL;
  AtspiAccessible *program = NULL;
  g_autoptr (GSubprocess) process = g_subprocess_new (G_SUBPROCESS_FLAGS_NONE, &error, argv[1], argv[2], NULL);
  if (!process)
    {
      printf ("%s\n", error->message);
      return 1;
    }
  atspi_init ();
  for (int i = 0; i < 600 && !program; i++)
    {
      g_usleep (100000);
      program = find_program ();
    }
  if (!program)
    {
      printf ("the window does not come up on the accessibility bus\n");
      g_subprocess_force_exit (process);
      return 1;
    }
  g_usleep (1500000);
  walk (program, 0);
  printf ("%d focus stops, %d without a name\n", n_stops, n_nameless);
  g_object_unref (program);
  g_subprocess_send_signal (process, SIGTERM);
  g_subprocess_wait (process, NULL, NULL);
  return n_nameless > 0 || n_stops < 20;
}
