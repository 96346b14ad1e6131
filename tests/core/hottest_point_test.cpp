// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/hottest_point.h"
#include "tests/core/refusal.h"

#include <cmath>
#include <gtest/gtest.h>
#include <limits>
#include <random>

namespace evenstroke {
namespace {

using Kind = Problem::Kind;

UncertainTemperature known(double degrees, std::optional<double> half_width = std::nullopt)
{
    UncertainTemperature result;
    result.value = celsius(degrees);
    if (half_width) {
        result.half_width = kelvin_difference(*half_width);
    }
    return result;
}

WithUncertainty<double> ratio(double value, std::optional<double> half_width = std::nullopt)
{
    WithUncertainty<double> result;
    result.value = value;
    result.half_width = half_width;
    return result;
}

HottestPointInputs as_the_baseline()
{
    HottestPointInputs inputs;
    inputs.coolant = inputs.baseline_coolant = known(80.0);
    inputs.gas = inputs.baseline_gas = known(900.0);
    inputs.baseline_wall = known(245.0);
    inputs.film_ratio = ratio(1.0);
    return inputs;
}

// Inputs invented, worked out separately: 80 + (245 - 80) 1.12.
TEST(HottestPoint, FollowsAGivenFluxRatio)
{
    EXPECT_NEAR(
        in_celsius(hottest_point_at_flux_ratio(celsius(80.0), celsius(245.0), celsius(80.0), 1.12).value()),
        264.8, 1e-9);
}

TEST(HottestPoint, IsTheBaselineWhereNothingHasChanged)
{
    const HottestPoint point = hottest_point(as_the_baseline()).value();
    EXPECT_NEAR(in_celsius(point.wall), 245.0, 1e-9);
    EXPECT_NEAR(point.flux_ratio, 1.0, 1e-12);
    EXPECT_FALSE(point.half_width.has_value());
    EXPECT_FALSE(point.half_width_complete);
}

TEST(HottestPoint, SolvesBothEquationsAtOnce)
{
    HottestPointInputs inputs = as_the_baseline();
    inputs.coolant = known(75.0);
    inputs.gas = known(960.0);
    inputs.film_ratio->value = 1.15;
    const HottestPoint point = hottest_point(inputs).value();
    const double wall = in_celsius(point.wall);
    EXPECT_NEAR(point.flux_ratio, 1.15 * (960.0 - wall) / (900.0 - 245.0), 1e-12);
    const Temperature again =
        hottest_point_at_flux_ratio(celsius(75.0), celsius(245.0), celsius(80.0), point.flux_ratio).value();
    EXPECT_NEAR(in_celsius(again), wall, 1e-9);
}

TEST(HottestPoint, UncertaintyIsThatOfManyDraws)
{
    HottestPointInputs inputs = as_the_baseline();
    inputs.coolant = known(82.0, 3.0);
    inputs.gas = known(930.0, 60.0);
    inputs.baseline_wall = known(245.0, 10.0);
    inputs.baseline_coolant = known(80.0, 3.0);
    inputs.baseline_gas = known(900.0, 60.0);
    inputs.film_ratio = ratio(1.08, 0.10);
    const HottestPoint point = hottest_point(inputs).value();
    ASSERT_TRUE(point.half_width.has_value());
    EXPECT_TRUE(point.half_width_complete);

    std::mt19937 engine(20240607); // fixed, so that the test is the same on each run
    std::normal_distribution<double> normal;
    const auto draw = [&](const UncertainTemperature& t) {
        return known(in_celsius(t.value) + 0.5 * t.half_width->value() * normal(engine));
    };
    double sum = 0.0, squares = 0.0;
    const int draws = 20000;
    for (int i = 0; i < draws; ++i) {
        HottestPointInputs drawn;
        drawn.coolant = draw(*inputs.coolant);
        drawn.gas = draw(*inputs.gas);
        drawn.baseline_wall = draw(*inputs.baseline_wall);
        drawn.baseline_coolant = draw(*inputs.baseline_coolant);
        drawn.baseline_gas = draw(*inputs.baseline_gas);
        drawn.film_ratio = ratio(1.08 + 0.05 * normal(engine));
        const double wall = in_celsius(hottest_point(drawn).value().wall);
        sum += wall;
        squares += wall * wall;
    }
    const double mean = sum / draws;
    const double spread = std::sqrt(squares / draws - mean * mean);
    // The spread of 20000 draws is itself uncertain by 0.5 %; three times that and 1 % for what is not
    // linear.
    EXPECT_NEAR(point.half_width->value() / (2.0 * spread), 1.0, 0.025);
}

TEST(HottestPoint, OneThermometerOnBothCoolantsSlipsOnceForBoth)
{
    HottestPointInputs inputs = as_the_baseline();
    inputs.coolant = known(80.0, 3.0);
    inputs.baseline_coolant = known(80.0, 3.0);
    const double apart = hottest_point(inputs).value().half_width->value();
    inputs.coolant->instrument = inputs.baseline_coolant->instrument = 1;
    const double together = hottest_point(inputs).value().half_width->value();
    // At the baseline's own state k = 165/655: dT/dT_w = 1/(1 + k), dT/dT_w,base = -1/(1 + k). Both cancel.
    EXPECT_NEAR(apart, 3.0 * std::sqrt(2.0) * 655.0 / 820.0, 1e-4);
    EXPECT_NEAR(together, 0.0, 1e-4);
}

TEST(HottestPoint, SaysWhenNotEveryInputHasAnUncertainty)
{
    HottestPointInputs inputs = as_the_baseline();
    inputs.baseline_wall = known(245.0, 5.0);
    const HottestPoint point = hottest_point(inputs).value();
    ASSERT_TRUE(point.half_width.has_value());
    EXPECT_FALSE(point.half_width_complete);
    EXPECT_NE(judge_wall(point).sentence.find("± at least"), std::string::npos) << judge_wall(point).sentence;
}

TEST(HottestPoint, NamesTheInputThatStandsInTheWay)
{
    HottestPointInputs inputs = as_the_baseline();
    inputs.baseline_gas.reset();
    expect_problem(hottest_point(inputs), Kind::not_found,
                   "mean gas temperature of the baseline is not known");
    inputs = as_the_baseline();
    inputs.film_ratio.reset();
    expect_problem(hottest_point(inputs), Kind::not_found, "ratio of the gas films is not known");
    inputs = as_the_baseline();
    inputs.baseline_wall = known(60.0);
    expect_problem(hottest_point(inputs), Kind::invalid_input, "does not lie between");
    inputs = as_the_baseline();
    inputs.gas = known(70.0);
    expect_problem(hottest_point(inputs), Kind::invalid_input, "not hotter than the coolant");
    inputs = as_the_baseline();
    inputs.film_ratio->value = 9.0;
    expect_problem(hottest_point(inputs), Kind::not_found, "gas film against the baseline is 9");
    inputs = as_the_baseline();
    inputs.coolant = known(80.0, -1.0);
    expect_problem(hottest_point(inputs), Kind::invalid_input, "half-width of the coolant temperature is -1");
    inputs.coolant = known(std::numeric_limits<double>::quiet_NaN());
    expect_problem(hottest_point(inputs), Kind::invalid_input, "coolant temperature is");
    expect_problem(hottest_point_at_flux_ratio(celsius(80.0), celsius(245.0), celsius(80.0), 8.0),
                   Kind::not_found, "heat flux");
    expect_problem(hottest_point_at_flux_ratio(celsius(80.0), celsius(70.0), celsius(80.0), 1.0),
                   Kind::invalid_input, "not hotter than its coolant");
}

HottestPoint estimate(double degrees, std::optional<double> half_width)
{
    HottestPoint point;
    point.wall = celsius(degrees);
    if (half_width) {
        point.half_width = kelvin_difference(*half_width);
        point.half_width_complete = true;
    }
    return point;
}

TEST(WallWarning, TellsSureFromPossibleOnBothSides)
{
    const WallLimits limits{celsius(300.0), celsius(130.0)};
    EXPECT_EQ(judge_wall(estimate(320.0, 10.0), limits).verdict, WallVerdict::too_hot);
    EXPECT_EQ(judge_wall(estimate(295.0, 10.0), limits).verdict, WallVerdict::may_be_too_hot);
    EXPECT_EQ(judge_wall(estimate(250.0, 10.0), limits).verdict, WallVerdict::within);
    EXPECT_EQ(judge_wall(estimate(125.0, 10.0), limits).verdict, WallVerdict::may_be_too_cold);
    EXPECT_EQ(judge_wall(estimate(110.0, 10.0), limits).verdict, WallVerdict::too_cold);
    EXPECT_EQ(judge_wall(estimate(250.0, 10.0), {std::nullopt, std::nullopt}).verdict,
              WallVerdict::no_limits);
    EXPECT_EQ(judge_wall(estimate(295.0, 10.0), limits).sentence,
              "The hottest point is estimated at 295 °C ± 10 °C, and may be above 300 °C: cast iron weakens "
              "and the "
              "oil film deteriorates there.");
    EXPECT_EQ(judge_wall(estimate(250.0, std::nullopt)).sentence,
              "The hottest point is estimated at 250 °C (uncertainty not known), not above 300 °C.");
}

} // namespace
} // namespace evenstroke
