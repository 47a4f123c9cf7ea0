/* SPDX-License-Identifier: MIT */
#pragma once
#include "panels/saw.h"

/* A bare saw order (JSON) -> KhSawOrder; faults as in planfile.h. */
KhSawOrder *kh_saw_order_parse (const char *bytes, gsize n, const char *name, GPtrArray **faults);
