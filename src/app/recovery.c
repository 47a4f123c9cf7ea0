/* SPDX-License-Identifier: MIT */
#include "app/recovery.h"

#include "files/planfile.h"
#include "files/store.h"
#include <errno.h>
#include <fcntl.h>
#include <glib/gstdio.h>
#include <sys/file.h>
#include <unistd.h>

#define DELAY_MS 1200 /* after the first change that is not kept yet */

struct KhRecovery
{
  KhSession *session;
  char *plan_path, *note_path;
  int lock; /* descriptor of the note; -1: no files yet */
  guint source;
  gboolean writing, again;
  gatomicrefcount count; /* this and a write under way */
  gboolean let_go;
};

static char *dup_folder (void) { return g_build_filename (g_get_user_state_dir (), "kerfhand", "recovery", NULL); }

/* Makes the note and locks it.  Kept work is a convenience: a folder that cannot
 * be written is told in the log and nothing else is lost. */
static gboolean open_note (KhRecovery *self)
{
  if (self->lock >= 0)
    return TRUE;
  g_autofree char *folder = dup_folder ();
  g_autofree char *id = g_uuid_string_random ();
  g_autofree char *note = g_strdup_printf ("%s/%s.note", folder, id);
  if (g_mkdir_with_parents (folder, 0700) != 0)
    {
      g_message ("cannot keep unsaved work in %s: %s", folder, g_strerror (errno));
      return FALSE;
    }
  int lock = open (note, O_RDWR | O_CREAT | O_CLOEXEC, 0600);
  if (lock < 0 || flock (lock, LOCK_EX | LOCK_NB) != 0)
    {
      g_message ("cannot keep unsaved work in %s: %s", note, g_strerror (errno));
      if (lock >= 0)
        close (lock);
      return FALSE;
    }
  self->lock = lock;
  self->note_path = g_steal_pointer (&note);
  self->plan_path = g_strdup_printf ("%s/%s.mazeplan", folder, id);
  return TRUE;
}

static void write_note (KhRecovery *self)
{
  const char *path = kh_session_get_path (self->session);
  gsize n = path != NULL ? strlen (path) : 0;
  /* in place: the lock hangs on this very file */
  if (ftruncate (self->lock, 0) != 0 || lseek (self->lock, 0, SEEK_SET) != 0
      || (n > 0 && write (self->lock, path, n) != (gssize)n))
    g_message ("cannot write %s: %s", self->note_path, g_strerror (errno));
}

static void remove_files (KhRecovery *self)
{
  if (self->lock < 0)
    return;
  g_unlink (self->plan_path);
  g_unlink (self->note_path);
  close (self->lock);
  self->lock = -1;
  g_clear_pointer (&self->plan_path, g_free);
  g_clear_pointer (&self->note_path, g_free);
}

static void release (KhRecovery *self)
{
  if (!g_atomic_ref_count_dec (&self->count))
    return;
  if (self->lock >= 0)
    close (self->lock);
  g_free (self->plan_path);
  g_free (self->note_path);
  g_free (self);
}

typedef struct
{
  KhPlan *plan;
  char *path;
} Writing;

static void writing_free (Writing *writing)
{
  kh_plan_free (writing->plan);
  g_free (writing->path);
  g_free (writing);
}

static void write_plan (const KhPlan *plan, const char *path)
{
  g_autoptr (GError) error = NULL;
  g_autofree char *text = kh_plan_file_dup_text (plan);
  if (!kh_store_save (path, text, strlen (text), NULL, &error))
    g_message ("%s", error->message);
}

static void write_thread (GTask *task, gpointer source, gpointer data, GCancellable *cancellable)
{
  Writing *writing = data;
  write_plan (writing->plan, writing->path);
  g_task_return_boolean (task, TRUE);
}

static void schedule (KhRecovery *self);

static void written_cb (GObject *source, GAsyncResult *result, gpointer data)
{
  KhRecovery *self = data;
  self->writing = FALSE;
  if (self->session == NULL)
    {
      if (self->let_go)
        remove_files (self);
    }
  else if (!kh_session_is_at_stake (self->session))
    remove_files (self);
  else if (self->again)
    schedule (self);
  self->again = FALSE;
  release (self);
}

static gboolean write_cb (gpointer data)
{
  KhRecovery *self = data;
  self->source = 0;
  if (!kh_session_is_at_stake (self->session) || !open_note (self))
    return G_SOURCE_REMOVE;
  write_note (self);
  Writing *writing = g_new0 (Writing, 1);
  writing->plan = kh_plan_copy (kh_session_get_plan (self->session));
  writing->path = g_strdup (self->plan_path);
  self->writing = TRUE;
  g_atomic_ref_count_inc (&self->count);
  GTask *task = g_task_new (NULL, NULL, written_cb, self);
  g_task_set_task_data (task, writing, (GDestroyNotify)writing_free);
  g_task_run_in_thread (task, write_thread);
  g_object_unref (task);
  return G_SOURCE_REMOVE;
}

static void schedule (KhRecovery *self)
{
  if (self->writing)
    self->again = TRUE;
  else if (self->source == 0)
    self->source = g_timeout_add (DELAY_MS, write_cb, self);
}

static void changed_cb (KhRecovery *self)
{
  if (kh_session_is_at_stake (self->session))
    schedule (self);
  else if (!self->writing)
    {
      g_clear_handle_id (&self->source, g_source_remove);
      remove_files (self);
    }
}

KhRecovery *kh_recovery_new (KhSession *session)
{
  KhRecovery *self = g_new0 (KhRecovery, 1);
  self->session = g_object_ref (session);
  self->lock = -1;
  g_atomic_ref_count_init (&self->count);
  g_signal_connect_swapped (session, "plan-changed", G_CALLBACK (changed_cb), self);
  g_signal_connect_swapped (session, "file-changed", G_CALLBACK (changed_cb), self);
  changed_cb (self);
  return self;
}

void kh_recovery_save_now (KhRecovery *self)
{
  if (!kh_session_is_at_stake (self->session) || !open_note (self))
    return;
  g_clear_handle_id (&self->source, g_source_remove);
  write_note (self);
  write_plan (kh_session_get_plan (self->session), self->plan_path);
}

static void let_go (KhRecovery *self)
{
  g_clear_handle_id (&self->source, g_source_remove);
  g_signal_handlers_disconnect_by_data (self->session, self);
  g_clear_object (&self->session);
  release (self);
}

void kh_recovery_forget_free (KhRecovery *self)
{
  self->let_go = TRUE;
  if (!self->writing)
    remove_files (self);
  let_go (self);
}

void kh_recovery_keep_free (KhRecovery *self) { let_go (self); }

static void recovered_free (KhRecovered *recovered)
{
  g_clear_pointer (&recovered->plan, kh_plan_free);
  if (recovered->lock >= 0)
    close (recovered->lock);
  g_free (recovered->path);
  g_free (recovered->note);
  g_free (recovered);
}

static char *dup_plan_path (const char *note)
{
  g_autofree char *stem = g_strndup (note, strlen (note) - strlen (".note"));
  return g_strconcat (stem, ".mazeplan", NULL);
}

/* NULL: still in use, or nothing that can be read. */
static KhRecovered *take_up (const char *note)
{
  int lock = open (note, O_RDWR | O_CLOEXEC);
  if (lock < 0)
    return NULL;
  if (flock (lock, LOCK_EX | LOCK_NB) != 0)
    {
      close (lock);
      return NULL;
    }
  g_autofree char *plan_path = dup_plan_path (note);
  g_autofree char *path = NULL;
  GPtrArray *faults = NULL;
  KhPlan *plan = kh_plan_file_load (plan_path, &faults);
  g_clear_pointer (&faults, g_ptr_array_unref);
  g_file_get_contents (note, &path, NULL, NULL);
  if (plan == NULL)
    {
      /* died before the first write: the note alone is of no use; a plan that cannot be read stays for a person */
      if (!g_file_test (plan_path, G_FILE_TEST_EXISTS))
        g_unlink (note);
      close (lock);
      return NULL;
    }
  KhRecovered *recovered = g_new0 (KhRecovered, 1);
  recovered->plan = plan;
  recovered->path = path != NULL && *path != '\0' ? g_steal_pointer (&path) : NULL;
  recovered->note = g_strdup (note);
  recovered->lock = lock;
  return recovered;
}

GPtrArray *kh_recovery_find_left (void)
{
  GPtrArray *left = g_ptr_array_new_with_free_func ((GDestroyNotify)recovered_free);
  g_autofree char *folder = dup_folder ();
  g_autoptr (GDir) names = g_dir_open (folder, 0, NULL);
  const char *name;
  while (names != NULL && (name = g_dir_read_name (names)) != NULL)
    {
      if (!g_str_has_suffix (name, ".note"))
        continue;
      g_autofree char *note = g_build_filename (folder, name, NULL);
      KhRecovered *recovered = take_up (note);
      if (recovered != NULL)
        g_ptr_array_add (left, recovered);
    }
  return left;
}

void kh_recovered_forget (KhRecovered *recovered)
{
  g_autofree char *plan_path = dup_plan_path (recovered->note);
  g_unlink (plan_path);
  g_unlink (recovered->note);
}
