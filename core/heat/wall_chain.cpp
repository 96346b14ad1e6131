// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/wall_chain.h"

#include "core/plain_text.h"
#include "core/reference/humid_air.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

namespace evenstroke {
namespace {

constexpr double blanketing_flux =
    1e6; // W/m²: above it vapour blanketing cannot be excluded (common practice)

Problem missing(const std::string& what)
{
    return {Problem::Kind::not_found, "The " + what + " is not known.", "Enter the " + what + "."};
}

std::optional<Problem> find_outside(double value, double lowest, double highest, const std::string& what,
                                    const std::string& unit)
{
    if (value >= lowest && value <= highest) {
        return std::nullopt;
    }
    return invalid_input("The " + what + " is " + short_number_text(value) + " " + unit +
                             ", which is not from " + short_number_text(lowest) + " to " +
                             short_number_text(highest) + " " + unit + ".",
                         "Check the " + what + " and its unit.");
}

std::optional<Problem> find_temperature_problem(const std::optional<Temperature>& temperature, double lowest,
                                                double highest, const std::string& what)
{
    if (!temperature) {
        return missing(what);
    }
    return find_outside(in_celsius(*temperature), lowest, highest, what, "°C");
}

std::optional<Problem> find_film_problem(const std::optional<HeatTransferCoefficient>& film,
                                         const std::string& what)
{
    if (!film) {
        return missing(what);
    }
    return find_outside(film->value(), 1.0, 1e6, what, "W/(m² K)");
}

std::optional<Problem> find_slab_problem(const WallSlab& slab, const std::string& what)
{
    if (!(slab.thickness.value() > 0.0 && slab.thickness.value() <= 1.0)) {
        return invalid_input("The " + what + " is " + short_number_text(slab.thickness.value() * 1000.0) +
                                 " mm thick, which is not above 0 and at most 1000 mm.",
                             "Check the thickness, or leave the " + what + " empty.");
    }
    return find_outside(slab.conductivity.value(), 0.01, 500.0, "conductivity of the " + what, "W/(m K)");
}

std::optional<Problem> find_input_problem(const WallChain& chain)
{
    if (auto problem = find_temperature_problem(chain.gas, 0.0, 2700.0, "mean gas temperature")) {
        return problem;
    }
    if (auto problem = find_film_problem(chain.gas_film, "gas film")) {
        return problem;
    }
    if (!chain.wall) {
        return missing("thickness of the wall");
    }
    if (auto problem = find_film_problem(chain.coolant_film, "coolant film")) {
        return problem;
    }
    if (auto problem = find_temperature_problem(chain.coolant, 0.0, 220.0, "coolant temperature")) {
        return problem;
    }
    for (const auto& [slab, what] :
         {std::pair{&chain.deposit, "deposit"}, {&chain.wall, "wall"}, {&chain.scale, "scale"}}) {
        if (*slab) {
            if (auto problem = find_slab_problem(**slab, what)) {
                return problem;
            }
        }
    }
    if (!(*chain.gas > *chain.coolant)) {
        return Problem{Problem::Kind::not_found,
                       "The wall is not known: the gas, " + short_number_text(in_celsius(*chain.gas)) +
                           " °C, is not hotter than the coolant, " +
                           short_number_text(in_celsius(*chain.coolant)) + " °C.",
                       "Check the mean gas temperature and the coolant temperature."};
    }
    return std::nullopt;
}

double resistance(const std::optional<WallSlab>& slab)
{
    return slab ? slab->thickness.value() / slab->conductivity.value() : 0.0;
}

/// From the gas to the wetted surface, m² K/W.
double resistance_above_coolant(const WallChain& chain)
{
    return 1.0 / chain.gas_film->value() + resistance(chain.deposit) + resistance(chain.wall) +
           resistance(chain.scale);
}

/// What boiling takes from a surface of this temperature, W/m²; 0 below saturation. Beyond the formula's own
/// flux the chain's answer is refused afterwards, so here the curve is simply carried on.
double boiling_watts(double surface, double saturation, double pressure_bar)
{
    const double root = std::max(0.0, surface - saturation) / (25.0 * std::exp(-pressure_bar / 62.0));
    return 1e6 * root * root * root * root;
}

/// Temperature of the wetted surface, K, where what arrives from the gas is what leaves into the coolant. The
/// balance falls with the temperature all the way from the coolant's to the gas's, so halving the bracket
/// finds the one solution, and never leaves it.
double wetted_kelvin(const WallChain& chain, std::optional<double> saturation)
{
    const double gas = chain.gas->value(), coolant = chain.coolant->value();
    const double above = resistance_above_coolant(chain), film = chain.coolant_film->value();
    const double by_convection = coolant + (gas - coolant) / (1.0 + film * above);
    if (!saturation || by_convection <= *saturation) {
        return by_convection;
    }
    const double bar = in_bar(*chain.coolant_pressure);
    double low = *saturation, high = by_convection; // boiling only makes the surface colder
    while (high - low > 1e-10 * gas) {
        const double middle = 0.5 * (low + high);
        const double leaves = std::max(film * (middle - coolant), boiling_watts(middle, *saturation, bar));
        ((gas - middle) / above > leaves ? low : high) = middle;
    }
    return 0.5 * (low + high);
}

std::optional<BoilingStatement> state_boiling(const WallChain& chain, const WallTemperatures& wall)
{
    if (chain.scale || wall.flux.value() > blanketing_flux) {
        return BoilingStatement::blanketing_not_excluded;
    }
    if (!wall.saturation) {
        return std::nullopt;
    }
    return wall.wetted_surface < *wall.saturation ? BoilingStatement::not_expected
                                                  : BoilingStatement::possible;
}

/// Temperatures from the gas inwards, by the flux.
WallTemperatures temperatures(const WallChain& chain, double wetted)
{
    WallTemperatures wall;
    const double flux = (chain.gas->value() - wetted) / resistance_above_coolant(chain);
    const double outer = wetted + flux * resistance(chain.scale);
    const double inner = outer + flux * resistance(chain.wall);
    wall.flux = HeatFlux::from_value(flux);
    wall.wetted_surface = Temperature::from_value(wetted);
    wall.outer_wall = Temperature::from_value(outer);
    wall.inner_wall = Temperature::from_value(inner);
    wall.deposit_surface = Temperature::from_value(inner + flux * resistance(chain.deposit));
    return wall;
}

/// Saturation of the coolant, where its pressure was entered.
Result<std::optional<Temperature>> coolant_saturation(const WallChain& chain)
{
    if (!chain.coolant_pressure) {
        return std::optional<Temperature>();
    }
    // The formula of boiling names what is wrong with the pressure.
    const auto boiling = jens_lottes_superheat(HeatFlux{}, *chain.coolant_pressure);
    if (!boiling) {
        return boiling.error();
    }
    const Result<Temperature> saturation = saturation_temperature(*chain.coolant_pressure);
    if (!saturation) {
        return saturation.error();
    }
    if (*chain.coolant > saturation.value()) {
        return invalid_input("The coolant, " + short_number_text(in_celsius(*chain.coolant)) +
                                 " °C, is above its boiling point of " +
                                 short_number_text(in_celsius(saturation.value())) + " °C.",
                             "Check temperature and pressure of the coolant.");
    }
    return std::optional(saturation.value());
}

} // namespace

std::string_view boiling_text(BoilingStatement statement)
{
    switch (statement) {
    case BoilingStatement::not_expected:
        return "no boiling expected";
    case BoilingStatement::possible:
        return "local boiling possible";
    case BoilingStatement::blanketing_not_excluded:
        return "vapour blanketing cannot be excluded";
    }
    throw std::logic_error("statement about boiling without words");
}

Result<WallTemperatures> work_out_wall(const WallChain& chain)
{
    if (auto problem = find_input_problem(chain)) {
        return *std::move(problem);
    }
    const Result<std::optional<Temperature>> saturation = coolant_saturation(chain);
    if (!saturation) {
        return saturation.error();
    }
    std::optional<double> saturation_kelvin;
    if (saturation.value()) {
        saturation_kelvin = saturation.value()->value();
    }
    WallTemperatures wall = temperatures(chain, wetted_kelvin(chain, saturation_kelvin));
    wall.saturation = saturation.value();
    wall.boiling = state_boiling(chain, wall);
    if (wall.saturation && wall.wetted_surface > *wall.saturation) {
        const auto boiling =
            jens_lottes_flux(wall.wetted_surface - *wall.saturation, *chain.coolant_pressure);
        if (!boiling) {
            return boiling.error();
        }
        const double convection =
            chain.coolant_film->value() * (wall.wetted_surface - *chain.coolant).value();
        wall.boiling_carries_heat = boiling.value().value.value() > convection;
        wall.boiling_extrapolated = wall.boiling_carries_heat && boiling.value().extrapolated;
    }
    return wall;
}

Result<std::vector<EquivalentIron>> equivalent_iron(const WallChain& chain, ThermalConductivity iron)
{
    const Result<WallTemperatures> wall = work_out_wall(chain);
    if (!wall) {
        return wall.error();
    }
    if (auto problem = find_outside(iron.value(), 1.0, 500.0, "conductivity of the iron", "W/(m K)")) {
        return *std::move(problem);
    }
    std::vector<EquivalentIron> parts;
    const auto add = [&](const char* part, double hinders) {
        if (hinders > 0.0) {
            parts.push_back({part, hinders * iron.value() * si::metres});
        }
    };
    add("gas film", 1.0 / chain.gas_film->value());
    add("deposit", resistance(chain.deposit));
    add("wall", resistance(chain.wall));
    add("scale", resistance(chain.scale));
    add("coolant film", (wall.value().wetted_surface - *chain.coolant).value() / wall.value().flux.value());
    return parts;
}

Result<WallChange> wall_change(const WallChain& before, const WallChain& after)
{
    const Result<WallTemperatures> first = work_out_wall(before);
    if (!first) {
        return first.error();
    }
    const Result<WallTemperatures> second = work_out_wall(after);
    if (!second) {
        return second.error();
    }
    return WallChange{first.value(), second.value(), second.value().inner_wall - first.value().inner_wall,
                      second.value().wetted_surface - first.value().wetted_surface,
                      second.value().flux.value() / first.value().flux.value()};
}

} // namespace evenstroke
