/* SPDX-License-Identifier: MIT */
#include "driver.h"

#include <math.h>

static gboolean end_cb (gpointer flag)
{
  *(gboolean *)flag = TRUE;
  return G_SOURCE_REMOVE;
}

void kt_settle (int ms)
{
  gboolean over = FALSE;
  g_timeout_add ((guint)ms, end_cb, &over);
  while (!over)
    g_main_context_iteration (NULL, TRUE);
}

gboolean kt_wait (KtTest test, gpointer data, int most_ms)
{
  for (int waited = 0; waited < most_ms; waited += 20)
    {
      if (test (data))
        return TRUE;
      kt_settle (20);
    }
  return test (data);
}

static void exited_cb (GObject *source, GAsyncResult *result, gpointer flag)
{
  g_autoptr (GError) error = NULL;
  if (!g_subprocess_wait_check_finish (G_SUBPROCESS (source), result, &error))
    g_printerr ("driver: %s\n", error->message);
  *(gboolean *)flag = TRUE;
}

static void run (const char *const *argv)
{
  g_autoptr (GError) error = NULL;
  gboolean over = FALSE;
  g_autoptr (GSubprocess) process = g_subprocess_newv (argv, G_SUBPROCESS_FLAGS_STDOUT_SILENCE, &error);
  if (process == NULL)
    fail_msg ("%s", error->message);
  g_subprocess_wait_check_async (process, NULL, exited_cb, &over);
  while (!over)
    g_main_context_iteration (NULL, TRUE);
}

void kt_x (const char *arguments)
{
  g_autofree char *line = g_strconcat ("xdotool ", arguments, NULL);
  g_auto (GStrv) argv = g_strsplit (line, " ", -1);
  run ((const char *const *)argv);
  kt_settle (40);
}

void kt_keys (const char *keys)
{
  g_auto (GStrv) list = g_strsplit (keys, " ", -1);
  for (int i = 0; list[i] != NULL; i++)
    {
      g_autofree char *line = g_strconcat ("key ", list[i], NULL);
      kt_x (line);
    }
}

static void place_on_screen (KhWindow *window, double x_mm, double y_mm, int *x, int *y)
{
  GtkWidget *canvas = kh_window_get_canvas (window);
  graphene_point_t at, in_window;
  double cx, cy, dx, dy;
  kh_canvas_locate (KH_CANVAS (canvas), (KhVec){ x_mm, y_mm }, &cx, &cy);
  at = GRAPHENE_POINT_INIT ((float)cx, (float)cy);
  assert_true (gtk_widget_compute_point (canvas, GTK_WIDGET (window), &at, &in_window));
  gtk_native_get_surface_transform (GTK_NATIVE (window), &dx, &dy);
  *x = (int)lround ((double)in_window.x + dx);
  *y = (int)lround ((double)in_window.y + dy);
}

void kt_point (KhWindow *window, double x_mm, double y_mm)
{
  int x, y;
  place_on_screen (window, x_mm, y_mm, &x, &y);
  g_autofree char *line = g_strdup_printf ("mousemove %d %d", x, y);
  kt_x (line);
}

/* Held for some frames, as by a hand: a press and a release within one frame
 * are taken for a lost grab by GTK 4.8, when it asks for the pointer between them. */
void kt_click (KhWindow *window, double x_mm, double y_mm, int button)
{
  g_autofree char *down = g_strdup_printf ("mousedown %d", button);
  g_autofree char *up = g_strdup_printf ("mouseup %d", button);
  kt_point (window, x_mm, y_mm);
  kt_x (down);
  kt_settle (60);
  kt_x (up);
}

void kt_drag (KhWindow *window, double x0_mm, double y0_mm, double x1_mm, double y1_mm, int button)
{
  const int n_moves = 5;
  g_autofree char *down = g_strdup_printf ("mousedown %d", button);
  g_autofree char *up = g_strdup_printf ("mouseup %d", button);
  kt_point (window, x0_mm, y0_mm);
  kt_x (down);
  for (int i = 1; i <= n_moves; i++)
    kt_point (window, x0_mm + (x1_mm - x0_mm) * i / n_moves, y0_mm + (y1_mm - y0_mm) * i / n_moves);
  kt_x (up);
}

void kt_focus_window (const char *title)
{
  const char *argv[]
      = { "xdotool", "search", "--sync", "--onlyvisible", "--name", title, "windowfocus", "--sync", NULL };
  run (argv);
  kt_settle (60);
}

void kt_picture (const char *name)
{
  const char *folder = g_getenv ("TEST_PICTURES");
  if (folder == NULL)
    return;
  g_autofree char *path = g_strdup_printf ("%s/%s.png", folder, name);
  const char *argv[] = { "import", "-window", "root", path, NULL };
  kt_settle (150);
  run (argv);
}

KhWindow *kt_window (KhApplication *app)
{
  for (GList *item = gtk_application_get_windows (GTK_APPLICATION (app)); item != NULL; item = item->next)
    if (KH_IS_WINDOW (item->data))
      return item->data;
  return NULL;
}

static gboolean has_window (gpointer app)
{
  KhWindow *window = kt_window (app);
  return window != NULL && gtk_widget_get_mapped (GTK_WIDGET (window))
         && gtk_widget_get_width (GTK_WIDGET (window)) > 0;
}

KhApplication *kt_start (void)
{
  g_autoptr (GError) error = NULL;
  g_set_prgname ("kerfhand"); /* as g_application_run would */
  KhApplication *app = kh_application_new ();
  if (!g_application_register (G_APPLICATION (app), NULL, &error))
    fail_msg ("%s", error->message);
  g_application_activate (G_APPLICATION (app));
  assert_true (kt_wait (has_window, app, 5000));
  kt_settle (300);
  kt_focus_window ("Kerfhand");
  return app;
}

static gboolean has_no_window (gpointer app) { return kt_window (app) == NULL; }

void kt_stop (KhApplication *app)
{
  while (kt_window (app) != NULL)
    gtk_window_destroy (GTK_WINDOW (kt_window (app)));
  assert_true (kt_wait (has_no_window, app, 2000));
  g_object_unref (app);
}
