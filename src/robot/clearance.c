/* SPDX-License-Identifier: MIT */
#include "robot/clearance.h"
#include "base/elementary.h"
#include <math.h>

static KhVec nearest_in_box (KhBox box, KhVec point)
{
  return (KhVec){ CLAMP (point.x, box.x0, box.x1), CLAMP (point.y, box.y0, box.y1) };
}

static double square_distance (KhVec a, KhVec b) { return (a.x - b.x) * (a.x - b.x) + (a.y - b.y) * (a.y - b.y); }

/* How far one may look from (x, y) within the block of bands without leaving it. */
static double reach (const KhSolids *solids, KhVec c, int i0, int i1, int j0, int j1)
{
  double along_x = MIN (c.x - solids->edge_x[i0], solids->edge_x[i1 + 1] - c.x);
  double along_y = MIN (c.y - solids->edge_y[j0], solids->edge_y[j1 + 1] - c.y);
  return MIN (along_x, along_y);
}

/* The centre's distance to the walls in the (2 rings + 1)-square of bands about
 * it. TRUE: no wall outside that square can be nearer. */
static gboolean look (const KhSolids *solids, KhVec c, int rings, KhClearance *out)
{
  int i = kh_solids_find_band (solids, c.x, solids->n_x), j = kh_solids_find_band (solids, c.y, solids->n_y);
  int i0 = MAX (i - rings, 0), i1 = MIN (i + rings, solids->n_x - 1);
  int j0 = MAX (j - rings, 0), j1 = MIN (j + rings, solids->n_y - 1);
  double best = HUGE_VAL;
  out->i = out->j = -1;
  for (int b = j0; b <= j1; b++)
    for (int a = i0; a <= i1; a++)
      if (solids->band[(gsize)b * (gsize)solids->n_x + (gsize)a] == KH_BAND_WALL)
        {
          KhVec near = nearest_in_box (kh_solids_get_box (solids, a, b), c);
          double d = square_distance (near, c);
          if (d < best)
            {
              best = d;
              out->at = near;
              out->i = a;
              out->j = b;
            }
        }
  double within = reach (solids, c, i0, i1, j0, j1);
  out->distance = out->i >= 0 ? sqrt (best) : within;
  return out->i >= 0 && out->distance <= within;
}

static void clear_disc (const KhSolids *solids, double radius, KhVec centre, KhClearance *out)
{
  if (!look (solids, centre, 1, out))
    look (solids, centre, 3, out);
  out->distance = MAX (out->distance - radius, 0.0);
}

typedef struct
{
  KhPose pose;
  double sine, cosine;
  KhBox own; /* in the robot's frame: ahead along x, left along y */
  KhVec corner[4];
} BoxBody;

static KhVec to_own (const BoxBody *body, KhVec p)
{
  double x = p.x - body->pose.x, y = p.y - body->pose.y;
  return (KhVec){ x * body->cosine + y * body->sine, -x * body->sine + y * body->cosine };
}

static KhVec to_plane (const BoxBody *body, KhVec own)
{
  return (KhVec){ body->pose.x + own.x * body->cosine - own.y * body->sine,
                  body->pose.y + own.x * body->sine + own.y * body->cosine };
}

/* Separating axes (Gottschalk, Lin, Manocha 1996): the four of two rectangles. */
static gboolean overlaps (const BoxBody *body, KhBox wall, const KhVec wall_own[4])
{
  double least_x = HUGE_VAL, most_x = -HUGE_VAL, least_y = HUGE_VAL, most_y = -HUGE_VAL;
  for (int k = 0; k < 4; k++)
    {
      least_x = MIN (least_x, body->corner[k].x);
      most_x = MAX (most_x, body->corner[k].x);
      least_y = MIN (least_y, body->corner[k].y);
      most_y = MAX (most_y, body->corner[k].y);
    }
  if (most_x < wall.x0 || least_x > wall.x1 || most_y < wall.y0 || least_y > wall.y1)
    return FALSE;
  least_x = least_y = HUGE_VAL;
  most_x = most_y = -HUGE_VAL;
  for (int k = 0; k < 4; k++)
    {
      least_x = MIN (least_x, wall_own[k].x);
      most_x = MAX (most_x, wall_own[k].x);
      least_y = MIN (least_y, wall_own[k].y);
      most_y = MAX (most_y, wall_own[k].y);
    }
  return !(most_x < body->own.x0 || least_x > body->own.x1 || most_y < body->own.y0 || least_y > body->own.y1);
}

/* Of two rectangles that do not overlap the nearest places lie at a corner of
 * one of them. */
static double box_to_wall (const BoxBody *body, KhBox wall, KhVec *at)
{
  const KhVec corners[4] = { { wall.x0, wall.y0 }, { wall.x1, wall.y0 }, { wall.x1, wall.y1 }, { wall.x0, wall.y1 } };
  KhVec own[4];
  double best = HUGE_VAL;
  for (int k = 0; k < 4; k++)
    own[k] = to_own (body, corners[k]);
  for (int k = 0; k < 4; k++)
    {
      KhVec near = nearest_in_box (wall, body->corner[k]);
      double d = square_distance (near, body->corner[k]);
      double e = square_distance (nearest_in_box (body->own, own[k]), own[k]);
      if (d < best)
        {
          best = d;
          *at = near;
        }
      if (e < best)
        {
          best = e;
          *at = corners[k];
        }
    }
  return overlaps (body, wall, own) ? 0.0 : sqrt (best);
}

static void clear_box (const KhSolids *solids, const KhRobotBody *shape, KhPose pose, KhClearance *out)
{
  BoxBody body
      = { .pose = pose, .own = { -shape->behind_mm, -shape->half_width_mm, shape->ahead_mm, shape->half_width_mm } };
  kh_sincos (pose.heading_rad, &body.sine, &body.cosine);
  const KhVec own[4] = { { body.own.x0, body.own.y0 },
                         { body.own.x1, body.own.y0 },
                         { body.own.x1, body.own.y1 },
                         { body.own.x0, body.own.y1 } };
  double swept = 0;
  for (int k = 0; k < 4; k++)
    {
      body.corner[k] = to_plane (&body, own[k]);
      swept = MAX (swept, sqrt (own[k].x * own[k].x + own[k].y * own[k].y));
    }
  double look_out = swept + solids->pitch;
  int i0 = kh_solids_find_band (solids, pose.x - look_out, solids->n_x),
      i1 = kh_solids_find_band (solids, pose.x + look_out, solids->n_x);
  int j0 = kh_solids_find_band (solids, pose.y - look_out, solids->n_y),
      j1 = kh_solids_find_band (solids, pose.y + look_out, solids->n_y);
  out->distance = solids->pitch;
  out->i = out->j = -1;
  for (int j = j0; j <= j1; j++)
    for (int i = i0; i <= i1; i++)
      if (solids->band[(gsize)j * (gsize)solids->n_x + (gsize)i] == KH_BAND_WALL)
        {
          KhBox wall = kh_solids_get_box (solids, i, j);
          KhVec at;
          /* Too far away to matter, seen from the centre. */
          if (kh_box_distance (wall, (KhVec){ pose.x, pose.y }) - swept >= out->distance)
            continue;
          double d = box_to_wall (&body, wall, &at);
          if (d < out->distance)
            *out = (KhClearance){ d, at, i, j };
        }
}

void kh_clearance (const KhSolids *solids, const KhRobotBody *body, KhPose pose, KhClearance *clearance)
{
  if (body->shape == KH_BODY_DISC)
    clear_disc (solids, body->radius_mm, (KhVec){ pose.x, pose.y }, clearance);
  else
    clear_box (solids, body, pose, clearance);
}
