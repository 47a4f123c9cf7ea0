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

typedef enum
{
  OPEN,
  DECIDED
} State;

typedef struct
{
  KhBreaks *breaks;
  guint8 *state;  /* a meeting each */
  int64_t *score; /* a line each, its open meetings taken as lost */
  GArray *group;  /* of int: meetings */
  int64_t sum, best, least;
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
  for (guint i = 0; i < breaks->meetings->len; i++)
    meeting_at (breaks, (int)i)->loser = meeting_at (breaks, (int)i)->wished;
}

/* Score with the losers as they are but for the open meetings: 'open_lost' says how those stand. */
static int64_t get_score (Search *search, int line, gboolean open_lost)
{
  KhBreaks *breaks = search->breaks;
  const KhBreakLine *l = &breaks->lines[line];
  int n = n_walls (breaks, line), lost = 0;
  g_autofree guint8 *kept = g_new (guint8, n + 1);
  for (int place = 0; place <= n; place++)
    if (l->meetings[place] >= 0)
      {
        KhBreakMeeting *m = meeting_at (breaks, l->meetings[place]);
        int side = m->line[0] == line ? 0 : 1;
        kept[place] = (guint8)m->loser;
        if (search->state[l->meetings[place]] == OPEN)
          m->loser = open_lost ? side : 1 - side;
        lost += m->is_cross && m->loser == side;
      }
  int64_t score = kh_breaks_count_pieces (breaks, line) - lost;
  for (int place = 0; place <= n; place++)
    if (l->meetings[place] >= 0)
      meeting_at (breaks, l->meetings[place])->loser = kept[place];
  return score;
}

/* Decides meeting 'i' for 'loser': the other side's score may rise. */
static void decide (Search *search, int i, int loser)
{
  KhBreakMeeting *m = meeting_at (search->breaks, i);
  int winner = m->line[1 - loser];
  m->loser = loser;
  search->state[i] = DECIDED;
  search->sum -= search->score[winner];
  search->score[winner] = get_score (search, winner, TRUE);
  search->sum += search->score[winner];
}

static void undo (Search *search, int i, int winner, int64_t score)
{
  search->state[i] = OPEN;
  search->sum += score - search->score[winner];
  search->score[winner] = score;
}

/* Which side loses with the lower sum; the wish where both are alike. */
static int better_loser (Search *search, int i)
{
  const KhBreakMeeting *m = meeting_at (search->breaks, i);
  int64_t rise[2];
  for (int loser = 0; loser < 2; loser++)
    {
      int winner = m->line[1 - loser];
      int64_t before = search->score[winner];
      decide (search, i, loser);
      rise[loser] = search->score[winner] - before;
      undo (search, i, winner, before);
    }
  return rise[0] == rise[1] ? m->wished : rise[0] < rise[1] ? 0 : 1;
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
      int loser = k == 0 ? first : 1 - first, winner = meeting_at (search->breaks, i)->line[1 - loser];
      int64_t before = search->score[winner];
      decide (search, i, loser);
      descend (search, depth + 1);
      undo (search, i, winner, before);
    }
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
            if (next < 0 || seen[next] || search->state[next] != OPEN)
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
      KhBreakMeeting *m = meeting_at (breaks, g_array_index (others, int, k));
      int64_t before = get_score (search, m->line[0], TRUE) + get_score (search, m->line[1], TRUE);
      m->loser = m->wished;
      if (get_score (search, m->line[0], TRUE) + get_score (search, m->line[1], TRUE) > before)
        m->loser = 1 - m->wished;
    }
}

void kh_breaks_choose_losers (KhBreaks *breaks)
{
  set_wishes (breaks);
  guint n = breaks->meetings->len;
  g_autofree guint8 *state = g_new0 (guint8, n), *seen = g_new0 (guint8, n), *cares = g_new0 (guint8, breaks->n_lines);
  g_autofree int64_t *score = g_new0 (int64_t, breaks->n_lines);
  g_autoptr (GArray) group = g_array_new (FALSE, FALSE, sizeof (int));
  Search search = { .breaks = breaks, .state = state, .score = score, .group = group };
  for (int i = 0; i < breaks->n_lines; i++)
    {
      score[i] = get_score (&search, i, TRUE);
      cares[i] = score[i] != get_score (&search, i, FALSE);
      search.sum += score[i];
    }
  for (int i = 0; i < (int)n; i++)
    {
      const KhBreakMeeting *m = meeting_at (breaks, i);
      gboolean x = cares[m->line[0]], y = cares[m->line[1]];
      if (!x || !y)
        decide (&search, i, x == y ? m->wished : x ? 0 : 1);
    }
  for (int i = 0; i < (int)n; i++)
    if (state[i] == OPEN && !seen[i])
      {
        gather_group (&search, i, seen);
        search_group (&search);
      }
  return_to_wishes (&search);
}
