// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/audit.h"
#include "storage/engine_record.h"
#include "storage/event_store.h"
#include "storage/flag_note_store.h"
#include "storage/sql.h"

#include <QSqlQuery>

namespace evenstroke::storage {
namespace {

class FlagNotes : public StorageTest
{
protected:
    FlagNotes()
    {
        write_engine(QStringLiteral("one"), header + "2029-01,2029-01-10T08:00Z,load_percent,,75,%\n");
        take_folder(*history_, QStringLiteral("one"));
        engine_ = only_engine(*history_);
        note_.subject = Place::cylinder(3);
        note_.flagged_at = TimePoint(std::chrono::seconds(1'862'726'400));
        note_.evidence = 5.25;
        note_.level = Level::watch;
        note_.words = " fuel valve changed ";
        note_.who = "A. Chief";
    }

    std::unique_ptr<History> history_ = memory();
    std::string engine_;
    FlagNote note_;
};

TEST_F(FlagNotes, AreKeptAsWrittenAndReachTheJudging)
{
    const std::string id = value_of_result(FlagNoteStore(*history_).add(engine_, note_));
    note_.said = FlagNote::Said::withdrawn;
    note_.words.clear();
    value_of_result(FlagNoteStore(*history_).add(engine_, note_));
    const auto record = value_of_result(load_record(*history_, engine_)).record;
    ASSERT_EQ(record->notes.size(), 2U);
    const FlagNote& first = record->notes.front();
    EXPECT_EQ(first.id, id);
    EXPECT_EQ(first.subject, Place::cylinder(3));
    EXPECT_EQ(first.flagged_at, note_.flagged_at);
    EXPECT_EQ(first.evidence, 5.25);
    EXPECT_EQ(first.level, Level::watch);
    EXPECT_EQ(first.words, "fuel valve changed");
    EXPECT_EQ(first.who, "A. Chief");
    EXPECT_EQ(first.written_at, now_);
    EXPECT_EQ(record->notes.back().said, FlagNote::Said::withdrawn);
    EXPECT_TRUE(value_of_result(verify(*history_)).sound());
    EXPECT_EQ(value_of_result(audit_entries(*history_, id)).size(), 1U);
}

TEST_F(FlagNotes, MakeStoredJudgementsStale)
{
    const qint64 before = value_of_result(VesselStore(*history_).engines()).front().input_revision;
    value_of_result(FlagNoteStore(*history_).add(engine_, note_));
    EXPECT_GT(value_of_result(VesselStore(*history_).engines()).front().input_revision, before);
}

TEST_F(FlagNotes, NeedANameWordsAndAnEventOfThisEngine)
{
    const FlagNoteStore reading(*history_);
    const auto refused = [&](const FlagNote& note) { return !FlagNoteStore(*history_).add(engine_, note).has_value(); };
    FlagNote bad = note_;
    bad.who = "  ";
    EXPECT_TRUE(refused(bad));
    bad = note_;
    bad.words.clear();
    EXPECT_TRUE(refused(bad));
    bad = note_;
    bad.subject = Place::cylinder(7);
    EXPECT_TRUE(refused(bad)) << "the engine has six";
    bad = note_;
    bad.event_id = "no such event";
    EXPECT_TRUE(refused(bad));
    EXPECT_FALSE(FlagNoteStore(*history_).add("no such engine", note_).has_value());
    EXPECT_TRUE(value_of_result(reading.load(engine_)).empty()) << "nothing is half kept";

    Event event;
    event.date = parse_date("2029-01-11").value();
    event.kind = "fuel_valves";
    event.place = Place::cylinder(3);
    note_.event_id = value_of_result(EventStore(*history_).add(engine_, event, chief_));
    EXPECT_FALSE(refused(note_));
    EXPECT_EQ(value_of_result(reading.load(engine_)).front().event_id, note_.event_id);
}

TEST_F(FlagNotes, AreOnlyAddedTo)
{
    value_of_result(FlagNoteStore(*history_).add(engine_, note_));
    QSqlQuery query(history_->database());
    EXPECT_FALSE(query.exec(QStringLiteral("UPDATE flag_note SET words = 'nothing'")));
    EXPECT_FALSE(query.exec(QStringLiteral("DELETE FROM flag_note")));
}

} // namespace
} // namespace evenstroke::storage
