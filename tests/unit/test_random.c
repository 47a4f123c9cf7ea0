/* SPDX-License-Identifier: MIT */
#include "../cmocka_all.h"
#include "base/random.h"
#include <math.h>

#define N 400000

static void gauss_has_the_moments_of_the_normal_law (void **state)
{
  double sum[5] = { 0 };
  for (uint64_t i = 0; i < N; i++)
    {
      double x = kh_random_gauss ((KhRandomKey){ 1, 2 }, i, 3);
      assert_true (fabs (x) <= 6.001);
      for (int power = 1; power <= 4; power++)
        sum[power] += pow (x, power);
    }
  /* Five standard errors; the fourth moment of twelve uniforms is 3 - 6/5/12 = 2.9. */
  assert_true (fabs (sum[1] / N) < 5 / sqrt (N));
  assert_true (fabs (sum[2] / N - 1) < 5 * sqrt (1.9 / N));
  assert_true (fabs (sum[3] / N) < 5 * sqrt (15.0 / N));
  assert_true (fabs (sum[4] / N - 2.9) < 5 * sqrt (96.0 / N));
}

/* Chi-square of 64 equal bins over each word of the key: 63 degrees of freedom, 99.99 % at 112.7
 * (computed with the Wilson-Hilferty approximation). */
static void each_word_of_the_key_spreads (void **state)
{
  for (int word = 0; word < 4; word++)
    {
      int bins[64] = { 0 };
      for (uint64_t i = 0; i < 64000; i++)
        {
          uint64_t w[4] = { 5, 6, 7, 8 };
          w[word] = i;
          bins[(int) (kh_random_unit ((KhRandomKey){ w[0], w[1] }, w[2], w[3]) * 64)]++;
        }
      double chi = 0;
      for (int b = 0; b < 64; b++)
        chi += (bins[b] - 1000.0) * (bins[b] - 1000.0) / 1000.0;
      if (chi > 112.7)
        fail_msg ("word %d of the key: chi-square %.1f", word, chi);
    }
}

static void below_stays_below_and_reaches_all (void **state)
{
  gboolean seen[7] = { FALSE };
  for (uint64_t i = 0; i < 500; i++)
    {
      uint32_t x = kh_random_below ((KhRandomKey){ 1, 1 }, i, 0, 7);
      assert_true (x < 7);
      seen[x] = TRUE;
    }
  for (int i = 0; i < 7; i++)
    assert_true (seen[i]);
  assert_int_equal (kh_random_below ((KhRandomKey){ 1, 1 }, 0, 0, 1), 0);
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (gauss_has_the_moments_of_the_normal_law),
    cmocka_unit_test (each_word_of_the_key_spreads),
    cmocka_unit_test (below_stays_below_and_reaches_all),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
