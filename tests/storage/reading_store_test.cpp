// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/audit.h"
#include "storage/engine_record.h"
#include "storage/sql.h"

namespace evenstroke::storage {
namespace {

class Readings : public StorageTest
{
protected:
    void SetUp() override
    {
        history_ = memory();
        value_of_result(VesselStore(*history_).save_document(engine_json().toStdString(), chief_));
        engine_ = only_engine(*history_);
    }
    ReadingStore store() { return ReadingStore(*history_); }
    Owner owner() const { return Owner::engine(engine_); }
    Reading draft(const char* name = "2030-03")
    {
        return value_of_result(store().make_draft(owner(), name, {now_, 60}, chief_));
    }
    static Value typed(const char* quantity_name, Place place, const char* text, const char* unit_text)
    {
        Value value;
        value.quantity = *find_quantity(quantity_name, place.kind);
        value.place = place;
        value.typed = text;
        value.unit = find_unit(unit_text).value().id;
        value.kind = find_unit(unit_text).value().kind;
        return value;
    }
    Reading closed(const char* name = "2030-03")
    {
        const Reading made = draft(name);
        expect_done(store().save_value(made.id, typed("speed", Place::engine(), "95.4", "r/min")));
        expect_done(
            store().save_value(made.id, typed("maximum_pressure", Place::cylinder(4), "142", "bar abs")));
        expect_done(store().close(made.id, chief_));
        return value_of_result(store().reading(made.id));
    }
    qint64 input_revision()
    {
        return value_of_result(VesselStore(*history_).engines()).front().input_revision;
    }

    std::unique_ptr<History> history_;
    std::string engine_;
};

TEST_F(Readings, AreKeptValueByValueWhileTheyAreDrafts)
{
    const Reading made = draft();
    EXPECT_FALSE(made.closed);
    expect_done(store().save_value(made.id, typed("maximum_pressure", Place::cylinder(4), "14,2", "MPa")));
    expect_done(store().save_value(made.id, typed("maximum_pressure", Place::cylinder(5), "14..2", "MPa")));
    Value missing = typed("exhaust_temperature", Place::cylinder(1), "", "°C");
    missing.missing = MissingReason::not_fitted;
    expect_done(store().save_value(made.id, missing));
    const Reading reading = value_of_result(store().reading(made.id));
    ASSERT_EQ(reading.values.size(), 3U);
    const Value* value = find_value(reading, "maximum_pressure", Place::cylinder(4));
    EXPECT_EQ(value->typed, "14,2");
    EXPECT_DOUBLE_EQ(value->value_si.value_or(0.0), 142e5);
    EXPECT_EQ(find_value(reading, "maximum_pressure", Place::cylinder(5))->typed, "14..2")
        << "what cannot be read yet is kept too";
    EXPECT_FALSE(find_value(reading, "maximum_pressure", Place::cylinder(5))->value_si.has_value());

    expect_done(store().save_value(made.id, typed("maximum_pressure", Place::cylinder(5), "", "MPa")));
    EXPECT_EQ(value_of_result(store().reading(made.id)).values.size(), 2U) << "an emptied box is gone";
    EXPECT_TRUE(value_of_result(store().load(engine_)).empty()) << "a draft is judged by nobody";
    EXPECT_EQ(value_of_result(store().list(owner())).front().state, ReadingState::draft);
}

TEST_F(Readings, AreSavedAsAWholeToo)
{
    Reading made = draft();
    made.name = "2030-03 second";
    made.values = {typed("speed", Place::engine(), "95", "r/min"),
                   typed("load_percent", Place::engine(), "75", "%")};
    expect_done(store().save_draft(made));
    made.values.pop_back();
    expect_done(store().save_draft(made));
    const Reading reading = value_of_result(store().reading(made.id));
    EXPECT_EQ(reading.name, "2030-03 second");
    EXPECT_EQ(reading.values.size(), 1U);
}

TEST_F(Readings, CanBeThrownAwayOnlyAsDrafts)
{
    const Reading made = draft();
    expect_done(store().save_value(made.id, typed("speed", Place::engine(), "95", "r/min")));
    expect_done(store().discard_draft(made.id, chief_));
    EXPECT_TRUE(value_of_result(store().list(owner())).empty());
    EXPECT_FALSE(store().discard_draft(closed().id, chief_).has_value());
    EXPECT_TRUE(value_of_result(verify(*history_)).sound());
}

TEST_F(Readings, HaveNamesOfTheirOwn)
{
    draft("2030-03");
    const auto again = store().make_draft(owner(), "2030-03", {now_, 0}, chief_);
    ASSERT_FALSE(again.has_value());
    EXPECT_NE(again.error().what_happened.find("already"), std::string::npos);
    EXPECT_FALSE(store().make_draft(owner(), "", {now_, 0}, chief_).has_value());
    EXPECT_FALSE(store().make_draft(owner(), "2030-04", {now_, 0}, Signature{}).has_value())
        << "nobody signed";
}

TEST_F(Readings, AreNotClosedEmptyOrUnreadable)
{
    const Reading made = draft();
    EXPECT_FALSE(store().close(made.id, chief_).has_value());
    expect_done(store().save_value(made.id, typed("speed", Place::engine(), "9..5", "r/min")));
    const Done done = store().close(made.id, chief_);
    ASSERT_FALSE(done.has_value());
    EXPECT_EQ(done.error().what_happened, "\"9..5\" at speed cannot be read as a number.");
}

TEST_F(Readings, ChangeNoMoreByTypingOnceClosed)
{
    const qint64 before = input_revision();
    const Reading reading = closed();
    EXPECT_GT(input_revision(), before);
    EXPECT_FALSE(store().save_value(reading.id, typed("speed", Place::engine(), "96", "r/min")).has_value());
    EXPECT_FALSE(store().save_draft(reading).has_value());
    EXPECT_FALSE(store().close(reading.id, chief_).has_value());
}

TEST_F(Readings, KeepTheOldValueWhenCorrected)
{
    const Reading reading = closed();
    const qint64 before = input_revision();
    now_ += std::chrono::hours(24);
    expect_done(store().correct(reading.id, typed("maximum_pressure", Place::cylinder(4), "124", "bar abs"),
                                {"B. Second", "digits swapped"}));
    EXPECT_GT(input_revision(), before);
    const auto corrections = value_of_result(store().corrections(reading.id));
    ASSERT_EQ(corrections.size(), 1U);
    EXPECT_EQ(corrections[0].old_value.typed, "142");
    EXPECT_EQ(corrections[0].old_value.kind, PressureKind::absolute);
    EXPECT_EQ(corrections[0].new_value.typed, "124");
    EXPECT_EQ(corrections[0].by.who, "B. Second");
    EXPECT_EQ(corrections[0].by.why, "digits swapped");
    EXPECT_EQ(corrections[0].at, now_);
    EXPECT_EQ(find_value(readings_of(*history_).front(), "maximum_pressure", Place::cylinder(4))->typed,
              "124");
    EXPECT_EQ(value_of_result(store().corrections_of(owner())).size(), 1U);
    EXPECT_EQ(value_of_result(store().list(owner())).front().corrections, 1);
    const auto trail = value_of_result(audit_entries(*history_, reading.id));
    EXPECT_EQ(trail.front().detail, "maximum_pressure of cylinder 4: 142 bar abs -> 124 bar abs");
    EXPECT_TRUE(value_of_result(verify(*history_)).sound());
}

TEST_F(Readings, AreCorrectedOnlyWithANameAReasonAndAChange)
{
    const Reading reading = closed();
    const Value right = typed("speed", Place::engine(), "95.6", "r/min");
    EXPECT_FALSE(store().correct(reading.id, right, {"", "because"}).has_value());
    EXPECT_FALSE(store().correct(reading.id, right, {"A. Chief", ""}).has_value());
    EXPECT_FALSE(
        store().correct(reading.id, typed("speed", Place::engine(), "95.4", "r/min"), chief_).has_value());
    EXPECT_FALSE(
        store().correct(reading.id, typed("speed", Place::engine(), "95..4", "r/min"), chief_).has_value());
    EXPECT_TRUE(value_of_result(store().corrections(reading.id)).empty());
    expect_done(store().correct(reading.id, typed("load_percent", Place::engine(), "75", "%"), chief_));
    EXPECT_EQ(value_of_result(store().corrections(reading.id)).front().old_value.missing,
              MissingReason::not_read)
        << "a forgotten value was added";
}

TEST_F(Readings, TakeAnotherTimeOnlyWithAReasonAndKeepTheOldOneInTheTrail)
{
    const Reading reading = closed();
    const StampedTime right{reading.taken_at.utc - std::chrono::hours(24), reading.taken_at.offset_minutes};
    EXPECT_FALSE(store().correct_time(reading.id, right, {"A. Chief", ""}).has_value());
    EXPECT_FALSE(store().correct_time(reading.id, reading.taken_at, chief_).has_value());
    expect_done(store().correct_time(reading.id, right, chief_));
    EXPECT_EQ(readings_of(*history_).front().taken_at.utc, right.utc);
    const auto trail = value_of_result(audit_entries(*history_, reading.id));
    EXPECT_EQ(trail.front().detail, "time of " + reading.name + ": " + utc_text(reading.taken_at.utc) + " -> " +
                                        utc_text(right.utc));
    EXPECT_TRUE(value_of_result(verify(*history_)).sound());
}

TEST_F(Readings, RememberThatAValueWasConfirmed)
{
    const Reading reading = closed();
    const ValuePlace place{*find_quantity("speed"), Place::engine(), Phase::reading};
    expect_done(store().set_confirmed(reading.id, place, true, chief_));
    EXPECT_TRUE(find_value(readings_of(*history_).front(), "speed")->confirmed);
    EXPECT_FALSE(
        find_value(readings_of(*history_).front(), "maximum_pressure", Place::cylinder(4))->confirmed);
    expect_done(store().set_confirmed(reading.id, place, false, chief_));
    EXPECT_FALSE(find_value(readings_of(*history_).front(), "speed")->confirmed);
    EXPECT_FALSE(store()
                     .set_confirmed(reading.id,
                                    {*find_quantity("load_percent"), Place::engine(), Phase::reading}, true,
                                    chief_)
                     .has_value());
    EXPECT_TRUE(value_of_result(verify(*history_)).sound());
}

TEST_F(Readings, AreWithdrawnWithAReasonAndNeverErased)
{
    const Reading reading = closed();
    EXPECT_FALSE(store().withdraw(reading.id, {"A. Chief", ""}).has_value());
    expect_done(store().withdraw(reading.id, chief_));
    EXPECT_TRUE(readings_of(*history_).empty());
    EXPECT_EQ(value_of_result(store().list(owner())).front().state, ReadingState::withdrawn);
    EXPECT_EQ(value_of_result(store().reading(reading.id)).values.size(), 2U);
    expect_done(store().restore(reading.id, chief_));
    EXPECT_EQ(readings_of(*history_).size(), 1U);
    EXPECT_TRUE(value_of_result(verify(*history_)).sound());
}

TEST_F(Readings, ComeInOrderOfTimeAndValuesInWalkingOrder)
{
    write_engine(QStringLiteral("engine"),
                 header + "c,2029-03-12T08:30Z,fuel_index,2,70,%\nc,2029-03-12T08:30Z,fuel_index,,71,%\nc,"
                          "2029-03-12T08:30Z,speed,,95,r/min\n"
                          "a,2029-03-12T09:00+01:00,speed,,95,r/min\nb,2029-03-12T08:15Z,speed,,95,r/min\n");
    take_folder(*history_, QStringLiteral("engine"));
    const auto readings = readings_of(*history_);
    ASSERT_EQ(readings.size(), 3U);
    EXPECT_EQ(readings[0].name + readings[1].name + readings[2].name, "abc");
    ASSERT_EQ(readings[2].values.size(), 3U);
    EXPECT_EQ(quantity(readings[2].values[0].quantity).name, "speed");
    EXPECT_EQ(readings[2].values[1].place, Place::engine());
    EXPECT_EQ(readings[2].values[2].place, Place::cylinder(2));
    EXPECT_NE(readings[2].values[1].quantity, readings[2].values[2].quantity)
        << "the engine's fuel index and the cylinders' are two quantities";
}

TEST_F(Readings, AreHandedToTheJudgingWithTheRevisionTheyHave)
{
    closed();
    const LoadedRecord loaded = value_of_result(load_record(*history_, engine_));
    EXPECT_EQ(loaded.input_revision, input_revision());
    EXPECT_EQ(loaded.record->engine.name, "main engine");
    EXPECT_EQ(loaded.record->engine.id, engine_);
    EXPECT_EQ(loaded.record->vessel.name, "Quiet Barley");
    EXPECT_EQ(loaded.record->readings.size(), 1U);
}

TEST_F(Readings, OfAnEngineThatIsNotThereAreNotFound)
{
    const auto loaded = store().load("nobody");
    ASSERT_FALSE(loaded.has_value());
    EXPECT_EQ(loaded.error().kind, Problem::Kind::not_found);
}

TEST_F(Readings, OfTheShipAreTypedOnceForAllEngines)
{
    closed();
    const std::string vessel = value_of_result(VesselStore(*history_).vessels()).front().id;
    const Reading shared = value_of_result(
        store().make_draft(Owner::vessel(vessel), "noon", {now_ + std::chrono::hours(6), 0}, chief_));
    Value sea = typed("sea_water_temperature", {Place::Kind::ship, 0}, "21", "°C");
    expect_done(store().save_value(shared.id, sea));
    const qint64 before = input_revision();
    expect_done(store().close(shared.id, chief_));
    EXPECT_GT(input_revision(), before);
    EXPECT_NE(find_value(readings_of(*history_).front(), "sea_water_temperature", {Place::Kind::ship, 0}),
              nullptr)
        << "six hours away";
}

} // namespace
} // namespace evenstroke::storage
