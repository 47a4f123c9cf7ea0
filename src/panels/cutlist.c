/* SPDX-License-Identifier: MIT */
#include "panels/cutlist.h"
#include "base/units.h"
#include "panels/joints.h"
#include <glib/gi18n-lib.h>

G_DEFINE_QUARK (kh - panels - error - quark, kh_panels_error)

const char *kh_point_kind_get_name (KhPointKind kind)
{
  static const char *const names[KH_N_POINT_KINDS] = { "end", "straight", "corner", "tee", "cross" };
  g_assert (kind < KH_N_POINT_KINDS);
  return names[kind];
}

static void panel_clear (gpointer data) { g_free (((KhPanel *)data)->label); }

static void row_clear (gpointer data) { g_array_unref (((KhCutRow *)data)->panels); }

static int compare_length (gconstpointer a, gconstpointer b)
{
  const KhCutRow *x = a, *y = b;
  return (x->length_nm < y->length_nm) - (x->length_nm > y->length_nm);
}

/* Panels of one length in one row, longest first; each panel learns its row. */
static void gather_rows (KhCutList *list, const KhPlan *plan)
{
  g_autoptr (GHashTable) by_length = g_hash_table_new (g_int64_hash, g_int64_equal);
  for (guint i = 0; i < list->panels->len; i++)
    {
      KhPanel *panel = &g_array_index (list->panels, KhPanel, i);
      panel->label = kh_run_dup_label (panel->run);
      list->total_nm += panel->length_nm;
      GArray *panels = g_hash_table_lookup (by_length, &panel->length_nm);
      if (!panels)
        {
          panels = g_array_new (FALSE, FALSE, sizeof (int));
          KhCutRow row = { panel->length_nm, plan->walls.height_nm, plan->walls.thickness_nm, 0, panels };
          g_array_append_val (list->rows, row);
          g_hash_table_insert (by_length, &panel->length_nm, panels);
        }
      g_array_append_val (panels, i);
    }
  g_array_sort (list->rows, compare_length);
  for (guint i = 0; i < list->rows->len; i++)
    {
      KhCutRow *row = &g_array_index (list->rows, KhCutRow, i);
      row->count = (int)row->panels->len;
      for (guint k = 0; k < row->panels->len; k++)
        g_array_index (list->panels, KhPanel, g_array_index (row->panels, int, k)).row = (int)i;
    }
}

static gboolean refuse_joint (KhJoint joint, GError **error)
{
  g_set_error_literal (error, KH_PANELS_ERROR, KH_PANELS_ERROR_JOINT,
                       joint == KH_JOINT_HALVED
                           ? _ ("This plan asks for halved joints. Cut lists are made for butt joints: choose the butt "
                                "joint to get one.")
                           : _ ("This plan asks for grooved posts. Cut lists are made for butt joints: choose the butt "
                                "joint to get one."));
  return FALSE;
}

KhCutList *kh_cut_list_new (const KhPlan *plan, GError **error)
{
  g_autoptr (KhCutList) list = g_new0 (KhCutList, 1);
  list->joint = plan->build.joint;
  list->panels = g_array_new (FALSE, TRUE, sizeof (KhPanel));
  g_array_set_clear_func (list->panels, panel_clear);
  list->rows = g_array_new (FALSE, TRUE, sizeof (KhCutRow));
  g_array_set_clear_func (list->rows, row_clear);
  if (plan->build.joint != KH_JOINT_BUTT)
    {
      refuse_joint (plan->build.joint, error);
      return NULL;
    }
  if (!kh_joints_lay_butt (plan, list->panels, error))
    return NULL;
  gather_rows (list, plan);
  kh_joints_count_points (plan, list->n_points, &list->n_lone_posts);
  return g_steal_pointer (&list);
}

void kh_cut_list_free (KhCutList *list)
{
  if (!list)
    return;
  g_array_unref (list->panels);
  g_array_unref (list->rows);
  g_free (list);
}

void kh_panel_get_box_nm (const KhPanel *panel, const KhPlan *plan, int64_t box[4])
{
  int64_t half = plan->walls.thickness_nm / 2, pitch = plan->lattice.pitch_nm;
  int along = panel->run.axis == KH_AXIS_X ? 0 : 1;
  box[along] = panel->run.from * pitch - panel->ends[0] * half;
  box[along + 2] = panel->run.to * pitch + panel->ends[1] * half;
  box[1 - along] = panel->run.line * pitch - half;
  box[3 - along] = panel->run.line * pitch + half;
}
