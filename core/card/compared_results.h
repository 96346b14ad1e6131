// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/comparison.h"
#include "core/card/difference_balance.h"

/// The results of a card against those of the healthy ones.
namespace evenstroke::indicator {

/// What combustion adds goes with the load to this power: from 2/3 on the propeller law to 1 at constant speed (algebra of
/// both; between them common practice).
inline constexpr double combustion_over_load = 0.83;

/// How well load and charge pressure are known, relative, one standard deviation.
struct LoadsAndCharges
{
    double load_spread = 0.0;   ///< of what combustion adds
    double charge_spread = 0.0; ///< of the unfired line
    double between = 0.0;       ///< of the difference of two healthy cards: what the straight line between them leaves
    double load_away = 0.0;     ///< per cent between this load and that of a single healthy card
};
LoadsAndCharges weigh_loads(const Comparison& comparison, double load_percent);

/// Whether the card is whole enough, and its peak where a cylinder fires.
bool can_be_compared(const Evaluation& card);

/// Fills the healthy results, the differences and what of their half-widths all cylinders share.
/// @param members the card in hand first
void compare_results(Comparison& comparison, const std::vector<DifferenceMember>& members, const LoadsAndCharges& known);

} // namespace evenstroke::indicator
