/* SPDX-License-Identifier: MIT */
#pragma once
#include "files/reader.h"

/* Objects of a plan file as tables: one row a member, used to read and to
 * write, so that the two cannot part.  A table ends in a row without a name. */

typedef enum
{
  KH_FIELD_DOUBLE,      /* double */
  KH_FIELD_DOUBLE_OPEN, /* double, NAN = null */
  KH_FIELD_RANGE,       /* double[2] */
  KH_FIELD_INT,         /* int */
  KH_FIELD_COUNT,       /* int, KH_COUNT_ANY = null */
  KH_FIELD_BOOLEAN,     /* gboolean */
  KH_FIELD_NM,          /* int64_t, millimetres in the file */
  KH_FIELD_NM_OPEN,     /* the same, KH_LENGTH_OPEN_NM = null */
  KH_FIELD_PRICE,       /* int64_t thousandths, KH_PRICE_NONE = null */
  KH_FIELD_CHOICE,      /* an enum (int), by 'choices' */
  KH_FIELD_TEXT,        /* char *, owned; 'most' characters */
  KH_FIELD_OBJECT,      /* a struct within, by 'object' */
  KH_FIELD_SPECIAL      /* read and written by hand: see 'read' and 'write' */
} KhFieldKind;

typedef struct KhField KhField;
typedef struct KhFields KhFields;

struct KhField
{
  const char *name;
  KhFieldKind kind;
  gsize offset;
  double least, most;         /* of a number, in the file's unit */
  const char *const *choices; /* NULL-terminated, in the enum's order */
  const KhFields *object;
  void (*read) (KhReader *reader, KhNode node, gpointer into, gpointer context);
  void (*write) (GString *json, gconstpointer from);
  gboolean (*wanted) (gconstpointer from); /* NULL: always written */
  gboolean required;
};

struct KhFields
{
  const KhField *rows;
  gsize other_offset; /* of the struct's char *other */
};

/* Faults are told to the reader; members at fault leave what was there. */
void kh_fields_read (const KhFields *fields, KhReader *reader, KhNode node, gpointer into, gpointer context);

/* "{…}" on one line, or a member a line, 'indent' spaces deep, where indent >= 0. */
void kh_fields_write (const KhFields *fields, GString *json, gconstpointer from, int indent);
