/* SPDX-License-Identifier: MIT */
/* Saving: the old file or the new one, whole; links and permissions stay; nobody's work is written over. */
#include "../cmocka_all.h"
#include "files/store.h"
#include <fcntl.h>
#include <glib/gstdio.h>
#include <stdio.h>
#include <string.h>
#include <sys/stat.h>
#include <unistd.h>

static char *folder;

static char *path_of (const char *name)
{
  return g_build_filename (folder, name, NULL);
}

static void assert_holds (const char *path, const char *text)
{
  g_autofree char *bytes = NULL;
  gsize n;
  assert_true (kh_store_load (path, 1000, &bytes, &n, NULL));
  assert_int_equal (n, strlen (text));
  assert_string_equal (bytes, text);
}

static void a_file_is_written_and_read (void **state)
{
  g_autofree char *path = path_of ("a");
  assert_true (kh_store_save (path, "first", 5, NULL, NULL));
  assert_holds (path, "first");
  assert_true (kh_store_save (path, "second", 6, NULL, NULL));
  assert_holds (path, "second");
}

static void a_link_and_the_permissions_stay (void **state)
{
  g_autofree char *path = path_of ("b"), *link = path_of ("link");
  struct stat status;
  assert_true (kh_store_save (path, "x", 1, NULL, NULL));
  assert_int_equal (chmod (path, 0640), 0);
  assert_int_equal (symlink ("b", link), 0);
  assert_true (kh_store_save (link, "through the link", 16, NULL, NULL));
  assert_int_equal (lstat (link, &status), 0);
  assert_true (S_ISLNK (status.st_mode));
  assert_int_equal (stat (path, &status), 0);
  assert_int_equal (status.st_mode & 0777, 0640);
  assert_holds (path, "through the link");
}

static void what_another_program_wrote_is_not_written_over (void **state)
{
  g_autofree char *path = path_of ("c");
  KhFileStamp stamp;
  g_autoptr (GError) error = NULL;
  assert_true (kh_store_save (path, "mine", 4, NULL, NULL));
  kh_store_stamp (path, &stamp);
  assert_true (kh_store_save (path, "mine too", 8, &stamp, NULL));
  assert_true (g_file_set_contents (path, "theirs", -1, NULL));
  assert_false (kh_store_save (path, "lost", 4, &stamp, &error));
  assert_true (g_error_matches (error, KH_STORE_ERROR, KH_STORE_ERROR_CHANGED));
  assert_holds (path, "theirs");
  assert_true (kh_store_save (path, "on purpose", 10, NULL, NULL));
}

typedef struct
{
  const char *name, *holds;
} Refusal;

static void what_is_in_the_way_is_told (void **state)
{
  static const Refusal loads[] = { { "gone", "check the name and the folder" }, { "folder", "this is a folder; name a file" }, { "a/below", "Not a directory" }, { "large", "larger than the 0 MiB" } };
  g_autofree char *sub = path_of ("folder"), *large = path_of ("large");
  g_mkdir (sub, 0755);
  assert_true (g_file_set_contents (large, "0123456789", 10, NULL));
  for (gsize i = 0; i < G_N_ELEMENTS (loads); i++)
    {
      g_autofree char *path = path_of (loads[i].name), *bytes = NULL;
      g_autoptr (GError) error = NULL;
      gsize n;
      assert_false (kh_store_load (path, 5, &bytes, &n, &error));
      if (!g_str_has_prefix (error->message, path) || !strstr (error->message, loads[i].holds))
        fail_msg ("%s", error->message);
    }
  static const char *const saves[] = { "folder", "none/file", "a/below" };
  for (gsize i = 0; i < G_N_ELEMENTS (saves); i++)
    {
      g_autofree char *path = path_of (saves[i]);
      g_autoptr (GError) error = NULL;
      assert_false (kh_store_save (path, "x", 1, NULL, &error));
      assert_true (g_str_has_prefix (error->message, path));
    }
}

/* A pipe that nobody writes to must not be waited for. */
static void a_pipe_is_no_file (void **state)
{
  g_autofree char *path = path_of ("pipe"), *bytes = NULL;
  g_autoptr (GError) error = NULL;
  gsize n;
  assert_int_equal (mkfifo (path, 0600), 0);
  assert_false (kh_store_load (path, 5, &bytes, &n, &error));
  assert_true (g_error_matches (error, KH_STORE_ERROR, KH_STORE_ERROR_NOT_A_FILE));
}

static void without_permission_nothing_is_lost (void **state)
{
  g_autofree char *sub = path_of ("locked"), *path = g_build_filename (sub, "plan", NULL);
  g_autoptr (GError) error = NULL;
  if (geteuid () == 0)
    {
      print_message ("as root everything may be written: left out\n");
      return;
    }
  g_mkdir (sub, 0755);
  assert_true (kh_store_save (path, "old", 3, NULL, NULL));
  assert_int_equal (chmod (path, 0444), 0);
  assert_false (kh_store_save (path, "new", 3, NULL, &error));
  assert_non_null (strstr (error->message, "permission"));
  assert_holds (path, "old");
}

/* /dev/full is a disk without room. */
static void a_full_disk_is_told (void **state)
{
  g_autoptr (GError) error = NULL;
  int kept = dup (STDOUT_FILENO), full = g_open ("/dev/full", O_WRONLY, 0);
  if (full < 0)
    skip ();
  fflush (stdout);
  dup2 (full, STDOUT_FILENO);
  gboolean good = kh_store_save ("-", "text", 4, NULL, &error);
  dup2 (kept, STDOUT_FILENO);
  close (kept);
  close (full);
  assert_false (good);
  assert_true (g_str_has_prefix (error->message, "standard output: "));
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (a_file_is_written_and_read),         cmocka_unit_test (a_link_and_the_permissions_stay),
    cmocka_unit_test (what_another_program_wrote_is_not_written_over), cmocka_unit_test (what_is_in_the_way_is_told),
    cmocka_unit_test (a_pipe_is_no_file),                  cmocka_unit_test (without_permission_nothing_is_lost),
    cmocka_unit_test (a_full_disk_is_told),
  };
  folder = g_dir_make_tmp ("kerfhand-store-XXXXXX", NULL);
  int failed = cmocka_run_group_tests (tests, NULL, NULL);
  g_autofree char *command = g_strdup_printf ("rm -rf %s", folder);
  g_spawn_command_line_sync (command, NULL, NULL, NULL, NULL);
  g_free (folder);
  return failed;
}
