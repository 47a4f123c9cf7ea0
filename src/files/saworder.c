/* SPDX-License-Identifier: MIT */
#include "files/saworder.h"
#include "base/units.h"
#include "files/fields.h"
#include <glib/gi18n-lib.h>
#include <stddef.h>
#include <string.h>

#define KIND "kerfhand saw order"
#define MOST_LENGTH 1000000
#define MOST_COUNT 1000000
#define MOST_ROWS 10000

typedef struct
{
  char *kind;
  int version;
  KhSawOrder *order;
  char *other; /* an order is never written back */
} Reading;

typedef struct
{
  KhSawStock stock;
  char *other;
} StockRow;
typedef struct
{
  KhSawPiece piece;
  char *other;
} PieceRow;

static const KhField stock_rows[] = {
  { "name", KH_FIELD_TEXT, offsetof (StockRow, stock.name), 0, 200 },
  { "length_mm", KH_FIELD_NM, offsetof (StockRow, stock.length_nm), 0.000001, MOST_LENGTH, .required = TRUE },
  { "price", KH_FIELD_PRICE, offsetof (StockRow, stock.price_milli), 0, 1000000 },
  { "count", KH_FIELD_COUNT, offsetof (StockRow, stock.count), 0, MOST_COUNT },
  { "strips", KH_FIELD_INT, offsetof (StockRow, stock.n_strips), 1, 10000 },
  { NULL },
};
static const KhFields stock_fields = { stock_rows, offsetof (StockRow, other) };

static const KhField piece_rows[] = {
  { "length_mm", KH_FIELD_NM, offsetof (PieceRow, piece.length_nm), 0.000001, MOST_LENGTH, .required = TRUE },
  { "count", KH_FIELD_INT, offsetof (PieceRow, piece.count), 0, MOST_COUNT, .required = TRUE },
  { NULL },
};
static const KhFields piece_fields = { piece_rows, offsetof (PieceRow, other) };

static void read_stock (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  KhStep step = { 0 };
  if (!kh_node_is_array (node) || kh_node_get_length (node) > MOST_ROWS)
    {
      kh_reader_fault (reader, node, _ ("give a list of at most %d"), MOST_ROWS);
      return;
    }
  for (guint i = 0; !kh_reader_is_full (reader) && kh_node_next (node, &step); i++)
    {
      StockRow row = { { NULL, 0, KH_PRICE_NONE, KH_COUNT_ANY, 1 }, NULL };
      gsize mark = kh_reader_enter_index (reader, i);
      kh_fields_read (&stock_fields, reader, step.value, &row, NULL);
      kh_reader_leave (reader, mark);
      g_free (row.other);
      g_array_append_val (((Reading *)into)->order->stock, row.stock);
    }
}

static void read_pieces (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  KhStep step = { 0 };
  if (!kh_node_is_array (node) || kh_node_get_length (node) > MOST_ROWS)
    {
      kh_reader_fault (reader, node, _ ("give a list of at most %d"), MOST_ROWS);
      return;
    }
  for (guint i = 0; !kh_reader_is_full (reader) && kh_node_next (node, &step); i++)
    {
      PieceRow row = { 0 };
      gsize mark = kh_reader_enter_index (reader, i);
      kh_fields_read (&piece_fields, reader, step.value, &row, NULL);
      kh_reader_leave (reader, mark);
      g_free (row.other);
      g_array_append_val (((Reading *)into)->order->pieces, row.piece);
    }
}

static void read_length (KhReader *reader, KhNode node, double most, int64_t *into)
{
  const KhField row[] = { { "length", KH_FIELD_NM, 0, 0, most }, { NULL } };
  double mm;
  if (kh_node_get_number (node, &mm) && mm >= row->least && mm <= row->most)
    *into = kh_nm_from_mm (mm);
  else
    kh_reader_fault (reader, node, _ ("give a number from 0 to %g"), most);
}

static void read_kerf (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  read_length (reader, node, 1000, &((Reading *)into)->order->kerf_nm);
}

static void read_trim (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  read_length (reader, node, MOST_LENGTH, &((Reading *)into)->order->end_trim_nm);
}

static void read_keep (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  read_length (reader, node, MOST_LENGTH, &((Reading *)into)->order->keep_offcut_nm);
}

static const KhField order_rows[] = {
  { "kind", KH_FIELD_TEXT, offsetof (Reading, kind), 0, 200, .required = TRUE },
  { "version", KH_FIELD_INT, offsetof (Reading, version), 1, 1000000, .required = TRUE },
  { "kerf_mm", KH_FIELD_SPECIAL, .read = read_kerf },
  { "end_trim_mm", KH_FIELD_SPECIAL, .read = read_trim },
  { "keep_offcut_mm", KH_FIELD_SPECIAL, .read = read_keep },
  { "stock", KH_FIELD_SPECIAL, .read = read_stock, .required = TRUE },
  { "pieces", KH_FIELD_SPECIAL, .read = read_pieces, .required = TRUE },
  { NULL },
};
static const KhFields order_fields = { order_rows, offsetof (Reading, other) };

/* What the order is called, before its members are read: a plan given for an
 * order is told so, and nothing else. */
static gboolean check_kind (KhReader *reader, KhNode root)
{
  KhStep step = { 0 };
  while (kh_node_is_object (root) && kh_node_next (root, &step))
    {
      gsize mark = kh_reader_enter_member (reader, step.name);
      int version;
      if (strcmp (step.name, "kind") == 0 && g_strcmp0 (kh_node_get_text (step.value), KIND) != 0)
        kh_reader_fault (reader, step.value, _ ("this is no saw order; its kind is \"%s\""), KIND);
      else if (strcmp (step.name, "version") == 0 && kh_node_get_whole (step.value, &version) && version > 1)
        kh_reader_fault (reader, step.value,
                         _ ("made by a newer Kerfhand; open it with that one, or bring this one up to date"));
      kh_reader_leave (reader, mark);
    }
  return !kh_reader_has_faults (reader);
}

static void check_order (KhReader *reader, KhNode root, const KhSawOrder *order)
{
  g_autoptr (GError) error = NULL;
  if (!kh_reader_has_faults (reader) && !kh_saw_order_check (order, &error))
    kh_reader_fault (reader, root, "%s", error->message);
}

KhSawOrder *kh_saw_order_parse (const char *bytes, gsize n, const char *name, GPtrArray **faults)
{
  KhNode root;
  g_autoptr (KhReader) reader = kh_reader_new (bytes, n, name, faults, &root);
  if (!reader || !check_kind (reader, root))
    return NULL;
  g_autoptr (KhSawOrder) order = kh_saw_order_new ();
  Reading reading = { .order = order };
  kh_fields_read (&order_fields, reader, root, &reading, NULL);
  check_order (reader, root, order);
  g_free (reading.kind);
  g_free (reading.other);
  return kh_reader_has_faults (reader) ? NULL : g_steal_pointer (&order);
}
