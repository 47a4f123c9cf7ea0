/* SPDX-License-Identifier: MIT */
#include "app/runstrip.h"
#include "app/bench.h"
#include "app/player.h"
#include "app/readout.h"
#include "app/runwords.h"
#include "app/scheme.h"
#include "app/tip.h"
#include <glib/gi18n-lib.h>
#include <math.h>

#define LEAST_LANES 92 /* pixels; with less the lanes run into one another */

static const double speeds[] = { 1, 2, 5, 10, 20, 50 };

typedef struct
{
  KhSession *session;
  GtkWidget *play, *speed, *when, *way, *where, *doing, *area, *hands[2];
  GtkWidget *controls, *moment, *texts,
      *below; /* the words stand among the controls, or below them where it is narrow */
  guint arrange_source;
  gboolean filling, narrow;
  /* the run as drawn last, and what it was drawn for */
  cairo_surface_t *drawn;
  KhStripData *drawn_lanes;
  KhScheme drawn_scheme;
  int drawn_width, drawn_height, drawn_scale;
} Strip;

static KhStripPicture picture_of (Strip *strip, double width, double height)
{
  return (KhStripPicture){ kh_scheme_get (), width, height, 11, kh_session_get_played_tick (strip->session) };
}

/* The run itself is drawn once and kept; playing moves only the mark over it. */
static void keep_lanes (Strip *strip, const KhStripPicture *picture, KhStripData *lanes)
{
  int width = (int)picture->width, height = (int)picture->height, scale = gtk_widget_get_scale_factor (strip->area);
  if (strip->drawn && strip->drawn_lanes == lanes && strip->drawn_scheme == picture->scheme
      && strip->drawn_width == width && strip->drawn_height == height && strip->drawn_scale == scale)
    return;
  g_clear_pointer (&strip->drawn, cairo_surface_destroy);
  strip->drawn = cairo_image_surface_create (CAIRO_FORMAT_ARGB32, width * scale, height * scale);
  cairo_surface_set_device_scale (strip->drawn, scale, scale);
  cairo_t *cr = cairo_create (strip->drawn);
  kh_strip_picture_draw_lanes (picture, cr, lanes);
  cairo_destroy (cr);
  strip->drawn_lanes = lanes;
  strip->drawn_scheme = picture->scheme;
  strip->drawn_width = width;
  strip->drawn_height = height;
  strip->drawn_scale = scale;
}

static void draw_cb (GtkDrawingArea *area, cairo_t *cr, int width, int height, gpointer data)
{
  Strip *strip = data;
  KhStripData *lanes = kh_session_get_strip (strip->session, kh_session_get_hand (strip->session));
  KhStripPicture picture = picture_of (strip, width, height);
  if (!lanes)
    return;
  keep_lanes (strip, &picture, lanes);
  cairo_set_source_surface (cr, strip->drawn, 0, 0);
  cairo_paint (cr);
  kh_strip_picture_draw_played (&picture, cr, lanes);
}

/* Other results may lie where the old ones lay. */
static void forget_lanes (GtkWidget *widget)
{
  Strip *strip = g_object_get_data (G_OBJECT (widget), "kh-strip");
  g_clear_pointer (&strip->drawn, cairo_surface_destroy);
  gtk_widget_queue_draw (strip->area);
}

/* ---- where it is, in words ---- */

static const char *waiting_words (Strip *strip)
{
  const KhReview *review = kh_session_get_review (strip->session);
  if (!kh_session_get_preview (strip->session))
    return _ ("The preview is off.");
  if (review->run_fault)
    return review->run_fault;
  return kh_session_is_working (strip->session) ? _ ("Driving…") : _ ("No run.");
}

static void show_moment (GtkWidget *widget)
{
  Strip *strip = g_object_get_data (G_OBJECT (widget), "kh-strip");
  const KhTrace *trace = kh_session_get_trace (strip->session);
  const KhPlan *plan = kh_session_get_plan (strip->session);
  KhHand hand = kh_session_get_hand (strip->session);
  strip->filling = TRUE;
  for (int h = 0; h < 2; h++)
    gtk_toggle_button_set_active (GTK_TOGGLE_BUTTON (strip->hands[h]), (KhHand)h == hand);
  for (guint i = 0; i < G_N_ELEMENTS (speeds); i++)
    if (speeds[i] == kh_session_get_speed (strip->session))
      gtk_drop_down_set_selected (GTK_DROP_DOWN (strip->speed), i);
  strip->filling = FALSE;
  gboolean playing = kh_session_get_playing (strip->session);
  gtk_button_set_icon_name (GTK_BUTTON (strip->play),
                            playing ? "media-playback-pause-symbolic" : "media-playback-start-symbolic");
  gtk_accessible_update_property (GTK_ACCESSIBLE (strip->play), GTK_ACCESSIBLE_PROPERTY_LABEL,
                                  playing ? _ ("Pause") : _ ("Play"), -1);
  kh_tip_set (strip->play, playing ? _ ("Pause") : _ ("Play"));
  gtk_widget_queue_draw (strip->area);
  if (!trace)
    {
      kh_readout_set_text (KH_READOUT (strip->when), "");
      kh_readout_set_text (KH_READOUT (strip->way), "");
      kh_readout_set_text (KH_READOUT (strip->where), "");
      kh_readout_set_text (KH_READOUT (strip->doing), waiting_words (strip));
      gtk_accessible_update_property (GTK_ACCESSIBLE (strip->area), GTK_ACCESSIBLE_PROPERTY_LABEL,
                                      waiting_words (strip), -1);
      return;
    }
  gsize tick = kh_session_get_played_tick (strip->session);
  g_autofree char *when = kh_run_words_dup_when (trace, tick), *way = kh_run_words_dup_way (trace, tick),
                  *doing = kh_run_words_dup_doing (plan, trace, tick),
                  *free_ways = kh_run_words_dup_free (kh_session_get_strip (strip->session, hand), trace, tick);
  kh_readout_set_text (KH_READOUT (strip->when), when);
  kh_readout_set_text (KH_READOUT (strip->way), way);
  kh_readout_set_text (KH_READOUT (strip->doing), doing);
  kh_readout_set_text (KH_READOUT (strip->where), free_ways);
  g_autofree char *name = g_strdup_printf ("%s, %s. %s. %s", when, way, doing, free_ways);
  gtk_accessible_update_property (GTK_ACCESSIBLE (strip->area), GTK_ACCESSIBLE_PROPERTY_LABEL, name, -1);
}

/* ---- moving the played moment ---- */

static void scrub_to (Strip *strip, double x)
{
  KhStripData *lanes = kh_session_get_strip (strip->session, kh_session_get_hand (strip->session));
  KhStripPicture picture = picture_of (strip, gtk_widget_get_width (strip->area), gtk_widget_get_height (strip->area));
  if (!lanes)
    return;
  kh_session_set_playing (strip->session, FALSE);
  kh_session_set_played_tick (strip->session, kh_strip_picture_tick_at (&picture, lanes, x));
}

static void drag_begin_cb (GtkGestureDrag *drag, double x, double y, Strip *strip)
{
  gtk_widget_grab_focus (strip->area);
  scrub_to (strip, x);
}

static void drag_update_cb (GtkGestureDrag *drag, double dx, double dy, Strip *strip)
{
  double x, y;
  if (gtk_gesture_drag_get_start_point (drag, &x, &y))
    scrub_to (strip, x + dx);
}

static void move_by (Strip *strip, gint64 ticks)
{
  gint64 tick = (gint64)kh_session_get_played_tick (strip->session) + ticks;
  kh_session_set_playing (strip->session, FALSE);
  kh_session_set_played_tick (strip->session, (gsize)MAX (tick, 0));
}

/* To the next or the last change of state: what there is to see. */
static void move_to_event (Strip *strip, int step)
{
  const KhTrace *trace = kh_session_get_trace (strip->session);
  gsize now = kh_session_get_played_tick (strip->session);
  if (!trace)
    return;
  gsize to = step > 0 ? kh_trace_get_n_ticks (trace) - 1 : 0;
  for (guint i = 1; i < trace->events->len; i++) /* the first is where the run begins, no change */
    {
      gsize at = g_array_index (trace->events, KhEvent, i).tick;
      if (step < 0 && at < now)
        to = at;
      if (step > 0 && at > now)
        {
          to = at;
          break;
        }
    }
  kh_session_set_playing (strip->session, FALSE);
  kh_session_set_played_tick (strip->session, to);
}

static gboolean key_cb (GtkEventControllerKey *controller, guint keyval, guint code, GdkModifierType state,
                        Strip *strip)
{
  const KhTrace *trace = kh_session_get_trace (strip->session);
  gint64 big = state & GDK_SHIFT_MASK ? 100 : 10;
  switch (keyval)
    {
    case GDK_KEY_Left:
    case GDK_KEY_KP_Left:
      move_by (strip, -big);
      return TRUE;
    case GDK_KEY_Right:
    case GDK_KEY_KP_Right:
      move_by (strip, big);
      return TRUE;
    case GDK_KEY_Page_Up:
      move_to_event (strip, -1);
      return TRUE;
    case GDK_KEY_Page_Down:
      move_to_event (strip, 1);
      return TRUE;
    case GDK_KEY_Home:
      kh_session_set_played_tick (strip->session, 0);
      return TRUE;
    case GDK_KEY_End:
      if (trace)
        kh_session_set_played_tick (strip->session, kh_trace_get_n_ticks (trace) - 1);
      return TRUE;
    case GDK_KEY_space:
      kh_session_set_playing (strip->session, !kh_session_get_playing (strip->session));
      return TRUE;
    default:
      return FALSE;
    }
}

/* ---- controls ---- */

static void begin_cb (Strip *strip)
{
  kh_session_set_playing (strip->session, FALSE);
  kh_session_set_played_tick (strip->session, 0);
}

static void back_cb (Strip *strip) { move_to_event (strip, -1); }

static void on_cb (Strip *strip) { move_to_event (strip, 1); }

static void play_cb (Strip *strip)
{
  kh_session_set_playing (strip->session, !kh_session_get_playing (strip->session));
}

static void speed_cb (Strip *strip)
{
  guint chosen = gtk_drop_down_get_selected (GTK_DROP_DOWN (strip->speed));
  if (!strip->filling && chosen < G_N_ELEMENTS (speeds))
    kh_session_set_speed (strip->session, speeds[chosen]);
}

static void hand_cb (GtkToggleButton *button, Strip *strip)
{
  if (!strip->filling && gtk_toggle_button_get_active (button))
    kh_session_set_hand (strip->session,
                         GTK_WIDGET (button) == strip->hands[KH_HAND_RIGHT] ? KH_HAND_RIGHT : KH_HAND_LEFT);
}

static GtkWidget *icon_button_new (const char *icon, const char *words, GCallback callback, Strip *strip)
{
  GtkWidget *button = gtk_button_new_from_icon_name (icon);
  gtk_widget_set_tooltip_text (button, words);
  gtk_accessible_update_property (GTK_ACCESSIBLE (button), GTK_ACCESSIBLE_PROPERTY_LABEL, words, -1);
  g_signal_connect_swapped (button, "clicked", callback, strip);
  return button;
}

static GtkWidget *words_new (const char *css, int least_chars, int natural_chars)
{
  GtkWidget *words = kh_readout_new (least_chars, natural_chars, 0);
  gtk_widget_add_css_class (words, css);
  return words;
}

/* Less than this across, and the words would be cut off among the controls. */
#define NARROW 720

static gboolean arrange_cb (gpointer data)
{
  Strip *strip = data;
  strip->arrange_source = 0;
  strip->narrow = gtk_widget_get_width (strip->area) < NARROW;
  g_object_ref (strip->texts);
  gtk_box_remove (GTK_BOX (gtk_widget_get_parent (strip->texts)), strip->texts);
  if (strip->narrow)
    gtk_box_append (GTK_BOX (strip->below), strip->texts);
  else
    gtk_box_insert_child_after (GTK_BOX (strip->controls), strip->texts, strip->moment);
  g_object_unref (strip->texts);
  gtk_orientable_set_orientation (GTK_ORIENTABLE (strip->texts),
                                  strip->narrow ? GTK_ORIENTATION_HORIZONTAL : GTK_ORIENTATION_VERTICAL);
  gtk_box_set_spacing (GTK_BOX (strip->texts), strip->narrow ? 10 : 1);
  gtk_widget_set_hexpand (strip->moment, strip->narrow);
  gtk_widget_set_visible (strip->below, strip->narrow);
  return G_SOURCE_REMOVE;
}

static void resize_cb (GtkDrawingArea *area, int width, int height, Strip *strip)
{
  /* Not now: the sizes are being given out. */
  if (width > 0 && (width < NARROW) != strip->narrow && strip->arrange_source == 0)
    strip->arrange_source = g_idle_add (arrange_cb, strip);
}

static GtkWidget *hands_new (Strip *strip)
{
  GtkWidget *hands = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 0);
  gtk_widget_add_css_class (hands, "kh-switcher");
  gtk_widget_set_valign (hands, GTK_ALIGN_CENTER);
  for (int h = 0; h < 2; h++)
    {
      strip->hands[h] = gtk_toggle_button_new_with_label (h == KH_HAND_RIGHT ? _ ("Right hand") : _ ("Left hand"));
      g_signal_connect (strip->hands[h], "toggled", G_CALLBACK (hand_cb), strip);
      gtk_box_append (GTK_BOX (hands), strip->hands[h]);
    }
  gtk_toggle_button_set_group (GTK_TOGGLE_BUTTON (strip->hands[1]), GTK_TOGGLE_BUTTON (strip->hands[0]));
  return hands;
}

/* When and how far, and what it does there. */
static void add_words (Strip *strip)
{
  strip->moment = gtk_box_new (GTK_ORIENTATION_VERTICAL, 1);
  strip->texts = gtk_box_new (GTK_ORIENTATION_VERTICAL, 1);
  strip->when = words_new ("kh-heading", 14, 18);
  strip->way = words_new ("kh-second", 14, 18);
  strip->doing = words_new ("kh-heading", 4, 40);
  strip->where = words_new ("kh-second", 4, 40);
  gtk_box_append (GTK_BOX (strip->moment), strip->when);
  gtk_box_append (GTK_BOX (strip->moment), strip->way);
  gtk_widget_set_valign (strip->moment, GTK_ALIGN_CENTER);
  gtk_box_append (GTK_BOX (strip->texts), strip->doing);
  gtk_box_append (GTK_BOX (strip->texts), strip->where);
  gtk_widget_set_hexpand (strip->where, TRUE);
  gtk_widget_set_hexpand (strip->texts, TRUE);
  gtk_widget_set_valign (strip->texts, GTK_ALIGN_CENTER);
}

static GtkWidget *controls_new (Strip *strip)
{
  const char *const times[] = { "1 ×", "2 ×", "5 ×", "10 ×", "20 ×", "50 ×", NULL };
  GtkWidget *box = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 8),
            *transport = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 0);
  strip->play = icon_button_new ("media-playback-start-symbolic", _ ("Play"), G_CALLBACK (play_cb), strip);
  gtk_widget_add_css_class (transport, "linked");
  gtk_box_append (GTK_BOX (transport),
                  icon_button_new ("media-skip-backward-symbolic", _ ("To the start"), G_CALLBACK (begin_cb), strip));
  gtk_box_append (GTK_BOX (transport),
                  icon_button_new ("go-previous-symbolic", _ ("Back to the last change"), G_CALLBACK (back_cb), strip));
  gtk_box_append (GTK_BOX (transport), strip->play);
  gtk_box_append (GTK_BOX (transport),
                  icon_button_new ("go-next-symbolic", _ ("On to the next change"), G_CALLBACK (on_cb), strip));
  gtk_widget_set_valign (transport, GTK_ALIGN_CENTER);
  strip->speed = gtk_drop_down_new_from_strings (times);
  gtk_widget_set_valign (strip->speed, GTK_ALIGN_CENTER);
  gtk_accessible_update_property (GTK_ACCESSIBLE (strip->speed), GTK_ACCESSIBLE_PROPERTY_LABEL, _ ("Speed of playing"),
                                  -1);
  gtk_accessible_update_property (GTK_ACCESSIBLE (gtk_widget_get_first_child (strip->speed)),
                                  GTK_ACCESSIBLE_PROPERTY_LABEL, _ ("Speed of playing"), -1);
  g_signal_connect_swapped (strip->speed, "notify::selected", G_CALLBACK (speed_cb), strip);
  add_words (strip);
  gtk_box_append (GTK_BOX (box), transport);
  gtk_box_append (GTK_BOX (box), strip->speed);
  gtk_box_append (GTK_BOX (box), strip->moment);
  gtk_box_append (GTK_BOX (box), strip->texts);
  gtk_box_append (GTK_BOX (box), hands_new (strip));
  return box;
}

static void strip_free (gpointer data)
{
  Strip *strip = data;
  g_object_unref (strip->session);
  g_clear_handle_id (&strip->arrange_source, g_source_remove);
  g_clear_pointer (&strip->drawn, cairo_surface_destroy);
  g_free (strip);
}

static void show_run (GtkWidget *widget)
{
  forget_lanes (widget);
  show_moment (widget);
}

GtkWidget *kh_run_strip_new (KhSession *session)
{
  Strip *strip = g_new0 (Strip, 1);
  GtkWidget *widget = gtk_box_new (GTK_ORIENTATION_VERTICAL, 4);
  GtkGesture *drag = gtk_gesture_drag_new ();
  GtkEventController *keys = gtk_event_controller_key_new ();
  strip->session = g_object_ref (session);
  g_object_set_data_full (G_OBJECT (widget), "kh-strip", strip, strip_free);
  gtk_widget_add_css_class (widget, "kh-strip");
  strip->controls = controls_new (strip);
  strip->below = gtk_box_new (GTK_ORIENTATION_HORIZONTAL, 0);
  gtk_widget_set_margin_start (strip->controls, 12);
  gtk_widget_set_margin_end (strip->controls, 12);
  gtk_widget_set_margin_top (strip->controls, 6);
  gtk_widget_set_margin_start (strip->below, 12);
  gtk_widget_set_margin_end (strip->below, 12);
  gtk_widget_set_visible (strip->below, FALSE);
  strip->area = gtk_drawing_area_new ();
  gtk_drawing_area_set_content_height (GTK_DRAWING_AREA (strip->area), LEAST_LANES);
  gtk_widget_set_vexpand (strip->area, TRUE);
  gtk_widget_set_focusable (strip->area, TRUE);
  gtk_drawing_area_set_draw_func (GTK_DRAWING_AREA (strip->area), draw_cb, strip, NULL);
  g_signal_connect (drag, "drag-begin", G_CALLBACK (drag_begin_cb), strip);
  g_signal_connect (drag, "drag-update", G_CALLBACK (drag_update_cb), strip);
  g_signal_connect (keys, "key-pressed", G_CALLBACK (key_cb), strip);
  gtk_widget_add_controller (strip->area, GTK_EVENT_CONTROLLER (drag));
  gtk_widget_add_controller (strip->area, keys);
  g_signal_connect (strip->area, "resize", G_CALLBACK (resize_cb), strip);
  gtk_box_append (GTK_BOX (widget), strip->controls);
  gtk_box_append (GTK_BOX (widget), strip->below);
  gtk_box_append (GTK_BOX (widget), strip->area);
  kh_player_attach (widget, session);
  kh_bench_follow (widget, session, "player-changed", G_CALLBACK (show_moment));
  kh_bench_follow_later (widget, session, "review-changed", G_CALLBACK (show_run), 40);
  g_signal_connect_object (gtk_settings_get_default (), "notify::gtk-application-prefer-dark-theme",
                           G_CALLBACK (gtk_widget_queue_draw), strip->area, G_CONNECT_SWAPPED);
  show_moment (widget);
  return widget;
}
