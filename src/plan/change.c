/* SPDX-License-Identifier: MIT */
#include "plan/change.h"
#include "plan/lists.h"
#include <string.h>

typedef enum
{
  CHANGE_WALLS,
  CHANGE_GAPS,
  CHANGE_LOCKED,
  CHANGE_OPENINGS,
  CHANGE_MARKS,
  CHANGE_START,
  CHANGE_ROBOT,
  CHANGE_BUILD,
  CHANGE_WALL_SIZES,
  CHANGE_TEXTS,
  CHANGE_SITE,
  CHANGE_SET_ASIDE,
  CHANGE_PLAN,
  CHANGE_GROUP
} Kind;

/* One bit of an edge or a cell, and what it becomes. */
typedef struct
{
  KhEdge place; /* a cell's column and row, axis 0, for gaps */
  guint8 value;
} Bit;

struct KhChange
{
  Kind kind;
  union {
    GArray *bits; /* of Bit: walls, gaps, locked */
    GArray *list; /* openings, marks, set aside */
    struct
    {
      KhStart start;
      gboolean has;
    } start;
    KhRobot robot;
    KhBuild build;
    KhWalls sizes; /* other is not used */
    struct
    {
      char *title, *notes;
    } texts;
    struct
    {
      KhSite site;
      gboolean has;
    } site;
    KhPlan *plan;
    GPtrArray *group; /* of KhChange */
  };
};

static KhChange *change_new (Kind kind)
{
  KhChange *change = g_new0 (KhChange, 1);
  change->kind = kind;
  return change;
}

static KhChange *bits_new (Kind kind)
{
  KhChange *change = change_new (kind);
  change->bits = g_array_new (FALSE, FALSE, sizeof (Bit));
  return change;
}

static KhChange *edges_new (Kind kind, const KhEdge *edges, gsize n, gboolean value)
{
  KhChange *change = bits_new (kind);
  for (gsize i = 0; i < n; i++)
    {
      Bit bit = { edges[i], value != FALSE };
      g_array_append_val (change->bits, bit);
    }
  return change;
}

KhChange *kh_change_new_walls (const KhEdge *edges, gsize n, gboolean walled)
{
  return edges_new (CHANGE_WALLS, edges, n, walled);
}

KhChange *kh_change_new_locked (const KhEdge *edges, gsize n, gboolean locked)
{
  return edges_new (CHANGE_LOCKED, edges, n, locked);
}

KhChange *kh_change_new_gaps (const KhCell *cells, gsize n, gboolean gap)
{
  KhChange *change = bits_new (CHANGE_GAPS);
  for (gsize i = 0; i < n; i++)
    {
      Bit bit = { { KH_AXIS_X, cells[i].column, cells[i].row }, gap != FALSE };
      g_array_append_val (change->bits, bit);
    }
  return change;
}

KhChange *kh_change_new_openings (const KhOpening *openings, gsize n)
{
  KhChange *change = change_new (CHANGE_OPENINGS);
  change->list = kh_openings_new ();
  for (gsize i = 0; i < n; i++)
    {
      KhOpening opening = openings[i];
      opening.other = g_strdup (opening.other);
      g_array_append_val (change->list, opening);
    }
  return change;
}

KhChange *kh_change_new_marks (const KhMark *marks, gsize n)
{
  KhChange *change = change_new (CHANGE_MARKS);
  change->list = kh_marks_new ();
  for (gsize i = 0; i < n; i++)
    {
      KhMark mark = marks[i];
      mark.other = g_strdup (mark.other);
      g_array_append_val (change->list, mark);
    }
  return change;
}

KhChange *kh_change_new_set_aside (const KhSetAside *list, gsize n)
{
  KhChange *change = change_new (CHANGE_SET_ASIDE);
  change->list = kh_set_aside_new ();
  for (gsize i = 0; i < n; i++)
    {
      KhSetAside entry = {
        g_strdup (list[i].code), { list[i].at[0], list[i].at[1] }, g_strdup (list[i].reason), g_strdup (list[i].other)
      };
      g_array_append_val (change->list, entry);
    }
  return change;
}

KhChange *kh_change_new_start (const KhStart *start_or_null)
{
  KhChange *change = change_new (CHANGE_START);
  change->start.has = start_or_null != NULL;
  if (start_or_null)
    change->start.start = *start_or_null;
  change->start.start.other = g_strdup (change->start.start.other);
  return change;
}

KhChange *kh_change_new_site (const KhSite *site_or_null)
{
  KhChange *change = change_new (CHANGE_SITE);
  change->site.has = site_or_null != NULL;
  if (site_or_null)
    change->site.site = *site_or_null;
  change->site.site.other = g_strdup (change->site.site.other);
  return change;
}

KhChange *kh_change_new_robot (const KhRobot *robot)
{
  KhChange *change = change_new (CHANGE_ROBOT);
  kh_robot_copy (&change->robot, robot);
  return change;
}

KhChange *kh_change_new_build (const KhBuild *build)
{
  KhChange *change = change_new (CHANGE_BUILD);
  kh_build_copy (&change->build, build);
  return change;
}

KhChange *kh_change_new_wall_sizes (int64_t thickness_nm, int64_t height_nm, KhPosts posts)
{
  KhChange *change = change_new (CHANGE_WALL_SIZES);
  change->sizes = (KhWalls){ thickness_nm, height_nm, posts, NULL };
  return change;
}

KhChange *kh_change_new_texts (const char *title, const char *notes)
{
  KhChange *change = change_new (CHANGE_TEXTS);
  change->texts.title = g_strdup (title);
  change->texts.notes = g_strdup (notes);
  return change;
}

KhChange *kh_change_new_plan (const KhPlan *plan)
{
  KhChange *change = change_new (CHANGE_PLAN);
  change->plan = kh_plan_copy (plan);
  return change;
}

KhChange *kh_change_new_group_take (GPtrArray *changes)
{
  KhChange *change = change_new (CHANGE_GROUP);
  g_ptr_array_set_free_func (changes, (GDestroyNotify)kh_change_free);
  change->group = changes;
  return change;
}

KhChange *kh_change_copy (const KhChange *change)
{
  switch (change->kind)
    {
    case CHANGE_WALLS:
    case CHANGE_GAPS:
      case CHANGE_LOCKED: {
        KhChange *copy = change_new (change->kind);
        copy->bits = g_array_copy (change->bits);
        return copy;
      }
    case CHANGE_OPENINGS:
      return kh_change_new_openings ((const KhOpening *)(const void *)change->list->data, change->list->len);
    case CHANGE_MARKS:
      return kh_change_new_marks ((const KhMark *)(const void *)change->list->data, change->list->len);
    case CHANGE_SET_ASIDE:
      return kh_change_new_set_aside ((const KhSetAside *)(const void *)change->list->data, change->list->len);
    case CHANGE_START:
      return kh_change_new_start (change->start.has ? &change->start.start : NULL);
    case CHANGE_ROBOT:
      return kh_change_new_robot (&change->robot);
    case CHANGE_BUILD:
      return kh_change_new_build (&change->build);
    case CHANGE_WALL_SIZES:
      return kh_change_new_wall_sizes (change->sizes.thickness_nm, change->sizes.height_nm, change->sizes.posts);
    case CHANGE_TEXTS:
      return kh_change_new_texts (change->texts.title, change->texts.notes);
    case CHANGE_SITE:
      return kh_change_new_site (change->site.has ? &change->site.site : NULL);
    case CHANGE_PLAN:
      return kh_change_new_plan (change->plan);
    case CHANGE_GROUP:
      break;
    }
  GPtrArray *copies = g_ptr_array_new ();
  for (guint i = 0; i < change->group->len; i++)
    g_ptr_array_add (copies, kh_change_copy (g_ptr_array_index (change->group, i)));
  return kh_change_new_group_take (copies);
}

void kh_change_free (KhChange *change)
{
  if (!change)
    return;
  switch (change->kind)
    {
    case CHANGE_WALLS:
    case CHANGE_GAPS:
    case CHANGE_LOCKED:
      g_array_unref (change->bits);
      break;
    case CHANGE_OPENINGS:
    case CHANGE_MARKS:
    case CHANGE_SET_ASIDE:
      g_array_unref (change->list);
      break;
    case CHANGE_START:
      g_free (change->start.start.other);
      break;
    case CHANGE_ROBOT:
      kh_robot_clear (&change->robot);
      break;
    case CHANGE_BUILD:
      kh_build_clear (&change->build);
      break;
    case CHANGE_WALL_SIZES:
      break;
    case CHANGE_TEXTS:
      g_free (change->texts.title);
      g_free (change->texts.notes);
      break;
    case CHANGE_SITE:
      g_free (change->site.site.other);
      break;
    case CHANGE_PLAN:
      kh_plan_free (change->plan);
      break;
    case CHANGE_GROUP:
      g_ptr_array_unref (change->group);
      break;
    }
  g_free (change);
}

gboolean kh_change_is_idle (const KhChange *change, const KhPlan *plan)
{
  g_autoptr (KhPlan) copy = kh_plan_copy (plan);
  kh_change_free (kh_change_apply (change, copy));
  return kh_plan_equal (plan, copy);
}

/* The bits in reverse order, so that an edge named twice comes back right too. */
static KhChange *apply_bits (const KhChange *change, KhPlan *plan, guint8 *bits)
{
  KhChange *back = bits_new (change->kind);
  for (guint i = 0; i < change->bits->len; i++)
    {
      Bit bit = g_array_index (change->bits, Bit, i);
      KhCell cell = { bit.place.column, bit.place.row };
      gboolean inside = change->kind == CHANGE_GAPS ? kh_lattice_has_cell (&plan->lattice, cell)
                                                    : kh_lattice_has_edge (&plan->lattice, bit.place);
      g_assert (inside);
      int at = change->kind == CHANGE_GAPS ? kh_lattice_cell_index (&plan->lattice, cell)
                                           : kh_lattice_edge_index (&plan->lattice, bit.place);
      guint8 was = bits[at];
      bits[at] = bit.value;
      bit.value = was;
      g_array_append_val (back->bits, bit);
    }
  for (guint i = 0; i < back->bits->len / 2; i++)
    {
      Bit *low = &g_array_index (back->bits, Bit, i), *high = &g_array_index (back->bits, Bit, back->bits->len - 1 - i);
      Bit kept = *low;
      *low = *high;
      *high = kept;
    }
  return back;
}

static KhChange *apply_group (const KhChange *change, KhPlan *plan)
{
  GPtrArray *backs = g_ptr_array_new ();
  for (guint i = 0; i < change->group->len; i++)
    g_ptr_array_insert (backs, 0, kh_change_apply (g_ptr_array_index (change->group, i), plan));
  return kh_change_new_group_take (backs);
}

static void swap_list (GArray **of_plan, GArray *of_change, GArray *(*copy) (const GArray *))
{
  GArray *fresh = copy (of_change);
  g_array_unref (*of_plan);
  *of_plan = fresh;
}

/* The small ones: what the plan holds now, as a change of the same kind. */
static KhChange *dup_present (Kind kind, const KhPlan *plan)
{
  switch (kind)
    {
    case CHANGE_OPENINGS:
      return kh_change_new_openings ((const KhOpening *)(const void *)plan->openings->data, plan->openings->len);
    case CHANGE_MARKS:
      return kh_change_new_marks ((const KhMark *)(const void *)plan->marks->data, plan->marks->len);
    case CHANGE_SET_ASIDE:
      return kh_change_new_set_aside ((const KhSetAside *)(const void *)plan->set_aside->data, plan->set_aside->len);
    case CHANGE_START:
      return kh_change_new_start (plan->has_start ? &plan->start : NULL);
    case CHANGE_ROBOT:
      return kh_change_new_robot (&plan->robot);
    case CHANGE_BUILD:
      return kh_change_new_build (&plan->build);
    case CHANGE_WALL_SIZES:
      return kh_change_new_wall_sizes (plan->walls.thickness_nm, plan->walls.height_nm, plan->walls.posts);
    case CHANGE_TEXTS:
      return kh_change_new_texts (plan->title, plan->notes);
    case CHANGE_SITE:
      return kh_change_new_site (plan->has_site ? &plan->site : NULL);
    default:
      return kh_change_new_plan (plan);
    }
}

static void replace_text (char **text, const char *with)
{
  char *fresh = g_strdup (with);
  g_free (*text);
  *text = fresh;
}

/* Puts a small one, or a whole plan, into the plan. */
static void put (const KhChange *change, KhPlan *plan)
{
  switch (change->kind)
    {
    case CHANGE_OPENINGS:
      swap_list (&plan->openings, change->list, kh_openings_copy);
      break;
    case CHANGE_MARKS:
      swap_list (&plan->marks, change->list, kh_marks_copy);
      break;
    case CHANGE_SET_ASIDE:
      swap_list (&plan->set_aside, change->list, kh_set_aside_copy);
      break;
    case CHANGE_START:
      replace_text (&plan->start.other, change->start.start.other);
      plan->start.cell = change->start.start.cell;
      plan->start.heading = change->start.start.heading;
      plan->has_start = change->start.has;
      break;
    case CHANGE_ROBOT:
      kh_robot_clear (&plan->robot);
      kh_robot_copy (&plan->robot, &change->robot);
      break;
    case CHANGE_BUILD:
      kh_build_clear (&plan->build);
      kh_build_copy (&plan->build, &change->build);
      break;
    case CHANGE_WALL_SIZES:
      plan->walls.thickness_nm = change->sizes.thickness_nm;
      plan->walls.height_nm = change->sizes.height_nm;
      plan->walls.posts = change->sizes.posts;
      break;
    case CHANGE_TEXTS:
      replace_text (&plan->title, change->texts.title);
      replace_text (&plan->notes, change->texts.notes);
      break;
    case CHANGE_SITE:
      g_free (plan->site.other);
      plan->site = change->site.site;
      plan->site.other = g_strdup (plan->site.other);
      plan->has_site = change->site.has;
      break;
      default: {
        KhPlan *fresh = kh_plan_copy (change->plan), old = *plan;
        *plan = *fresh;
        *fresh = old;
        kh_plan_free (fresh);
      }
    }
}

KhChange *kh_change_apply (const KhChange *change, KhPlan *plan)
{
  if (change->kind == CHANGE_WALLS)
    return apply_bits (change, plan, plan->walled);
  if (change->kind == CHANGE_GAPS)
    return apply_bits (change, plan, plan->gap);
  if (change->kind == CHANGE_LOCKED)
    {
      if (!plan->locked)
        plan->locked = g_malloc0 ((gsize)kh_lattice_n_edges (&plan->lattice));
      return apply_bits (change, plan, plan->locked);
    }
  if (change->kind == CHANGE_GROUP)
    return apply_group (change, plan);
  KhChange *back = dup_present (change->kind, plan);
  put (change, plan);
  return back;
}
