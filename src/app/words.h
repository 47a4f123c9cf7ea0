/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/units.h"
#include "plan/plan.h"

/* Places and sizes in the words of the window.  All results are owned. */

/* The edge as cell and side, "C4 north"; from the cell on its south or west,
 * where that one lies within the lattice. */
char *kh_words_dup_edge (const KhLattice *lattice, KhEdge edge);
/* The cell an edit at this edge is said to be at: "C4". */
char *kh_words_dup_edge_cell (const KhLattice *lattice, KhEdge edge);
/* "edge C4 north, wall": what a reader of the screen hears at the lattice cursor. */
char *kh_words_dup_edge_state (const KhPlan *plan, KhEdge edge);
char *kh_words_dup_cell_state (const KhPlan *plan, KhCell cell);
const char *kh_words_get_heading (KhHeading heading); /* "north" */
const char *kh_words_get_opening (KhOpeningUse use);  /* "entrance" */
/* "8 × 6 cells, 1 452 × 1 092 mm" */
char *kh_words_dup_size (const KhPlan *plan, KhLengthUnit unit);
