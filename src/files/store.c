/* SPDX-License-Identifier: MIT */
#include "files/store.h"
#include <errno.h>
#include <fcntl.h>
#include <gio/gio.h>
#include <glib/gi18n-lib.h>
#include <glib/gstdio.h>
#include <stdlib.h>
#include <string.h>
#include <sys/stat.h>
#include <unistd.h>

G_DEFINE_QUARK (kh - store - error - quark, kh_store_error)

#define CHUNK 65536

static gboolean is_standard (const char *path) { return strcmp (path, "-") == 0; }

static gboolean fail (GError **error, KhStoreError code, const char *path, const char *format_reason,
                      const char *what_to_do)
{
  g_set_error (error, KH_STORE_ERROR, (int)code, "%s: %s; %s", path, format_reason, what_to_do);
  return FALSE;
}

/* In plain words where the trouble is a common one. */
static const char *remedy_of (int number)
{
  switch (number)
    {
    case ENOENT:
      return _ ("check the name and the folder");
    case EACCES:
    case EPERM:
    case EROFS:
      return _ ("choose another folder, or ask who owns it for permission");
    case ENOSPC:
    case EDQUOT:
      return _ ("make room on the disk, or save somewhere else");
    case EISDIR:
    case ENOTDIR:
      return _ ("name a file, not a folder");
    default:
      return _ ("try another place");
    }
}

static gboolean read_all (int fd, gsize most, GByteArray *into)
{
  guint8 *chunk = g_malloc (CHUNK);
  gssize got;
  errno = 0;
  do
    {
      got = read (fd, chunk, CHUNK);
      if (got > 0)
        g_byte_array_append (into, chunk, (guint)got);
  } while ((got > 0 && into->len <= most) || (got < 0 && errno == EINTR));
  int kept = errno;
  g_free (chunk);
  errno = kept;
  return got >= 0;
}

gboolean kh_store_load (const char *path, gsize most_bytes, char **bytes, gsize *n, GError **error)
{
  const char *called = is_standard (path) ? _ ("standard input") : path;
  g_autoptr (GByteArray) all = g_byte_array_new ();
  struct stat status;
  /* O_NONBLOCK: opening a pipe that nobody writes to must not wait for ever. */
  int fd = is_standard (path) ? dup (STDIN_FILENO) : g_open (path, O_RDONLY | O_CLOEXEC | O_NONBLOCK, 0);
  if (fd < 0)
    return fail (error, KH_STORE_ERROR_READ, called, g_strerror (errno), remedy_of (errno));
  if (!is_standard (path) && fstat (fd, &status) == 0 && !S_ISREG (status.st_mode))
    {
      gboolean folder = S_ISDIR (status.st_mode);
      close (fd);
      return fail (error, KH_STORE_ERROR_NOT_A_FILE, called,
                   folder ? _ ("this is a folder") : _ ("this is no ordinary file"), _ ("name a file"));
    }
  gboolean good = read_all (fd, most_bytes, all);
  int number = errno;
  close (fd);
  if (!good)
    return fail (error, KH_STORE_ERROR_READ, called, g_strerror (number), remedy_of (number));
  if (all->len > most_bytes)
    {
      g_autofree char *size
          = g_strdup_printf (_ ("the file is larger than the %zu MiB that are read"), most_bytes >> 20);
      return fail (error, KH_STORE_ERROR_TOO_LARGE, called, size, _ ("is it the right file?"));
    }
  *n = all->len;
  g_byte_array_append (all, (const guint8 *)"", 1);
  *bytes = (char *)g_byte_array_free (g_steal_pointer (&all), FALSE);
  return TRUE;
}

static gboolean save_standard (const char *bytes, gsize n, GError **error)
{
  for (gsize done = 0; done < n;)
    {
      gssize put = write (STDOUT_FILENO, bytes + done, n - done);
      if (put < 0 && errno == EINTR)
        continue;
      if (put < 0)
        return fail (error, KH_STORE_ERROR_WRITE, _ ("standard output"), g_strerror (errno), remedy_of (errno));
      done += (gsize)put;
    }
  return TRUE;
}

void kh_store_stamp (const char *path, KhFileStamp *stamp)
{
  struct stat status;
  *stamp = (KhFileStamp){ 0 };
  if (stat (path, &status) != 0)
    return;
  stamp->exists = TRUE;
  stamp->size = status.st_size;
  stamp->mtime_ns = (gint64)status.st_mtim.tv_sec * 1000000000 + status.st_mtim.tv_nsec;
  stamp->inode = (guint64)status.st_ino;
}

static gboolean stamp_equal (const KhFileStamp *a, const KhFileStamp *b)
{
  return a->exists == b->exists
         && (!a->exists || (a->size == b->size && a->mtime_ns == b->mtime_ns && a->inode == b->inode));
}

gboolean kh_store_save (const char *path, const char *bytes, gsize n, const KhFileStamp *expected, GError **error)
{
  if (is_standard (path))
    return save_standard (bytes, n, error);
  /* Written over its target, a symlink stays one. */
  char *resolved = realpath (path, NULL);
  g_autofree char *target = g_strdup (resolved ? resolved : path);
  free (resolved);
  KhFileStamp now;
  struct stat status;
  kh_store_stamp (target, &now);
  if (expected && !stamp_equal (expected, &now))
    return fail (error, KH_STORE_ERROR_CHANGED, path, _ ("another program changed this file since it was read"),
                 _ ("save under another name, or say that it may be written over"));
  int mode = now.exists && stat (target, &status) == 0 ? (int)(status.st_mode & 07777) : 0666;
  if (now.exists && S_ISDIR (status.st_mode))
    return fail (error, KH_STORE_ERROR_NOT_A_FILE, path, _ ("this is a folder"), _ ("name a file"));
  if (now.exists && access (target, W_OK) != 0)
    return fail (error, KH_STORE_ERROR_WRITE, path, g_strerror (errno), remedy_of (errno));
  g_autoptr (GError) inner = NULL;
  errno = 0;
  if (g_file_set_contents_full (target, bytes, (gssize)n, G_FILE_SET_CONTENTS_CONSISTENT | G_FILE_SET_CONTENTS_DURABLE,
                                mode, &inner))
    return TRUE;
  int number = g_error_matches (inner, G_FILE_ERROR, G_FILE_ERROR_NOENT)    ? ENOENT
               : g_error_matches (inner, G_FILE_ERROR, G_FILE_ERROR_ACCES)  ? EACCES
               : g_error_matches (inner, G_FILE_ERROR, G_FILE_ERROR_NOSPC)  ? ENOSPC
               : g_error_matches (inner, G_FILE_ERROR, G_FILE_ERROR_ROFS)   ? EROFS
               : g_error_matches (inner, G_FILE_ERROR, G_FILE_ERROR_NOTDIR) ? ENOTDIR
                                                                            : 0;
  return fail (error, KH_STORE_ERROR_WRITE, path, number ? g_strerror (number) : inner->message, remedy_of (number));
}
