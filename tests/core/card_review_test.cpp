// SPDX-License-Identifier: GPL-3.0-or-later
// What a review of a reading's cards chooses, says and leaves alone.
#include "core/card/hand_readings.h"
#include "tests/core/card_ship.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

SimulatedShip ship_at(std::vector<double> loads, std::size_t called, int cylinders = 3, const CardFault& fault = {})
{
    Dice dice(11);
    ShipCase what;
    what.loads = std::move(loads);
    what.called_healthy = called;
    what.cylinders = cylinders;
    what.cycles = 5;
    what.noise = 0.1;
    return simulate_ship(what, dice, fault);
}

CardReview reviewed(const SimulatedShip& ship) { return review_cards(ship.judgement, ship.in_hand(), ship.shelf); }

bool says(const std::vector<Remark>& remarks, std::string_view code)
{
    return std::any_of(remarks.begin(), remarks.end(), [&](const Remark& r) { return r.code == code; });
}

const CardValue& value_of(const ReviewedCard& card, std::string_view name)
{
    for (const CardValue& value : card.values)
        if (quantity(value.quantity).name == name)
            return value;
    throw std::logic_error("no value " + std::string(name));
}

} // namespace

TEST(CardReview, ComparesWithTheReadingsCalledHealthy)
{
    const CardReview review = reviewed(ship_at({70.0, 90.0, 80.0}, 2));
    ASSERT_EQ(review.cards.size(), 3u);
    EXPECT_FALSE(review.provisional);
    EXPECT_TRUE(review.no_healthy.empty());
    ASSERT_TRUE(review.installation_offset);
    for (const ReviewedCard& card : review.cards) {
        ASSERT_TRUE(card.comparison);
        EXPECT_EQ(card.comparison->from.size(), 2u);
        EXPECT_TRUE(card.comparison->charge_pressure_taken);
    }
}

TEST(CardReview, OfSeveralCalledHealthyAtALoadTheNewestCounts)
{
    const CardReview review = reviewed(ship_at({80.0, 81.0, 80.0}, 2));
    ASSERT_TRUE(review.cards.front().comparison);
    ASSERT_EQ(review.cards.front().comparison->from.size(), 1u);
    EXPECT_EQ(review.cards.front().comparison->from.front().reading, 1u);
}

TEST(CardReview, WhereNobodyCalledOneHealthyTheEarliestStandsForIt)
{
    const CardReview review = reviewed(ship_at({80.0, 81.0, 80.0}, 0));
    EXPECT_TRUE(review.provisional);
    ASSERT_TRUE(review.cards.front().comparison);
    EXPECT_EQ(review.cards.front().comparison->from.front().reading, 0u);
}

TEST(CardReview, AReadingIsNeverItsOwnHealthyCard)
{
    SimulatedShip ship = ship_at({80.0}, 0);
    ship.shelf.called_healthy = {0};
    const CardReview review = reviewed(ship);
    EXPECT_FALSE(review.cards.front().comparison);
    EXPECT_FALSE(review.no_healthy.empty());
    EXPECT_FALSE(review.installation_offset);
    EXPECT_FALSE(review.cards.front().values.empty());
}

TEST(CardReview, SaysWhyNothingIsCompared)
{
    EXPECT_NE(reviewed(ship_at({50.0, 90.0}, 1)).no_healthy.find("called healthy"), std::string::npos);
    SimulatedShip ship = ship_at({80.0, 80.0}, 1);
    ship.judgement.readings.back().load_percent.reset();
    EXPECT_NE(reviewed(ship).no_healthy.find("load"), std::string::npos);
}

TEST(CardReview, StopsWhenAskedAndTellsHowFarItIs)
{
    const SimulatedShip ship = ship_at({80.0, 80.0}, 1);
    int last = -1, all = 0;
    const CardReview whole = review_cards(ship.judgement, ship.in_hand(), ship.shelf, [&](int done, int of) {
        EXPECT_GE(done, last);
        last = done;
        all = of;
        return true;
    });
    EXPECT_EQ(last, all);
    EXPECT_FALSE(whole.cards.empty());
    const CardReview stopped = review_cards(ship.judgement, ship.in_hand(), ship.shelf, [](int done, int) { return done < 2; });
    EXPECT_TRUE(stopped.cards.empty());
}

TEST(CardReview, ACardThatCannotBeReadIsAProblemOfItsCylinderAlone)
{
    SimulatedShip ship = ship_at({80.0, 80.0}, 1);
    (*ship.cards)[{1, 2}].trace.angle.clear();
    const CardReview review = reviewed(ship);
    ASSERT_EQ(review.cards.size(), 3u);
    EXPECT_TRUE(review.cards[1].problem);
    EXPECT_FALSE(review.cards[1].card);
    EXPECT_TRUE(review.cards[0].comparison);
    EXPECT_TRUE(reviewed(ship).cards[2].card);
    EXPECT_TRUE(review_cards(ship.judgement, 99, ship.shelf).cards.empty());
}

TEST(CardReview, ValuesAreInTheKindOfTheQuantityWithTheHandReadOnesBeside)
{
    SimulatedShip ship = ship_at({80.0, 80.0}, 1);
    auto record = std::make_shared<EngineRecord>(*ship.judgement.record);
    Value typed;
    typed.quantity = *find_quantity("maximum_pressure", Place::Kind::cylinder);
    typed.place = Place::cylinder(1);
    typed.unit = quantity(typed.quantity).unit;
    typed.kind = PressureKind::gauge;
    typed.number = 150.0;
    typed.value_si = 150e5;
    record->readings.back().values.push_back(typed);
    typed.place = Place::cylinder(2);
    typed.origin = Origin::card;
    record->readings.back().values.push_back(typed);
    ship.judgement.record = record;
    const CardReview review = reviewed(ship);
    const Evaluation& card = *review.cards[0].card;
    const CardValue &maximum = value_of(review.cards[0], "maximum_pressure"), &work = value_of(review.cards[0], "mean_indicated_pressure");
    EXPECT_NEAR(maximum.number, card[CardResult::maximum_pressure]->value - 1.010, 1e-9); // the barometer read: 1010 mbar
    EXPECT_NEAR(work.number, card[CardResult::mean_indicated_pressure]->value, 1e-12);
    EXPECT_NEAR(maximum.hand_read.value(), 150.0, 1e-9);
    EXPECT_FALSE(work.hand_read);
    EXPECT_FALSE(value_of(review.cards[1], "maximum_pressure").hand_read); // that came from a card
    EXPECT_EQ(review.cards[0].values.size(), 5u);
}

TEST(CardReview, WithoutBarometerTheUsualOneIsTakenAndItsDoubtAdded)
{
    SimulatedShip ship = ship_at({80.0, 80.0}, 1);
    auto record = std::make_shared<EngineRecord>(*ship.judgement.record);
    std::erase_if(record->readings.back().values, [](const Value& v) { return quantity(v.quantity).name == "barometric_pressure"; });
    ship.judgement.record = record;
    const CardReview review = reviewed(ship);
    const auto& maximum = *(*review.cards[0].card)[CardResult::maximum_pressure];
    const CardValue& value = value_of(review.cards[0], "maximum_pressure");
    EXPECT_NEAR(value.number, maximum.value - 1.013, 1e-9);
    EXPECT_NEAR(*value.half_width, std::hypot(*maximum.half_width, 0.03), 1e-9);
}

TEST(CardReview, TheSameSamplesOnTwoCylindersAreNamed)
{
    SimulatedShip ship = ship_at({80.0, 80.0}, 1);
    (*ship.cards)[{1, 3}] = (*ship.cards)[{1, 2}];
    const CardReview within = reviewed(ship);
    ASSERT_TRUE(says(within.remarks, "same_card_twice"));
    EXPECT_NE(within.remarks.front().text.find("cylinder 2"), std::string::npos);
    EXPECT_NE(within.remarks.front().text.find("cylinder 3"), std::string::npos);
    (*ship.cards)[{1, 3}] = (*ship.cards)[{0, 3}];
    EXPECT_TRUE(says(reviewed(ship).remarks, "same_card_twice"));
}

TEST(CardReview, CardsOfAnotherDayAreAskedAboutByWhatWasReadByHand)
{
    std::vector<ReviewedCard> cards(6);
    const auto set = [&](double over) {
        for (std::size_t i = 0; i < cards.size(); ++i) {
            cards[i].cylinder = static_cast<int>(i) + 1;
            const double read = 140.0 + static_cast<double>(i), scatter = i % 2 == 0 ? 1.0 : -1.0;
            cards[i].values = {{CardResult::maximum_pressure, 0, read + over + scatter, 0.5, read, 1.0}};
        }
    };
    set(0.0);
    EXPECT_FALSE(remark_on_hand_readings(cards));
    set(6.0);
    const auto remark = remark_on_hand_readings(cards);
    ASSERT_TRUE(remark);
    EXPECT_EQ(remark->code, "cards_off_readings");
    EXPECT_NE(remark->text.find("On 6 of 6 cylinders the cards' maximum pressure lies about 6 bar above"), std::string::npos) << remark->text;
    cards.resize(2);
    EXPECT_FALSE(remark_on_hand_readings(cards)) << "two cylinders say nothing of all";
}

TEST(CardReview, TheMeanTurningMomentIsTheIndicatedWork)
{
    const CardReview review = reviewed(ship_at({80.0, 80.0}, 1));
    const Evaluation& card = *review.cards[0].card;
    ASSERT_TRUE(card.forces);
    // Over a cycle of 2π: M = MIP V_s / 2π. 0.6 m bore, 2.4 m stroke; trapezoid in half degrees, zero without effect.
    const double pi = 3.14159265358979323846, swept = pi / 4.0 * 0.6 * 0.6 * 2.4;
    const double expected = card[CardResult::mean_indicated_pressure]->value * 1e5 * swept / (2.0 * pi) / 1e3;
    EXPECT_NEAR(card.forces->mean_moment, expected, 0.002 * expected);
    EXPECT_GT(card.forces->largest_moment, 2.0 * card.forces->mean_moment);
    EXPECT_GT(card.forces->largest_guide, 100.0);
    EXPECT_TRUE(card.forces->gas_force_only);
}

TEST(CardReview, MoreHeatThanTheFuelHadIsSaid)
{
    SimulatedShip ship = ship_at({80.0, 80.0}, 1);
    EXPECT_FALSE(says(reviewed(ship).cards[0].remarks, "heat_above_fuel"));
    auto record = std::make_shared<EngineRecord>(*ship.judgement.record);
    for (Value& value : record->readings.back().values)
        if (quantity(value.quantity).name == "fuel_consumption") {
            *value.number *= 0.75;
            *value.value_si *= 0.75;
        }
    ship.judgement.record = record;
    EXPECT_TRUE(says(reviewed(ship).cards[0].remarks, "heat_above_fuel"));
}

} // namespace evenstroke::indicator
