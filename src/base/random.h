/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include <stdint.h>

/* Random numbers without a state: each is a function of its key, so that the
 * order in which they are asked for, and the number of threads, change nothing.
 * The mixing is the finaliser of SplitMix64 (Steele, Lea, Flood, OOPSLA 2014)
 * applied once a word of the key. */

typedef struct
{
  uint64_t seed;
  uint64_t trial;
} KhRandomKey;

uint64_t kh_random_u64 (KhRandomKey key, uint64_t tick, uint64_t draw);
double kh_random_unit (KhRandomKey key, uint64_t tick, uint64_t draw);  /* [0, 1) */
double kh_random_gauss (KhRandomKey key, uint64_t tick, uint64_t draw); /* mean 0, deviation 1; |.| <= 6 or so */

/* A whole number in [0, n), n >= 1, without bias worth naming (n < 2^32). */
uint32_t kh_random_below (KhRandomKey key, uint64_t tick, uint64_t draw, uint32_t n);
