/* SPDX-License-Identifier: MIT */
#pragma once
#include "panels/saw.h"

/* A saw plan in words, for people at a terminal: appended to 'text'. */
void kh_saw_words_append (GString *text, const KhSawOrder *order, const KhSawPlan *plan, const char *currency);
