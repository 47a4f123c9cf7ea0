/* SPDX-License-Identifier: MIT */
#include "app/scheme.h"

#include "app/settings.h"
#include <gtk/gtk.h>

static struct
{
  gboolean desktop_dark; /* what the desktop asks for, as far as is known */
  gboolean asked;
  GtkCssProvider *chrome, *colours;
} keeper;

static void apply (void)
{
  g_autofree char *choice = kh_settings_dup_string ("scheme", "follow");
  gboolean dark = strcmp (choice, "dark") == 0 || (strcmp (choice, "light") != 0 && keeper.desktop_dark);
  gtk_css_provider_load_from_resource (keeper.colours, dark ? "/org/kerfhand/Kerfhand/colours-dark.css"
                                                            : "/org/kerfhand/Kerfhand/colours-light.css");
  g_object_set (gtk_settings_get_default (), "gtk-application-prefer-dark-theme", dark, NULL);
}

/* The portal wraps the number in one variant or in two. */
static void take_answer (GVariant *answer)
{
  g_autoptr (GVariant) value = g_variant_ref (answer);
  while (g_variant_is_of_type (value, G_VARIANT_TYPE_VARIANT))
    {
      GVariant *inner = g_variant_get_variant (value);
      g_variant_unref (value);
      value = inner;
    }
  if (!g_variant_is_of_type (value, G_VARIANT_TYPE_UINT32))
    return;
  keeper.desktop_dark = g_variant_get_uint32 (value) == 1; /* 1: prefers dark */
  apply ();
}

static void read_cb (GObject *source, GAsyncResult *result, gpointer data)
{
  g_autoptr (GVariant) reply = g_dbus_connection_call_finish (G_DBUS_CONNECTION (source), result, NULL);
  if (reply == NULL)
    return; /* no portal: the toolkit's own setting stands */
  g_autoptr (GVariant) value = g_variant_get_child_value (reply, 0);
  take_answer (value);
}

static void changed_cb (GDBusConnection *bus, const char *sender, const char *path, const char *interface,
                        const char *signal, GVariant *parameters, gpointer data)
{
  const char *name_space, *key;
  g_autoptr (GVariant) value = NULL;
  if (!g_variant_is_of_type (parameters, G_VARIANT_TYPE ("(ssv)")))
    return;
  g_variant_get (parameters, "(&s&sv)", &name_space, &key, &value);
  if (strcmp (name_space, "org.freedesktop.appearance") == 0 && strcmp (key, "color-scheme") == 0)
    take_answer (value);
}

static void bus_cb (GObject *source, GAsyncResult *result, gpointer data)
{
  g_autoptr (GDBusConnection) bus = g_bus_get_finish (result, NULL);
  if (bus == NULL)
    return;
  g_dbus_connection_signal_subscribe (bus, "org.freedesktop.portal.Desktop", "org.freedesktop.portal.Settings",
                                      "SettingChanged", "/org/freedesktop/portal/desktop", "org.freedesktop.appearance",
                                      G_DBUS_SIGNAL_FLAGS_NONE, changed_cb, NULL, NULL);
  g_dbus_connection_call (bus, "org.freedesktop.portal.Desktop", "/org/freedesktop/portal/desktop",
                          "org.freedesktop.portal.Settings", "Read",
                          g_variant_new ("(ss)", "org.freedesktop.appearance", "color-scheme"), G_VARIANT_TYPE ("(v)"),
                          G_DBUS_CALL_FLAGS_NONE, 5000, NULL, read_cb, NULL);
}

void kh_scheme_start (void)
{
  GdkDisplay *display = gdk_display_get_default ();
  const char *theme = g_getenv ("GTK_THEME");
  g_assert (display != NULL);
  if (keeper.asked)
    return;
  keeper.asked = TRUE;
  g_object_get (gtk_settings_get_default (), "gtk-application-prefer-dark-theme", &keeper.desktop_dark, NULL);
  if (theme != NULL && g_str_has_suffix (theme, ":dark"))
    keeper.desktop_dark = TRUE;
  keeper.colours = gtk_css_provider_new ();
  keeper.chrome = gtk_css_provider_new ();
  gtk_css_provider_load_from_resource (keeper.chrome, "/org/kerfhand/Kerfhand/style.css");
  gtk_style_context_add_provider_for_display (display, GTK_STYLE_PROVIDER (keeper.colours),
                                              GTK_STYLE_PROVIDER_PRIORITY_APPLICATION);
  gtk_style_context_add_provider_for_display (display, GTK_STYLE_PROVIDER (keeper.chrome),
                                              GTK_STYLE_PROVIDER_PRIORITY_APPLICATION);
  apply ();
  g_bus_get (G_BUS_TYPE_SESSION, NULL, bus_cb, NULL);
}

void kh_scheme_choose (const char *name)
{
  kh_settings_set_string ("scheme", name);
  apply ();
}

KhScheme kh_scheme_get (void)
{
  gboolean dark = FALSE;
  g_object_get (gtk_settings_get_default (), "gtk-application-prefer-dark-theme", &dark, NULL);
  return dark ? KH_SCHEME_DARK : KH_SCHEME_LIGHT;
}

gboolean kh_scheme_is_high_contrast (void)
{
  g_autofree char *theme = NULL;
  const char *forced = g_getenv ("GTK_THEME");
  g_object_get (gtk_settings_get_default (), "gtk-theme-name", &theme, NULL);
  const char *name = forced != NULL && *forced != '\0' ? forced : theme;
  return name != NULL && (g_str_has_prefix (name, "HighContrast") || g_str_has_prefix (name, "Default-hc"));
}
