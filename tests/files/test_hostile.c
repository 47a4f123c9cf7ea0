/* SPDX-License-Identifier: MIT */
/* Broken and hostile texts: a plan or a message, never a crash, never long. */
#include "../cmocka_all.h"
#include "base/random.h"
#include "files/planfile.h"
#include "mazes.h"
#include <string.h>

static char *example;
static gsize example_size;

/* Either a plan or at least one message that names the file. */
static KhPlan *parse (const char *bytes, gsize n)
{
  g_autoptr (GPtrArray) faults = NULL;
  KhPlan *plan = kh_plan_file_parse (bytes, n, "x", &faults);
  if (plan)
    assert_true (faults == NULL || faults->len == 0);
  else
    {
      assert_in_range (faults->len, 1, 20);
      for (guint i = 0; i < faults->len; i++)
        assert_true (g_str_has_prefix (g_ptr_array_index (faults, i), "x: ") && strlen (g_ptr_array_index (faults, i)) < 600);
    }
  return plan;
}

static void every_beginning_of_a_file_is_refused (void **state)
{
  for (gsize n = 0; n + 2 < example_size; n++)
    assert_null (parse (example, n));
  g_autoptr (KhPlan) whole = parse (example, example_size);
  assert_non_null (whole);
}

static void changed_bytes_are_survived (void **state)
{
  KhRandomKey key = { 11, 0 };
  int taken = 0;
  for (uint64_t i = 0; i < 6000; i++)
    {
      g_autofree char *copy = g_memdup2 (example, example_size);
      for (uint64_t k = 0; k < 1 + i % 4; k++)
        {
          char *at = copy + kh_random_below (key, i, 2 * k, (uint32_t) example_size);
          *at = i % 2 ? (char) kh_random_below (key, i, 2 * k + 1, 256) : "0123456789[]{},:\"-."[kh_random_below (key, i, 2 * k + 1, 19)];
        }
      g_autoptr (KhPlan) plan = parse (copy, example_size);
      taken += plan != NULL;
    }
  assert_in_range (taken, 1, 5999);
}

static void deep_nesting_is_refused_before_it_is_built (void **state)
{
  static const char *const opening[] = { "[", "{\"a\":" };
  for (int kind = 0; kind < 2; kind++)
    {
      GString *text = g_string_new (NULL);
      for (int i = 0; i < 200000; i++)
        g_string_append (text, opening[kind]);
      assert_null (parse (text->str, text->len));
      g_string_free (text, TRUE);
    }
}

static void too_much_is_refused (void **state)
{
  GString *text = g_string_new ("{\"kind\": \"kerfhand maze plan\", \"a\": [0");
  for (int i = 0; i < 2100000; i++)
    g_string_append (text, ",0");
  g_string_append (text, "]}");
  gint64 begin = g_get_monotonic_time ();
  assert_null (parse (text->str, text->len));
  assert_true (g_get_monotonic_time () - begin < 5 * G_USEC_PER_SEC); /* a hang, not a speed */
  g_string_set_size (text, KH_PLAN_FILE_MOST_BYTES + 1);
  assert_null (parse (text->str, text->len));
  g_string_free (text, TRUE);
}

static void the_largest_plan_is_read (void **state)
{
  g_autoptr (KhPlan) plan = kh_test_layout_new (512, 512, 0.5, 3);
  g_autofree char *text = kh_plan_file_dup_text (plan);
  g_autoptr (KhPlan) read = parse (text, strlen (text));
  assert_non_null (read);
  assert_true (kh_plan_equal (plan, read));
}

static int load (void **state)
{
  g_autofree char *path = g_build_filename (*state, "boat-house.mazeplan", NULL);
  return g_file_get_contents (path, &example, &example_size, NULL) ? 0 : 1;
}

int main (int argc, char **argv)
{
  void *folder = argv[1];
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (every_beginning_of_a_file_is_refused), cmocka_unit_test (changed_bytes_are_survived),
    cmocka_unit_test (deep_nesting_is_refused_before_it_is_built), cmocka_unit_test (too_much_is_refused),
    cmocka_unit_test (the_largest_plan_is_read),
  };
  if (load (&folder) != 0)
    return 1;
  int failed = cmocka_run_group_tests (tests, NULL, NULL);
  g_free (example);
  return failed;
}
