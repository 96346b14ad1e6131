// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/board/board_painting.h"

#include <QCoreApplication>
#include <QPainter>
#include <QPainterPath>

#include <algorithm>

namespace evenstroke {

namespace {

constexpr double point_radius = 2.0, mark_side = 10.0, text_line = 15.0;

QFont small_type()
{
    QFont font = type(TypeSize::label);
    font.setPointSizeF(7.5);
    return font;
}

bool stands_out(Level level) { return level == Level::watch || level == Level::act; }

/// A level's mark and word, right-aligned under the number.
void paint_level(QPainter& painter, const QRectF& area, const BoardCell& cell, const Theme& theme)
{
    painter.setFont(type(TypeSize::label));
    painter.setPen(theme.level_colour(cell.level));
    const double words = QFontMetricsF(painter.font()).horizontalAdvance(cell.word);
    const QRectF text(area.right() - words, area.top(), words + 1.0, area.height());
    painter.drawText(text, Qt::AlignVCenter | Qt::AlignLeft, cell.word);
    const double x = std::max(area.left(), text.left() - mark_side - 6.0);
    draw_mark(painter, QRectF(x, area.center().y() - mark_side / 2.0, mark_side, mark_side), cell.level, theme);
}

/// What is said of a cell without a mark: learning, or the day of an older value.
void paint_remark(QPainter& painter, const QRectF& area, const QString& words, const Theme& theme)
{
    painter.setFont(small_type());
    painter.setPen(theme.muted);
    painter.drawText(area, Qt::AlignVCenter | Qt::AlignLeft, words);
}

void paint_number(QPainter& painter, const QRectF& area, const BoardCell& cell, const Theme& theme)
{
    painter.setFont(type(TypeSize::body, stands_out(cell.level)));
    painter.setPen(cell.old_value ? theme.muted : theme.ink);
    painter.drawText(area, Qt::AlignVCenter | Qt::AlignRight, cell.number);
}

/// Strip at the left, number and word at its right; for cells that are wide enough.
void paint_wide(QPainter& painter, const QRectF& area, const BoardCell& cell, const Theme& theme)
{
    const double strip_width = std::min(0.52 * area.width(), 120.0);
    const double strip_height = std::min(area.height() - 16.0, 56.0);
    const QRectF strip(area.left(), area.center().y() - strip_height / 2.0, strip_width, strip_height);
    paint_strip(painter, strip, cell, theme);
    const QRectF right(strip.right() + 6.0, area.top(), area.right() - strip.right() - 6.0 - 12.0, area.height());
    paint_number(painter, QRectF(right.left(), area.center().y() - 10.0, right.width(), 20.0), cell, theme);
    if (has_mark(cell.level))
        paint_level(painter, QRectF(right.left() - 24.0, area.center().y() + 10.0, right.width() + 24.0, text_line), cell,
                    theme);
    else
        paint_remark(painter, QRectF(strip.left(), area.bottom() - 14.0, area.width(), 12.0), cell.word, theme);
}

/// Number and word under the strip; for eight cylinders and more.
void paint_narrow(QPainter& painter, const QRectF& area, const BoardCell& cell, const Theme& theme)
{
    const double lines = 2.0 * text_line + 2.0;
    const QRectF strip(area.left(), area.top() + 5.0, area.width() - 12.0, area.height() - lines - 8.0);
    paint_strip(painter, strip, cell, theme);
    const QRectF number(strip.left(), strip.bottom() + 2.0, strip.width(), text_line);
    paint_number(painter, number, cell, theme);
    const QRectF below = number.translated(0.0, text_line);
    if (has_mark(cell.level))
        paint_level(painter, below, cell, theme);
    else
        paint_remark(painter, below.adjusted(0, 0, 12, 0), cell.short_word.isEmpty() ? cell.word : cell.short_word, theme);
}

} // namespace

void paint_strip(QPainter& painter, const QRectF& area, const BoardCell& cell, const Theme& theme)
{
    const auto y_of = [&](double value) {
        return area.center().y() - (value - cell.middle) / cell.half * area.height() / 2.0;
    };
    if (cell.usual_low && cell.usual_high) {
        const QRectF band(QPointF(area.left(), y_of(*cell.usual_high)), QPointF(area.right(), y_of(*cell.usual_low)));
        painter.fillRect(band, theme.band_brush());
    }
    const double middle = y_of(cell.middle);
    painter.setPen(theme.pen(theme.rule));
    painter.drawLine(QPointF(area.left(), middle), QPointF(area.right(), middle));
    if (cell.points.empty())
        return;
    QPainterPath path;
    QPointF last;
    for (std::size_t i = 0; i < cell.points.size(); ++i) {
        last = {area.left() + cell.points[i].x() * area.width(), y_of(cell.points[i].y())};
        if (i == 0)
            path.moveTo(last);
        else
            path.lineTo(last);
    }
    painter.save();
    painter.setRenderHint(QPainter::Antialiasing);
    QPen pen = theme.pen(theme.line);
    pen.setWidthF(stands_out(cell.level) ? 1.6 : 1.0);
    painter.setPen(pen);
    painter.setBrush(Qt::NoBrush);
    painter.drawPath(path);
    painter.setPen(pen);
    painter.setBrush(cell.unsteady.back() ? theme.page : theme.line);
    painter.drawEllipse(last, point_radius, point_radius);
    painter.restore();
}

void paint_cell(QPainter& painter, const QRectF& area, const BoardCell& cell, const Theme& theme)
{
    if (!cell.present) {
        painter.setFont(small_type());
        painter.setPen(theme.muted);
        painter.drawText(area.adjusted(0, 0, -12, 0), Qt::AlignVCenter | Qt::AlignLeft,
                         QCoreApplication::translate("evenstroke", "not read"));
        return;
    }
    if (area.width() >= wide_column)
        paint_wide(painter, area, cell, theme);
    else
        paint_narrow(painter, area, cell, theme);
}

void paint_engine_cell(QPainter& painter, const QRectF& area, const BoardCell& cell, const Theme& theme)
{
    painter.setFont(type(TypeSize::label));
    painter.setPen(theme.ink);
    const QRectF title(area.left(), area.top() + 6.0, area.width() - 12.0, text_line);
    painter.drawText(title, Qt::AlignVCenter | Qt::AlignLeft,
                     QFontMetricsF(painter.font()).elidedText(cell.title, Qt::ElideRight, title.width()));
    paint_wide(painter, area.adjusted(0.0, 18.0, 0.0, 0.0), cell, theme);
}

void paint_row_label(QPainter& painter, const QRectF& area, const QString& title, const QString& subtitle,
                     const Theme& theme)
{
    const QRectF inner = area.adjusted(0.0, 8.0, -8.0, 0.0);
    painter.setFont(type(TypeSize::body));
    painter.setPen(theme.ink);
    QRectF used;
    painter.drawText(inner, Qt::AlignLeft | Qt::AlignTop | Qt::TextWordWrap, title, &used);
    painter.setFont(small_type());
    painter.setPen(theme.muted);
    painter.drawText(QRectF(inner.left(), used.bottom() + 2.0, inner.width(), inner.bottom() - used.bottom()),
                     Qt::AlignLeft | Qt::AlignTop | Qt::TextWordWrap, subtitle);
}

void paint_heading(QPainter& painter, const QRectF& area, const BoardHeading& heading, const Theme& theme)
{
    const bool wide = area.width() >= wide_column;
    const QRectF inner = area.adjusted(0.0, 0.0, -12.0, -6.0);
    painter.setFont(type(TypeSize::body, stands_out(heading.level)));
    painter.setPen(theme.ink);
    painter.drawText(wide ? inner : inner.adjusted(0, 0, 0, -13), Qt::AlignBottom | Qt::AlignLeft,
                     wide || QFontMetricsF(painter.font()).horizontalAdvance(heading.title) <= inner.width()
                         ? heading.title
                         : heading.short_title);
    painter.setFont(small_type());
    painter.setPen(theme.muted);
    painter.drawText(inner, Qt::AlignBottom | (wide ? Qt::AlignRight : Qt::AlignLeft), heading.hours);
}

} // namespace evenstroke
