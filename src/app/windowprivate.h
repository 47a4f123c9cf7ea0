/* SPDX-License-Identifier: MIT */
#pragma once
#include "app/canvas.h"
#include "app/recovery.h"
#include "app/window.h"

/* What the window's files share.  Template children belong to the template. */

#define KH_N_BENCH_PAGES 4

struct _KhWindow
{
  GtkApplicationWindow parent_instance;

  KhSession *session;
  KhRecovery *recovery;
  GtkWidget *canvas;        /* in canvas_overlay */
  GtkWidget *modes;         /* the Walls tool's two modes */
  GtkWidget *count_badge;   /* in the switcher's first button */
  GtkWidget *bench_buttons[KH_N_BENCH_PAGES];
  guint notice_source;      /* takes the notice out of the status bar */
  gboolean asking, closing; /* the save question is shown; it was answered */

  /* template */
  GtkWidget *header, *title_label, *file_label, *open_button, *undo_button, *redo_button, *undo_label;
  GtkWidget *info_bar, *info_label, *info_discard;
  GtkWidget *tool_box, *canvas_overlay, *strip_paned, *strip_stack, *bench_box, *bench_switcher, *bench_stack;
  GtkWidget *status_bar, *pointed_label, *size_label, *panels_label, *verdict_image, *verdict_label;
};

/* window.c */
void kh_window_say (KhWindow *self, const char *text, gboolean is_care); /* for some seconds in the status bar */

/* windowactions.c */
void kh_window_init_actions (KhWindow *self);
void kh_window_sync_actions (KhWindow *self); /* enabled, states */
void kh_window_set_accels (GtkApplication *app);

/* windowbench.c */
void kh_window_init_tools (KhWindow *self);
void kh_window_init_bench (KhWindow *self);
void kh_window_fill_bench (KhWindow *self); /* pages and strips for a new session */
void kh_window_show_bench (KhWindow *self, const char *page);
void kh_window_open_place_menu (KhWindow *self, double x, double y);
void kh_window_go_round (KhWindow *self, int step);
void kh_window_take_typed (KhWindow *self); /* what is typed on the bench and not yet taken over */

/* windowfiles.c */
typedef void (*KhThen) (KhWindow *self, gpointer data);
void kh_window_ask_new (KhWindow *self);
void kh_window_ask_open (KhWindow *self);
void kh_window_open_path (KhWindow *self, const char *path);
void kh_window_save_then (KhWindow *self, KhThen then, gpointer data); /* then: after it was saved; may be NULL */
void kh_window_ask_save_as (KhWindow *self, KhThen then, gpointer data);
void kh_window_ask_close (KhWindow *self);
void kh_window_fill_recent (KhWindow *self);
char *kh_window_dup_file_name (KhWindow *self); /* "boat-house.mazeplan", or what it could be called */

/* windowprint.c */
void kh_window_print (KhWindow *self);

/* windowexport.c */
void kh_window_ask_export_plan (KhWindow *self);
void kh_window_ask_export_cut_list (KhWindow *self);
/* Puts the ending on the name, and asks before overwriting where the chooser could not. */
typedef void (*KhWithPath) (KhWindow *self, const char *path, gpointer data);
void kh_window_choose_path (KhWindow *self, GtkFileChooserNative *chooser, const char *ending, KhWithPath with_path,
                            gpointer data);
