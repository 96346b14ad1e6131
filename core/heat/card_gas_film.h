// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/slider_crank.h"
#include "core/heat/gas_film.h"

#include <optional>
#include <span>

/// The mean gas film and gas temperature from a card: what a wall chain takes when there is one.
///
/// Only the part of the cycle with the cylinder closed can be worked out: there the mass is known, so that
///     T = T_1 p V / (p_1 V_1)
/// by the ideal gas with an unchanged gas constant (the fuel's mass and dissociation left out: 2 to 3 % too
/// hot after combustion, from memory). The mean is over this part, and its angle is given with it. For ratios
/// to a baseline that is made the same way.
namespace evenstroke {

/// The closed part of the cycle. Angles after firing dead centre; what is empty has not been entered.
struct ClosedPart
{
    std::optional<PlaneAngle> closes; ///< below 0
    std::optional<PlaneAngle> opens;  ///< above 0
    std::optional<Temperature>
        temperature_at_closing; ///< T_1, near the scavenge temperature plus what it picks up
    /// Woschni only: where his combustion term begins. Firing dead centre as default: what burns before adds
    /// little to the mean (common practice).
    PlaneAngle combustion_starts{};
    /// Woschni only: exponent of the pressure without combustion, p_1 (V_1/V)^n.
    double motored_exponent = 1.35; ///< common practice for large diesel engines, no source
};

/// @param angle [rad], rising, from closing to opening or beyond  @param pressure absolute [Pa]
/// @param compression_ratio geometric  @param speed of the engine
/// @par Problems not_found: closing, opening or its temperature not entered, the card does not reach from
///      closing to opening, a state outside the film's validity; invalid_input: closing and opening not on
///      their sides of dead centre within 180°, exponent outside 1.2 to 1.45, the first unusable sample, and
///      as SliderCrank says of ratio and speed
Result<MeanGasFilm> card_gas_film(GasFilm formula, const SliderCrank& gear, double compression_ratio,
                                  Frequency speed, std::span<const double> angle,
                                  std::span<const double> pressure, const ClosedPart& part);

} // namespace evenstroke
