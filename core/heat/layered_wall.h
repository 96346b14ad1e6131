// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/units/heat_types.h"

#include <optional>
#include <vector>

/// Steady conduction through layers, one-dimensional, with a film on either side where there is one.
///
///     plane      q = (T_1 - T_2) / (1/h_1 + Σ δ/λ + 1/h_2)                                    W/m²
///     cylinder   Q/L = 2π (T_1 - T_2) / (1/(r_1 h_1) + Σ ln(r_k+1/r_k)/λ_k + 1/(r_n h_2))     W/m
///
/// Source: Fourier's and Newton's laws; any textbook, such as Incropera and DeWitt, Fundamentals of Heat and
/// Mass Transfer, chapter 3. Conductivities do not change with temperature; layers touch without a gap; heat
/// along the wall and heat made in it are left out. Either side may be the hot one.
namespace evenstroke {

/// A side of the wall. Without a film the temperature is that of the surface itself.
struct WallSide
{
    std::optional<Temperature> temperature; ///< of the fluid, or of the surface where there is no film
    std::optional<HeatTransferCoefficient> film;
};

struct PlaneLayer
{
    Length thickness{};
    ThermalConductivity conductivity{};
};

/// A layer of a cylinder reaches from the radius before it to this one.
struct CylinderLayer
{
    Length outer_radius{};
    ThermalConductivity conductivity{};
};

template <typename Flow> struct Conduction
{
    Flow heat{};                       ///< positive from the first side to the last
    std::vector<Temperature> surfaces; ///< of the wall, first side first: one more than there are layers
};

/// @param layers one or more, each of positive thickness, conductivity above 0
/// @par Problems not_found: the temperature of a side is missing; invalid_input: no layer, a size,
///      conductivity or film that is not above 0, a temperature not above absolute zero (each named)
Result<Conduction<HeatFlux>> conduct_plane(const WallSide& first, const std::vector<PlaneLayer>& layers,
                                           const WallSide& last);

/// @param inner_radius above 0  @param layers from the inside outwards, radii rising
/// @par Problems as conduct_plane
Result<Conduction<HeatFlowPerLength>> conduct_cylinder(const WallSide& inner, Length inner_radius,
                                                       const std::vector<CylinderLayer>& layers,
                                                       const WallSide& outer);

} // namespace evenstroke
