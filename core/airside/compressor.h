// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/units/quantity_types.h"

#include <optional>

/// The turbocharger's compressor. Static pressures stand for total ones, which nobody measures on board: the
/// efficiency then lies one or two points off and is for the trend only.
/// Problems everywhere: not_found: an input is missing (named). invalid_input: one cannot be.
namespace evenstroke {

/// (κ - 1)/κ of air as the trade rounds it; κ = 1.4 exactly gives 0.285714 and an efficiency one thousandth
/// lower (common practice).
inline constexpr double usual_air_exponent = 0.286;

/// Π = p2 / p1. @param inlet behind the suction filter @param outlet before the charge-air cooler
Result<Ratio> compressor_pressure_ratio(std::optional<AbsolutePressure> inlet, std::optional<AbsolutePressure> outlet);

/// Ideal over real rise of temperature: η_C = T1 (Π^κ' - 1) / (T2 - T1).
/// @param exponent κ', one for an engine's whole life @par Source any textbook; isentropic, perfect gas
/// @par Validity Π above 1 (below, the turbocharger does not work as one), T2 above T1, a result of at most 1:
///      above, one of the readings is wrong
Result<Ratio> compressor_efficiency(std::optional<Temperature> inlet, std::optional<Temperature> outlet,
                                    std::optional<Ratio> pressure_ratio, double exponent = usual_air_exponent);

} // namespace evenstroke
