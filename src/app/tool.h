/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/units.h"
#include "draw/palette.h"
#include "draw/view.h"
#include "plan/change.h"

/* A tool is two pure functions of a plan and a gesture: what would be done
 * (make) and how that looks before it is done (draw).  The canvas turns
 * pointer, touch and keys into gestures; nothing else knows the toolkit, so a
 * tool can be tested alone.
 *
 * A gesture that would change nothing gives NULL; one that cannot be carried
 * out gives an edit without a change and a notice that says why. */

typedef enum { KH_TOOL_WALLS, KH_TOOL_FLOOR, KH_TOOL_MARK, KH_TOOL_START, KH_TOOL_OPENING, KH_N_TOOLS } KhToolId;

typedef struct
{
  KhVec from, to;     /* mm; equal for a click */
  gboolean dragged;
  gboolean take_away; /* the mode, or the secondary button */
} KhGesture;

typedef struct
{
  KhChange *change; /* NULL: cannot be done, see notice */
  char *words;      /* for undo: "2 walls laid at F3" */
  char *notice;     /* for the status bar; NULL where change is set */
} KhEdit;

void kh_edit_free (KhEdit *edit);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhEdit, kh_edit_free)
KhEdit *kh_edit_new_take (KhChange *change, char *words);
KhEdit *kh_edit_new_notice_take (char *notice);

typedef struct
{
  const KhPlan *plan;
  const KhView *view;
  KhScheme scheme;
  gboolean high_contrast;
} KhGhostScene;

typedef struct
{
  const char *name;   /* target of the action win.tool */
  const char *label;  /* with a mnemonic-free word, untranslated */
  const char *tooltip; /* untranslated */
  const char *icon_name;
  const char *key;    /* single letter, while the canvas has the focus */
  gboolean on_edges;  /* the lattice cursor goes along edges; else from cell to cell */
  KhEdit *(*make) (const KhPlan *plan, const KhGesture *gesture);
  void (*draw) (const KhGhostScene *scene, const KhGesture *gesture, cairo_t *cr);
} KhTool;

const KhTool *kh_tool_get (KhToolId id);
int kh_tool_find (const char *name); /* -1: none */

extern const KhTool kh_tool_walls, kh_tool_floor, kh_tool_mark, kh_tool_start, kh_tool_opening;

/* What lies under a place. */
gboolean kh_place_get_cell (const KhPlan *plan, KhVec mm, KhCell *cell); /* FALSE outside the lattice */
/* The nearest edge within a share of the pitch (0.5: always one within the lattice). */
gboolean kh_place_get_edge (const KhPlan *plan, KhVec mm, double share, KhEdge *edge);
KhVec kh_cell_middle_mm (const KhPlan *plan, KhCell cell);
KhVec kh_edge_middle_mm (const KhPlan *plan, KhEdge edge);
void kh_edge_get_box_mm (const KhPlan *plan, KhEdge edge, KhBox *box); /* as wood: thickness wide, a half thickness over at each end */

/* Edits the tools share with the context menu and the lattice cursor. */
KhEdit *kh_edit_walls (const KhPlan *plan, const KhEdge *edges, gsize n, gboolean walled);
KhEdit *kh_edit_opening (const KhPlan *plan, KhEdge edge, int use_or_minus_1); /* -1: closed with a wall */
KhEdit *kh_edit_floor (const KhPlan *plan, KhCellBlock block, gboolean floor);
KhEdit *kh_edit_start (const KhPlan *plan, KhCell cell, KhHeading heading);
KhEdit *kh_edit_start_away (const KhPlan *plan);
KhEdit *kh_edit_mark (const KhPlan *plan, KhCell cell, const KhMark *mark_or_null); /* replaces what lies in the cell */
void kh_mark_init_for_plan (KhMark *mark, const KhPlan *plan, KhCell cell);

/* Ghost parts */
void kh_ghost_box (const KhGhostScene *scene, cairo_t *cr, KhBox mm, gboolean take_away);
void kh_ghost_label (const KhGhostScene *scene, cairo_t *cr, KhVec mm, const char *text);
