/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/plan.h"

/* Every edit as a value.  Applying a change gives the change that takes it
 * back, so that undo and redo are the same act.  A change owns all it holds and
 * never points into a plan.  Cost: the size of what it changes. */

typedef struct KhChange KhChange;

/* Takes away or lays each edge of 'edges' (of KhEdge; copied). */
KhChange *kh_change_new_walls (const KhEdge *edges, gsize n, gboolean walled);
KhChange *kh_change_new_gaps (const KhCell *cells, gsize n, gboolean gap);
KhChange *kh_change_new_locked (const KhEdge *edges, gsize n, gboolean locked);
KhChange *kh_change_new_openings (const KhOpening *openings, gsize n); /* the whole list anew */
KhChange *kh_change_new_marks (const KhMark *marks, gsize n);
KhChange *kh_change_new_start (const KhStart *start_or_null);
KhChange *kh_change_new_robot (const KhRobot *robot);
KhChange *kh_change_new_build (const KhBuild *build);
KhChange *kh_change_new_wall_sizes (int64_t thickness_nm, int64_t height_nm, KhPosts posts);
KhChange *kh_change_new_texts (const char *title, const char *notes);
KhChange *kh_change_new_site (const KhSite *site_or_null);
KhChange *kh_change_new_set_aside (const KhSetAside *list, gsize n);
KhChange *kh_change_new_plan (const KhPlan *plan); /* all of it: another size, another layout */
/* Several as one, applied in order; takes the changes in 'changes' (of KhChange *, taken). */
KhChange *kh_change_new_group_take (GPtrArray *changes);
KhChange *kh_change_copy (const KhChange *change);
void kh_change_free (KhChange *change);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhChange, kh_change_free)

/* TRUE when applying would leave the plan as it is. */
gboolean kh_change_is_idle (const KhChange *change, const KhPlan *plan);

/* Applies to *plan and returns the change back (owned).  What it names must lie
 * within the plan's lattice (asserted). */
KhChange *kh_change_apply (const KhChange *change, KhPlan *plan);
