// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/audit.h"
#include "storage/card_store.h"

namespace evenstroke::storage {
namespace {

/// A reading with a card of cylinders 3 and 4, and what the card of cylinder 3 gave it.
class WithdrawnCards : public StorageTest
{
protected:
    WithdrawnCards()
    {
        write_engine(QStringLiteral("one"), header + "2029-01,2029-01-10T08:00Z,maximum_pressure,3,141.5,bar\n"
                                                     "2029-01,2029-01-10T08:00Z,speed,,95,r/min\n");
        write(QStringLiteral("one/cards/2029-01/3.csv"), "crank_angle_deg,pressure_bar\n-1,100\n0,101.5\n");
        write(QStringLiteral("one/cards/2029-01/4.csv"), "crank_angle_deg,pressure_bar\n-1,100\n0,103.5\n");
        EXPECT_FALSE(take_folder(*history_, QStringLiteral("one")).anything_refused());
        engine_ = only_engine(*history_);
        reading_ = readings_of(*history_).front().id;
        value_of_result(ReadingStore(*history_).accept_card_values(
            reading_, {from_card("mean_indicated_pressure", 3, 16.5), from_card("mean_indicated_pressure", 4, 16.1)}, chief_));
    }
    static ValueFromCard from_card(const char* name, int cylinder, double number)
    {
        const QuantityId id = find_quantity(name, Place::Kind::cylinder).value();
        return {id, Place::cylinder(cylinder), number, {quantity(id).unit, PressureKind::none}};
    }
    CardStore store() { return CardStore(*history_); }
    std::string card_of(int cylinder)
    {
        for (const CardEntry& card : value_of_result(store().list(engine_)))
            if (card.cylinder == cylinder)
                return card.id;
        return {};
    }
    Reading reading() { return readings_of(*history_).front(); }
    void expect_sound()
    {
        const auto findings = value_of_result(verify(*history_));
        EXPECT_TRUE(findings.sound()) << (findings.sentences.empty() ? "" : findings.sentences.front());
    }

    std::unique_ptr<History> history_ = memory();
    std::string engine_, reading_;
    const Signature why_{"A. Chief", "the indicator was on cylinder 2"};
};

TEST_F(WithdrawnCards, LeaveTheReadingWithWhatTheyGaveItAndStayInTheFile)
{
    const qint64 before = value_of_result(VesselStore(*history_).engines()).front().input_revision;
    const std::string card = card_of(3);
    EXPECT_EQ(value_of_result(store().withdraw(card, why_)), 1) << "the mean indicated pressure";
    EXPECT_TRUE(card_of(3).empty());
    EXPECT_FALSE(card_of(4).empty());
    EXPECT_GT(value_of_result(VesselStore(*history_).engines()).front().input_revision, before) << "what is shown is worked out anew";
    const Reading now = reading();
    const Value* const gone = find_value(now, "mean_indicated_pressure", Place::cylinder(3));
    EXPECT_TRUE(!gone || gone->missing == MissingReason::not_read);
    EXPECT_EQ(find_value(now, "mean_indicated_pressure", Place::cylinder(4))->typed, "16.1");
    EXPECT_EQ(find_value(now, "maximum_pressure", Place::cylinder(3))->typed, "141.5") << "read by hand";
    const auto corrections = value_of_result(ReadingStore(*history_).corrections(reading_));
    EXPECT_EQ(corrections.back().old_value.typed, "16.5");
    EXPECT_EQ(corrections.back().by.why, why_.why);
    const auto withdrawn = value_of_result(store().withdrawn(engine_));
    ASSERT_EQ(withdrawn.size(), 1U);
    EXPECT_EQ(withdrawn[0].card.id, card);
    EXPECT_EQ(withdrawn[0].card.reading_id, reading_);
    EXPECT_EQ(withdrawn[0].card.cylinder, 3);
    EXPECT_EQ(withdrawn[0].who, "A. Chief");
    EXPECT_EQ(withdrawn[0].why, why_.why);
    expect_sound();
}

TEST_F(WithdrawnCards, ComeBackAsTheyWere)
{
    const std::string card = card_of(3);
    const CardTrace trace = value_of_result(store().load(card));
    value_of_result(store().withdraw(card, why_));
    expect_done(store().restore(card, {"A. Chief", "it was right after all"}));
    EXPECT_EQ(card_of(3), card);
    EXPECT_EQ(value_of_result(store().load(card)).pressure_bar, trace.pressure_bar);
    EXPECT_TRUE(value_of_result(store().withdrawn(engine_)).empty());
    EXPECT_EQ(value_of_result(ReadingStore(*history_).accept_card_values(reading_, {from_card("mean_indicated_pressure", 3, 16.5)}, chief_)).added, 1);
    expect_sound();
}

TEST_F(WithdrawnCards, MakeRoomForAnother)
{
    const std::string card = card_of(3);
    const CardTrace trace = value_of_result(store().load(card));
    value_of_result(store().withdraw(card, why_));
    const auto same = store().add_all(reading_, {{3, &trace}}, chief_);
    ASSERT_FALSE(same.has_value());
    EXPECT_NE(same.error().what_happened.find("was withdrawn"), std::string::npos) << same.error().text();
    EXPECT_FALSE(store().foresee(reading_, {{3, &trace}}).has_value());
    EXPECT_FALSE(store().add(reading_, 3, trace, chief_).has_value());
    EXPECT_EQ(value_of_result(store().add_all(reading_, {{2, &trace}}, chief_)).added, 1) << "of the cylinder it was taken on";
    CardTrace another = trace;
    another.pressure_bar.back() = 99.0;
    EXPECT_EQ(value_of_result(store().add_all(reading_, {{3, &another}}, chief_)).added, 1);
    const auto back = store().restore(card, why_);
    ASSERT_FALSE(back.has_value());
    EXPECT_NE(back.error().what_happened.find("another card of cylinder 3"), std::string::npos) << back.error().text();
    expect_sound();
}

TEST_F(WithdrawnCards, AreNotTakenInAgainWithTheirFolder)
{
    value_of_result(store().withdraw(card_of(4), why_));
    const TakeReport again = take_folder(*history_, QStringLiteral("one"));
    EXPECT_TRUE(card_of(4).empty());
    EXPECT_EQ(again.folders.front().cards.fresh, 0);
    EXPECT_EQ(again.folders.front().cards.same, 2);
    expect_sound();
}

TEST_F(WithdrawnCards, NeedANameAReasonAndACard)
{
    EXPECT_FALSE(store().withdraw(card_of(3), {"A. Chief", ""}).has_value());
    EXPECT_FALSE(store().withdraw(card_of(3), {"", "choked"}).has_value());
    EXPECT_FALSE(store().withdraw("no such card", why_).has_value());
    EXPECT_FALSE(store().restore(card_of(3), why_).has_value()) << "it is in use";
    EXPECT_EQ(value_of_result(store().list(engine_)).size(), 2U);
    expect_done(ReadingStore(*history_).withdraw(reading_, why_));
    const auto of_withdrawn = store().withdraw(card_of(3), why_);
    ASSERT_FALSE(of_withdrawn.has_value());
    EXPECT_NE(of_withdrawn.error().what_happened.find("is withdrawn"), std::string::npos) << of_withdrawn.error().text();
    expect_sound();
}

TEST_F(WithdrawnCards, OfADraftGoWithItWhenItIsThrownAway)
{
    ReadingStore readings(*history_);
    const Reading draft = value_of_result(readings.make_draft(Owner::engine(engine_), "2029-02", {now_, 0}, chief_));
    const CardTrace trace = value_of_result(store().load(card_of(3)));
    const std::string card = value_of_result(store().add(draft.id, 1, trace, chief_));
    value_of_result(store().add(draft.id, 2, trace, chief_));
    value_of_result(readings.accept_card_values(draft.id, {from_card("mean_indicated_pressure", 1, 16.5)}, chief_));
    EXPECT_EQ(value_of_result(store().withdraw(card, why_)), 1);
    expect_sound();
    expect_done(readings.discard_draft(draft.id, chief_));
    EXPECT_EQ(value_of_result(store().list(engine_)).size(), 2U);
    EXPECT_TRUE(value_of_result(store().withdrawn(engine_)).empty());
    expect_sound();
}

} // namespace
} // namespace evenstroke::storage
