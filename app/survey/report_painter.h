// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/survey/report_layout.h"

class QCPPainter;
class QPainter;
class QCustomPlot;

namespace evenstroke {

/// Draws the pages of a report in black and grey. Plots are drawn through one plot object that is set up anew
/// for each; it is a widget, therefore pages are drawn on the window's thread.
class ReportPainter
{
public:
    ReportPainter();
    ~ReportPainter();
    ReportPainter(const ReportPainter&) = delete;
    ReportPainter& operator=(const ReportPainter&) = delete;

    /// @param painter scaled so that one unit is one point
    void draw(const ReportPage& page, QCPPainter& painter);

private:
    std::unique_ptr<QCustomPlot> plot_;
};

/// Diagonal lines over an area, cut at its edges: a pattern brush prints with the device's own, often too
/// dense, raster.
void hatch(QPainter& painter, const QRectF& area);

/// Sets `widget` up to show `plot` in an area of this size and draws it with the painter at its origin.
void draw_report_plot(QCustomPlot& widget, const report::Plot& plot, const QSizeF& size, QCPPainter& painter);

} // namespace evenstroke
