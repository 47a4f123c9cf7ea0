/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include "plan/build.h"
#include "plan/lattice.h"
#include "plan/robot.h"

/* The document: one maze with its robot and its build settings.
 * A plain struct, a few kilobytes: copy it to give it to another thread.  Read
 * it freely; change it only through KhHistory (plan/history.h) once it is shown. */

#define KH_LATTICE_MOST 512
#define KH_MARKS_MOST 1000

typedef enum { KH_POSTS_WHERE_WALLS_MEET, KH_POSTS_EVERYWHERE } KhPosts;
typedef enum { KH_OPENING_ENTRANCE, KH_OPENING_EXIT, KH_OPENING_PLAIN } KhOpeningUse;

typedef struct
{
  int64_t thickness_nm; /* even; over 0, under half the pitch */
  int64_t height_nm;
  KhPosts posts;
  char *other;
} KhWalls;

typedef struct
{
  KhEdge edge;
  KhOpeningUse use;
  char *other;
} KhOpening;

typedef struct
{
  KhCell cell;
  int64_t size_nm[2];   /* along x, along y */
  int64_t offset_nm[2]; /* of its centre from the cell's centre */
  char *other;
} KhMark;

typedef struct
{
  KhCell cell;
  KhHeading heading;
  char *other;
} KhStart;

typedef struct
{
  int64_t width_nm, depth_nm, way_past_nm;
  char *other;
} KhSite;

/* A finding a person has looked at and accepts. */
typedef struct
{
  char *code;
  double at[2]; /* lattice units */
  char *reason;
  char *other;
} KhSetAside;

typedef struct
{
  char *title, *notes; /* UTF-8, never NULL; 200 and 20 000 characters at most */
  KhLattice lattice;
  KhWalls walls;
  guint8 *walled;      /* an edge each: 1 = wall */
  guint8 *gap;         /* a cell each: 1 = no floor */
  guint8 *locked;      /* an edge each: 1 = laying out keeps it; NULL = none */
  GArray *openings;    /* of KhOpening, edges differ */
  GArray *marks;       /* of KhMark */
  KhStart start;
  gboolean has_start;  /* FALSE: the file has none, or it was taken away */
  KhSite site;
  gboolean has_site;
  GArray *set_aside;   /* of KhSetAside */
  KhRobot robot;
  KhBuild build;
  char *other;
} KhPlan;

/* An empty hall: boundary walled, no gaps, start in A1 facing north, no mark;
 * robot for the pitch.  Arguments within the limits above. */
KhPlan *kh_plan_new (int columns, int rows, int64_t pitch_nm, int64_t thickness_nm, int64_t height_nm);
KhPlan *kh_plan_copy (const KhPlan *plan);
void kh_plan_free (KhPlan *plan);
gboolean kh_plan_equal (const KhPlan *a, const KhPlan *b);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhPlan, kh_plan_free)

gboolean kh_plan_has_wall (const KhPlan *plan, KhEdge edge);   /* FALSE outside */
gboolean kh_plan_has_floor (const KhPlan *plan, KhCell cell);  /* FALSE outside */
gboolean kh_plan_is_boundary (const KhPlan *plan, KhEdge edge); /* floor on one side, none on the other */
const KhOpening *kh_plan_get_opening (const KhPlan *plan, KhEdge edge); /* borrowed; NULL = none */
/* A robot can pass from one cell to the other over the edge: it has no wall (and floor on both sides). */
gboolean kh_plan_has_passage (const KhPlan *plan, KhEdge edge);
gboolean kh_plan_starts_on_entrance (const KhPlan *plan);
/* Where the axle stands at the start, mm and radians. has_start must be TRUE. */
void kh_plan_get_start_pose (const KhPlan *plan, double *x_mm, double *y_mm, double *heading_rad);

/* Merged wall runs in file order: owned, of KhRun. 'edges' is plan->walled or plan->locked. */
GArray *kh_plan_dup_runs (const KhPlan *plan, const guint8 *edges);
/* Gaps as rectangles, the same for the same set: rows first, merged upward. Owned, of KhCellBlock. */
GArray *kh_plan_dup_gap_blocks (const KhPlan *plan);

int64_t kh_plan_width_nm (const KhPlan *plan); /* over all: columns * pitch + thickness */
int64_t kh_plan_depth_nm (const KhPlan *plan);
int64_t kh_plan_clear_width_nm (const KhPlan *plan);
int kh_plan_n_walls (const KhPlan *plan);
