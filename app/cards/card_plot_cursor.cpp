// SPDX-License-Identifier: GPL-3.0-or-later
// Zoom and cursor of the cards' plot.
#include "app/cards/card_plot.h"
#include "app/desk/number_text.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {

namespace {

constexpr double spot_reach = 15.0; // degrees shown on either side of a remark's place

/// Value of a line at x; nothing where it does not reach or has a gap.
std::optional<double> value_at(const CardLine& line, double x)
{
    if (line.x.size() < 2 || x < line.x.front() || x > line.x.back())
        return std::nullopt;
    const auto above = std::lower_bound(line.x.begin(), line.x.end(), x);
    const auto i = static_cast<std::size_t>(std::max<std::ptrdiff_t>(1, above - line.x.begin()));
    const double width = line.x[i] - line.x[i - 1];
    const double value = width > 0.0 ? line.y[i - 1] + (line.y[i] - line.y[i - 1]) * (x - line.x[i - 1]) / width : line.y[i];
    return std::isfinite(value) ? std::optional(value) : std::nullopt;
}

} // namespace

void CardPlot::zoom(double factor)
{
    const double x = cursor_ && xAxis->range().contains(*cursor_) ? *cursor_ : xAxis->range().center();
    double y = yAxis->range().center();
    for (const CardLine& line : picture_.lines)
        if (line.role == FigureRole::in_hand)
            y = value_at(line, x).value_or(y);
    xAxis->scaleRange(factor, x);
    yAxis->scaleRange(factor, y);
    replot(rpQueuedReplot);
}

void CardPlot::set_cursor(std::optional<double> x)
{
    cursor_ = x;
    if (cursor_ && !cursor_line_) {
        cursor_line_ = new QCPItemLine(this);
        cursor_line_->setLayer(QStringLiteral("overlay"));
        cursor_line_->setPen(theme_->pen(theme_->ink));
        for (auto* end : {cursor_line_->start, cursor_line_->end})
            stand_over_x(*end);
    }
    if (cursor_line_) {
        cursor_line_->setVisible(cursor_.has_value());
        if (cursor_) {
            cursor_line_->start->setCoords(*cursor_, 0.0);
            cursor_line_->end->setCoords(*cursor_, 1.0);
        }
    }
    replot(rpQueuedReplot);
    emit cursor_moved();
}

void CardPlot::move_cursor(double steps)
{
    if (!picture_.empty.isEmpty())
        return;
    const bool angle = picture_.x_unit == QStringLiteral("°");
    const double step = angle ? 1.0 : 0.01 * (picture_.x_high - picture_.x_low);
    const double from = cursor_.value_or(angle ? std::clamp(0.0, xAxis->range().lower, xAxis->range().upper) : xAxis->range().center());
    const double to = std::clamp(cursor_ ? from + steps * step : from, picture_.x_low, picture_.x_high);
    if (!xAxis->range().contains(to))
        xAxis->setRange(to - 0.5 * xAxis->range().size(), to + 0.5 * xAxis->range().size());
    set_cursor(to);
}

QString CardPlot::cursor_words() const
{
    if (!cursor_ || !picture_.empty.isEmpty())
        return {};
    const double x = picture_.logarithmic ? std::pow(10.0, *cursor_) : *cursor_;
    QStringList values;
    for (const CardLine& line : picture_.lines)
        if (!line.name.isEmpty())
            if (const auto value = value_at(line, *cursor_))
                values.append(tr("%1 %2").arg(line.name, number_text(*value, line.decimals)));
    const QString place = picture_.x_unit == QStringLiteral("°") ? number_text(x, 1) + u'°' : with_unit(number_text(x, 0), picture_.x_unit);
    return values.isEmpty() ? place : tr("%1: %2").arg(place, values.join(QStringLiteral(" · ")));
}

void CardPlot::show_spot(int number)
{
    for (const CardSpot& spot : picture_.spots)
        if (spot.number == number) {
            xAxis->setRange(spot.x - spot_reach, spot.x + spot_reach);
            set_cursor(spot.x);
        }
}

void CardPlot::mouseMoveEvent(QMouseEvent* event)
{
    QCustomPlot::mouseMoveEvent(event);
    if (picture_.empty.isEmpty() && event->buttons() == Qt::NoButton && axisRect()->rect().contains(event->pos()))
        set_cursor(xAxis->pixelToCoord(event->position().x()));
}

void CardPlot::mouseDoubleClickEvent(QMouseEvent* event)
{
    show_all();
    event->accept();
}

void CardPlot::leaveEvent(QEvent* event)
{
    set_cursor(std::nullopt);
    QCustomPlot::leaveEvent(event);
}

} // namespace evenstroke
