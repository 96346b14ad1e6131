// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reference/fuel_properties.h"

#include "core/input_check.h"
#include "core/plain_text.h"

#include <cmath>

namespace evenstroke {
namespace {

constexpr double lightest = 600.0, heaviest = 1200.0;              // kg/m³
constexpr double most_methyl_ester = 0.10, most_impurities = 0.10; // shares by mass
constexpr double thinnest_ignition = 10.0, thickest_ignition = 700.0;  // mm²/s
constexpr double coldest_ignition = 15.0, hottest_ignition = 150.0;    // °C
constexpr double thinnest = 2.0, thickest = 1e6;                   // mm²/s
constexpr double coldest = -20.0, hottest = 200.0;                 // °C

struct HeatingConstants
{
    double base, linear, square; ///< of the fuel without water, ash and sulphur; MJ/kg, density in kg/m³
};

std::optional<Problem> wrong_density(double density)
{
    if (density >= lightest && density <= heaviest)
        return std::nullopt;
    return invalid_input("A fuel density of " + short_number_text(density) +
                             " kg/m³ at 15 °C is outside 600 to 1200 kg/m³, so it is no fuel oil's.",
                         "Check the density on the bunker delivery note and its unit.");
}

std::optional<Problem> find_problem(const FuelAnalysis& analysis)
{
    InputCheck inputs("the heating value");
    inputs.above_zero(analysis.density_15, "the density at 15 °C").not_negative(analysis.water, "the water content");
    inputs.not_negative(analysis.ash, "the ash content").not_negative(analysis.sulphur, "the sulphur content");
    inputs.not_negative(std::optional(analysis.methyl_ester), "the methyl ester content");
    if (!inputs.passed())
        return inputs.problem();
    if (auto problem = wrong_density(analysis.density_15->value()))
        return problem;
    const double impurities = analysis.water->value() + analysis.ash->value() + analysis.sulphur->value();
    if (impurities > most_impurities)
        return invalid_input("Water, ash and sulphur together are " + short_number_text(100.0 * impurities) +
                                 " % of the fuel; the heating value is worked out up to 10 %.",
                             "Check the three contents and their units.");
    if (analysis.methyl_ester.value() > most_methyl_ester)
        return invalid_input("The fuel holds " + short_number_text(100.0 * analysis.methyl_ester.value()) +
                                 " % methyl ester; the heating value is worked out up to 10 %.",
                             "Enter the heating value that the supplier or a laboratory states.");
    return std::nullopt;
}

Result<SpecificEnergy> heating_value(const HeatingConstants& of, const FuelAnalysis& analysis, double heat_to_water)
{
    if (const auto problem = find_problem(analysis))
        return *problem;
    const double density = analysis.density_15->value();
    const double water = analysis.water->value(), ash = analysis.ash->value(), sulphur = analysis.sulphur->value();
    const double pure = of.base + of.linear * density - of.square * density * density;
    return megajoules_per_kilogram(pure * (1.0 - water - ash - sulphur) + 9.420 * sulphur - heat_to_water * water);
}

double double_logarithm(double viscosity, double shift) { return std::log10(std::log10(viscosity + shift)); }

std::optional<Problem> wrong_viscosity(double viscosity)
{
    if (viscosity >= thinnest && viscosity <= thickest)
        return std::nullopt;
    return invalid_input("A viscosity of " + short_number_text(viscosity) +
                             " mm²/s is outside 2 to 1000000 mm²/s, for which its change with temperature is known.",
                         "Check the viscosities, their temperatures and units.");
}

std::optional<Problem> wrong_temperature(double degrees)
{
    if (degrees >= coldest && degrees <= hottest)
        return std::nullopt;
    return invalid_input("The viscosity at " + short_number_text(degrees) +
                             " °C is not known; it is worked out from -20 to 200 °C.",
                         "Check the viscosities, their temperatures and units.");
}

std::optional<Problem> find_problem(const ViscosityLine::Point& point)
{
    InputCheck inputs("the viscosity over temperature");
    inputs.above_zero(point.viscosity, "one of the two viscosities");
    inputs.above_zero(point.at, "the temperature of one of the two viscosities");
    if (!inputs.passed())
        return inputs.problem();
    if (auto problem = wrong_viscosity(in_square_millimetres_per_second(*point.viscosity)))
        return problem;
    return wrong_temperature(in_celsius(*point.at));
}

} // namespace

Result<SpecificEnergy> net_heating_value(PetroleumGroup group, const FuelAnalysis& analysis)
{
    constexpr double heat_to_water = 2.449; // MJ/kg, to evaporate the water in the fuel
    return heating_value(group == PetroleumGroup::residual ? HeatingConstants{46.704, 3.167e-3, 8.802e-6}
                                                           : HeatingConstants{46.423, 3.170e-3, 8.792e-6},
                         analysis, heat_to_water);
}

Result<SpecificEnergy> gross_heating_value(PetroleumGroup group, const FuelAnalysis& analysis)
{
    return heating_value(group == PetroleumGroup::residual ? HeatingConstants{52.190, 0.0, 8.802e-6}
                                                           : HeatingConstants{51.916, 0.0, 8.792e-6},
                         analysis, 0.0);
}

Result<double> ignition_index(std::optional<Density> density_15, std::optional<KinematicViscosity> viscosity,
                              std::optional<Temperature> viscosity_at)
{
    InputCheck inputs("the ignition index");
    inputs.above_zero(density_15, "the density at 15 °C").above_zero(viscosity, "the viscosity");
    inputs.above_zero(viscosity_at, "the temperature of the viscosity");
    if (!inputs.passed())
        return inputs.problem();
    if (auto problem = wrong_density(density_15->value()))
        return *problem;
    const double thickness = in_square_millimetres_per_second(*viscosity), degrees = in_celsius(*viscosity_at);
    const bool known = thickness >= thinnest_ignition && thickness <= thickest_ignition &&
                       degrees >= coldest_ignition && degrees <= hottest_ignition;
    if (!known)
        return invalid_input("The ignition index of a fuel of " + shown(*viscosity) + " at " + shown(*viscosity_at) +
                                 " is not known; it is worked out for 10 to 700 mm²/s at 15 to 150 °C.",
                             "Check the viscosity, its temperature and their units; a distillate has no such index.");
    return density_15->value() - 81.0 - 141.0 * double_logarithm(thickness, 0.85) -
           483.0 * std::log10((degrees + 273.0) / 323.0);
}

Result<ViscosityLine> ViscosityLine::through(const Point& first, const Point& second)
{
    for (const Point* point : {&first, &second})
        if (const auto problem = find_problem(*point))
            return *problem;
    const double x1 = std::log10(first.at->value()), x2 = std::log10(second.at->value());
    const double y1 = double_logarithm(in_square_millimetres_per_second(*first.viscosity), 0.7);
    const double y2 = double_logarithm(in_square_millimetres_per_second(*second.viscosity), 0.7);
    const double slope = (y1 - y2) / (x2 - x1);
    if (!(x1 != x2 && slope > 0.0))
        return invalid_input(shown(*first.viscosity) + " at " + shown(*first.at) + " and " + shown(*second.viscosity) +
                                 " at " + shown(*second.at) + " are not of one fuel, which is thinner when hotter.",
                             "Check the two viscosities and their temperatures.");
    return ViscosityLine(y1 + slope * x1, slope);
}

Result<KinematicViscosity> ViscosityLine::viscosity_at(Temperature temperature) const
{
    if (auto problem = wrong_temperature(in_celsius(temperature)))
        return *problem;
    const double viscosity = std::pow(10.0, std::pow(10.0, a_ - b_ * std::log10(temperature.value()))) - 0.7;
    if (auto problem = wrong_viscosity(viscosity))
        return *problem;
    return square_millimetres_per_second(viscosity);
}

Result<Temperature> ViscosityLine::temperature_for(KinematicViscosity viscosity) const
{
    const double wanted = in_square_millimetres_per_second(viscosity);
    if (auto problem = wrong_viscosity(wanted))
        return *problem;
    const Temperature temperature =
        Temperature::from_value(std::pow(10.0, (a_ - double_logarithm(wanted, 0.7)) / b_));
    if (auto problem = wrong_temperature(in_celsius(temperature)))
        return *problem;
    return temperature;
}

} // namespace evenstroke
