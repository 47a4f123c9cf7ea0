/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include <stdint.h>

/* Sine, cosine, arc tangent, exponential, logarithm: within 2 ulp of the true
 * value for the arguments given, and the same bits on every machine and at
 * every optimisation level (IEEE 754 doubles, no contraction, no libm but sqrt,
 * floor, ceil, fabs).  Constant time, no state. */

void kh_sincos (double angle_rad, double *sine, double *cosine); /* |angle| <= 1e5 */
double kh_sin (double angle_rad);
double kh_cos (double angle_rad);
double kh_tan (double angle_rad);
double kh_atan (double value);
double kh_atan2 (double y, double x); /* (-pi, pi]; 0 for (0, 0) */
double kh_exp (double value);
double kh_log (double value); /* value > 0, normal */

#define KH_PI 3.14159265358979323846
