/* SPDX-License-Identifier: MIT */
#include "base/units.h"
#include "files/planfields.h"
#include "files/planfile.h"
#include "files/store.h"
#include "plan/lists.h"
#include <glib/gi18n-lib.h>
#include <string.h>

#define KIND "kerfhand maze plan"
#define MOST_TITLE 200
#define MOST_NOTES 20000

/* The members of the whole file, in the order of writing. */
typedef enum
{
  MEMBER_KIND,
  MEMBER_VERSION,
  MEMBER_TITLE,
  MEMBER_NOTES,
  MEMBER_LATTICE,
  MEMBER_WALLS,
  MEMBER_GAPS,
  MEMBER_OPENINGS,
  MEMBER_MARKS,
  MEMBER_START,
  MEMBER_SITE,
  MEMBER_SET_ASIDE,
  MEMBER_LOCKED,
  MEMBER_ROBOT,
  MEMBER_BUILD,
  N_MEMBERS
} Member;

static const char *const member_names[N_MEMBERS] = {
  "kind",  "version", "title", "notes",     "lattice", "walls", "gaps",  "openings",
  "marks", "start",   "site",  "set_aside", "locked",  "robot", "build",
};

/* Members may come in any order; they are looked up first and read in ours,
 * since most of them need the lattice. */
static char *find_members (KhNode root, KhNode members[N_MEMBERS])
{
  KhStep step = { 0 };
  g_autoptr (GString) other = g_string_new (NULL);
  while (kh_node_next (root, &step))
    {
      int i = 0;
      while (i < N_MEMBERS && strcmp (member_names[i], step.name) != 0)
        i++;
      if (i < N_MEMBERS)
        {
          members[i] = step.value;
          continue;
        }
      g_string_append (other, other->len > 0 ? ",\n  " : "");
      g_string_append_len (other, step.name_source, step.name_end - step.name_source);
      g_string_append (other, ": ");
      g_string_append_len (other, step.value.source, step.value.end - step.value.source);
    }
  return other->len > 0 ? g_strdup (other->str) : NULL;
}

static gboolean check_kind (KhReader *reader, const KhNode members[N_MEMBERS])
{
  int version = 0;
  const char *kind = members[MEMBER_KIND].item ? kh_node_get_text (members[MEMBER_KIND]) : NULL;
  if (g_strcmp0 (kind, KIND) != 0)
    {
      if (members[MEMBER_KIND].item)
        {
          gsize mark = kh_reader_enter_member (reader, "kind");
          kh_reader_fault (reader, members[MEMBER_KIND], _ ("this is no maze plan; give \"%s\""), KIND);
          kh_reader_leave (reader, mark);
        }
      else
        kh_reader_missing (reader, "kind", _ ("this is no maze plan; a plan says \"kind\": \"kerfhand maze plan\""));
      return FALSE;
    }
  if (!members[MEMBER_VERSION].item)
    {
      kh_reader_missing (reader, "version", _ ("give 1"));
      return FALSE;
    }
  if (kh_node_get_whole (members[MEMBER_VERSION], &version) && version == 1)
    return TRUE;
  gsize mark = kh_reader_enter_member (reader, "version");
  kh_reader_fault (reader, members[MEMBER_VERSION],
                   version > 1 ? _ ("made by a newer Kerfhand; open it with that one, or bring this one up to date")
                               : _ ("give 1"));
  kh_reader_leave (reader, mark);
  return FALSE;
}

static void read_text (KhReader *reader, KhNode node, int member, glong most, char **into)
{
  if (!node.item)
    return;
  gsize mark = kh_reader_enter_member (reader, member_names[member]);
  const char *text = kh_node_get_text (node);
  if (!text)
    kh_reader_fault (reader, node, _ ("give a text in quotes"));
  else if (g_utf8_strlen (text, -1) > most)
    kh_reader_fault (reader, node, _ ("the text has %ld characters; give %ld at most"), g_utf8_strlen (text, -1), most);
  else
    {
      g_free (*into);
      *into = g_strdup (text);
    }
  kh_reader_leave (reader, mark);
}

static void read_walls (KhReader *reader, KhNode node, KhPlan *plan)
{
  memset (plan->walled, 0, (gsize)kh_lattice_n_edges (&plan->lattice));
  kh_fields_read (&kh_plan_walls_fields, reader, node, &plan->walls, plan);
  if (kh_reader_has_faults (reader))
    return;
  plan->walls.thickness_nm += plan->walls.thickness_nm % 2; /* half of it is whole, too */
  if (2 * plan->walls.thickness_nm >= plan->lattice.pitch_nm)
    {
      gsize mark = kh_reader_enter_member (reader, "thickness_mm");
      g_autofree char *half = kh_nm_dup_file_text (plan->lattice.pitch_nm / 2);
      kh_reader_fault (reader, node, _ ("the walls must be thinner than half the pitch, %s mm"), half);
      kh_reader_leave (reader, mark);
    }
}

static void read_gaps (KhReader *reader, KhNode node, KhPlan *plan)
{
  KhStep step = { 0 };
  int v[4];
  if (!kh_node_is_array (node))
    {
      kh_reader_fault (reader, node, _ ("give a list of rectangles [column, row, columns, rows]"));
      return;
    }
  guint64 n_cells = 0;
  for (guint i = 0; !kh_reader_is_full (reader) && kh_node_next (node, &step); i++)
    {
      gsize mark = kh_reader_enter_index (reader, i);
      if (!kh_node_get_wholes (step.value, v, 4))
        kh_reader_fault (reader, step.value, _ ("give a rectangle of cells as [column, row, columns, rows]"));
      else if (v[0] < 0 || v[1] < 0 || v[2] < 1 || v[3] < 1 || v[0] >= plan->lattice.columns
               || v[1] >= plan->lattice.rows || v[2] > plan->lattice.columns - v[0] || v[3] > plan->lattice.rows - v[1])
        kh_reader_fault (reader, step.value, _ ("the rectangle must hold a cell and lie within %d columns and %d rows"),
                         plan->lattice.columns, plan->lattice.rows);
      /* Rectangles may overlap, but not without end: reading must not take long. */
      else if ((n_cells += (guint64)v[2] * (guint64)v[3]) > 100u * KH_LATTICE_MOST * KH_LATTICE_MOST)
        {
          kh_reader_fault (reader, step.value, _ ("the rectangles overlap too often; give each cell once"));
          return;
        }
      else
        for (int row = v[1]; row < v[1] + v[3]; row++)
          memset (plan->gap + kh_lattice_cell_index (&plan->lattice, (KhCell){ v[0], row }), 1, (gsize)v[2]);
      kh_reader_leave (reader, mark);
    }
}

static int compare_indices (gconstpointer a, gconstpointer b) { return *(const int *)a - *(const int *)b; }

static void check_openings (KhReader *reader, KhNode node, const KhPlan *plan)
{
  g_autoptr (GArray) indices = g_array_new (FALSE, FALSE, sizeof (int));
  for (guint i = 0; i < plan->openings->len; i++)
    {
      int index = kh_lattice_edge_index (&plan->lattice, g_array_index (plan->openings, KhOpening, i).edge);
      g_array_append_val (indices, index);
    }
  g_array_sort (indices, compare_indices);
  for (guint i = 1; i < indices->len; i++)
    if (g_array_index (indices, int, i) == g_array_index (indices, int, i - 1))
      {
        kh_reader_fault (reader, node, _ ("an edge is named twice; keep one opening for each"));
        return;
      }
}

static void read_openings (KhReader *reader, KhNode node, KhPlan *plan)
{
  KhStep step = { 0 };
  gsize most = (gsize)kh_lattice_n_edges (&plan->lattice);
  if (!kh_node_is_array (node) || kh_node_get_length (node) > most)
    {
      kh_reader_fault (reader, node, _ ("give a list of openings, at most one an edge"));
      return;
    }
  for (guint i = 0; !kh_reader_is_full (reader) && kh_node_next (node, &step); i++)
    {
      KhOpening opening = { 0 };
      gsize mark = kh_reader_enter_index (reader, i);
      kh_fields_read (&kh_plan_opening_fields, reader, step.value, &opening, plan);
      kh_reader_leave (reader, mark);
      g_array_append_val (plan->openings, opening);
    }
  if (!kh_reader_has_faults (reader))
    check_openings (reader, node, plan);
}

static void read_marks (KhReader *reader, KhNode node, KhPlan *plan)
{
  KhStep step = { 0 };
  if (!kh_node_is_array (node) || kh_node_get_length (node) > KH_MARKS_MOST)
    {
      kh_reader_fault (reader, node, _ ("give a list of at most %d marks"), KH_MARKS_MOST);
      return;
    }
  for (guint i = 0; !kh_reader_is_full (reader) && kh_node_next (node, &step); i++)
    {
      KhMark mark = { 0 };
      gsize place = kh_reader_enter_index (reader, i);
      kh_fields_read (&kh_plan_mark_fields, reader, step.value, &mark, plan);
      kh_reader_leave (reader, place);
      g_array_append_val (plan->marks, mark);
    }
}

static void read_set_aside (KhReader *reader, KhNode node, KhPlan *plan)
{
  KhStep step = { 0 };
  if (!kh_node_is_array (node) || kh_node_get_length (node) > 10000)
    {
      kh_reader_fault (reader, node, _ ("give a list of at most 10000 findings"));
      return;
    }
  for (guint i = 0; !kh_reader_is_full (reader) && kh_node_next (node, &step); i++)
    {
      KhSetAside entry = { .code = g_strdup (""), .reason = g_strdup ("") };
      gsize mark = kh_reader_enter_index (reader, i);
      kh_fields_read (&kh_plan_set_aside_fields, reader, step.value, &entry, plan);
      kh_reader_leave (reader, mark);
      g_array_append_val (plan->set_aside, entry);
    }
}

static void read_member (KhReader *reader, KhNode node, int member, KhPlan *plan)
{
  if (!node.item || kh_reader_is_full (reader))
    return;
  gsize mark = kh_reader_enter_member (reader, member_names[member]);
  switch (member)
    {
    case MEMBER_WALLS:
      read_walls (reader, node, plan);
      break;
    case MEMBER_GAPS:
      read_gaps (reader, node, plan);
      break;
    case MEMBER_OPENINGS:
      read_openings (reader, node, plan);
      break;
    case MEMBER_MARKS:
      read_marks (reader, node, plan);
      break;
    case MEMBER_START:
      plan->has_start = TRUE;
      kh_fields_read (&kh_plan_start_fields, reader, node, &plan->start, plan);
      break;
    case MEMBER_SITE:
      plan->has_site = TRUE;
      kh_fields_read (&kh_plan_site_fields, reader, node, &plan->site, plan);
      break;
    case MEMBER_SET_ASIDE:
      read_set_aside (reader, node, plan);
      break;
    case MEMBER_LOCKED:
      plan->locked = g_malloc0 ((gsize)kh_lattice_n_edges (&plan->lattice));
      kh_plan_read_runs (reader, node, &plan->lattice, plan->locked);
      break;
    case MEMBER_ROBOT:
      kh_fields_read (&kh_plan_robot_fields, reader, node, &plan->robot, plan);
      break;
    default:
      kh_fields_read (&kh_plan_build_fields, reader, node, &plan->build, plan);
    }
  kh_reader_leave (reader, mark);
}

/* A robot whose numbers are in range one by one but cannot be together. */
static void check_robot (KhReader *reader, KhNode node, const KhPlan *plan)
{
  g_autoptr (GError) error = NULL;
  gsize mark = kh_reader_enter_member (reader, "robot");
  if (node.item && !kh_reader_has_faults (reader) && !kh_robot_check (&plan->robot, &error))
    kh_reader_fault (reader, node, "%s", error->message);
  kh_reader_leave (reader, mark);
}

static KhPlan *read_plan (KhReader *reader, const KhNode members[N_MEMBERS])
{
  KhLattice lattice = { 0 };
  if (!check_kind (reader, members))
    return NULL;
  if (!members[MEMBER_LATTICE].item)
    kh_reader_missing (reader, "lattice", _ ("give {\"columns\": …, \"rows\": …, \"pitch_mm\": …}"));
  else
    {
      gsize mark = kh_reader_enter_member (reader, "lattice");
      kh_fields_read (&kh_plan_lattice_fields, reader, members[MEMBER_LATTICE], &lattice, NULL);
      kh_reader_leave (reader, mark);
    }
  if (!members[MEMBER_WALLS].item)
    kh_reader_missing (reader, "walls", _ ("give {\"thickness_mm\": …, \"height_mm\": …, \"runs\": […]}"));
  /* What is left is read against a lattice of some size, so that its faults are told too. */
  gboolean known = lattice.columns > 0 && lattice.rows > 0 && lattice.pitch_nm > 0;
  KhPlan *plan = kh_plan_new (known ? lattice.columns : KH_LATTICE_MOST, known ? lattice.rows : KH_LATTICE_MOST,
                              known ? lattice.pitch_nm : 5000 * KH_NM_PER_MM, 2, KH_NM_PER_MM);
  plan->lattice.other = lattice.other;
  plan->has_start = FALSE;
  kh_robot_clear (&plan->robot);
  kh_robot_init (&plan->robot);
  read_text (reader, members[MEMBER_TITLE], MEMBER_TITLE, MOST_TITLE, &plan->title);
  read_text (reader, members[MEMBER_NOTES], MEMBER_NOTES, MOST_NOTES, &plan->notes);
  for (int member = MEMBER_WALLS; member < N_MEMBERS; member++)
    read_member (reader, members[member], member, plan);
  check_robot (reader, members[MEMBER_ROBOT], plan);
  return plan;
}

KhPlan *kh_plan_file_parse (const char *bytes, gsize n, const char *name, GPtrArray **faults)
{
  KhNode root, members[N_MEMBERS] = { 0 };
  g_autoptr (KhReader) reader = kh_reader_new (bytes, n, name, faults, &root);
  if (!reader)
    return NULL;
  if (!kh_node_is_object (root))
    {
      kh_reader_fault (reader, root, _ ("a maze plan is an object: { and }"));
      return NULL;
    }
  g_autofree char *other = find_members (root, members);
  KhPlan *plan = read_plan (reader, members);
  if (kh_reader_has_faults (reader))
    {
      kh_plan_free (plan);
      return NULL;
    }
  plan->other = g_steal_pointer (&other);
  return plan;
}

KhPlan *kh_plan_file_load (const char *path, GPtrArray **faults)
{
  g_autofree char *bytes = NULL;
  g_autoptr (GError) error = NULL;
  gsize n;
  if (kh_store_load (path, KH_PLAN_FILE_MOST_BYTES, &bytes, &n, &error))
    return kh_plan_file_parse (bytes, n, path, faults);
  if (!*faults)
    *faults = g_ptr_array_new_with_free_func (g_free);
  g_ptr_array_add (*faults, g_strdup (error->message));
  return NULL;
}
