// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/working_gas.h"

#include <gtest/gtest.h>

namespace evenstroke::indicator {

// Worked from the same polynomials on their own; held to 1e-6 or the last digit stated.
TEST(WorkingGas, HasTheWorkedHeatCapacitiesAndEnergies)
{
    const WorkingGas air(0.0), burnt(1.0);
    EXPECT_NEAR(air.gas_constant(), 287.045744, 5e-7);
    EXPECT_NEAR(burnt.gas_constant(), 286.548986, 5e-7);
    const double capacities[][3] = {{300, 716.4584, 770.0868},
                                    {600, 763.3407, 854.1817},
                                    {900, 834.9837, 947.5170},
                                    {1500, 923.1875, 1071.4900},
                                    {2500, 989.6999, 1164.1902}};
    for (const auto& [kelvin, of_air, of_burnt] : capacities) {
        EXPECT_NEAR(air.heat_capacity(kelvin), of_air, 1e-4) << kelvin;
        EXPECT_NEAR(burnt.heat_capacity(kelvin), of_burnt, 1e-4) << kelvin;
    }
    const double exponents[][2] = {{300, 1.400645}, {900, 1.343774}, {1500, 1.310929}};
    for (const auto& [kelvin, gamma] : exponents)
        EXPECT_NEAR(1.0 + air.gas_constant() / air.heat_capacity(kelvin), gamma, 1e-6) << kelvin;
    const double energies[][2] = {{900, 462034.45}, {1500, 992775.39}, {2500, 1954236.73}};
    for (const auto& [kelvin, energy] : energies)
        EXPECT_NEAR(air.energy(kelvin), energy, 1e-6 * energy) << kelvin;
    EXPECT_NEAR(air.energy(298.15), 0.0, 1e-6);
}

TEST(WorkingGas, HasTheWorkedVirialAndStates)
{
    const double virials[][2] = {{300, -5.87778}, {600, 19.82222}, {900, 27.05062}, {1500, 32.35156}};
    for (const auto& [kelvin, cubic_centimetres] : virials)
        EXPECT_NEAR(virial(kelvin).value * 0.028965e6, cubic_centimetres, 1e-5) << kelvin;
    const WorkingGas charge(0.03);
    const double states[][5] = {{100, 0.0377, 723.18939, 1.43143532, 0.38432753},
                                {120, 0.0377, 863.99319, 1.41692114, 0.36803012},
                                {3.7, 0.46536, 342.73812, 1.40174013, 0.39913002}};
    for (const auto& [bar, volume, kelvin, exponent, stiffness] : states) {
        const GasMoment moment = gas_moment(charge, bar * 1e5, volume, 1.75);
        EXPECT_NEAR(moment.temperature, kelvin, 1e-6 * kelvin);
        EXPECT_NEAR(moment.exponent, exponent, 1e-6);
        EXPECT_NEAR(moment.stiffness, stiffness, 1e-6);
    }
}

TEST(WorkingGas, StaysFiniteOutsideItsTables)
{
    const WorkingGas gas(0.5);
    EXPECT_GT(gas.heat_capacity(50.0), 600.0);
    EXPECT_LT(gas.heat_capacity(9000.0), 1400.0);
    EXPECT_GT(gas.energy(9000.0), gas.energy(3000.0));
}

} // namespace evenstroke::indicator
