/* SPDX-License-Identifier: MIT */
#pragma once
#include "robot/derived.h"
#include "robot/sensors.h"
#include "robot/trace.h"

/* The robot's own program: keeps one hand on the wall. One state at a time.
 *
 *   follow     off-centre kinematic control of a point 'look_ahead' before the
 *              axle (input-output linearisation of the unicycle; Siciliano et
 *              al., Robotics: Modelling, Planning and Control, 2009, ch. 11)
 *   lead_in    the wall is lost: straight on until the axle is at its end
 *   curve      open loop round the wall's end, toward the hand
 *   pivot      open loop in place before a wall ahead, away from the hand, then
 *              standing until a fresh front reading
 *   searching  straight on before a wall was ever held
 *   stopped    over a mark
 *
 * It sees readings and its own commands only, never the plan or its pose. Angles are
 * signed so that positive means the nose turned away from the wall; both hands are the
 * same code mirrored by hand_sign. A plain struct without pointers to itself: copy it to fork a run. */

typedef struct
{
  double v, omega;  /* mm/s, rad/s counter-clockwise, before the wheels' limit */
  gboolean turning; /* an open-loop pivot moves: its time may be off */
} KhCommand;

typedef struct
{
  const KhRobot *robot;
  KhDerived d;
  KhState state;
  int n_acts;                       /* states begun: two turns on end are two */

  /* follow: what the side sensors hold */
  double last_front, last_rear;     /* last readings that were a wall; INFINITY: none since follow began */
  gboolean front_holds, rear_holds; /* the newest readings are a wall */
  int n_lost;
  double angle, distance;           /* means for lead-in, curve and pivot */
  gboolean has_means;

  /* blocked */
  int n_arming;
  double front_aged;                /* the newest reading, less the way commanded since; INFINITY: none */

  /* open loop: ticks and way left, command held */
  int n_ticks_left;
  double way_left;
  KhCommand held;
  gboolean standing;                /* after a pivot, until a fresh front reading */
  int n_back;                       /* lead-in: readings that show the wall again */
  int n_curves;                     /* in a row */
  guint8 last_sides;                /* bits: the last three front side readings that were a wall, newest lowest */
  double searched;                  /* mm driven searching, since the last wall */

  /* trim */
  double angle_hat, beta;           /* rad; rad/mm */
  int n_both;                       /* readings with both sensors in a row */
} KhFollower;

void kh_follower_init (KhFollower *follower, const KhPlan *plan, KhHand hand);

/* One control tick. 'side_fresh', 'front_fresh': the readings are new in this
 * tick. 'on_mark': the floor sensor sees a mark. */
KhCommand kh_follower_step (KhFollower *follower, const KhReadings *readings, gboolean side_fresh, gboolean front_fresh,
                            gboolean on_mark);
/* A fifth curve in a row was begun: it does not find the wall again. */
gboolean kh_follower_is_lost (const KhFollower *follower);
