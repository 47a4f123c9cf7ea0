/* SPDX-License-Identifier: MIT */
#pragma once
#include "draw/palette.h"
#include "review/review.h"

/* The saw plan to scale, a strip of stock a row. */
typedef struct { KhScheme scheme; double width, text_size; int lit_row; /* of the cut list; -1 */ } KhSawPicture;
double kh_saw_picture_get_height (const KhSawPicture *picture, const KhReview *review);
void kh_saw_picture_draw (const KhSawPicture *picture, cairo_t *cr, const KhReview *review);
int kh_saw_picture_row_at (const KhSawPicture *picture, const KhReview *review, double x, double y); /* row of the cut list; -1 */
