/* SPDX-License-Identifier: MIT */
#pragma once
#include "draw/planpicture.h"

/* Bytes of a picture file.  The same input gives the same bytes. */
typedef enum { KH_EXPORT_SVG, KH_EXPORT_PDF, KH_EXPORT_PNG } KhExportKind;
typedef enum { KH_EXPORT_WHAT_PLAN, KH_EXPORT_WHAT_ASSEMBLY, KH_EXPORT_WHAT_RUN } KhExportWhat;

#define KH_EXPORT_ERROR (kh_export_error_quark ())
GQuark kh_export_error_quark (void);
typedef enum { KH_EXPORT_ERROR_CAIRO, KH_EXPORT_ERROR_SIZE } KhExportError;

gboolean kh_export_kind_from_path (const char *path, KhExportKind *kind); /* by its ending */
/* SVG: millimetres at true size.  PDF: A4 (or the smallest ISO paper up to A3 that suits), at an
 * ISO 5455 scale, with title block and check bar.  PNG: 'pixels' along its longer side. */
GBytes *kh_export (KhExportKind kind, KhExportWhat what, const KhPlan *plan, const KhReview *review, int pixels, GError **error);
