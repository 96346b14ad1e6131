// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/trace_preview.h"

#include "app/desk/plain_axes.h"
#include "app/desk/theme.h"

#include <qcustomplot.h>

#include <QVBoxLayout>

namespace evenstroke {

TracePreview::TracePreview(QWidget* parent) : QWidget(parent), plot_(new QCustomPlot(this))
{
    auto* lines = new QVBoxLayout(this);
    lines->setContentsMargins(0, 0, 0, 0);
    lines->addWidget(plot_);
    plot_->setLocale(QLocale::c());
    plot_->axisRect()->setMinimumMargins(QMargins(4, 6, 12, 4));
    setAccessibleName(tr("Pressure over crank angle"));
    draw();
}

void TracePreview::show_trace(const FileTrace* trace)
{
    trace_ = trace ? std::optional(*trace) : std::nullopt;
    draw();
}

void TracePreview::changeEvent(QEvent* event)
{
    if (event->type() == QEvent::StyleChange)
        draw();
    QWidget::changeEvent(event);
}

void TracePreview::add_line(const std::vector<double>& x, const std::vector<double>& y, const QColor& colour,
                            int style)
{
    QCPCurve* const line =
        new QCPCurve(plot_->xAxis, plot_->yAxis); // several cycles run over the same angles
    line->setPen(theme().pen(colour, style));
    line->setData(QVector<double>(x.begin(), x.end()), QVector<double>(y.begin(), y.end()));
}

void TracePreview::draw()
{
    plot_->clearPlottables();
    plot_->setBackground(theme().page);
    if (trace_ && trace_->card) {
        add_line(trace_->card->line_angle, trace_->card->line_pressure, theme().others, 1);
        add_line(trace_->card->trace.angle, trace_->card->trace.mean, theme().line, 0);
    } else if (trace_ && trace_->trace) {
        add_line(trace_->trace->crank_angle_deg, trace_->trace->pressure_bar, theme().line, 0);
    }
    style_plain_axes(*plot_, 4);
    plot_->xAxis->setLabel(tr("crank angle, °"));
    plot_->yAxis->setLabel(tr("pressure, bar"));
    plot_->rescaleAxes();
    if (plot_->plottableCount() == 0) {
        plot_->xAxis->setRange(-180.0, 180.0);
        plot_->yAxis->setRange(0.0, 150.0);
    }
    plot_->yAxis->scaleRange(1.1);
    plot_->replot(QCustomPlot::rpQueuedReplot);
}

} // namespace evenstroke
