// SPDX-License-Identifier: GPL-3.0-or-later
// What is drawn besides the line where the engineer asks for it: load, uncertainty, customary limits.
#include "app/trends/plot_tickers.h"
#include "app/trends/trend_plot.h"

namespace evenstroke {

namespace {

constexpr double whisker_width = 5.0; // pixels, as wide as a point

} // namespace

/// Bars of the half-width over the points of a graph, drawn beneath them.
QCPErrorBars* TrendPlot::add_whiskers(QCPGraph* graph)
{
    auto* whiskers = new QCPErrorBars(graph->keyAxis(), graph->valueAxis());
    whiskers->setDataPlottable(graph);
    whiskers->setErrorType(QCPErrorBars::etValueError);
    whiskers->setWhiskerWidth(whisker_width);
    whiskers->setSymbolGap(0.0);
    whiskers->setPen(theme_->pen(theme_->muted));
    whiskers->setAntialiased(false);
    return whiskers;
}

void TrendPlot::add_uncertainty()
{
    if (!extras_.uncertainty)
        return;
    QVector<double> times, values, half_widths;
    for (const PicturePoint& point : picture_.points)
        if (point.half_width && !point.doubtful) {
            times.append(point.time);
            values.append(point.value);
            half_widths.append(*point.half_width);
        }
    QCPGraph* graph = addGraph(values_->axis(QCPAxis::atBottom), values_->axis(QCPAxis::atLeft));
    graph->setLineStyle(QCPGraph::lsNone);
    graph->setData(times, values, true);
    add_whiskers(graph)->setData(half_widths);
}

void TrendPlot::add_fixed_limits()
{
    if (!extras_.fixed_limits || picture_.fixed_high.times.empty())
        return;
    QCPAxis* x = values_->axis(QCPAxis::atBottom);
    for (const PictureLine* edge : {&picture_.fixed_low, &picture_.fixed_high}) {
        QCPGraph* line = addGraph(x, values_->axis(QCPAxis::atLeft));
        line->setData(QVector<double>(edge->times.begin(), edge->times.end()),
                      QVector<double>(edge->values.begin(), edge->values.end()), true);
        line->setPen(theme_->pen(theme_->muted));
        line->setLayer(QStringLiteral("background"));
    }
    QCPItemText* name = add_text(picture_.fixed_high.name, values_, theme_->muted, false);
    name->position->setCoords(x->range().lower, picture_.fixed_high.values.front());
    name->setPositionAlignment(Qt::AlignLeft | Qt::AlignBottom);
    name->setPadding(QMargins(6, 0, 0, 2));
}

void TrendPlot::add_load()
{
    QCPAxis* axis = values_->axis(QCPAxis::atRight);
    if (!extras_.load)
        return;
    QVector<double> times, loads;
    for (const PicturePoint& point : picture_.points)
        if (point.load_percent) {
            times.append(point.time);
            loads.append(*point.load_percent);
        }
    QCPGraph* graph = addGraph(values_->axis(QCPAxis::atBottom), axis);
    graph->setData(times, loads, true);
    QPen pen = theme_->pen(theme_->muted);
    pen.setStyle(Qt::DotLine);
    graph->setPen(pen);
    axis->setTicker(QSharedPointer<QCPAxisTicker>(new NumberTicker(false)));
    axis->setRange(0.0, 110.0);
    QCPItemText* name = add_text(tr("load, %"), values_, theme_->muted, false);
    name->position->setType(QCPItemPosition::ptAxisRectRatio);
    name->position->setAxisRect(values_);
    name->position->setCoords(1.0, 0.0);
    name->setPositionAlignment(Qt::AlignRight | Qt::AlignBottom);
}

} // namespace evenstroke
