// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/reading.h"

#include <optional>
#include <string>

namespace evenstroke {

/// A value that would be what it should be if it had been read in another of the quantity's units.
struct OtherUnit
{
    std::string suggestion; ///< as it would be typed: "72 mmH2O"; the unit that comes nearest to what is expected
    std::optional<std::string> second; ///< the next one that would do, as "585 °F" beside "585 K"
    std::string sentence;
};

/// Looks for a unit that brings a typed value near what it is compared with: 72 mmH2O written where mbar stand.
///
/// Only units apart by a factor of at least 1.5 can be told from a change of the engine: bar and kgf/cm², or kW
/// and horsepower, cannot. Nothing is said of the ship's values, as wind and sea do change so much.
/// @param own the value as typed, in the quantity's own unit
/// @param reference what is expected, else the last value at the same place, in the quantity's own unit
/// @param reference_words "expected is" or "last time it was"
std::optional<OtherUnit> guess_other_unit(const Value& value, double own, double reference,
                                          const std::string& reference_words);

} // namespace evenstroke
