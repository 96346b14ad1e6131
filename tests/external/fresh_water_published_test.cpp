// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/fresh_water.h"
#include "tests/core/refusal.h"

#include <cmath>
#include <gtest/gtest.h>
#include <limits>

namespace evenstroke {
namespace {

struct WaterRow
{
    double celsius_degrees, density, conductivity, viscosity, prandtl;
};
class FreshWaterPublished : public testing::TestWithParam<WaterRow>
{
};

// IAPWS-IF97 with the IAPWS formulations of viscosity (2008) and conductivity (2011) at 4 bar abs, by the
// open library iapws 1.5.3 (Debian 12). Tolerances are those that the header promises.
TEST_P(FreshWaterPublished, AgreesWithTheIndustrialFormulation)
{
    const WaterRow& row = GetParam();
    const LiquidProperties water = fresh_water(celsius(row.celsius_degrees)).value();
    EXPECT_NEAR(water.density.value() / row.density, 1.0, 5e-4);
    EXPECT_NEAR(water.conductivity.value() / row.conductivity, 1.0, 5e-4);
    EXPECT_NEAR(water.viscosity.value() / row.viscosity, 1.0, 5e-4);
    EXPECT_NEAR(water.prandtl / row.prandtl, 1.0, 1e-3);
}
INSTANTIATE_TEST_SUITE_P(IF97, FreshWaterPublished,
                         testing::Values(WaterRow{10, 999.844, 0.57897, 1.305632e-3, 9.4586},
                                         WaterRow{30, 995.785, 0.61456, 7.972157e-4, 5.4213},
                                         WaterRow{50, 988.177, 0.64079, 5.465819e-4, 3.5645},
                                         WaterRow{70, 977.911, 0.65993, 4.036343e-4, 2.5612},
                                         WaterRow{80, 971.936, 0.66717, 3.541382e-4, 2.2267},
                                         WaterRow{90, 965.455, 0.67296, 3.142615e-4, 1.9634},
                                         WaterRow{110, 951.074, 0.68050, 2.546808e-4, 1.5830}));

// IAPWS SR6-08(2011), check value at 298.15 K: 889.996 774 µPa s (from memory); as printed.
TEST(FreshWaterPublished, ViscosityOfTheSupplementaryRelease)
{
    EXPECT_NEAR(fresh_water(celsius(25.0)).value().viscosity.value() * 1e6, 889.996774, 1e-6);
}

TEST(FreshWater, IsNotKnownWhereItFreezesOrBoils)
{
    expect_problem(fresh_water(celsius(5.0)), Problem::Kind::not_found, "5 °C");
    expect_problem(fresh_water(celsius(111.0)), Problem::Kind::not_found, "111 °C");
    expect_problem(fresh_water(celsius(std::numeric_limits<double>::quiet_NaN())), Problem::Kind::not_found,
                   "10 to 110 °C");
}

TEST(FreshWater, CarriesThroughToTheFilm)
{
    // By the properties of IF97 worked out separately: 9046 W/(m² K); 0.1 % for the properties.
    const LiquidProperties water = fresh_water(celsius(80.0)).value();
    EXPECT_NEAR(dittus_boelter_film(water, Velocity::from_value(1.5), millimetres(20.0)).value().value(),
                9046.0, 9.0);
}

} // namespace
} // namespace evenstroke
