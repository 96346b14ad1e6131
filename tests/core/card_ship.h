// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/card_review.h"
#include "tests/core/card_simulator.h"

#include <map>

/// An engine whose cylinders differ for good, with readings and cards of all cylinders whose truth is known.
///
/// Assumed, beside card_simulator.h: cylinders differ lastingly in fuel (1.5 %), compression ratio (0.5 %), timing
/// (0.4°) and wall loss (10 %), which gives about the lasting spread of mean indicated, maximum and compression
/// pressure that the drift method reckons with (1.5 %, 1.5 bar, 1.0 bar); from reading to reading in fuel (0.7 %),
/// timing (0.15°) and charge (0.3 %); the pickup's offset by 0.03° from cylinder to cylinder and 0.02° from month to
/// month; load, fuel and scavenge pressure are read to 1, 1 and 0.5 %. One standard deviation each; invented.
namespace evenstroke::indicator {

struct ShipCase
{
    bool two_stroke = true;
    int cylinders = 6;
    std::vector<double> loads;         ///< true, per cent, one a reading; the last is the reading in hand
    std::size_t called_healthy = 0;    ///< how many of the first readings somebody called healthy
    double noise = 0.3, step = 0.5;
    int cycles = 20;
    double ratio_error = 0.0, wall_multiplier = 1.0; ///< of all cylinders
    double drift = 0.0, gain = 1.0, shift_per_month = 0.0;
    bool hohenberg = false;
    double month_scatter = 1.0;        ///< times the changes from reading to reading
};
/// Loads from 50 to 95 %, ratio within 3 %, drift within 0.3 bar, noise 0.05 to 0.5 bar.
ShipCase any_ship(bool two_stroke, Dice& dice);

/// Changes the cylinder of the reading in hand before it is simulated. @param cylinder from 1
using CardFault = std::function<void(SimulatedCase&, int cylinder)>;

struct SimulatedShip
{
    Judgement judgement;
    CardShelf shelf;
    std::map<CardPlace, SimulatedCase> cases;
    std::map<CardPlace, Truth> truths;
    std::map<int, SimulatedCase> sound; ///< the reading in hand by cylinder, before the fault
    std::shared_ptr<std::map<CardPlace, RecordedCard>> cards; ///< what the shelf hands out

    std::size_t in_hand() const { return judgement.readings.size() - 1; }
};
SimulatedShip simulate_ship(const ShipCase& what, Dice& dice, const CardFault& fault = {});

/// What a perfect indicator would have shown: one cycle.
SimulatedCard without_indicator(SimulatedCase what);

} // namespace evenstroke::indicator
