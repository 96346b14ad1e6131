// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/survey/report_type.h"
#include "core/survey/survey_report.h"

#include <QRectF>
#include <QSizeF>
#include <QString>

#include <functional>
#include <memory>
#include <variant>
#include <vector>

/// The survey report set on pages: what stands where, in points from the upper left corner of each sheet.
namespace evenstroke {

struct TextItem
{
    double x = 0.0, baseline = 0.0;
    ReportFont font = ReportFont::body;
    bool muted = false;
    QString text;
};
struct RuleItem
{
    double x1 = 0.0, y1 = 0.0, x2 = 0.0, y2 = 0.0;
    double width = 0.5;
    bool strong = false; ///< black instead of grey
};
struct BoxItem
{
    QRectF area;
};
struct PlotItem
{
    QRectF area;
    const report::Plot* plot = nullptr;
};
struct StripItem
{
    QRectF area;
    const report::Strips* strips = nullptr;
    const report::Strips::Cell* cell = nullptr;
};
using PageItem = std::variant<TextItem, RuleItem, BoxItem, PlotItem, StripItem>;

struct ReportPage
{
    bool landscape = false;
    std::vector<PageItem> items;
};

/// A4, in points.
inline QSizeF sheet_size(bool landscape) { return landscape ? QSizeF(842.0, 595.0) : QSizeF(595.0, 842.0); }

/// Keeps the report it was made from: the plots are drawn out of it.
struct ReportLayout
{
    std::shared_ptr<const SurveyReport> report;
    std::vector<ReportPage> pages;
};

/// Called now and then; answer false to stop.
using ReportProgress = std::function<bool(int done, int total)>;

/// Sets the report on A4 pages, portrait, and landscape where a section's tables are too wide. Each page
/// carries ship, engine, period, report number and "page x of y"; heads of tables repeat. Needs no widget and
/// may run on a worker thread.
ReportLayout lay_out(std::shared_ptr<const SurveyReport> report);

} // namespace evenstroke
