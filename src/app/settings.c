/* SPDX-License-Identifier: MIT */
#include "app/settings.h"

#include "config.h"
#include <gio/gio.h>

/* NULL where the schema is not installed: g_settings_new would abort then. */
static GSettings *get_store (void)
{
  static gboolean looked;
  static GSettings *store;
  if (!looked)
    {
      GSettingsSchemaSource *source = g_settings_schema_source_get_default ();
      GSettingsSchema *schema = source != NULL ? g_settings_schema_source_lookup (source, KH_APP_ID, TRUE) : NULL;
      if (schema != NULL)
        {
          store = g_settings_new_full (schema, NULL, NULL);
          g_settings_schema_unref (schema);
        }
      looked = TRUE;
    }
  return store;
}

static GHashTable *get_memory (void)
{
  static GHashTable *memory; /* char * -> GVariant * */
  if (memory == NULL)
    memory = g_hash_table_new_full (g_str_hash, g_str_equal, g_free, (GDestroyNotify)g_variant_unref);
  return memory;
}

/* Borrowed; NULL where there is none of this type. */
static GVariant *look_up (const char *key, const GVariantType *type)
{
  GVariant *value = g_hash_table_lookup (get_memory (), key);
  return value != NULL && g_variant_is_of_type (value, type) ? value : NULL;
}

static gboolean has_key (const char *key)
{
  GSettings *store = get_store ();
  if (store == NULL)
    return FALSE;
  g_autoptr (GSettingsSchema) schema = NULL;
  g_object_get (store, "settings-schema", &schema, NULL);
  return g_settings_schema_has_key (schema, key);
}

static void set_value (const char *key, GVariant *value)
{
  g_variant_ref_sink (value);
  if (has_key (key))
    {
      g_settings_set_value (get_store (), key, value);
      g_variant_unref (value);
    }
  else
    g_hash_table_replace (get_memory (), g_strdup (key), value);
}

int kh_settings_get_int (const char *key, int fallback)
{
  if (has_key (key))
    return g_settings_get_int (get_store (), key);
  GVariant *value = look_up (key, G_VARIANT_TYPE_INT32);
  return value != NULL ? g_variant_get_int32 (value) : fallback;
}

void kh_settings_set_int (const char *key, int number) { set_value (key, g_variant_new_int32 (number)); }

char *kh_settings_dup_string (const char *key, const char *fallback)
{
  if (has_key (key))
    return g_settings_get_string (get_store (), key);
  GVariant *value = look_up (key, G_VARIANT_TYPE_STRING);
  return g_strdup (value != NULL ? g_variant_get_string (value, NULL) : fallback);
}

void kh_settings_set_string (const char *key, const char *text) { set_value (key, g_variant_new_string (text)); }

KhLengthUnit kh_settings_get_unit (void)
{
  g_autofree char *name = kh_settings_dup_string ("units", "mm");
  if (strcmp (name, "inch-16") == 0)
    return KH_LENGTH_UNIT_INCH_16;
  if (strcmp (name, "inch-32") == 0)
    return KH_LENGTH_UNIT_INCH_32;
  return KH_LENGTH_UNIT_MM;
}
