/* SPDX-License-Identifier: MIT */
/* name, columns, rows, pitch, thickness, seed, trial, hand, exact, box body, hash */
{ "small robot, right, exact", 8, 8, 180, 12, 1, 0, KH_HAND_RIGHT, TRUE, FALSE, 0x16569b365224320c },
{ "small robot, left, exact", 8, 8, 180, 12, 2, 0, KH_HAND_LEFT, TRUE, FALSE, 0xea505347bcba2a2e },
{ "small robot, right, errors", 8, 8, 180, 12, 3, 7, KH_HAND_RIGHT, FALSE, FALSE, 0xc23b4b208cbb0199 },
{ "wide robot, left, errors", 8, 8, 300, 18, 4, 9, KH_HAND_LEFT, FALSE, FALSE, 0x03c0cdfbc8255368 },
{ "box body, right, errors", 8, 8, 180, 12, 5, 2, KH_HAND_RIGHT, FALSE, TRUE, 0x720cfbb649143552 },
