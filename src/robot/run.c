/* SPDX-License-Identifier: MIT */
#include "robot/run.h"
#include "base/elementary.h"
#include "base/units.h"
#include "robot/clearance.h"
#include "robot/follower.h"
#include "robot/reason.h"
#include <glib/gi18n-lib.h>
#include <math.h>
#include <string.h>

G_DEFINE_QUARK (kh - run - error - quark, kh_run_error)

#define MOST_CROSSINGS 3
#define MOST_TICKS 3000000 /* more is not kept: 150 MB, eight hours at 100 ticks a second */
#define NUDGE 1e-6 /* mm: a pose on an edge belongs to the cell it heads into */

typedef struct
{
  double x0, y0, x1, y1;
} MarkBox;

/* The world round one robot, and all that is remembered of its run. */
typedef struct
{
  const KhPlan *plan;
  const KhSolids *solids;
  KhErrors errors;
  KhFollower follower;
  KhTrace *trace;
  GArray *marks;     /* of MarkBox */
  guint8 *crossings; /* per cell and heading crossed out of it */
  double period, cell_size;
  KhPose pose;
  double wheels[2]; /* rim speeds now, mm/s: with motor lag they trail the command */
  KhReadings readings;
  gint64 n_side, n_front; /* readings taken so far */
  double distance;        /* driven, mm */
  KhClearance clearance;
  KhCell cell;
  int n_acts_noted;
  gboolean entered; /* the axle has been inside */
  double keep;      /* share of the wheels' old speed after a tick: the lag */
  gboolean over;
  KhEdge out_edge;
} Run;

void kh_run_settings_init (KhRunSettings *settings, const KhPlan *plan)
{
  *settings = (KhRunSettings){ .hand = plan->robot.hand, .exact = TRUE, .seed = 1, .trial = 0 };
}

static GArray *marks_new (const KhPlan *plan)
{
  GArray *marks = g_array_new (FALSE, FALSE, sizeof (MarkBox));
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  for (guint i = 0; i < plan->marks->len; i++)
    {
      const KhMark *mark = &g_array_index (plan->marks, KhMark, i);
      double x = (mark->cell.column + 0.5) * pitch + kh_mm_from_nm (mark->offset_nm[0]);
      double y = (mark->cell.row + 0.5) * pitch + kh_mm_from_nm (mark->offset_nm[1]);
      double half_x = kh_mm_from_nm (mark->size_nm[0]) / 2, half_y = kh_mm_from_nm (mark->size_nm[1]) / 2;
      MarkBox box = { x - half_x, y - half_y, x + half_x, y + half_y };
      g_array_append_val (marks, box);
    }
  return marks;
}

static void place_at_start (Run *run)
{
  const KhPlan *plan = run->plan;
  const KhRobotErrors *e = run->errors.errors;
  kh_plan_get_start_pose (plan, &run->pose.x, &run->pose.y, &run->pose.heading_rad);
  if (e)
    {
      KhRandomKey key = run->errors.key;
      run->pose.x += e->start_mm * kh_random_gauss (key, KH_DRAW_ONCE, KH_DRAW_START_X);
      run->pose.y += e->start_mm * kh_random_gauss (key, KH_DRAW_ONCE, KH_DRAW_START_Y);
      run->pose.heading_rad
          += e->start_deg * (KH_PI / 180) * kh_random_gauss (key, KH_DRAW_ONCE, KH_DRAW_START_HEADING);
    }
  run->cell = plan->start.cell;
  g_array_append_val (run->trace->cells, run->cell);
}

/* Readings are taken in the first tick at or after each multiple of their period. */
static gboolean is_due (gint64 *n_taken, gint64 tick, double tick_s, double period)
{
  gint64 due = (gint64)floor ((double)tick * tick_s / period + 1e-9) + 1;
  gboolean fresh = due > *n_taken;
  *n_taken = due;
  return fresh;
}

static gboolean is_on_mark (const Run *run)
{
  double s, c, ahead = run->plan->robot.floor_sensor.ahead_mm;
  kh_sincos (run->pose.heading_rad, &s, &c);
  double x = run->pose.x + ahead * c, y = run->pose.y + ahead * s;
  for (guint i = 0; i < run->marks->len; i++)
    {
      const MarkBox *box = &g_array_index (run->marks, MarkBox, i);
      if (x >= box->x0 && x <= box->x1 && y >= box->y0 && y <= box->y1)
        return TRUE;
    }
  return FALSE;
}

static void record (Run *run, KhState state, gboolean side_fresh, gboolean front_fresh)
{
  KhTick tick = { run->pose.x,
                  run->pose.y,
                  run->pose.heading_rad,
                  (float)run->distance,
                  (float)run->readings.front,
                  (float)run->readings.side_front,
                  (float)run->readings.side_rear,
                  (float)run->clearance.distance,
                  (guint8)state,
                  (guint8)((front_fresh ? 1 : 0) | (side_fresh ? 2 : 0)) };
  KhTrace *trace = run->trace;
  if (run->clearance.distance < trace->least_clearance_mm)
    {
      trace->least_clearance_mm = run->clearance.distance;
      trace->least_clearance_tick = trace->ticks->len;
    }
  g_array_append_val (trace->ticks, tick);
}

static void note_state (Run *run, KhState state)
{
  GArray *events = run->trace->events;
  if (events->len > 0 && run->follower.n_acts == run->n_acts_noted
      && g_array_index (events, KhEvent, events->len - 1).state == state)
    return;
  run->n_acts_noted = run->follower.n_acts;
  KhEvent event = { run->trace->ticks->len - 1, state, run->pose, run->cell };
  g_array_append_val (events, event);
}

static void end (Run *run, KhOutcome outcome)
{
  if (run->over)
    return;
  run->over = TRUE;
  run->trace->outcome = outcome;
}

/* The edge touched: the panel's own, or for a post the first wall that meets there. */
static void find_touched (const Run *run, KhContact *contact)
{
  int column = (run->clearance.i - 1) / 2, row = (run->clearance.j - 1) / 2, n = 0;
  gboolean post_x = run->clearance.i % 2 == 1, post_y = run->clearance.j % 2 == 1;
  const KhEdge edges[4] = { { KH_AXIS_X, column, row },
                            { KH_AXIS_Y, column, row },
                            { KH_AXIS_X, column - 1, row },
                            { KH_AXIS_Y, column, row - 1 } };
  contact->edge = edges[post_x ? 1 : 0];
  if (!post_x || !post_y)
    return;
  for (int k = 3; k >= 0; k--)
    if (kh_plan_has_wall (run->plan, edges[k]))
      {
        contact->edge = edges[k];
        n++;
      }
  contact->on_end = n < 2;
}

static void touch (Run *run, KhState state)
{
  KhContact *contact = &run->trace->contact;
  double s, c;
  kh_sincos (run->pose.heading_rad, &s, &c);
  double x = run->clearance.at.x - run->pose.x, y = run->clearance.at.y - run->pose.y;
  *contact = (KhContact){ .at = run->clearance.at, .state = state, .cell = run->cell };
  contact->bearing_rad = kh_atan2 (-x * s + y * c, x * c + y * s);
  double off = fabs (contact->bearing_rad);
  gboolean near = (contact->bearing_rad < 0) == (run->trace->hand == KH_HAND_RIGHT);
  contact->part = off < KH_PI / 6       ? KH_PART_FRONT
                  : off > KH_PI * 5 / 6 ? KH_PART_REAR
                  : near                ? KH_PART_NEAR_SIDE
                                        : KH_PART_FAR_SIDE;
  find_touched (run, contact);
  run->trace->has_contact = TRUE;
  end (run, KH_OUTCOME_CONTACT);
}

/* Crossing into 'to', next to the cell the axle was in. */
static void cross (Run *run, KhCell to, KhHeading heading)
{
  KhEdge edge = kh_cell_edge (run->cell, heading);
  if (!kh_plan_has_floor (run->plan, to))
    {
      const KhOpening *opening = kh_plan_get_opening (run->plan, edge);
      run->out_edge = edge;
      gboolean exit = opening && opening->use == KH_OPENING_EXIT && run->marks->len == 0;
      end (run, exit ? KH_OUTCOME_ARRIVED : KH_OUTCOME_LEFT);
      return;
    }
  guint8 *crossed = &run->crossings[4 * kh_lattice_cell_index (&run->plan->lattice, run->cell) + (int)heading];
  run->cell = to;
  g_array_append_val (run->trace->cells, to);
  if (++*crossed >= MOST_CROSSINGS)
    end (run, KH_OUTCOME_CIRCLES);
}

static void follow_cells (Run *run)
{
  double s, c;
  kh_sincos (run->pose.heading_rad, &s, &c);
  int column = (int)floor ((run->pose.x + NUDGE * c) / run->cell_size),
      row = (int)floor ((run->pose.y + NUDGE * s) / run->cell_size);
  if (!run->entered)
    {
      /* It may begin a little outside, on the entrance. */
      run->entered = column == run->cell.column && row == run->cell.row;
      if (!run->entered && kh_plan_starts_on_entrance (run->plan))
        return;
      run->entered = TRUE;
    }
  if (column != run->cell.column)
    cross (run, (KhCell){ column, run->cell.row }, column > run->cell.column ? KH_HEADING_EAST : KH_HEADING_WEST);
  if (!run->over && row != run->cell.row)
    cross (run, (KhCell){ run->cell.column, row }, row > run->cell.row ? KH_HEADING_NORTH : KH_HEADING_SOUTH);
}

/* What the wheels do of what they were told: limit, lag, gain, slip, turning time. */
static void drive_wheels (Run *run, KhCommand told, gint64 tick, double *v, double *omega)
{
  const KhRobotDrive *drive = &run->plan->robot.drive;
  double half = drive->track_mm / 2;
  double wheels[2] = { told.v - told.omega * half, told.v + told.omega * half };
  double fastest = MAX (fabs (wheels[0]), fabs (wheels[1]));
  double scale = fastest > drive->wheel_limit_mm_s ? drive->wheel_limit_mm_s / fastest : 1;
  const KhRobotErrors *e = run->errors.errors;
  if (e && told.turning)
    scale *= 1
             + e->turn_time_percent / 100
                   * kh_random_gauss (run->errors.key, (uint64_t)run->follower.n_acts, KH_DRAW_TURN);
  for (int wheel = 0; wheel < 2; wheel++)
    {
      run->wheels[wheel] = wheels[wheel] * scale + (run->wheels[wheel] - wheels[wheel] * scale) * run->keep;
      wheels[wheel] = run->wheels[wheel] * run->errors.wheel_gain[wheel];
      if (e && e->slip_percent > 0)
        wheels[wheel]
            *= 1
               + e->slip_percent / 100
                     * kh_random_gauss (run->errors.key, (uint64_t)tick, (uint64_t)(KH_DRAW_SLIP_LEFT + wheel));
    }
  *v = (wheels[0] + wheels[1]) / 2;
  *omega = (wheels[1] - wheels[0]) / drive->track_mm;
}

/* The exact arc of a tick, looked at as often as the clearance asks for: no
 * point of the body moves farther than v dt + |omega| dt times the swept radius. */
static void move (Run *run, double v, double omega, KhState state)
{
  const KhRobotBody *body = &run->plan->robot.body;
  double swept = kh_robot_swept_radius_mm (&run->plan->robot), left = run->period;
  double speed = fabs (v) + fabs (omega) * swept;
  while (left > 0)
    {
      double safe = speed > 0 ? run->clearance.distance / speed : left;
      double step = MIN (left, MAX (safe, run->period / 16));
      run->pose = kh_pose_advance (run->pose, v, omega, step);
      left -= step;
      kh_clearance (run->solids, body, run->pose, &run->clearance);
      if (run->clearance.distance <= 0)
        {
          touch (run, state);
          break;
        }
    }
  run->distance += fabs (v) * (run->period - MAX (left, 0.0));
}

static gboolean is_lost (const Run *run)
{
  const KhLattice *lattice = &run->plan->lattice;
  return kh_follower_is_lost (&run->follower)
         || run->follower.searched > (lattice->columns + lattice->rows) * run->cell_size;
}

static void step (Run *run, gint64 tick)
{
  const KhRobot *robot = &run->plan->robot;
  double v, omega;
  gboolean side_fresh = is_due (&run->n_side, tick, run->period, run->follower.d.side_period);
  gboolean front_fresh = is_due (&run->n_front, tick, run->period, run->follower.d.front_period);
  if (side_fresh)
    kh_sensors_read_side (robot, run->solids, run->pose, run->follower.d.hand_sign, &run->errors, (uint64_t)tick,
                          &run->readings);
  if (front_fresh)
    kh_sensors_read_front (robot, run->solids, run->pose, &run->errors, (uint64_t)tick, &run->readings);
  KhCommand told = kh_follower_step (&run->follower, &run->readings, side_fresh, front_fresh, is_on_mark (run));
  KhState state = run->follower.state;
  if (tick == 0)
    record (run, state, side_fresh, front_fresh);
  note_state (run, state);
  if (state == KH_STATE_STOPPED)
    {
      end (run, KH_OUTCOME_ARRIVED);
      return;
    }
  if (is_lost (run))
    {
      end (run, KH_OUTCOME_LOST);
      return;
    }
  drive_wheels (run, told, tick, &v, &omega);
  move (run, v, omega, state);
  follow_cells (run);
  record (run, state, side_fresh, front_fresh);
}

static int count_floor (const KhPlan *plan)
{
  int n = 0;
  for (int i = 0; i < kh_lattice_n_cells (&plan->lattice); i++)
    n += !plan->gap[i];
  return n;
}

static void drive (Run *run, KhJob *job)
{
  const KhRobot *robot = &run->plan->robot;
  double most_s = 6.0 * count_floor (run->plan) * run->cell_size / robot->drive.cruise_mm_s + 30;
  gint64 n_ticks = MIN ((gint64)ceil (most_s / run->period), MOST_TICKS);
  place_at_start (run);
  kh_clearance (run->solids, &robot->body, run->pose, &run->clearance);
  for (gint64 tick = 0; tick < n_ticks && !run->over; tick++)
    {
      if (tick % 1024 == 0)
        {
          kh_job_set_progress (job, (double)tick / (double)n_ticks);
          if (kh_job_is_stopped (job))
            return;
        }
      if (tick == 0 && run->clearance.distance <= 0)
        {
          record (run, KH_STATE_SEARCHING, FALSE, FALSE);
          note_state (run, KH_STATE_SEARCHING);
          touch (run, KH_STATE_SEARCHING);
        }
      else
        step (run, tick);
    }
  end (run, KH_OUTCOME_TIME);
}

static KhTrace *trace_new (const KhRunSettings *settings, double period)
{
  KhTrace *trace = g_new0 (KhTrace, 1);
  trace->hand = settings->hand;
  trace->seed = settings->seed;
  trace->trial = settings->trial;
  trace->exact = settings->exact;
  trace->tick_s = period;
  trace->ticks = g_array_sized_new (FALSE, FALSE, sizeof (KhTick), 4096);
  trace->events = g_array_new (FALSE, FALSE, sizeof (KhEvent));
  trace->cells = g_array_new (FALSE, FALSE, sizeof (KhCell));
  trace->least_clearance_mm = HUGE_VAL;
  return trace;
}

static void finish (Run *run)
{
  KhTrace *trace = run->trace;
  trace->time_s = (double)(trace->ticks->len - 1) * run->period;
  trace->distance_m = run->distance / 1000;
  trace->why = kh_reason_dup (run->plan, trace, run->cell, run->out_edge);
}

KhTrace *kh_run (const KhPlan *plan, const KhSolids *solids, const KhRunSettings *settings, KhJob *job, GError **error)
{
  g_autoptr (GError) inner = NULL;
  if (!plan->has_start || !kh_plan_has_floor (plan, plan->start.cell))
    {
      g_set_error (error, KH_RUN_ERROR, KH_RUN_ERROR_NO_START,
                   plan->has_start ? _ ("The start stands where there is no floor; move it to a cell with floor.")
                                   : _ ("The plan has no start; place one to see a run."));
      return NULL;
    }
  if (!kh_robot_check (&plan->robot, &inner))
    {
      g_set_error (error, KH_RUN_ERROR, KH_RUN_ERROR_ROBOT, _ ("The robot cannot be run: %s."), inner->message);
      return NULL;
    }
  Run run = { .plan = plan, .solids = solids, .cell_size = kh_mm_from_nm (plan->lattice.pitch_nm) };
  kh_follower_init (&run.follower, plan, settings->hand);
  run.period = run.follower.d.control_period;
  run.trace = trace_new (settings, run.period);
  run.marks = marks_new (plan);
  run.crossings = g_malloc0 (4 * (gsize)kh_lattice_n_cells (&plan->lattice));
  run.readings = (KhReadings){ (double)NAN, (double)NAN, (double)NAN };
  run.keep = plan->robot.drive.lag_s > 0 ? kh_exp (-run.period / plan->robot.drive.lag_s) : 0;
  kh_errors_init (&run.errors, &plan->robot, (KhRandomKey){ settings->seed, settings->trial }, settings->exact);
  drive (&run, job);
  g_array_unref (run.marks);
  g_free (run.crossings);
  if (!run.over) /* only a stop leaves it so */
    {
      kh_trace_free (run.trace);
      g_set_error (error, KH_RUN_ERROR, KH_RUN_ERROR_STOPPED, _ ("The run was stopped."));
      return NULL;
    }
  finish (&run);
  return run.trace;
}
