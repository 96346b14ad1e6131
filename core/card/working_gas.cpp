// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/working_gas.h"

#include <algorithm>
#include <array>
#include <cstddef>

namespace evenstroke::indicator {
namespace {

constexpr double universal = 8.314462618; // J/(mol K), SI 2019
constexpr int coldest = 200, hottest = 3200;
constexpr std::size_t rows = hottest - coldest + 1;

struct Species
{
    double molar_mass; // kg/mol
    std::array<double, 5> cold, hot; // c_p/R = Σ a_k T^k below and from 1000 K
    double heat_capacity_pressure(double t) const
    {
        const auto& a = t < 1000.0 ? cold : hot;
        return universal * (a[0] + t * (a[1] + t * (a[2] + t * (a[3] + t * a[4]))));
    }
};

// NASA polynomials of the public GRI-Mech 3.0 thermodynamic file.
constexpr Species nitrogen{28.0134e-3,
                           {3.298677, 1.4082404e-3, -3.963222e-6, 5.641515e-9, -2.444854e-12},
                           {2.92664, 1.4879768e-3, -5.68476e-7, 1.0097038e-10, -6.753351e-15}};
constexpr Species oxygen{31.9988e-3,
                         {3.78245636, -2.99673416e-3, 9.84730201e-6, -9.68129509e-9, 3.24372837e-12},
                         {3.28253784, 1.48308754e-3, -7.57966669e-7, 2.09470555e-10, -2.16717794e-14}};
constexpr Species carbon_dioxide{44.0095e-3,
                                 {2.35677352, 8.98459677e-3, -7.12356269e-6, 2.45919022e-9, -1.43699548e-13},
                                 {3.85746029, 4.41437026e-3, -2.21481404e-6, 5.23490188e-10, -4.72084164e-14}};
constexpr Species water{18.0153e-3,
                        {4.19864056, -2.0364341e-3, 6.52040211e-6, -5.48797062e-9, 1.77197817e-12},
                        {3.03399249, 2.17691804e-3, -1.64072518e-7, -9.7041987e-11, 1.68200992e-14}};
constexpr Species argon{39.948e-3, {2.5, 0, 0, 0, 0}, {2.5, 0, 0, 0, 0}};
constexpr std::array<Species, 5> species{nitrogen, oxygen, argon, carbon_dioxide, water};

// Dry air by mole.
constexpr std::array<double, 5> air_moles{0.7809, 0.2095, 0.0093, 0.0004, 0.0};
constexpr double hydrogen_of_fuel = 1.86; // atoms a carbon atom
constexpr double oxygen_of_fuel = 1.0 + hydrogen_of_fuel / 4.0;

/// What CH_1.86 leaves with the air that holds its oxygen, by mole of fuel; the little CO2 of the air left out.
constexpr std::array<double, 5> burnt_moles()
{
    const double air = oxygen_of_fuel / air_moles[1];
    return {air * air_moles[0], 0.0, air * air_moles[2], 1.0, hydrogen_of_fuel / 2.0};
}

struct Table
{
    double gas_constant = 0.0;
    std::array<double, rows> heat_capacity{}, energy{};
};

Table make_table(const std::array<double, 5>& moles)
{
    Table table;
    double sum = 0.0, mass = 0.0;
    for (std::size_t i = 0; i < species.size(); ++i) {
        sum += moles[i];
        mass += moles[i] * species[i].molar_mass;
    }
    table.gas_constant = universal * sum / mass;
    const auto capacity = [&](double t) {
        double c = 0.0;
        for (std::size_t i = 0; i < species.size(); ++i)
            c += moles[i] * (species[i].heat_capacity_pressure(t) - universal);
        return c / mass;
    };
    // Simpson's rule kelvin by kelvin from 200 K, then shifted to 0 at 298.15 K.
    for (std::size_t i = 0; i < rows; ++i) {
        const double t = coldest + static_cast<double>(i);
        table.heat_capacity[i] = capacity(t);
        if (i > 0)
            table.energy[i] = table.energy[i - 1] + (capacity(t - 1.0) + 4.0 * capacity(t - 0.5) + capacity(t)) / 6.0;
    }
    const double zero = table.energy[98] + 0.15 * (table.energy[99] - table.energy[98]);
    for (double& u : table.energy)
        u -= zero;
    return table;
}

const Table& air_table()
{
    static const Table table = make_table(air_moles);
    return table;
}
const Table& burnt_table()
{
    static const Table table = make_table(burnt_moles());
    return table;
}

struct Row
{
    std::size_t index;
    double share;
};
Row find_row(double kelvin)
{
    const double at = std::clamp(kelvin - coldest, 0.0, static_cast<double>(rows) - 1.0001);
    const auto index = static_cast<std::size_t>(at);
    return {index, at - static_cast<double>(index)};
}
double look_up(const std::array<double, rows>& column, Row row)
{
    return column[row.index] + row.share * (column[row.index + 1] - column[row.index]);
}

// B of air per mole: b0 - b1/T - b2/T², brought to a kilogram by 0.028965 kg/mol.
constexpr double b0 = 39.5e-6 / 0.028965, b1 = 1.0e-2 / 0.028965, b2 = 1.084 / 0.028965;

} // namespace

WorkingGas::WorkingGas(double burnt_share)
    : burnt_(burnt_share), gas_constant_((1.0 - burnt_share) * air_table().gas_constant +
                                         burnt_share * burnt_table().gas_constant)
{
}

double WorkingGas::heat_capacity(double kelvin) const
{
    const Row row = find_row(kelvin);
    return (1.0 - burnt_) * look_up(air_table().heat_capacity, row) +
           burnt_ * look_up(burnt_table().heat_capacity, row);
}

double WorkingGas::energy(double kelvin) const
{
    const Row row = find_row(kelvin);
    return (1.0 - burnt_) * look_up(air_table().energy, row) + burnt_ * look_up(burnt_table().energy, row);
}

Virial virial(double kelvin)
{
    const double inverse = 1.0 / kelvin, square = inverse * inverse;
    return {b0 - b1 * inverse - b2 * square, square * (b1 + 2.0 * b2 * inverse),
            -square * inverse * (2.0 * b1 + 6.0 * b2 * inverse)};
}

namespace {

/// 1/T, in which the rounds need no division. @param thin  what 1/T would be without the virial
double inverse_temperature(double thin, double density)
{
    double inverse = thin;
    for (int round = 0; round < 3; ++round)
        inverse = thin * (1.0 + density * (b0 - inverse * (b1 + b2 * inverse)));
    return inverse;
}

} // namespace

double gas_temperature(const WorkingGas& gas, double pressure, double volume, double mass)
{
    const double density = mass / volume;
    return 1.0 / inverse_temperature(density * gas.gas_constant() / pressure, density);
}

double gas_energy(const WorkingGas& gas, double kelvin, double density)
{
    return gas.energy(kelvin) - density * gas.gas_constant() * kelvin * kelvin * virial(kelvin).slope;
}

GasMoment gas_moment(const WorkingGas& gas, double pressure, double volume, double mass)
{
    const double density = mass / volume, r = gas.gas_constant();
    const double t = 1.0 / inverse_temperature(density * r / pressure, density);
    const Virial b = virial(t);
    const double capacity =
        gas.heat_capacity(t) - density * r * t * (2.0 * b.slope + t * b.curvature);
    const double by_temperature = density * r * (1.0 + density * (b.value + t * b.slope));
    const double by_density = r * t * (1.0 + 2.0 * b.value * density);
    const double stiffness = by_temperature / (density * capacity);
    return {t, (density * by_density + t * by_temperature * stiffness) / pressure, stiffness};
}

} // namespace evenstroke::indicator
