/* SPDX-License-Identifier: MIT */
#include "plan/build.h"
#include "base/units.h"
#include <string.h>

static void stock_clear (gpointer data)
{
  KhStock *stock = data;
  g_free (stock->name);
  g_free (stock->other);
}

static void kit_panel_clear (gpointer data) { g_free (((KhKitPanel *)data)->other); }

static GArray *stock_array_new (void)
{
  GArray *array = g_array_new (FALSE, FALSE, sizeof (KhStock));
  g_array_set_clear_func (array, stock_clear);
  return array;
}

static GArray *kit_array_new (void)
{
  GArray *array = g_array_new (FALSE, FALSE, sizeof (KhKitPanel));
  g_array_set_clear_func (array, kit_panel_clear);
  return array;
}

void kh_build_init (KhBuild *build)
{
  *build = (KhBuild){
    .post_nm = KH_LENGTH_OPEN_NM,
    .groove_nm = 8 * KH_NM_PER_MM,
    .fit_nm = KH_NM_PER_MM / 2,
    .slot_play_nm = KH_NM_PER_MM * 4 / 10,
    .longest_panel_nm = 1200 * KH_NM_PER_MM,
    .loose_sections = g_array_new (FALSE, FALSE, sizeof (KhRun)),
    .saw = { .kerf_nm = 3 * KH_NM_PER_MM, .end_trim_nm = 5 * KH_NM_PER_MM, .keep_offcut_nm = 150 * KH_NM_PER_MM },
    .currency = g_strdup (""),
    .stock = stock_array_new (),
    .kit = kit_array_new (),
  };
  /* A common board length (common practice, no source). */
  KhStock strip = { .name = g_strdup (""),
                    .form = KH_STOCK_STRIP,
                    .length_nm = 2440 * KH_NM_PER_MM,
                    .thickness_nm = KH_LENGTH_OPEN_NM,
                    .count = KH_COUNT_ANY,
                    .price_milli = KH_PRICE_NONE };
  g_array_append_val (build->stock, strip);
}

void kh_build_copy (KhBuild *build, const KhBuild *from)
{
  *build = *from;
  build->loose_sections = g_array_copy (from->loose_sections);
  build->currency = g_strdup (from->currency);
  build->other = g_strdup (from->other);
  build->saw.other = g_strdup (from->saw.other);
  build->fittings.other = g_strdup (from->fittings.other);
  build->stock = stock_array_new ();
  for (guint i = 0; i < from->stock->len; i++)
    {
      KhStock stock = g_array_index (from->stock, KhStock, i);
      stock.name = g_strdup (stock.name);
      stock.other = g_strdup (stock.other);
      g_array_append_val (build->stock, stock);
    }
  build->kit = kit_array_new ();
  for (guint i = 0; i < from->kit->len; i++)
    {
      KhKitPanel panel = g_array_index (from->kit, KhKitPanel, i);
      panel.other = g_strdup (panel.other);
      g_array_append_val (build->kit, panel);
    }
}

void kh_build_clear (KhBuild *build)
{
  g_clear_pointer (&build->loose_sections, g_array_unref);
  g_clear_pointer (&build->stock, g_array_unref);
  g_clear_pointer (&build->kit, g_array_unref);
  g_clear_pointer (&build->currency, g_free);
  g_clear_pointer (&build->other, g_free);
  g_clear_pointer (&build->saw.other, g_free);
  g_clear_pointer (&build->fittings.other, g_free);
}

static gboolean stock_equal (const KhStock *a, const KhStock *b)
{
  return g_strcmp0 (a->name, b->name) == 0 && a->form == b->form && a->length_nm == b->length_nm
         && a->width_nm == b->width_nm && a->thickness_nm == b->thickness_nm && a->grain == b->grain
         && a->count == b->count && a->price_milli == b->price_milli && g_strcmp0 (a->other, b->other) == 0;
}

static gboolean lists_equal (const KhBuild *a, const KhBuild *b)
{
  if (a->stock->len != b->stock->len || a->kit->len != b->kit->len || a->loose_sections->len != b->loose_sections->len)
    return FALSE;
  for (guint i = 0; i < a->stock->len; i++)
    if (!stock_equal (&g_array_index (a->stock, KhStock, i), &g_array_index (b->stock, KhStock, i)))
      return FALSE;
  for (guint i = 0; i < a->kit->len; i++)
    {
      const KhKitPanel *x = &g_array_index (a->kit, KhKitPanel, i), *y = &g_array_index (b->kit, KhKitPanel, i);
      if (x->length_nm != y->length_nm || x->count != y->count || g_strcmp0 (x->other, y->other) != 0)
        return FALSE;
    }
  for (guint i = 0; i < a->loose_sections->len; i++)
    {
      const KhRun *x = &g_array_index (a->loose_sections, KhRun, i), *y = &g_array_index (b->loose_sections, KhRun, i);
      if (x->axis != y->axis || x->line != y->line || x->from != y->from || x->to != y->to)
        return FALSE;
    }
  return TRUE;
}

gboolean kh_build_equal (const KhBuild *a, const KhBuild *b)
{
  return a->joint == b->joint && a->ends == b->ends && a->post_nm == b->post_nm && a->groove_nm == b->groove_nm
         && a->fit_nm == b->fit_nm && a->posts_stand == b->posts_stand && a->slot_play_nm == b->slot_play_nm
         && a->longest_panel_nm == b->longest_panel_nm && a->saw.kerf_nm == b->saw.kerf_nm
         && a->saw.end_trim_nm == b->saw.end_trim_nm && a->saw.keep_offcut_nm == b->saw.keep_offcut_nm
         && g_strcmp0 (a->saw.other, b->saw.other) == 0 && g_strcmp0 (a->currency, b->currency) == 0
         && a->fittings.screws_per_joint == b->fittings.screws_per_joint
         && a->fittings.brackets_per_joint == b->fittings.brackets_per_joint
         && a->fittings.feet_spacing_nm == b->fittings.feet_spacing_nm
         && g_strcmp0 (a->fittings.other, b->fittings.other) == 0 && g_strcmp0 (a->other, b->other) == 0
         && lists_equal (a, b);
}
