/* SPDX-License-Identifier: MIT */
#include "plan/lattice.h"
#include "base/elementary.h"

int kh_lattice_n_points (const KhLattice *lattice) { return (lattice->columns + 1) * (lattice->rows + 1); }

int kh_lattice_n_cells (const KhLattice *lattice) { return lattice->columns * lattice->rows; }

int kh_lattice_n_edges_x (const KhLattice *lattice) { return lattice->columns * (lattice->rows + 1); }

int kh_lattice_n_edges (const KhLattice *lattice)
{
  return kh_lattice_n_edges_x (lattice) + (lattice->columns + 1) * lattice->rows;
}

int kh_lattice_point_index (const KhLattice *lattice, KhPoint point)
{
  return point.row * (lattice->columns + 1) + point.column;
}

int kh_lattice_cell_index (const KhLattice *lattice, KhCell cell) { return cell.row * lattice->columns + cell.column; }

int kh_lattice_edge_index (const KhLattice *lattice, KhEdge edge)
{
  return edge.axis == KH_AXIS_X ? edge.row * lattice->columns + edge.column
                                : kh_lattice_n_edges_x (lattice) + edge.column * lattice->rows + edge.row;
}

KhPoint kh_lattice_point_at (const KhLattice *lattice, int index)
{
  return (KhPoint){ index % (lattice->columns + 1), index / (lattice->columns + 1) };
}

KhCell kh_lattice_cell_at (const KhLattice *lattice, int index)
{
  return (KhCell){ index % lattice->columns, index / lattice->columns };
}

KhEdge kh_lattice_edge_at (const KhLattice *lattice, int index)
{
  int n_x = kh_lattice_n_edges_x (lattice);
  if (index < n_x)
    return (KhEdge){ KH_AXIS_X, index % lattice->columns, index / lattice->columns };
  return (KhEdge){ KH_AXIS_Y, (index - n_x) / lattice->rows, (index - n_x) % lattice->rows };
}

gboolean kh_lattice_has_cell (const KhLattice *lattice, KhCell cell)
{
  return cell.column >= 0 && cell.row >= 0 && cell.column < lattice->columns && cell.row < lattice->rows;
}

gboolean kh_lattice_has_point (const KhLattice *lattice, KhPoint point)
{
  return point.column >= 0 && point.row >= 0 && point.column <= lattice->columns && point.row <= lattice->rows;
}

gboolean kh_lattice_has_edge (const KhLattice *lattice, KhEdge edge)
{
  KhPoint ends[2];
  kh_edge_get_points (edge, ends);
  return kh_lattice_has_point (lattice, ends[0]) && kh_lattice_has_point (lattice, ends[1]);
}

void kh_heading_get_step (KhHeading heading, int *columns, int *rows)
{
  static const int steps[KH_N_HEADINGS][2] = { { 0, 1 }, { 1, 0 }, { 0, -1 }, { -1, 0 } };
  *columns = steps[heading][0];
  *rows = steps[heading][1];
}

KhCell kh_cell_neighbour (KhCell cell, KhHeading heading)
{
  int columns, rows;
  kh_heading_get_step (heading, &columns, &rows);
  return (KhCell){ cell.column + columns, cell.row + rows };
}

KhEdge kh_cell_edge (KhCell cell, KhHeading heading)
{
  switch (heading)
    {
    case KH_HEADING_NORTH:
      return (KhEdge){ KH_AXIS_X, cell.column, cell.row + 1 };
    case KH_HEADING_EAST:
      return (KhEdge){ KH_AXIS_Y, cell.column + 1, cell.row };
    case KH_HEADING_SOUTH:
      return (KhEdge){ KH_AXIS_X, cell.column, cell.row };
    default:
      return (KhEdge){ KH_AXIS_Y, cell.column, cell.row };
    }
}

void kh_edge_get_points (KhEdge edge, KhPoint ends[2])
{
  ends[0] = (KhPoint){ edge.column, edge.row };
  ends[1] = (KhPoint){ edge.column + (edge.axis == KH_AXIS_X), edge.row + (edge.axis == KH_AXIS_Y) };
}

void kh_edge_get_cells (KhEdge edge, KhCell sides[2])
{
  sides[0] = (KhCell){ edge.column - (edge.axis == KH_AXIS_Y), edge.row - (edge.axis == KH_AXIS_X) };
  sides[1] = (KhCell){ edge.column, edge.row };
}

KhHeading kh_heading_turned (KhHeading heading, int quarter_turns_right)
{
  return (KhHeading)(((int)heading + quarter_turns_right % KH_N_HEADINGS + KH_N_HEADINGS) % KH_N_HEADINGS);
}

double kh_heading_get_angle_rad (KhHeading heading)
{
  static const double angles[KH_N_HEADINGS] = { KH_PI / 2, 0, -KH_PI / 2, KH_PI };
  return angles[heading];
}

char *kh_column_dup_letters (int column)
{
  g_autoptr (GString) letters = g_string_new (NULL);
  for (int rest = column; rest >= 0; rest = rest / 26 - 1)
    g_string_prepend_c (letters, (char)('A' + rest % 26));
  return g_strdup (letters->str);
}

char *kh_cell_dup_name (KhCell cell)
{
  g_autofree char *letters = kh_column_dup_letters (cell.column);
  return g_strdup_printf ("%s%d", letters, cell.row + 1);
}

char *kh_run_dup_label (KhRun run)
{
  return g_strdup_printf ("%c%d:%d-%d", run.axis == KH_AXIS_X ? 'X' : 'Y', run.line, run.from, run.to);
}
