/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include <stdint.h>

/* The lattice: numbering of points, cells and edges.
 *
 *   row line 2  +---x(0,2)---+---x(1,2)---+        + lattice point (column line, row line)
 *               |            |            |
 *            y(0,1)  (0,1) y(1,1) (1,1) y(2,1)     x(c,r): edge from point (c,r) one step east
 *               |            |            |        y(c,r): edge from point (c,r) one step north
 *   row line 1  +---x(0,1)---+---x(1,1)---+
 *               |            |            |        (c,r) between four points: the cell whose
 *            y(0,0)  (0,0) y(1,0) (1,0) y(2,0)     south-west corner is point (c,r); people
 *               |            |            |        read a letter and a number: (0,0) is A1
 *   row line 0  +---x(0,0)---+---x(1,0)---+
 *            datum
 *
 * Indices (dense, 0-based):
 *   point  r * (columns + 1) + c
 *   cell   r * columns + c
 *   edge   along x first, by row line then column:      r * columns + c
 *          then along y, by column line then row:  n_x + c * rows + r
 * which is also the order of wall runs in a plan file. */

typedef enum { KH_AXIS_X, KH_AXIS_Y } KhAxis;

/* Clockwise from north, so that +1 is a turn to the right. */
typedef enum { KH_HEADING_NORTH, KH_HEADING_EAST, KH_HEADING_SOUTH, KH_HEADING_WEST } KhHeading;
#define KH_N_HEADINGS 4

typedef struct { int column, row; } KhPoint;
typedef struct { int column, row; } KhCell;

/* From lattice point (column, row) one step along axis. */
typedef struct { KhAxis axis; int column, row; } KhEdge;

/* An unbroken straight line of edges: on row line 'line' from column line
 * 'from' to 'to' (axis x), or on column line 'line' between row lines (axis y); from < to. */
typedef struct { KhAxis axis; int line, from, to; } KhRun;

/* A rectangle of cells. */
typedef struct { int column, row, columns, rows; } KhCellBlock;

typedef struct
{
  int columns, rows; /* 1 to 512 */
  int64_t pitch_nm;
  char *other; /* members of the file's "lattice" that are not known; may be NULL */
} KhLattice;

int kh_lattice_n_points (const KhLattice *lattice);
int kh_lattice_n_cells (const KhLattice *lattice);
int kh_lattice_n_edges (const KhLattice *lattice);
int kh_lattice_n_edges_x (const KhLattice *lattice);
int kh_lattice_point_index (const KhLattice *lattice, KhPoint point);
int kh_lattice_cell_index (const KhLattice *lattice, KhCell cell);
int kh_lattice_edge_index (const KhLattice *lattice, KhEdge edge);
KhPoint kh_lattice_point_at (const KhLattice *lattice, int index);
KhCell kh_lattice_cell_at (const KhLattice *lattice, int index);
KhEdge kh_lattice_edge_at (const KhLattice *lattice, int index);
gboolean kh_lattice_has_cell (const KhLattice *lattice, KhCell cell);
gboolean kh_lattice_has_point (const KhLattice *lattice, KhPoint point);
gboolean kh_lattice_has_edge (const KhLattice *lattice, KhEdge edge);

KhCell kh_cell_neighbour (KhCell cell, KhHeading heading); /* may lie outside */
KhEdge kh_cell_edge (KhCell cell, KhHeading heading);      /* the edge on that side */
void kh_edge_get_points (KhEdge edge, KhPoint ends[2]);    /* low end first */
void kh_edge_get_cells (KhEdge edge, KhCell sides[2]);     /* south then north, or west then east; may lie outside */
KhHeading kh_heading_turned (KhHeading heading, int quarter_turns_right);
void kh_heading_get_step (KhHeading heading, int *columns, int *rows);
double kh_heading_get_angle_rad (KhHeading heading); /* counter-clockwise from east */

/* "A1", "AA16"; for an edge the cell and side: "C4 north".  Owned. */
char *kh_cell_dup_name (KhCell cell);
char *kh_column_dup_letters (int column);
/* "X2:3-4": the label of a run. Owned. */
char *kh_run_dup_label (KhRun run);
