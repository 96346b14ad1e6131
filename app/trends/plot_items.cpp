// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/trends/plot_items.h"

#include <cmath>

namespace evenstroke {

namespace {
constexpr double mark_side = 12.0, pole = 24.0, cloth_width = 8.0, cloth_height = 7.0, word_gap = 4.0;
}

MarkItem::MarkItem(QCustomPlot* plot, Level level, const Theme& theme)
    : QCPAbstractItem(plot), position(createPosition(QStringLiteral("position"))), level_(level), theme_(theme)
{
    position->setType(QCPItemPosition::ptPlotCoords);
}

double MarkItem::selectTest(const QPointF& place, bool, QVariant*) const
{
    const QPointF apart = place - position->pixelPosition();
    return std::hypot(apart.x(), apart.y());
}

void MarkItem::draw(QCPPainter* painter)
{
    const QPointF centre = position->pixelPosition();
    const QRectF area(centre.x() - mark_side / 2.0, centre.y() - mark_side - 6.0, mark_side, mark_side);
    draw_mark(*painter, area, level_, theme_);
}

EventItem::EventItem(QCustomPlot* plot, QCPAxisRect* rect, const Theme& theme, QString word)
    : QCPAbstractItem(plot), position(createPosition(QStringLiteral("position"))), theme_(theme), word_(std::move(word))
{
    position->setTypeX(QCPItemPosition::ptPlotCoords);
    position->setTypeY(QCPItemPosition::ptAxisRectRatio);
    position->setAxes(rect->axis(QCPAxis::atBottom), rect->axis(QCPAxis::atLeft));
    position->setAxisRect(rect);
    setClipToAxisRect(false);
}

QRectF EventItem::area() const
{
    const QPointF foot = position->pixelPosition();
    const double words = word_shown_ ? QFontMetricsF(type(TypeSize::label)).horizontalAdvance(word_) + word_gap : 0.0;
    return {foot.x() - 2.0, foot.y() - pole, cloth_width + words + 4.0, pole};
}

double EventItem::selectTest(const QPointF& place, bool, QVariant*) const
{
    return area().contains(place) ? 0.0 : 1000.0;
}

void EventItem::draw(QCPPainter* painter)
{
    const QPointF foot = position->pixelPosition();
    const QPointF top = foot - QPointF(0.0, pole);
    painter->setAntialiasing(true);
    painter->setPen(theme_.pen(theme_.muted));
    painter->drawLine(QLineF(foot, top));
    painter->setBrush(theme_.muted);
    const QPointF cloth[] = {top, top + QPointF(cloth_width, cloth_height / 2.0), top + QPointF(0.0, cloth_height)};
    painter->drawPolygon(cloth, 3);
    if (!word_shown_)
        return;
    painter->setFont(type(TypeSize::label));
    painter->setPen(theme_.muted);
    painter->drawText(QRectF(top.x() + cloth_width + word_gap, top.y() - 4.0, 200.0, 15.0),
                      Qt::AlignLeft | Qt::AlignVCenter, word_);
}

} // namespace evenstroke
