/* SPDX-License-Identifier: MIT */
#include "panels/breaks.h"

/* Who loses at each corner and cross.
 *
 * Fewest panels.  A line's score is its pieces less the crosses at which it is
 * broken; every cross breaks one of its two lines, so that all panels together
 * are the crosses plus the sum of the scores.  Losing one meeting more never
 * raises a line's score.  So a line whose score is the same whether it loses all
 * its meetings or none does not care, a meeting with one line that cares goes to
 * that one, and only meetings between two lines that both care have to be
 * searched: depth first, each connected group by itself, with the sum of the
 * scores when all open meetings are lost by both sides as the bound.  In mazes as
 * they are built such groups hardly occur; the search is exact up to
 * NODES_MOST nodes a group, beyond them the best so far stands. */

#define NODES_MOST 20000
#define GROUP_MOST 400 /* meetings; larger groups take the first descent */

typedef struct
{
  KhBreaks *breaks;
  GArray *group;       /* of int: meetings, all lost by both at first */
  int64_t sum;         /* of the scores of all lines */
  int64_t best, least; /* sums: found, and not to be beaten */
  guint8 *best_losers; /* a meeting of the group each */
  int n_nodes;
} Search;

static KhBreakMeeting *meeting_at (const KhBreaks *breaks, int i)
{
  return &g_array_index (breaks->meetings, KhBreakMeeting, i);
}

static int n_walls (const KhBreaks *breaks, int line)
{
  return breaks->lines[line].run.to - breaks->lines[line].run.from;
}

/* The other end place of a line that is a corner, or -1. */
static int other_corner (const KhBreaks *breaks, int line, int meeting)
{
  const KhBreakLine *l = &breaks->lines[line];
  int n = n_walls (breaks, line);
  int place = l->meetings[0] == meeting && l->spots[0] == KH_BREAK_CORNER ? n : 0;
  return l->spots[place] == KH_BREAK_CORNER ? l->meetings[place] : -1;
}

static void trace_chain (KhBreaks *breaks, int line, int meeting)
{
  int chain = breaks->n_chains++;
  while (meeting >= 0)
    {
      KhBreakMeeting *m = meeting_at (breaks, meeting);
      int side = m->line[0] == line ? 0 : 1;
      m->chain = chain;
      m->wished = side; /* the one that comes later owns */
      line = m->line[1 - side];
      meeting = other_corner (breaks, line, meeting);
    }
}

/* The losers where the number of panels does not matter. */
static void set_wishes (KhBreaks *breaks)
{
  for (guint i = 0; i < breaks->meetings->len; i++)
    {
      KhBreakMeeting *m = meeting_at (breaks, (int)i);
      m->chain = -1;
      m->wished = m->is_cross && n_walls (breaks, m->line[0]) < n_walls (breaks, m->line[1]) ? 0 : 1;
    }
  breaks->n_chains = 0;
  for (int i = 0; i < breaks->n_lines; i++)
    {
      const KhBreakLine *line = &breaks->lines[i];
      gboolean low = line->spots[0] == KH_BREAK_CORNER, high = line->spots[n_walls (breaks, i)] == KH_BREAK_CORNER;
      if (low == high)
        continue;
      int meeting = line->meetings[low ? 0 : n_walls (breaks, i)];
      if (meeting_at (breaks, meeting)->chain < 0)
        trace_chain (breaks, i, meeting);
    }
}

static int get_place (const KhBreaks *breaks, const KhBreakMeeting *m, int side)
{
  return breaks->lines[m->line[1 - side]].run.line - breaks->lines[m->line[side]].run.from;
}

static int64_t get_score (const KhBreaks *breaks, int line)
{
  int64_t score = kh_breaks_count_pieces (breaks, line);
  for (int place = 0; place <= n_walls (breaks, line); place++)
    score -= breaks->lines[line].spots[place] == KH_BREAK_CROSS && kh_breaks_is_lost (breaks, line, place);
  return score;
}

/* The part of both lines' scores that hangs on this meeting. */
static int64_t get_share (const KhBreaks *breaks, const KhBreakMeeting *m)
{
  int64_t share = 0;
  for (int side = 0; side < 2; side++)
    {
      int place = get_place (breaks, m, side);
      share += kh_breaks_count_around (breaks, m->line[side], place);
      share -= m->is_cross && kh_breaks_is_lost (breaks, m->line[side], place);
    }
  return share;
}

/* Gives meeting 'i' to 'loser' and returns by how much the sum has risen. */
static int64_t decide (Search *search, int i, int loser)
{
  KhBreakMeeting *m = meeting_at (search->breaks, i);
  int64_t before = get_share (search->breaks, m);
  m->loser = loser;
  int64_t rise = get_share (search->breaks, m) - before;
  search->sum += rise;
  return rise;
}

/* Which side loses with the lower sum; the wish where both are alike. */
static int better_loser (Search *search, int i)
{
  int64_t rise[2];
  for (int loser = 0; loser < 2; loser++)
    {
      rise[loser] = decide (search, i, loser);
      decide (search, i, KH_BREAK_BOTH);
    }
  return rise[0] == rise[1] ? meeting_at (search->breaks, i)->wished : rise[0] < rise[1] ? 0 : 1;
}

static void keep_best (Search *search)
{
  if (search->sum >= search->best)
    return;
  search->best = search->sum;
  for (guint i = 0; i < search->group->len; i++)
    search->best_losers[i] = (guint8)meeting_at (search->breaks, g_array_index (search->group, int, i))->loser;
}

static void descend (Search *search, guint depth)
{
  if (search->sum >= search->best || search->best == search->least || ++search->n_nodes > NODES_MOST)
    return;
  if (depth == search->group->len)
    {
      keep_best (search);
      return;
    }
  int i = g_array_index (search->group, int, depth), first = better_loser (search, i);
  for (int k = 0; k < 2; k++)
    {
      decide (search, i, k == 0 ? first : 1 - first);
      descend (search, depth + 1);
      decide (search, i, KH_BREAK_BOTH);
    }
}

/* Every second meeting of each line, as on a chessboard: for full grids. */
static gboolean try_chessboard (Search *search)
{
  KhBreaks *breaks = search->breaks;
  for (guint k = 0; k < search->group->len; k++)
    {
      const KhBreakMeeting *m = meeting_at (breaks, g_array_index (search->group, int, k));
      int parity = (breaks->lines[m->line[0]].run.line + breaks->lines[m->line[1]].run.line) % 2;
      decide (search, g_array_index (search->group, int, k), parity);
    }
  if (search->sum == search->least)
    return TRUE;
  for (guint k = 0; k < search->group->len; k++)
    decide (search, g_array_index (search->group, int, k), KH_BREAK_BOTH);
  return FALSE;
}

static void search_group (Search *search)
{
  guint n = search->group->len;
  g_autofree guint8 *losers = g_new0 (guint8, n);
  search->best_losers = losers;
  search->best = G_MAXINT64;
  search->least = search->sum;
  search->n_nodes = 0;
  if (n <= GROUP_MOST)
    descend (search, 0);
  else if (try_chessboard (search))
    return;
  for (guint k = 0; k < n; k++)
    {
      int i = g_array_index (search->group, int, k);
      decide (search, i, search->best < G_MAXINT64 ? losers[k] : better_loser (search, i));
    }
}

/* Open meetings that hang together, found by walking from line to line. */
static void gather_group (Search *search, int first, guint8 *seen)
{
  const KhBreaks *breaks = search->breaks;
  g_array_set_size (search->group, 0);
  g_array_append_val (search->group, first);
  seen[first] = 1;
  for (guint k = 0; k < search->group->len; k++)
    {
      const KhBreakMeeting *m = meeting_at (breaks, g_array_index (search->group, int, k));
      for (int side = 0; side < 2; side++)
        for (int place = 0; place <= n_walls (breaks, m->line[side]); place++)
          {
            int next = breaks->lines[m->line[side]].meetings[place];
            if (next < 0 || seen[next] || meeting_at (breaks, next)->loser != KH_BREAK_BOTH)
              continue;
            seen[next] = 1;
            g_array_append_val (search->group, next);
          }
    }
}

/* Back to the wish wherever no panel is lost by it; outer places of a line
 * first, so that a break that is needed stays near the middle. */
static int compare_outer (gconstpointer a, gconstpointer b, gpointer data)
{
  const KhBreaks *breaks = data;
  int far[2];
  for (int k = 0; k < 2; k++)
    {
      const KhBreakMeeting *m = meeting_at (breaks, *(const int *)(k == 0 ? a : b));
      const KhRun *x = &breaks->lines[m->line[0]].run, *y = &breaks->lines[m->line[1]].run;
      int from_x = ABS (2 * y->line - x->from - x->to), from_y = ABS (2 * x->line - y->from - y->to);
      far[k] = m->loser == 0 ? from_x : from_y;
    }
  return far[0] != far[1] ? far[1] - far[0] : *(const int *)a - *(const int *)b;
}

static void return_to_wishes (Search *search)
{
  KhBreaks *breaks = search->breaks;
  g_autoptr (GArray) others = g_array_new (FALSE, FALSE, sizeof (int));
  for (int i = 0; i < (int)breaks->meetings->len; i++)
    if (meeting_at (breaks, i)->loser != meeting_at (breaks, i)->wished)
      g_array_append_val (others, i);
  g_array_sort_with_data (others, compare_outer, breaks);
  for (guint k = 0; k < others->len; k++)
    {
      int i = g_array_index (others, int, k), wished = meeting_at (breaks, i)->wished;
      if (decide (search, i, wished) > 0)
        decide (search, i, 1 - wished);
    }
}

static void set_all (KhBreaks *breaks, int loser, int64_t *scores)
{
  for (guint i = 0; i < breaks->meetings->len; i++)
    meeting_at (breaks, (int)i)->loser = loser;
  for (int i = 0; i < breaks->n_lines; i++)
    scores[i] = get_score (breaks, i);
}

void kh_breaks_choose_losers (KhBreaks *breaks)
{
  set_wishes (breaks);
  int n = (int)breaks->meetings->len;
  g_autofree guint8 *seen = g_new0 (guint8, n + 1);
  g_autofree int64_t *worst = g_new0 (int64_t, breaks->n_lines + 1), *score = g_new0 (int64_t, breaks->n_lines + 1);
  g_autoptr (GArray) group = g_array_new (FALSE, FALSE, sizeof (int));
  Search search = { .breaks = breaks, .group = group };
  set_all (breaks, KH_BREAK_NEITHER, worst);
  set_all (breaks, KH_BREAK_BOTH, score);
  for (int i = 0; i < breaks->n_lines; i++)
    search.sum += score[i];
  for (int i = 0; i < n; i++)
    {
      const KhBreakMeeting *m = meeting_at (breaks, i);
      gboolean x = score[m->line[0]] != worst[m->line[0]], y = score[m->line[1]] != worst[m->line[1]];
      if (!x || !y)
        decide (&search, i, x == y ? m->wished : x ? 0 : 1);
    }
  for (int i = 0; i < n; i++)
    if (meeting_at (breaks, i)->loser == KH_BREAK_BOTH && !seen[i])
      {
        gather_group (&search, i, seen);
        search_group (&search);
      }
  return_to_wishes (&search);
}
