// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/coolant_film.h"

#include "core/input_check.h"
#include "core/plain_text.h"

#include <cmath>
#include <optional>
#include <string>
#include <utility>

namespace evenstroke {
namespace {

constexpr double lowest_boiling = 1.0, fitted_from = 7.0, highest_boiling = 172.0; // bar abs
constexpr double highest_flux = 12.5;                                              // MW/m²
constexpr double largest_superheat = 47.0;                                         // K: 25 x 12.5^(1/4)

std::optional<Problem> find_not_positive(double value, const std::string& what, const std::string& unit)
{
    if (is_positive(value)) {
        return std::nullopt;
    }
    return invalid_input("The " + what + " is " + short_number_text(value) + unit + ", which is not above 0.",
                         "Check the " + what + " and its unit.");
}

std::optional<Problem> find_boiling_pressure_problem(AbsolutePressure pressure)
{
    const double bar = in_bar(pressure);
    if (bar >= lowest_boiling && bar <= highest_boiling) {
        return std::nullopt;
    }
    return Problem{Problem::Kind::not_found,
                   "Boiling at the wall is not known at a coolant pressure of " + short_number_text(bar) +
                       " bar abs; the formula goes from 1 to 172 bar abs.",
                   "Check the coolant pressure, its unit and whether it is gauge or absolute."};
}

double pressure_factor(AbsolutePressure pressure)
{
    return 25.0 * std::exp(-in_bar(pressure) / 62.0);
}

std::optional<Problem> find_problem(const BoilingProperties& water, double gravity)
{
    const std::pair<double, const char*> positive[] = {
        {water.viscosity.value(), "viscosity of the water"},
        {water.heat_of_vaporisation.value(), "heat of vaporisation"},
        {water.liquid.value(), "density of the water"},
        {water.steam.value(), "density of the steam"},
        {water.surface_tension.value(), "surface tension"},
        {water.specific_heat.value(), "specific heat of the water"},
        {water.prandtl, "Prandtl number of the water"},
        {water.surface_factor, "surface factor of boiling"},
        {gravity, "acceleration of free fall"},
    };
    for (const auto& [value, what] : positive) {
        if (auto problem = find_not_positive(value, what, "")) {
            return problem;
        }
    }
    if (!(water.steam < water.liquid)) {
        return invalid_input("The steam, " + short_number_text(water.steam.value()) +
                                 " kg/m³, is not lighter than the water, " +
                                 short_number_text(water.liquid.value()) + " kg/m³.",
                             "Check the two densities.");
    }
    return std::nullopt;
}

} // namespace

Result<double> reynolds_number(const LiquidProperties& liquid, Velocity velocity, Length diameter)
{
    const std::pair<double, std::pair<const char*, const char*>> positive[] = {
        {liquid.density.value(), {"density of the coolant", " kg/m³"}},
        {liquid.viscosity.value(), {"viscosity of the coolant", " Pa s"}},
        {velocity.value(), {"velocity of the coolant", " m/s"}},
        {diameter.value(), {"width of the coolant passage", " m"}},
    };
    for (const auto& [value, words] : positive) {
        if (auto problem = find_not_positive(value, words.first, words.second)) {
            return *std::move(problem);
        }
    }
    return liquid.density.value() * velocity.value() * diameter.value() / liquid.viscosity.value();
}

Result<HeatTransferCoefficient> dittus_boelter_film(const LiquidProperties& liquid, Velocity velocity,
                                                    Length diameter)
{
    const Result<double> reynolds = reynolds_number(liquid, velocity, diameter);
    if (!reynolds) {
        return reynolds.error();
    }
    if (auto problem =
            find_not_positive(liquid.conductivity.value(), "conductivity of the coolant", " W/(m K)")) {
        return *std::move(problem);
    }
    if (!(reynolds.value() >= 1e4 && reynolds.value() <= 1e7)) {
        return Problem{Problem::Kind::not_found,
                       "The coolant film is not known at a Reynolds number of " +
                           short_number_text(reynolds.value()) + "; the formula goes from 10000 to 10000000.",
                       "Check velocity and passage of the coolant, or enter the film coefficient itself."};
    }
    if (!(liquid.prandtl >= 0.6 && liquid.prandtl <= 160.0)) {
        return Problem{Problem::Kind::not_found,
                       "The coolant film is not known at a Prandtl number of " +
                           short_number_text(liquid.prandtl) + "; the formula goes from 0.6 to 160.",
                       "Check the properties of the coolant, or enter the film coefficient itself."};
    }
    const double nusselt = 0.023 * std::pow(reynolds.value(), 0.8) * std::pow(liquid.prandtl, 0.4);
    return film_coefficient(nusselt * liquid.conductivity.value() / diameter.value());
}

Result<BoilingValue<TemperatureDifference>> jens_lottes_superheat(HeatFlux flux, AbsolutePressure pressure)
{
    if (auto problem = find_boiling_pressure_problem(pressure)) {
        return *std::move(problem);
    }
    const double megawatts = flux.value() / 1e6;
    if (!(megawatts >= 0.0)) {
        return invalid_input("Boiling needs heat from the wall to the coolant, and the flux is " +
                                 short_number_text(megawatts) + " MW/m².",
                             "Check the temperatures of gas and coolant.");
    }
    if (!(megawatts <= highest_flux)) {
        return Problem{Problem::Kind::not_found,
                       "Boiling at the wall is not known at " + short_number_text(megawatts) +
                           " MW/m²; the formula goes to 12.5 MW/m².",
                       "Check the film coefficients and the gas temperature."};
    }
    return BoilingValue<TemperatureDifference>{
        kelvin_difference(pressure_factor(pressure) * std::sqrt(std::sqrt(megawatts))),
        in_bar(pressure) < fitted_from};
}

Result<BoilingValue<HeatFlux>> jens_lottes_flux(TemperatureDifference superheat, AbsolutePressure pressure)
{
    if (auto problem = find_boiling_pressure_problem(pressure)) {
        return *std::move(problem);
    }
    const double root = std::fmax(superheat.value(), 0.0) / pressure_factor(pressure);
    const double megawatts = root * root * root * root;
    if (!(superheat.value() <= largest_superheat && megawatts <= highest_flux)) {
        return Problem{Problem::Kind::not_found,
                       "Boiling is not known at a wall " + short_number_text(superheat.value()) +
                           " K above saturation; the formula goes to 12.5 MW/m².",
                       "Check the temperatures of wall and coolant."};
    }
    return BoilingValue<HeatFlux>{megawatts_per_square_metre(megawatts), in_bar(pressure) < fitted_from};
}

Result<HeatFlux> rohsenow_flux(const BoilingProperties& water, TemperatureDifference superheat,
                               double gravity)
{
    if (auto problem = find_problem(water, gravity)) {
        return *std::move(problem);
    }
    if (!(superheat.value() >= 0.0 && superheat.value() <= 30.0)) {
        return Problem{Problem::Kind::not_found,
                       "Boiling is not known at a wall " + short_number_text(superheat.value()) +
                           " K above saturation; the formula goes from 0 to 30 K.",
                       "Check the temperatures of wall and coolant."};
    }
    const double lift = gravity * (water.liquid - water.steam).value() / water.surface_tension.value();
    const double jakob = water.specific_heat.value() * superheat.value() /
                         (water.surface_factor * water.heat_of_vaporisation.value() *
                          std::pow(water.prandtl, water.prandtl_exponent));
    return HeatFlux::from_value(water.viscosity.value() * water.heat_of_vaporisation.value() *
                                std::sqrt(lift) * jakob * jakob * jakob);
}

} // namespace evenstroke
