/* SPDX-License-Identifier: MIT */
#include "panels/breaks.h"

/* Where a stretch of a line is spliced: for its fewest pieces, first the fewest
 * faults (splices where nothing meets, stubs under two thirds of an even
 * share), then the least sum of the squared numbers of walls, then shorter ones at
 * the ends, so that the odd ones in between are whole pitches.  Dynamic
 * programming over pieces and places; a piece's last place is known to within
 * the slack of the whole, which keeps it small. */

typedef struct
{
  int64_t faults, squares, outer;
  int before; /* where the last piece begins; -1: cannot be */
} Cell;

typedef struct
{
  const KhBreaks *breaks;
  const KhBreakLine *line;
  int from, n; /* places on the line */
  int ends[2];
  int n_pieces;
} Stretch;

static KhBreakPiece make_piece (const Stretch *s, int from, int to)
{
  return (KhBreakPiece){ s->from + from, s->from + to, { from == 0 ? s->ends[0] : 0, to == s->n ? s->ends[1] : 0 } };
}

static gboolean fits (const Stretch *s, int from, int to)
{
  KhBreakPiece piece = make_piece (s, from, to);
  return kh_breaks_piece_length_nm (s->breaks, &piece) <= s->breaks->longest_nm;
}

static gboolean is_held (const Stretch *s, int place)
{
  guint8 spot = s->line->spots[s->from + place];
  return spot == KH_BREAK_BAR || spot == KH_BREAK_CROSS;
}

static gboolean is_better (const Cell *a, const Cell *b)
{
  if (b->before < 0 || a->faults != b->faults)
    return b->before < 0 || a->faults < b->faults;
  return a->squares != b->squares ? a->squares < b->squares : a->outer < b->outer;
}

/* The best last piece that ends at 'to' as number 'k' (0-based). */
static Cell find_piece (const Stretch *s, const Cell *row, int k, int to)
{
  Cell best = { .before = -1 };
  for (int from = to - 1; from >= k && fits (s, from, to); from--)
    {
      if (k == 0 ? from > 0 : row[from].before < 0)
        continue;
      int64_t walls = to - from;
      Cell cell = k == 0 ? (Cell){ 0 } : row[from];
      cell.before = from;
      cell.outer += k == 0 || to == s->n ? walls : 0;
      cell.squares += walls * walls;
      cell.faults += walls * s->n_pieces * 3 < (int64_t)s->n * 2;
      cell.faults += to < s->n && !is_held (s, to);
      if (is_better (&cell, &best))
        best = cell;
    }
  return best;
}

static void append_piece (const Stretch *s, int from, int to, GArray *pieces)
{
  KhBreakPiece piece = make_piece (s, from, to);
  g_array_append_val (pieces, piece);
}

static void splice_stretch (Stretch *s, GArray *pieces)
{
  int n = s->n;
  int64_t n_pieces = kh_breaks_count_stretch (s->breaks, n, s->ends);
  if (n_pieces > n) /* a single wall is too long: told by who asked */
    {
      for (int from = 0; from < n; from++)
        append_piece (s, from, from + 1, pieces);
      return;
    }
  s->n_pieces = (int)n_pieces;
  g_autoptr (GPtrArray) rows = g_ptr_array_new_with_free_func (g_free);
  for (int k = 0; k < s->n_pieces; k++)
    {
      Cell *row = g_new (Cell, n + 1);
      for (int to = 0; to <= n; to++)
        row[to] = find_piece (s, k == 0 ? NULL : g_ptr_array_index (rows, k - 1), k, to);
      g_ptr_array_add (rows, row);
    }
  guint first = pieces->len;
  g_array_set_size (pieces, first + rows->len);
  for (int k = s->n_pieces - 1, to = n; k >= 0; k--)
    {
      int from = ((Cell *)g_ptr_array_index (rows, k))[to].before;
      g_assert (from >= 0);
      g_array_index (pieces, KhBreakPiece, first + (guint)k) = make_piece (s, from, to);
      to = from;
    }
}

void kh_breaks_splice_line (const KhBreaks *breaks, int index, GArray *pieces)
{
  const KhBreakLine *line = &breaks->lines[index];
  int n = line->run.to - line->run.from;
  Stretch stretch = { .breaks = breaks, .line = line };
  stretch.ends[0] = kh_breaks_get_end (breaks, index, 0);
  for (int place = 1; place <= n; place++)
    {
      gboolean broken = line->spots[place] == KH_BREAK_CROSS && kh_breaks_get_end (breaks, index, place) < 0;
      if (place < n && !line->forced[place] && !broken)
        continue;
      stretch.ends[1] = kh_breaks_get_end (breaks, index, place);
      stretch.n = place - stretch.from;
      splice_stretch (&stretch, pieces);
      stretch.from = place;
      stretch.ends[0] = stretch.ends[1];
    }
}
