/* SPDX-License-Identifier: MIT */
#include "draw/sawpicture.h"
#include "base/units.h"
#include "draw/pen.h"
#include <glib/gi18n-lib.h>
#include <math.h>

#define ROW_PX 42
#define STRIP_PX 36
#define LEFT_PX 36
#define RIGHT_PX 12
#define FOOT_PX 24

/* One piece of a strip as drawn: device units along the strip. */
typedef struct
{
  double x, width;
  int row;           /* of the cut list */
  const char *label; /* borrowed */
  int64_t length_nm;
} Piece;

typedef void (*PieceFunc) (const Piece *piece, int strip, gpointer data);
typedef void (*StripFunc) (const KhPattern *pattern, int strip, double end_x, gpointer data);

static double px_of (const KhSawPicture *picture) { return picture->text_size / 11; }

static int row_of (const KhCutList *list, int64_t length_nm)
{
  for (guint i = 0; i < list->rows->len; i++)
    if (g_array_index (list->rows, KhCutRow, i).length_nm == length_nm)
      return (int)i;
  return -1;
}

/* mm -> device units, so that the longest board fills the width. */
static double scale_of (const KhSawPicture *picture, const KhReview *review)
{
  int64_t longest = 1;
  for (guint i = 0; i < review->saw_plan->patterns->len; i++)
    {
      const KhPattern *pattern = &g_array_index (review->saw_plan->patterns, KhPattern, i);
      longest = MAX (longest, g_array_index (review->saw_order->stock, KhSawStock, pattern->stock).length_nm);
    }
  return MAX (picture->width - (LEFT_PX + RIGHT_PX) * px_of (picture), 10) / kh_mm_from_nm (longest);
}

/* Walks all strips in order; labels are handed out in the order of the list. */
static void walk (const KhSawPicture *picture, const KhReview *review, PieceFunc on_piece, StripFunc on_strip,
                  gpointer data)
{
  const KhCutList *list = review->cut_list;
  double px = px_of (picture), scale = scale_of (picture, review);
  double kerf = kh_mm_from_nm (review->saw_order->kerf_nm) * scale,
         trim = kh_mm_from_nm (review->saw_order->end_trim_nm) * scale;
  g_autofree guint *used = g_new0 (guint, list->rows->len + 1);
  int strip = 0;
  for (guint p = 0; p < review->saw_plan->patterns->len; p++)
    {
      const KhPattern *pattern = &g_array_index (review->saw_plan->patterns, KhPattern, p);
      for (int copy = 0; copy < pattern->count; copy++, strip++)
        {
          double x = LEFT_PX * px + trim;
          for (guint k = 0; k < pattern->cuts->len; k++)
            {
              const KhSawCut *cut = &g_array_index (pattern->cuts, KhSawCut, k);
              int row = row_of (list, cut->length_nm);
              for (int n = 0; n < cut->count; n++)
                {
                  Piece piece = { x, kh_mm_from_nm (cut->length_nm) * scale, row, "", cut->length_nm };
                  const GArray *panels = row >= 0 ? g_array_index (list->rows, KhCutRow, row).panels : NULL;
                  if (panels && used[row] < panels->len)
                    piece.label = g_array_index (list->panels, KhPanel, g_array_index (panels, int, used[row]++)).label;
                  if (on_piece)
                    on_piece (&piece, strip, data);
                  x += piece.width + kerf;
                }
            }
          if (on_strip)
            on_strip (pattern, strip, x, data);
        }
    }
}

static gboolean has_plan (const KhReview *review)
{
  return review && review->saw_plan && review->saw_order && review->cut_list && review->saw_plan->cannot_cut->len == 0;
}

double kh_saw_picture_get_height (const KhSawPicture *picture, const KhReview *review)
{
  int n = 0;
  if (!has_plan (review))
    return 0;
  for (guint i = 0; i < review->saw_plan->patterns->len; i++)
    n += g_array_index (review->saw_plan->patterns, KhPattern, i).count;
  return (n * ROW_PX + FOOT_PX) * px_of (picture);
}

typedef struct
{
  const KhSawPicture *picture;
  const KhReview *review;
  cairo_t *cr;
  double clip0, clip1;
} Drawing;

static void ink (const Drawing *d, KhInk which, double alpha)
{
  kh_palette_set_source (d->cr, d->picture->scheme, which, alpha);
}

static gboolean is_seen (const Drawing *d, double y, double px) { return y + ROW_PX * px >= d->clip0 && y <= d->clip1; }

static void draw_piece (const Piece *piece, int strip, gpointer data)
{
  const Drawing *d = data;
  double px = px_of (d->picture), y = strip * ROW_PX * px, height = STRIP_PX * px;
  gboolean lit = piece->row >= 0 && piece->row == d->picture->lit_row;
  if (!is_seen (d, y, px))
    return;
  cairo_rectangle (d->cr, piece->x, y, piece->width, height);
  ink (d, lit ? KH_INK_LIT : KH_INK_PANEL, 1);
  cairo_fill_preserve (d->cr);
  ink (d, lit ? KH_INK_LIT : KH_INK_LINE, 1);
  cairo_set_line_width (d->cr, px);
  cairo_stroke (d->cr);
  if (lit)
    {
      cairo_rectangle (d->cr, piece->x + 3 * px, y + 3 * px, MAX (piece->width - 6 * px, 0), height - 6 * px);
      ink (d, KH_INK_FLOOR, 1);
      cairo_stroke (d->cr);
    }
  if (piece->width < 20 * px)
    return;
  g_autofree char *length = kh_length_dup_text (piece->length_nm, KH_LENGTH_UNIT_MM, FALSE);
  KhWords words
      = { piece->x + piece->width / 2, y + 0.32 * height, 12.5 * px, TRUE, KH_ALIGN_MIDDLE, 0, piece->width - 4 * px };
  ink (d, lit ? KH_INK_FLOOR : KH_INK_TEXT, 1);
  kh_pen_words (d->cr, &words, length);
  words.y = y + 0.74 * height;
  words.size = 10.5 * px;
  words.bold = FALSE;
  ink (d, lit ? KH_INK_FLOOR : KH_INK_TEXT_SECOND, 1);
  kh_pen_words (d->cr, &words, piece->label);
}

static void draw_strip (const KhPattern *pattern, int strip, double end_x, gpointer data)
{
  const Drawing *d = data;
  double px = px_of (d->picture), scale = scale_of (d->picture, d->review), y = strip * ROW_PX * px,
         height = STRIP_PX * px;
  double right
      = LEFT_PX * px
        + kh_mm_from_nm (g_array_index (d->review->saw_order->stock, KhSawStock, pattern->stock).length_nm) * scale;
  if (!is_seen (d, y, px))
    return;
  if (right > end_x)
    {
      cairo_rectangle (d->cr, end_x, y, right - end_x, height);
      ink (d, KH_INK_LINE, 1);
      kh_pen_hatch (d->cr, 7 * px, 0.9 * px, FALSE);
    }
  cairo_rectangle (d->cr, LEFT_PX * px, y, right - LEFT_PX * px, height);
  ink (d, KH_INK_TEXT_SECOND, 0.8);
  cairo_set_line_width (d->cr, px);
  cairo_stroke (d->cr);
  g_autofree char *number = g_strdup_printf ("%d", strip + 1);
  KhWords words = { (LEFT_PX - 10) * px, y + height / 2, 13 * px, TRUE, KH_ALIGN_END, 0, 0 };
  ink (d, KH_INK_TEXT, 1);
  kh_pen_words (d->cr, &words, number);
  if (pattern->left_nm >= d->review->saw_order->keep_offcut_nm && right - end_x > 70 * px)
    {
      g_autofree char *left = kh_length_dup_text (pattern->left_nm, KH_LENGTH_UNIT_MM, TRUE);
      g_autofree char *text = g_strdup_printf (_ ("keep %s"), left);
      double w, h;
      kh_pen_measure (d->cr, 12 * px, TRUE, text, &w, &h);
      double middle = (end_x + right) / 2;
      cairo_rectangle (d->cr, middle - w / 2 - 4 * px, y + height / 2 - h / 2, w + 8 * px, h);
      ink (d, KH_INK_DESK, 1);
      cairo_fill (d->cr);
      words = (KhWords){ middle, y + height / 2, 12 * px, TRUE, KH_ALIGN_MIDDLE, 0, 0 };
      ink (d, KH_INK_TEXT, 1);
      kh_pen_words (d->cr, &words, text);
    }
}

void kh_saw_picture_draw (const KhSawPicture *picture, cairo_t *cr, const KhReview *review)
{
  double x0, x1;
  Drawing d = { picture, review, cr, 0, 0 };
  if (!has_plan (review))
    return;
  cairo_clip_extents (cr, &x0, &d.clip0, &x1, &d.clip1);
  cairo_save (cr);
  walk (picture, review, draw_piece, draw_strip, &d);
  double px = px_of (picture);
  g_autofree char *kerf = kh_length_dup_text (review->saw_order->kerf_nm, KH_LENGTH_UNIT_MM, TRUE);
  g_autofree char *trim = kh_length_dup_text (review->saw_order->end_trim_nm, KH_LENGTH_UNIT_MM, TRUE);
  g_autofree char *foot = g_strdup_printf (_ ("Kerf %s between cuts, %s trimmed from each end."), kerf, trim);
  KhWords words
      = { LEFT_PX * px, kh_saw_picture_get_height (picture, review) - 12 * px, 11 * px, FALSE, KH_ALIGN_START, 0, 0 };
  ink (&d, KH_INK_TEXT_SECOND, 1);
  kh_pen_words (cr, &words, foot);
  cairo_restore (cr);
}

typedef struct
{
  double x;
  int strip, row;
} Search;

static void find_piece (const Piece *piece, int strip, gpointer data)
{
  Search *search = data;
  if (strip == search->strip && search->x >= piece->x && search->x <= piece->x + piece->width)
    search->row = piece->row;
}

int kh_saw_picture_row_at (const KhSawPicture *picture, const KhReview *review, double x, double y)
{
  Search search = { x, (int)floor (y / (ROW_PX * px_of (picture))), -1 };
  if (has_plan (review) && y >= 0)
    walk (picture, review, find_piece, NULL, &search);
  return search.row;
}
