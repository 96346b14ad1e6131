// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/derived/derived_inputs.h"

#include <span>
#include <string_view>

/// The formulas that go with the lines of derived_quantities.csv, by subject.
namespace evenstroke {

/// @param place one of those at which the quantity stands
using DerivedValueOf = Number (*)(DerivedInputs&, Place place);

struct DerivedFormula
{
    /// All five are given: g++ 12 writes default values in a constant array as zeros.
    constexpr DerivedFormula(std::string_view of_name, DerivedValueOf of_value, DerivedValueOf at_reference = nullptr,
                             DerivedValueOf of_trend = nullptr, bool of_corrected = false)
        : name(of_name), value(of_value), corrected(at_reference), compared(of_trend), uncertainty_of_corrected(of_corrected)
    {
    }

    std::string_view name;
    DerivedValueOf value;
    DerivedValueOf corrected; ///< at reference conditions; null: nothing is corrected, the value itself is compared
    DerivedValueOf compared;  ///< what a trend follows where `corrected` knows nothing; null: nothing
    bool uncertainty_of_corrected; ///< the half-width is that of the corrected number where there is one
};

std::span<const DerivedFormula> power_formulas();
std::span<const DerivedFormula> fuel_formulas();
std::span<const DerivedFormula> turbocharger_formulas();
std::span<const DerivedFormula> cooler_formulas();
std::span<const DerivedFormula> reference_flow_formulas();
std::span<const DerivedFormula> charge_air_formulas();
std::span<const DerivedFormula> cylinder_formulas();
std::span<const DerivedFormula> ship_formulas();

/// What the ambient of the reading makes of the specific consumption at reference, by the correction that the engine
/// has for it: 1 where it has none, nothing where a condition for it was not read.
Number consumption_ambient_factor(DerivedInputs& of);
/// kW as read, or torque times speed.
Number shaft_kilowatts(DerivedInputs& of);
/// Sum over all cylinders; nothing where one is missing.
Number indicated_kilowatts(DerivedInputs& of);
/// Whether a propeller of fixed pitch hangs at the shaft without a gear; if not, the reason is kept.
bool drives_fixed_propeller(DerivedInputs& of);

/// A value of the engine: the mean over those of its turbochargers (coolers) whose inputs were read.
/// Nothing where one of them cannot be.
template <typename Part> Number mean_over(DerivedInputs& of, Place::Kind kind, Place place, const Part& part)
{
    if (place.kind == kind)
        return part(of, place);
    double sum = 0.0;
    int count = 0;
    for (const Place& each : of.of().places(kind)) {
        const Number value = part(of, each);
        if (of.stopped())
            return std::nullopt;
        if (!value)
            continue;
        sum += *value;
        ++count;
    }
    return count == 0 ? std::nullopt : std::optional(sum / count);
}

} // namespace evenstroke
