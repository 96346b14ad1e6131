// SPDX-License-Identifier: GPL-3.0-or-later
// A card against the healthy one: what is taken for it, and how often the stated band and half-widths hold the truth on
// simulated ships (card_ship.h says what they assume). Seeded.
#include "core/card/true_curve.h"
#include "core/simulation/exact_intervals.h"
#include "tests/core/card_ship.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <cstdio>

namespace evenstroke::indicator {
namespace {

#if defined(__SANITIZE_ADDRESS__)
constexpr int ships = 6; // an instrumented card takes ten times as long
#else
constexpr int ships = 25;
#endif

std::size_t index(CardResult result) { return static_cast<std::size_t>(result); }

SimulatedCase plain_case(double fuel_kg = 0.05)
{
    SimulatedCase what;
    what.noise = 0.1;
    what.fuel_kg = fuel_kg;
    what.start = -1.0;
    return what;
}

std::shared_ptr<const Evaluation> evaluated(const SimulatedCase& what, unsigned seed)
{
    Dice dice(seed);
    const SimulatedCard card = simulate(what, dice);
    return std::make_shared<const Evaluation>(evaluate(card.engine, card.conditions, card.trace).value());
}

double mean_of(const Comparison& comparison, CyclePart part)
{
    for (const PartDifference& difference : comparison.parts)
        if (difference.part == part)
            return difference.mean;
    return std::nan("");
}

/// Pressure of a card without indicator at a grid angle; its samples are 0.5° apart from half a period before dead centre.
double true_pressure(const SimulatedCard& card, double angle)
{
    const auto place = static_cast<std::size_t>(std::lround((angle - card.trace.angle.front()) / 0.5));
    return card.trace.pressure[place % card.trace.pressure.size()];
}

} // namespace

TEST(TrueSamples, AreThePointsOfTheTrueCurveAndGoThroughTheStatedMaximum)
{
    SimulatedCase what = plain_case();
    what.offset = 0.8;
    what.zero = 0.6;
    what.drift = 0.3;
    const auto card = evaluated(what, 5);
    const TrueCurve curve(*card);
    const TrueSamples samples = true_samples(*card);
    ASSERT_EQ(samples.angle.size(), card->trace.angle.size());
    for (std::size_t i = 4; i + 4 < samples.angle.size(); ++i) // at a sample the cubic is the sample
        ASSERT_NEAR(samples.pressure[i], curve.pressure(samples.angle[i]), 1e-9) << samples.angle[i];
    const double highest = *std::max_element(samples.pressure.begin(), samples.pressure.end());
    EXPECT_NEAR(highest, (*card)[CardResult::maximum_pressure]->value, 0.3); // the noise of one mean sample
}

TEST(CardComparison, TheSameCylinderAtTheSameLoadDoesNotDiffer)
{
    const auto now = evaluated(plain_case(), 1), healthy = evaluated(plain_case(), 2);
    const auto found = compare(*now, 80.0, 3.65, {{0, 80.0, 3.65, healthy}});
    ASSERT_TRUE(found);
    EXPECT_TRUE(found->charge_pressure_taken);
    EXPECT_FALSE(found->dead_centre_assumed);
    ASSERT_EQ(found->parts.size(), 4u);
    for (const PartDifference& part : found->parts) {
        EXPECT_FALSE(part.clear);
        EXPECT_LE(std::abs(part.mean), part.mean_half_width);
    }
    ASSERT_EQ(found->angle.size(), 720u);
    EXPECT_EQ(found->angle.size(), found->half_width.size());
    // Both have the same film, so the difference is known better than two cards that know nothing of each other.
    const double alone = *(*now)[CardResult::ca50]->half_width, other = *(*healthy)[CardResult::ca50]->half_width;
    EXPECT_LT(*found->differences[index(CardResult::ca50)]->half_width, std::hypot(alone, other));
}

TEST(CardComparison, AHigherChargePressureIsTakenOutOfTheCompression)
{
    SimulatedCase more = plain_case();
    more.scavenge *= 1.05;
    const auto now = evaluated(more, 1), healthy = evaluated(plain_case(), 2);
    const auto brought = compare(*now, 80.0, more.scavenge, {{0, 80.0, 3.65, healthy}});
    ASSERT_TRUE(brought);
    // 5 % of the compression is 6 bar; the gas's own exponent leaves a few tenths.
    EXPECT_NEAR(brought->differences[index(CardResult::compression_pressure)]->value, 0.0, 0.6);
    EXPECT_NEAR(mean_of(*brought, CyclePart::compression), 0.0, 0.1);
    const auto plain = compare(*now, 80.0, std::nullopt, {{0, 80.0, 3.65, healthy}});
    ASSERT_TRUE(plain);
    EXPECT_FALSE(plain->charge_pressure_taken);
    EXPECT_NEAR(plain->differences[index(CardResult::compression_pressure)]->value, 0.05 * 126.0, 0.8);
    EXPECT_GT(*plain->differences[index(CardResult::compression_pressure)]->half_width, 6.0);
}

TEST(CardComparison, BetweenTwoLoadsBothCount)
{
    const auto now = evaluated(plain_case(0.05), 1), low = evaluated(plain_case(0.045), 2), high = evaluated(plain_case(0.055), 3);
    const auto found = compare(*now, 80.0, 3.65, {{7, 90.0, 3.65, high}, {4, 70.0, 3.65, low}});
    ASSERT_TRUE(found);
    ASSERT_EQ(found->from.size(), 2u);
    EXPECT_EQ(found->from[0].reading, 4u);
    EXPECT_NEAR(found->from[0].share, 0.5, 1e-12);
    EXPECT_NEAR(found->from[1].share, 0.5, 1e-12);
    EXPECT_NEAR(found->differences[index(CardResult::mean_indicated_pressure)]->value, 0.0, 0.15);
}

TEST(CardComparison, ALoadThatNoHealthyCardSpeaksOfIsNotComparedWith)
{
    const auto now = evaluated(plain_case(), 1), healthy = evaluated(plain_case(), 2);
    EXPECT_FALSE(compare(*now, 80.0, 3.65, {}));
    EXPECT_FALSE(compare(*now, 80.0, 3.65, {{0, 74.9, 3.65, healthy}}));
    EXPECT_FALSE(compare(*now, 80.0, 3.65, {{0, 85.1, 3.65, healthy}, {1, 95.0, 3.65, healthy}}));
    const auto near = compare(*now, 80.0, 3.65, {{0, 76.0, 3.65, healthy}});
    ASSERT_TRUE(near);
    // Four per cent more load asks for about three per cent more combustion, so the same card lies low.
    EXPECT_LT(near->differences[index(CardResult::mean_indicated_pressure)]->value, -0.3);
}

TEST(CardComparison, LateCombustionShowsWhereItIs)
{
    SimulatedCase late = plain_case();
    late.start += 3.0;
    const auto now = evaluated(late, 1), healthy = evaluated(plain_case(), 2);
    const auto found = compare(*now, 80.0, 3.65, {{0, 80.0, 3.65, healthy}});
    ASSERT_TRUE(found);
    for (const PartDifference& part : found->parts)
        EXPECT_EQ(part.clear, part.part == CyclePart::combustion) << static_cast<int>(part.part);
    EXPECT_NEAR(found->differences[index(CardResult::start_of_combustion)]->value, 3.0, 0.3);
    EXPECT_NEAR(mean_of(*found, CyclePart::compression), 0.0, 0.1);
}

TEST(CardComparison, ACardWithoutDeadCentreIsComparedWithAWideBand)
{
    Dice dice(1);
    SimulatedCard card = simulate(plain_case(), dice);
    card.engine.compression_ratio.reset();
    const Evaluation now = evaluate(card.engine, card.conditions, card.trace).value();
    const auto healthy = evaluated(plain_case(), 2);
    const auto found = compare(now, 80.0, 3.65, {{0, 80.0, 3.65, healthy}});
    ASSERT_TRUE(found);
    EXPECT_TRUE(found->dead_centre_assumed);
    // At 30° before dead centre the compression rises by 2 bar a degree: 1° either way.
    const auto at = std::lower_bound(found->angle.begin(), found->angle.end(), -30.0) - found->angle.begin();
    EXPECT_GT(found->half_width[static_cast<std::size_t>(at)], 1.5);
}

class CardComparisonStatistics : public testing::TestWithParam<bool>
{
};

// Fuel and timing of one cylinder changed, healthy cards at two loads, everything that `any_ship` draws; the truth is the
// difference of cards without indicator, at the true load and charge pressure.
TEST_P(CardComparisonStatistics, BandsAndHalfWidthsHoldTheTruth)
{
    const bool two_stroke = GetParam();
    Dice dice(two_stroke ? 21 : 22);
    std::size_t held = 0, asked = 0, band_held = 0, band_asked = 0, parts_held = 0, parts_asked = 0, sound_parts = 0, sound_clear = 0;
    for (int i = 0; i < ships; ++i) {
        ShipCase what = any_ship(two_stroke, dice);
        what.cylinders = 3;
        what.month_scatter = 0.0; // the truth of a healthy card that changes by itself is not one card
        const SimulatedShip ship = simulate_ship(what, dice, [&](SimulatedCase& changed, int cylinder) {
            if (cylinder != 1)
                return;
            changed.fuel_kg *= 1.0 + spread(dice, 0.05);
            changed.start += spread(dice, 0.7);
        });
        const CardReview review = review_cards(ship.judgement, ship.in_hand(), ship.shelf);
        for (const ReviewedCard& card : review.cards) {
            ASSERT_TRUE(card.comparison);
            const SimulatedCase& is = ship.cases.at({ship.in_hand(), card.cylinder});
            const SimulatedCase& was = ship.sound.at(card.cylinder);
            const SimulatedCard now = without_indicator(is), then = without_indicator(was);
            const Comparison& found = *card.comparison;
            for (std::size_t k = 0; k < found.angle.size(); k += 8, ++band_asked) {
                const double truth = true_pressure(now, found.angle[k]) - true_pressure(then, found.angle[k]);
                band_held += std::abs(found.difference[k] - truth) <= found.half_width[k] ? 1 : 0;
            }
            for (const PartDifference& part : found.parts) {
                double truth = 0.0, samples = 0.0;
                for (double angle = std::ceil(2.0 * part.from) / 2.0; angle <= part.to; angle += 0.5, ++samples) {
                    const double around = std::remainder(angle, two_stroke ? 360.0 : 720.0);
                    truth += true_pressure(now, around) - true_pressure(then, around);
                }
                parts_held += std::abs(part.mean - truth / samples) <= part.mean_half_width ? 1 : 0;
                ++parts_asked;
                if (card.cylinder != 1) {
                    ++sound_parts;
                    sound_clear += part.clear ? 1 : 0;
                }
            }
            const auto result = [&](CardResult r, double true_now, double true_then) {
                const auto& difference = found.differences[index(r)];
                if (!difference) // withheld on one of the cards
                    return;
                held += std::abs(difference->value - (true_now - true_then)) <= *difference->half_width ? 1 : 0;
                ++asked;
            };
            result(CardResult::mean_indicated_pressure, now.truth.mean_indicated, then.truth.mean_indicated);
            result(CardResult::maximum_pressure, now.truth.maximum, then.truth.maximum);
            result(CardResult::maximum_pressure_angle, now.truth.maximum_angle, then.truth.maximum_angle);
            result(CardResult::compression_pressure, now.truth.compression, then.truth.compression);
            result(CardResult::expansion_pressure, now.truth.expansion, then.truth.expansion);
            result(CardResult::start_of_combustion, is.start, was.start);
            result(CardResult::pressure_rise, now.truth.rise, then.truth.rise);
            result(CardResult::ca10, now.truth.ca10, then.truth.ca10);
            result(CardResult::ca50, now.truth.ca50, then.truth.ca50);
        }
    }
    const auto print = [](const char* name, std::size_t of_held, std::size_t of) {
        const simulation::Interval share = simulation::binomial_interval(of_held, of);
        std::printf("  %-10s %zu of %zu (95 %%: %.1f to %.1f %%)\n", name, of_held, of, 100.0 * share.low, 100.0 * share.high);
        return share;
    };
    std::printf("%s\n", two_stroke ? "two-stroke" : "four-stroke");
    // Wanted 90 to 99 %; a bound fails where the exact interval lies wholly on its wrong side. Samples of one card hang
    // together, so the band's interval is too narrow: that bound is on the share itself.
    const auto band = print("band", band_held, band_asked), results = print("results", held, asked),
               parts = print("parts", parts_held, parts_asked);
    EXPECT_GE(static_cast<double>(band_held), 0.90 * static_cast<double>(band_asked));
    EXPECT_LE(band.low, 0.99);
    EXPECT_GE(results.high, 0.90);
    EXPECT_LE(results.low, 0.99);
    EXPECT_GE(parts.high, 0.90);
    EXPECT_LE(parts.low, 0.99);
    // "Clear" asks for three standard deviations: 2 % allows for the four parts being looked at in two ways.
    EXPECT_GE(static_cast<double>(asked), 0.97 * static_cast<double>(27 * ships)); // hardly anything is withheld
    EXPECT_LE(simulation::binomial_interval(sound_clear, sound_parts).low, 0.02);
    std::printf("  clear on sound cylinders: %zu of %zu parts\n", sound_clear, sound_parts);
}

INSTANTIATE_TEST_SUITE_P(Engines, CardComparisonStatistics, testing::Bool(),
                         [](const auto& engine) { return engine.param ? "TwoStroke" : "FourStroke"; });

} // namespace evenstroke::indicator
