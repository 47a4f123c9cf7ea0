/* SPDX-License-Identifier: MIT */
#pragma once
#include "robot/trace.h"

/* How a run ended, as a sentence for people. Owned. 'out_edge' is the edge
 * passed outward, for runs that left. */
char *kh_reason_dup (const KhPlan *plan, const KhTrace *trace, KhCell cell, KhEdge out_edge);
