/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/change.h"

/* A plan and all that was done to it: the one way by which a shown plan
 * changes.  Undo is unlimited.  Each step has words for people ("2 walls laid at F3"). */

typedef struct KhHistory KhHistory;

KhHistory *kh_history_new_take (KhPlan *plan);
void kh_history_free (KhHistory *history);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhHistory, kh_history_free)

const KhPlan *kh_history_get_plan (const KhHistory *history);
/* Applies and remembers; forgets what could be redone.  A change that changes
 * nothing is dropped: returns FALSE.  Takes the change either way. */
gboolean kh_history_do_take (KhHistory *history, KhChange *change, const char *words);
gboolean kh_history_undo (KhHistory *history); /* FALSE: nothing to undo */
gboolean kh_history_redo (KhHistory *history);
const char *kh_history_get_undo_words (const KhHistory *history); /* NULL: nothing */
const char *kh_history_get_redo_words (const KhHistory *history);
gsize kh_history_get_n_undo (const KhHistory *history);
/* A number that differs for different states and comes back with undo: what
 * "not saved" is derived from.  0 for the plan as given. */
guint64 kh_history_get_state (const KhHistory *history);
