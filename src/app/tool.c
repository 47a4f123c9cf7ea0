/* SPDX-License-Identifier: MIT */
#include "app/tool.h"

#include <math.h>
#include <pango/pangocairo.h>

static const KhTool *const tools[KH_N_TOOLS] = {
  [KH_TOOL_WALLS] = &kh_tool_walls, [KH_TOOL_FLOOR] = &kh_tool_floor,     [KH_TOOL_MARK] = &kh_tool_mark,
  [KH_TOOL_START] = &kh_tool_start, [KH_TOOL_OPENING] = &kh_tool_opening,
};

const KhTool *kh_tool_get (KhToolId id)
{
  g_assert (id < KH_N_TOOLS);
  return tools[id];
}

int kh_tool_find (const char *name)
{
  for (int i = 0; i < KH_N_TOOLS; i++)
    if (strcmp (tools[i]->name, name) == 0)
      return i;
  return -1;
}

void kh_edit_free (KhEdit *edit)
{
  if (edit == NULL)
    return;
  g_clear_pointer (&edit->change, kh_change_free);
  g_free (edit->words);
  g_free (edit->notice);
  g_free (edit);
}

KhEdit *kh_edit_new_take (KhChange *change, char *words)
{
  KhEdit *edit = g_new0 (KhEdit, 1);
  edit->change = change;
  edit->words = words;
  return edit;
}

KhEdit *kh_edit_new_notice_take (char *notice)
{
  KhEdit *edit = g_new0 (KhEdit, 1);
  edit->notice = notice;
  return edit;
}

gboolean kh_place_get_cell (const KhPlan *plan, KhVec mm, KhCell *cell)
{
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  double column = floor (mm.x / pitch), row = floor (mm.y / pitch);
  if (column < 0 || row < 0 || column >= plan->lattice.columns || row >= plan->lattice.rows)
    return FALSE;
  *cell = (KhCell){ (int)column, (int)row };
  return TRUE;
}

gboolean kh_place_get_edge (const KhPlan *plan, KhVec mm, double share, KhEdge *edge)
{
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  double x = mm.x / pitch, y = mm.y / pitch;
  double across_x = fabs (y - round (y)), across_y = fabs (x - round (x));
  KhEdge found;
  if (across_x <= across_y)
    found = (KhEdge){ KH_AXIS_X, (int)CLAMP (floor (x), -1e6, 1e6), (int)CLAMP (round (y), -1e6, 1e6) };
  else
    found = (KhEdge){ KH_AXIS_Y, (int)CLAMP (round (x), -1e6, 1e6), (int)CLAMP (floor (y), -1e6, 1e6) };
  if (MIN (across_x, across_y) > share || !kh_lattice_has_edge (&plan->lattice, found))
    return FALSE;
  *edge = found;
  return TRUE;
}

KhVec kh_cell_middle_mm (const KhPlan *plan, KhCell cell)
{
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  return (KhVec){ (cell.column + 0.5) * pitch, (cell.row + 0.5) * pitch };
}

KhVec kh_edge_middle_mm (const KhPlan *plan, KhEdge edge)
{
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  return (KhVec){ (edge.column + (edge.axis == KH_AXIS_X ? 0.5 : 0)) * pitch,
                  (edge.row + (edge.axis == KH_AXIS_Y ? 0.5 : 0)) * pitch };
}

void kh_edge_get_box_mm (const KhPlan *plan, KhEdge edge, KhBox *box)
{
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  double half = kh_mm_from_nm (plan->walls.thickness_nm) / 2;
  KhPoint ends[2];
  kh_edge_get_points (edge, ends);
  box->x0 = ends[0].column * pitch - half;
  box->y0 = ends[0].row * pitch - half;
  box->x1 = ends[1].column * pitch + half;
  box->y1 = ends[1].row * pitch + half;
}

void kh_ghost_box (const KhGhostScene *scene, cairo_t *cr, KhBox mm, gboolean take_away)
{
  KhVec a = kh_view_to_device (scene->view, (KhVec){ mm.x0, mm.y1 });
  KhVec b = kh_view_to_device (scene->view, (KhVec){ mm.x1, mm.y0 });
  double width = MAX (b.x - a.x, 2), height = MAX (b.y - a.y, 2);
  double line = scene->high_contrast ? 2 : 1.5;
  static const double dashes[] = { 4, 3 };

  cairo_save (cr);
  cairo_rectangle (cr, a.x, a.y, width, height);
  if (take_away)
    {
      /* what goes is crossed out over its own colour, so that form says it, too */
      kh_palette_set_source (cr, scene->scheme, KH_INK_FLOOR, 0.75);
      cairo_fill_preserve (cr);
      kh_palette_set_source (cr, scene->scheme, KH_INK_CONTACT, 1);
      cairo_set_dash (cr, dashes, 2, 0);
    }
  else
    {
      kh_palette_set_source (cr, scene->scheme, KH_INK_SIGN, 0.35);
      cairo_fill_preserve (cr);
      kh_palette_set_source (cr, scene->scheme, KH_INK_SIGN, 1);
    }
  cairo_set_line_width (cr, line);
  cairo_stroke (cr);
  if (take_away)
    {
      double reach = 4, x = a.x + width / 2, y = a.y + height / 2;
      cairo_set_dash (cr, NULL, 0, 0);
      cairo_move_to (cr, x - reach, y - reach);
      cairo_line_to (cr, x + reach, y + reach);
      cairo_move_to (cr, x - reach, y + reach);
      cairo_line_to (cr, x + reach, y - reach);
      cairo_stroke (cr);
    }
  cairo_restore (cr);
}

void kh_ghost_label (const KhGhostScene *scene, cairo_t *cr, KhVec mm, const char *text)
{
  KhVec at = kh_view_to_device (scene->view, mm);
  PangoLayout *layout = pango_cairo_create_layout (cr);
  PangoFontDescription *font = pango_font_description_from_string ("Sans");
  int width, height;
  pango_font_description_set_absolute_size (font, 11 * PANGO_SCALE);
  pango_layout_set_font_description (layout, font);
  pango_layout_set_text (layout, text, -1);
  pango_layout_get_pixel_size (layout, &width, &height);
  kh_palette_set_source (cr, scene->scheme, KH_INK_FLOOR, 0.85);
  cairo_rectangle (cr, at.x - width / 2.0 - 4, at.y - height / 2.0 - 1, width + 8, height + 2);
  cairo_fill (cr);
  kh_palette_set_source (cr, scene->scheme, KH_INK_SIGN_WORDS, 1);
  cairo_move_to (cr, at.x - width / 2.0, at.y - height / 2.0);
  pango_cairo_show_layout (cr, layout);
  pango_font_description_free (font);
  g_object_unref (layout);
}
