/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/lattice.h"

/* Inside panels: lines of wall, where they meet, and where they are broken.
 * joints.h has the rules; this is what they work on. */

/* What a line of n walls is at place 0 to n, counted from its low end. */
typedef enum
{
  KH_BREAK_FREE,   /* ends: nothing else there */
  KH_BREAK_CORNER, /* ends: so does one line across */
  KH_BREAK_STEM,   /* ends against a line that passes */
  KH_BREAK_PLAIN,  /* passes: nothing else there */
  KH_BREAK_BAR,    /* passes: another line ends against it */
  KH_BREAK_CROSS   /* passes: so does another */
} KhBreakSpot;

typedef struct
{
  int from, to; /* places on the line */
  int ends[2];  /* half thicknesses added: -1, 0, +1 */
} KhBreakPiece;

typedef struct
{
  KhRun run;
  guint8 *spots;  /* KhBreakSpot, a place each */
  guint8 *forced; /* 1: a joint must be here */
  int *meetings;  /* index into KhBreaks.meetings; -1 = none; a place each */
  GArray *pieces; /* of KhBreakPiece: the answer */
} KhBreakLine;

/* A corner or a cross: one line loses (does not own, or is broken there). */
#define KH_BREAK_BOTH 2    /* while choosing: both lose */
#define KH_BREAK_NEITHER 3 /* while choosing: none does */
typedef struct
{
  gboolean is_cross;
  int line[2];  /* along x, along y */
  int loser;    /* 0 or 1 */
  int wished;   /* who should lose where panels do not matter */
  int chain;    /* corners: number of the chain; -1 = a closed ring */
} KhBreakMeeting;

typedef struct
{
  int64_t pitch_nm, half_nm, longest_nm;
  int free_end; /* +1 or 0 */
  int n_lines;
  KhBreakLine *lines; /* file order: along x first */
  GArray *meetings;   /* of KhBreakMeeting */
  int n_chains;
} KhBreaks;

KhBreaks *kh_breaks_new (const GArray *runs); /* of KhRun; all spots plain, no meeting */
void kh_breaks_free (KhBreaks *breaks);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhBreaks, kh_breaks_free)

/* Sets every loser and all pieces.  A piece over the limit stays only where a
 * single wall is longer whatever is done. */
void kh_breaks_choose (KhBreaks *breaks);

int64_t kh_breaks_piece_length_nm (const KhBreaks *breaks, const KhBreakPiece *piece);

/* Fewest pieces of a line with the losers as they are, and a large sum for
 * each stretch that cannot be made short enough. */
int64_t kh_breaks_count_pieces (const KhBreaks *breaks, int line);

/* The same between the joints on both sides of a place where two lines meet:
 * what changes when the loser there does. */
int64_t kh_breaks_count_around (const KhBreaks *breaks, int line, int place);
gboolean kh_breaks_is_lost (const KhBreaks *breaks, int line, int place);

/* The same for a stretch of n walls between two joints with nothing but splices
 * within: more than n where it cannot be. */
int64_t kh_breaks_count_stretch (const KhBreaks *breaks, int n, const int ends[2]);

/* Half thicknesses added at an end place of the line. */
int kh_breaks_get_end (const KhBreaks *breaks, int line, int place);

/* Its two halves: losers for the fewest pieces (breaks_fewest.c); pieces of one line (breaks_splice.c). */
void kh_breaks_choose_losers (KhBreaks *breaks);
void kh_breaks_splice_line (const KhBreaks *breaks, int line, GArray *pieces);
