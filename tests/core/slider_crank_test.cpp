// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/crank_forces.h"
#include "core/engine/even_motion.h"
#include "core/engine/slider_crank.h"
#include "tests/core/refusal.h"

#include <cmath>
#include <gtest/gtest.h>
#include <limits>
#include <type_traits>

namespace evenstroke {
namespace {

constexpr double pi = 3.14159265358979323846;
constexpr double not_a_number = std::numeric_limits<double>::quiet_NaN();

static_assert(std::is_same_v<decltype(Force{} * LengthPerAngle{}), Torque>, "F dx/dθ is a torque");

SliderCrank slow_two_stroke()
{
    return SliderCrank::make(0.6 * si::metres, 2.4 * si::metres, 2.46 * si::metres).value();
}

struct PositionRow
{
    double degrees, position, slope, volume, rod_degrees;
};
class SliderCrankTable : public testing::TestWithParam<PositionRow>
{
};

// Worked out separately from the stated equations, printed with nine decimals of m, m/rad and m³ and six of a
// degree: half of the last digit.
TEST_P(SliderCrankTable, AgreesWithASeparateCalculation)
{
    const SliderCrank gear = slow_two_stroke();
    const PositionRow& row = GetParam();
    const PistonPosition here = gear.at(crank_degrees(row.degrees)).value();
    EXPECT_NEAR(here.from_top.value(), row.position, 6e-10);
    EXPECT_NEAR(here.slope.value(), row.slope, 6e-10);
    EXPECT_NEAR(in_degrees(here.rod_angle), row.rod_degrees, 6e-7);
    EXPECT_NEAR(gear.volume_at(crank_degrees(row.degrees), 19.0).value().value(), row.volume, 6e-10);
}
INSTANTIATE_TEST_SUITE_P(SeparateCalculation, SliderCrankTable,
                         testing::Values(PositionRow{0, 0, 0, 0.037699112, 0},
                                         PositionRow{30, 0.235062073, 0.861364105, 0.104161347, 14.116981},
                                         PositionRow{40, 0.404804313, 1.074889258, 0.152154835, 18.273598},
                                         PositionRow{60, 0.830291499, 1.318880623, 0.272458502, 24.989453},
                                         PositionRow{90, 1.512536380, 1.2, 0.465358698, 29.196404},
                                         PositionRow{120, 2.030291499, 0.759580346, 0.611750509, 24.989453},
                                         PositionRow{180, 2.4, 0, 0.716283125, 0}));

TEST(SliderCrank, FollowedEvenlyIsWhatEachAngleGivesByItself)
{
    const SliderCrank gear = slow_two_stroke();
    const double first = -2.0 * pi + 0.0123, step = 0.1 * pi / 180.0;
    std::size_t followed = 0;
    follow_evenly(gear, first, step, 7200, [&](std::size_t i, const CrankMotion& crank) {
        const CrankMotion alone = gear.motion(first + static_cast<double>(i) * step);
        EXPECT_NEAR(crank.position, alone.position, 1e-13);
        EXPECT_NEAR(crank.slope, alone.slope, 1e-13);
        EXPECT_NEAR(crank.curvature, alone.curvature, 1e-13);
        EXPECT_EQ(i, followed++);
    });
    EXPECT_EQ(followed, 7200U);
}

TEST(SliderCrank, CompressionAndSpeedAgreeWithASeparateCalculation)
{
    const SliderCrank gear = slow_two_stroke();
    EXPECT_NEAR(gear.swept_volume().value(), 0.678584013, 6e-10);
    EXPECT_NEAR(gear.clearance_volume(19.0).value().value(), 0.0376991118, 6e-11);
    EXPECT_NEAR(gear.effective_compression_ratio(crank_degrees(-90.0), 19.0).value(), 12.344023, 6e-7);
    EXPECT_NEAR(gear.mean_piston_speed(per_minute(105.0)).value().value(), 8.4, 1e-12);
    const double omega = 2.0 * pi * 105.0 / 60.0;
    EXPECT_NEAR(omega * omega * gear.motion(0.0).curvature, 215.855470, 6e-7); // m/s², top
    EXPECT_NEAR(omega * omega * gear.motion(pi).curvature, -74.310899, 6e-7);  // bottom
}

TEST(SliderCrank, DerivativesAreThoseOfThePosition)
{
    const SliderCrank gear = slow_two_stroke();
    // Central differences of step h: truncation h²/6 times a derivative of a few metres, rounding 1e-16/h.
    const double h = 1e-5;
    for (int degree = -360; degree <= 360; degree += 7) {
        const double angle = degree * pi / 180.0;
        const CrankMotion before = gear.motion(angle - h), after = gear.motion(angle + h);
        EXPECT_NEAR(gear.motion(angle).slope, (after.position - before.position) / (2.0 * h), 1e-9) << degree;
        EXPECT_NEAR(gear.motion(angle).curvature, (after.slope - before.slope) / (2.0 * h), 1e-9) << degree;
    }
}

TEST(SliderCrank, KeepsItsDigitsNearDeadCentre)
{
    // x = r θ² (1 + r/ℓ) / 2 for small angles; the next term is smaller by θ², 1e-12.
    const SliderCrank gear = slow_two_stroke();
    const double expected = 0.5 * 1.2 * 1e-12 * (1.0 + 1.2 / 2.46);
    EXPECT_NEAR(gear.position(1e-6) / expected, 1.0, 1e-11);
}

TEST(SliderCrank, NamesTheSizeThatIsMissingOrImpossible)
{
    const Length bore = 0.6 * si::metres, stroke = 2.4 * si::metres, rod = 2.46 * si::metres, none{};
    using Kind = Problem::Kind;
    expect_problem(SliderCrank::make(none, stroke, rod), Kind::not_found,
                   "The bore of the engine is not known");
    expect_problem(SliderCrank::make(bore, none, rod), Kind::not_found, "stroke");
    expect_problem(SliderCrank::make(bore, stroke, none), Kind::not_found, "rod length");
    expect_problem(SliderCrank::make(bore, stroke, 1.2 * si::metres), Kind::invalid_input,
                   "not longer than half");
    expect_problem(SliderCrank::make(600.0 * si::metres, stroke, rod), Kind::invalid_input, "600000 mm");
    expect_problem(SliderCrank::make(-bore, stroke, rod), Kind::invalid_input, "-600 mm");
    expect_problem(SliderCrank::make(bore, not_a_number * si::metres, rod), Kind::invalid_input, "stroke");
    const SliderCrank gear = slow_two_stroke();
    expect_problem(gear.at(not_a_number * si::radians), Kind::invalid_input, "no number");
    expect_problem(gear.clearance_volume(1.0), Kind::invalid_input, "compression ratio of 1");
    expect_problem(gear.volume_at(crank_degrees(3.0), 0.0), Kind::invalid_input, "compression ratio of 0");
    expect_problem(gear.effective_compression_ratio(crank_degrees(-300.0), 19.0), Kind::invalid_input,
                   "-300°");
    expect_problem(gear.mean_piston_speed(per_minute(-1.0)), Kind::invalid_input, "-1 r/min");
}

CrankLoad load_of(double below_bar)
{
    return {bar_absolute(below_bar), std::nullopt, std::nullopt};
}

// Worked out separately from the stated equations; half of the last printed digit.
TEST(CrankForces, AgreeWithASeparateCalculation)
{
    const SliderCrank gear = slow_two_stroke();
    const CrankForces gas =
        crank_forces(gear, crank_degrees(15.0), bar_absolute(150.0), load_of(3.0)).value();
    EXPECT_NEAR(gas.piston.value() / 1e3, 4156.327, 5e-4);
    EXPECT_NEAR(gas.guide.value() / 1e3, 528.9825, 5e-5);
    EXPECT_NEAR(gas.turning_moment.value() / 1e3, 1904.0333, 5e-5);
    const CrankLoad heavy{bar_absolute(3.0), 6000.0 * si::kilograms, per_minute(105.0)};
    const CrankForces all = crank_forces(gear, crank_degrees(15.0), bar_absolute(150.0), heavy).value();
    EXPECT_NEAR(all.piston.value() / 1e3, 2938.310, 5e-4);
    EXPECT_NEAR(all.guide.value() / 1e3, 373.9635, 5e-5);
    EXPECT_NEAR(all.turning_moment.value() / 1e3, 1346.0540, 5e-5);
}

TEST(CrankForces, TurningMomentAgreesWithTheForceOnTheCrankPin)
{
    const SliderCrank gear = slow_two_stroke();
    const CrankLoad load{bar_absolute(3.0), 6000.0 * si::kilograms, per_minute(105.0)};
    const double largest = 5e6; // N m, the size of the moment of this cylinder
    for (int degree = -180; degree <= 180; degree += 3) {
        const double angle = degree * pi / 180.0;
        const AbsolutePressure pressure = bar_absolute(80.0 + 70.0 * std::cos(angle));
        const CrankForces here = crank_forces(gear, crank_degrees(degree), pressure, load).value();
        const double rod = gear.at(crank_degrees(degree)).value().rod_angle.value();
        const double by_pin = here.piston.value() * gear.radius() * std::sin(angle + rod) / std::cos(rod);
        EXPECT_NEAR(here.turning_moment.value() / largest, by_pin / largest, 1e-10) << degree;
    }
}

struct Card
{
    std::vector<double> angle, pressure;
};

/// p = p0 + a sin θ: the indicated work is π a A r for any rod, as the rod's part of dx/dθ cancels between θ
/// and π - θ.
Card sine_card(std::size_t points)
{
    Card card;
    for (std::size_t i = 0; i <= points; ++i) {
        card.angle.push_back(-pi + 2.0 * pi * static_cast<double>(i) / static_cast<double>(points));
        card.pressure.push_back(60e5 + 40e5 * std::sin(card.angle.back()));
    }
    return card;
}

TEST(CrankForces, MeanMomentOverACycleIsTheIndicatedWork)
{
    const SliderCrank gear = slow_two_stroke();
    const double work = pi * 40e5 * gear.area() * gear.radius();
    const Card card = sine_card(3600);
    const CrankLoad bare = load_of(3.0);
    const CrankLoad heavy{bar_absolute(3.0), 6000.0 * si::kilograms, per_minute(105.0)};
    for (const CrankLoad& load : {bare, heavy}) {
        const CrankForceCurve curve = crank_forces(gear, card.angle, card.pressure, load).value();
        EXPECT_EQ(curve.gas_force_only, !load.moving_mass.has_value());
        const double mean = mean_turning_moment(card.angle, curve.turning_moment).value().value();
        // A smooth periodic curve: the trapezoidal rule is good to rounding.
        EXPECT_NEAR(mean * 2.0 * pi / work, 1.0, 1e-11);
    }
}

TEST(CrankForces, NameTheSampleOrTheInputThatStandsInTheWay)
{
    const SliderCrank gear = slow_two_stroke();
    Card card = sine_card(8);
    using Kind = Problem::Kind;
    expect_problem(crank_forces(gear, card.angle, card.pressure, CrankLoad{}), Kind::not_found,
                   "below the piston");
    CrankLoad no_speed = load_of(3.0);
    no_speed.moving_mass = 6000.0 * si::kilograms;
    expect_problem(crank_forces(gear, card.angle, card.pressure, no_speed), Kind::not_found,
                   "speed is not known");
    expect_problem(crank_forces(gear, card.angle, card.pressure, load_of(0.0)), Kind::invalid_input,
                   "0 bar abs");
    card.pressure[2] = -1e5;
    expect_problem(crank_forces(gear, card.angle, card.pressure, load_of(3.0)), Kind::invalid_input,
                   "sample 3, has -1 bar abs at -90°");
    card.pressure.pop_back();
    expect_problem(crank_forces(gear, card.angle, card.pressure, load_of(3.0)), Kind::invalid_input,
                   "9 angles and 8 pressures");
    expect_problem(crank_forces(gear, crank_degrees(0.0), bar_absolute(not_a_number), load_of(3.0)),
                   Kind::invalid_input, "bar abs");
}

TEST(CrankForces, MeanMomentNeedsAWholeCycleOfRisingAngles)
{
    using Kind = Problem::Kind;
    const std::vector<double> half{0.0, 1.0, pi}, moment{1.0, 1.0, 1.0};
    expect_problem(mean_turning_moment(half, moment), Kind::invalid_input, "spans 180°");
    const std::vector<double> back{0.0, 2.0, 1.0, 2.0 * pi}, four{1.0, 1.0, 1.0, 1.0};
    expect_problem(mean_turning_moment(back, four), Kind::invalid_input, "Sample 3");
    expect_problem(mean_turning_moment(back, moment), Kind::invalid_input, "4 angles and 3 values");
    const std::vector<double> two_turns{0.0, 2.0 * pi, 4.0 * pi};
    EXPECT_DOUBLE_EQ(mean_turning_moment(two_turns, moment).value().value(), 1.0);
}

} // namespace
} // namespace evenstroke
