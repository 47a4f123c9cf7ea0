/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include <stdint.h>

/* Bytes on disk: read whole with a limit, written atomically. */

typedef struct { gint64 size, mtime_ns; guint64 inode; gboolean exists; } KhFileStamp;

#define KH_STORE_ERROR (kh_store_error_quark ())
GQuark kh_store_error_quark (void);
typedef enum { KH_STORE_ERROR_READ, KH_STORE_ERROR_TOO_LARGE, KH_STORE_ERROR_NOT_A_FILE, KH_STORE_ERROR_WRITE, KH_STORE_ERROR_CHANGED } KhStoreError;

/* '-' as path is standard input.  Messages name the file, what is wrong and what to do. */
gboolean kh_store_load (const char *path, gsize most_bytes, char **bytes, gsize *n, GError **error);
/* To a temporary file beside it, flushed, renamed.  Follows a symlink, keeps
 * permissions.  With 'expected' the save is refused (KH_STORE_ERROR_CHANGED)
 * where the file is no longer as stamped.  '-' is standard output. */
gboolean kh_store_save (const char *path, const char *bytes, gsize n, const KhFileStamp *expected, GError **error);
void kh_store_stamp (const char *path, KhFileStamp *stamp);
