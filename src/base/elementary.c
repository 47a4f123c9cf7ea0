/* SPDX-License-Identifier: MIT */
/* The minimax polynomials are those of FDLIBM (K. C. Ng, Sun Microsystems):
 * "Copyright (C) 1993 by Sun Microsystems, Inc. All rights reserved.
 *  Permission to use, copy, modify, and distribute this software is freely
 *  granted, provided that this notice is preserved."
 * The code round them is ours. */
#include "base/elementary.h"
#include <math.h>
#include <string.h>

static uint64_t bits_of (double value)
{
  uint64_t bits;
  memcpy (&bits, &value, sizeof bits);
  return bits;
}

static double of_bits (uint64_t bits)
{
  double value;
  memcpy (&value, &bits, sizeof value);
  return value;
}

/* sin (x + tail) for |x| <= pi / 4. */
static double sine_near (double x, double tail)
{
  double z = x * x;
  double r = 8.33333333332248946124e-03
             + z
                   * (-1.98412698298579493134e-04
                      + z
                            * (2.75573137070700676789e-06
                               + z * (-2.50507602534068634195e-08 + z * 1.58969099521155010221e-10)));
  double v = z * x;
  return x - ((z * (0.5 * tail - v * r) - tail) - v * -1.66666666666666324348e-01);
}

/* cos (x + tail) for |x| <= pi / 4. */
static double cosine_near (double x, double tail)
{
  double z = x * x;
  double r = z
             * (4.16666666666666019037e-02
                + z
                      * (-1.38888888888741095749e-03
                         + z
                               * (2.48015872894767294178e-05
                                  + z
                                        * (-2.75573143513906633035e-07
                                           + z * (2.08757232129817482790e-09 + z * -1.13596475577881948265e-11)))));
  double half = 0.5 * z;
  double w = 1.0 - half;
  return w + (((1.0 - w) - half) + (z * r - x * tail));
}

/* The angle less the nearest multiple of pi / 2, which is taken off in parts of
 * 33 bits (Cody and Waite 1980), so that each product with a count under 2^17 is exact. */
static int reduce (double angle, double *x, double *tail)
{
  const double part1 = 1.57079632673412561417e+00, part2 = 6.07710050630396597660e-11;
  const double rest = 2.02226624879595063154e-21;
  double n = floor (angle * 6.36619772367581382433e-01 + 0.5);
  double a = angle - n * part1;
  double w = n * part2;
  double b = a - w;
  w = n * rest - ((a - b) - w);
  *x = b - w;
  *tail = (b - *x) - w;
  return (int)(int64_t)n & 3;
}

void kh_sincos (double angle_rad, double *sine, double *cosine)
{
  double x, tail;
  int quarter = reduce (angle_rad, &x, &tail);
  double s = sine_near (x, tail), c = cosine_near (x, tail);
  double first = (quarter & 1) ? c : s, second = (quarter & 1) ? s : c;
  *sine = (quarter & 2) ? -first : first;
  *cosine = ((quarter + 1) & 2) ? -second : second;
}

double kh_sin (double angle_rad)
{
  double s, c;
  kh_sincos (angle_rad, &s, &c);
  return s;
}

double kh_cos (double angle_rad)
{
  double s, c;
  kh_sincos (angle_rad, &s, &c);
  return c;
}

double kh_tan (double angle_rad)
{
  double s, c;
  kh_sincos (angle_rad, &s, &c);
  return s / c;
}

/* atan (x) - x, over x, as a series in x^2; |x| <= 7/16. */
static double arc_rest (double x)
{
  double z = x * x, w = z * z;
  double odd = z
               * (3.33333333333329318027e-01
                  + w
                        * (1.42857142725034663711e-01
                           + w
                                 * (9.09088713343650656196e-02
                                    + w
                                          * (6.66107313738753120669e-02
                                             + w * (4.97687799461593236017e-02 + w * 1.62858201153657823623e-02)))));
  double even = w
                * (-1.99999999998764832476e-01
                   + w
                         * (-1.11111104054623557880e-01
                            + w
                                  * (-7.69187620504482999495e-02
                                     + w * (-5.83357013379057348645e-02 + w * -3.65315727442169155270e-02))));
  return odd + even;
}

double kh_atan (double value)
{
  /* atan of 1/2, 1, 3/2 and infinity, in two parts each. */
  static const double high[] = { 4.63647609000806093515e-01, 7.85398163397448278999e-01, 9.82793723247329054082e-01,
                                 1.57079632679489655800e+00 };
  static const double low[] = { 2.26987774529616870924e-17, 3.06161699786838301793e-17, 1.39033110312309984516e-17,
                                6.12323399573676603587e-17 };
  double a = fabs (value), x;
  int place;
  if (a < 0.4375)
    return value - value * arc_rest (value);
  if (a < 0.6875)
    {
      place = 0;
      x = (2.0 * a - 1.0) / (2.0 + a);
    }
  else if (a < 1.1875)
    {
      place = 1;
      x = (a - 1.0) / (a + 1.0);
    }
  else if (a < 2.4375)
    {
      place = 2;
      x = (a - 1.5) / (1.0 + 1.5 * a);
    }
  else
    {
      place = 3;
      x = -1.0 / a;
    }
  double angle = high[place] - ((x * arc_rest (x) - low[place]) - x);
  return value < 0 ? -angle : angle;
}

double kh_atan2 (double y, double x)
{
  const double pi_rest = 1.2246467991473531772e-16;
  if (x == 0 && y == 0)
    return 0;
  if (x == 0)
    return y > 0 ? KH_PI / 2 : -KH_PI / 2;
  double angle = kh_atan (fabs (y / x));
  if (x < 0)
    angle = KH_PI - (angle - pi_rest);
  return y < 0 ? -angle : angle;
}

double kh_exp (double value)
{
  if (value > 709.782712893384)
    return HUGE_VAL;
  if (value < -708.0)
    return 0.0;
  double n = floor (value * 1.44269504088896338700 + 0.5);
  double high = value - n * 6.93147180369123816490e-01, low = n * 1.90821492927058770002e-10;
  double x = high - low, z = x * x;
  double c = x
             - z
                   * (1.66666666666666019037e-01
                      + z
                            * (-2.77777777770155933842e-03
                               + z
                                     * (6.61375632143793436117e-05
                                        + z * (-1.65339022054652515390e-06 + z * 4.13813679705723846039e-08))));
  double y = 1.0 - ((low - (x * c) / (2.0 - c)) - high);
  /* In two steps: 2^1024 itself is no double. */
  int64_t half = (int64_t)n / 2;
  return y * of_bits ((uint64_t)(half + 1023) << 52) * of_bits ((uint64_t)((int64_t)n - half + 1023) << 52);
}

double kh_log (double value)
{
  uint64_t bits = bits_of (value);
  int64_t exponent = (int64_t)(bits >> 52) - 1023;
  double m = of_bits ((bits & UINT64_C (0x000fffffffffffff)) | UINT64_C (0x3ff0000000000000));
  if (m > 1.41421356237309514547)
    {
      m *= 0.5;
      exponent++;
    }
  double f = m - 1.0, s = f / (2.0 + f), z = s * s, w = z * z, k = (double)exponent;
  double t1 = w * (3.999999999940941908e-01 + w * (2.222219843214978396e-01 + w * 1.531383769920937332e-01));
  double t2 = z
              * (6.666666666666735130e-01
                 + w * (2.857142874366239149e-01 + w * (1.818357216161805012e-01 + w * 1.479819860511658591e-01)));
  double half = 0.5 * f * f;
  return k * 6.93147180369123816490e-01 - ((half - (s * (half + t1 + t2) + k * 1.90821492927058770002e-10)) - f);
}
