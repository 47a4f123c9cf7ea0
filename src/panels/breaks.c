/* SPDX-License-Identifier: MIT */
#include "panels/breaks.h"

#define TOO_LONG (G_GINT64_CONSTANT (1) << 40) /* outweighs any count of pieces */

KhBreaks *kh_breaks_new (const GArray *runs)
{
  KhBreaks *breaks = g_new0 (KhBreaks, 1);
  breaks->n_lines = (int)runs->len;
  breaks->lines = g_new0 (KhBreakLine, runs->len);
  breaks->meetings = g_array_new (FALSE, FALSE, sizeof (KhBreakMeeting));
  for (int i = 0; i < breaks->n_lines; i++)
    {
      KhBreakLine *line = &breaks->lines[i];
      line->run = g_array_index (runs, KhRun, i);
      int n = line->run.to - line->run.from + 1;
      line->spots = g_new0 (guint8, n);
      line->forced = g_new0 (guint8, n);
      line->meetings = g_new (int, n);
      for (int place = 0; place < n; place++)
        {
          line->spots[place] = KH_BREAK_PLAIN;
          line->meetings[place] = -1;
        }
      line->pieces = g_array_new (FALSE, FALSE, sizeof (KhBreakPiece));
    }
  return breaks;
}

void kh_breaks_free (KhBreaks *breaks)
{
  for (int i = 0; i < breaks->n_lines; i++)
    {
      g_free (breaks->lines[i].spots);
      g_free (breaks->lines[i].forced);
      g_free (breaks->lines[i].meetings);
      g_array_unref (breaks->lines[i].pieces);
    }
  g_free (breaks->lines);
  g_array_unref (breaks->meetings);
  g_free (breaks);
}

int64_t kh_breaks_piece_length_nm (const KhBreaks *breaks, const KhBreakPiece *piece)
{
  return (piece->to - piece->from) * breaks->pitch_nm + (piece->ends[0] + piece->ends[1]) * breaks->half_nm;
}

gboolean kh_breaks_is_lost (const KhBreaks *breaks, int line, int place)
{
  int meeting = breaks->lines[line].meetings[place];
  if (meeting < 0)
    return FALSE;
  const KhBreakMeeting *m = &g_array_index (breaks->meetings, KhBreakMeeting, meeting);
  return m->loser == KH_BREAK_BOTH || (m->loser < 2 && m->line[m->loser] == line);
}

int kh_breaks_get_end (const KhBreaks *breaks, int line, int place)
{
  switch ((KhBreakSpot)breaks->lines[line].spots[place])
    {
    case KH_BREAK_FREE:
      return breaks->free_end;
    case KH_BREAK_CORNER:
      return kh_breaks_is_lost (breaks, line, place) ? -1 : 1;
    case KH_BREAK_STEM:
      return -1;
    case KH_BREAK_CROSS:
      return kh_breaks_is_lost (breaks, line, place) ? -1 : 0;
    default:
      return 0;
    }
}

/* Pieces of a stretch of n walls between two joints, splices (0) within.  The
 * first and the last piece take what their ends leave, those between take
 * floor (limit / pitch) each; no choice can do better, for a splice further on
 * never leaves more. */
int64_t kh_breaks_count_stretch (const KhBreaks *breaks, int n, const int ends[2])
{
  int end0 = ends[0], end1 = ends[1];
  int64_t limit = breaks->longest_nm, pitch = breaks->pitch_nm;
  if (n * pitch + (end0 + end1) * breaks->half_nm <= limit)
    return 1;
  int64_t first = (limit - end0 * breaks->half_nm) / pitch, last = (limit - end1 * breaks->half_nm) / pitch;
  if (n < 2 || first < 1 || last < 1)
    return TOO_LONG;
  if (n <= first + last)
    return 2;
  int64_t between = limit / pitch, rest = n - first - last;
  return between < 1 ? TOO_LONG : 2 + (rest + between - 1) / between;
}

/* A joint that nothing can take away: the line's ends, forced ones, lost crosses. */
static gboolean is_joint (const KhBreaks *breaks, int index, int place)
{
  const KhBreakLine *line = &breaks->lines[index];
  return place == 0 || place == line->run.to - line->run.from || line->forced[place]
         || (line->spots[place] == KH_BREAK_CROSS && kh_breaks_is_lost (breaks, index, place));
}

static int64_t count_between (const KhBreaks *breaks, int line, int from, int to)
{
  int64_t sum = 0;
  int end = kh_breaks_get_end (breaks, line, from);
  for (int place = from + 1; place <= to; place++)
    {
      if (!is_joint (breaks, line, place))
        continue;
      int next = kh_breaks_get_end (breaks, line, place);
      sum += kh_breaks_count_stretch (breaks, place - from, (int[2]){ end, next });
      from = place;
      end = next;
    }
  return sum;
}

int64_t kh_breaks_count_pieces (const KhBreaks *breaks, int line)
{
  return count_between (breaks, line, 0, breaks->lines[line].run.to - breaks->lines[line].run.from);
}

int64_t kh_breaks_count_around (const KhBreaks *breaks, int line, int place)
{
  int n = breaks->lines[line].run.to - breaks->lines[line].run.from, from = MAX (place - 1, 0), to = MIN (place + 1, n);
  while (!is_joint (breaks, line, from))
    from--;
  while (!is_joint (breaks, line, to))
    to++;
  return count_between (breaks, line, from, to);
}

/* What the flipping of chains counts: how often each length occurs. */
static void tally_line (const KhBreaks *breaks, const GArray *pieces, int step, GHashTable *tally)
{
  for (guint i = 0; i < pieces->len; i++)
    {
      int64_t length = kh_breaks_piece_length_nm (breaks, &g_array_index (pieces, KhBreakPiece, i));
      int *count = g_hash_table_lookup (tally, &length);
      if (!count)
        {
          count = g_new0 (int, 1);
          g_hash_table_insert (tally, g_memdup2 (&length, sizeof length), count);
        }
      *count += step;
      if (*count == 0)
        g_hash_table_remove (tally, &length);
    }
}

/* The lines of a chain, each once, with what flipping needs. */
typedef struct
{
  GArray *meetings; /* of int */
  GArray *lines;    /* of int */
} Chain;

static void chain_clear (gpointer data)
{
  g_array_unref (((Chain *)data)->meetings);
  g_array_unref (((Chain *)data)->lines);
}

static GArray *gather_chains (const KhBreaks *breaks)
{
  GArray *chains = g_array_new (FALSE, FALSE, sizeof (Chain));
  g_array_set_clear_func (chains, chain_clear);
  for (int i = 0; i < breaks->n_chains; i++)
    {
      Chain chain = { g_array_new (FALSE, FALSE, sizeof (int)), g_array_new (FALSE, FALSE, sizeof (int)) };
      g_array_append_val (chains, chain);
    }
  g_autofree int *last = g_new (int, breaks->n_lines);
  for (int i = 0; i < breaks->n_lines; i++)
    last[i] = -1; /* an end line of two chains cannot be: each of its corners joins one chain */
  for (int i = 0; i < (int)breaks->meetings->len; i++)
    {
      const KhBreakMeeting *m = &g_array_index (breaks->meetings, KhBreakMeeting, i);
      if (m->is_cross || m->chain < 0)
        continue;
      Chain *chain = &g_array_index (chains, Chain, m->chain);
      g_array_append_val (chain->meetings, i);
      for (int side = 0; side < 2; side++)
        if (last[m->line[side]] != m->chain)
          {
            last[m->line[side]] = m->chain;
            g_array_append_val (chain->lines, m->line[side]);
          }
    }
  return chains;
}

static void flip (KhBreaks *breaks, const Chain *chain)
{
  for (guint i = 0; i < chain->meetings->len; i++)
    {
      KhBreakMeeting *m = &g_array_index (breaks->meetings, KhBreakMeeting, g_array_index (chain->meetings, int, i));
      m->loser = 1 - m->loser;
      m->wished = 1 - m->wished;
    }
}

static int64_t count_chain (const KhBreaks *breaks, const Chain *chain)
{
  int64_t sum = 0;
  for (guint i = 0; i < chain->lines->len; i++)
    sum += kh_breaks_count_pieces (breaks, g_array_index (chain->lines, int, i));
  return sum;
}

static void splice_chain (KhBreaks *breaks, const Chain *chain, GHashTable *tally)
{
  for (guint i = 0; i < chain->lines->len; i++)
    {
      int line = g_array_index (chain->lines, int, i);
      tally_line (breaks, breaks->lines[line].pieces, -1, tally);
      g_array_set_size (breaks->lines[line].pieces, 0);
      kh_breaks_splice_line (breaks, line, breaks->lines[line].pieces);
      tally_line (breaks, breaks->lines[line].pieces, 1, tally);
    }
}

/* TRUE when turned round: no more panels and fewer different lengths. */
static gboolean try_flip (KhBreaks *breaks, const Chain *chain, GHashTable *tally)
{
  for (guint i = 0; i < chain->meetings->len; i++)
    {
      int meeting = g_array_index (chain->meetings, int, i);
      const KhBreakMeeting *m = &g_array_index (breaks->meetings, KhBreakMeeting, meeting);
      if (m->loser != m->wished)
        return FALSE; /* the limit decided here */
    }
  int64_t before = count_chain (breaks, chain);
  guint lengths = g_hash_table_size (tally);
  flip (breaks, chain);
  if (count_chain (breaks, chain) <= before)
    {
      splice_chain (breaks, chain, tally);
      if (g_hash_table_size (tally) < lengths)
        return TRUE;
      flip (breaks, chain);
      splice_chain (breaks, chain, tally);
      return FALSE;
    }
  flip (breaks, chain);
  return FALSE;
}

void kh_breaks_choose (KhBreaks *breaks)
{
  kh_breaks_choose_losers (breaks);
  g_autoptr (GHashTable) tally = g_hash_table_new_full (g_int64_hash, g_int64_equal, g_free, g_free);
  for (int i = 0; i < breaks->n_lines; i++)
    {
      g_array_set_size (breaks->lines[i].pieces, 0);
      kh_breaks_splice_line (breaks, i, breaks->lines[i].pieces);
      tally_line (breaks, breaks->lines[i].pieces, 1, tally);
    }
  g_autoptr (GArray) chains = gather_chains (breaks);
  gboolean better = TRUE;
  for (int pass = 0; pass < 3 && better; pass++)
    {
      better = FALSE;
      for (guint i = 0; i < chains->len; i++)
        better |= try_flip (breaks, &g_array_index (chains, Chain, i), tally);
    }
}
