// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/core/card_simulator.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

SimulatedCase quiet_case()
{
    SimulatedCase what;
    what.noise = 0.1;
    what.fuel_kg = 0.05;
    what.start = -1.0;
    return what;
}

Evaluation evaluated(const SimulatedCase& what, unsigned seed = 5)
{
    Dice dice(seed);
    const SimulatedCard card = simulate(what, dice);
    return evaluate(card.engine, card.conditions, card.trace).value();
}

const Remark* find(const Evaluation& card, std::string_view code)
{
    const auto found = std::find_if(card.remarks.begin(), card.remarks.end(), [&](const Remark& r) { return r.code == code; });
    return found == card.remarks.end() ? nullptr : &*found;
}

} // namespace

TEST(CardRemarks, ASoundCardHasNone)
{
    const Evaluation card = evaluated(quiet_case());
    for (const Remark& remark : card.remarks)
        ADD_FAILURE() << remark.code << ": " << remark.text;
    for (std::size_t i = 0; i < result_count; ++i) {
        ASSERT_TRUE(card.results[i]) << describe(static_cast<CardResult>(i)).key;
        EXPECT_GT(*card.results[i]->half_width, 0.0);
    }
    EXPECT_EQ(card.method, CalibrationMethod::energy_balance);
    EXPECT_EQ(card.line_angle.size(), card.line_pressure.size());
    EXPECT_GT(card.line_angle.size(), 50u);
}

TEST(CardRemarks, AMissingFireIsSaidAndGivesTheBestDeadCentre)
{
    SimulatedCase what = quiet_case();
    what.fired = false;
    what.fuel_kg = 0.0;
    what.offset = 0.8;
    const Evaluation card = evaluated(what);
    EXPECT_TRUE(find(card, "no_combustion"));
    EXPECT_EQ(card.method, CalibrationMethod::unfired_cycle);
    EXPECT_NEAR(card[CardResult::offset]->value, 0.8, 0.04); // 90 % within 0.02 to 0.04°
    EXPECT_FALSE(card[CardResult::start_of_combustion]);
    EXPECT_FALSE(card[CardResult::ca50]);
}

TEST(CardRemarks, LateCombustionIsCalledLate)
{
    SimulatedCase what = quiet_case();
    what.start = 12.0;
    const Evaluation card = evaluated(what);
    EXPECT_TRUE(find(card, "combustion_late") || find(card, "maximum_not_from_combustion"));
    EXPECT_FALSE(find(card, "combustion_early"));
}

TEST(CardRemarks, AWrongCompressionRatioIsCalledDoubtfulAndKeepsItsIntervals)
{
    SimulatedCase what = quiet_case();
    what.ratio_error = -0.05;
    const Evaluation card = evaluated(what);
    EXPECT_TRUE(find(card, "geometry_or_zero_doubtful"));
    EXPECT_NEAR(card[CardResult::offset]->value, 0.0, *card[CardResult::offset]->half_width);
}

TEST(CardRemarks, AHeavyDripIsLateHeat)
{
    SimulatedCase what = quiet_case();
    what.late_share = 0.3;
    what.late_start = 60.0;
    EXPECT_TRUE(find(evaluated(what), "late_heat"));
}

TEST(CardRemarks, SpikesAreTakenOutAndCounted)
{
    SimulatedCase what = quiet_case();
    what.spikes = 4;
    const Evaluation card = evaluated(what);
    ASSERT_TRUE(find(card, "spikes_removed"));
    EXPECT_GE(card.trace.spikes, 3); // one in the steep rise may pass for pressure
    EXPECT_LE(card.trace.spikes, 4);
    const Evaluation sound = evaluated(quiet_case());
    EXPECT_NEAR(card[CardResult::maximum_pressure]->value, sound[CardResult::maximum_pressure]->value, 0.1);
}

TEST(CardRemarks, SingleMissingSamplesAreBridged)
{
    SimulatedCase what = quiet_case();
    what.missing = 40;
    const Evaluation card = evaluated(what), sound = evaluated(quiet_case());
    EXPECT_NEAR(card[CardResult::mean_indicated_pressure]->value, sound[CardResult::mean_indicated_pressure]->value, 0.02);
}

TEST(CardRemarks, ARingingPassageIsNamedWithItsFrequency)
{
    SimulatedCase what = quiet_case();
    what.engine.speed_rpm = 105.0;
    what.premixed = 0.25; // a sharp start makes it ring
    what.passage_hz = 120.0;
    what.passage_damping = 0.03;
    const Evaluation card = evaluated(what);
    const Remark* ringing = find(card, "passage_resonance");
    ASSERT_TRUE(ringing);
    EXPECT_NE(ringing->text.find("Hz"), std::string::npos);
}

TEST(CardRemarks, ACycleThatDidNotFireIsNamed)
{
    Dice dice(3);
    SimulatedCase what = quiet_case();
    what.cycles = 5;
    SimulatedCard card = simulate(what, dice);
    what.fired = false;
    what.cycles = 1;
    const SimulatedCard unfired = simulate(what, dice);
    const std::size_t samples = unfired.trace.pressure.size();
    std::copy(unfired.trace.pressure.begin(), unfired.trace.pressure.end(),
              card.trace.pressure.begin() + static_cast<std::ptrdiff_t>(2 * samples));
    const Evaluation found = evaluate(card.engine, card.conditions, card.trace).value();
    const Remark* misfire = find(found, "misfire");
    ASSERT_TRUE(misfire);
    EXPECT_NE(misfire->text.find("Cycle 3"), std::string::npos) << misfire->text;
    EXPECT_TRUE(found.trace.median);
}

TEST(CardRemarks, AnotherCylindersCardIsNotEvaluated)
{
    Dice dice(3);
    SimulatedCase what = quiet_case();
    what.cycles = 1;
    SimulatedCard card = simulate(what, dice);
    std::rotate(card.trace.pressure.begin(), card.trace.pressure.begin() + 120, card.trace.pressure.end()); // 60° off
    const auto found = evaluate(card.engine, card.conditions, card.trace);
    if (!found)
        return; // its compression may also be refused as one of another unit
    EXPECT_TRUE(find(found.value(), "wrong_cylinder_or_mark"));
    EXPECT_FALSE(found.value()[CardResult::mean_indicated_pressure]);
}

TEST(CardRemarks, WhatIsNotKnownIsNotGiven)
{
    Dice dice(3);
    SimulatedCard card = simulate(quiet_case(), dice);
    Conditions none;
    const Evaluation bare = evaluate(card.engine, none, card.trace).value();
    EXPECT_TRUE(find(bare, "zero_not_referenced") && find(bare, "charge_temperature_not_known") && find(bare, "speed_assumed"));
    EXPECT_FALSE(bare[CardResult::trapped_mass]);
    EXPECT_FALSE(bare[CardResult::maximum_temperature]);
    EXPECT_NEAR(bare[CardResult::offset]->value, 0.0, *bare[CardResult::offset]->half_width);
    card.engine.cylinder_closes_deg.reset();
    const Evaluation untimed = evaluate(card.engine, none, card.trace).value();
    EXPECT_EQ(untimed.method, CalibrationMethod::power_line);
    EXPECT_NEAR(untimed[CardResult::offset]->value, 0.0, *untimed[CardResult::offset]->half_width);
    EXPECT_FALSE(untimed[CardResult::ca50]);
    card.engine.compression_ratio.reset();
    const Evaluation plain = evaluate(card.engine, none, card.trace).value();
    EXPECT_FALSE(plain[CardResult::compression_pressure]);
    EXPECT_FALSE(plain[CardResult::offset]);
    EXPECT_NEAR(plain[CardResult::mean_indicated_pressure]->value, card.truth.mean_indicated, 0.1);
    EXPECT_GT(*plain[CardResult::mean_indicated_pressure]->half_width, 0.5); // 1° is 7 %
}

TEST(CardRemarks, ATruncatedCardGivesNoWork)
{
    Dice dice(3);
    SimulatedCase what = quiet_case();
    what.cycles = 1;
    const SimulatedCard card = simulate(what, dice);
    Trace cut;
    for (std::size_t i = 0; i < card.trace.angle.size(); ++i)
        if (std::abs(card.trace.angle[i]) <= 120.0) {
            cut.angle.push_back(card.trace.angle[i]);
            cut.pressure.push_back(card.trace.pressure[i]);
        }
    const Evaluation found = evaluate(card.engine, card.conditions, cut).value();
    EXPECT_TRUE(find(found, "truncated_trace"));
    EXPECT_FALSE(found[CardResult::mean_indicated_pressure]);
    EXPECT_NEAR(found[CardResult::maximum_pressure]->value, card.truth.maximum, 0.5);
    EXPECT_TRUE(found[CardResult::ca50]);
}

} // namespace evenstroke::indicator
