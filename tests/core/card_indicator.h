// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "tests/core/card_simulator.h"

namespace evenstroke::indicator {

/// One true cycle in tenths of a degree from closing on.
struct FineCycle
{
    std::vector<double> angle, pressure, kelvin; // degrees, bar, K (0 where the cylinder is open)
    double mass = 0.0;                           // kg of charge
};

/// What the indicator makes of it.
Trace record(const SimulatedCase& what, const FineCycle& fired, const FineCycle& unfired, Dice& dice);

/// The engine as its page would hold it.
Engine as_entered(const SimulatedEngine& engine);

} // namespace evenstroke::indicator
