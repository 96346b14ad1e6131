// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"

#include <span>
#include <string_view>

/// Sets of reference conditions to choose from when an engine is described. The chosen numbers are stored
/// with the engine and its baseline and printed wherever a corrected value stands; nothing looks them up here
/// later.
namespace evenstroke {

struct ReferenceSet
{
    std::string_view name;  ///< "standard", "tropical"
    std::string_view title; ///< on screen
    double inlet_air_celsius, cooler_coolant_celsius, barometer_bar;
    double relative_humidity; ///< 0 to 1
    std::string_view source;

    ReferenceConditions conditions() const;
};

std::span<const ReferenceSet> all_reference_sets();
/// Null where there is no set of this name.
const ReferenceSet* find_reference_set(std::string_view name);

} // namespace evenstroke
