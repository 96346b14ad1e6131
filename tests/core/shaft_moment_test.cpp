// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/shaft_moment.h"
#include "tests/core/refusal.h"

#include <cmath>
#include <gtest/gtest.h>

namespace evenstroke {
namespace {

using Kind = Problem::Kind;
constexpr double pi = 3.14159265358979323846;

/// M = 1 + cos(harmonic θ) over one revolution from -180°.
CylinderMoment cosine(const std::string& name, double fires_at_degrees, int harmonic)
{
    CylinderMoment cylinder{name, crank_degrees(fires_at_degrees), {}, {}};
    for (int i = 0; i <= 3600; ++i) {
        const double angle = -pi + 2.0 * pi * i / 3600.0;
        cylinder.angle.push_back(angle);
        cylinder.moment.push_back(1.0 + std::cos(harmonic * angle));
    }
    return cylinder;
}

TEST(ShaftMoment, FiringAnglesFollowTheOrder)
{
    const std::vector<PlaneAngle> angles = even_firing_angles({1, 3, 4, 2}, 4, cycle_angle(false)).value();
    ASSERT_EQ(angles.size(), 4U);
    EXPECT_NEAR(in_degrees(angles[0]), 0.0, 1e-9);
    EXPECT_NEAR(in_degrees(angles[1]), 540.0, 1e-9);
    EXPECT_NEAR(in_degrees(angles[2]), 180.0, 1e-9);
    EXPECT_NEAR(in_degrees(angles[3]), 360.0, 1e-9);
}

TEST(ShaftMoment, OneCylinderIsItsOwnCurveMovedToItsFiringAngle)
{
    const ShaftMoment shaft = shaft_moment({cosine("1", 90.0, 1)}, cycle_angle(true)).value();
    ASSERT_EQ(shaft.angle.size(), 720U);
    EXPECT_NEAR(shaft.moment[180], 2.0, 1e-6); // at 90° of the shaft; straight lines between 0.1° lose 4e-7
    EXPECT_NEAR(shaft.moment[540], 0.0, 1e-6);
    EXPECT_NEAR(shaft.mean.value(), 1.0, 1e-6);
    EXPECT_NEAR(*shaft.variation, 2.0, 1e-6);
}

TEST(ShaftMoment, EvenFiringLeavesOnlyTheHarmonicsOfTheCylinderNumber)
{
    // Three cylinders: the first harmonic cancels, the third adds up.
    for (const int harmonic : {1, 3}) {
        std::vector<CylinderMoment> cylinders;
        for (int i = 0; i < 3; ++i) {
            cylinders.push_back(cosine(std::to_string(i + 1), 120.0 * i, harmonic));
        }
        const ShaftMoment shaft = shaft_moment(cylinders, cycle_angle(true)).value();
        EXPECT_NEAR(shaft.mean.value(), 3.0, 1e-5);
        EXPECT_NEAR(shaft.highest.value() - shaft.lowest.value(), harmonic == 3 ? 6.0 : 0.0, 1e-4);
    }
}

TEST(ShaftMoment, ASumWithoutOneCylinderIsNotKnown)
{
    std::vector<CylinderMoment> cylinders{cosine("1", 0.0, 1), CylinderMoment{"A2", {}, {}, {}}};
    expect_problem(shaft_moment(cylinders, cycle_angle(true)), Kind::not_found, "A2");
    expect_problem(shaft_moment({}, cycle_angle(true)), Kind::not_found, "any cylinder");
    expect_problem(shaft_moment({cosine("1", 0.0, 1)}, cycle_angle(false)), Kind::invalid_input,
                   "spans 360°");
    expect_problem(shaft_moment({cosine("1", 0.0, 1)}, crank_degrees(90.0)), Kind::invalid_input,
                   "cycle of 90°");
    expect_problem(shaft_moment({cosine("1", 0.0, 1)}, cycle_angle(true), 3), Kind::invalid_input,
                   "3 angles");
    cylinders = {cosine("1", 0.0, 1)};
    cylinders[0].angle[7] = 0.0;
    expect_problem(shaft_moment(cylinders, cycle_angle(true)), Kind::invalid_input, "Sample 9");
}

TEST(ShaftMoment, ZeroMeanHasNoVariation)
{
    CylinderMoment cylinder = cosine("1", 0.0, 1);
    for (double& moment : cylinder.moment) {
        moment = 0.0;
    }
    EXPECT_FALSE(shaft_moment({cylinder}, cycle_angle(true)).value().variation.has_value());
}

TEST(ShaftMoment, FiringOrderMustNameEachCylinderOnce)
{
    expect_problem(even_firing_angles({}, 4, cycle_angle(true)), Kind::not_found,
                   "firing order is not known");
    expect_problem(even_firing_angles({1, 2, 2, 4}, 4, cycle_angle(true)), Kind::invalid_input,
                   "4 cylinders once");
    expect_problem(even_firing_angles({1, 2}, 4, cycle_angle(true)), Kind::invalid_input, "4 cylinders once");
}

} // namespace
} // namespace evenstroke
