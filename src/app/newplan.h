/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>
#include "plan/plan.h"

/* The dialog that begins a plan: size, pitch or clear width, boards.  What
 * cannot be is marked in its place and nothing is made of it. */

typedef void (*KhWithPlan) (KhPlan *plan_taken, gpointer data);
void kh_new_plan_show (GtkWindow *parent, KhWithPlan with_plan, gpointer data); /* data outlives the parent */
