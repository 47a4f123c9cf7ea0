/* SPDX-License-Identifier: MIT */
#include "review/judge.h"
#include "base/units.h"
#include <glib/gi18n-lib.h>
#include <math.h>

static KhFinding *tell (KhReview *review, const char *code, KhSeverity severity, double column, double row, char *wrong,
                        char *effect)
{
  KhFinding *finding = kh_finding_new (code, severity, column, row);
  g_free (finding->wrong);
  g_free (finding->effect);
  finding->wrong = wrong;
  finding->effect = effect;
  g_ptr_array_add (review->findings, finding);
  return finding;
}

static char *dup_mm (int64_t nm) { return kh_length_dup_text (nm, KH_LENGTH_UNIT_MM, TRUE); }

/* The widest the body ever is against the way between two walls. */
static void judge_width (KhReview *review, const KhPlan *plan)
{
  double clear = kh_mm_from_nm (kh_plan_clear_width_nm (plan)), swept = kh_robot_swept_radius_mm (&plan->robot);
  double half = plan->robot.body.shape == KH_BODY_DISC ? plan->robot.body.radius_mm : plan->robot.body.half_width_mm;
  double column = plan->has_start ? plan->start.cell.column + 0.5 : 0,
         row = plan->has_start ? plan->start.cell.row + 0.5 : 0;
  g_autofree char *way = dup_mm (kh_plan_clear_width_nm (plan)), *needs = dup_mm (kh_nm_from_mm (2 * swept));
  if (2 * half >= clear)
    tell (review, "robot-too-wide", KH_SEVERITY_BREAKS, column, row,
          g_strdup_printf (_ ("The robot is wider than the way, %s."), way),
          g_strdup (_ ("It cannot drive here at all; choose a smaller robot or a larger pitch.")));
  else if (2 * swept >= clear)
    tell (review, "robot-too-wide", KH_SEVERITY_BREAKS, column, row,
          g_strdup_printf (_ ("Turning in place the robot needs %s; the way has %s."), needs, way),
          g_strdup (_ ("It touches a wall whenever it turns; choose a smaller robot or a larger pitch.")));
  else
    {
      g_autofree char *spare = dup_mm (kh_nm_from_mm (clear / 2 - half));
      g_ptr_array_add (review->sound, g_strdup_printf (_ ("The robot has %s to spare on each side."), spare));
    }
}

/* What the preview leaves out is said, not passed over. */
static void judge_preview (KhReview *review, const KhPlan *plan)
{
  if (plan->robot.errors.wall_place_mm > 0)
    tell (review, "preview-limits", KH_SEVERITY_NOTES, 0, 0, g_strdup (_ ("The preview has every panel exactly in its place.")),
          g_strdup (_ ("What careless building does, “wall_place_mm”, is kept in the plan and not drawn.")));
  if (plan->build.joint != KH_JOINT_BUTT || plan->build.ends != KH_ENDS_FULL)
    tell (review, "preview-limits", KH_SEVERITY_NOTES, 0, 0, g_strdup (_ ("The preview drives among walls with full ends.")),
          g_strdup (_ ("This plan's joint ends walls elsewhere, by half a thickness or by its posts; leave that much more room.")));
}

void kh_judge_robot (KhReview *review, const KhPlan *plan)
{
  g_autoptr (GError) error = NULL;
  judge_width (review, plan);
  judge_preview (review, plan);
  if (!kh_robot_check (&plan->robot, &error))
    tell (review, "robot-number", KH_SEVERITY_BREAKS, 0, 0, g_strdup (_ ("A number of the robot cannot be.")),
          g_strdup (error->message));
}

static void judge_run (KhReview *review, const KhPlan *plan, const KhTrace *trace, KhHand hand)
{
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  const KhTick *last = kh_trace_get_tick (trace, kh_trace_get_n_ticks (trace) - 1);
  double column = last->x / pitch, row = last->y / pitch;
  const char *words = trace->hand == KH_HAND_RIGHT ? _ ("right hand") : _ ("left hand");
  if (trace->has_contact)
    {
      column = trace->contact.at.x / pitch;
      row = trace->contact.at.y / pitch;
    }
  KhFinding *finding;
  if (trace->outcome == KH_OUTCOME_ARRIVED)
    finding = tell (review, "run-arrives", KH_SEVERITY_NOTES, column, row,
                    g_strdup_printf (_ ("In the preview the %s arrives."), words),
                    g_strdup_printf (_ ("It takes %.1f s for %.2f m and comes as near as %.0f mm to a wall."),
                                     trace->time_s, trace->distance_m, trace->least_clearance_mm));
  else
    finding = tell (review, "run-fails", trace->hand == hand ? KH_SEVERITY_BREAKS : KH_SEVERITY_NOTES, column, row,
                    g_strdup_printf (_ ("In the preview the %s does not arrive."), words), g_strdup (trace->why));
  KhCell cell = g_array_index (trace->cells, KhCell, trace->cells->len - 1);
  g_array_append_val (finding->cells, cell);
  if (trace->has_contact)
    g_array_append_val (finding->edges, trace->contact.edge);
}

void kh_judge_runs (KhReview *review, const KhPlan *plan, KhHand hand)
{
  for (int h = 0; h < 2; h++)
    if (review->traces[h])
      judge_run (review, plan, review->traces[h], hand);
}

static void judge_cannot (KhReview *review, const KhCannotCut *cannot)
{
  g_autofree char *length = dup_mm (cannot->length_nm), *over = dup_mm (cannot->over_nm);
  char *wrong = g_strdup_printf (
      ngettext ("%d panel of %s cannot be cut.", "%d panels of %s cannot be cut.", (gulong)cannot->count),
      cannot->count, length);
  switch (cannot->why)
    {
    case KH_CANNOT_TOO_LONG:
      tell (review, "cannot-cut", KH_SEVERITY_BREAKS, 0, 0, wrong,
            g_strdup_printf (_ ("They are %s longer than what the longest board gives; use longer boards, or a smaller "
                                "longest panel."),
                             over));
      break;
    case KH_CANNOT_TOO_LITTLE_STOCK:
      tell (review, "cannot-cut", KH_SEVERITY_BREAKS, 0, 0, wrong,
            g_strdup (_ ("The boards to hand do not give them; allow more boards.")));
      break;
    case KH_CANNOT_NO_STOCK:
      tell (review, "cannot-cut", KH_SEVERITY_BREAKS, 0, 0, wrong,
            g_strdup (_ ("No board suits these walls; list one on the Panels page.")));
      break;
    }
}

void kh_judge_panels (KhReview *review, const KhPlan *plan)
{
  if (review->panels_fault)
    tell (review, "joint", KH_SEVERITY_BREAKS, 0, 0, g_strdup (_ ("The panels cannot be worked out.")),
          g_strdup (review->panels_fault));
  if (review->cut_list)
    {
      g_autoptr (GPtrArray) notes = kh_cut_list_dup_board_notes (plan);
      for (guint i = 0; i < notes->len; i++)
        tell (review, "board", KH_SEVERITY_NOTES, 0, 0, g_strdup (g_ptr_array_index (notes, i)), g_strdup (""));
    }
  if (!review->saw_plan)
    return;
  for (guint i = 0; i < review->saw_plan->cannot_cut->len; i++)
    judge_cannot (review, &g_array_index (review->saw_plan->cannot_cut, KhCannotCut, i));
  if (review->saw_plan->cannot_cut->len == 0)
    g_ptr_array_add (review->sound, g_strdup (_ ("Every panel can be cut from the boards listed.")));
}
