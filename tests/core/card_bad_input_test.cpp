// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/core/card_simulator.h"
#include "tests/core/refusal.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <limits>

namespace evenstroke::indicator {
namespace {

class CardBadInput : public testing::Test
{
protected:
    void SetUp() override
    {
        Dice dice(7);
        SimulatedCase what;
        what.cycles = 1;
        what.noise = 0.1;
        card = simulate(what, dice);
    }
    Result<Evaluation> evaluated() const { return evaluate(card.engine, card.conditions, card.trace); }
    void refused(std::string_view part) const { expect_problem(evaluated(), Problem::Kind::invalid_input, part); }
    SimulatedCard card;
};

} // namespace

TEST_F(CardBadInput, NoSamplesAndTooFew)
{
    card.trace = {};
    refused("0 samples");
    card.trace.angle = {-1.0, 0.0, 1.0};
    card.trace.pressure = {1.0, 2.0, 3.0};
    refused("3 samples");
    card.trace.pressure.pop_back();
    refused("3 angles and 2 pressures");
}

TEST_F(CardBadInput, AnglesThatFallOrStandTwice)
{
    const std::vector<double> angles = card.trace.angle;
    card.trace.angle[100] = card.trace.angle[99];
    refused("Sample 101");
    card.trace.angle = angles;
    std::swap(card.trace.angle[200], card.trace.angle[201]);
    refused("steps back");
    card.trace.angle.assign(angles.rbegin(), angles.rend());
    refused("steps back");
}

TEST_F(CardBadInput, ACompressionThatIsNotThere)
{
    Trace half;
    for (std::size_t i = 0; i < card.trace.angle.size(); ++i)
        if (card.trace.angle[i] > -30.0) {
            half.angle.push_back(card.trace.angle[i]);
            half.pressure.push_back(card.trace.pressure[i]);
        }
    card.trace = half;
    refused("does not cover the compression");
}

TEST_F(CardBadInput, ACardTurnedByHalfARevolutionSpeaksOfTheAngleFirst)
{
    std::vector<double>& pressure = card.trace.pressure;
    std::rotate(pressure.begin(), pressure.begin() + static_cast<std::ptrdiff_t>(pressure.size() / 2), pressure.end());
    refused("The largest pressure lies at -1");
    refused("most likely the angles are wrong");
}

TEST_F(CardBadInput, PressuresThatAreAllTheSameOrNone)
{
    card.trace.pressure.assign(card.trace.pressure.size(), 0.0);
    refused("All pressures of the card are 0 bar");
    card.trace.pressure.assign(card.trace.pressure.size(), std::numeric_limits<double>::quiet_NaN());
    refused("no pressure at all");
    card.trace.pressure[3] = std::numeric_limits<double>::infinity();
    refused("Sample 4");
}

TEST_F(CardBadInput, AWrongUnitByTen)
{
    const std::vector<double> pressure = card.trace.pressure;
    for (double& p : card.trace.pressure)
        p *= 10.0;
    refused("bar");
    card.trace.pressure = pressure;
    for (double& p : card.trace.pressure)
        p *= 0.1;
    refused("scavenge pressure");
    card.conditions.scavenge_pressure.reset();
    refused("which no engine has"); // as from 0.4 bar of charge
}

TEST_F(CardBadInput, TwoRevolutionsForATwoStroke)
{
    for (std::size_t i = 0; i < card.trace.angle.size(); ++i)
        card.trace.angle[i] *= 2.0;
    refused("two-stroke cycle has 360°");
}

TEST_F(CardBadInput, ACardOfMillionsOfSamples)
{
    card.trace.angle.assign(most_samples + 1, 0.0);
    card.trace.pressure.assign(most_samples + 1, 1.0);
    refused("samples, more than");
}

TEST_F(CardBadInput, AnEngineWithoutItsSizes)
{
    card.engine.bore = Length{};
    expect_problem(evaluated(), Problem::Kind::not_found, "bore");
}

// Whatever the numbers are, there is an answer or a sentence.
TEST_F(CardBadInput, RandomRubbishIsAnsweredOrRefused)
{
    Dice dice(99);
    const Trace sound = card.trace;
    for (int i = 0; i < 60; ++i) {
        card.trace = sound;
        const double scale = std::exp(between(dice, -3.0, 3.0)), shift = between(dice, -50.0, 50.0);
        for (double& p : card.trace.pressure) {
            p = scale * p + shift + spread(dice, i % 3 == 0 ? 20.0 : 0.0);
            if (between(dice, 0.0, 1.0) < 0.02 * (i % 5))
                p = std::numeric_limits<double>::quiet_NaN();
        }
        const auto found = evaluated();
        if (!found) {
            EXPECT_FALSE(found.error().what_to_do.empty());
            continue;
        }
        for (const auto& estimate : found.value().results)
            if (estimate) {
                EXPECT_TRUE(std::isfinite(estimate->value));
                EXPECT_TRUE(std::isfinite(estimate->half_width.value_or(0.0)));
            }
    }
}

} // namespace evenstroke::indicator
