/* SPDX-License-Identifier: MIT */
#pragma once
#include <cairo.h>
#include <glib.h>

/* The project's own colours.  Each meaning carried by colour is carried by form too. */
typedef enum { KH_SCHEME_LIGHT, KH_SCHEME_DARK, KH_SCHEME_PRINT /* black on white, hatches */ } KhScheme;

typedef enum
{
  KH_INK_FLOOR, KH_INK_DESK, KH_INK_WALL, KH_INK_SIGN /* start, opening, mark */, KH_INK_SIGN_WORDS,
  KH_INK_ISLAND, KH_INK_FOLLOW, KH_INK_CURVE, KH_INK_TURN, KH_INK_SEARCHING, KH_INK_CONTACT, KH_INK_BADGE,
  KH_INK_TEXT, KH_INK_TEXT_SECOND, KH_INK_LINE /* hairlines, lattice */, KH_INK_LIT /* chosen panels */, KH_INK_PANEL,
  KH_N_INKS
} KhInk;

typedef struct { double red, green, blue; } KhColour;
KhColour kh_palette_get (KhScheme scheme, KhInk ink);
void kh_palette_set_source (cairo_t *cr, KhScheme scheme, KhInk ink, double alpha);
