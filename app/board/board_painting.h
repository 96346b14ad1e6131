// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/board/board.h"
#include "app/desk/theme.h"

class QPainter;

/// How the board looks, on the screen and on paper alike.
namespace evenstroke {

/// From this column width on the number stands beside its strip, below it stands under it.
inline constexpr int wide_column = 116;
inline constexpr int label_column = 180;

/// The band, the line and its last point.
void paint_strip(QPainter& painter, const QRectF& area, const BoardCell& cell, const Theme& theme);
/// One cell: strip, number, mark and word.
void paint_cell(QPainter& painter, const QRectF& area, const BoardCell& cell, const Theme& theme);
/// One cell of the engine's block, with its title.
void paint_engine_cell(QPainter& painter, const QRectF& area, const BoardCell& cell, const Theme& theme);
void paint_row_label(QPainter& painter, const QRectF& area, const QString& title, const QString& subtitle,
                     const Theme& theme);
void paint_heading(QPainter& painter, const QRectF& area, const BoardHeading& heading, const Theme& theme);

/// The whole board on one page of paper.
void paint_board_page(QPainter& painter, const QRectF& page, const Board& board, const QString& sentence);

} // namespace evenstroke
