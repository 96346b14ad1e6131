// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/reading.h"

#include <optional>
#include <span>
#include <string>
#include <vector>

namespace evenstroke {

struct Engine;

/// Whether the engine had settled: judged from the quick lines before and after the walk.
enum class Steadiness { not_judged, steady, usable_with_care, unsteady };
std::string steadiness_word(Steadiness steadiness); ///< "usable with care"

struct SteadinessVerdict
{
    Steadiness verdict = Steadiness::not_judged;
    std::string sentence; ///< which criterion decided, with both values; what is missing where not judged
};

/// What one criterion says of one reading.
struct SteadinessFinding
{
    QuantityId quantity = 0;
    Steadiness verdict = Steadiness::not_judged;
    double severity = 0.0;               ///< share of the limit that is used up; above 1 it is passed
    bool from_pair = false;              ///< the quantity stands in both quick lines
    std::optional<double> before, after; ///< of a pair of numbers, in the quantity's own unit
    std::optional<double> amount;        ///< what is compared with the limit
    std::string unit;                    ///< of the amount: "%", "°C", "min"
    std::string words;                   ///< the numbers and the limits, begins in lower case
};
/// All criteria whose values are there, in walking order.
std::vector<SteadinessFinding> steadiness_findings(const Reading& reading, bool generating_set);

/// Whether the engine drives a generator on the ship's grid: a four-stroke engine whose electrical power was read.
bool is_generating_set(const Engine& engine, std::span<const Reading> readings);

/// Compares the values of phase `before` and `after` with the criteria of common practice (speed, power or
/// fuel index, turbocharger speed, scavenge pressure, mean exhaust temperature, jacket water, scavenge
/// temperature, settled minutes, sea). A criterion whose values are not there is left out; with no pair of
/// values at all the verdict is not_judged.
/// @param generating_set true for sets on the ship's grid, whose load may move more
SteadinessVerdict judge_steadiness(const Reading& reading, bool generating_set);

} // namespace evenstroke
