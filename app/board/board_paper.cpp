// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/board/board_painting.h"

#include <QCoreApplication>
#include <QPainter>

#include <algorithm>

namespace evenstroke {

namespace {

constexpr double heading_height = 40.0, lowest_row = 52.0, highest_row = 84.0, engine_row = 74.0, label_width = 160.0;
constexpr double engine_cell_width = 150.0;

/// Draws text in the width of the page and answers where it ends.
double paint_text(QPainter& painter, const QRectF& page, double top, const QString& text, TypeSize size, bool muted)
{
    if (text.isEmpty())
        return top;
    const Theme& t = theme_of(ThemeKind::print);
    painter.setFont(type(size));
    painter.setPen(muted ? t.muted : t.ink);
    QRectF used;
    painter.drawText(QRectF(page.left(), top, page.width(), page.height()), Qt::TextWordWrap | Qt::AlignLeft, text, &used);
    return used.bottom() + 4.0;
}

void paint_rule(QPainter& painter, const QRectF& page, double y)
{
    painter.setPen(theme_of(ThemeKind::print).pen(theme_of(ThemeKind::print).rule));
    painter.drawLine(QPointF(page.left(), y), QPointF(page.right(), y));
}

double paint_rows(QPainter& painter, const QRectF& page, double top, const Board& board, double row_height)
{
    const Theme& t = theme_of(ThemeKind::print);
    const double width = (page.width() - label_width) / static_cast<double>(board.cylinders.size());
    for (std::size_t i = 0; i < board.cylinders.size(); ++i)
        paint_heading(painter, QRectF(page.left() + label_width + width * static_cast<double>(i), top, width, heading_height),
                      board.cylinders[i], t);
    top += heading_height;
    paint_rule(painter, page, top);
    for (const BoardRow& row : board.rows) {
        paint_row_label(painter, QRectF(page.left(), top, label_width, row_height), row.title, row.subtitle, t);
        for (std::size_t i = 0; i < row.cells.size(); ++i)
            paint_cell(painter, QRectF(page.left() + label_width + width * static_cast<double>(i), top, width, row_height),
                       row.cells[i], t);
        top += row_height;
        paint_rule(painter, page, top);
    }
    return top;
}

void paint_engine_block(QPainter& painter, const QRectF& page, double top, const Board& board)
{
    const auto in_row = std::max<std::size_t>(1, static_cast<std::size_t>((page.width() - label_width) / engine_cell_width));
    const double width = (page.width() - label_width) / static_cast<double>(in_row);
    const Theme& t = theme_of(ThemeKind::print);
    paint_row_label(painter, QRectF(page.left(), top, label_width, engine_row),
                    QCoreApplication::translate("evenstroke", "The engine"), {}, t);
    for (std::size_t i = 0; i < board.engine.size(); ++i)
        paint_engine_cell(painter,
                          QRectF(page.left() + label_width + width * static_cast<double>(i % in_row),
                                 top + engine_row * static_cast<double>(i / in_row), width, engine_row),
                          board.engine[i], t);
}

} // namespace

void paint_board_page(QPainter& painter, const QRectF& page, const Board& board, const QString& sentence)
{
    if (board.cylinders.empty())
        return;
    double top = paint_text(painter, page, page.top(), sentence, TypeSize::title, false);
    const QString headline =
        board.level_words.isEmpty() ? board.headline : QStringLiteral("%1: %2").arg(board.level_words, board.headline);
    top = paint_text(painter, page, top, headline, TypeSize::body, false);
    top = paint_text(painter, page, top, board.second_line, TypeSize::label, true);
    top = paint_text(painter, page, top, board.last_reading, TypeSize::label, true);

    const auto in_row = std::max<std::size_t>(1, static_cast<std::size_t>((page.width() - label_width) / engine_cell_width));
    const double engine_height = engine_row * static_cast<double>((board.engine.size() + in_row - 1) / in_row);
    const double rows = std::max(1.0, static_cast<double>(board.rows.size()));
    const double room = page.bottom() - top - heading_height - engine_height;
    const double row_height = std::clamp(room / rows, lowest_row, highest_row);
    const double needed = heading_height + rows * row_height + engine_height;
    const double shrink = std::min(1.0, (page.bottom() - top) / needed); // very many rows still fit one sheet
    painter.save();
    painter.translate(page.left(), top);
    painter.scale(shrink, shrink);
    const QRectF sheet(0.0, 0.0, page.width() / shrink, needed);
    const double end = paint_rows(painter, sheet, 0.0, board, row_height);
    paint_engine_block(painter, sheet, end, board);
    painter.restore();
}

} // namespace evenstroke
