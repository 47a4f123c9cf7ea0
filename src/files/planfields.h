/* SPDX-License-Identifier: MIT */
#pragma once
#include "files/fields.h"
#include "plan/plan.h"

/* The objects of a plan file as tables.  The context of reading is the KhPlan
 * being filled, whose lattice has been read. */
extern const KhFields kh_plan_robot_fields;     /* KhRobot */
extern const KhFields kh_plan_build_fields;     /* KhBuild */
extern const KhFields kh_plan_lattice_fields;   /* KhLattice */
extern const KhFields kh_plan_walls_fields;     /* KhWalls, "runs" left to special hands */
extern const KhFields kh_plan_opening_fields;   /* KhOpening */
extern const KhFields kh_plan_mark_fields;      /* KhMark */
extern const KhFields kh_plan_start_fields;     /* KhStart */
extern const KhFields kh_plan_site_fields;      /* KhSite */
extern const KhFields kh_plan_set_aside_fields; /* KhSetAside */

/* [c1, r1, c2, r2] -> run within the lattice, or the fault told. */
gboolean kh_plan_read_run (KhReader *reader, KhNode node, const KhLattice *lattice, KhRun *run);
void kh_plan_write_run (GString *json, KhRun run);
/* "[…]" of such runs, read one after another. */
void kh_plan_read_runs (KhReader *reader, KhNode node, const KhLattice *lattice, guint8 *edges);
