// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/reading/figure.h"
#include "core/review/power_agreement.h"
#include "core/trend/judgement.h"
#include "storage/card_store.h"

#include <map>
#include <optional>

/// What stands beside the judged reading. Each function asks the core for its numbers and lays them out; nothing is
/// worked out here but axes and words.
namespace evenstroke {

/// All estimates side by side with their half-widths, the weighted mean, the typed load.
SideView power_view(const PowerAgreement& power, const Engine& engine);

/// This engine's limits, all readings over the years, the one in hand with its nearest limit.
/// @param reading index in the judgement's readings
SideView load_view(const Judgement& judgement, std::size_t reading);

/// What is tried on the wall; empty: as the reading has it, and no such layer.
struct WallTrial
{
    std::optional<double> coolant;                            ///< °C
    std::optional<double> deposit, scale;                     ///< mm
    std::optional<double> deposit_conductivity, scale_conductivity; ///< W/(m K)
    bool as_iron = false; ///< against the equivalent thickness of iron, where the line is straight
};
/// Conductivities where none is typed, W/(m K): common practice, no source.
inline constexpr double usual_deposit_conductivity = 0.2, usual_scale_conductivity = 1.5;
using Cards = std::map<int, storage::CardTrace>; ///< by cylinder

/// A cylinder's card of this reading, and its earliest at nearly this load, which is taken as the healthy one.
struct CardPair
{
    int cylinder = 0;
    storage::CardTrace now, healthy;
    std::size_t healthy_reading = 0;
};
/// Temperatures from the gas to the coolant: as described and now. Relative to the description only; the gas side moves
/// with the cards where there are two.
/// @param wall index in Engine::walls
SideView wall_view(const Judgement& judgement, std::size_t reading, std::size_t wall, const WallTrial& trial,
                   const std::optional<CardPair>& cards = {});

/// Forces of one cylinder over its crank angle, and the turning moment summed over the firing order.
SideView crank_view(const Judgement& judgement, std::size_t reading, const Cards& cards, int cylinder);

} // namespace evenstroke
