/* SPDX-License-Identifier: MIT */
#pragma once
#include "layout/findings.h"

/* What the parts of the search for findings share. Each part looks at one side
 * of a plan and appends what it has to say. */
typedef struct
{
  const KhPlan *plan;
  const KhLayout *layout;
  const KhHandWalk *walks[2]; /* by KhHand; NULL: no walk */
  KhHand hand;                /* the plan's */
  GPtrArray *findings;        /* of KhFinding */
  GPtrArray *sound;           /* of char * */
} KhFinder;

/* More of a kind than this are told in one finding. */
#define KH_FINDINGS_ONE_BY_ONE 6

void kh_finder_look_at_walls (KhFinder *finder);    /* islands, lone posts, bare points, walls off the floor, none at all */
void kh_finder_look_at_floor (KhFinder *finder);    /* pockets, pieces, leaks, openings */
void kh_finder_look_at_start (KhFinder *finder);    /* none, on a gap, no wall at the hand */
void kh_finder_look_at_marks (KhFinder *finder);    /* none, out of reach, in a wall, at bare points */
void kh_finder_look_at_hands (KhFinder *finder);    /* where the hand walks end */

/* Appends a finding; takes both texts. */
KhFinding *kh_finder_tell (KhFinder *finder, const char *code, KhSeverity severity, const double at[2], char *wrong, char *effect);
void kh_finder_tell_sound (KhFinder *finder, char *text_taken);
const char *kh_finder_hand_words (KhHand hand);     /* "right hand" */
void kh_finder_add_cell (KhFinding *finding, KhCell cell);
void kh_finder_get_edge_place (KhEdge edge, double at[2]);
/* "A1 west": the cell with floor at an edge and its side. Owned. */
char *kh_finder_dup_edge_name (const KhPlan *plan, KhEdge edge);
