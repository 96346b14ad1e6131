// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/planimeter.h"

#include <gtest/gtest.h>
#include <string>
#include <vector>

/// Published cards. Where a public companion of solved examples was read, the book itself was not opened.
namespace evenstroke {
namespace {

struct CardExample
{
    std::string source;
    double area_mm2, length_mm, bar_per_mm;
    double bar, tolerance;
};
class PlanimeterPublished : public testing::TestWithParam<CardExample>
{
};

// Tolerance: half of the last printed digit.
TEST_P(PlanimeterPublished, AgreesWithTheRecordedAnswer)
{
    const CardExample& card = GetParam();
    const Result<PressureDifference> mean =
        planimeter_pressure(Area::from_value(card.area_mm2 * 1e-6), millimetres(card.length_mm),
                            spring_of_bar_per_millimetre(card.bar_per_mm));
    ASSERT_TRUE(mean.has_value());
    EXPECT_NEAR(in_bar(mean.value()), card.bar, card.tolerance) << card.source;
}
INSTANTIATE_TEST_SUITE_P(Textbooks, PlanimeterPublished,
                         testing::Values(
                             // R. K. Rajput, A Textbook of Internal Combustion Engines, 2nd ed. 2007.
                             CardExample{"Rajput 17.33, page 591", 300, 40, 1.0, 7.50, 0.005},
                             CardExample{"Rajput 17.35, page 593", 550, 72, 0.8, 6.111, 0.0005},
                             CardExample{"Rajput 17.44, page 601", 465, 60, 0.6, 4.65, 0.005},
                             // Onkar Singh, Applied Thermodynamics: springs of 20 and 150 MN/m² per metre.
                             // The second is not realistic.
                             CardExample{"Singh, page 790", 3000, 72, 0.2, 8.333, 0.0005},
                             CardExample{"Singh, page 791", 4000, 80, 1.5, 75.0, 0.05}));

// Steam Engines (public-domain textbook), chapter on the indicator: 2.6 in², 3.6 in, 60-lb spring gives 43.3
// psi.
TEST(PlanimeterPublished, AgreesInInchesAndPounds)
{
    const Area area = Area::from_value(2.6 * 0.0254 * 0.0254);
    const PressureDifference mean =
        planimeter_pressure(area, millimetres(3.6 * 25.4), spring_of_psi_per_inch(60.0)).value();
    EXPECT_NEAR(mean.value() / 6894.757293168361, 43.3, 0.05);
}

// D. A. Taylor, Introduction to Marine Engineering, appendix: ten mid-ordinates that sum to 129 mm, 65
// kPa/mm, mean 838.5 kPa. Only the sum is given: ten equal heights stand for it.
TEST(MidOrdinatePublished, AgreesWithTaylor)
{
    const std::vector<Length> heights(10, millimetres(12.9));
    EXPECT_NEAR(mid_ordinate_pressure(heights, spring_of_bar_per_millimetre(0.65)).value().value() / 1000.0,
                838.5, 1e-6);
}

// Rayner Joel, Basic Engineering Thermodynamics, 5th ed., 17.1, page 589: 21 mm at 27 kPa/mm, 14 litres, 6.6
// rev/s, four-stroke: 26.2 kW.
TEST(MidOrdinatePublished, AgreesWithJoel17Point1)
{
    const std::vector<Length> heights(5, millimetres(21.0));
    const double pascal = mid_ordinate_pressure(heights, spring_of_bar_per_millimetre(0.27)).value().value();
    EXPECT_NEAR(pascal * 0.014 * 6.6 / 2.0 / 1000.0, 26.2, 0.05);
}

} // namespace
} // namespace evenstroke
