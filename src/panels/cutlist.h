/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/geometry.h"
#include "panels/saw.h"
#include "plan/plan.h"

/* From walls to panels: what is cut, how often, and where each piece stands. */

typedef struct
{
  KhRun run;          /* the walls it covers */
  int ends[2];        /* half thicknesses added at the low and the high end: -1, 0, +1 */
  int64_t length_nm;  /* n * pitch + (ends[0] + ends[1]) * thickness / 2 */
  char *label;        /* "X2:3-4" */
  int row;            /* index into KhCutList.rows */
} KhPanel;

typedef struct
{
  int64_t length_nm, height_nm, thickness_nm;
  int count;
  GArray *panels;     /* of int: indices into KhCutList.panels, by label's place */
} KhCutRow;

typedef enum { KH_POINT_END, KH_POINT_STRAIGHT, KH_POINT_CORNER, KH_POINT_TEE, KH_POINT_CROSS, KH_N_POINT_KINDS } KhPointKind;

typedef struct
{
  KhJoint joint;
  GArray *panels;     /* of KhPanel, in file order of their runs */
  GArray *rows;       /* of KhCutRow, longest first */
  int n_points[KH_N_POINT_KINDS]; /* lattice points touched by a wall, by kind */
  int n_lone_posts;   /* posts that stand free (posts everywhere) */
  int64_t total_nm;   /* of all panels */
} KhCutList;

#define KH_PANELS_ERROR (kh_panels_error_quark ())
GQuark kh_panels_error_quark (void);
typedef enum { KH_PANELS_ERROR_JOINT, KH_PANELS_ERROR_LENGTH } KhPanelsError;

/* NULL with *error set where the joint cannot be built. */
KhCutList *kh_cut_list_new (const KhPlan *plan, GError **error);
void kh_cut_list_free (KhCutList *list);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhCutList, kh_cut_list_free)

/* The panel as it stands, seen from above, nanometres: x0, y0, x1, y1. */
void kh_panel_get_box_nm (const KhPanel *panel, const KhPlan *plan, int64_t box[4]);

/* What must be sawn from what: rows of the list, boards and saw of the plan.
 * Stock i of the order is board i of the plan, so that a pattern's stock names a
 * board; a board that cannot be used (another thickness, too narrow) stands there
 * with count 0.  Behind them, for each sheet whose grain may run either way, its
 * strips along the other edge.  Owned. */
KhSawOrder *kh_cut_list_dup_order (const KhCutList *list, const KhPlan *plan);

/* A sentence for each board that cannot be used, and why, or whose price is
 * missing where others have one.  Owned, of char *; may be empty. */
GPtrArray *kh_cut_list_dup_board_notes (const KhPlan *plan);
const char *kh_point_kind_get_name (KhPointKind kind);  /* "corner": for files */
