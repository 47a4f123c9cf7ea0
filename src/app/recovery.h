/* SPDX-License-Identifier: MIT */
#pragma once
#include "app/session.h"

/* Unsaved work is kept under the user's state folder within two seconds of
 * each change, written by another thread, and thrown away once it is saved or
 * let go on purpose.  Each session has two files there: the plan, and a note
 * that says which file it belongs to.  The note is locked as long as the
 * program lives (flock): one that can be locked was left by a crash. */

typedef struct KhRecovery KhRecovery;
KhRecovery *kh_recovery_new (KhSession *session); /* watches it */
void kh_recovery_save_now (KhRecovery *self);     /* in this thread; does nothing where all is saved */
void kh_recovery_forget_free (KhRecovery *self);  /* closed on purpose: the files go */
void kh_recovery_keep_free (KhRecovery *self);    /* killed: the files stay for the next start */

typedef struct
{
  KhPlan *plan;   /* as it was */
  char *path;     /* the file it belongs to; NULL: never saved */
  char *note;     /* the note's own path */
  int lock;       /* its descriptor */
} KhRecovered;

GPtrArray *kh_recovery_find_left (void); /* of KhRecovered, owned with its elements */
void kh_recovered_forget (KhRecovered *recovered); /* its files go: it is safe elsewhere */
