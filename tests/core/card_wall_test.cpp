// SPDX-License-Identifier: GPL-3.0-or-later
// Two cards and the gas side of a wall. Cards invented: p V^1.35 without combustion.
#include "core/card/card_wall.h"
#include "core/card/reading_conditions.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

#include <cmath>

namespace evenstroke::indicator {
namespace {

Engine slow_engine()
{
    Engine engine = example_engine();
    engine.bore = 0.6 * si::metres;
    engine.stroke = 2.4 * si::metres;
    engine.rod_length = 2.46 * si::metres;
    engine.compression_ratio = 19.0;
    engine.cylinder_closes_deg = -105.0;
    engine.cylinder_opens_deg = 118.0;
    return engine;
}

/// @param charge bar abs at the closing
Trace card_of(const Engine& engine, double charge)
{
    const SliderCrank gear = SliderCrank::make(engine.bore, engine.stroke, engine.rod_length).value();
    const double clearance = gear.clearance_volume(*engine.compression_ratio).value().value();
    const double closed = gear.volume(crank_degrees(-105.0).value(), clearance);
    Trace trace;
    for (int i = -360; i < 360; ++i) {
        const double degrees = 0.5 * i;
        trace.angle.push_back(degrees);
        trace.pressure.push_back(charge * std::pow(closed / gear.volume(crank_degrees(degrees).value(), clearance), 1.35));
    }
    return trace;
}

Conditions usual_conditions()
{
    Conditions conditions;
    conditions.speed = per_minute(105.0);
    conditions.charge_temperature = celsius(72.0);
    return conditions;
}

TEST(CardWall, TheSameCardMovesNothing)
{
    const Engine engine = slow_engine();
    const Trace card = card_of(engine, 3.5);
    const auto change = gas_side_change(engine, {card, usual_conditions()}, {card, usual_conditions()});
    ASSERT_TRUE(change.has_value()) << change.error().text();
    EXPECT_EQ(change.value().film_ratio, 1.0);
    EXPECT_EQ(change.value().gas_ratio, 1.0);
    EXPECT_NEAR(change.value().angle_covered, crank_degrees(223.0).value(), 0.02) << "from closing to opening";
}

// Woschni's film goes with p^0.8 at the same temperature and velocity; a card that is a tenth higher throughout has the
// temperatures of the other, as T = T1 p V / (p1 V1). Rounding only.
TEST(CardWall, AHigherChargeMakesTheFilmStrongerAndNotTheGasHotter)
{
    const Engine engine = slow_engine();
    const Trace healthy = card_of(engine, 3.5), now = card_of(engine, 3.85);
    const auto change = gas_side_change(engine, {now, usual_conditions()}, {healthy, usual_conditions()});
    ASSERT_TRUE(change.has_value()) << change.error().text();
    EXPECT_NEAR(change.value().film_ratio, std::pow(1.1, 0.8), 1e-6);
    EXPECT_NEAR(change.value().gas_ratio, 1.0, 1e-9);
}

TEST(CardWall, WhatIsMissingIsNamed)
{
    Engine engine = slow_engine();
    const Trace card = card_of(engine, 3.5);
    Conditions no_speed = usual_conditions();
    no_speed.speed.reset();
    EXPECT_NE(gas_side_change(engine, {card, no_speed}, {card, usual_conditions()}).error().what_happened.find("speed"), std::string::npos);
    engine.compression_ratio.reset();
    EXPECT_NE(gas_side_change(engine, {card, usual_conditions()}, {card, usual_conditions()}).error().what_happened.find("compression ratio"),
              std::string::npos);
}

TEST(CardConditions, ComeFromTheReading)
{
    const EngineRecord record = example_record(1);
    const Conditions conditions = conditions_at(record.engine, record.readings.front());
    EXPECT_TRUE(conditions.speed || conditions.scavenge_pressure) << "the example reads at least one of them";
    if (conditions.scavenge_pressure) {
        EXPECT_GT(conditions.scavenge_pressure->value(), 1e5) << "absolute";
    }
    Reading empty;
    const Conditions none = conditions_at(record.engine, empty);
    EXPECT_FALSE(none.speed || none.scavenge_pressure || none.charge_temperature);
}

} // namespace
} // namespace evenstroke::indicator
