/* SPDX-License-Identifier: MIT */
#pragma once
#include <gtk/gtk.h>
#include "app/session.h"

/* What the pages of the bench are made of. */

/* A page: one column in a scrolled window. '*column' is where rows go. */
GtkWidget *kh_bench_page_new (GtkWidget **column);
GtkWidget *kh_bench_heading_new (const char *text);
GtkWidget *kh_bench_words_new (const char *text, const char *css); /* words that wrap, cheap to lay out; hexpands */
GtkWidget *kh_bench_note_new (const char *text);            /* second-rank words that wrap */
/* "Label  [widget]" in one row; the label is the widget's mnemonic and name. */
GtkWidget *kh_bench_row_new (const char *label, GtkWidget *widget);

/* Calls back on a signal of the session for as long as the widget lives; while
 * it is not shown, once when it is. */
void kh_bench_follow (GtkWidget *widget, KhSession *session, const char *signal, GCallback callback_swapped);
/* The same, once for all signals of some milliseconds: so that an edit's frame
 * paints the canvas, and the lists beside it come a frame later. */
void kh_bench_follow_later (GtkWidget *widget, KhSession *session, const char *signal, GCallback callback_swapped, guint delay_ms);

/* GTK 4.8 names a button by its own label only: buttons and folding headings
 * that hold their words deeper are given them as their name, all below 'widget'
 * but those named already. */
void kh_bench_name_below (GtkWidget *widget);
/* A name of its own, where the words on it do not say what it acts on. */
void kh_bench_set_name (GtkWidget *widget, const char *name);

/* A number typed with its unit. Tries the text; TRUE: it was taken over. FALSE:
 * *fault (owned) says what is wrong, and nothing was changed. */
typedef gboolean (*KhTryText) (gpointer data, const char *text, char **fault);
typedef char *(*KhDupText) (gpointer data); /* what stands there now */

/* An entry that tries its text on Enter and on losing the focus, and shows a
 * fault beneath it. 'data' is freed with it. */
GtkWidget *kh_bench_entry_new (KhTryText try_text, KhDupText dup_text, gpointer data, GDestroyNotify free_data);
void kh_bench_entry_refresh (GtkWidget *entry); /* shows what stands there now, unless it is being typed in */
/* Refreshes every such entry beneath a widget. */
void kh_bench_refresh_below (GtkWidget *widget);
/* The same though something is being typed: before fields are taken away whose
 * number is no longer where they look for it. */
void kh_bench_forget_typed_below (GtkWidget *widget);

/* What is typed in the field that has the focus is taken over as Enter would:
 * before the plan is saved, printed or closed.  'focus' may be NULL. */
void kh_bench_take_typed (GtkWidget *focus);
/* Makes a field of another kind one that kh_bench_take_typed knows. */
void kh_bench_set_take_typed (GtkWidget *field, void (*take) (GtkWidget *field));
