// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>
#include <QStringList>

#include <optional>
#include <vector>

/// What a plot beside the judged reading shows, as plain data: presenters fill it from the core's numbers, FigurePlot
/// draws it in any theme, and its table says the same to readers of the screen.
namespace evenstroke {

enum class FigureRole {
    in_hand, ///< what is looked at: the line colour
    other,   ///< what it is compared with: muted
    limit,   ///< a mark that is not to be passed
    guide,   ///< a line that only helps the eye
};

struct FigureCurve
{
    std::vector<double> x, y;
    FigureRole role = FigureRole::other;
    QString label;            ///< written at its end; empty: none
    bool label_at_start = false;
    bool dashed = false;
};

struct FigureDot
{
    double x = 0.0, y = 0.0;
    FigureRole role = FigureRole::in_hand;
    std::optional<double> x_half; ///< ± bar
    QString label;                ///< beside it
    bool hollow = false;          ///< does not count
    double age = 0.0;             ///< 0 newest to 1 oldest: older dots are paler
    std::optional<std::size_t> reading; ///< that it leads to
};

/// A straight line over the whole plot with its words.
struct FigureMark
{
    double at = 0.0;
    bool upright = false; ///< at an x, else at a y
    FigureRole role = FigureRole::guide;
    QString label;
};

/// A part of the width with its name over it, such as a layer of a wall.
struct FigureLayer
{
    double from = 0.0, to = 0.0;
    QString name;
    bool shaded = false;
};

struct FigureTick
{
    double at = 0.0;
    QString words;
};

struct Figure
{
    QString name;             ///< for readers of the screen: "Load diagram"
    QString x_title, y_title; ///< with the unit once
    double x_low = 0.0, x_high = 1.0, y_low = 0.0, y_high = 1.0;
    std::vector<FigureTick> x_ticks, y_ticks; ///< words in place of numbers; empty: round numbers
    bool x_numbers = true;
    bool y_grid = true;
    double x_step = 0.0; ///< between ticks; 0: round numbers
    std::vector<FigureCurve> curves;
    std::vector<FigureDot> dots;
    std::vector<FigureMark> marks;
    std::vector<FigureLayer> layers;
    int lines_high = 0; ///< wished-for height in rows of 28 px; 0: what is left
};

/// The figure's numbers as a table.
struct FigureTable
{
    QStringList heading;
    std::vector<QStringList> rows;
    QString as_text() const; ///< tab-separated
};

/// All that a side view of the page One reading shows.
struct SideView
{
    QString sentence, second_sentence; ///< over the figures; under them, muted
    std::vector<Figure> figures;       ///< at most two, one below the other
    FigureTable table;
    QString empty; ///< what belongs there and how to begin; then there is no figure
};

} // namespace evenstroke
