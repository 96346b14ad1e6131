// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/baseline.h"
#include "core/engine/engine.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

#include <cmath>

using namespace evenstroke;

namespace {

std::string refusal(const Engine& engine)
{
    const auto problem = find_problem(engine);
    return problem ? problem->text() : std::string();
}

} // namespace

TEST(EngineParticulars, AnOrdinaryEngineIsTaken) { EXPECT_EQ(refusal(example_engine()), ""); }

TEST(EngineParticulars, RefusesWhatCannotBeAndNamesIt)
{
    Engine engine = example_engine();
    engine.cylinders = 0;
    EXPECT_NE(refusal(engine).find("0 cylinders"), std::string::npos);
    engine = example_engine();
    engine.bore = millimetres(-600.0);
    EXPECT_NE(refusal(engine).find("bore is -600 mm"), std::string::npos);
    engine = example_engine();
    engine.rod_length = millimetres(1199.0); // the crank is half of 2400 mm
    EXPECT_NE(refusal(engine).find("1199 mm long, shorter than the crank of 1200 mm"), std::string::npos);
    engine = example_engine();
    engine.compression_ratio = 1.0;
    EXPECT_NE(refusal(engine).find("compression ratio is 1;"), std::string::npos);
    engine = example_engine();
    engine.rated_power = kilowatts(std::nan(""));
    EXPECT_NE(refusal(engine).find("rated_power"), std::string::npos);
}

TEST(EngineParticulars, RefusesABaselineWhoseLoadsDoNotIncreaseWithinAMode)
{
    Engine engine = example_engine();
    engine.baseline.push_back({75.0, "", {}});
    EXPECT_NE(refusal(engine).find("75 % comes after 100 %"), std::string::npos);
    engine = example_engine();
    engine.baseline.push_back({50.0, "gas", {}}); // another mode begins anew
    EXPECT_EQ(refusal(engine), "");
}

TEST(EngineParticulars, CylindersAreFoundByNumberAndByName)
{
    Engine engine = example_engine();
    EXPECT_EQ(engine.find_cylinder("4"), 4);
    EXPECT_FALSE(engine.find_cylinder("7"));
    EXPECT_FALSE(engine.find_cylinder("0"));
    EXPECT_FALSE(engine.find_cylinder("4a"));
    engine.cylinder_names = {"A1", "A2", "A3", "B1", "B2", "B3"};
    EXPECT_EQ(engine.find_cylinder("B1"), 4);
    EXPECT_EQ(engine.cylinder_name(4), "B1");
}

TEST(BaselineCurves, HoldTheEndForFivePerCentOfLoadAndKnowNothingBeyond)
{
    const BaselineCurve curve({50, 75, 100}, {100, 120, 150});
    EXPECT_EQ(curve.at(45.0), 100.0);
    EXPECT_FALSE(curve.at(44.99));
    EXPECT_EQ(curve.at(105.0), 150.0);
    EXPECT_FALSE(curve.at(105.01));
    EXPECT_FALSE(curve.at(std::nan("")));
}

TEST(BaselineCurves, NeverLeaveTheValuesOfTheTwoPointsBesideThem)
{
    const BaselineCurve curve({25, 50, 75, 100}, {50, 120, 120, 170});
    for (double load = 50.0; load <= 75.0; load += 0.5)
        EXPECT_DOUBLE_EQ(*curve.at(load), 120.0) << load;
    for (double load = 25.0; load < 100.0; load += 0.5)
        EXPECT_LE(*curve.at(load), *curve.at(load + 0.5) + 1e-11) << load; // rounding of sums near 120
}

TEST(BaselineCurves, OnePointIsKnownNearItsLoadOnly)
{
    const BaselineCurve curve({75}, {120});
    EXPECT_EQ(curve.at(78.0), 120.0);
    EXPECT_FALSE(curve.at(81.0));
}

TEST(BaselineCurves, NeverAcrossAChangeOfMode)
{
    Engine engine = example_engine();
    engine.baseline.push_back({60.0, "gas", {{"maximum_pressure", 99.0}}});
    const Baseline baseline(engine);
    EXPECT_EQ(baseline.curve("gas", "maximum_pressure")->at(60.0), 99.0);
    EXPECT_FALSE(baseline.curve("gas", "maximum_pressure")->at(75.0));
    EXPECT_EQ(baseline.curve("steam", "maximum_pressure"), nullptr);
    EXPECT_FALSE(baseline.covers("gas", 75.0));
    EXPECT_TRUE(baseline.covers("", 75.0));
}
