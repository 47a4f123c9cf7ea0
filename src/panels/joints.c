/* SPDX-License-Identifier: MIT */
#include "panels/joints.h"
#include "base/units.h"
#include "panels/breaks.h"
#include <glib/gi18n-lib.h>

/* Reads the lines of a plan and how they meet, has the breaks chosen
 * (breaks.c), and writes the panels down. */

unsigned kh_joints_get_arms (const KhPlan *plan, KhPoint point)
{
  int c = point.column, r = point.row;
  return (kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_Y, c, r }) ? 1u << KH_HEADING_NORTH : 0)
         | (kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_X, c, r }) ? 1u << KH_HEADING_EAST : 0)
         | (kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_Y, c, r - 1 }) ? 1u << KH_HEADING_SOUTH : 0)
         | (kh_plan_has_wall (plan, (KhEdge){ KH_AXIS_X, c - 1, r }) ? 1u << KH_HEADING_WEST : 0);
}

static gboolean floor_touches (const KhPlan *plan, KhPoint point)
{
  for (int i = 0; i < 4; i++)
    if (kh_plan_has_floor (plan, (KhCell){ point.column - i % 2, point.row - i / 2 }))
      return TRUE;
  return FALSE;
}

void kh_joints_count_points (const KhPlan *plan, int n_points[KH_N_POINT_KINDS], int *n_lone_posts)
{
  /* By arms, north 1, east 2, south 4, west 8; -1: no wall touches it. */
  static const int kinds[16] = {
    -1,           KH_POINT_END,   KH_POINT_END,    KH_POINT_CORNER,   KH_POINT_END, KH_POINT_STRAIGHT, KH_POINT_CORNER,
    KH_POINT_TEE, KH_POINT_END,   KH_POINT_CORNER, KH_POINT_STRAIGHT, KH_POINT_TEE, KH_POINT_CORNER,   KH_POINT_TEE,
    KH_POINT_TEE, KH_POINT_CROSS,
  };
  for (int i = 0; i < KH_N_POINT_KINDS; i++)
    n_points[i] = 0;
  *n_lone_posts = 0;
  for (int i = 0; i < kh_lattice_n_points (&plan->lattice); i++)
    {
      KhPoint point = kh_lattice_point_at (&plan->lattice, i);
      int kind = kinds[kh_joints_get_arms (plan, point)];
      if (kind >= 0)
        n_points[kind]++;
      else if (plan->walls.posts == KH_POSTS_EVERYWHERE && floor_touches (plan, point))
        (*n_lone_posts)++;
    }
}

static KhPoint point_on (KhRun run, int place)
{
  int along = run.from + place;
  return run.axis == KH_AXIS_X ? (KhPoint){ along, run.line } : (KhPoint){ run.line, along };
}

static gboolean is_loose_end (const KhPlan *plan, KhRun run, int along)
{
  for (guint i = 0; i < plan->build.loose_sections->len; i++)
    {
      KhRun loose = g_array_index (plan->build.loose_sections, KhRun, i);
      if (loose.axis == run.axis && loose.line == run.line && (loose.from == along || loose.to == along))
        return TRUE;
    }
  return FALSE;
}

/* The arms beside a line's own at one of its points. */
static unsigned arms_across (const KhPlan *plan, KhRun run, int place)
{
  unsigned across = run.axis == KH_AXIS_X ? 1u << KH_HEADING_NORTH | 1u << KH_HEADING_SOUTH
                                          : 1u << KH_HEADING_EAST | 1u << KH_HEADING_WEST;
  return kh_joints_get_arms (plan, point_on (run, place)) & across;
}

static gboolean is_pair (unsigned arms) { return (arms & (arms - 1)) != 0; }

/* What a line is at each of its points but for who wins where two meet. */
static void read_line (const KhPlan *plan, KhBreakLine *line)
{
  int n = line->run.to - line->run.from;
  for (int place = 0; place <= n; place++)
    {
      unsigned across = arms_across (plan, line->run, place);
      gboolean at_end = place == 0 || place == n;
      KhBreakSpot spot = KH_BREAK_PLAIN;
      if (at_end)
        spot = is_pair (across) ? KH_BREAK_STEM : across ? KH_BREAK_CORNER : KH_BREAK_FREE;
      else if (across)
        spot = is_pair (across) ? KH_BREAK_CROSS : KH_BREAK_BAR;
      line->spots[place] = (guint8)spot;
      line->forced[place] = !at_end && is_loose_end (plan, line->run, line->run.from + place);
    }
}

/* A corner or a cross joins one line along x with one along y: finds both by
 * the lattice point, of which each line leaves its number in 'owner'. */
static void find_meetings (const KhPlan *plan, KhBreaks *breaks)
{
  g_autofree int *line_x = g_new (int, kh_lattice_n_points (&plan->lattice));
  for (int i = 0; i < breaks->n_lines; i++)
    {
      KhBreakLine *line = &breaks->lines[i];
      for (int place = 0; place <= line->run.to - line->run.from; place++)
        {
          int point = kh_lattice_point_index (&plan->lattice, point_on (line->run, place));
          if (line->spots[place] != KH_BREAK_CORNER && line->spots[place] != KH_BREAK_CROSS)
            continue;
          if (line->run.axis == KH_AXIS_X) /* these come first in file order */
            {
              line_x[point] = i;
              continue;
            }
          KhBreakMeeting meeting = { .is_cross = line->spots[place] == KH_BREAK_CROSS, .line = { line_x[point], i } };
          KhBreakLine *other = &breaks->lines[line_x[point]];
          int along = line->run.line - other->run.from;
          line->meetings[place] = other->meetings[along] = (int)breaks->meetings->len;
          g_array_append_val (breaks->meetings, meeting);
        }
    }
}

static KhBreaks *read_breaks (const KhPlan *plan)
{
  g_autoptr (GArray) runs = kh_plan_dup_runs (plan, plan->walled);
  KhBreaks *breaks = kh_breaks_new (runs);
  breaks->pitch_nm = plan->lattice.pitch_nm;
  breaks->half_nm = plan->walls.thickness_nm / 2;
  breaks->longest_nm = plan->build.longest_panel_nm;
  breaks->free_end = plan->build.ends == KH_ENDS_FULL ? 1 : 0;
  for (int i = 0; i < breaks->n_lines; i++)
    read_line (plan, &breaks->lines[i]);
  find_meetings (plan, breaks);
  return breaks;
}

static gboolean refuse_length (const KhBreaks *breaks, const KhPanel *panel, GError **error)
{
  g_autofree char *label = kh_run_dup_label (panel->run);
  g_autofree char *length = kh_length_dup_text (panel->length_nm, KH_LENGTH_UNIT_MM, TRUE);
  g_autofree char *longest = kh_length_dup_text (breaks->longest_nm, KH_LENGTH_UNIT_MM, TRUE);
  g_set_error (error, KH_PANELS_ERROR, KH_PANELS_ERROR_LENGTH,
               /* TRANSLATORS: a panel's label, its length, the limit */
               _ ("Panel %s would be %s long, over the longest panel of %s, and no joint can make it shorter. "
                  "Allow longer panels or make the pitch smaller."),
               label, length, longest);
  return FALSE;
}

gboolean kh_joints_lay_butt (const KhPlan *plan, GArray *panels, GError **error)
{
  g_autoptr (KhBreaks) breaks = read_breaks (plan);
  kh_breaks_choose (breaks);
  guint first = panels->len;
  for (int i = 0; i < breaks->n_lines; i++)
    {
      const KhBreakLine *line = &breaks->lines[i];
      for (guint k = 0; k < line->pieces->len; k++)
        {
          const KhBreakPiece *piece = &g_array_index (line->pieces, KhBreakPiece, k);
          KhPanel panel = { .run = line->run,
                            .ends = { piece->ends[0], piece->ends[1] },
                            .length_nm = kh_breaks_piece_length_nm (breaks, piece) };
          panel.run.from = line->run.from + piece->from;
          panel.run.to = line->run.from + piece->to;
          if (panel.length_nm > breaks->longest_nm)
            {
              g_array_set_size (panels, first);
              return refuse_length (breaks, &panel, error);
            }
          g_array_append_val (panels, panel);
        }
    }
  return TRUE;
}
