/* SPDX-License-Identifier: MIT */
#include "cli/command.h"
#include "draw/export.h"
#include <glib/gi18n-lib.h>
#include <string.h>

#define PIXELS_LEAST 64
#define PIXELS_MOST 16384
#define PIXELS 1600

typedef struct
{
  char *what, *output, *hand;
  int pixels;
} Options;

static void options_clear (Options *options)
{
  g_free (options->what);
  g_free (options->output);
  g_free (options->hand);
}
G_DEFINE_AUTO_CLEANUP_CLEAR_FUNC (Options, options_clear)

static gboolean read_what (const char *name, KhExportWhat *what)
{
  static const char *const names[] = { "plan", "assembly", "run" };
  for (int i = 0; i < 3; i++)
    if (name == NULL || strcmp (name, names[i]) == 0)
      {
        *what = (KhExportWhat)i;
        return TRUE;
      }
  kh_command_say (_ ("--what: “%s” cannot be drawn; give plan, assembly or run"), name);
  return FALSE;
}

static gboolean check_options (const Options *options, KhExportKind *kind)
{
  if (options->output == NULL)
    kh_command_say (_ ("draw: say where to: --output FILE.svg, FILE.pdf or FILE.png"));
  else if (!kh_export_kind_from_path (options->output, kind))
    kh_command_say (_ ("--output: “%s” does not say the kind of picture; end the name in .svg, .pdf or .png"),
                    options->output);
  else if (options->pixels < PIXELS_LEAST || options->pixels > PIXELS_MOST)
    kh_command_say (_ ("--pixels: %d is out of range; give %d to %d"), options->pixels, PIXELS_LEAST, PIXELS_MOST);
  else
    return TRUE;
  return FALSE;
}

static KhStatus draw (const KhPlan *plan, KhExportKind kind, KhExportWhat what, const Options *options, KhHand hand)
{
  KhReviewSettings settings;
  g_autoptr (GError) error = NULL;
  kh_review_settings_init (&settings, plan);
  settings.with_panels = what == KH_EXPORT_WHAT_ASSEMBLY;
  settings.with_run = what == KH_EXPORT_WHAT_RUN;
  settings.run.hand = hand;
  g_autoptr (KhReview) review = kh_review_new (plan, &settings, kh_command_get_job ());
  const char *fault = settings.with_panels ? review->panels_fault : settings.with_run ? review->run_fault : NULL;
  if (kh_job_is_stopped (kh_command_get_job ()))
    return KH_STATUS_STOPPED;
  if (fault)
    {
      kh_command_say ("%s", fault);
      return KH_STATUS_FOUND;
    }
  g_autoptr (GBytes) bytes = kh_export (kind, what, plan, review, options->pixels, &error);
  if (!bytes)
    {
      kh_command_say (_ ("%s: the picture could not be drawn: %s"), options->output, error->message);
      return KH_STATUS_FILE;
    }
  gsize n;
  const char *data = g_bytes_get_data (bytes, &n);
  return kh_command_write (options->output, data, n);
}

KhStatus kh_command_draw (int argc, char **argv)
{
  g_auto (Options) options = { .pixels = PIXELS };
  const GOptionEntry entries[] = {
    { "what", 'w', 0, G_OPTION_ARG_STRING, &options.what, N_ ("plan, assembly or run (plan)"), "WHAT" },
    { "output", 'o', 0, G_OPTION_ARG_FILENAME, &options.output,
      N_ ("Where to; the ending says the kind: .svg, .pdf, .png"), "FILE" },
    { "hand", 0, 0, G_OPTION_ARG_STRING, &options.hand, N_ ("The hand of the run drawn: right or left (the plan's)"),
      "HAND" },
    { "pixels", 0, 0, G_OPTION_ARG_INT, &options.pixels, N_ ("Longer side of a PNG (1600)"), "N" },
    { NULL },
  };
  KhExportKind kind;
  KhExportWhat what;
  KhHand hand = KH_HAND_RIGHT;
  if (!kh_command_parse (entries, &argc, &argv, 1, 1) || !read_what (options.what, &what)
      || !check_options (&options, &kind) || !kh_command_read_hand (options.hand, &hand))
    return KH_STATUS_USAGE;
  g_autoptr (KhPlan) plan = kh_command_load_plan (argv[1]);
  if (!plan)
    return KH_STATUS_FILE;
  return draw (plan, kind, what, &options, options.hand ? hand : plan->robot.hand);
}
