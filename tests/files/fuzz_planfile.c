/* SPDX-License-Identifier: MIT */
/* Any bytes: the reader gives a plan that can be written and read again, or faults. */
#include "files/planfile.h"
#include "files/saworder.h"
#include <string.h>

int LLVMFuzzerTestOneInput (const guint8 *data, size_t n);

int LLVMFuzzerTestOneInput (const guint8 *data, size_t n)
{
  g_autoptr (GPtrArray) faults = NULL;
  g_autoptr (GPtrArray) order_faults = NULL;
  g_autoptr (GPtrArray) again_faults = NULL;
  g_autoptr (KhPlan) plan = kh_plan_file_parse ((const char *) data, n, "x", &faults);
  g_autoptr (KhSawOrder) order = kh_saw_order_parse ((const char *) data, n, "x", &order_faults);
  if (order)
    g_assert_true (kh_saw_order_check (order, NULL)); /* what is read has been checked */
  if (!plan)
    return 0;
  g_autofree char *text = kh_plan_file_dup_text (plan);
  g_autoptr (KhPlan) again = kh_plan_file_parse (text, strlen (text), "x", &again_faults);
  if (!again || !kh_plan_equal (plan, again))
    g_error ("written and read again it is another plan:\n%s", text);
  return 0;
}
