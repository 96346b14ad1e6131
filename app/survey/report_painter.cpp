// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/report_painter.h"

#include "app/desk/theme.h"

#include <qcustomplot.h>

#include <algorithm>

namespace evenstroke {
namespace {

using namespace report;

const Theme& ink() { return theme_of(ThemeKind::print); }

struct StripScale
{
    QRectF area;
    double from, to, low, high;
    double x(double across) const { return area.left() + (across - from) / (to - from) * area.width(); }
    double y(double value) const { return area.bottom() - (value - low) / (high - low) * area.height(); }
};

void draw_strip(QPainter& painter, const StripItem& item)
{
    const Strips::Cell& cell = *item.cell;
    if (cell.line.points.empty() || item.strips->to <= item.strips->from)
        return;
    double low = cell.band ? cell.band->low : 0.0, high = cell.band ? cell.band->high : 0.0;
    for (const PlotPoint& point : cell.line.points) {
        low = std::min(low, point.value);
        high = std::max(high, point.value);
    }
    if (high <= low)
        return;
    const StripScale scale{item.area, item.strips->from, item.strips->to, low, high};
    if (cell.band)
        painter.fillRect(QRectF(QPointF(item.area.left(), scale.y(cell.band->high)), QPointF(item.area.right(), scale.y(cell.band->low))), ink().band);
    painter.setPen(QPen(ink().ink, 0.75));
    QPolygonF line;
    for (const PlotPoint& point : cell.line.points)
        if (point.mark == PlotPoint::Mark::filled)
            line.append(QPointF(scale.x(point.across), scale.y(point.value)));
    painter.setBrush(Qt::NoBrush);
    painter.drawPolyline(line);
    painter.setBrush(ink().ink);
    painter.setPen(Qt::NoPen);
    if (!line.isEmpty())
        painter.drawEllipse(line.back(), 1.3, 1.3);
}

struct Drawing
{
    QCPPainter& painter;
    QCustomPlot& plot;

    void operator()(const TextItem& item)
    {
        painter.setPen(item.muted ? QColor(0x404040) : ink().ink);
        painter.setFont(report_font(item.font));
        painter.drawText(QPointF(item.x, item.baseline), item.text);
    }
    void operator()(const RuleItem& item)
    {
        painter.setPen(QPen(item.strong ? ink().ink : ink().rule, item.width));
        painter.drawLine(QPointF(item.x1, item.y1), QPointF(item.x2, item.y2));
    }
    void operator()(const BoxItem& item)
    {
        painter.setPen(QPen(ink().ink, 0.75));
        painter.setBrush(Qt::NoBrush);
        painter.drawRect(item.area);
    }
    void operator()(const PlotItem& item)
    {
        painter.save();
        painter.translate(item.area.topLeft());
        draw_report_plot(plot, *item.plot, item.area.size(), painter);
        painter.restore();
    }
    void operator()(const StripItem& item)
    {
        painter.save();
        draw_strip(painter, item);
        painter.restore();
    }
};

} // namespace

void hatch(QPainter& painter, const QRectF& area)
{
    painter.setPen(QPen(QColor(0xA0A0A0), 0.3));
    constexpr double step = 5.0;
    for (double start = area.left() - area.height(); start < area.right(); start += step) {
        const double x1 = std::max(start, area.left()), x2 = std::min(start + area.height(), area.right());
        if (x2 > x1)
            painter.drawLine(QPointF(x1, area.bottom() - (x1 - start)), QPointF(x2, area.bottom() - (x2 - start)));
    }
}

ReportPainter::ReportPainter() : plot_(std::make_unique<QCustomPlot>())
{
    plot_->setBackground(Qt::NoBrush);
    plot_->setLocale(QLocale::c());
}

ReportPainter::~ReportPainter() = default;

void ReportPainter::draw(const ReportPage& page, QCPPainter& painter)
{
    Drawing drawing{painter, *plot_};
    for (const PageItem& item : page.items)
        std::visit(drawing, item);
}

} // namespace evenstroke
