/* SPDX-License-Identifier: MIT */
#pragma once
#include "panels/saw_problem.h"

/* Inside the saw plan: the search for the least cost and its proof. */

void kh_saw_search (const KhSawProblem *problem, double seconds, KhJob *job, KhSawOutcome *outcome);
