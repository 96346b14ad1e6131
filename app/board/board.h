// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/selection.h"
#include "core/trend/judgement.h"

#include <QPointF>
#include <QString>

#include <optional>
#include <vector>

/// What the strip board shows, as plain data: chosen and put into words, but not drawn.
namespace evenstroke {

/// One strip with its newest number.
struct BoardCell
{
    bool present = false; ///< false: nothing was ever read there
    QuantityId quantity = 0;
    Place place;
    QString title;         ///< only in the engine's block: "Scavenge pressure, bar"
    std::vector<QPointF> points; ///< x: 0 oldest to 1 newest of the board's range, y: value
    std::vector<char> unsteady;  ///< one a point
    std::optional<double> usual_low, usual_high;
    double middle = 0.0, half = 1.0; ///< what the strip shows from bottom to top: middle - half to middle + half
    QString number;        ///< newest value, signed where it is a difference
    Level level = Level::no_data;
    QString word;          ///< "watch", "learning, 4 of 8", "14 Jan 2031" where it is an older value; empty when quiet
    QString short_word;    ///< the same for narrow columns, where it differs
    bool old_value = false;///< not read at the newest reading
    QString spoken;        ///< the whole cell in words, for screen readers and tool tips
};

struct BoardRow
{
    QString title;    ///< "Compression pressure"
    QString subtitle; ///< "apart from the others, bar"
    std::vector<BoardCell> cells; ///< one a cylinder
};

struct BoardHeading
{
    QString title, short_title; ///< "Cylinder 4", "4"
    QString hours;              ///< "9 880 h"
    Level level = Level::quiet;
};

struct Board
{
    std::vector<BoardHeading> cylinders;
    std::vector<BoardRow> rows;
    std::vector<BoardCell> engine; ///< turbochargers, coolers and the engine itself
    // The line above it all.
    QString headline, second_line;
    Level level = Level::no_data;
    QString level_words; ///< "watch since 12 Nov 2030"
    std::optional<QuantityId> worst_quantity;
    Place worst_place;
    QString last_reading; ///< "last reading 14 Mar 2031, steady, 76 % load"
};

/// @param range  how far back the strips go; "since the last overhaul" is each place's own
Board make_board(const Judgement& judgement, TimeRange range);

/// "last reading 14 Mar 2031, steady, 76 % load"; empty without readings.
QString last_reading_text(const Judgement& judgement);

} // namespace evenstroke
