/* SPDX-License-Identifier: MIT */
#pragma once
#include "panels/cutlist.h"
#include "robot/trace.h"

/* CSV (RFC 4180): CRLF, quotes doubled, plain decimals. Owned, UTF-8. */
char *kh_table_dup_cutlist (const KhPlan *plan, const KhCutList *list);
char *kh_table_dup_track (const KhTrace *trace); /* a row a tick */
