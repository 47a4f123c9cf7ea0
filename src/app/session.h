/* SPDX-License-Identifier: MIT */
#pragma once
#include <gio/gio.h>
#include "plan/history.h"
#include "review/review.h"
#include "draw/strippicture.h"

/* One open plan and what is known about it: the window's model.  Holds no
 * widget.  All edits go through kh_session_do; the layout's findings follow at
 * once (same call), run and panels in the background on a copy; results of an
 * older generation are dropped.
 *
 * Signals: "plan-changed" (after do, undo, redo), "review-changed" (new
 * results of either part), "player-changed" (played moment, playing, speed,
 * hand), "file-changed" (path, saved state), "selection-changed" (lit row,
 * chosen finding). */

#define KH_TYPE_SESSION (kh_session_get_type ())
G_DECLARE_FINAL_TYPE (KhSession, kh_session, KH, SESSION, GObject)

KhSession *kh_session_new_take (KhPlan *plan);
const KhPlan *kh_session_get_plan (KhSession *self);
KhHistory *kh_session_get_history (KhSession *self);

gboolean kh_session_do_take (KhSession *self, KhChange *change, const char *words);
void kh_session_undo (KhSession *self);
void kh_session_redo (KhSession *self);

/* Newest results.  The layout part is always of the plan as it stands; run and
 * panels may be missing (NULL members) while they are worked out. */
const KhReview *kh_session_get_review (KhSession *self);
gboolean kh_session_is_working (KhSession *self);
KhStripData *kh_session_get_strip (KhSession *self, KhHand hand); /* NULL: no run */

/* File */
const char *kh_session_get_path (KhSession *self); /* NULL: never saved */
gboolean kh_session_is_saved (KhSession *self);
/* Something would be lost: it differs from its file or, never saved, from what it began with. */
gboolean kh_session_is_at_stake (KhSession *self);
void kh_session_set_file (KhSession *self, const char *path); /* opened from, or saved to: state is saved; stamps the file */
gboolean kh_session_save (KhSession *self, const char *path, gboolean even_if_changed, GError **error);

/* Player and preview */
void kh_session_set_preview (KhSession *self, gboolean live);
gboolean kh_session_get_preview (KhSession *self);
void kh_session_set_hand (KhSession *self, KhHand hand); /* the one shown; the plan's own is changed by kh_session_do */
KhHand kh_session_get_hand (KhSession *self);
void kh_session_set_exact (KhSession *self, gboolean exact);
gboolean kh_session_get_exact (KhSession *self);
void kh_session_set_seed (KhSession *self, guint64 seed); /* which errors are drawn; 1 at first */
guint64 kh_session_get_seed (KhSession *self);
void kh_session_set_played_tick (KhSession *self, gsize tick);
gsize kh_session_get_played_tick (KhSession *self);
void kh_session_set_playing (KhSession *self, gboolean playing); /* at the end: from the start again */
gboolean kh_session_get_playing (KhSession *self);
void kh_session_set_speed (KhSession *self, double times); /* 1 to 50 times life */
double kh_session_get_speed (KhSession *self);
const KhTrace *kh_session_get_trace (KhSession *self);  /* of the hand shown; NULL: no run */

/* Selection */
void kh_session_set_lit_row (KhSession *self, int row); /* -1: none */
int kh_session_get_lit_row (KhSession *self);
void kh_session_set_chosen_finding (KhSession *self, int index); /* -1: none */
int kh_session_get_chosen_finding (KhSession *self);
