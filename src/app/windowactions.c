/* SPDX-License-Identifier: MIT */
#include "app/windowprivate.h"

#include "app/settings.h"

/* Every command of a window, in one table, with its keys in another. */

static KhCanvas *canvas_of (KhWindow *self) { return KH_CANVAS (self->canvas); }

static void new_cb (GSimpleAction *action, GVariant *target, gpointer data) { kh_window_ask_new (data); }

static void open_cb (GSimpleAction *action, GVariant *target, gpointer data) { kh_window_ask_open (data); }

static void open_recent_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  kh_window_open_path (data, g_variant_get_string (target, NULL));
}

static void save_cb (GSimpleAction *action, GVariant *target, gpointer data) { kh_window_save_then (data, NULL, NULL); }

static void save_as_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  kh_window_ask_save_as (data, NULL, NULL);
}

static void close_cb (GSimpleAction *action, GVariant *target, gpointer data) { gtk_window_close (data); }

static void print_cb (GSimpleAction *action, GVariant *target, gpointer data) { kh_window_print (data); }

static void export_plan_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  kh_window_ask_export_plan (data);
}

static void export_cut_list_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  kh_window_ask_export_cut_list (data);
}

static void undo_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  kh_session_undo (KH_WINDOW (data)->session);
}

static void redo_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  kh_session_redo (KH_WINDOW (data)->session);
}

static void play_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  KhSession *session = KH_WINDOW (data)->session;
  kh_session_set_playing (session, !kh_session_get_playing (session));
}

static void play_from_start_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  kh_session_set_played_tick (KH_WINDOW (data)->session, 0);
}

static void show_hand_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  const char *hand = g_variant_get_string (target, NULL);
  kh_session_set_hand (KH_WINDOW (data)->session, strcmp (hand, "left") == 0 ? KH_HAND_LEFT : KH_HAND_RIGHT);
}

static void set_preview_cb (GSimpleAction *action, GVariant *state, gpointer data)
{
  kh_session_set_preview (KH_WINDOW (data)->session, g_variant_get_boolean (state));
  g_simple_action_set_state (action, state);
}

static void set_tool_cb (GSimpleAction *action, GVariant *state, gpointer data)
{
  KhWindow *self = data;
  int tool = kh_tool_find (g_variant_get_string (state, NULL));
  if (tool < 0)
    return;
  g_simple_action_set_state (action, state);
  kh_canvas_set_tool (canvas_of (self), (KhToolId)tool);
  gtk_widget_set_visible (self->modes, tool == KH_TOOL_WALLS);
}

static void set_walls_mode_cb (GSimpleAction *action, GVariant *state, gpointer data)
{
  const char *mode = g_variant_get_string (state, NULL);
  if (strcmp (mode, "lay") != 0 && strcmp (mode, "away") != 0)
    return;
  g_simple_action_set_state (action, state);
  kh_canvas_set_take_away (canvas_of (data), strcmp (mode, "away") == 0);
}

static void set_bench_cb (GSimpleAction *action, GVariant *state, gpointer data)
{
  kh_window_show_bench (data, g_variant_get_string (state, NULL));
}

static void set_strip_cb (GSimpleAction *action, GVariant *state, gpointer data)
{
  gtk_widget_set_visible (KH_WINDOW (data)->strip_stack, g_variant_get_boolean (state));
  g_simple_action_set_state (action, state);
}

/* ---- at the place of the menu or the lattice cursor ---- */

static void place_wall_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  KhWindow *self = data;
  KhEdge edge;
  KhCell cell;
  kh_canvas_get_place (canvas_of (self), &edge, &cell);
  kh_canvas_take_edit (canvas_of (self),
                       kh_edit_walls (kh_session_get_plan (self->session), &edge, 1, g_variant_get_boolean (target)));
}

static void place_opening_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  static const char *const uses[] = { "entrance", "exit", "plain" }; /* by KhOpeningUse */
  KhWindow *self = data;
  KhEdge edge;
  KhCell cell;
  int use = -1;
  for (int i = 0; i < 3; i++)
    if (strcmp (uses[i], g_variant_get_string (target, NULL)) == 0)
      use = i;
  kh_canvas_get_place (canvas_of (self), &edge, &cell);
  kh_canvas_take_edit (canvas_of (self), kh_edit_opening (kh_session_get_plan (self->session), edge, use));
}

static void place_start_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  static const char *const headings[] = { "north", "east", "south", "west" }; /* by KhHeading */
  KhWindow *self = data;
  const KhPlan *plan = kh_session_get_plan (self->session);
  const char *name = g_variant_get_string (target, NULL);
  KhEdge edge;
  KhCell cell;
  kh_canvas_get_place (canvas_of (self), &edge, &cell);
  if (strcmp (name, "away") == 0)
    kh_canvas_take_edit (canvas_of (self), kh_edit_start_away (plan));
  for (int i = 0; i < KH_N_HEADINGS; i++)
    if (strcmp (headings[i], name) == 0)
      kh_canvas_take_edit (canvas_of (self), kh_edit_start (plan, cell, (KhHeading)i));
}

static void place_mark_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  KhWindow *self = data;
  const KhPlan *plan = kh_session_get_plan (self->session);
  KhEdge edge;
  KhCell cell;
  KhMark mark;
  kh_canvas_get_place (canvas_of (self), &edge, &cell);
  kh_mark_init_for_plan (&mark, plan, cell);
  kh_canvas_take_edit (canvas_of (self), kh_edit_mark (plan, cell, g_variant_get_boolean (target) ? &mark : NULL));
}

static void place_floor_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  KhWindow *self = data;
  KhEdge edge;
  KhCell cell;
  kh_canvas_get_place (canvas_of (self), &edge, &cell);
  kh_canvas_take_edit (canvas_of (self),
                       kh_edit_floor (kh_session_get_plan (self->session), (KhCellBlock){ cell.column, cell.row, 1, 1 },
                                      g_variant_get_boolean (target)));
}

/* ---- view ---- */

static void zoom_in_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  kh_canvas_zoom (canvas_of (data), 1.2);
}

static void zoom_out_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  kh_canvas_zoom (canvas_of (data), 1 / 1.2);
}

static void zoom_fit_cb (GSimpleAction *action, GVariant *target, gpointer data) { kh_canvas_fit (canvas_of (data)); }

static void show_finding (KhWindow *self, int index)
{
  const KhReview *review = kh_session_get_review (self->session);
  if (review == NULL || index < 0 || index >= (int)review->findings->len)
    return;
  kh_session_set_chosen_finding (self->session, index);
  kh_canvas_show_finding (canvas_of (self), index);
}

static void show_finding_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  show_finding (data, g_variant_get_int32 (target));
}

static void go_on (KhWindow *self, int step)
{
  const KhReview *review = kh_session_get_review (self->session);
  int n = review != NULL ? (int)review->findings->len - review->n_set_aside : 0;
  int now = kh_session_get_chosen_finding (self->session);
  if (n == 0)
    return;
  int next = now < 0 ? (step > 0 ? 0 : n - 1) : ((now + step) % n + n) % n;
  kh_window_show_bench (self, "findings");
  show_finding (self, next);
}

static void next_finding_cb (GSimpleAction *action, GVariant *target, gpointer data) { go_on (data, 1); }

static void previous_finding_cb (GSimpleAction *action, GVariant *target, gpointer data) { go_on (data, -1); }

static void next_region_cb (GSimpleAction *action, GVariant *target, gpointer data) { kh_window_go_round (data, 1); }

static void previous_region_cb (GSimpleAction *action, GVariant *target, gpointer data)
{
  kh_window_go_round (data, -1);
}

static const GActionEntry entries[] = {
  { "new", new_cb },
  { "open", open_cb },
  { "open-recent", open_recent_cb, "s" },
  { "save", save_cb },
  { "save-as", save_as_cb },
  { "close", close_cb },
  { "print", print_cb },
  { "export-plan", export_plan_cb },
  { "export-cut-list", export_cut_list_cb },
  { "undo", undo_cb },
  { "redo", redo_cb },
  { "preview", NULL, NULL, "true", set_preview_cb },
  { "play", play_cb },
  { "play-from-start", play_from_start_cb },
  { "show-hand", show_hand_cb, "s" },
  { "tool", NULL, "s", "'walls'", set_tool_cb },
  { "walls-mode", NULL, "s", "'lay'", set_walls_mode_cb },
  { "bench", NULL, "s", "'findings'", set_bench_cb },
  { "strip", NULL, NULL, "true", set_strip_cb },
  { "place-wall", place_wall_cb, "b" },
  { "place-opening", place_opening_cb, "s" },
  { "place-start", place_start_cb, "s" },
  { "place-mark", place_mark_cb, "b" },
  { "place-floor", place_floor_cb, "b" },
  { "zoom-in", zoom_in_cb },
  { "zoom-out", zoom_out_cb },
  { "zoom-fit", zoom_fit_cb },
  { "show-finding", show_finding_cb, "i" },
  { "next-finding", next_finding_cb },
  { "previous-finding", previous_finding_cb },
  { "next-region", next_region_cb },
  { "previous-region", previous_region_cb },
};

static const struct
{
  const char *action;
  const char *keys[5];
} accels[] = {
  { "win.new", { "<Control>n" } },
  { "win.open", { "<Control>o" } },
  { "win.save", { "<Control>s" } },
  { "win.save-as", { "<Control><Shift>s" } },
  { "win.close", { "<Control>w" } },
  { "win.print", { "<Control>p" } },
  { "win.export-plan", { "<Control>e" } },
  { "win.export-cut-list", { "<Control><Shift>e" } },
  { "win.undo", { "<Control>z" } },
  { "win.redo", { "<Control><Shift>z", "<Control>y" } },
  { "win.preview", { "<Control>r" } },
  { "win.play", { "F5" } },
  { "win.play-from-start", { "<Shift>F5" } },
  { "win.strip", { "F9" } },
  { "win.zoom-in", { "<Control>plus", "<Control>equal", "<Control>KP_Add" } },
  { "win.zoom-out", { "<Control>minus", "<Control>KP_Subtract" } },
  { "win.zoom-fit", { "<Control>0", "<Control>KP_0" } },
  { "win.next-finding", { "F8" } },
  { "win.previous-finding", { "<Shift>F8" } },
  { "win.next-region", { "F6" } },
  { "win.previous-region", { "<Shift>F6" } },
  { "win.bench::findings", { "<Alt>1" } },
  { "win.bench::robot", { "<Alt>2" } },
  { "win.bench::panels", { "<Alt>3" } },
  { "win.bench::maze", { "<Alt>4" } },
  { "app.help", { "F1" } },
  { "app.quit", { "<Control>q" } },
};

void kh_window_init_actions (KhWindow *self)
{
  g_action_map_add_action_entries (G_ACTION_MAP (self), entries, G_N_ELEMENTS (entries), self);
}

void kh_window_set_accels (GtkApplication *app)
{
  for (gsize i = 0; i < G_N_ELEMENTS (accels); i++)
    gtk_application_set_accels_for_action (app, accels[i].action, accels[i].keys);
}

static void set_enabled (KhWindow *self, const char *name, gboolean enabled)
{
  GAction *action = g_action_map_lookup_action (G_ACTION_MAP (self), name);
  g_simple_action_set_enabled (G_SIMPLE_ACTION (action), enabled);
}

void kh_window_sync_actions (KhWindow *self)
{
  KhHistory *history = kh_session_get_history (self->session);
  GAction *preview = g_action_map_lookup_action (G_ACTION_MAP (self), "preview");
  set_enabled (self, "undo", kh_history_get_undo_words (history) != NULL);
  set_enabled (self, "redo", kh_history_get_redo_words (history) != NULL);
  g_simple_action_set_state (G_SIMPLE_ACTION (preview), g_variant_new_boolean (kh_session_get_preview (self->session)));
}
