// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/load_diagram.h"
#include "tests/core/refusal.h"

#include <cmath>
#include <gtest/gtest.h>
#include <limits>

namespace evenstroke {
namespace {

using Kind = Problem::Kind;

LoadLimits invented_limits()
{
    LoadLimits limits;
    limits.mean_effective_pressure = 1.0;
    limits.torque_exponent = 2.0;
    limits.torque_below_speed = 0.95;
    limits.highest_speed = 1.05;
    limits.overload = 1.10;
    limits.light_running_margin = 0.05;
    limits.source = "invented";
    return limits;
}

LoadDiagram diagram(const LoadLimits& limits = invented_limits())
{
    return LoadDiagram::make(kilowatts(10000.0), per_minute(100.0), limits).value();
}

LoadState at(double power_percent, double speed_percent, const LoadDiagram& of = diagram())
{
    return of.locate(kilowatts(100.0 * power_percent), per_minute(speed_percent)).value();
}

TEST(LoadDiagram, DistanceIsThatToTheNearestLimitAtTheSameSpeed)
{
    const LoadState state = at(75.0, 90.0);
    ASSERT_EQ(state.margins.size(), 4U);
    EXPECT_EQ(state.margins[0].limit, LoadLimit::torque_and_speed);
    EXPECT_NEAR(state.margins[0].power_percent, 81.0 - 75.0, 1e-9);
    EXPECT_EQ(state.margins[1].limit, LoadLimit::mean_effective_pressure);
    EXPECT_NEAR(state.margins[1].power_percent, 90.0 - 75.0, 1e-9);
    EXPECT_EQ(state.margins[2].limit, LoadLimit::power);
    EXPECT_NEAR(state.margins[2].power_percent, 25.0, 1e-9);
    EXPECT_EQ(state.margins[3].limit, LoadLimit::speed);
    EXPECT_NEAR(state.margins[3].power_percent, 75.0 * (std::pow(1.05 / 0.9, 3.0) - 1.0), 1e-9);
    EXPECT_FALSE(state.beyond);
    EXPECT_EQ(state.sentence,
              "At 90 % speed and 75 % power the engine is 6 % of rated power below the torque and "
              "speed limit, the nearest.");
}

TEST(LoadDiagram, SaysWhichLimitIsExceededAndThatTimeIsLimited)
{
    const LoadState heavy = at(85.0, 90.0);
    EXPECT_TRUE(heavy.beyond);
    EXPECT_FALSE(heavy.within_overload);
    EXPECT_EQ(heavy.sentence,
              "At 90 % speed and 85 % power the engine is 4 % of rated power above the torque and "
              "speed limit: permitted only for a limited time, see the maker's instructions.");
    const LoadState fast = at(80.0, 107.0);
    EXPECT_TRUE(fast.beyond);
    EXPECT_EQ(fast.margins.front().limit, LoadLimit::speed);
    EXPECT_NEAR(fast.margins.front().power_percent, 80.0 * (std::pow(1.05 / 1.07, 3.0) - 1.0), 1e-9);
}

TEST(LoadDiagram, TellsOverloadFromWhatIsBeyondIt)
{
    const LoadState overload = at(103.0, 104.0);
    EXPECT_TRUE(overload.beyond);
    EXPECT_TRUE(overload.within_overload);
    EXPECT_NE(overload.sentence.find("permitted only for a limited time"), std::string::npos)
        << overload.sentence;
    EXPECT_NE(at(112.0, 104.0).sentence.find("beyond its overload of 110 %"), std::string::npos);
    LoadLimits without = invented_limits();
    without.overload.reset();
    EXPECT_NE(at(103.0, 104.0, diagram(without)).sentence.find("no overload is entered"), std::string::npos);
}

TEST(LoadDiagram, ExactlyAtTheRatingIsWithin)
{
    EXPECT_FALSE(at(100.0, 100.0).beyond);
    EXPECT_NEAR(at(100.0, 100.0).margins.front().power_percent, 0.0, 1e-9);
}

TEST(LoadDiagram, KnowsOnlyTheLimitsThatWereEntered)
{
    const LoadDiagram bare = diagram(LoadLimits{});
    const LoadState state = at(90.0, 70.0, bare);
    ASSERT_EQ(state.margins.size(), 1U);
    EXPECT_EQ(state.margins[0].limit, LoadLimit::power);
    EXPECT_FALSE(bare.light_curve(0.9).has_value());
    EXPECT_FALSE(bare.mean_effective_pressure_limit(0.9).has_value());
    EXPECT_FALSE(bare.torque_and_speed_limit(0.9).has_value());
    EXPECT_DOUBLE_EQ(*bare.highest_power(0.9), 1.0);
}

TEST(LoadDiagram, AGeneratingSetHasNoDistanceToItsSpeedLimit)
{
    LoadLimits limits;
    limits.highest_speed = 1.02;
    limits.constant_speed = true;
    EXPECT_EQ(at(90.0, 100.0, diagram(limits)).margins.size(), 1U);
    EXPECT_EQ(at(90.0, 103.0, diagram(limits)).margins.front().limit, LoadLimit::speed);
}

TEST(LoadDiagram, CurvesFollowTheirEquations)
{
    const LoadDiagram of = diagram();
    EXPECT_DOUBLE_EQ(LoadDiagram::propeller_curve(0.9), 0.9 * 0.9 * 0.9);
    EXPECT_DOUBLE_EQ(*of.light_curve(1.05), 1.0);
    EXPECT_DOUBLE_EQ(*of.mean_effective_pressure_limit(0.8), 0.8);
    EXPECT_DOUBLE_EQ(*of.torque_and_speed_limit(0.5), 0.25);
    EXPECT_FALSE(of.torque_and_speed_limit(0.95).has_value());
    EXPECT_DOUBLE_EQ(*of.highest_power(0.5), 0.25);
    EXPECT_DOUBLE_EQ(*of.highest_power(0.97), 0.97);
    EXPECT_DOUBLE_EQ(*of.highest_power(1.04), 1.0);
    EXPECT_FALSE(of.highest_power(1.06).has_value());
}

TEST(LoadDiagram, NamesWhatIsMissingOrImpossible)
{
    const LoadLimits none;
    expect_problem(LoadDiagram::make(Power{}, per_minute(100.0), none), Kind::not_found, "rated power");
    expect_problem(LoadDiagram::make(kilowatts(1.0), Frequency{}, none), Kind::not_found, "rated speed");
    expect_problem(LoadDiagram::make(kilowatts(-1.0), per_minute(100.0), none), Kind::invalid_input, "-1 kW");
    LoadLimits limits;
    limits.torque_exponent = 2.0;
    expect_problem(LoadDiagram::make(kilowatts(1.0), per_minute(1.0), limits), Kind::not_found,
                   "speed below which the torque");
    limits = {};
    limits.highest_speed = 105.0;
    expect_problem(LoadDiagram::make(kilowatts(1.0), per_minute(1.0), limits), Kind::invalid_input,
                   "highest speed of the load diagram is 105");
    limits.highest_speed = std::numeric_limits<double>::quiet_NaN();
    expect_problem(LoadDiagram::make(kilowatts(1.0), per_minute(1.0), limits), Kind::invalid_input,
                   "highest speed");
    const LoadDiagram of = diagram();
    expect_problem(of.locate(std::nullopt, per_minute(90.0)), Kind::not_found, "power of the engine");
    expect_problem(of.locate(kilowatts(5000.0), std::nullopt), Kind::not_found, "speed of the engine");
    expect_problem(of.locate(kilowatts(5000.0), Frequency{}), Kind::invalid_input, "0 r/min");
    expect_problem(of.locate(kilowatts(50000.0), per_minute(90.0)), Kind::invalid_input, "50000 kW");
}

} // namespace
} // namespace evenstroke
