/* SPDX-License-Identifier: MIT */
/* What is said of a plan file that cannot be read, word for word, and what is kept of one that can. */
#include "../cmocka_all.h"
#include "base/units.h"
#include "files/planfile.h"
#include <string.h>

#define HEAD "{\"kind\": \"kerfhand maze plan\", \"version\": 1, \"lattice\": {\"columns\": 2, \"rows\": 2, \"pitch_mm\": 180}, "
#define WALLS "\"walls\": {\"thickness_mm\": 12, \"height_mm\": 50, \"runs\": []}"

typedef struct
{
  const char *text, *fault;
} Case;

/* One fault each; "x" is what the file is called. */
static const Case cases[] = {
  { "", "x: the file is empty" },
  { "{", "x: line 1, column 2: the text ends inside an object" },
  { "{\n \"a\": 01}", "x: line 2, column 7: a number must not begin with 0" },
  { "[1, 2,]", "x: line 1, column 7: a value is asked for here: a text in quotes, a number, true, false, null, [ or {" },
  { "{\"a\": 1e999}", "x: line 1, column 7: a number is too large; a number must be finite" },
  { "{\"a\": 1.}", "x: line 1, column 9: a digit is missing in a number" },
  { "{\"a\": \"\\q\"}", "x: line 1, column 9: a backslash must be followed by one of \" \\ / b f n r t u" },
  { "{\"a\": \"\\u0000\"}", "x: line 1, column 14: the character \\u0000 cannot stand in a text" },
  { "{\"a\": \"\\ud800x\"}", "x: line 1, column 14: half of a surrogate pair stands alone" },
  { "{\"a\": \"\xff\"}", "x: line 1, column 8: this is not UTF-8 text" },
  { "\xef\xbb\xbf{}", "x: line 1, column 1: the text begins with a byte order mark; save it as UTF-8 without one" },
  { "{} {}", "x: line 1, column 4: something follows after the end" },
  { "5", "x: the whole file: here stands 5; a maze plan is an object: { and }" },
  { "{}", "x: kind: this member is missing; this is no maze plan; a plan says \"kind\": \"kerfhand maze plan\"" },
  { "{\"kind\": \"other\", \"version\": 1}", "x: kind: here stands \"other\"; this is no maze plan; give \"kerfhand maze plan\"" },
  { "{\"kind\": \"kerfhand maze plan\", \"version\": 2}",
    "x: version: here stands 2; made by a newer Kerfhand; open it with that one, or bring this one up to date" },
  { HEAD WALLS ", \"title\": 5}", "x: title: here stands 5; give a text in quotes" },
  { HEAD WALLS ", \"title\": \"a\", \"title\": \"b\"}", "x: title: this member stands twice; keep one of them" },
  { HEAD WALLS ", \"robot\": {\"drive\": {\"track_mm\": 80, \"track_mm\": 80}}}", "x: robot.drive.track_mm: this member stands twice; keep one of them" },
  { HEAD "\"walls\": {\"thickness_mm\": 90, \"height_mm\": 50, \"runs\": []}}",
    "x: walls.thickness_mm: here stands {\"thickness_mm\": 90, \"height_mm\": 50, \"runs\": []…; the walls must be thinner than half the pitch, 90 mm" },
  { HEAD "\"walls\": {\"thickness_mm\": 12, \"height_mm\": 50, \"runs\": [[0, 0, 1, 1]]}}",
    "x: walls.runs[0]: here stands [0, 0, 1, 1]; it does not lie on a lattice line; give two points with the same column or the same row" },
  { HEAD "\"walls\": {\"thickness_mm\": 12, \"height_mm\": 50, \"runs\": [[0, 0, 2, 0], [1, 1, 1, 1]]}}",
    "x: walls.runs[1]: here stands [1, 1, 1, 1]; it has no length; give two different lattice points" },
  { HEAD "\"walls\": {\"thickness_mm\": 12, \"height_mm\": 50, \"runs\": [[0, 0, 3, 0]]}}",
    "x: walls.runs[0]: here stands [0, 0, 3, 0]; it leaves the lattice; columns go from 0 to 2, rows from 0 to 2" },
  { HEAD "\"walls\": {\"thickness_mm\": 12, \"height_mm\": 50, \"runs\": [[0, 0.5, 1, 0]]}}",
    "x: walls.runs[0]: here stands [0, 0.5, 1, 0]; give a run as [column, row, column, row] of two lattice points" },
  { HEAD WALLS ", \"gaps\": [[1, 1, 2, 1]]}", "x: gaps[0]: here stands [1, 1, 2, 1]; the rectangle must hold a cell and lie within 2 columns and 2 rows" },
  { HEAD WALLS ", \"openings\": [{\"edge\": [0, 0, 2, 0], \"use\": \"exit\"}]}",
    "x: openings[0].edge: here stands [0, 0, 2, 0]; an opening is one edge; give two neighbouring lattice points" },
  { HEAD WALLS ", \"openings\": [{\"edge\": [0, 0, 1, 0], \"use\": \"door\"}]}",
    "x: openings[0].use: here stands \"door\"; give one of \"entrance\", \"exit\", \"plain\"" },
  { HEAD WALLS ", \"openings\": [{\"edge\": [0, 0, 1, 0], \"use\": \"exit\"}, {\"edge\": [1, 0, 0, 0], \"use\": \"exit\"}]}",
    "x: openings: here stands [{\"edge\": [0, 0, 1, 0], \"use\": \"exit\"}, {\"edge\":…; an edge is named twice; keep one opening for each" },
  { HEAD WALLS ", \"marks\": [{\"cell\": [2, 0], \"size_mm\": [80, 80]}]}",
    "x: marks[0].cell: here stands [2, 0]; the cell lies outside the lattice; columns go from 0 to 1, rows from 0 to 1" },
  { HEAD WALLS ", \"marks\": [{\"cell\": [1, 0]}]}", "x: marks[0].size_mm: this member is missing; add it" },
  { HEAD WALLS ", \"start\": {\"cell\": [0, 0], \"heading\": \"up\"}}", "x: start.heading: here stands \"up\"; give one of \"north\", \"east\", \"south\", \"west\"" },
  { HEAD WALLS ", \"robot\": {\"drive\": {\"track_mm\": \"wide\"}}}", "x: robot.drive.track_mm: here stands \"wide\"; give a number from 1 to 5000" },
  { HEAD WALLS ", \"robot\": {\"front_sensor\": {\"range_mm\": [400, 20]}}}",
    "x: robot.front_sensor.range_mm: here stands [400, 20]; give two numbers, the least and the most, from 0 to 20000" },
  { HEAD WALLS ", \"build\": {\"stock\": [{\"form\": \"sheet\", \"length_mm\": 2440}]}}", "x: build.stock[0].width_mm: this member is missing; a sheet needs its width" },
  { HEAD WALLS ", \"build\": {\"stock\": [{\"length_mm\": 2440, \"count\": -1}]}}",
    "x: build.stock[0].count: here stands -1; give a number from 0 to 100000, or null" },
};

static void each_fault_is_one_message (void **state)
{
  for (gsize i = 0; i < G_N_ELEMENTS (cases); i++)
    {
      g_autoptr (GPtrArray) faults = NULL;
      g_autoptr (KhPlan) plan = kh_plan_file_parse (cases[i].text, strlen (cases[i].text), "x", &faults);
      if (plan)
        fail_msg ("taken: %s", cases[i].text);
      if (faults->len != 1 || strcmp (g_ptr_array_index (faults, 0), cases[i].fault) != 0)
        fail_msg ("%s\n  said   %s\n  not    %s (%u faults)", cases[i].text, (char *) g_ptr_array_index (faults, 0), cases[i].fault, faults->len);
    }
}

static void all_faults_are_told_up_to_twenty (void **state)
{
  GString *text = g_string_new (HEAD "\"walls\": {\"thickness_mm\": -1, \"height_mm\": 50, \"runs\": [");
  for (int i = 0; i < 30; i++)
    g_string_append (text, i > 0 ? ", [0, 0, 9, 0]" : "[0, 0, 9, 0]");
  g_string_append (text, "]}}");
  g_autoptr (GPtrArray) faults = NULL;
  assert_null (kh_plan_file_parse (text->str, text->len, "x", &faults));
  assert_int_equal (faults->len, 20);
  g_string_free (text, TRUE);
}

static KhPlan *parse (const char *text)
{
  g_autoptr (GPtrArray) faults = NULL;
  KhPlan *plan = kh_plan_file_parse (text, strlen (text), "x", &faults);
  if (!plan)
    fail_msg ("%s", (char *) g_ptr_array_index (faults, 0));
  return plan;
}

/* At every level, through a change, undo and a copy; a number with 20 digits survives. */
static void members_not_known_are_kept (void **state)
{
  static const char *const kept[] = {
    "\"root_word\": {\"deep\": [1, 12345678901234567890]}", "\"in_lattice\": 1.50", "\"in_walls\": true", "\"in_opening\": null",
    "\"in_mark\": \"\\u00e9\"", "\"in_start\": [ ]", "\"in_site\": 0", "\"in_aside\": 1", "\"in_robot\": 7", "\"in_body\": 8", "\"in_drive\": 9",
    "\"in_control\": 10", "\"in_build\": 11", "\"in_saw\": 12", "\"in_stock\": 13", "\"in_kit\": 14", "\"in_fittings\": 15",
  };
  g_autofree char *text = g_strdup_printf (
    "{\"kind\": \"kerfhand maze plan\", %s, \"version\": 1, \"lattice\": {\"columns\": 2, %s, \"rows\": 2, \"pitch_mm\": 180},"
    "\"walls\": {\"thickness_mm\": 12, %s, \"height_mm\": 50, \"runs\": []}, \"openings\": [{\"edge\": [0, 0, 1, 0], \"use\": \"exit\", %s}],"
    "\"marks\": [{\"cell\": [1, 1], \"size_mm\": [80, 80], %s}], \"start\": {\"cell\": [0, 0], \"heading\": \"north\", %s},"
    "\"site\": {\"width_mm\": 3000, \"depth_mm\": 3000, %s}, \"set_aside\": [{\"code\": \"leak\", \"at\": [0, 0.5], \"reason\": \"so\", %s}],"
    "\"robot\": {%s, \"body\": {%s}, \"drive\": {%s}, \"control\": {%s}},"
    "\"build\": {%s, \"saw\": {%s}, \"stock\": [{\"length_mm\": 2440, %s}], \"kit\": [{\"length_mm\": 180, \"count\": 2, %s}], \"fittings\": {%s}}}",
    kept[0], kept[1], kept[2], kept[3], kept[4], kept[5], kept[6], kept[7], kept[8], kept[9], kept[10], kept[11], kept[12], kept[13], kept[14], kept[15], kept[16]);
  g_autoptr (KhPlan) plan = parse (text);
  g_autoptr (KhPlan) copy = kh_plan_copy (plan);
  g_autofree char *once = kh_plan_file_dup_text (copy);
  for (gsize i = 0; i < G_N_ELEMENTS (kept); i++)
    if (!strstr (once, kept[i]))
      fail_msg ("%s is lost:\n%s", kept[i], once);
  g_autoptr (KhPlan) again = parse (once);
  g_autofree char *twice = kh_plan_file_dup_text (again);
  assert_string_equal (once, twice);
  assert_true (kh_plan_equal (plan, again));
}

static void what_editing_can_bring_about_is_read (void **state)
{
  g_autoptr (KhPlan) plan = parse (HEAD "\"walls\": {\"thickness_mm\": 12, \"height_mm\": 50, \"runs\": [[1, 0, 1, 2], [1, 2, 1, 1]]},"
                                        "\"gaps\": [[0, 0, 1, 1]], \"start\": {\"cell\": [0, 0], \"heading\": \"west\"},"
                                        "\"marks\": [{\"cell\": [0, 0], \"size_mm\": [400, 400]}], \"openings\": [{\"edge\": [1, 1, 1, 2], \"use\": \"plain\"}]}");
  assert_int_equal (kh_plan_n_walls (plan), 2);
  assert_true (plan->has_start && plan->gap[0]);
}

/* 1/64 inch is 396 875 nm (1 in = 25.4 mm exactly; CSS Values 3, absolute lengths). */
static void lengths_are_kept_to_the_nanometre (void **state)
{
  g_autoptr (KhPlan) plan = parse ("{\"kind\": \"kerfhand maze plan\", \"version\": 1, \"lattice\": {\"columns\": 1, \"rows\": 1, \"pitch_mm\": 177.006250},"
                                   "\"walls\": {\"thickness_mm\": 11.90625, \"height_mm\": 0.396875e2}}");
  assert_int_equal (plan->lattice.pitch_nm, 177006250);
  assert_int_equal (plan->walls.thickness_nm, 30 * 396875);
  assert_int_equal (plan->walls.height_nm, 100 * 396875);
  g_autofree char *text = kh_plan_file_dup_text (plan);
  assert_non_null (strstr (text, "\"pitch_mm\": 177.00625}"));
  assert_non_null (strstr (text, "\"thickness_mm\": 11.90625,"));
}

/* The limits of a robot's numbers stand in the model and in the file's tables: they are the same. */
static void a_robots_limits_are_those_of_the_model (void **state)
{
  gsize n;
  const KhRobotMember *members = kh_robot_get_members (&n);
  for (gsize i = 0; i < n; i++)
    for (int side = 0; side < 2; side++)
      for (int beyond = 0; beyond < 2; beyond++)
        {
          double limit = side ? members[i].most : members[i].least, step = members[i].kind == KH_MEMBER_INT ? 1 : 1e-3;
          if (members[i].kind == KH_MEMBER_BOOLEAN)
            continue;
          g_autofree char *number = kh_number_dup_file_text (limit + (beyond ? side ? step : -step : 0));
          /* Two side sensors in one place are refused for another reason. */
          const char *with = strcmp (members[i].name, "front_mm") == 0 ? ", \"rear_mm\": 5" : strcmp (members[i].name, "rear_mm") == 0 ? ", \"front_mm\": 5" : "";
          g_autofree char *text = g_strdup_printf (HEAD WALLS ", \"robot\": {\"%s\": {\"%s\": %s%s}}}", members[i].object, members[i].name, number, with);
          g_autoptr (GPtrArray) faults = NULL;
          g_autoptr (KhPlan) plan = kh_plan_file_parse (text, strlen (text), "x", &faults);
          if ((plan != NULL) == beyond)
            fail_msg ("%s.%s = %s: %s", members[i].object, members[i].name, number, plan ? "taken" : (char *) g_ptr_array_index (faults, 0));
        }
}

int main (void)
{
  const struct CMUnitTest tests[] = {
    cmocka_unit_test (each_fault_is_one_message),
    cmocka_unit_test (all_faults_are_told_up_to_twenty),
    cmocka_unit_test (members_not_known_are_kept),
    cmocka_unit_test (what_editing_can_bring_about_is_read),
    cmocka_unit_test (lengths_are_kept_to_the_nanometre),
    cmocka_unit_test (a_robots_limits_are_those_of_the_model),
  };
  return cmocka_run_group_tests (tests, NULL, NULL);
}
