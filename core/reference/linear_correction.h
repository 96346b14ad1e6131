// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/problem.h"
#include "core/reference/applied_correction.h"

#include <optional>

/// Linear correction of measured values to the engine's reference air and coolant:
///
///     factor = 1 + a ΔT + b ΔTc          (the two effects are added, not multiplied)
///     pressures     p_corr = (p_gauge + p_barometer) factor - p_barometer
///     temperatures  T_corr = T factor, in kelvin
///
/// ΔT = inlet air minus reference, ΔTc = charge-air coolant inlet minus reference, a and b the engine's own
/// coefficients with the source the user gave. Form as in engine makers' published curves (common practice,
/// no single source). The program has no coefficients of its own: without a set, nothing is corrected.
/// Validity: |ΔT| <= 25 K and |ΔTc| <= 15 K (common practice); beyond, the result is marked extrapolated.
namespace evenstroke {

inline constexpr double linear_inlet_air_range = 25.0; ///< K, common practice
inline constexpr double linear_coolant_range = 15.0;   ///< K, common practice

struct LinearFactor
{
    double factor = 1.0;
    bool extrapolated = false; ///< a difference that counts lies outside its range
};

/// The factor in plain numbers, for inner loops: coefficients in 1/K, differences in K.
constexpr LinearFactor linear_factor(double per_inlet_air, double per_coolant, double inlet_air_difference,
                                     double coolant_difference)
{
    const auto beyond = [](double coefficient, double difference, double range) {
        return coefficient != 0.0 && (difference > range || difference < -range);
    };
    return {1.0 + per_inlet_air * inlet_air_difference + per_coolant * coolant_difference,
            beyond(per_inlet_air, inlet_air_difference, linear_inlet_air_range) ||
                beyond(per_coolant, coolant_difference, linear_coolant_range)};
}

/// How far the air and the coolant of a reading were from the engine's reference; empty where not read.
struct AmbientDifference
{
    std::optional<TemperatureDifference> inlet_air, coolant;
};

AmbientDifference ambient_difference(std::optional<Temperature> inlet_air, std::optional<Temperature> coolant,
                                     const ReferenceConditions& reference);

/// Corrects one measured value.
/// @param barometer that of the reading; 1 bar is the custom where none was entered
/// @par Problems not_found: a difference whose coefficient is not zero was not read.
///      invalid_input: a number that is not finite, a value not above absolute zero, a factor not above zero
Result<Corrected<GaugePressure>> correct_linearly(GaugePressure measured, AbsolutePressure barometer,
                                                  const AmbientDifference& difference,
                                                  const CorrectionCoefficients& coefficients);
Result<Corrected<AbsolutePressure>> correct_linearly(AbsolutePressure measured,
                                                     const AmbientDifference& difference,
                                                     const CorrectionCoefficients& coefficients);
Result<Corrected<Temperature>> correct_linearly(Temperature measured, const AmbientDifference& difference,
                                                const CorrectionCoefficients& coefficients);
/// Only where the user gave coefficients for consumption, and then never together with ISO 3046-1.
Result<Corrected<SpecificConsumption>> correct_linearly(SpecificConsumption measured,
                                                        const AmbientDifference& difference,
                                                        const CorrectionCoefficients& coefficients);

/// Turbocharger speed at the reference inlet temperature: n sqrt(T_ref / T).
///
/// Similarity of turbomachines (equal Mach number); common practice. The pressure ratio is taken as the same.
/// Marked extrapolated beyond |T - T_ref| of 25 K, where the load point of the engine itself has moved
/// (common practice, the range of the linear form).
/// @par Problems invalid_input: speed negative, a temperature not above absolute zero, not finite
Result<Corrected<Frequency>> correct_turbocharger_speed(Frequency measured, Temperature inlet_air,
                                                        Temperature reference_inlet_air);

} // namespace evenstroke
