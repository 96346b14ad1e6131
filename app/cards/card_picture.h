// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/cards/card_run.h"
#include "app/reading/figure.h"

/// What the plot of the page Cards shows, as plain data. Angles true, pressures bar absolute unless said.
namespace evenstroke {

enum class CardView { difference, pressure, dead_centre, volume, logarithms, heat, temperature };
inline constexpr int card_view_count = 7;

struct CardLine
{
    std::vector<double> x, y;
    FigureRole role = FigureRole::in_hand;
    bool dashed = false;
    QString name;     ///< of the value under the cursor; empty: the cursor leaves it out
    int decimals = 1;
};

/// Between two curves over the same x.
struct CardBand
{
    std::vector<double> x, low, high;
};

/// A part of the cycle, named at the top; shaded where it clearly differs.
struct CardPart
{
    double from = 0.0, to = 0.0;
    QString name;
    bool shaded = false;
};

/// The place on the curve that a remark speaks of.
struct CardSpot
{
    double x = 0.0, y = 0.0;
    int number = 0; ///< of the remark, from 1
};

struct CardPicture
{
    CardView view = CardView::difference;
    QString name;            ///< for readers of the screen
    QString x_title, y_title; ///< with the unit once
    QString x_unit;          ///< of the value under the cursor
    int x_decimals = 1;
    bool is_signed = false, logarithmic = false;
    double x_low = 0.0, x_high = 1.0, y_low = 0.0, y_high = 1.0;
    std::vector<CardLine> lines;
    std::optional<CardBand> band;
    std::optional<CardBand> beyond; ///< where a part clearly differs: from the band's edge to the curve
    std::vector<std::shared_ptr<const CycleEnvelope>> others; ///< cycles of the other cylinders
    std::shared_ptr<const CycleEnvelope> cycles;              ///< of the cylinder in hand
    std::vector<CardPart> parts;
    std::vector<CardSpot> spots;
    std::vector<FigureMark> marks;
    QString sentence; ///< what the plot says, under it
    QString empty;    ///< why there is nothing to draw
};

QString card_view_name(CardView view); ///< "difference", as its button says
CardPicture make_card_picture(const CardsInHand& cards, int cylinder, CardView view);
/// The curves of a card at every degree: angle, pressure, healthy, difference, ±, heat, temperature where known.
FigureTable card_table(const CardsInHand& cards, int cylinder);

} // namespace evenstroke
