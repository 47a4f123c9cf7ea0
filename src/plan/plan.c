/* SPDX-License-Identifier: MIT */
#include "plan/plan.h"
#include "plan/lists.h"
#include <string.h>

KhPlan *kh_plan_new (int columns, int rows, int64_t pitch_nm, int64_t thickness_nm, int64_t height_nm)
{
  g_assert (columns >= 1 && rows >= 1 && columns <= KH_LATTICE_MOST && rows <= KH_LATTICE_MOST);
  KhPlan *plan = g_new0 (KhPlan, 1);
  plan->title = g_strdup ("");
  plan->notes = g_strdup ("");
  plan->lattice = (KhLattice){ columns, rows, pitch_nm, NULL };
  plan->walls = (KhWalls){ thickness_nm, height_nm, KH_POSTS_WHERE_WALLS_MEET, NULL };
  plan->walled = g_malloc0 ((gsize)kh_lattice_n_edges (&plan->lattice));
  plan->gap = g_malloc0 ((gsize)kh_lattice_n_cells (&plan->lattice));
  plan->openings = kh_openings_new ();
  plan->marks = kh_marks_new ();
  plan->set_aside = kh_set_aside_new ();
  plan->start.heading = KH_HEADING_NORTH;
  plan->has_start = TRUE;
  kh_robot_init_for_pitch (&plan->robot, pitch_nm);
  kh_build_init (&plan->build);
  for (int i = 0; i < kh_lattice_n_edges (&plan->lattice); i++)
    plan->walled[i] = kh_plan_is_boundary (plan, kh_lattice_edge_at (&plan->lattice, i));
  return plan;
}

KhPlan *kh_plan_copy (const KhPlan *from)
{
  KhPlan *plan = g_new (KhPlan, 1);
  gsize n_edges = (gsize)kh_lattice_n_edges (&from->lattice), n_cells = (gsize)kh_lattice_n_cells (&from->lattice);
  *plan = *from;
  plan->title = g_strdup (from->title);
  plan->notes = g_strdup (from->notes);
  plan->lattice.other = g_strdup (from->lattice.other);
  plan->walls.other = g_strdup (from->walls.other);
  plan->walled = g_memdup2 (from->walled, n_edges);
  plan->gap = g_memdup2 (from->gap, n_cells);
  plan->locked = from->locked ? g_memdup2 (from->locked, n_edges) : NULL;
  plan->openings = kh_openings_copy (from->openings);
  plan->marks = kh_marks_copy (from->marks);
  plan->start.other = g_strdup (from->start.other);
  plan->site.other = g_strdup (from->site.other);
  plan->set_aside = kh_set_aside_copy (from->set_aside);
  kh_robot_copy (&plan->robot, &from->robot);
  kh_build_copy (&plan->build, &from->build);
  plan->other = g_strdup (from->other);
  return plan;
}

void kh_plan_free (KhPlan *plan)
{
  if (!plan)
    return;
  g_free (plan->title);
  g_free (plan->notes);
  g_free (plan->lattice.other);
  g_free (plan->walls.other);
  g_free (plan->walled);
  g_free (plan->gap);
  g_free (plan->locked);
  g_array_unref (plan->openings);
  g_array_unref (plan->marks);
  g_free (plan->start.other);
  g_free (plan->site.other);
  g_array_unref (plan->set_aside);
  kh_robot_clear (&plan->robot);
  kh_build_clear (&plan->build);
  g_free (plan->other);
  g_free (plan);
}

static gboolean start_equal (const KhPlan *a, const KhPlan *b)
{
  if (a->has_start != b->has_start)
    return FALSE;
  return !a->has_start
         || (a->start.cell.column == b->start.cell.column && a->start.cell.row == b->start.cell.row
             && a->start.heading == b->start.heading && g_strcmp0 (a->start.other, b->start.other) == 0);
}

static gboolean site_equal (const KhPlan *a, const KhPlan *b)
{
  if (a->has_site != b->has_site)
    return FALSE;
  return !a->has_site
         || (a->site.width_nm == b->site.width_nm && a->site.depth_nm == b->site.depth_nm
             && a->site.way_past_nm == b->site.way_past_nm && g_strcmp0 (a->site.other, b->site.other) == 0);
}

static gboolean lattice_equal (const KhPlan *a, const KhPlan *b)
{
  return a->lattice.columns == b->lattice.columns && a->lattice.rows == b->lattice.rows
         && a->lattice.pitch_nm == b->lattice.pitch_nm && g_strcmp0 (a->lattice.other, b->lattice.other) == 0
         && a->walls.thickness_nm == b->walls.thickness_nm && a->walls.height_nm == b->walls.height_nm
         && a->walls.posts == b->walls.posts && g_strcmp0 (a->walls.other, b->walls.other) == 0;
}

/* NULL stands for "none locked". */
static gboolean locked_equal (const KhPlan *a, const KhPlan *b, gsize n_edges)
{
  for (gsize i = 0; (a->locked || b->locked) && i < n_edges; i++)
    if ((a->locked ? a->locked[i] : 0) != (b->locked ? b->locked[i] : 0))
      return FALSE;
  return TRUE;
}

gboolean kh_plan_equal (const KhPlan *a, const KhPlan *b)
{
  if (!lattice_equal (a, b))
    return FALSE;
  gsize n_edges = (gsize)kh_lattice_n_edges (&a->lattice), n_cells = (gsize)kh_lattice_n_cells (&a->lattice);
  return strcmp (a->title, b->title) == 0 && strcmp (a->notes, b->notes) == 0
         && memcmp (a->walled, b->walled, n_edges) == 0 && memcmp (a->gap, b->gap, n_cells) == 0
         && locked_equal (a, b, n_edges) && kh_openings_equal (a->openings, b->openings)
         && kh_marks_equal (a->marks, b->marks) && start_equal (a, b) && site_equal (a, b)
         && kh_set_aside_equal (a->set_aside, b->set_aside) && kh_robot_equal (&a->robot, &b->robot)
         && kh_build_equal (&a->build, &b->build) && g_strcmp0 (a->other, b->other) == 0;
}
