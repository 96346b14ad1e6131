// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/heat/coolant_film.h"
#include "core/problem.h"
#include "core/units/heat_types.h"

#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// Temperature from the gas through deposit, wall and scale to the coolant, at one height of the liner or one
/// spot of the cover.
///
///     q = (T_g - T_w) / (1/h_g + δ_deposit/λ + δ/λ + δ_scale/λ + 1/h_c)
///
/// Steady, one-dimensional, plane (a liner's curve makes a few per cent), gas as cycle means. Meant for
/// ratios to the engine's own baseline: the gas film alone is uncertain by a factor of 1.7 (gas_film.h).
/// Where the coolant's pressure is known, heat leaves the wetted surface by convection or by boiling (Jens
/// and Lottes), whichever takes more: the surface can then hardly be hotter than saturation by 20 K.
namespace evenstroke {

/// Grey cast iron, 45 W/(m K): common practice; open tables of properties have 46.
inline ThermalConductivity cast_iron()
{
    return conductivity(45.0);
}

struct WallSlab
{
    Length thickness{};
    ThermalConductivity conductivity{};
};

/// What the chain is made of; what is empty has not been entered.
struct WallChain
{
    std::optional<Temperature> gas;                  ///< film-weighted mean over the cycle
    std::optional<HeatTransferCoefficient> gas_film; ///< mean over the cycle
    std::optional<WallSlab> deposit;                 ///< on the gas side
    std::optional<WallSlab> wall;
    std::optional<WallSlab> scale;                       ///< on the coolant side
    std::optional<HeatTransferCoefficient> coolant_film; ///< by convection alone
    std::optional<Temperature> coolant;
    std::optional<AbsolutePressure> coolant_pressure; ///< water; empty: boiling is not known
};

/// All that is said about boiling, and no more than this.
enum class BoilingStatement { not_expected, possible, blanketing_not_excluded };
/// "no boiling expected", "local boiling possible", "vapour blanketing cannot be excluded".
std::string_view boiling_text(BoilingStatement statement);

struct WallTemperatures
{
    HeatFlux flux{};
    Temperature deposit_surface{}; ///< what the gas touches; the inner wall where there is no deposit
    Temperature inner_wall{};      ///< metal, gas side: the hottest metal
    Temperature outer_wall{};      ///< metal, coolant side
    Temperature wetted_surface{};  ///< what the coolant touches; the outer wall where there is no scale
    std::optional<Temperature> saturation;   ///< of the coolant at its pressure
    std::optional<BoilingStatement> boiling; ///< empty: needs the coolant's pressure
    bool boiling_carries_heat = false;       ///< boiling takes more than convection would at this surface
    bool boiling_extrapolated = false;       ///< and that by a formula used below its 7 bar abs
};

/// Works the chain out.
/// Validity: gas hotter than coolant; gas 0 to 2700 °C and coolant 0 to 220 °C; a film of 1 to 1e6
///   W/(m² K); a slab up to 1 m thick with 0.01 to 500 W/(m K) (bounds of what can be an engine; common
///   practice). With a pressure of the coolant: 1 to 172 bar abs, coolant not above its saturation.
/// @par Problems not_found: an input that is missing, or a state outside the validity; invalid_input: an
///      input that cannot be. Each is named.
Result<WallTemperatures> work_out_wall(const WallChain& chain);

/// One part of the chain as the thickness of cast iron that would hinder the heat as much: λ_iron / h of a
/// film, δ λ_iron / λ of a slab.
struct EquivalentIron
{
    std::string part; ///< "gas film", "deposit", "wall", "scale", "coolant film"
    Length thickness{};
};
/// From the gas to the coolant. The coolant film is the one that carries the heat, boiling included.
/// @par Problems as work_out_wall
Result<std::vector<EquivalentIron>> equivalent_iron(const WallChain& chain,
                                                    ThermalConductivity iron = cast_iron());

/// What a change, such as a colder coolant or a deposit, does.
struct WallChange
{
    WallTemperatures before, after;
    TemperatureDifference inner_wall{}, wetted_surface{}; ///< after minus before
    double flux_ratio = 1.0;                              ///< after over before
};
/// @par Problems as work_out_wall, for the chain before first
Result<WallChange> wall_change(const WallChain& before, const WallChain& after);

} // namespace evenstroke
