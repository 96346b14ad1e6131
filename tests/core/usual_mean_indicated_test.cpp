// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/usual_mean_indicated.h"

#include "tests/core/reading_maker.h"

#include <gtest/gtest.h>

namespace evenstroke::indicator {
namespace {

Engine six_cylinders()
{
    Engine engine;
    engine.cylinders = 6;
    return engine;
}

test::ReadingMaker at_load(double percent)
{
    return test::ReadingMaker().number("load_percent", percent);
}

TEST(UsualMeanIndicated, IsTheBaselinesWhereItSpeaksElseTheOtherCylinders)
{
    Engine engine = six_cylinders();
    auto maker = at_load(75.0);
    for (int cylinder = 1; cylinder <= 4; ++cylinder)
        maker.number("mean_indicated_pressure", 14.0 + 0.1 * cylinder, Place::cylinder(cylinder));
    const Reading reading = maker.done();
    const auto others = usual_mean_indicated(engine, reading, 4);
    ASSERT_TRUE(others.has_value());
    EXPECT_FALSE(others->of_baseline);
    EXPECT_NEAR(others->bar, 14.2, 1e-9) << "the middle of cylinders 1 to 3, without its own";
    engine.baseline = {{50.0, "", {{"mean_indicated_pressure", 12.0}}},
                       {75.0, "", {{"mean_indicated_pressure", 16.0}}}};
    const auto usual = usual_mean_indicated(engine, reading, 4);
    ASSERT_TRUE(usual.has_value());
    EXPECT_TRUE(usual->of_baseline);
    EXPECT_NEAR(usual->bar, 16.0, 1e-9) << "a point of the curve";
    EXPECT_FALSE(usual_mean_indicated(engine, at_load(20.0).done(), 4).has_value())
        << "the curve begins at 50 %";
    EXPECT_FALSE(usual_mean_indicated(six_cylinders(), at_load(75.0).done(), 4).has_value());
}

TEST(UsualMeanIndicated, AsksBelowHalfAndAboveTwice)
{
    const UsualMeanIndicated usual{16.0, true};
    EXPECT_TRUE(far_from(usual, 1.61));
    EXPECT_TRUE(far_from(usual, 161.0));
    EXPECT_FALSE(far_from(usual, 8.1));
    EXPECT_FALSE(far_from(usual, 31.9));
}

} // namespace
} // namespace evenstroke::indicator
