/* SPDX-License-Identifier: MIT */
#pragma once
#include "panels/saw.h"

/* Inside the saw plan: an order boiled down to whole numbers.  With the kerf
 * added to every piece and once to every strip, pieces fit a strip when their
 * widths add up to no more than its capacity. */

typedef struct
{
  int64_t length;   /* nm */
  int64_t width;    /* length + kerf */
  int demand;       /* over 0 */
} KhSawItem;

typedef struct
{
  int stock;        /* index into the order */
  int64_t capacity; /* usable length + kerf */
  int64_t price;    /* of one bought piece, thousandths */
  int n_strips;     /* in one bought piece */
  int limit;        /* bought pieces at most; never more than there are pieces to cut */
  int pool;         /* 0, or number of those that share a limit */
} KhSawKind;

typedef struct
{
  int n_items;
  KhSawItem *items; /* longest first, lengths differ; none longer than every strip */
  int n_kinds;
  KhSawKind *kinds; /* those that can be bought and can take a piece */
  int64_t price_step; /* every cost is a multiple; at least 1 */
} KhSawProblem;

/* Tells pieces that are longer than every strip (or have no stock) in
 * 'cannot_cut' (of KhCannotCut) and leaves them out. */
KhSawProblem *kh_saw_problem_new (const KhSawOrder *order, GArray *cannot_cut);
void kh_saw_problem_free (KhSawProblem *problem);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhSawProblem, kh_saw_problem_free)
/* The same without its n longest pieces. */
KhSawProblem *kh_saw_problem_new_without (const KhSawProblem *problem, int n);
int kh_saw_problem_n_pieces (const KhSawProblem *problem);

/* One way to cut a strip, so many times. */
typedef struct
{
  int kind, times;
  int take[]; /* an item each */
} KhSawWay;

KhSawWay *kh_saw_way_new (const KhSawProblem *problem, int kind, int times); /* takes nothing; g_free */

/* A plan in the making. */
typedef struct
{
  GPtrArray *ways; /* of KhSawWay */
  int64_t cost;
} KhSawDraft;

KhSawDraft *kh_saw_draft_new (void);
KhSawDraft *kh_saw_draft_copy (const KhSawDraft *draft, const KhSawProblem *problem);
void kh_saw_draft_free (KhSawDraft *draft);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhSawDraft, kh_saw_draft_free)
void kh_saw_draft_merge (KhSawDraft *draft, const KhSawProblem *problem); /* ways that cut alike become one */
int kh_saw_draft_get_strips (const KhSawDraft *draft, int kind);
int kh_saw_draft_get_bought (const KhSawDraft *draft, const KhSawProblem *problem, int kind);
int64_t kh_saw_draft_get_cost (const KhSawDraft *draft, const KhSawProblem *problem);

typedef struct
{
  KhSawDraft *draft;      /* of the problem, or of what is left of it; owned by who asked */
  int n_short;            /* pieces for which there is too little stock, longest first */
  int64_t bound;          /* no plan costs less */
  gboolean ended_by_limit;
} KhSawOutcome;

/* The n_short longest pieces, as rows of 'cannot_cut'. */
void kh_saw_problem_tell_short (const KhSawProblem *problem, const KhSawOutcome *outcome, GArray *cannot_cut);
