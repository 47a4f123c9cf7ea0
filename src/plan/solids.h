/* SPDX-License-Identifier: MIT */
#pragma once
#include "base/geometry.h"
#include "plan/plan.h"

/* The wall figure a robot drives among, mm.  See plan/solids.c for the bands. */
typedef struct KhSolids KhSolids;
KhSolids *kh_solids_new (const KhPlan *plan);
void kh_solids_free (KhSolids *solids);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhSolids, kh_solids_free)
