// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/planimeter.h"
#include "tests/core/refusal.h"

#include <gtest/gtest.h>
#include <limits>
#include <vector>

namespace evenstroke {
namespace {

using Kind = Problem::Kind;

// Worked out separately: 850 mm² / (70 mm x 0.6 mm/bar); hold to 1e-6 bar.
TEST(Planimeter, AgreesWithASeparateCalculation)
{
    const PressureDifference mean =
        planimeter_pressure(Area::from_value(850e-6), millimetres(70.0), spring_of_millimetres_per_bar(0.6))
            .value();
    EXPECT_NEAR(in_bar(mean), 20.238095, 1e-6);
}

TEST(Planimeter, ALoopThatRunsBackwardsCountsNegative)
{
    const IndicatorSpring spring = spring_of_bar_per_millimetre(1.0);
    EXPECT_NEAR(in_bar(planimeter_pressure(Area::from_value(-70e-6), millimetres(70.0), spring).value()),
                -1.0, 1e-12);
}

TEST(Planimeter, NamesWhatIsMissingOrImpossible)
{
    const Area area = Area::from_value(850e-6);
    const IndicatorSpring spring = spring_of_bar_per_millimetre(1.0);
    expect_problem(planimeter_pressure(area, millimetres(70.0), IndicatorSpring{}), Kind::not_found,
                   "spring");
    expect_problem(planimeter_pressure(area, millimetres(70.0), -spring), Kind::invalid_input, "-1 bar/mm");
    expect_problem(planimeter_pressure(area, Length{}, spring), Kind::not_found, "length of the card");
    expect_problem(planimeter_pressure(area, 70.0 * si::metres, spring), Kind::invalid_input,
                   "70000 mm long");
    expect_problem(planimeter_pressure(850.0 * si::square_metres, millimetres(70.0), spring),
                   Kind::invalid_input, "area of the card");
    expect_problem(planimeter_pressure(area, millimetres(10.0), 10.0 * spring), Kind::invalid_input,
                   "850 bar");
    std::vector<Length> heights(4, millimetres(10.0));
    expect_problem(mid_ordinate_pressure(heights, spring), Kind::invalid_input, "4 heights");
    heights.push_back(std::numeric_limits<double>::quiet_NaN() * si::metres);
    expect_problem(mid_ordinate_pressure(heights, spring), Kind::invalid_input, "Height 5");
    expect_problem(mid_ordinate_pressure(heights, IndicatorSpring{}), Kind::not_found, "spring");
}

} // namespace
} // namespace evenstroke
