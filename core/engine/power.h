// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/problem.h"
#include "core/units/quantity_types.h"

#include <optional>

/// Power at the piston and at the shaft. An input that was not read is an empty optional; the Problem names it.
/// Problems everywhere: not_found: an input is missing. invalid_input: one cannot be.
namespace evenstroke {

/// Swept volume of one cylinder: π/4 D² S.
Result<Volume> swept_volume(std::optional<Length> bore, std::optional<Length> stroke);

/// Power of the gas on one piston: P_i = p_i V_s n, half of it for a four-stroke engine.
///
/// The top side only: a crosshead engine has no piston rod there to take off. A negative mean pressure (a
/// cylinder that is dragged along) gives a negative power.
/// @param mean_indicated_pressure net, over the whole working cycle @param swept of this cylinder
/// @par Source definition of the mean indicated pressure; any textbook
Result<Power> indicated_power(EngineKind kind, std::optional<PressureDifference> mean_indicated_pressure,
                              std::optional<Volume> swept, std::optional<Frequency> speed);

/// The pressure that would give the shaft's work over one stroke: p_e = P_e / (z V_s n), twice that for a
/// four-stroke engine. @param swept of one cylinder @par Source definition
Result<PressureDifference> mean_effective_pressure(EngineKind kind, std::optional<Power> shaft,
                                                   std::optional<Volume> swept, int cylinders,
                                                   std::optional<Frequency> speed);

/// Friction of a large two-stroke engine as a mean pressure: about 1 bar (common practice, no source).
PressureDifference usual_friction_pressure();

/// Shaft power where nothing measures torque: (p_i - p_f) in place of p_i. To be shown as estimated.
/// @param indicated of all cylinders @param friction mean pressure lost, taken as the same at every load
/// @par Source common practice @par Validity two-stroke engines; the power must stay above zero
Result<Power> shaft_power_from_indicated(EngineKind kind, std::optional<Power> indicated, std::optional<Volume> swept,
                                         int cylinders, std::optional<Frequency> speed,
                                         PressureDifference friction = usual_friction_pressure());

/// How far two powers, each with its uncertainty, may be on the wrong side of one another: above this a
/// mechanical efficiency is not known (common practice, no source: two powers of 3 % each, twice over).
inline constexpr double largest_mechanical_efficiency = 1.1;

/// η_m = P_e / P_i. A result a little above 1 is what uncertain powers give and is handed back as it is.
/// @param indicated of all cylinders
/// @par Validity up to `largest_mechanical_efficiency`
Result<Ratio> mechanical_efficiency(std::optional<Power> shaft, std::optional<Power> indicated);

/// M = P / (2π n), and back. @par Source definition
Result<Torque> shaft_torque(std::optional<Power> shaft, std::optional<Frequency> speed);
Result<Power> shaft_power_from_torque(std::optional<Torque> torque, std::optional<Frequency> speed);

} // namespace evenstroke
