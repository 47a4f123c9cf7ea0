/* SPDX-License-Identifier: MIT */
#include "app/canvasprivate.h"

#include "app/scheme.h"
#include "app/words.h"
#include <glib/gi18n-lib.h>
#include <math.h>

G_DEFINE_FINAL_TYPE (KhCanvas, kh_canvas, GTK_TYPE_WIDGET)

enum
{
  POINTED,
  NOTICE,
  MENU,
  TOOL_WISHED,
  N_SIGNALS
};
static guint signals[N_SIGNALS];

#define MARGIN 20       /* px round the plan when all of it is shown */
#define MARGIN_WEST 72  /* px: words of openings */
#define MARGIN_EAST 124 /* px: words of openings, key of the trail */

/* ---- view ---- */

/* All of it moves: nothing to compare tiles with. */
static void forget_layers (KhCanvas *self)
{
  kh_layer_clear (&self->ground);
  kh_layer_clear (&self->run);
  kh_layer_clear (&self->rulers);
}

void kh_canvas_drop_layers (KhCanvas *self)
{
  forget_layers (self);
  gtk_widget_queue_allocate (GTK_WIDGET (self)); /* the cursor's place */
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

static void fit_view (KhCanvas *self)
{
  double width = self->view.width, height = self->view.height;
  if (self->session == NULL || width < 40 || height < 40)
    return;
  gboolean roomy = width > 4 * MARGIN_EAST;
  double west = roomy ? MARGIN_WEST - MARGIN : 0, east = roomy ? MARGIN_EAST - MARGIN : 0;
  kh_view_fit (&self->view, kh_session_get_plan (self->session), width - west - east, height, MARGIN);
  self->view.origin_x += west;
  self->view.width = width;
}

void kh_canvas_fit (KhCanvas *self)
{
  self->fitted = TRUE;
  fit_view (self);
  kh_canvas_drop_layers (self);
}

/* Near a whole number of pixels for the walls' thickness the scale snaps to it: crisp walls. */
static double snapped (KhCanvas *self, double scale, double factor)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  double thickness = kh_mm_from_nm (plan->walls.thickness_nm);
  double pixels = scale * thickness, whole = round (pixels);
  if (whole < 1 || whole > 40 || fabs (pixels - whole) > 0.06 * pixels)
    return scale;
  double result = whole / thickness;
  /* never against the way of the zoom */
  return (factor > 1) == (result > self->view.scale) ? result : scale;
}

void kh_canvas_zoom_at (KhCanvas *self, double x, double y, double factor)
{
  if (self->session == NULL)
    return;
  double wished = snapped (self, self->view.scale * factor, factor);
  kh_view_zoom_at (&self->view, x, y, wished / self->view.scale);
  self->fitted = FALSE;
  kh_canvas_drop_layers (self);
}

void kh_canvas_zoom (KhCanvas *self, double factor)
{
  if (self->pointer_in)
    kh_canvas_zoom_at (self, self->pointer_x, self->pointer_y, factor);
  else
    kh_canvas_zoom_at (self, self->view.width / 2, self->view.height / 2, factor);
}

KhVec kh_canvas_pointer_mm (KhCanvas *self) { return kh_view_to_mm (&self->view, self->pointer_x, self->pointer_y); }

static void box_of_finding (const KhPlan *plan, const KhFinding *finding, KhBox *box)
{
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  double x = finding->at[0] * pitch, y = finding->at[1] * pitch;
  *box = (KhBox){ x, y, x, y };
  for (guint i = 0; i < finding->edges->len; i++)
    {
      KhBox part;
      kh_edge_get_box_mm (plan, g_array_index (finding->edges, KhEdge, i), &part);
      *box = (KhBox){ MIN (box->x0, part.x0), MIN (box->y0, part.y0), MAX (box->x1, part.x1), MAX (box->y1, part.y1) };
    }
  for (guint i = 0; i < finding->cells->len; i++)
    {
      KhVec at = kh_cell_middle_mm (plan, g_array_index (finding->cells, KhCell, i));
      *box = (KhBox){ MIN (box->x0, at.x - pitch / 2), MIN (box->y0, at.y - pitch / 2), MAX (box->x1, at.x + pitch / 2),
                      MAX (box->y1, at.y + pitch / 2) };
    }
}

void kh_canvas_show_finding (KhCanvas *self, int index)
{
  const KhReview *review = kh_session_get_review (self->session);
  if (review == NULL || index < 0 || index >= (int)review->findings->len || self->view.width < 40)
    return;
  const KhPlan *plan = kh_session_get_plan (self->session);
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  KhBox box;
  box_of_finding (plan, g_ptr_array_index (review->findings, index), &box);
  /* with a cell and a half round it, and never closer than four cells across */
  double width = MAX (box.x1 - box.x0 + 3 * pitch, 4 * pitch), height = MAX (box.y1 - box.y0 + 3 * pitch, 4 * pitch);
  double scale = MIN (self->view.width / width, self->view.height / height);
  kh_view_zoom_at (&self->view, self->view.width / 2, self->view.height / 2, scale / self->view.scale);
  KhVec at = kh_view_to_device (&self->view, (KhVec){ (box.x0 + box.x1) / 2, (box.y0 + box.y1) / 2 });
  self->view.origin_x += round (self->view.width / 2 - at.x);
  self->view.origin_y += round (self->view.height / 2 - at.y);
  self->fitted = FALSE;
  kh_canvas_drop_layers (self);
}

/* ---- drawing ---- */

static void init_picture (KhCanvas *self, KhPlanPicture *picture)
{
  kh_plan_picture_init (picture);
  picture->scheme = kh_scheme_get ();
  picture->high_contrast = kh_scheme_is_high_contrast ();
  picture->with_rulers = FALSE; /* the canvas's own stay in place */
  picture->with_lattice = TRUE;
  picture->with_findings = TRUE;
  picture->with_labels = self->with_panels;
  picture->with_trail = picture->with_beams = !self->with_panels && kh_session_get_preview (self->session);
  picture->hand = kh_session_get_hand (self->session);
  picture->played_tick = kh_session_get_played_tick (self->session);
  picture->lit_row = self->with_panels ? kh_session_get_lit_row (self->session) : -1;
  picture->chosen_finding = kh_session_get_chosen_finding (self->session);
  picture->text_size = 11;
}

static void draw_ground (gpointer data, cairo_t *cr, int width, int height)
{
  KhCanvas *self = data;
  KhPlanPicture picture;
  init_picture (self, &picture);
  kh_palette_set_source (cr, picture.scheme, KH_INK_DESK, 1);
  cairo_paint (cr);
  kh_plan_picture_draw_ground (&picture, cr, &self->view, kh_session_get_plan (self->session),
                               kh_session_get_review (self->session));
}

static const KhTrace *shown_trace (KhCanvas *self)
{
  const KhReview *review = kh_session_get_review (self->session);
  if (review == NULL || self->with_panels || !kh_session_get_preview (self->session))
    return NULL;
  return review->traces[kh_session_get_hand (self->session)];
}

/* The key stands in the margin east of the plan, where there is room. */
static void draw_key (KhCanvas *self, cairo_t *cr)
{
  const KhPlan *plan = kh_session_get_plan (self->session);
  double pitch = kh_mm_from_nm (plan->lattice.pitch_nm);
  KhVec east = kh_view_to_device (&self->view, (KhVec){ plan->lattice.columns * pitch, 0 });
  KhPlanPicture picture;
  if (self->view.width - east.x < MARGIN_EAST - 8 || self->view.height < 300)
    return;
  init_picture (self, &picture);
  kh_plan_picture_draw_key (&picture, cr, east.x + 14, self->view.height * 0.36, picture.hand);
}

static void draw_run (gpointer data, cairo_t *cr, int width, int height)
{
  KhCanvas *self = data;
  KhPlanPicture picture;
  init_picture (self, &picture);
  kh_plan_picture_draw_run (&picture, cr, &self->view, kh_session_get_plan (self->session),
                            kh_session_get_review (self->session));
  draw_key (self, cr);
}

static void draw_robot (KhCanvas *self, cairo_t *cr)
{
  const KhTrace *trace = shown_trace (self);
  KhPlanPicture picture;
  if (trace == NULL)
    return;
  init_picture (self, &picture);
  kh_plan_picture_draw_robot (&picture, cr, &self->view, kh_session_get_plan (self->session), trace,
                              MIN (picture.played_tick, kh_trace_get_n_ticks (trace) - 1));
}

static void draw_ghost (KhCanvas *self, cairo_t *cr)
{
  KhGhostScene scene = { .plan = kh_session_get_plan (self->session),
                         .view = &self->view,
                         .scheme = kh_scheme_get (),
                         .high_contrast = kh_scheme_is_high_contrast () };
  if (self->gesturing)
    kh_tool_get (self->tool)->draw (&scene, &self->gesture, cr);
  else if (self->pointer_in && !self->panning && !self->space_down)
    {
      KhVec at = kh_canvas_pointer_mm (self);
      KhGesture hover = { .from = at, .to = at };
      kh_tool_get (self->tool)->draw (&scene, &hover, cr);
    }
}

static void draw_cursor (KhCanvas *self, cairo_t *cr)
{
  if (gtk_widget_has_visible_focus (self->cursor))
    kh_canvas_draw_cursor (self, cr);
}

/* What moves is drawn into a record first: only what it covers is painted anew
 * in the window, which is most of what a frame costs. */
static void append_record (KhCanvas *self, GtkSnapshot *snapshot, void (*draw) (KhCanvas *, cairo_t *))
{
  cairo_surface_t *record = cairo_recording_surface_create (CAIRO_CONTENT_COLOR_ALPHA, NULL);
  cairo_t *cr = cairo_create (record);
  double x, y, width, height;
  draw (self, cr);
  cairo_destroy (cr);
  cairo_recording_surface_ink_extents (record, &x, &y, &width, &height);
  if (width > 0 && height > 0)
    {
      graphene_rect_t bounds = GRAPHENE_RECT_INIT ((float)floor (x) - 1, (float)floor (y) - 1, (float)ceil (width) + 3,
                                                   (float)ceil (height) + 3);
      cr = gtk_snapshot_append_cairo (snapshot, &bounds);
      cairo_set_source_surface (cr, record, 0, 0);
      cairo_paint (cr);
      cairo_destroy (cr);
    }
  cairo_surface_destroy (record);
}

static void snapshot (GtkWidget *widget, GtkSnapshot *snapshot)
{
  KhCanvas *self = KH_CANVAS (widget);
  int width = gtk_widget_get_width (widget), height = gtk_widget_get_height (widget);
  int inner_width = width - KH_RULER_LEFT, inner_height = height - KH_RULER_TOP;
  if (self->session == NULL || inner_width < 1 || inner_height < 1)
    return;
  int scale = gtk_widget_get_scale_factor (widget);
  graphene_rect_t inner = GRAPHENE_RECT_INIT (0, 0, (float)inner_width, (float)inner_height);
  graphene_size_t whole = GRAPHENE_SIZE_INIT ((float)width, (float)height);

  kh_layer_append (&self->rulers, snapshot, &whole, scale, kh_canvas_draw_rulers, self);
  gtk_snapshot_save (snapshot);
  gtk_snapshot_translate (snapshot, &GRAPHENE_POINT_INIT (KH_RULER_LEFT, KH_RULER_TOP));
  gtk_snapshot_push_clip (snapshot, &inner);
  kh_layer_append (&self->ground, snapshot, &inner.size, scale, draw_ground, self);
  if (shown_trace (self) != NULL)
    kh_layer_append (&self->run, snapshot, &inner.size, scale, draw_run, self);
  append_record (self, snapshot, draw_robot);
  append_record (self, snapshot, draw_ghost);
  append_record (self, snapshot, draw_cursor);
  gtk_snapshot_pop (snapshot);
  gtk_snapshot_restore (snapshot);
  append_record (self, snapshot, kh_canvas_draw_ruler_top_pointer);
  append_record (self, snapshot, kh_canvas_draw_ruler_left_pointer);
  gtk_widget_snapshot_child (widget, self->cursor, snapshot);
}

static void size_allocate (GtkWidget *widget, int width, int height, int baseline)
{
  KhCanvas *self = KH_CANVAS (widget);
  int inner_width = width - KH_RULER_LEFT, inner_height = height - KH_RULER_TOP;
  if (inner_width != (int)self->view.width || inner_height != (int)self->view.height)
    {
      self->view.width = inner_width;
      self->view.height = inner_height;
      if (self->fitted)
        fit_view (self);
      forget_layers (self);
    }
  KhBox box;
  kh_canvas_get_cursor_box (self, &box);
  GtkAllocation place = { (int)box.x0 + KH_RULER_LEFT, (int)box.y0 + KH_RULER_TOP, (int)MAX (box.x1 - box.x0, 1),
                          (int)MAX (box.y1 - box.y0, 1) };
  gtk_widget_size_allocate (self->cursor, &place, -1);
}

static void measure (GtkWidget *widget, GtkOrientation orientation, int for_size, int *least, int *natural,
                     int *least_baseline, int *natural_baseline)
{
  *least = orientation == GTK_ORIENTATION_HORIZONTAL ? 240 : 160;
  *natural = orientation == GTK_ORIENTATION_HORIZONTAL ? 640 : 400;
}

/* ---- what is under the pointer ---- */

void kh_canvas_say_pointed (KhCanvas *self, char *text)
{
  if (g_strcmp0 (text, self->pointed_text) == 0)
    {
      g_free (text);
      return;
    }
  g_free (self->pointed_text);
  self->pointed_text = text;
  g_signal_emit (self, signals[POINTED], 0);
}

void kh_canvas_notice (KhCanvas *self, const char *text) { g_signal_emit (self, signals[NOTICE], 0, text); }

void kh_canvas_place_menu (KhCanvas *self, double x, double y, KhEdge edge, KhCell cell)
{
  self->has_menu_place = TRUE;
  self->menu_edge = edge;
  self->menu_cell = cell;
  g_signal_emit (self, signals[MENU], 0, x + KH_RULER_LEFT, y + KH_RULER_TOP);
}

void kh_canvas_wish_tool (KhCanvas *self, const char *name) { g_signal_emit (self, signals[TOOL_WISHED], 0, name); }

/* ---- model ---- */

static void remember_lattice (KhCanvas *self)
{
  const KhLattice *now = &kh_session_get_plan (self->session)->lattice;
  self->shown_columns = now->columns;
  self->shown_rows = now->rows;
  self->shown_pitch_nm = now->pitch_nm;
}

/* Rulers and view stay where only walls, marks or numbers changed. */
static void plan_changed_cb (KhCanvas *self)
{
  const KhLattice *now = &kh_session_get_plan (self->session)->lattice;
  gboolean same
      = now->columns == self->shown_columns && now->rows == self->shown_rows && now->pitch_nm == self->shown_pitch_nm;
  kh_canvas_clamp_cursor (self);
  kh_canvas_name_cursor (self);
  if (!same)
    {
      remember_lattice (self);
      kh_canvas_fit (self);
      return;
    }
  kh_layer_spoil (&self->ground);
  kh_layer_spoil (&self->run);
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

static void review_changed_cb (KhCanvas *self)
{
  kh_layer_spoil (&self->ground);
  kh_layer_spoil (&self->run);
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

static void player_changed_cb (KhCanvas *self)
{
  kh_layer_spoil (&self->run);
  gtk_widget_queue_draw (GTK_WIDGET (self));
}

static void scheme_changed_cb (KhCanvas *self) { kh_canvas_drop_layers (self); }

void kh_canvas_set_session (KhCanvas *self, KhSession *session)
{
  if (self->session != NULL)
    g_signal_handlers_disconnect_by_data (self->session, self);
  kh_canvas_cancel (self);
  g_set_object (&self->session, session);
  if (session == NULL)
    return;
  g_signal_connect_swapped (session, "plan-changed", G_CALLBACK (plan_changed_cb), self);
  g_signal_connect_swapped (session, "review-changed", G_CALLBACK (review_changed_cb), self);
  g_signal_connect_swapped (session, "selection-changed", G_CALLBACK (review_changed_cb), self);
  g_signal_connect_swapped (session, "player-changed", G_CALLBACK (player_changed_cb), self);
  self->point = (KhPoint){ 0, 0 };
  self->edge = (KhEdge){ KH_AXIS_X, 0, 0 };
  self->cell = (KhCell){ 0, 0 };
  remember_lattice (self);
  kh_canvas_name_cursor (self);
  kh_canvas_fit (self);
}

void kh_canvas_take_edit (KhCanvas *self, KhEdit *edit)
{
  if (edit == NULL)
    return;
  if (edit->change != NULL)
    kh_session_do_take (self->session, g_steal_pointer (&edit->change), edit->words);
  else if (edit->notice != NULL)
    kh_canvas_notice (self, edit->notice);
  kh_edit_free (edit);
}

void kh_canvas_get_place (KhCanvas *self, KhEdge *edge, KhCell *cell)
{
  *edge = self->has_menu_place ? self->menu_edge : self->edge;
  *cell = self->has_menu_place ? self->menu_cell : self->cell;
}

void kh_canvas_set_tool (KhCanvas *self, KhToolId tool)
{
  kh_canvas_cancel (self);
  self->tool = tool;
  kh_canvas_name_cursor (self);
  gtk_widget_queue_allocate (GTK_WIDGET (self));
}

void kh_canvas_set_take_away (KhCanvas *self, gboolean take_away) { self->take_away = take_away; }

void kh_canvas_set_unit (KhCanvas *self, KhLengthUnit unit)
{
  self->unit = unit;
  kh_canvas_drop_layers (self);
}

void kh_canvas_set_with_panels (KhCanvas *self, gboolean with_panels)
{
  self->with_panels = with_panels;
  kh_canvas_drop_layers (self);
}

const char *kh_canvas_get_pointed_text (KhCanvas *self) { return self->pointed_text != NULL ? self->pointed_text : ""; }

void kh_canvas_locate (KhCanvas *self, KhVec mm, double *x, double *y)
{
  KhVec at = kh_view_to_device (&self->view, mm);
  *x = at.x + KH_RULER_LEFT;
  *y = at.y + KH_RULER_TOP;
}

void kh_canvas_grab_cursor (KhCanvas *self) { gtk_widget_grab_focus (self->cursor); }

/* ---- life ---- */

static void dispose (GObject *object)
{
  KhCanvas *self = KH_CANVAS (object);
  GtkWidget *child;
  g_signal_handlers_disconnect_by_data (gtk_settings_get_default (), self);
  if (self->session != NULL)
    g_signal_handlers_disconnect_by_data (self->session, self);
  g_clear_object (&self->session);
  kh_layer_clear (&self->ground);
  kh_layer_clear (&self->run);
  kh_layer_clear (&self->rulers);
  g_clear_pointer (&self->pointed_text, g_free);
  while ((child = gtk_widget_get_first_child (GTK_WIDGET (self))) != NULL)
    gtk_widget_unparent (child);
  G_OBJECT_CLASS (kh_canvas_parent_class)->dispose (object);
}

static void kh_canvas_class_init (KhCanvasClass *class)
{
  GtkWidgetClass *widget_class = GTK_WIDGET_CLASS (class);
  G_OBJECT_CLASS (class)->dispose = dispose;
  widget_class->snapshot = snapshot;
  widget_class->size_allocate = size_allocate;
  widget_class->measure = measure;
  signals[POINTED] = g_signal_new ("pointed", KH_TYPE_CANVAS, G_SIGNAL_RUN_LAST, 0, NULL, NULL, NULL, G_TYPE_NONE, 0);
  signals[NOTICE]
      = g_signal_new ("notice", KH_TYPE_CANVAS, G_SIGNAL_RUN_LAST, 0, NULL, NULL, NULL, G_TYPE_NONE, 1, G_TYPE_STRING);
  signals[MENU] = g_signal_new ("menu", KH_TYPE_CANVAS, G_SIGNAL_RUN_LAST, 0, NULL, NULL, NULL, G_TYPE_NONE, 2,
                                G_TYPE_DOUBLE, G_TYPE_DOUBLE);
  signals[TOOL_WISHED] = g_signal_new ("tool-wished", KH_TYPE_CANVAS, G_SIGNAL_RUN_LAST, 0, NULL, NULL, NULL,
                                       G_TYPE_NONE, 1, G_TYPE_STRING);
  kh_canvas_class_init_cursor (widget_class);
  gtk_widget_class_set_css_name (widget_class, "canvas");
  gtk_widget_class_set_accessible_role (widget_class, GTK_ACCESSIBLE_ROLE_GROUP);
}

static void kh_canvas_init (KhCanvas *self)
{
  self->fitted = TRUE;
  self->view.scale = 1;
  kh_canvas_init_cursor (self);
  kh_canvas_init_input (self);
  gtk_widget_set_overflow (GTK_WIDGET (self), GTK_OVERFLOW_HIDDEN);
  gtk_widget_set_hexpand (GTK_WIDGET (self), TRUE);
  gtk_widget_set_vexpand (GTK_WIDGET (self), TRUE);
  gtk_accessible_update_property (GTK_ACCESSIBLE (self), GTK_ACCESSIBLE_PROPERTY_LABEL, _ ("Plan"), -1);
  g_signal_connect_swapped (gtk_settings_get_default (), "notify::gtk-application-prefer-dark-theme",
                            G_CALLBACK (scheme_changed_cb), self);
  g_signal_connect_swapped (gtk_settings_get_default (), "notify::gtk-theme-name", G_CALLBACK (scheme_changed_cb),
                            self);
}

GtkWidget *kh_canvas_new (void) { return g_object_new (KH_TYPE_CANVAS, NULL); }
