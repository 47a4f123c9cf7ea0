/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include <stdint.h>

/* Lengths and numbers, between text and machine.
 *
 * A length that is cut is a whole number of nanometres (int64_t, suffix _nm):
 * millimetres with six decimals and 1/64 inch (396 875 nm) are both exact.
 * Text for files is plain ASCII decimals whatever the locale; text for people
 * groups thousands with a narrow no-break space and uses the locale's decimal
 * point.  Every function costs time linear in the text; none keeps state. */

#define KH_NM_PER_MM G_GINT64_CONSTANT (1000000)
#define KH_NM_PER_INCH G_GINT64_CONSTANT (25400000)

__extension__ typedef __int128 KhInt128; /* areas of nanometre lengths */

typedef enum
{
  KH_LENGTH_UNIT_MM,
  KH_LENGTH_UNIT_INCH_16, /* shown in inches with 1/16 */
  KH_LENGTH_UNIT_INCH_32  /* shown in inches with 1/32 */
} KhLengthUnit;

#define KH_UNITS_ERROR (kh_units_error_quark ())
GQuark kh_units_error_quark (void);
typedef enum
{
  KH_UNITS_ERROR_NOT_A_NUMBER, /* the text holds no number */
  KH_UNITS_ERROR_UNIT,         /* a number, then a unit that is not known */
  KH_UNITS_ERROR_RANGE         /* further than +-9 km from nothing */
} KhUnitsError;

/* mm must be finite and within +-9e12 / 1e6; rounded to the nearest, ties away from zero. */
int64_t kh_nm_from_mm (double mm);
double kh_mm_from_nm (int64_t nm);

/* "12.5", "180", "0.396875": owned, never an exponent, exact. */
char *kh_nm_dup_file_text (int64_t nm);

/* The shortest plain decimal (no exponent) that reads back as the same double;
 * value must be finite.  Owned. */
char *kh_number_dup_file_text (double value);

/* For people: "1 452 mm" or "57 3/16 in"; with_unit FALSE leaves the unit out.
 * Millimetres are shown to at most two decimals, trailing zeros dropped.  Owned. */
char *kh_length_dup_text (int64_t nm, KhLengthUnit unit, gboolean with_unit);

/* "180", "18 cm", "0.5 m", "7 1/16 in", "1/2\"", "2 ft 3 in", "7-1/16"; a bare
 * number is in 'unit'.  Takes '.' and ',' as decimal point.  FALSE with *error
 * set, and *nm untouched, when it cannot be read. */
gboolean kh_length_parse (const char *text, KhLengthUnit unit, int64_t *nm, GError **error);
