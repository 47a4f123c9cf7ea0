/* SPDX-License-Identifier: MIT */
/* Random edits of all kinds: undo all gives the first bytes, redo all the last; what is written is read back. */
#include "../cmocka_all.h"
#include "base/random.h"
#include "base/units.h"
#include "files/planfile.h"
#include "mazes.h"
#include "plan/history.h"
#include <string.h>

#define N_EDITS 400

static uint32_t below (uint64_t seed, uint64_t step, uint64_t draw, uint32_t n)
{
  return kh_random_below ((KhRandomKey){ seed, 5 }, step, draw, n);
}

static KhChange *small_change (const KhPlan *plan, uint64_t seed, uint64_t step)
{
  uint32_t n_edges = (uint32_t) kh_lattice_n_edges (&plan->lattice), n_cells = (uint32_t) kh_lattice_n_cells (&plan->lattice);
  KhEdge edges[3];
  for (int i = 0; i < 3; i++)
    edges[i] = kh_lattice_edge_at (&plan->lattice, (int) below (seed, step, (uint64_t) (1 + i), n_edges));
  KhCell cell = kh_lattice_cell_at (&plan->lattice, (int) below (seed, step, 4, n_cells));
  int64_t size = (int64_t) (20 + below (seed, step, 5, 150)) * 250000;
  switch (below (seed, step, 0, 11))
    {
    case 0:
    case 1:
      return kh_change_new_walls (edges, 3, below (seed, step, 6, 2) != 0);
    case 2:
      return kh_change_new_gaps (&cell, 1, below (seed, step, 6, 2) != 0);
    case 3:
      return kh_change_new_locked (edges, 2, below (seed, step, 6, 2) != 0);
    case 4:
      {
        const KhOpening opening = { edges[0], (KhOpeningUse) below (seed, step, 6, 3), (char *) (step % 3 ? NULL : "\"x\": 1") };
        return kh_change_new_openings (&opening, below (seed, step, 7, 2));
      }
    case 5:
      {
        const KhMark mark = { cell, { size, size / 2 }, { size / 7, -size }, NULL };
        return kh_change_new_marks (&mark, 1);
      }
    case 6:
      {
        const KhStart start = { cell, (KhHeading) below (seed, step, 6, 4), NULL };
        return kh_change_new_start (below (seed, step, 7, 5) ? &start : NULL);
      }
    case 7:
      return kh_change_new_texts (step % 2 ? "Ä \"quoted\" \\ title" : "plain", "notes\nin two lines\t\x01");
    case 8:
      {
        KhRobot robot;
        kh_robot_copy (&robot, &plan->robot);
        robot.drive.track_mm = 60 + below (seed, step, 6, 100) * 0.37;
        robot.body.shape = (KhBodyShape) below (seed, step, 7, 2);
        KhChange *change = kh_change_new_robot (&robot);
        kh_robot_clear (&robot);
        return change;
      }
    case 9:
      {
        KhBuild build;
        kh_build_copy (&build, &plan->build);
        build.saw.kerf_nm = size;
        KhStock stock = { g_strdup ("board"), KH_STOCK_SHEET, size * 40, size * 20, KH_LENGTH_OPEN_NM, KH_GRAIN_ANY, 3, 12345, NULL };
        g_array_append_val (build.stock, stock);
        KhChange *change = kh_change_new_build (&build);
        kh_build_clear (&build);
        return change;
      }
    default:
      {
        const KhSetAside aside = { (char *) "leak", { 0.5 * below (seed, step, 6, 9), 2 }, (char *) "meant so", NULL };
        return kh_change_new_set_aside (&aside, 1);
      }
    }
}

static KhChange *any_change (const KhPlan *plan, uint64_t seed, uint64_t step)
{
  uint32_t kind = below (seed, step, 20, 20);
  if (kind == 0)
    {
      g_autoptr (KhPlan) other = kh_test_layout_new (2 + (int) below (seed, step, 21, 9), 2 + (int) below (seed, step, 22, 9), 0.4, step);
      return kh_change_new_plan (other);
    }
  if (kind > 2)
    return small_change (plan, seed, step);
  GPtrArray *group = g_ptr_array_new ();
  for (uint64_t i = 0; i < 4; i++)
    g_ptr_array_add (group, small_change (plan, seed + 77, step * 7 + i));
  return kh_change_new_group_take (group);
}

static void undo_all_and_redo_all_bring_the_bytes_back (void **state)
{
  for (uint64_t seed = 1; seed <= 8; seed++)
    {
      g_autoptr (KhHistory) history = kh_history_new_take (kh_test_layout_new (6, 5, 0.4, seed));
      g_autofree char *first = kh_plan_file_dup_text (kh_history_get_plan (history));
      gsize done = 0;
      for (uint64_t step = 0; step < N_EDITS; step++)
        {
          g_autofree char *words = g_strdup_printf ("step %u", (unsigned) step);
          done += kh_history_do_take (history, any_change (kh_history_get_plan (history), seed, step), words) != FALSE;
          if (step % 50 == 49 && kh_history_undo (history))
            done--;
        }
      assert_int_equal (kh_history_get_n_undo (history), done);
      assert_true (done > N_EDITS / 2);
      guint64 state_last = kh_history_get_state (history);
      g_autofree char *last = kh_plan_file_dup_text (kh_history_get_plan (history));
      while (kh_history_undo (history))
        ;
      g_autofree char *back = kh_plan_file_dup_text (kh_history_get_plan (history));
      assert_string_equal (back, first);
      assert_true (kh_history_get_state (history) == 0 && kh_history_get_undo_words (history) == NULL);
      gsize redone = 0;
      while (redone < done && kh_history_redo (history)) /* one more was undone last */
        redone++;
      g_autofree char *forth = kh_plan_file_dup_text (kh_history_get_plan (history));
      assert_string_equal (forth, last);
      assert_true (redone == done && kh_history_get_state (history) == state_last);
    }
}

static void what_is_written_is_read_back_the_same (void **state)
{
  for (uint64_t seed = 1; seed <= 60; seed++)
    {
      g_autoptr (GPtrArray) faults = NULL;
      g_autoptr (KhHistory) history = kh_history_new_take (kh_test_layout_new (1 + (int) (seed % 9), 1 + (int) (seed % 7), 0.5, seed));
      for (uint64_t step = 0; step < 20; step++)
        kh_history_do_take (history, small_change (kh_history_get_plan (history), seed, step), "");
      const KhPlan *plan = kh_history_get_plan (history);
      g_autofree char *text = kh_plan_file_dup_text (plan);
      g_autoptr (KhPlan) read = kh_plan_file_parse (text, strlen (text), "x", &faults);
      if (!read)
        fail_msg ("seed %d: %s\n%s", (int) seed, (char *) g_ptr_array_index (faults, 0), text);
      if (!kh_plan_equal (plan, read))
        fail_msg ("seed %d is read back another:\n%s", (int) seed, text);
      g_autofree char *again = kh_plan_file_dup_text (read);
      assert_string_equal (text, again);
    }
}

static void a_change_that_changes_nothing_is_no_step (void **state)
{
  g_autoptr (KhHistory) history = kh_history_new_take (kh_test_maze_new (4, 4, 180, 12, 1));
  KhEdge edge = { KH_AXIS_X, 0, 0 };
  assert_false (kh_history_do_take (history, kh_change_new_walls (&edge, 1, TRUE), "again"));
  assert_int_equal (kh_history_get_n_undo (history), 0);
  assert_false (kh_history_undo (history));
  assert_false (kh_history_redo (history));
  assert_true (kh_history_do_take (history, kh_change_new_walls (&edge, 1, FALSE), "one wall"));
  assert_string_equal (kh_history_get_undo_words (history), "one wall");
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (undo_all_and_redo_all_bring_the_bytes_back),
    cmocka_unit_test (what_is_written_is_read_back_the_same),
    cmocka_unit_test (a_change_that_changes_nothing_is_no_step),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
