/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "base/units.h"
#include "panels/cutlist.h"
#include <string.h>

#define MM KH_NM_PER_MM

/* Every wall set of small lattices, looked at edge by edge with nothing taken
 * over from the program: p pitch, t thickness, E walls, V points touched. */

static gboolean wall (const KhPlan *plan, KhAxis axis, int c, int r)
{
  int columns = plan->lattice.columns, rows = plan->lattice.rows;
  if (c < 0 || r < 0 || c >= columns + (axis == KH_AXIS_Y) || r >= rows + (axis == KH_AXIS_X))
    return FALSE;
  return plan->walled[axis == KH_AXIS_X ? r * columns + c : columns * (rows + 1) + c * rows + r];
}

/* Walls at a point: along x, along y. */
static void count_arms (const KhPlan *plan, int c, int r, int arms[2])
{
  arms[0] = wall (plan, KH_AXIS_X, c - 1, r) + wall (plan, KH_AXIS_X, c, r);
  arms[1] = wall (plan, KH_AXIS_Y, c, r - 1) + wall (plan, KH_AXIS_Y, c, r);
}

typedef struct
{
  int edges, points, ends, corners, tees, crosses;
} Tally;

static Tally tally_plan (const KhPlan *plan)
{
  Tally tally = { 0 };
  for (int r = 0; r <= plan->lattice.rows; r++)
    for (int c = 0; c <= plan->lattice.columns; c++)
      {
        int arms[2];
        count_arms (plan, c, r, arms);
        int n = arms[0] + arms[1];
        tally.edges += wall (plan, KH_AXIS_X, c, r) + wall (plan, KH_AXIS_Y, c, r);
        tally.points += n > 0;
        tally.ends += n == 1;
        tally.corners += n == 2 && arms[0] == 1;
        tally.tees += n == 3;
        tally.crosses += n == 4;
      }
  return tally;
}

/* Sets the walls to the bits of 'set'. */
static void set_walls (KhPlan *plan, unsigned set)
{
  for (int i = 0; i < kh_lattice_n_edges (&plan->lattice); i++)
    plan->walled[i] = set >> i & 1;
}

static void assert_disjoint (const KhCutList *list, const KhPlan *plan, unsigned set)
{
  for (guint i = 0; i < list->panels->len; i++)
    for (guint k = 0; k < i; k++)
      {
        int64_t a[4], b[4];
        kh_panel_get_box_nm (&g_array_index (list->panels, KhPanel, i), plan, a);
        kh_panel_get_box_nm (&g_array_index (list->panels, KhPanel, k), plan, b);
        if (a[0] < b[2] && b[0] < a[2] && a[1] < b[3] && b[1] < a[3])
          fail_msg ("set %x: %s and %s overlap", set, g_array_index (list->panels, KhPanel, i).label,
                    g_array_index (list->panels, KhPanel, k).label);
      }
}

/* Areas add up to the figure t (E (p - t) + V t), less t^2 / 2 a flush end; with no overlap that is
 * no gap either, as no panel leaves the figure.  Without a limit there are (V1 + 2 Vc + Vt + 2 Vx) / 2 panels. */
static void panels_fill_the_figure (int columns, int rows, KhEnds ends, int64_t longest_mm, unsigned step)
{
  g_autoptr (KhPlan) plan = kh_plan_new (columns, rows, 180 * MM, 12 * MM, 50 * MM);
  plan->build.ends = ends;
  plan->build.longest_panel_nm = longest_mm * MM;
  for (unsigned set = 0; set < 1u << kh_lattice_n_edges (&plan->lattice); set += step)
    {
      set_walls (plan, set);
      Tally tally = tally_plan (plan);
      g_autoptr (KhCutList) list = kh_cut_list_new (plan, NULL);
      assert_non_null (list);
      int64_t area = 0, figure = 12 * (tally.edges * (180 - 12) + tally.points * 12);
      if (ends == KH_ENDS_FLUSH)
        figure -= tally.ends * 12 * 12 / 2;
      for (guint i = 0; i < list->panels->len; i++)
        {
          const KhPanel *panel = &g_array_index (list->panels, KhPanel, i);
          area += panel->length_nm / MM * 12;
          assert_true (panel->length_nm <= longest_mm * MM);
        }
      assert_int_equal (area, figure);
      assert_int_equal (list->total_nm, figure / 12 * MM);
      assert_disjoint (list, plan, set);
      if (longest_mm >= 1000)
        assert_int_equal (2 * (int)list->panels->len, tally.ends + 2 * tally.corners + tally.tees + 2 * tally.crosses);
      assert_int_equal (list->n_points[KH_POINT_CROSS], tally.crosses);
      assert_int_equal (list->n_points[KH_POINT_TEE], tally.tees);
    }
}

static void every_2_by_2 (void **state)
{
  panels_fill_the_figure (2, 2, KH_ENDS_FULL, 1200, 1);
  panels_fill_the_figure (2, 2, KH_ENDS_FLUSH, 1200, 1);
  panels_fill_the_figure (2, 2, KH_ENDS_FULL, 192, 1);
}

static void every_3_by_2 (void **state) { panels_fill_the_figure (3, 2, KH_ENDS_FULL, 1200, 1); }

static void every_3_by_2_flush (void **state) { panels_fill_the_figure (3, 2, KH_ENDS_FLUSH, 1200, 1); }

static void every_3_by_2_with_a_limit (void **state) { panels_fill_the_figure (3, 2, KH_ENDS_FULL, 372, 1); }

/* Fewest panels by brute force: every loser at every corner and cross, every set of places to break at. */

#define NONE 1000000
typedef struct
{
  KhAxis axis;
  int line, from, to;
} Line;

typedef struct
{
  const KhPlan *plan;
  int n_lines, n_points;
  Line lines[32];
  int points[32][2]; /* corners and crosses */
  unsigned losers;   /* a bit each of those: 1 = the line along y loses */
} Brute;

static gboolean loses_at (const Brute *b, const Line *line, int c, int r)
{
  for (int i = 0; i < b->n_points; i++)
    if (b->points[i][0] == c && b->points[i][1] == r)
      return (b->losers >> i & 1) == (line->axis == KH_AXIS_Y);
  return FALSE;
}

static void point_of (const Line *line, int place, int *c, int *r)
{
  *c = line->axis == KH_AXIS_X ? place : line->line;
  *r = line->axis == KH_AXIS_X ? line->line : place;
}

/* Half thicknesses of the line's panel that ends at 'place'. */
static int end_at (const Brute *b, const Line *line, int place)
{
  int c, r, arms[2];
  point_of (line, place, &c, &r);
  count_arms (b->plan, c, r, arms);
  int own = arms[line->axis], across = arms[1 - line->axis];
  if (own == 2)
    return across == 2 && loses_at (b, line, c, r) ? -1 : 0;
  if (across == 2)
    return -1;
  if (across == 1)
    return loses_at (b, line, c, r) ? -1 : 1;
  return b->plan->build.ends == KH_ENDS_FULL ? 1 : 0;
}

static gboolean must_break (const Brute *b, const Line *line, int place)
{
  int c, r, arms[2];
  point_of (line, place, &c, &r);
  count_arms (b->plan, c, r, arms);
  return arms[0] == 2 && arms[1] == 2 && loses_at (b, line, c, r);
}

static int fewest_of_line (const Brute *b, const Line *line)
{
  int best = NONE, n = line->to - line->from;
  for (unsigned broken = 0; broken < 1u << (n - 1); broken++)
    {
      int pieces = 0, from = line->from;
      for (int place = from + 1; place <= line->to && pieces < NONE; place++)
        {
          gboolean stop = place == line->to || (broken >> (place - line->from - 1) & 1);
          if (!stop && must_break (b, line, place))
            pieces = NONE;
          if (!stop)
            continue;
          int64_t length = (place - from) * b->plan->lattice.pitch_nm
                           + (end_at (b, line, from) + end_at (b, line, place)) * b->plan->walls.thickness_nm / 2;
          pieces = length > b->plan->build.longest_panel_nm ? NONE : pieces + 1;
          from = place;
        }
      best = MIN (best, pieces);
    }
  return best;
}

static void read_brute (Brute *b, const KhPlan *plan)
{
  *b = (Brute){ .plan = plan };
  for (int axis = 0; axis < 2; axis++)
    for (int line = 0; line <= (axis == 0 ? plan->lattice.rows : plan->lattice.columns); line++)
      for (int k = 0; k < (axis == 0 ? plan->lattice.columns : plan->lattice.rows); k++)
        {
          if (!wall (plan, (KhAxis)axis, axis == 0 ? k : line, axis == 0 ? line : k))
            continue;
          Line *last = b->n_lines > 0 ? &b->lines[b->n_lines - 1] : NULL;
          if (last && last->axis == (KhAxis)axis && last->line == line && last->to == k)
            last->to = k + 1;
          else
            b->lines[b->n_lines++] = (Line){ (KhAxis)axis, line, k, k + 1 };
        }
  for (int r = 0; r <= plan->lattice.rows; r++)
    for (int c = 0; c <= plan->lattice.columns; c++)
      {
        int arms[2];
        count_arms (plan, c, r, arms);
        if (arms[0] == arms[1] && arms[0] > 0)
          {
            b->points[b->n_points][0] = c;
            b->points[b->n_points++][1] = r;
          }
      }
}

static int fewest_by_brute_force (const KhPlan *plan)
{
  Brute b;
  read_brute (&b, plan);
  int best = NONE;
  for (unsigned losers = 0; losers < 1u << b.n_points; losers++)
    {
      int sum = 0;
      b.losers = losers;
      for (int i = 0; i < b.n_lines && sum < NONE; i++)
        sum += fewest_of_line (&b, &b.lines[i]);
      best = MIN (best, sum);
    }
  return best;
}

static void compare_fewest (int columns, int rows, unsigned step, KhEnds ends)
{
  /* Limits about every length at which something changes: 180 p, 12 t. */
  static const int limits[] = { 167, 168, 174, 179, 180, 186, 192, 348, 354, 359, 360, 366, 372, 540, 552 };
  g_autoptr (KhPlan) plan = kh_plan_new (columns, rows, 180 * MM, 12 * MM, 50 * MM);
  plan->build.ends = ends;
  for (unsigned set = 1; set < 1u << kh_lattice_n_edges (&plan->lattice); set += step)
    for (gsize i = 0; i < G_N_ELEMENTS (limits); i++)
      {
        set_walls (plan, set);
        plan->build.longest_panel_nm = limits[i] * MM;
        g_autoptr (GError) error = NULL;
        g_autoptr (KhCutList) list = kh_cut_list_new (plan, &error);
        int fewest = fewest_by_brute_force (plan);
        if (!list && !g_error_matches (error, KH_PANELS_ERROR, KH_PANELS_ERROR_LENGTH))
          fail_msg ("refused, but not for a length");
        if ((list ? (int)list->panels->len : NONE) != MIN (fewest, NONE))
          fail_msg ("set %x, limit %d: %d panels, fewest %d", set, limits[i], list ? (int)list->panels->len : -1,
                    fewest);
      }
}

static void fewest_on_every_2_by_2 (void **state)
{
  compare_fewest (2, 2, 1, KH_ENDS_FULL);
  compare_fewest (2, 2, 3, KH_ENDS_FLUSH);
}

static void fewest_on_many_3_by_2 (void **state) { compare_fewest (3, 2, 131, KH_ENDS_FULL); }

static void fewest_on_many_3_by_3 (void **state) { compare_fewest (3, 3, 52631, KH_ENDS_FULL); }

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (every_2_by_2),           cmocka_unit_test (every_3_by_2),
    cmocka_unit_test (every_3_by_2_flush),     cmocka_unit_test (every_3_by_2_with_a_limit),
    cmocka_unit_test (fewest_on_every_2_by_2), cmocka_unit_test (fewest_on_many_3_by_2),
    cmocka_unit_test (fewest_on_many_3_by_3),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
