/* SPDX-License-Identifier: MIT */
#include "plan/finding.h"

KhFinding *kh_finding_new (const char *static_code, KhSeverity severity, double column, double row)
{
  KhFinding *finding = g_new0 (KhFinding, 1);
  finding->code = static_code;
  finding->severity = severity;
  finding->at[0] = column;
  finding->at[1] = row;
  finding->cells = g_array_new (FALSE, FALSE, sizeof (KhCell));
  finding->edges = g_array_new (FALSE, FALSE, sizeof (KhEdge));
  finding->wrong = g_strdup ("");
  finding->effect = g_strdup ("");
  return finding;
}

void kh_finding_free (KhFinding *finding)
{
  if (!finding)
    return;
  g_array_unref (finding->cells);
  g_array_unref (finding->edges);
  g_free (finding->wrong);
  g_free (finding->effect);
  g_free (finding->reason);
  g_free (finding);
}

char *kh_finding_dup_text (const KhFinding *finding)
{
  return *finding->effect ? g_strconcat (finding->wrong, " ", finding->effect, NULL) : g_strdup (finding->wrong);
}

const char *kh_severity_get_name (KhSeverity severity)
{
  static const char *const names[] = { "breaks", "hinders", "notes" };
  return names[severity];
}
