// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/theme.h"

#include <QCoreApplication>
#include <QPainter>
#include <QPainterPath>
#include <QPixmap>

#include <algorithm>

namespace evenstroke {

namespace {

void draw_ring(QPainter& painter, const QRectF& square, const QColor& colour, bool half_filled)
{
    const double width = square.width() / 8.0;
    const QRectF ring = square.adjusted(width, width, -width, -width);
    painter.setPen(QPen(colour, width));
    painter.setBrush(Qt::NoBrush);
    painter.drawEllipse(ring);
    if (!half_filled)
        return;
    painter.setPen(Qt::NoPen);
    painter.setBrush(colour);
    painter.drawPie(ring, 90 * 16, 180 * 16); // Qt counts in sixteenths of a degree
}

void draw_lozenge(QPainter& painter, const QRectF& square, const QColor& colour)
{
    QPainterPath lozenge;
    lozenge.moveTo(square.center().x(), square.top());
    lozenge.lineTo(square.right(), square.center().y());
    lozenge.lineTo(square.center().x(), square.bottom());
    lozenge.lineTo(square.left(), square.center().y());
    lozenge.closeSubpath();
    painter.setPen(QPen(colour, square.width() / 10.0));
    painter.setBrush(Qt::NoBrush);
    painter.drawPath(lozenge);
    QFont font = type(TypeSize::label, true);
    font.setPixelSize(std::max(1, static_cast<int>(square.height() * 0.62)));
    painter.setFont(font);
    painter.setPen(colour);
    painter.drawText(square, Qt::AlignCenter, QStringLiteral("?"));
}

} // namespace

bool has_mark(Level level)
{
    return level == Level::note || level == Level::ask || level == Level::watch || level == Level::act;
}

void draw_mark(QPainter& painter, const QRectF& area, Level level, const Theme& colours)
{
    if (!has_mark(level))
        return;
    const double side = std::min(area.width(), area.height());
    const QRectF square(area.center().x() - side / 2.0, area.center().y() - side / 2.0, side, side);
    const QColor colour = colours.level_colour(level);
    painter.save();
    painter.setRenderHint(QPainter::Antialiasing);
    if (level == Level::act) {
        const double inset = side / 8.0;
        painter.fillRect(square.adjusted(inset, inset, -inset, -inset), colour);
    } else if (level == Level::ask) {
        draw_lozenge(painter, square, colour);
    } else {
        draw_ring(painter, square, colour, level == Level::watch);
    }
    painter.restore();
}

QPixmap mark_pixmap(Level level, int size, double device_pixel_ratio, const Theme& colours)
{
    QPixmap pixmap(QSize(size, size) * device_pixel_ratio);
    pixmap.setDevicePixelRatio(device_pixel_ratio);
    pixmap.fill(Qt::transparent);
    QPainter painter(&pixmap);
    draw_mark(painter, QRectF(0, 0, size, size), level, colours);
    return pixmap;
}

QString level_text(Level level)
{
    switch (level) {
    case Level::no_data: return QCoreApplication::translate("evenstroke", "no data");
    case Level::learning: return QCoreApplication::translate("evenstroke", "learning");
    case Level::quiet: return QCoreApplication::translate("evenstroke", "quiet");
    case Level::note: return QCoreApplication::translate("evenstroke", "note");
    case Level::ask: return QCoreApplication::translate("evenstroke", "ask");
    case Level::watch: return QCoreApplication::translate("evenstroke", "watch");
    case Level::act: return QCoreApplication::translate("evenstroke", "act");
    }
    return {};
}

} // namespace evenstroke
