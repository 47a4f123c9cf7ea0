/* SPDX-License-Identifier: MIT */
#pragma once
#include "plan/plan.h"

/* The lists of a plan: arrays that own the texts of what they hold. */

GArray *kh_openings_new (void); /* of KhOpening */
GArray *kh_marks_new (void);    /* of KhMark */
GArray *kh_set_aside_new (void); /* of KhSetAside */
GArray *kh_openings_copy (const GArray *from);
GArray *kh_marks_copy (const GArray *from);
GArray *kh_set_aside_copy (const GArray *from);
gboolean kh_openings_equal (const GArray *a, const GArray *b);
gboolean kh_marks_equal (const GArray *a, const GArray *b);
gboolean kh_set_aside_equal (const GArray *a, const GArray *b);
