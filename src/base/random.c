/* SPDX-License-Identifier: MIT */
#include "base/random.h"

/* The finaliser of SplitMix64 (Steele, Lea, Flood, OOPSLA 2014). */
static uint64_t mix (uint64_t z)
{
  z = (z ^ (z >> 30)) * UINT64_C (0xbf58476d1ce4e5b9);
  z = (z ^ (z >> 27)) * UINT64_C (0x94d049bb133111eb);
  return z ^ (z >> 31);
}

/* Each word of the key is spread by an odd constant before it is mixed in: the
 * golden ratio and three further odd fractions of 2^64. */
uint64_t kh_random_u64 (KhRandomKey key, uint64_t tick, uint64_t draw)
{
  uint64_t z = mix (key.seed + UINT64_C (0x9e3779b97f4a7c15));
  z = mix (z + key.trial * UINT64_C (0xd1b54a32d192ed03) + UINT64_C (0x9e3779b97f4a7c15));
  z = mix (z + tick * UINT64_C (0xaef17502108ef2d9) + UINT64_C (0x9e3779b97f4a7c15));
  return mix (z + draw * UINT64_C (0xf1357aea2e62a9c5) + UINT64_C (0x9e3779b97f4a7c15));
}

double kh_random_unit (KhRandomKey key, uint64_t tick, uint64_t draw)
{
  return (double)(kh_random_u64 (key, tick, draw) >> 11) * 0x1p-53;
}

/* The sum of twelve 16-bit uniforms (Irwin-Hall): mean 6, variance 1 but for
 * the grain of the uniforms, which is put right.  Three words serve a draw: no
 * logarithm, no branch, and the tails end at 6, where no error of ours is meant
 * to reach. */
double kh_random_gauss (KhRandomKey key, uint64_t tick, uint64_t draw)
{
  uint64_t word = kh_random_u64 (key, tick, draw);
  uint32_t sum = 0;
  for (int i = 0; i < 3; i++)
    {
      sum += (uint32_t)(word & 0xffff) + (uint32_t)((word >> 16) & 0xffff) + (uint32_t)((word >> 32) & 0xffff)
             + (uint32_t)(word >> 48);
      word = mix (word + UINT64_C (0x9e3779b97f4a7c15));
    }
  /* Each uniform is k / 65536, k = 0 .. 65535: mean 65535 / 2, variance (65536^2 - 1) / 12. */
  return ((double)sum - 6.0 * 65535.0) / 65535.99999237061;
}

/* Lemire's multiply-shift (ACM TOMACS 2019) without the rejection: the bias is under n / 2^64. */
uint32_t kh_random_below (KhRandomKey key, uint64_t tick, uint64_t draw, uint32_t n)
{
  g_assert (n >= 1);
  uint64_t word = kh_random_u64 (key, tick, draw);
  uint64_t high = (word >> 32) * n;
  uint64_t low = ((word & 0xffffffffu) * n) >> 32;
  return (uint32_t)((high + low) >> 32);
}
