/* SPDX-License-Identifier: MIT */
#include "review/review.h"
#include "base/units.h"
#include "review/judge.h"
#include <glib/gi18n-lib.h>
#include <math.h>
#include <string.h>

void kh_review_settings_init (KhReviewSettings *settings, const KhPlan *plan)
{
  *settings = (KhReviewSettings){ 0 };
  kh_run_settings_init (&settings->run, plan);
}

static void look_at_layout (KhReview *review, const KhPlan *plan)
{
  review->layout = kh_layout_new (plan);
  review->has_walks = kh_hand_walk (plan, KH_HAND_RIGHT, &review->walks[KH_HAND_RIGHT])
                      && kh_hand_walk (plan, KH_HAND_LEFT, &review->walks[KH_HAND_LEFT]);
  kh_measures (plan, &review->measures);
  review->findings = kh_layout_find (plan, review->layout, review->has_walks ? &review->walks[KH_HAND_RIGHT] : NULL,
                                     review->has_walks ? &review->walks[KH_HAND_LEFT] : NULL, review->sound);
}

static void look_at_runs (KhReview *review, const KhPlan *plan, const KhReviewSettings *settings, KhJob *job)
{
  g_autoptr (KhSolids) solids = kh_solids_new (plan);
  for (int hand = 0; hand < 2; hand++)
    {
      g_autoptr (GError) error = NULL;
      KhRunSettings run = settings->run;
      if (!settings->both_hands && (KhHand)hand != settings->run.hand)
        continue;
      run.hand = (KhHand)hand;
      review->traces[hand] = kh_run (plan, solids, &run, job, &error);
      if (!review->traces[hand] && !review->run_fault && !g_error_matches (error, KH_RUN_ERROR, KH_RUN_ERROR_STOPPED))
        review->run_fault = g_strdup (error->message);
    }
}

static void look_at_panels (KhReview *review, const KhPlan *plan, KhJob *job)
{
  g_autoptr (GError) error = NULL;
  KhSawSettings saw;
  review->cut_list = kh_cut_list_new (plan, &error);
  if (!review->cut_list)
    {
      review->panels_fault = g_strdup (error->message);
      return;
    }
  kh_saw_settings_init (&saw);
  review->saw_order = kh_cut_list_dup_order (review->cut_list, plan);
  if (review->cut_list->panels->len > 0)
    review->saw_plan = kh_saw_plan_new (review->saw_order, &saw, job);
}

/* By severity, then from the north-west as one reads: row downward, column, code. */
static int compare_findings (gconstpointer a, gconstpointer b)
{
  const KhFinding *x = *(const KhFinding *const *)a, *y = *(const KhFinding *const *)b;
  if ((x->reason != NULL) != (y->reason != NULL))
    return x->reason ? 1 : -1;
  if (x->severity != y->severity)
    return (int)x->severity - (int)y->severity;
  if (x->at[1] != y->at[1])
    return x->at[1] > y->at[1] ? -1 : 1;
  if (x->at[0] != y->at[0])
    return x->at[0] < y->at[0] ? -1 : 1;
  return strcmp (x->code, y->code);
}

static void set_aside (KhReview *review, const KhPlan *plan)
{
  for (guint i = 0; i < plan->set_aside->len; i++)
    {
      const KhSetAside *entry = &g_array_index (plan->set_aside, KhSetAside, i);
      for (guint k = 0; k < review->findings->len; k++)
        {
          KhFinding *finding = g_ptr_array_index (review->findings, k);
          if (!finding->reason && strcmp (finding->code, entry->code) == 0 && finding->at[0] == entry->at[0]
              && finding->at[1] == entry->at[1])
            finding->reason = g_strdup (entry->reason ? entry->reason : "");
        }
    }
}

static void number (KhReview *review)
{
  int next = 1;
  g_ptr_array_sort (review->findings, compare_findings);
  for (guint i = 0; i < review->findings->len; i++)
    {
      KhFinding *finding = g_ptr_array_index (review->findings, i);
      if (finding->reason)
        {
          review->n_set_aside++;
          continue;
        }
      finding->number = next++;
      review->n_by_severity[finding->severity]++;
    }
}

KhReview *kh_review_new (const KhPlan *plan, const KhReviewSettings *settings, KhJob *job)
{
  KhReview *review = g_new0 (KhReview, 1);
  review->sound = g_ptr_array_new_with_free_func (g_free);
  look_at_layout (review, plan);
  if (settings->with_panels && !kh_job_is_stopped (job))
    look_at_panels (review, plan, job);
  if (settings->with_run && !kh_job_is_stopped (job))
    look_at_runs (review, plan, settings, job);
  kh_judge_robot (review, plan);
  kh_judge_runs (review, plan, settings->run.hand);
  kh_judge_panels (review, plan);
  set_aside (review, plan);
  number (review);
  return review;
}

void kh_review_free (KhReview *review)
{
  if (!review)
    return;
  kh_layout_free (review->layout);
  for (int hand = 0; hand < 2; hand++)
    {
      if (review->has_walks)
        kh_hand_walk_clear (&review->walks[hand]);
      kh_trace_free (review->traces[hand]);
    }
  g_free (review->run_fault);
  kh_cut_list_free (review->cut_list);
  kh_saw_order_free (review->saw_order);
  kh_saw_plan_free (review->saw_plan);
  g_free (review->panels_fault);
  g_ptr_array_unref (review->findings);
  g_ptr_array_unref (review->sound);
  g_free (review);
}

static void append_part (GString *text, char *part_taken)
{
  g_autofree char *part = part_taken;
  g_string_append_printf (text, "%s%s", text->len > 0 ? " · " : "", part);
}

static char *dup_walk_words (const KhHandWalk *walk, KhHand hand)
{
  const char *words = hand == KH_HAND_RIGHT ? _ ("right hand") : _ ("left hand");
  if (walk->arrives)
    return g_strdup_printf (ngettext ("%s arrives in %d step", "%s arrives in %d steps", (gulong)walk->n_steps), words,
                            walk->n_steps);
  return g_strdup_printf (walk->ends == KH_WALK_ENDS_OUT ? _ ("%s leaves the maze") : _ ("%s circles"), words);
}

char *kh_review_dup_verdict (const KhReview *review, const KhPlan *plan)
{
  const KhLayout *layout = review->layout;
  GString *text = g_string_new (NULL);
  if (layout->simply_connected)
    append_part (text, g_strdup (_ ("simply connected")));
  if (layout->islands->len > 0)
    append_part (text,
                 g_strdup_printf (ngettext ("%u island", "%u islands", layout->islands->len), layout->islands->len));
  if (layout->n_lone_posts > 0)
    append_part (text, g_strdup_printf (ngettext ("%d lone post", "%d lone posts", (gulong)layout->n_lone_posts),
                                        layout->n_lone_posts));
  if (layout->n_pockets > 0)
    append_part (text,
                 g_strdup_printf (ngettext ("%d pocket", "%d pockets", (gulong)layout->n_pockets), layout->n_pockets));
  if (layout->n_leaks > 0)
    append_part (text, g_strdup_printf (ngettext ("%d leak", "%d leaks", (gulong)layout->n_leaks), layout->n_leaks));
  if (review->has_walks)
    append_part (text, dup_walk_words (&review->walks[plan->robot.hand], plan->robot.hand));
  else
    append_part (text, g_strdup (_ ("no start on floor")));
  const KhTrace *trace = review->traces[plan->robot.hand];
  if (trace && trace->outcome != KH_OUTCOME_ARRIVED)
    append_part (text, g_strdup (_ ("the preview does not arrive")));
  return g_string_free (text, FALSE);
}
