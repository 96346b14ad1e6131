// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/wall_chain.h"
#include "tests/core/refusal.h"

#include <cmath>
#include <gtest/gtest.h>
#include <limits>
#include <string>

namespace evenstroke {
namespace {

using Kind = Problem::Kind;

WallChain liner()
{
    WallChain chain;
    chain.gas = celsius(890.0);
    chain.gas_film = film_coefficient(400.0);
    chain.wall = WallSlab{millimetres(35.0), cast_iron()};
    chain.coolant_film = film_coefficient(8000.0);
    chain.coolant = celsius(80.0);
    return chain;
}

// Worked out separately from the stated equations: hold to 1e-3 °C.
TEST(WallChain, AgreesWithASeparateCalculation)
{
    const WallTemperatures wall = work_out_wall(liner()).value();
    EXPECT_NEAR(wall.flux.value(), 238040.8, 0.05);
    EXPECT_NEAR(in_celsius(wall.inner_wall), 294.898, 1e-3);
    EXPECT_NEAR(in_celsius(wall.outer_wall), 109.755, 1e-3);
    EXPECT_EQ(wall.wetted_surface, wall.outer_wall);
    EXPECT_EQ(wall.deposit_surface, wall.inner_wall);
    EXPECT_FALSE(wall.boiling.has_value()) << "the coolant's pressure is not known";
}

TEST(WallChain, ScaleMakesTheWallHotter)
{
    WallChain chain = liner();
    chain.scale = WallSlab{millimetres(0.5), conductivity(1.5)};
    const WallChange change = wall_change(liner(), chain).value();
    EXPECT_NEAR(change.after.flux.value(), 216803.0, 0.5);
    EXPECT_NEAR(in_celsius(change.after.inner_wall), 347.993, 1e-3);
    EXPECT_NEAR(change.inner_wall.value(), 347.993 - 294.898, 2e-3);
    EXPECT_NEAR(change.flux_ratio, 216803.0 / 238040.8, 3e-6);
    EXPECT_EQ(change.after.boiling, BoilingStatement::blanketing_not_excluded);
}

TEST(WallChain, BoilingHoldsTheWettedSurfaceNearSaturation)
{
    WallChain chain = liner();
    chain.coolant_film = film_coefficient(1500.0);
    const WallTemperatures dry = work_out_wall(chain).value();
    EXPECT_NEAR(in_celsius(dry.outer_wall), 216.9, 0.05);
    EXPECT_NEAR(in_celsius(dry.inner_wall), 376.6, 0.05);
    chain.coolant_pressure = bar_absolute(4.0);
    const WallTemperatures wet = work_out_wall(chain).value();
    EXPECT_NEAR(in_celsius(wet.outer_wall), 159.715, 1e-3);
    EXPECT_NEAR(in_celsius(wet.inner_wall), 333.003, 1e-3);
    EXPECT_EQ(wet.boiling, BoilingStatement::possible);
    EXPECT_TRUE(wet.boiling_carries_heat);
    EXPECT_TRUE(wet.boiling_extrapolated);
}

TEST(WallChain, WhatArrivesAtTheWettedSurfaceLeavesIt)
{
    for (const double film : {5.0, 300.0, 1500.0, 5000.0, 20000.0}) {
        for (const double gas_film : {100.0, 400.0, 1500.0, 3000.0}) {
            for (const double bar : {1.0, 2.5, 4.0, 30.0}) {
                WallChain chain = liner();
                chain.coolant_film = film_coefficient(film);
                chain.gas_film = film_coefficient(gas_film);
                chain.coolant_pressure = bar_absolute(bar);
                const WallTemperatures wall = work_out_wall(chain).value();
                const double convection = film * (wall.wetted_surface - *chain.coolant).value();
                const double boiling =
                    jens_lottes_flux(wall.wetted_surface - *wall.saturation, *chain.coolant_pressure)
                        .value()
                        .value.value();
                // The surface is found to 1e-10 of the gas temperature; boiling rises steeply with it.
                EXPECT_NEAR(std::max(convection, boiling) / wall.flux.value(), 1.0, 1e-6)
                    << film << ' ' << bar;
            }
        }
    }
}

TEST(WallChain, SaysOneOfThreeThingsAboutBoiling)
{
    WallChain chain = liner();
    chain.coolant_pressure = bar_absolute(4.0);
    EXPECT_EQ(work_out_wall(chain).value().boiling, BoilingStatement::not_expected);
    chain.gas_film = film_coefficient(5000.0);
    chain.wall->thickness = millimetres(10.0);
    const WallTemperatures fierce = work_out_wall(chain).value();
    EXPECT_GT(fierce.flux.value(), 1e6);
    EXPECT_EQ(fierce.boiling, BoilingStatement::blanketing_not_excluded);
    EXPECT_EQ(boiling_text(BoilingStatement::not_expected), "no boiling expected");
    EXPECT_EQ(boiling_text(BoilingStatement::possible), "local boiling possible");
    EXPECT_EQ(boiling_text(BoilingStatement::blanketing_not_excluded),
              "vapour blanketing cannot be excluded");
}

TEST(WallChain, EquivalentIronAddsUpToTheWholeChain)
{
    const std::vector<EquivalentIron> parts = equivalent_iron(liner()).value();
    ASSERT_EQ(parts.size(), 3U);
    EXPECT_EQ(parts[0].part, "gas film");
    EXPECT_NEAR(parts[0].thickness.value(), 0.1125, 1e-12);
    EXPECT_NEAR(parts[1].thickness.value(), 0.035, 1e-12);
    EXPECT_EQ(parts[2].part, "coolant film");
    EXPECT_NEAR(parts[2].thickness.value(), 0.005625, 1e-12);
}

TEST(WallChain, ADepositKeepsTheMetalColder)
{
    WallChain chain = liner();
    chain.deposit = WallSlab{millimetres(0.5), conductivity(1.0)};
    const WallTemperatures wall = work_out_wall(chain).value();
    EXPECT_GT(wall.deposit_surface, work_out_wall(liner()).value().inner_wall);
    EXPECT_LT(wall.inner_wall, work_out_wall(liner()).value().inner_wall);
    EXPECT_EQ(equivalent_iron(chain).value()[1].part, "deposit");
}

TEST(WallChain, NamesTheInputThatIsMissing)
{
    const auto without = [](auto member) {
        WallChain chain = liner();
        (chain.*member).reset();
        return work_out_wall(chain);
    };
    expect_problem(without(&WallChain::gas), Kind::not_found, "mean gas temperature is not known");
    expect_problem(without(&WallChain::gas_film), Kind::not_found, "gas film is not known");
    expect_problem(without(&WallChain::wall), Kind::not_found, "thickness of the wall is not known");
    expect_problem(without(&WallChain::coolant_film), Kind::not_found, "coolant film is not known");
    expect_problem(without(&WallChain::coolant), Kind::not_found, "coolant temperature is not known");
}

TEST(WallChain, NamesTheInputThatCannotBe)
{
    WallChain chain = liner();
    chain.gas = celsius(70.0);
    expect_problem(work_out_wall(chain), Kind::not_found, "70 °C, is not hotter than the coolant, 80 °C");
    chain = liner();
    chain.wall->thickness = Length{};
    expect_problem(work_out_wall(chain), Kind::invalid_input, "0 mm thick");
    chain = liner();
    chain.scale = WallSlab{millimetres(0.5), conductivity(0.0)};
    expect_problem(work_out_wall(chain), Kind::invalid_input, "conductivity of the scale");
    chain = liner();
    chain.gas_film = film_coefficient(std::numeric_limits<double>::quiet_NaN());
    expect_problem(work_out_wall(chain), Kind::invalid_input, "gas film");
    chain = liner();
    chain.coolant_pressure = bar_absolute(0.3);
    expect_problem(work_out_wall(chain), Kind::not_found, "coolant pressure of 0.3 bar abs");
    chain.coolant_pressure = bar_absolute(1.5);
    chain.coolant = celsius(120.0);
    expect_problem(work_out_wall(chain), Kind::invalid_input, "above its boiling point");
}

} // namespace
} // namespace evenstroke
