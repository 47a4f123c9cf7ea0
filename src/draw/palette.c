/* SPDX-License-Identifier: MIT */
#include "draw/palette.h"

/* light, dark, print. Chosen for paper and for colour-blind readers; graphics at
 * least 4 : 1 on the floor, words at least 4.5 : 1 (WCAG 2.1, 1.4.3 and 1.4.11;
 * a test computes them). */
static const guint32 inks[KH_N_INKS][3] = {
  [KH_INK_FLOOR] = { 0xF5F0E6, 0x23211D, 0xFFFFFF },      [KH_INK_DESK] = { 0xE7E2D7, 0x1A1916, 0xFFFFFF },
  [KH_INK_WALL] = { 0x33484F, 0xC9D3D6, 0x000000 },       [KH_INK_SIGN] = { 0x17807A, 0x2FA59B, 0x000000 },
  [KH_INK_SIGN_WORDS] = { 0x0E5A56, 0xA5E0DA, 0x000000 }, [KH_INK_ISLAND] = { 0xB4571B, 0xE07B42, 0x000000 },
  [KH_INK_FOLLOW] = { 0x2C64AE, 0x82BDF5, 0x000000 },     [KH_INK_CURVE] = { 0x8C7000, 0xEFD47A, 0x000000 },
  [KH_INK_TURN] = { 0x651F63, 0xB07AD9, 0x000000 },       [KH_INK_SEARCHING] = { 0x6F777A, 0x9AA3A6, 0x000000 },
  [KH_INK_CONTACT] = { 0x951212, 0xFF9F90, 0x000000 },    [KH_INK_BADGE] = { 0x8A4A00, 0xF2B36B, 0x000000 },
  [KH_INK_TEXT] = { 0x23282A, 0xE9EAE8, 0x000000 },       [KH_INK_TEXT_SECOND] = { 0x5A6164, 0xB3B7B5, 0x333333 },
  [KH_INK_LINE] = { 0xC9C2B3, 0x45423B, 0xBBBBBB },       [KH_INK_LIT] = { 0x17807A, 0x2FA59B, 0x000000 },
  [KH_INK_PANEL] = { 0xDDE3E3, 0x3A4041, 0xFFFFFF },
};

KhColour kh_palette_get (KhScheme scheme, KhInk ink)
{
  guint32 rgb = inks[ink][scheme];
  return (KhColour){ ((rgb >> 16) & 255) / 255.0, ((rgb >> 8) & 255) / 255.0, (rgb & 255) / 255.0 };
}

void kh_palette_set_source (cairo_t *cr, KhScheme scheme, KhInk ink, double alpha)
{
  KhColour colour = kh_palette_get (scheme, ink);
  cairo_set_source_rgba (cr, colour.red, colour.green, colour.blue, alpha);
}
