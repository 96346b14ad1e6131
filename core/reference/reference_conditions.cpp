// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reference/reference_conditions.h"

#include <algorithm>

namespace evenstroke {
namespace {

// ISO 3046-1 writes 298 K (24.85 °C) and uses it in its own formulae; readings are corrected to 25 °C. The
// 0.15 K change its k by 0.06 %.
constexpr ReferenceSet reference_sets[] = {
    {"standard", "Standard reference", 25.0, 25.0, 1.0, 0.30, "ISO 3046-1 (from memory)"},
    {"tropical", "Tropical, sea-water cooled air cooler", 45.0, 32.0, 1.0, 0.60, "IACS UR M28 (from memory)"},
    {"tropical_fresh_water", "Tropical, fresh-water cooled air cooler", 45.0, 36.0, 1.0, 0.60,
     "IACS UR M28 (from memory); 36 °C coolant is common practice"},
};

} // namespace

ReferenceConditions ReferenceSet::conditions() const
{
    return {celsius(inlet_air_celsius), celsius(cooler_coolant_celsius), bar_absolute(barometer_bar),
            std::string(source), relative_humidity};
}

std::span<const ReferenceSet> all_reference_sets()
{
    return reference_sets;
}

const ReferenceSet* find_reference_set(std::string_view name)
{
    const auto* const found = std::find_if(std::begin(reference_sets), std::end(reference_sets),
                                           [&](const ReferenceSet& set) { return set.name == name; });
    return found == std::end(reference_sets) ? nullptr : found;
}

} // namespace evenstroke
