/* SPDX-License-Identifier: MIT */
#include "files/planfields.h"
#include "base/units.h"
#include "files/jsontext.h"
#include <glib/gi18n-lib.h>
#include <stddef.h>

#define MOST_RUNS 300000

#define ROW(type, member, name, kind, ...)                                                                             \
  {                                                                                                                    \
    name, kind, offsetof (type, member), __VA_ARGS__                                                                   \
  }
#define END                                                                                                            \
  {                                                                                                                    \
    NULL                                                                                                               \
  }

static const char *const posts_choices[] = { "where walls meet", "everywhere", NULL };
static const char *const heading_choices[] = { "north", "east", "south", "west", NULL };
static const char *const use_choices[] = { "entrance", "exit", "plain", NULL };

/* Lattice and walls */

static const KhField lattice_rows[] = {
  ROW (KhLattice, columns, "columns", KH_FIELD_INT, 1, KH_LATTICE_MOST, .required = TRUE),
  ROW (KhLattice, rows, "rows", KH_FIELD_INT, 1, KH_LATTICE_MOST, .required = TRUE),
  ROW (KhLattice, pitch_nm, "pitch_mm", KH_FIELD_NM, 20, 5000, .required = TRUE),
  END,
};
const KhFields kh_plan_lattice_fields = { lattice_rows, offsetof (KhLattice, other) };

gboolean kh_plan_read_run (KhReader *reader, KhNode node, const KhLattice *lattice, KhRun *run)
{
  int v[4];
  if (!kh_node_get_wholes (node, v, 4))
    {
      kh_reader_fault (reader, node, _ ("give a run as [column, row, column, row] of two lattice points"));
      return FALSE;
    }
  if (!kh_lattice_has_point (lattice, (KhPoint){ v[0], v[1] })
      || !kh_lattice_has_point (lattice, (KhPoint){ v[2], v[3] }))
    {
      kh_reader_fault (reader, node, _ ("it leaves the lattice; columns go from 0 to %d, rows from 0 to %d"),
                       lattice->columns, lattice->rows);
      return FALSE;
    }
  if ((v[0] == v[2]) == (v[1] == v[3]))
    {
      kh_reader_fault (
          reader, node,
          v[0] == v[2] ? _ ("it has no length; give two different lattice points")
                       : _ ("it does not lie on a lattice line; give two points with the same column or the same row"));
      return FALSE;
    }
  KhAxis axis = v[1] == v[3] ? KH_AXIS_X : KH_AXIS_Y;
  int a = axis == KH_AXIS_X ? v[0] : v[1], b = axis == KH_AXIS_X ? v[2] : v[3];
  *run = (KhRun){ axis, axis == KH_AXIS_X ? v[1] : v[0], MIN (a, b), MAX (a, b) };
  return TRUE;
}

void kh_plan_write_run (GString *json, KhRun run)
{
  if (run.axis == KH_AXIS_X)
    g_string_append_printf (json, "[%d, %d, %d, %d]", run.from, run.line, run.to, run.line);
  else
    g_string_append_printf (json, "[%d, %d, %d, %d]", run.line, run.from, run.line, run.to);
}

void kh_plan_read_runs (KhReader *reader, KhNode node, const KhLattice *lattice, guint8 *edges)
{
  KhStep step = { 0 };
  KhRun run;
  if (!kh_node_is_array (node))
    {
      kh_reader_fault (reader, node, _ ("give a list of runs"));
      return;
    }
  if (kh_node_get_length (node) > MOST_RUNS)
    {
      kh_reader_fault (reader, node, _ ("there are more than %d runs; join those that lie on one line"), MOST_RUNS);
      return;
    }
  for (guint i = 0; !kh_reader_is_full (reader) && kh_node_next (node, &step); i++)
    {
      gsize mark = kh_reader_enter_index (reader, i);
      if (kh_plan_read_run (reader, step.value, lattice, &run))
        for (int at = run.from; at < run.to; at++)
          {
            KhEdge edge = { run.axis, run.axis == KH_AXIS_X ? at : run.line, run.axis == KH_AXIS_X ? run.line : at };
            edges[kh_lattice_edge_index (lattice, edge)] = 1;
          }
      kh_reader_leave (reader, mark);
    }
}

static void read_wall_runs (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  KhPlan *plan = context;
  kh_plan_read_runs (reader, node, &plan->lattice, plan->walled);
}

/* The runs are written by the plan's writer, which has the edges at hand. */
static gboolean never (gconstpointer from) { return FALSE; }

static const KhField walls_rows[] = {
  ROW (KhWalls, thickness_nm, "thickness_mm", KH_FIELD_NM, 0.000002, 2500, .required = TRUE),
  ROW (KhWalls, height_nm, "height_mm", KH_FIELD_NM, 1, 3000, .required = TRUE),
  ROW (KhWalls, posts, "posts", KH_FIELD_CHOICE, .choices = posts_choices),
  { "runs", KH_FIELD_SPECIAL, .read = read_wall_runs, .wanted = never },
  END,
};
const KhFields kh_plan_walls_fields = { walls_rows, offsetof (KhWalls, other) };

/* Openings, marks, start, site, findings set aside */

static gboolean read_cell (KhReader *reader, KhNode node, const KhLattice *lattice, KhCell *cell)
{
  int v[2];
  if (!kh_node_get_wholes (node, v, 2))
    kh_reader_fault (reader, node, _ ("give a cell as [column, row]"));
  else if (!kh_lattice_has_cell (lattice, (KhCell){ v[0], v[1] }))
    kh_reader_fault (reader, node, _ ("the cell lies outside the lattice; columns go from 0 to %d, rows from 0 to %d"),
                     lattice->columns - 1, lattice->rows - 1);
  else
    {
      *cell = (KhCell){ v[0], v[1] };
      return TRUE;
    }
  return FALSE;
}

static void read_edge (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  KhRun run;
  if (!kh_plan_read_run (reader, node, &((KhPlan *)context)->lattice, &run))
    return;
  if (run.to - run.from != 1)
    kh_reader_fault (reader, node, _ ("an opening is one edge; give two neighbouring lattice points"));
  else
    ((KhOpening *)into)->edge = (KhEdge){ run.axis, run.axis == KH_AXIS_X ? run.from : run.line,
                                          run.axis == KH_AXIS_X ? run.line : run.from };
}

static void write_edge (GString *json, gconstpointer from)
{
  KhEdge edge = ((const KhOpening *)from)->edge;
  gboolean x = edge.axis == KH_AXIS_X;
  kh_plan_write_run (json, (KhRun){ edge.axis, x ? edge.row : edge.column, x ? edge.column : edge.row,
                                    (x ? edge.column : edge.row) + 1 });
}

static const KhField opening_rows[] = {
  { "edge", KH_FIELD_SPECIAL, .read = read_edge, .write = write_edge, .required = TRUE },
  ROW (KhOpening, use, "use", KH_FIELD_CHOICE, .choices = use_choices, .required = TRUE),
  END,
};
const KhFields kh_plan_opening_fields = { opening_rows, offsetof (KhOpening, other) };

static gboolean read_pair_nm (KhReader *reader, KhNode node, double least, double most, int64_t into[2])
{
  KhStep step = { 0 };
  double v[2];
  gsize n = 0;
  while (kh_node_is_array (node) && kh_node_next (node, &step))
    {
      if (n >= 2 || !kh_node_get_number (step.value, &v[n]) || !(v[n] >= least && v[n] <= most))
        n = 2;
      n++;
    }
  if (n != 2)
    {
      kh_reader_fault (reader, node, _ ("give two numbers, along x and along y, from %g to %g"), least, most);
      return FALSE;
    }
  into[0] = kh_nm_from_mm (v[0]);
  into[1] = kh_nm_from_mm (v[1]);
  return TRUE;
}

static void write_pair_nm (GString *json, const int64_t pair[2])
{
  g_string_append_c (json, '[');
  kh_json_append_nm (json, pair[0]);
  g_string_append (json, ", ");
  kh_json_append_nm (json, pair[1]);
  g_string_append_c (json, ']');
}

static void write_cell (GString *json, KhCell cell)
{
  g_string_append_printf (json, "[%d, %d]", cell.column, cell.row);
}

static void read_mark_cell (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  read_cell (reader, node, &((KhPlan *)context)->lattice, &((KhMark *)into)->cell);
}

static void write_mark_cell (GString *json, gconstpointer from) { write_cell (json, ((const KhMark *)from)->cell); }

static void read_mark_size (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  read_pair_nm (reader, node, 0.000001, 5000, ((KhMark *)into)->size_nm);
}

static void write_mark_size (GString *json, gconstpointer from)
{
  write_pair_nm (json, ((const KhMark *)from)->size_nm);
}

static void read_mark_offset (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  read_pair_nm (reader, node, -5000, 5000, ((KhMark *)into)->offset_nm);
}

static void write_mark_offset (GString *json, gconstpointer from)
{
  write_pair_nm (json, ((const KhMark *)from)->offset_nm);
}

static const KhField mark_rows[] = {
  { "cell", KH_FIELD_SPECIAL, .read = read_mark_cell, .write = write_mark_cell, .required = TRUE },
  { "size_mm", KH_FIELD_SPECIAL, .read = read_mark_size, .write = write_mark_size, .required = TRUE },
  { "offset_mm", KH_FIELD_SPECIAL, .read = read_mark_offset, .write = write_mark_offset },
  END,
};
const KhFields kh_plan_mark_fields = { mark_rows, offsetof (KhMark, other) };

static void read_start_cell (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  read_cell (reader, node, &((KhPlan *)context)->lattice, &((KhStart *)into)->cell);
}

static void write_start_cell (GString *json, gconstpointer from) { write_cell (json, ((const KhStart *)from)->cell); }

static const KhField start_rows[] = {
  { "cell", KH_FIELD_SPECIAL, .read = read_start_cell, .write = write_start_cell, .required = TRUE },
  ROW (KhStart, heading, "heading", KH_FIELD_CHOICE, .choices = heading_choices, .required = TRUE),
  END,
};
const KhFields kh_plan_start_fields = { start_rows, offsetof (KhStart, other) };

static const KhField site_rows[] = {
  ROW (KhSite, width_nm, "width_mm", KH_FIELD_NM, 1, 1000000, .required = TRUE),
  ROW (KhSite, depth_nm, "depth_mm", KH_FIELD_NM, 1, 1000000, .required = TRUE),
  ROW (KhSite, way_past_nm, "way_past_mm", KH_FIELD_NM, 0, 100000),
  END,
};
const KhFields kh_plan_site_fields = { site_rows, offsetof (KhSite, other) };

static void read_at (KhReader *reader, KhNode node, gpointer into, gpointer context)
{
  KhSetAside *entry = into;
  KhStep step = { 0 };
  gsize n = 0;
  gboolean good = kh_node_is_array (node);
  while (good && kh_node_next (node, &step))
    good = n < 2 && kh_node_get_number (step.value, &entry->at[n++]);
  if (!good || n != 2)
    kh_reader_fault (reader, node, _ ("give a place as [columns, rows]"));
}

static void write_at (GString *json, gconstpointer from)
{
  const KhSetAside *entry = from;
  g_string_append_c (json, '[');
  kh_json_append_number (json, entry->at[0]);
  g_string_append (json, ", ");
  kh_json_append_number (json, entry->at[1]);
  g_string_append_c (json, ']');
}

static const KhField set_aside_rows[] = {
  ROW (KhSetAside, code, "code", KH_FIELD_TEXT, .most = 200, .required = TRUE),
  { "at", KH_FIELD_SPECIAL, .read = read_at, .write = write_at, .required = TRUE },
  ROW (KhSetAside, reason, "reason", KH_FIELD_TEXT, .most = 2000),
  END,
};
const KhFields kh_plan_set_aside_fields = { set_aside_rows, offsetof (KhSetAside, other) };
