/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include <stdint.h>

/* Reading a tree of JSON values with a message for each fault: where (the
 * member's path), what stands there, what is asked for.  Knows nothing of plans. */

typedef struct KhReader KhReader;

/* A value: its place in the JSON library's tree and its source text. */
typedef struct
{
  const void *item;
  const char *source, *end;
} KhNode;

/* Scans and parses.  FALSE: *faults (created when NULL) holds the reason. */
KhReader *kh_reader_new (const char *bytes, gsize n, const char *name, GPtrArray **faults, KhNode *root);
void kh_reader_free (KhReader *reader);
G_DEFINE_AUTOPTR_CLEANUP_FUNC (KhReader, kh_reader_free)

/* The path grows by ".name" or "[index]" and is cut back to what it was. */
gsize kh_reader_enter_member (KhReader *reader, const char *name);
gsize kh_reader_enter_index (KhReader *reader, guint index);
void kh_reader_leave (KhReader *reader, gsize mark);

/* "name: walls.runs[3]: [0, 0] …; FORMAT": what stands there is quoted, then what is asked for. */
void kh_reader_fault (KhReader *reader, KhNode node, const char *wanted_format, ...) G_GNUC_PRINTF (3, 4);
/* The same for a member that is missing. */
void kh_reader_missing (KhReader *reader, const char *member, const char *wanted);
gboolean kh_reader_has_faults (const KhReader *reader);
gboolean kh_reader_is_full (const KhReader *reader); /* 20 faults told: time to stop */

gboolean kh_node_is_object (KhNode node);
gboolean kh_node_is_array (KhNode node);
gboolean kh_node_is_null (KhNode node);
gboolean kh_node_get_number (KhNode node, double *value);  /* finite */
gboolean kh_node_get_whole (KhNode node, int *value);      /* a whole number that fits */
gboolean kh_node_get_boolean (KhNode node, gboolean *value);
const char *kh_node_get_text (KhNode node);                /* borrowed; NULL: no text */
gsize kh_node_get_length (KhNode node);                    /* of an array; counts once, linear */

/* One member after another, one element after another; the first call with
 * *step all 0. FALSE at the end. */
typedef struct
{
  const void *item;
  const char *source;
  gboolean begun;
  const char *name;     /* of the member */
  const char *name_source, *name_end; /* as it stands in the text, quotes included */
  KhNode value;
} KhStep;
gboolean kh_node_next (KhNode of, KhStep *step);

/* Whole numbers of an array of exactly n; FALSE: it is none. */
gboolean kh_node_get_wholes (KhNode node, int *values, gsize n);
