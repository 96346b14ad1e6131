// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/survey/report_layout.h"
#include "core/problem.h"

#include <QString>

namespace evenstroke {

/// Writes the report as PDF/A-1b: fonts embedded, no transparency, black and grey, vector plots, text that can
/// be searched. Written beside the path and moved there when whole; what stood there before is replaced.
/// Needs a QApplication (any platform, offscreen too) and the window's thread.
/// @par Problems storage: the folder or the disk refused; invalid_input: stopped by `progress`
Result<void> write_survey_pdf(const SurveyReport& report, const QString& path, const ReportProgress& progress = {});

/// The same from a layout made before, perhaps on another thread.
Result<void> write_survey_pdf(const ReportLayout& layout, const QString& path, const ReportProgress& progress = {});

/// The same as text with tabs, for those who want to count with it. @par Problems storage
Result<void> write_survey_text(const SurveyReport& report, const QString& path);

} // namespace evenstroke
