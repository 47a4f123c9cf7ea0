/* SPDX-License-Identifier: MIT */
#include "plan/history.h"

/* A step holds the change that leads away from the present: back for those to
 * undo, forth for those to redo. */
typedef struct
{
  KhChange *change;
  char *words;
  guint64 state; /* the plan's, on the other side of the step */
} Step;

struct KhHistory
{
  KhPlan *plan;
  GPtrArray *undo, *redo; /* of Step, newest last */
  guint64 state, newest_state;
};

static void step_free (gpointer data)
{
  Step *step = data;
  kh_change_free (step->change);
  g_free (step->words);
  g_free (step);
}

KhHistory *kh_history_new_take (KhPlan *plan)
{
  KhHistory *history = g_new0 (KhHistory, 1);
  history->plan = plan;
  history->undo = g_ptr_array_new_with_free_func (step_free);
  history->redo = g_ptr_array_new_with_free_func (step_free);
  return history;
}

void kh_history_free (KhHistory *history)
{
  if (!history)
    return;
  kh_plan_free (history->plan);
  g_ptr_array_unref (history->undo);
  g_ptr_array_unref (history->redo);
  g_free (history);
}

const KhPlan *kh_history_get_plan (const KhHistory *history) { return history->plan; }

gboolean kh_history_do_take (KhHistory *history, KhChange *change, const char *words)
{
  g_autoptr (KhChange) taken = change;
  if (kh_change_is_idle (taken, history->plan))
    return FALSE;
  Step *step = g_new (Step, 1);
  *step = (Step){ kh_change_apply (taken, history->plan), g_strdup (words), history->state };
  g_ptr_array_add (history->undo, step);
  g_ptr_array_set_size (history->redo, 0);
  history->state = ++history->newest_state;
  return TRUE;
}

/* Takes the newest step of 'from' and puts its opposite on 'to'. */
static gboolean cross (KhHistory *history, GPtrArray *from, GPtrArray *to)
{
  if (from->len == 0)
    return FALSE;
  Step *step = g_ptr_array_steal_index (from, from->len - 1);
  KhChange *opposite = kh_change_apply (step->change, history->plan);
  guint64 left = history->state;
  kh_change_free (step->change);
  step->change = opposite;
  history->state = step->state;
  step->state = left;
  g_ptr_array_add (to, step);
  return TRUE;
}

gboolean kh_history_undo (KhHistory *history) { return cross (history, history->undo, history->redo); }

gboolean kh_history_redo (KhHistory *history) { return cross (history, history->redo, history->undo); }

static const char *newest_words (const GPtrArray *steps)
{
  return steps->len == 0 ? NULL : ((const Step *)g_ptr_array_index (steps, steps->len - 1))->words;
}

const char *kh_history_get_undo_words (const KhHistory *history) { return newest_words (history->undo); }

const char *kh_history_get_redo_words (const KhHistory *history) { return newest_words (history->redo); }

gsize kh_history_get_n_undo (const KhHistory *history) { return history->undo->len; }

guint64 kh_history_get_state (const KhHistory *history) { return history->state; }
