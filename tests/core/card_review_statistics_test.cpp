// SPDX-License-Identifier: GPL-3.0-or-later
// How often a review says something of sound cards, how often it finds what is wrong, and what the installation's dead
// centre does to the mean indicated pressure: simulated ships of six cylinders (card_ship.h says what they assume). Seeded.
#include "core/card/reading_conditions.h"
#include "core/simulation/exact_intervals.h"
#include "tests/core/card_ship.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <cstdio>

namespace evenstroke::indicator {
namespace {

#if defined(__SANITIZE_ADDRESS__)
constexpr std::size_t sound_ships = 6, faulty_ships = 4; // an instrumented card takes ten times as long
#else
constexpr std::size_t sound_ships = 20, faulty_ships = 6;
#endif
constexpr std::size_t cylinders = 6;

/// Codes that only a review raises, of one cylinder and of all.
constexpr const char* of_cylinder[] = {"charge_leak", "compression_low", "less_charge", "more_charge", "trace_lags",
                                       "later_than_healthy", "earlier_than_healthy", "longer_than_healthy", "more_fuel", "less_fuel",
                                       "drift_against_healthy", "compared_widely", "heat_above_fuel"};
constexpr const char* of_all[] = {"pickup_moved", "gain_suspected", "same_card_twice", "cards_exchanged"};

bool says(const std::vector<Remark>& remarks, std::string_view code)
{
    return std::any_of(remarks.begin(), remarks.end(), [&](const Remark& r) { return r.code == code; });
}

CardReview reviewed(const SimulatedShip& ship) { return review_cards(ship.judgement, ship.in_hand(), ship.shelf); }

void print(const char* what, std::size_t count, std::size_t of)
{
    const simulation::Interval share = simulation::binomial_interval(count, of);
    std::printf("  %-46s %zu of %zu (95 %%: %.1f to %.1f %%)\n", what, count, of, 100.0 * share.low, 100.0 * share.high);
}

struct FaultCase
{
    const char* name;
    bool all_cylinders;
    CardFault change;
    std::vector<std::string> any_of; ///< remarks that find it
    double least;                    ///< share that must be found
};

class CardReviewStatistics : public testing::TestWithParam<bool>
{
protected:
    std::vector<FaultCase> faults() const
    {
        const bool two = GetParam();
        return {{"charge leak", false, [two](SimulatedCase& c, int) { c.leak_mm2 = two ? 60.0 : 25.0; }, {"charge_leak", "compression_low"}, 0.5},
                {"3 % less charge", false, [](SimulatedCase& c, int) { c.closing_slip -= 0.03; }, {"less_charge", "compression_low"}, 0.6},
                {"slow passage", false, [two](SimulatedCase& c, int) { c.passage_hz = two ? 150.0 : 900.0, c.passage_damping = 0.7; }, {"trace_lags"}, 0.6},
                {"2° late", false, [](SimulatedCase& c, int) { c.start += 2.0; }, {"later_than_healthy"}, 0.7},
                {"2° early", false, [](SimulatedCase& c, int) { c.start -= 2.0; }, {"earlier_than_healthy"}, 0.7},
                {"a fifth longer", false, [](SimulatedCase& c, int) { c.duration *= 1.2; }, {"longer_than_healthy"}, 0.1},
                {"8 % less fuel", false, [](SimulatedCase& c, int) { c.fuel_kg *= 0.92; }, {"less_fuel"}, 0.6},
                {"8 % more fuel", false, [](SimulatedCase& c, int) { c.fuel_kg *= 1.08; }, {"more_fuel"}, 0.6},
                {"thermal shock of 1 bar", false, [](SimulatedCase& c, int) { c.shock = 1.0; }, {"drift_against_healthy"}, two ? 0.4 : 0.0},
                {"gain 4 % high", true, [](SimulatedCase& c, int) { c.gain = 1.04; }, {"gain_suspected"}, 0.5},
                {"pickup moved by 0.5°", true, [](SimulatedCase& c, int) { c.offset += 0.5; }, {"pickup_moved"}, 0.7}};
    }
};

} // namespace

// Ratio within 3 % of the entered one, drift within 0.3 bar, noise 0.05 to 0.5 bar, month-to-month changes that are usual.
TEST_P(CardReviewStatistics, SoundCardsAreSeldomRemarkedOn)
{
    Dice dice(GetParam() ? 31 : 32);
    std::size_t remarked = 0, cards = 0, ships = 0;
    for (std::size_t i = 0; i < sound_ships; ++i) {
        const SimulatedShip ship = simulate_ship(any_ship(GetParam(), dice), dice);
        const CardReview review = reviewed(ship);
        for (const ReviewedCard& card : review.cards) {
            ++cards;
            for (const char* code : of_cylinder)
                if (says(card.remarks, code)) {
                    std::printf("  %s\n", code);
                    ++remarked;
                    break;
                }
        }
        for (const char* code : of_all)
            if (says(review.remarks, code)) {
                std::printf("  %s\n", code);
                ++ships;
            }
    }
    std::printf("%s\n", GetParam() ? "two-stroke, sound" : "four-stroke, sound");
    print("cards remarked on", remarked, cards);
    print("doubts about all cylinders together", ships, sound_ships);
    // At most 2 % of the cards; fails where the exact interval lies wholly above.
    EXPECT_LE(simulation::binomial_interval(remarked, cards).low, 0.02);
    EXPECT_LE(simulation::binomial_interval(ships, sound_ships).low, 0.05);
}

TEST_P(CardReviewStatistics, WhatIsWrongIsFound)
{
    std::printf("%s, found\n", GetParam() ? "two-stroke" : "four-stroke");
    unsigned seed = GetParam() ? 40 : 60;
    std::size_t others = 0, other_cards = 0;
    for (const FaultCase& fault : faults()) {
        Dice dice(++seed);
        std::size_t found = 0;
        for (std::size_t i = 0; i < faulty_ships; ++i) {
            const int target = 1 + static_cast<int>(i % cylinders);
            const SimulatedShip ship = simulate_ship(any_ship(GetParam(), dice), dice, [&](SimulatedCase& c, int cylinder) {
                if (fault.all_cylinders || cylinder == target)
                    fault.change(c, cylinder);
            });
            const CardReview review = reviewed(ship);
            bool said = false;
            for (const std::string& code : fault.any_of)
                said = said || says(review.remarks, code) ||
                       says(review.cards[static_cast<std::size_t>(target - 1)].remarks, code);
            found += said ? 1 : 0;
            if (fault.all_cylinders)
                continue;
            for (const ReviewedCard& card : review.cards)
                if (card.cylinder != target) {
                    ++other_cards;
                    others += std::any_of(std::begin(of_cylinder), std::end(of_cylinder),
                                          [&](const char* code) { return says(card.remarks, code); })
                                  ? 1
                                  : 0;
                }
        }
        print(fault.name, found, faulty_ships);
        EXPECT_GE(simulation::binomial_interval(found, faulty_ships).high, fault.least) << fault.name;
    }
    print("cards of sound cylinders remarked on", others, other_cards);
    EXPECT_LE(simulation::binomial_interval(others, other_cards).low, 0.02);
}

TEST_P(CardReviewStatistics, ExchangedCardsAreOftenAskedAbout)
{
    Dice dice(GetParam() ? 81 : 82);
    std::size_t asked = 0;
    for (std::size_t i = 0; i < sound_ships / 2; ++i) {
        const SimulatedShip ship = simulate_ship(any_ship(GetParam(), dice), dice);
        const int a = 1 + static_cast<int>(i % cylinders), b = 1 + static_cast<int>((i + 1) % cylinders);
        std::swap((*ship.cards)[{ship.in_hand(), a}], (*ship.cards)[{ship.in_hand(), b}]);
        const CardReview review = reviewed(ship);
        for (const Remark& remark : review.remarks)
            asked += remark.code == "cards_exchanged" && remark.text.find("cylinder " + std::to_string(std::min(a, b)) + " and " +
                                                                          std::to_string(std::max(a, b))) != std::string::npos
                         ? 1
                         : 0;
    }
    print("exchanged cards asked about", asked, sound_ships / 2);
    // What the lasting differences of the simulated cylinders allow; about a third is known for hand-read values.
    EXPECT_GE(simulation::binomial_interval(asked, sound_ships / 2).high, 0.3);
}

// The same cards with each card's own dead centre and with the installation's weighed in.
TEST_P(CardReviewStatistics, TheInstallationsDeadCentreMakesTheWorkNoWorseAndALeakShowsInIt)
{
    for (const bool leak : {false, true}) {
        Dice dice(GetParam() ? 91 : 92);
        std::vector<double> own, weighed;
        double own_sum = 0.0, weighed_sum = 0.0;
        std::size_t held = 0;
        for (std::size_t i = 0; i < sound_ships / 2; ++i) {
            ShipCase what = any_ship(GetParam(), dice);
            what.drift = 0.0; // moves the work by itself, whichever dead centre is taken
            const SimulatedShip ship = simulate_ship(what, dice, [&](SimulatedCase& c, int cylinder) {
                if (leak && cylinder == 1)
                    c.leak_mm2 = GetParam() ? 60.0 : 25.0;
            });
            const CardReview review = reviewed(ship);
            for (const ReviewedCard& card : review.cards) {
                if (leak && card.cylinder != 1)
                    continue;
                const CardPlace place{ship.in_hand(), card.cylinder};
                const EngineRecord& record = *ship.judgement.record;
                const auto alone = evaluate(record.engine, conditions_at(record.engine, record.readings.back()), ship.cards->at(place).trace);
                const double truth = ship.truths.at(place).mean_indicated;
                const auto error = [&](const Evaluation& e) {
                    return 100.0 * (e[CardResult::mean_indicated_pressure]->value / truth - 1.0);
                };
                own.push_back(std::abs(error(alone.value())));
                weighed.push_back(std::abs(error(*card.card)));
                own_sum += error(alone.value());
                weighed_sum += error(*card.card);
                const auto& work = *(*card.card)[CardResult::mean_indicated_pressure];
                held += std::abs(work.value - truth) <= *work.half_width ? 1 : 0;
            }
        }
        const auto ninety = [](std::vector<double> all) {
            std::sort(all.begin(), all.end());
            return all[all.size() * 9 / 10];
        };
        const double n = static_cast<double>(own.size());
        std::printf("%s, %s: 90 %% of the work within %.2f %% by the card's own dead centre, %.2f %% with the installation's; mean %.2f, %.2f %%\n",
                    GetParam() ? "two-stroke" : "four-stroke", leak ? "leak" : "sound", ninety(own), ninety(weighed), own_sum / n,
                    weighed_sum / n);
        print("half-widths of the work hold", held, own.size());
        EXPECT_LE(ninety(weighed), 1.1 * ninety(own)); // a tenth for chance
        EXPECT_GE(simulation::binomial_interval(held, own.size()).high, 0.90);
    }
}

INSTANTIATE_TEST_SUITE_P(Engines, CardReviewStatistics, testing::Bool(),
                         [](const auto& engine) { return engine.param ? "TwoStroke" : "FourStroke"; });

} // namespace evenstroke::indicator
