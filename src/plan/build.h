/* SPDX-License-Identifier: MIT */
#pragma once
#include <glib.h>
#include <stdint.h>
#include "plan/lattice.h"

/* How a plan is built: joint, saw, boards, what is owned.  Lengths that are
 * cut are whole nanometres; prices whole thousandths of the currency. */

typedef enum { KH_JOINT_BUTT, KH_JOINT_GROOVED_POSTS, KH_JOINT_HALVED } KhJoint;
typedef enum { KH_ENDS_FULL, KH_ENDS_FLUSH } KhEnds;
typedef enum { KH_POSTS_STAND_AT_EVERY_POINT, KH_POSTS_STAND_WHERE_NEEDED } KhPostsStand;
typedef enum { KH_STOCK_STRIP, KH_STOCK_SHEET } KhStockForm;
typedef enum { KH_GRAIN_ALONG, KH_GRAIN_ANY } KhGrain;

#define KH_LENGTH_OPEN_NM G_GINT64_CONSTANT (-1) /* a length left open (null in the file) */
#define KH_COUNT_ANY (-1)                        /* as many as needed (null in the file) */
#define KH_PRICE_NONE G_GINT64_CONSTANT (-1)     /* no price given */

typedef struct
{
  char *name;
  KhStockForm form;
  int64_t length_nm;
  int64_t width_nm;     /* sheet */
  int64_t thickness_nm; /* strip: as measured; KH_LENGTH_OPEN_NM = the walls' */
  KhGrain grain;        /* sheet */
  int count;            /* KH_COUNT_ANY or 0 and more */
  int64_t price_milli;  /* KH_PRICE_NONE or 0 and more */
  char *other;
} KhStock;

typedef struct
{
  int64_t length_nm;
  int count;
  char *other;
} KhKitPanel;

typedef struct
{
  int64_t kerf_nm, end_trim_nm, keep_offcut_nm;
  char *other;
} KhSaw;

typedef struct
{
  int screws_per_joint, brackets_per_joint;
  int64_t feet_spacing_nm; /* 0 = no feet */
  char *other;
} KhFittings;

typedef struct
{
  KhJoint joint;
  KhEnds ends;
  int64_t post_nm; /* side of a post; KH_LENGTH_OPEN_NM = thickness + 18 mm */
  int64_t groove_nm, fit_nm;
  KhPostsStand posts_stand;
  int64_t slot_play_nm;
  int64_t longest_panel_nm;
  GArray *loose_sections; /* of KhRun */
  KhSaw saw;
  char *currency;
  GArray *stock; /* of KhStock; may be empty */
  GArray *kit;   /* of KhKitPanel */
  KhFittings fittings;
  char *other;
} KhBuild;

void kh_build_init (KhBuild *build); /* the file's defaults; one strip of 2 440 mm without a price */
void kh_build_copy (KhBuild *build, const KhBuild *from); /* deep; 'build' uninitialised */
void kh_build_clear (KhBuild *build);
gboolean kh_build_equal (const KhBuild *a, const KhBuild *b);
