/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "base/random.h"
#include "base/units.h"

static void lengths_are_read_with_their_units (void **state)
{
  /* 1 in = 25.4 mm exactly (CSS Values 3, absolute lengths; the international inch). */
  static const struct
  {
    const char *text;
    KhLengthUnit unit;
    int64_t nm;
  } cases[] = {
    { "180", KH_LENGTH_UNIT_MM, 180000000 },
    { " 18 cm ", KH_LENGTH_UNIT_MM, 180000000 },
    { "0.18m", KH_LENGTH_UNIT_INCH_16, 180000000 },
    { "7 1/16 in", KH_LENGTH_UNIT_MM, 179387500 },
    { "7-1/16", KH_LENGTH_UNIT_INCH_16, 179387500 },
    { "1/2\"", KH_LENGTH_UNIT_MM, 12700000 },
    { "1/64 in", KH_LENGTH_UNIT_MM, 396875 },
    { "2 ft 3 in", KH_LENGTH_UNIT_MM, 685800000 },
    { "2' 3 1/2\"", KH_LENGTH_UNIT_MM, 698500000 },
    { "12,5", KH_LENGTH_UNIT_MM, 12500000 },
    { "-3", KH_LENGTH_UNIT_MM, -3000000 },
    { "0", KH_LENGTH_UNIT_MM, 0 },
    { "0.396875", KH_LENGTH_UNIT_MM, 396875 },
  };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      int64_t nm = 77;
      g_autoptr (GError) error = NULL;
      if (!kh_length_parse (cases[i].text, cases[i].unit, &nm, &error))
        fail_msg ("%s: %s", cases[i].text, error->message);
      assert_int_equal (nm, cases[i].nm);
    }
}

static void what_is_no_length_is_refused_and_changes_nothing (void **state)
{
  static const struct
  {
    const char *text;
    KhUnitsError code;
  } cases[] = {
    { "", KH_UNITS_ERROR_NOT_A_NUMBER },        { "abc", KH_UNITS_ERROR_NOT_A_NUMBER },
    { "1/0", KH_UNITS_ERROR_NOT_A_NUMBER },     { "5 1/0 in", KH_UNITS_ERROR_NOT_A_NUMBER },
    { "12 furlongs", KH_UNITS_ERROR_UNIT },     { "12 mmm", KH_UNITS_ERROR_UNIT },
    { "1e3", KH_UNITS_ERROR_UNIT },             { "99999999999 m", KH_UNITS_ERROR_RANGE },
    { "12 mm mm", KH_UNITS_ERROR_NOT_A_NUMBER }, { "nan", KH_UNITS_ERROR_NOT_A_NUMBER },
  };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      int64_t nm = 77;
      g_autoptr (GError) error = NULL;
      if (kh_length_parse (cases[i].text, KH_LENGTH_UNIT_MM, &nm, &error))
        fail_msg ("“%s” was taken as %" G_GINT64_FORMAT " nm", cases[i].text, nm);
      assert_int_equal (nm, 77);
      assert_true (g_error_matches (error, KH_UNITS_ERROR, (int) cases[i].code));
    }
}

static void lengths_are_written_for_people (void **state)
{
  static const struct
  {
    int64_t nm;
    KhLengthUnit unit;
    gboolean with_unit;
    const char *text;
  } cases[] = {
    { 1452000000, KH_LENGTH_UNIT_MM, TRUE, "1\u202f452 mm" }, { 180000000, KH_LENGTH_UNIT_MM, FALSE, "180" },
    { 12500000, KH_LENGTH_UNIT_MM, FALSE, "12.5" },           { 12049999, KH_LENGTH_UNIT_MM, FALSE, "12.05" },
    { -3000000, KH_LENGTH_UNIT_MM, FALSE, "\u22123" },        { 179387500, KH_LENGTH_UNIT_INCH_16, TRUE, "7 1/16 in" },
    { 12700000, KH_LENGTH_UNIT_INCH_32, TRUE, "1/2 in" },     { 0, KH_LENGTH_UNIT_INCH_16, TRUE, "0 in" },
    { 25400000, KH_LENGTH_UNIT_INCH_16, TRUE, "1 in" },
  };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      g_autofree char *text = kh_length_dup_text (cases[i].nm, cases[i].unit, cases[i].with_unit);
      assert_string_equal (text, cases[i].text);
    }
}

static void numbers_for_files_read_back_the_same (void **state)
{
  static const struct
  {
    double value;
    const char *text;
  } cases[] = { { 0.1, "0.1" }, { 1e21, "1000000000000000000000" }, { -2.5e-7, "-0.00000025" }, { -0.0, "0" }, { 3, "3" } };
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      g_autofree char *text = kh_number_dup_file_text (cases[i].value);
      assert_string_equal (text, cases[i].text);
    }
  for (uint64_t i = 0; i < 20000; i++)
    {
      KhRandomKey key = { 3, 0 };
      double value = (kh_random_unit (key, i, 0) - 0.5) * (double) (UINT64_C (1) << (i % 60));
      g_autofree char *text = kh_number_dup_file_text (value);
      assert_true (g_ascii_strtod (text, NULL) == value);
      assert_null (strpbrk (text, "eE"));
      int64_t nm = (int64_t) (kh_random_u64 (key, i, 1) >> 20) - (INT64_C (1) << 43);
      g_autofree char *decimal = kh_nm_dup_file_text (nm);
      assert_int_equal (kh_nm_from_mm (g_ascii_strtod (decimal, NULL)), nm);
    }
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (lengths_are_read_with_their_units),
    cmocka_unit_test (what_is_no_length_is_refused_and_changes_nothing),
    cmocka_unit_test (lengths_are_written_for_people),
    cmocka_unit_test (numbers_for_files_read_back_the_same),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
