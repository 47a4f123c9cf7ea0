/* SPDX-License-Identifier: MIT */
#include "robot/follower.h"
#include "base/elementary.h"
#include <math.h>

#define MOST_ANGLE 0.6   /* rad: what the means are kept within */
#define LEAST_PIVOT 0.5  /* rad */
#define BACK_WITHIN 20.0 /* mm: the wall is there again */
#define TRIM_GATE 0.1    /* rad: farther off, a reading is no evidence about the wheels */
#define TRIM_ANGLE 0.1   /* share of the difference taken over into the angle */
#define TRIM_WHEELS 1e-4 /* rad/mm per rad of it into the wheels' difference */
#define TRIM_FROM 6      /* readings before the wheels are judged */
#define MOST_CURVES 4

static void forget_means (KhFollower *f)
{
  f->has_means = FALSE;
  f->angle = 0;
  f->distance = f->d.wall_distance;
  f->n_both = 0;
}

/* On leaving follow the last walls are forgotten, so that the jump test starts afresh. */
static void enter (KhFollower *f, KhState state)
{
  f->state = state;
  f->n_acts++;
  f->last_front = f->last_rear = HUGE_VAL;
  f->n_lost = 0;
}

void kh_follower_init (KhFollower *f, const KhPlan *plan, KhHand hand)
{
  *f = (KhFollower){ .robot = &plan->robot, .front_aged = HUGE_VAL };
  kh_derived_init (&f->d, plan, hand);
  forget_means (f);
  enter (f, KH_STATE_SEARCHING);
}

gboolean kh_follower_is_lost (const KhFollower *f) { return f->n_curves > MOST_CURVES; }

/* A reading is a wall when it is near enough and no jump above the last one that was. */
static gboolean is_wall (const KhFollower *f, double reading, double last)
{
  return reading < f->d.side_limit && reading <= last + f->d.jump;
}

/* The wall as the two side sensors show it: angle of the nose away from it, and
 * the axle's distance. */
static void measure_wall (const KhFollower *f, const KhReadings *r, double *angle, double *distance)
{
  const KhSideSensors *side = &f->robot->side_sensors;
  double slope = (r->side_front - r->side_rear) / (side->front_mm + side->rear_mm);
  *angle = kh_atan (slope);
  *distance = (side->offset_mm + r->side_rear + slope * side->rear_mm) * kh_cos (*angle);
}

static void take_means (KhFollower *f, double angle, double distance)
{
  angle = CLAMP (angle, -MOST_ANGLE, MOST_ANGLE);
  f->angle = f->has_means ? 0.5 * (f->angle + angle) : angle;
  f->distance = f->has_means ? 0.5 * (f->distance + distance) : distance;
  f->has_means = TRUE;
}

/* What turns the robot although it was told to go straight is learned from the
 * angle the sensors show against the one that was commanded. */
static void learn_trim (KhFollower *f, double angle)
{
  if (f->n_both++ == 0)
    {
      f->angle_hat = angle;
      return;
    }
  double difference = angle - f->angle_hat;
  if (!f->robot->control.trim || fabs (difference) >= TRIM_GATE)
    return;
  f->angle_hat += TRIM_ANGLE * difference;
  if (f->n_both >= TRIM_FROM)
    f->beta += TRIM_WHEELS * f->d.hand_sign * difference;
}

static void take_side (KhFollower *f, const KhReadings *r)
{
  double angle, distance;
  f->front_holds = is_wall (f, r->side_front, f->last_front);
  f->rear_holds = is_wall (f, r->side_rear, f->last_rear);
  f->last_sides = (guint8)((f->last_sides << 1 | f->front_holds) & 7);
  gboolean beside = f->state == KH_STATE_FOLLOW || (f->state == KH_STATE_PIVOT && f->standing);
  if (f->state == KH_STATE_FOLLOW)
    {
      f->last_front = f->front_holds ? r->side_front : f->last_front;
      f->last_rear = f->rear_holds ? r->side_rear : f->last_rear;
      gboolean lost = f->robot->control.lost_by == KH_LOST_BY_FRONT  ? !f->front_holds
                      : f->robot->control.lost_by == KH_LOST_BY_REAR ? !f->rear_holds
                                                                     : !f->front_holds || !f->rear_holds;
      f->n_lost = lost ? f->n_lost + 1 : 0;
    }
  if (!beside || !f->front_holds || !f->rear_holds)
    {
      f->n_both = 0;
      return;
    }
  measure_wall (f, r, &angle, &distance);
  take_means (f, angle, distance);
  if (f->state == KH_STATE_FOLLOW)
    learn_trim (f, angle);
}

static void take_front (KhFollower *f, double reading)
{
  f->front_aged = isnan (reading) ? HUGE_VAL : reading;
  f->n_arming = reading < f->d.front_arms ? f->n_arming + 1 : 0;
}

static int ticks_for (const KhFollower *f, double seconds)
{
  int n = (int)ceil (seconds / f->d.control_period - 1e-9);
  return MAX (n, 1);
}

static void begin_pivot (KhFollower *f)
{
  double angle = MAX (KH_PI / 2 - f->angle, LEAST_PIVOT);
  int n = ticks_for (f, angle / f->d.pivot_rate);
  enter (f, KH_STATE_PIVOT);
  f->standing = FALSE;
  f->n_curves = 0;
  f->n_ticks_left = n;
  f->held = (KhCommand){ 0, f->d.hand_sign * angle / (n * f->d.control_period), TRUE };
  forget_means (f);
}

static void begin_curve (KhFollower *f)
{
  double radius = f->has_means ? kh_derived_curve_radius_mm (&f->d, f->distance) : f->d.pitch / 2;
  double speed = kh_derived_curve_speed_mm_s (f->robot, radius), angle = KH_PI / 2 + f->angle;
  int n = ticks_for (f, angle * radius / speed);
  double seconds = n * f->d.control_period;
  enter (f, KH_STATE_CURVE);
  f->n_curves++;
  f->n_ticks_left = n;
  f->last_sides = 0;
  f->held = (KhCommand){ angle * radius / seconds, -f->d.hand_sign * angle / seconds, FALSE };
  forget_means (f);
}

static void begin_lead_in (KhFollower *f)
{
  double distance = f->distance, angle = f->angle;
  gboolean had = f->has_means;
  enter (f, KH_STATE_LEAD_IN);
  f->has_means = had;
  f->distance = distance;
  f->angle = angle;
  f->n_back = 0;
  f->way_left = kh_derived_lead_in_mm (&f->d, f->robot, distance, angle);
}

static void begin_follow (KhFollower *f)
{
  enter (f, KH_STATE_FOLLOW);
  f->searched = 0;
  f->n_curves = 0;
  f->n_both = 0;
}

/* Ends of the open-loop states, and what follows them. */
static void finish_open_loop (KhFollower *f, const KhReadings *r, gboolean side_fresh, gboolean front_fresh)
{
  if (f->state == KH_STATE_PIVOT && f->n_ticks_left == 0)
    {
      if (!f->standing)
        {
          f->standing = TRUE;
          f->front_aged = HUGE_VAL;
          f->n_arming = 0;
          return; /* the next fresh reading is taken standing */
        }
      if (!front_fresh)
        return;
      /* Standing, one reading is as good as several. */
      f->n_arming = f->n_arming > 0 ? f->robot->control.n_blocked_samples : 0;
      f->standing = FALSE;
      begin_follow (f);
    }
  else if (f->state == KH_STATE_CURVE && f->n_ticks_left == 0)
    {
      if (f->last_sides != 0)
        begin_follow (f);
      else
        begin_curve (f);
    }
  else if (f->state == KH_STATE_LEAD_IN)
    {
      double expected = f->distance - f->robot->side_sensors.offset_mm;
      if (side_fresh && f->front_holds && fabs (r->side_front - expected) <= BACK_WITHIN)
        f->n_back++;
      else if (side_fresh)
        f->n_back = 0;
      if (f->n_back >= 2)
        begin_follow (f);
      else if (f->way_left <= 1e-9)
        begin_curve (f);
    }
}

static gboolean is_blocked (const KhFollower *f)
{
  return (f->state == KH_STATE_FOLLOW || f->state == KH_STATE_SEARCHING)
         && f->n_arming >= f->robot->control.n_blocked_samples && f->front_aged < f->d.front_threshold;
}

static KhCommand follow (const KhFollower *f, const KhReadings *r)
{
  const KhRobotControl *control = &f->robot->control;
  double cruise = f->robot->drive.cruise_mm_s;
  if (f->front_holds && f->rear_holds)
    {
      double angle, distance, s, c;
      measure_wall (f, r, &angle, &distance);
      kh_sincos (angle, &s, &c);
      double w = control->gain_per_s * (f->d.wall_distance - (distance + control->look_ahead_mm * s));
      return (KhCommand){ cruise * c + w * s, f->d.hand_sign * (w * c - cruise * s) / control->look_ahead_mm, FALSE };
    }
  if (f->front_holds)
    {
      double off = f->d.side_reading - r->side_front;
      return (KhCommand){ cruise, f->d.hand_sign * control->gain_per_s * off / f->robot->side_sensors.front_mm, FALSE };
    }
  return (KhCommand){ cruise, 0, FALSE };
}

/* The command of the state as it stands, and what it uses up. */
static KhCommand command (KhFollower *f, const KhReadings *r)
{
  double cruise = f->robot->drive.cruise_mm_s, period = f->d.control_period;
  switch (f->state)
    {
    case KH_STATE_FOLLOW:
      return follow (f, r);
      case KH_STATE_LEAD_IN: {
        double way = MIN (f->way_left, cruise * period);
        f->way_left -= way;
        return (KhCommand){ way / period, 0, FALSE };
      }
    case KH_STATE_CURVE:
    case KH_STATE_PIVOT:
      if (f->n_ticks_left == 0)
        return (KhCommand){ 0, 0, FALSE };
      f->n_ticks_left--;
      return f->held;
    case KH_STATE_SEARCHING:
      f->searched += cruise * period;
      return (KhCommand){ cruise, 0, FALSE };
    default:
      return (KhCommand){ 0, 0, FALSE };
    }
}

static void decide (KhFollower *f, const KhReadings *r, gboolean side_fresh, gboolean front_fresh)
{
  finish_open_loop (f, r, side_fresh, front_fresh);
  if (f->state == KH_STATE_SEARCHING && side_fresh && f->front_holds)
    begin_follow (f);
  if (is_blocked (f))
    begin_pivot (f);
  else if (f->state == KH_STATE_FOLLOW && f->n_lost >= f->robot->control.n_lost_samples)
    {
      begin_lead_in (f);
      if (f->way_left <= 1e-9)
        begin_curve (f);
    }
}

KhCommand kh_follower_step (KhFollower *f, const KhReadings *r, gboolean side_fresh, gboolean front_fresh,
                            gboolean on_mark)
{
  if (side_fresh)
    take_side (f, r);
  if (front_fresh)
    take_front (f, r->front);
  if (on_mark)
    f->state = KH_STATE_STOPPED;
  else
    decide (f, r, side_fresh, front_fresh);
  KhCommand told = command (f, r);
  f->angle_hat += f->d.hand_sign * told.omega * f->d.control_period;
  f->front_aged -= told.v * f->d.control_period;
  if (f->robot->control.trim && f->state != KH_STATE_PIVOT && f->state != KH_STATE_STOPPED)
    told.omega -= f->beta * told.v;
  return told;
}
