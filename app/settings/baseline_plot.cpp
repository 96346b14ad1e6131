// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/settings/baseline_plot.h"

#include "app/desk/number_text.h"
#include "app/desk/plain_axes.h"
#include "app/desk/theme.h"
#include "core/engine/baseline.h"

#include <qcustomplot.h>

#include <QVBoxLayout>

namespace evenstroke {

BaselinePlot::BaselinePlot(QWidget* parent) : QWidget(parent), plot_(new QCustomPlot(this))
{
    auto* lines = new QVBoxLayout(this);
    lines->setContentsMargins(0, 0, 0, 0);
    lines->addWidget(plot_);
    plot_->setLocale(QLocale::c());
    plot_->setNoAntialiasingOnDrag(true);
    plot_->axisRect()->setMinimumMargins(QMargins(4, 12, 12, 4));
    setAccessibleName(tr("Baseline over load"));
}

BaselinePlot::~BaselinePlot() = default;

void BaselinePlot::show_quantity(const Engine& engine, const std::string& quantity, std::shared_ptr<const Judgement> judgement)
{
    engine_ = engine;
    quantity_ = quantity;
    judgement_ = std::move(judgement);
    draw();
}

void BaselinePlot::changeEvent(QEvent* event)
{
    if (event->type() == QEvent::StyleChange)
        draw();
    QWidget::changeEvent(event);
}

void BaselinePlot::draw_curve()
{
    const Baseline baseline(engine_);
    const BaselineCurve* curve = baseline.curve("", quantity_);
    QVector<double> load, value, point_load, point_value;
    for (const BaselinePoint& point : engine_.baseline)
        if (const auto found = point.values.find(quantity_); found != point.values.end() && point.mode.empty()) {
            point_load.append(point.load_percent);
            point_value.append(found->second);
        }
    if (!curve || point_load.isEmpty())
        return;
    for (double at = point_load.front(); at <= point_load.back(); at += 0.5)
        if (const auto expected = curve->at(at)) {
            load.append(at);
            value.append(*expected);
        }
    QCPGraph* line = plot_->addGraph();
    line->setPen(theme().pen(theme().line));
    line->setData(load, value, true);
    QCPGraph* points = plot_->addGraph();
    points->setLineStyle(QCPGraph::lsNone);
    points->setPen(theme().pen(theme().line));
    points->setScatterStyle({QCPScatterStyle::ssDisc, 6});
    points->setData(point_load, point_value, true);
}

void BaselinePlot::draw_readings()
{
    const auto id = find_quantity(quantity_);
    if (!judgement_ || !id)
        return;
    QVector<double> load, value;
    for (const ReadingJudgement& reading : judgement_->readings) {
        double sum = 0.0;
        int count = 0;
        for (const JudgedValue& one : reading.values)
            if (quantity(one.quantity).name == quantity_ && !one.doubtful) {
                sum += one.corrected.value_or(one.raw);
                ++count;
            }
        if (count > 0 && reading.load_percent && reading.mode.empty() && reading.steadiness != Steadiness::unsteady) {
            load.append(*reading.load_percent);
            value.append(sum / count);
        }
    }
    QCPGraph* dots = plot_->addGraph();
    dots->setLineStyle(QCPGraph::lsNone);
    dots->setPen(theme().pen(theme().others));
    dots->setScatterStyle({QCPScatterStyle::ssCircle, 4});
    dots->setData(load, value);
}

void BaselinePlot::draw()
{
    plot_->clearGraphs();
    plot_->setBackground(theme().page);
    draw_readings();
    draw_curve();
    style_plain_axes(*plot_, 5);
    plot_->xAxis->setLabel(tr("load, %"));
    const auto id = find_quantity(quantity_);
    plot_->yAxis->setLabel(id ? tr("%1, %2").arg(quantity_title(*id), unit_text(*id)) : to_qstring(quantity_));
    plot_->rescaleAxes();
    plot_->xAxis->scaleRange(1.1);
    plot_->yAxis->scaleRange(1.15);
    plot_->replot(QCustomPlot::rpQueuedReplot);
}

} // namespace evenstroke
