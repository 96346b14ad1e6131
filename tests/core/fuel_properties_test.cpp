// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reference/fuel_properties.h"

#include <gtest/gtest.h>

namespace evenstroke {
namespace {

FuelAnalysis sound_fuel()
{
    return {Density::from_value(960.0), Ratio(0.001), Ratio(0.0003), Ratio(0.005), Ratio(0.0)};
}

constexpr PetroleumGroup residual = PetroleumGroup::residual;

TEST(HeatingValue, NamesTheInputThatIsMissing)
{
    FuelAnalysis fuel = sound_fuel();
    fuel.sulphur.reset();
    const auto value = net_heating_value(residual, fuel);
    ASSERT_FALSE(value.has_value());
    EXPECT_EQ(value.error().kind, Problem::Kind::not_found);
    EXPECT_EQ(value.error().text(),
              "The heating value is not known, because the sulphur content is missing. Enter the sulphur content.");
}

TEST(HeatingValue, IsNotKnownOutsideItsDensities)
{
    FuelAnalysis fuel = sound_fuel();
    for (const double density : {599.9, 1200.1, -1.0, 0.0}) {
        fuel.density_15 = Density::from_value(density);
        EXPECT_FALSE(net_heating_value(residual, fuel).has_value()) << density;
        EXPECT_FALSE(gross_heating_value(residual, fuel).has_value()) << density;
    }
    for (const double density : {600.0, 1200.0}) {
        fuel.density_15 = Density::from_value(density);
        EXPECT_TRUE(net_heating_value(residual, fuel).has_value()) << density;
    }
}

TEST(HeatingValue, IsNotKnownForDirtOrEsterBeyondItsRange)
{
    FuelAnalysis fuel = sound_fuel();
    fuel.water = Ratio(0.11);
    EXPECT_FALSE(net_heating_value(residual, fuel).has_value());
    fuel = sound_fuel();
    fuel.ash = Ratio(-0.001);
    EXPECT_FALSE(net_heating_value(residual, fuel).has_value());
    fuel = sound_fuel();
    fuel.methyl_ester = Ratio(0.2);
    EXPECT_FALSE(net_heating_value(residual, fuel).has_value());
}

// The difference is the heat in the steam of the fuel's own hydrogen: 5 to 8 % of the gross value for petroleum.
TEST(HeatingValue, IsLowerNetThanGross)
{
    const double net = net_heating_value(residual, sound_fuel()).value().value();
    const double gross = gross_heating_value(residual, sound_fuel()).value().value();
    EXPECT_GT(gross / net, 1.05);
    EXPECT_LT(gross / net, 1.08);
}

TEST(IgnitionIndex, IsNotKnownForADistillateOrWithoutATemperature)
{
    const auto density = Density::from_value(850.0);
    EXPECT_FALSE(ignition_index(density, square_millimetres_per_second(4.0), celsius(40.0)).has_value());
    const auto without = ignition_index(density, square_millimetres_per_second(380.0), std::nullopt);
    ASSERT_FALSE(without.has_value());
    EXPECT_NE(without.error().what_happened.find("the temperature of the viscosity is missing"), std::string::npos);
    EXPECT_FALSE(ignition_index(Density::from_value(1300.0), square_millimetres_per_second(380.0), celsius(50.0)).has_value());
}

TEST(Viscosity, GoesThroughItsTwoPointsAndBack)
{
    const ViscosityLine line = ViscosityLine::through({square_millimetres_per_second(380.0), celsius(50.0)},
                                                      {square_millimetres_per_second(35.0), celsius(100.0)})
                                   .value();
    // Tolerance: rounding of doubles through two logarithms and back.
    EXPECT_NEAR(in_square_millimetres_per_second(line.viscosity_at(celsius(50.0)).value()), 380.0, 1e-7);
    EXPECT_NEAR(in_square_millimetres_per_second(line.viscosity_at(celsius(100.0)).value()), 35.0, 1e-8);
    EXPECT_NEAR(in_celsius(line.temperature_for(line.viscosity_at(celsius(120.0)).value()).value()), 120.0, 1e-8);
}

TEST(Viscosity, IsNotKnownFromPointsOfNoFuelNorOutsideItsRange)
{
    const auto through = [](double first, double first_at, double second, double second_at) {
        return ViscosityLine::through({square_millimetres_per_second(first), celsius(first_at)},
                                      {square_millimetres_per_second(second), celsius(second_at)});
    };
    EXPECT_FALSE(through(380.0, 50.0, 35.0, 50.0).has_value()) << "one temperature";
    EXPECT_FALSE(through(35.0, 50.0, 380.0, 100.0).has_value()) << "thicker when hotter";
    EXPECT_FALSE(through(380.0, 50.0, 1.5, 100.0).has_value()) << "below 2 mm²/s";
    EXPECT_FALSE(ViscosityLine::through({square_millimetres_per_second(380.0), {}}, {{}, celsius(100.0)}).has_value());
    const auto line = through(4.0, 40.0, 2.1, 80.0);
    ASSERT_TRUE(line.has_value());
    EXPECT_FALSE(line.value().viscosity_at(celsius(120.0)).has_value()) << "thinner than 2 mm²/s there";
    EXPECT_FALSE(line.value().temperature_for(square_millimetres_per_second(1.0)).has_value());
    EXPECT_FALSE(line.value().viscosity_at(celsius(250.0)).has_value());
}

} // namespace
} // namespace evenstroke
