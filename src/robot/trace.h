/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/geometry.h"
#include "plan/plan.h"

/* One run of the follower, tick by tick, and how it ended.  Holds no pointer
 * into the plan it came from. */

typedef enum
{
  KH_STATE_FOLLOW, KH_STATE_LEAD_IN, KH_STATE_CURVE, KH_STATE_PIVOT, KH_STATE_SEARCHING, KH_STATE_STOPPED
} KhState;

typedef enum
{
  KH_OUTCOME_ARRIVED, KH_OUTCOME_CONTACT, KH_OUTCOME_LOST, KH_OUTCOME_CIRCLES, KH_OUTCOME_LEFT, KH_OUTCOME_TIME
} KhOutcome;

/* State at the end of a tick: where the axle is, what the sensors last said. */
typedef struct
{
  double x, y, heading_rad;             /* mm */
  float distance_mm;                    /* driven by the axle's centre so far */
  float front_mm, side_front_mm, side_rear_mm; /* NAN: no echo, or out of range */
  float clearance_mm;                   /* body to the nearest wall */
  guint8 state;                         /* KhState during the tick */
  guint8 fresh;                         /* bits: 1 front, 2 side pair read in this tick */
} KhTick;

typedef struct
{
  gsize tick;     /* index of the first tick in the state */
  KhState state;
  KhPose pose;    /* at its beginning */
  KhCell cell;
} KhEvent;

typedef enum { KH_PART_FRONT, KH_PART_REAR, KH_PART_NEAR_SIDE, KH_PART_FAR_SIDE } KhBodyPart; /* near = the hand's side */

typedef struct
{
  KhVec at;        /* the place touched, mm */
  KhBodyPart part;
  double bearing_rad; /* of the place from the axle, in the robot's frame */
  gboolean on_end; /* a wall's end or corner, not its face */
  KhEdge edge;     /* the wall touched */
  KhState state;
  KhCell cell;
} KhContact;

typedef struct
{
  KhHand hand;
  guint64 seed, trial;
  gboolean exact;
  double tick_s;
  GArray *ticks;   /* of KhTick; [0] is the start, before any driving */
  GArray *events;  /* of KhEvent */
  GArray *cells;   /* of KhCell: where the axle stood, one entry a change */
  KhOutcome outcome;
  double time_s, distance_m;
  double least_clearance_mm;
  gsize least_clearance_tick;
  gboolean has_contact;
  KhContact contact;
  char *why;       /* a sentence for people */
} KhTrace;

void kh_trace_free (KhTrace *trace);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhTrace, kh_trace_free)
const KhTick *kh_trace_get_tick (const KhTrace *trace, gsize index);
gsize kh_trace_get_n_ticks (const KhTrace *trace);
gsize kh_trace_find_time (const KhTrace *trace, double time_s);         /* nearest tick, clamped */
gsize kh_trace_find_distance (const KhTrace *trace, double distance_mm); /* first tick at or past; binary search */
const char *kh_state_get_name (KhState state);       /* "lead_in": for files */
const char *kh_state_get_words (KhState state);      /* "wall lost": for people, translated */
const char *kh_outcome_get_name (KhOutcome outcome); /* "arrived": for files */
guint64 kh_trace_hash (const KhTrace *trace);        /* of all poses and states, bit for bit */
