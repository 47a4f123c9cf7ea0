/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include <stdint.h>
#include "base/job.h"
#include "plan/build.h"

/* The saw plan: which pieces come out of which stock.  Knows lengths, counts
 * and stock only, never a maze.  One-dimensional cutting stock with kerf: a
 * pattern fits when sum (length + kerf) <= usable + kerf, usable = length less
 * both end trims. */

typedef struct
{
  char *name;           /* may be NULL */
  int64_t length_nm;
  int64_t price_milli;  /* KH_PRICE_NONE: no price */
  int count;            /* bought pieces at most; KH_COUNT_ANY */
  int n_strips;         /* strips of the needed width in one bought piece; bought whole */
  int pool;             /* 0: 'count' is its own; else stock of the same pool is bought out of one
                         * count, the same in each (a sheet that may be ripped either way) */
} KhSawStock;

typedef struct { int64_t length_nm; int count; } KhSawPiece;

typedef struct
{
  int64_t kerf_nm, end_trim_nm, keep_offcut_nm;
  GArray *stock;  /* of KhSawStock */
  GArray *pieces; /* of KhSawPiece */
} KhSawOrder;

KhSawOrder *kh_saw_order_new (void); /* kerf 3 mm, trim 0, keep 150 mm */
void kh_saw_order_free (KhSawOrder *order);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhSawOrder, kh_saw_order_free)

#define KH_SAW_ERROR (kh_saw_error_quark ())
GQuark kh_saw_error_quark (void);
typedef enum { KH_SAW_ERROR_ORDER, KH_SAW_ERROR_CHECK } KhSawError;
gboolean kh_saw_order_check (const KhSawOrder *order, GError **error); /* names the member at fault */

typedef struct { int64_t length_nm; int count; } KhSawCut;

typedef struct
{
  int stock;        /* index into the order */
  int count;        /* strips cut this way */
  GArray *cuts;     /* of KhSawCut, longest first */
  int64_t left_nm;  /* usable - sum lengths - (n - 1) * kerf */
} KhPattern;

typedef enum
{
  KH_CANNOT_TOO_LONG,         /* by over_nm, for the longest stock there is any of */
  KH_CANNOT_TOO_LITTLE_STOCK, /* the longest pieces, until the rest can be met */
  KH_CANNOT_NO_STOCK          /* the order lists none */
} KhCannotWhy;
typedef struct { int64_t length_nm; int count; KhCannotWhy why; int64_t over_nm; } KhCannotCut;

typedef struct
{
  GArray *patterns;     /* of KhPattern: by stock, long pieces first */
  GArray *n_bought;     /* of int, a stock each */
  int n_pieces_of_stock; /* bought, all stocks */
  /* Cost and its proven least, in thousandths.  Where no stock has a price a bought piece costs 1 (1000). */
  int64_t cost_milli, bound_milli;
  gboolean proven;      /* cost = bound: no plan costs less */
  gboolean ended_by_limit; /* of time or steps: not proven; with cannot_cut: fewer might have to be left out */
  int64_t used_nm;      /* sum of the lengths cut */
  GArray *offcuts_nm;   /* of int64_t: left pieces worth keeping, longest first */
  GArray *cannot_cut;   /* of KhCannotCut; not empty: patterns is empty */
} KhSawPlan;

typedef struct { double seconds; } KhSawSettings; /* limit; 5 */
void kh_saw_settings_init (KhSawSettings *settings);

/* Never NULL for a checked order.  'job' may stop it: the best so far is given. */
KhSawPlan *kh_saw_plan_new (const KhSawOrder *order, const KhSawSettings *settings, KhJob *job);
void kh_saw_plan_free (KhSawPlan *plan);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhSawPlan, kh_saw_plan_free)

/* The judge: recomputes everything from order and plan, shares no code with
 * the search.  FALSE with *error naming what does not hold. */
gboolean kh_saw_check (const KhSawOrder *order, const KhSawPlan *plan, GError **error);
