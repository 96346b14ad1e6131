// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/audit.h"
#include "storage/hand_out.h"

#include <cmath>

namespace evenstroke::storage {
namespace {

/// Results of cards that become values of a reading.
class CardValues : public StorageTest
{
protected:
    CardValues()
    {
        write_engine(QStringLiteral("one"), header +
                                                "2029-01,2029-01-10T08:00Z,maximum_pressure,1,141.5,bar\n"
                                                "2029-01,2029-01-10T08:00Z,maximum_pressure,3,,\n"
                                                "2029-01,2029-01-10T08:00Z,speed,,95,r/min\n");
        take_folder(*history_, QStringLiteral("one"));
        engine_ = only_engine(*history_);
        reading_ = closed().id;
    }
    Reading closed() { return value_of_result(store().load(engine_)).front(); }
    ReadingStore store() { return ReadingStore(*history_); }
    static ValueFromCard from_card(const char* name, int cylinder, double number,
                                   std::optional<PressureKind> kind = std::nullopt)
    {
        const QuantityId id = find_quantity(name, Place::Kind::cylinder).value();
        return {
            id, Place::cylinder(cylinder), number, {quantity(id).unit, kind.value_or(PressureKind::none)}};
    }
    void expect_sound() { EXPECT_TRUE(value_of_result(verify(*history_)).sound()); }

    std::unique_ptr<History> history_ = memory();
    std::string engine_, reading_;
    const Signature second_{"B. Second", ""};
};

TEST_F(CardValues, FillWhatIsEmptyAndLeaveWhatWasRead)
{
    const auto accepted = value_of_result(store().accept_card_values(
        reading_,
        {from_card("maximum_pressure", 1, 143.2), from_card("maximum_pressure", 2, 142.126),
         from_card("maximum_pressure", 3, 140.0), from_card("mean_indicated_pressure", 1, 16.23456)},
        second_));
    EXPECT_EQ(accepted.added, 3);
    EXPECT_EQ(accepted.corrected, 0);
    ASSERT_EQ(accepted.left_alone.size(), 1U);
    EXPECT_EQ(accepted.left_alone.front().place, Place::cylinder(1));
    const Reading reading = closed();
    EXPECT_EQ(find_value(reading, "maximum_pressure", Place::cylinder(1))->typed, "141.5");
    const Value* const filled = find_value(reading, "maximum_pressure", Place::cylinder(2));
    EXPECT_EQ(filled->typed, "142.13") << "one decimal more than p_max is shown with";
    EXPECT_EQ(filled->number, 142.13);
    EXPECT_EQ(filled->origin, Origin::card);
    EXPECT_EQ(filled->kind, PressureKind::gauge);
    EXPECT_EQ(find_value(reading, "maximum_pressure", Place::cylinder(3))->typed, "140");
    EXPECT_EQ(find_value(reading, "mean_indicated_pressure", Place::cylinder(1))->typed, "16.235");
    expect_sound();
}

TEST_F(CardValues, AreCorrectionsInAClosedReadingWithOneRowOfTheTrail)
{
    value_of_result(store().accept_card_values(
        reading_, {from_card("maximum_pressure", 2, 142.0), from_card("maximum_pressure", 4, 141.0)},
        second_));
    const auto corrections = value_of_result(store().corrections(reading_));
    ASSERT_EQ(corrections.size(), 2U);
    EXPECT_EQ(corrections.front().by.who, "B. Second");
    EXPECT_EQ(corrections.front().by.why, "from the card");
    EXPECT_EQ(corrections.front().old_value.missing, MissingReason::not_read);
    EXPECT_EQ(corrections.front().new_value.origin, Origin::card);
    const auto trail = value_of_result(audit_entries(*history_, reading_));
    ASSERT_EQ(trail.size(), 2U);
    EXPECT_EQ(trail.front().action, "corrected from cards");
    EXPECT_NE(trail.front().detail.find("maximum_pressure of cylinder 2: not read -> 142 bar"),
              std::string::npos)
        << trail.front().detail;
}

TEST_F(CardValues, TakeThePlaceOfAnEarlierCards)
{
    value_of_result(store().accept_card_values(reading_, {from_card("maximum_pressure", 2, 142.0)}, second_));
    const auto again = value_of_result(
        store().accept_card_values(reading_, {from_card("maximum_pressure", 2, 142.0)}, second_));
    EXPECT_EQ(again.same, 1);
    EXPECT_EQ(value_of_result(store().corrections(reading_)).size(), 1U) << "nothing changed";
    const auto better = value_of_result(
        store().accept_card_values(reading_, {from_card("maximum_pressure", 2, 143.0)}, second_));
    EXPECT_EQ(better.corrected, 1);
    const auto corrections = value_of_result(store().corrections(reading_));
    ASSERT_EQ(corrections.size(), 2U);
    EXPECT_EQ(corrections.back().old_value.origin, Origin::card);
    EXPECT_EQ(corrections.back().old_value.typed, "142");
    expect_sound();
}

TEST_F(CardValues, GiveWayToWhatIsReadLater)
{
    value_of_result(store().accept_card_values(reading_, {from_card("maximum_pressure", 2, 142.0)}, second_));
    Value read = *find_value(closed(), "maximum_pressure", Place::cylinder(1));
    read.place = Place::cylinder(2);
    expect_done(store().correct(reading_, read, chief_));
    const Reading later = closed();
    EXPECT_EQ(find_value(later, "maximum_pressure", Place::cylinder(2))->origin, Origin::read);
    EXPECT_EQ(value_of_result(
                  store().accept_card_values(reading_, {from_card("maximum_pressure", 2, 142.0)}, second_))
                  .left_alone.size(),
              1U);
    expect_sound();
}

TEST_F(CardValues, MakeStoredJudgementsStale)
{
    const qint64 before = value_of_result(VesselStore(*history_).engines()).front().input_revision;
    value_of_result(store().accept_card_values(reading_, {from_card("maximum_pressure", 2, 142.0)}, second_));
    EXPECT_GT(value_of_result(VesselStore(*history_).engines()).front().input_revision, before);
}

TEST_F(CardValues, StandInADraftLikeTypedOnes)
{
    const Reading draft = value_of_result(store().make_draft(
        Owner::engine(engine_), "2029-02", parse_time("2029-02-10T08:00Z").value(), chief_));
    Value half_typed = *find_value(closed(), "maximum_pressure", Place::cylinder(1));
    half_typed.typed = "14x";
    half_typed.number.reset();
    half_typed.value_si.reset();
    expect_done(store().save_value(draft.id, half_typed));
    const auto accepted = value_of_result(
        store().accept_card_values(draft.id,
                                   {from_card("maximum_pressure", 1, 141.0),
                                    from_card("maximum_pressure", 2, 142.0, PressureKind::absolute)},
                                   second_));
    EXPECT_EQ(accepted.added, 1);
    EXPECT_EQ(accepted.left_alone.size(), 1U) << "somebody is typing there";
    EXPECT_TRUE(value_of_result(store().corrections(draft.id)).empty());
    EXPECT_EQ(value_of_result(audit_entries(*history_, draft.id)).front().action, "taken from cards");
    half_typed.typed = "141";
    expect_done(store().save_value(draft.id, half_typed));
    expect_done(store().close(draft.id, chief_));
    const Reading now = value_of_result(store().reading(draft.id));
    EXPECT_EQ(find_value(now, "maximum_pressure", Place::cylinder(2))->kind, PressureKind::absolute);
    EXPECT_EQ(find_value(now, "maximum_pressure", Place::cylinder(2))->origin, Origin::card);
    expect_sound();
}

TEST_F(CardValues, AreTakenAllOrNone)
{
    EXPECT_FALSE(store()
                     .accept_card_values(reading_,
                                         {from_card("maximum_pressure", 2, 142.0),
                                          from_card("maximum_pressure", 4, -5.0, PressureKind::absolute)},
                                         second_)
                     .has_value());
    EXPECT_FALSE(store()
                     .accept_card_values(reading_,
                                         {from_card("maximum_pressure", 2, 142.0),
                                          from_card("maximum_pressure", 4, std::nan(""))},
                                         second_)
                     .has_value());
    ValueFromCard wrong = from_card("maximum_pressure", 2, 142.0);
    wrong.unit = find_unit("degC").value();
    EXPECT_FALSE(store().accept_card_values(reading_, {wrong}, second_).has_value());
    EXPECT_FALSE(store()
                     .accept_card_values(reading_, {from_card("maximum_pressure", 2, 142.0)}, {"", ""})
                     .has_value());
    EXPECT_FALSE(store().accept_card_values("no such reading", {}, second_).has_value());
    EXPECT_EQ(find_value(closed(), "maximum_pressure", Place::cylinder(2)), nullptr);
    expect_done(store().withdraw(reading_, chief_));
    EXPECT_FALSE(
        store().accept_card_values(reading_, {from_card("maximum_pressure", 2, 142.0)}, second_).has_value());
}

TEST_F(CardValues, AreHandedOutAndTakenInWithTheirOrigin)
{
    const std::string vessel = value_of_result(VesselStore(*history_).vessels()).front().id;
    value_of_result(hand_out(*history_, vessel, path(QStringLiteral("plain"))));
    EXPECT_FALSE(read(QStringLiteral("plain/main-engine/readings.csv")).contains("origin"))
        << "only where there is one";
    value_of_result(store().accept_card_values(reading_, {from_card("maximum_pressure", 2, 142.0)}, second_));
    value_of_result(hand_out(*history_, vessel, path(QStringLiteral("out"))));
    const QByteArray written = read(QStringLiteral("out/main-engine/readings.csv"));
    EXPECT_TRUE(written.contains(",missing_reason,origin\n")) << written.toStdString();
    EXPECT_TRUE(written.contains("maximum_pressure,2,142,bar,,,,card\n")) << written.toStdString();
    EXPECT_TRUE(written.contains("maximum_pressure,1,141.5,bar,,,,\n")) << written.toStdString();
    const auto other = memory();
    take_folder(*other, QStringLiteral("out"));
    const Reading again = value_of_result(ReadingStore(*other).load(only_engine(*other))).front();
    EXPECT_EQ(find_value(again, "maximum_pressure", Place::cylinder(2))->origin, Origin::card);
    EXPECT_EQ(find_value(again, "maximum_pressure", Place::cylinder(1))->origin, Origin::read);
    EXPECT_TRUE(value_of_result(verify(*other)).sound());
    EXPECT_FALSE(take_folder(*history_, QStringLiteral("out")).anything_refused());
    EXPECT_FALSE(take_folder(*history_, QStringLiteral("plain")).anything_refused());
}

TEST_F(CardValues, OfAnUnknownOriginAreRefusedInWords)
{
    write_engine(QStringLiteral("two"),
                 "reading,taken_at,quantity,cylinder,value,unit,origin\n"
                 "2029-03,2029-03-10T08:00Z,maximum_pressure,1,141.5,bar,gauge glass\n");
    const TakeReport report = take_folder(*history_, QStringLiteral("two"));
    ASSERT_EQ(report.folders.front().refused.size(), 1U);
    EXPECT_NE(report.folders.front().refused.front().reason.find("gauge glass"), std::string::npos);
}

} // namespace
} // namespace evenstroke::storage
