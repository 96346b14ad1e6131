// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/power.h"
#include "core/engine/propeller.h"

#include <gtest/gtest.h>

#include <limits>

namespace evenstroke {
namespace {

constexpr EngineKind two = EngineKind::two_stroke, four = EngineKind::four_stroke;

template <typename T> std::string refusal(const Result<T>& result)
{
    return result.has_value() ? std::string() : result.error().what_happened;
}

TEST(Power, NamesTheSpeedThatIsMissingBesideATorque)
{
    const auto power = shaft_power_from_torque(Torque::from_value(1e6), std::nullopt);
    ASSERT_FALSE(power.has_value());
    EXPECT_EQ(power.error().text(), "The shaft power is not known, because the speed is missing. Enter the speed.");
    EXPECT_EQ(refusal(shaft_torque(std::nullopt, per_minute(100.0))),
              "The torque is not known, because the shaft power is missing.");
}

TEST(Power, IsNotKnownFromWhatCannotBe)
{
    const Volume swept = swept_volume(0.6 * si::metres, 2.4 * si::metres).value();
    EXPECT_FALSE(swept_volume(0.0 * si::metres, 2.4 * si::metres).has_value());
    EXPECT_FALSE(indicated_power(two, bar_difference(18.0), swept, per_minute(0.0)).has_value());
    EXPECT_FALSE(mean_effective_pressure(two, kilowatts(9000.0), swept, 0, per_minute(100.0)).has_value());
    const auto not_finite = kilowatts(std::numeric_limits<double>::infinity());
    EXPECT_EQ(refusal(shaft_torque(not_finite, per_minute(100.0))),
              "The torque is not known, because the shaft power is no number.");
}

TEST(Power, OfAFourStrokeEngineIsHalfOfThatOfATwoStroke)
{
    const Volume swept = swept_volume(0.6 * si::metres, 2.4 * si::metres).value();
    const auto power = [&](EngineKind kind) {
        return indicated_power(kind, bar_difference(18.0), swept, per_minute(100.0)).value().value();
    };
    EXPECT_DOUBLE_EQ(power(two), 2.0 * power(four));
    // And there and back: the mean pressure of the indicated power is the one it was made from.
    EXPECT_NEAR(in_bar(mean_effective_pressure(four, Power::from_value(power(four)), swept, 1, per_minute(100.0)).value()),
                18.0, 1e-12);
}

TEST(Power, OfADraggedCylinderIsNegative)
{
    const Volume swept = swept_volume(0.6 * si::metres, 2.4 * si::metres).value();
    EXPECT_LT(indicated_power(two, bar_difference(-1.0), swept, per_minute(100.0)).value().value(), 0.0);
}

TEST(MechanicalEfficiency, IsNotKnownWhereTheShaftGivesClearlyMoreThanTheGas)
{
    EXPECT_NEAR(mechanical_efficiency(kilowatts(10100.0), kilowatts(10000.0)).value().value(), 1.01, 1e-12)
        << "two uncertain powers";
    EXPECT_FALSE(mechanical_efficiency(kilowatts(11100.0), kilowatts(10000.0)).has_value());
    EXPECT_FALSE(mechanical_efficiency(kilowatts(9000.0), kilowatts(0.0)).has_value());
}

TEST(Power, IsEstimatedFromTheIndicatedPowerOfATwoStrokeEngineOnly)
{
    const Volume swept = 0.5 * si::cubic_metres;
    // Friction of 1 bar: 1e5 Pa x 6 x 0.5 m³ x 2/s = 600 kW.
    EXPECT_NEAR(shaft_power_from_indicated(two, kilowatts(10000.0), swept, 6, per_minute(120.0)).value().value(), 9.4e6, 1e-6);
    EXPECT_FALSE(shaft_power_from_indicated(two, kilowatts(500.0), swept, 6, per_minute(120.0)).has_value());
    EXPECT_FALSE(shaft_power_from_indicated(four, kilowatts(10000.0), swept, 6, per_minute(120.0)).has_value());
}

TEST(Propeller, GoesThroughItsPointAndNamesWhatIsMissing)
{
    const PropellerPoint rating{kilowatts(12000.0), per_minute(105.0)};
    EXPECT_NEAR(light_running_margin(kilowatts(12000.0), per_minute(105.0), rating).value().value(), 0.0, 1e-12);
    EXPECT_LT(light_running_margin(kilowatts(12000.0), per_minute(103.0), rating).value().value(), 0.0) << "heavy";
    EXPECT_EQ(refusal(light_running_margin(kilowatts(9000.0), per_minute(95.0), {kilowatts(12000.0), {}})),
              "The light-running margin is not known, because the rated speed is missing.");
}

TEST(Slip, IsNotKnownAsternAtAStandstillOrWithoutAPitch)
{
    EXPECT_FALSE(apparent_slip(knots(-1.0), 5.0 * si::metres, per_minute(100.0)).has_value());
    EXPECT_FALSE(apparent_slip(knots(10.0), 5.0 * si::metres, per_minute(0.0)).has_value());
    EXPECT_NE(refusal(apparent_slip(knots(10.0), std::nullopt, per_minute(100.0))).find("pitch is missing"), std::string::npos);
    EXPECT_FALSE(real_slip(knots(10.0), 5.0 * si::metres, per_minute(100.0), Ratio(1.0)).has_value());
    EXPECT_DOUBLE_EQ(apparent_slip(knots(0.0), 5.0 * si::metres, per_minute(100.0)).value().value(), 1.0);
}

} // namespace
} // namespace evenstroke
