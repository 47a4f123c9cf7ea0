/* SPDX-License-Identifier: MIT */
#include "app/session.h"
#include "app/timing.h"
#include "files/planfile.h"
#include "files/store.h"
#include <string.h>

/* A burst of edits (a held key) starts one piece of work, not one each. */
#define SETTLE_MS 40

typedef struct
{
  KhPlan *plan;
  KhReviewSettings settings;
  KhJob job;
  guint64 generation;
} Work;

typedef struct
{
  KhReview *review;
  KhStripData *strips[2];
} Result;

struct _KhSession
{
  GObject parent_instance;
  KhHistory *history;
  KhReview *review; /* of the plan as it stands */
  KhStripData *strips[2];
  guint64 generation; /* of the plan and of what is asked about it */
  GTask *task;        /* the work under way; NULL: none */
  guint settle_source;

  char *path;
  guint64 saved_state; /* of the history; G_MAXUINT64: never */
  KhFileStamp stamp;

  gboolean preview, exact, playing;
  gboolean at_end; /* the run before was shown whole: so is the next */
  guint64 seed;
  KhHand hand;
  double speed;
  gsize played_tick;
  int lit_row, chosen_finding;
};

G_DEFINE_FINAL_TYPE (KhSession, kh_session, G_TYPE_OBJECT)

enum
{
  PLAN_CHANGED,
  REVIEW_CHANGED,
  PLAYER_CHANGED,
  FILE_CHANGED,
  SELECTION_CHANGED,
  N_SIGNALS
};
static guint signals[N_SIGNALS];

static void work_free (gpointer data)
{
  Work *work = data;
  kh_plan_free (work->plan);
  g_free (work);
}

static void result_free (gpointer data)
{
  Result *result = data;
  kh_review_free (result->review);
  kh_strip_data_free (result->strips[0]);
  kh_strip_data_free (result->strips[1]);
  g_free (result);
}

static void drop_strips (KhSession *self)
{
  for (int hand = 0; hand < 2; hand++)
    g_clear_pointer (&self->strips[hand], kh_strip_data_free);
}

/* The work under way is told to stop; what it still brings is of an older
 * generation and is dropped. */
static void stop_work (KhSession *self)
{
  g_clear_handle_id (&self->settle_source, g_source_remove);
  if (!self->task)
    return;
  kh_job_stop (&((Work *)g_task_get_task_data (self->task))->job);
  g_clear_object (&self->task);
}

static void work_thread (GTask *task, gpointer source, gpointer data, GCancellable *cancellable)
{
  Work *work = data;
  Result *result = g_new0 (Result, 1);
  result->review = kh_review_new (work->plan, &work->settings, &work->job);
  for (int hand = 0; hand < 2; hand++)
    if (result->review->traces[hand])
      result->strips[hand] = kh_strip_data_new (work->plan, result->review->traces[hand]);
  g_task_return_pointer (task, result, result_free);
}

/* The finding that was chosen keeps being it, whatever its number is now. */
static int find_again (const KhReview *from, int chosen, const KhReview *to)
{
  if (chosen < 0 || chosen >= (int)from->findings->len)
    return -1;
  const KhFinding *was = g_ptr_array_index (from->findings, chosen);
  for (guint i = 0; i < to->findings->len; i++)
    {
      const KhFinding *finding = g_ptr_array_index (to->findings, i);
      if (strcmp (finding->code, was->code) == 0 && strcmp (finding->wrong, was->wrong) == 0
          && finding->at[0] == was->at[0] && finding->at[1] == was->at[1])
        return (int)i;
    }
  return -1;
}

static void take_review (KhSession *self, KhReview *review)
{
  int chosen = self->review ? find_again (self->review, self->chosen_finding, review) : -1;
  kh_review_free (self->review);
  self->review = review;
  self->chosen_finding = chosen;
}

static gsize last_tick (KhSession *self)
{
  const KhTrace *trace = kh_session_get_trace (self);
  return trace ? kh_trace_get_n_ticks (trace) - 1 : 0;
}

static void work_done_cb (GObject *source, GAsyncResult *async, gpointer data)
{
  KhSession *self = KH_SESSION (source);
  GTask *task = G_TASK (async);
  const Work *work = g_task_get_task_data (task);
  Result *result = g_task_propagate_pointer (task, NULL);
  if (self->task == task && work->generation == self->generation)
    {
      g_clear_object (&self->task);
      int chosen = self->chosen_finding;
      take_review (self, g_steal_pointer (&result->review));
      drop_strips (self);
      self->strips[0] = g_steal_pointer (&result->strips[0]);
      self->strips[1] = g_steal_pointer (&result->strips[1]);
      gsize last = last_tick (self);
      /* A fresh run is shown whole; where it was being looked at, the place is kept. */
      self->played_tick = self->at_end ? last : MIN (self->played_tick, last);
      g_signal_emit (self, signals[REVIEW_CHANGED], 0);
      g_signal_emit (self, signals[PLAYER_CHANGED], 0);
      if (self->chosen_finding != chosen)
        g_signal_emit (self, signals[SELECTION_CHANGED], 0);
    }
  result_free (result);
}

static gboolean start_work_cb (gpointer data)
{
  KhSession *self = data;
  const KhPlan *plan = kh_history_get_plan (self->history);
  Work *work = g_new0 (Work, 1);
  self->settle_source = 0;
  work->plan = kh_plan_copy (plan);
  work->generation = self->generation;
  kh_job_init (&work->job);
  kh_review_settings_init (&work->settings, plan);
  work->settings.with_panels = TRUE;
  work->settings.with_run = self->preview;
  work->settings.both_hands = TRUE;
  work->settings.run.exact = self->exact;
  work->settings.run.seed = self->seed;
  self->task = g_task_new (self, NULL, work_done_cb, NULL);
  g_task_set_task_data (self->task, work, work_free);
  g_task_run_in_thread (self->task, work_thread);
  return G_SOURCE_REMOVE;
}

/* The layout at once, the rest in the background. */
static void look_again (KhSession *self)
{
  KhReviewSettings settings;
  const KhPlan *plan = kh_history_get_plan (self->history);
  stop_work (self);
  self->generation++;
  kh_review_settings_init (&settings, plan);
  if (self->review && kh_session_get_trace (self))
    self->at_end = self->played_tick >= last_tick (self);
  take_review (self, kh_review_new (plan, &settings, NULL));
  drop_strips (self);
  self->settle_source = g_timeout_add (SETTLE_MS, start_work_cb, self);
}

static void kh_session_dispose (GObject *object)
{
  KhSession *self = KH_SESSION (object);
  stop_work (self);
  g_clear_pointer (&self->review, kh_review_free);
  drop_strips (self);
  g_clear_pointer (&self->history, kh_history_free);
  g_clear_pointer (&self->path, g_free);
  G_OBJECT_CLASS (kh_session_parent_class)->dispose (object);
}

static void kh_session_class_init (KhSessionClass *klass)
{
  static const char *const names[N_SIGNALS]
      = { "plan-changed", "review-changed", "player-changed", "file-changed", "selection-changed" };
  G_OBJECT_CLASS (klass)->dispose = kh_session_dispose;
  for (int i = 0; i < N_SIGNALS; i++)
    signals[i] = g_signal_new (names[i], KH_TYPE_SESSION, G_SIGNAL_RUN_LAST, 0, NULL, NULL, NULL, G_TYPE_NONE, 0);
}

static void kh_session_init (KhSession *self)
{
  self->preview = TRUE;
  self->exact = self->at_end = TRUE;
  self->seed = 1;
  self->speed = 5;
  self->lit_row = self->chosen_finding = -1;
}

KhSession *kh_session_new_take (KhPlan *plan)
{
  KhSession *self = g_object_new (KH_TYPE_SESSION, NULL);
  self->hand = plan->robot.hand;
  self->history = kh_history_new_take (plan);
  self->saved_state = G_MAXUINT64;
  look_again (self);
  return self;
}

const KhPlan *kh_session_get_plan (KhSession *self) { return kh_history_get_plan (self->history); }

KhHistory *kh_session_get_history (KhSession *self) { return self->history; }

static void announce_plan (KhSession *self, gint64 since_us)
{
  KhHand hand = kh_session_get_plan (self)->robot.hand;
  self->playing = FALSE;
  int lit = self->lit_row, chosen = self->chosen_finding;
  self->lit_row = -1;
  if (self->hand != hand && !self->review->traces[self->hand])
    self->hand = hand;
  look_again (self);
  kh_timing_say ("edit", since_us);
  g_signal_emit (self, signals[PLAN_CHANGED], 0);
  g_signal_emit (self, signals[REVIEW_CHANGED], 0);
  g_signal_emit (self, signals[PLAYER_CHANGED], 0);
  g_signal_emit (self, signals[FILE_CHANGED], 0);
  if (self->lit_row != lit || self->chosen_finding != chosen)
    g_signal_emit (self, signals[SELECTION_CHANGED], 0);
}

gboolean kh_session_do_take (KhSession *self, KhChange *change, const char *words)
{
  gint64 since_us = g_get_monotonic_time ();
  KhHand was = kh_session_get_plan (self)->robot.hand;
  if (!kh_history_do_take (self->history, change, words))
    return FALSE;
  if (kh_session_get_plan (self)->robot.hand != was)
    self->hand = kh_session_get_plan (self)->robot.hand;
  announce_plan (self, since_us);
  return TRUE;
}

void kh_session_undo (KhSession *self)
{
  gint64 since_us = g_get_monotonic_time ();
  if (kh_history_undo (self->history))
    announce_plan (self, since_us);
}

void kh_session_redo (KhSession *self)
{
  gint64 since_us = g_get_monotonic_time ();
  if (kh_history_redo (self->history))
    announce_plan (self, since_us);
}

const KhReview *kh_session_get_review (KhSession *self) { return self->review; }

gboolean kh_session_is_working (KhSession *self) { return self->task != NULL || self->settle_source != 0; }

KhStripData *kh_session_get_strip (KhSession *self, KhHand hand) { return self->strips[hand]; }

/* ---- file ---- */

const char *kh_session_get_path (KhSession *self) { return self->path; }

gboolean kh_session_is_saved (KhSession *self) { return self->saved_state == kh_history_get_state (self->history); }

gboolean kh_session_is_at_stake (KhSession *self)
{
  if (self->saved_state == G_MAXUINT64)
    return kh_history_get_state (self->history) != 0;
  return !kh_session_is_saved (self);
}

void kh_session_set_file (KhSession *self, const char *path)
{
  char *copy = g_strdup (path);
  g_free (self->path);
  self->path = copy;
  self->saved_state = kh_history_get_state (self->history);
  if (path)
    kh_store_stamp (path, &self->stamp);
  g_signal_emit (self, signals[FILE_CHANGED], 0);
}

gboolean kh_session_save (KhSession *self, const char *path, gboolean even_if_changed, GError **error)
{
  gboolean same = self->path && strcmp (path, self->path) == 0;
  g_autofree char *text = kh_plan_file_dup_text (kh_session_get_plan (self));
  if (!kh_store_save (path, text, strlen (text), same && !even_if_changed ? &self->stamp : NULL, error))
    return FALSE;
  kh_session_set_file (self, path);
  return TRUE;
}

/* ---- player and preview ---- */

static void run_anew (KhSession *self)
{
  int chosen = self->chosen_finding;
  self->playing = FALSE;
  look_again (self);
  g_signal_emit (self, signals[REVIEW_CHANGED], 0);
  g_signal_emit (self, signals[PLAYER_CHANGED], 0);
  if (self->chosen_finding != chosen)
    g_signal_emit (self, signals[SELECTION_CHANGED], 0);
}

void kh_session_set_preview (KhSession *self, gboolean live)
{
  if (self->preview == live)
    return;
  self->preview = live;
  run_anew (self);
}

gboolean kh_session_get_preview (KhSession *self) { return self->preview; }

void kh_session_set_exact (KhSession *self, gboolean exact)
{
  if (self->exact == exact)
    return;
  self->exact = exact;
  run_anew (self);
}

gboolean kh_session_get_exact (KhSession *self) { return self->exact; }

void kh_session_set_seed (KhSession *self, guint64 seed)
{
  if (self->seed == seed)
    return;
  self->seed = seed;
  if (self->exact)
    return; /* nothing is drawn */
  run_anew (self);
}

guint64 kh_session_get_seed (KhSession *self) { return self->seed; }

const KhTrace *kh_session_get_trace (KhSession *self) { return self->review ? self->review->traces[self->hand] : NULL; }

void kh_session_set_hand (KhSession *self, KhHand hand)
{
  if (self->hand == hand)
    return;
  self->hand = hand;
  self->playing = FALSE;
  self->played_tick = last_tick (self);
  g_signal_emit (self, signals[PLAYER_CHANGED], 0);
}

KhHand kh_session_get_hand (KhSession *self) { return self->hand; }

void kh_session_set_played_tick (KhSession *self, gsize tick)
{
  tick = MIN (tick, last_tick (self));
  if (self->played_tick == tick || !kh_session_get_trace (self))
    return; /* without a run the place is kept for the next */
  self->played_tick = tick;
  g_signal_emit (self, signals[PLAYER_CHANGED], 0);
}

gsize kh_session_get_played_tick (KhSession *self) { return self->played_tick; }

void kh_session_set_playing (KhSession *self, gboolean playing)
{
  playing = playing && kh_session_get_trace (self) != NULL;
  if (self->playing == playing)
    return;
  self->playing = playing;
  if (playing && self->played_tick >= last_tick (self))
    self->played_tick = 0;
  g_signal_emit (self, signals[PLAYER_CHANGED], 0);
}

gboolean kh_session_get_playing (KhSession *self) { return self->playing; }

void kh_session_set_speed (KhSession *self, double times)
{
  times = CLAMP (times, 0.1, 50);
  if (self->speed == times)
    return;
  self->speed = times;
  g_signal_emit (self, signals[PLAYER_CHANGED], 0);
}

double kh_session_get_speed (KhSession *self) { return self->speed; }

/* ---- selection ---- */

void kh_session_set_lit_row (KhSession *self, int row)
{
  if (self->lit_row == row)
    return;
  self->lit_row = row;
  g_signal_emit (self, signals[SELECTION_CHANGED], 0);
}

int kh_session_get_lit_row (KhSession *self) { return self->lit_row; }

void kh_session_set_chosen_finding (KhSession *self, int index)
{
  if (self->chosen_finding == index)
    return;
  self->chosen_finding = index;
  g_signal_emit (self, signals[SELECTION_CHANGED], 0);
}

int kh_session_get_chosen_finding (KhSession *self) { return self->chosen_finding; }
