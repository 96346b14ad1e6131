// SPDX-License-Identifier: GPL-3.0-or-later
// What people say of flags: it stays beside them, and new evidence brings them up again. All readings invented.
#include "core/explanation/explanation.h"
#include "core/trend/judgement.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

#include <algorithm>

using namespace evenstroke;

namespace {

Judgement judged(EngineRecord record) { return judge(std::make_shared<EngineRecord>(std::move(record))); }

/// Compression pressure of one cylinder falls 0.9 bar a month from a reading on, the maximum pressure with it.
EngineRecord leaking(std::size_t readings, int cylinder, std::size_t onset)
{
    EngineRecord record = example_record(readings);
    for (std::size_t i = onset; i < readings; ++i) {
        const double months = static_cast<double>(i - onset + 1);
        move_value(record.readings[i], "compression_pressure", Place::cylinder(cylinder), -0.9 * months);
        move_value(record.readings[i], "maximum_pressure", Place::cylinder(cylinder), -0.75 * months);
    }
    return record;
}

/// All quantities of a cylinder take a new level at once, as after an overhaul nobody wrote down.
EngineRecord with_unrecorded_work(std::size_t readings, int cylinder, std::size_t from)
{
    EngineRecord record = example_record(readings);
    for (std::size_t i = from; i < readings; ++i) {
        const Place place = Place::cylinder(cylinder);
        move_value(record.readings[i], "compression_pressure", place, 6.0);
        move_value(record.readings[i], "maximum_pressure", place, 8.0);
        move_value(record.readings[i], "exhaust_temperature", place, 24.0);
        move_value(record.readings[i], "fuel_index", place, -3.0);
    }
    return record;
}

FlagNote note_on(const EngineRecord& record, const Flag& flag, FlagNote::Said said)
{
    FlagNote note;
    note.id = "n";
    note.subject = flag.subject;
    note.flagged_at = record.readings[flag.reading].taken_at.utc;
    note.said = said;
    note.evidence = flag.evidence;
    note.level = flag.level_now;
    note.words = "rings looked at through the ports";
    note.who = "A. Chief";
    return note;
}

} // namespace

TEST(FlagNotes, AFlagThatWasSeenKeepsItsLevelAndItsNote)
{
    EngineRecord record = leaking(34, 4, 26);
    const Judgement before = judged(record);
    ASSERT_FALSE(before.standing_flags().empty());
    const Flag flag = *before.standing_flags().front();
    EXPECT_FALSE(flag.seen());
    record.notes.push_back(note_on(record, flag, FlagNote::Said::seen));
    const Judgement after = judged(record);
    const Flag& seen = *after.standing_flags().front();
    EXPECT_TRUE(seen.seen());
    EXPECT_EQ(seen.level_now, flag.level_now) << "nothing is taken out of the record";
    EXPECT_EQ(seen.note->words, "rings looked at through the ports");
    EXPECT_EQ(after.level, before.level);
    // What may lie behind it says what was found, beside the flag's own sentence.
    const Explanation explanation = explain(after);
    const auto fourth = std::find_if(explanation.subjects.begin(), explanation.subjects.end(),
                                     [&](const SubjectExplanation& one) { return one.subject == flag.subject; });
    ASSERT_NE(fourth, explanation.subjects.end());
    EXPECT_EQ(fourth->flag_sentence, seen.sentence);
    EXPECT_NE(fourth->flag_note.find("A. Chief: rings looked at through the ports."), std::string::npos) << fourth->flag_note;
}

TEST(FlagNotes, NewEvidenceOrAHigherLevelBringsAFlagUpAgain)
{
    EngineRecord record = leaking(34, 4, 26);
    const Flag flag = *judged(record).standing_flags().front();
    FlagNote note = note_on(record, flag, FlagNote::Said::seen);
    note.evidence -= 0.9;
    record.notes = {note};
    EXPECT_TRUE(judged(record).standing_flags().front()->seen()) << "less than a unit of evidence is nothing new";
    record.notes.front().evidence -= 0.2;
    EXPECT_TRUE(judged(record).standing_flags().front()->reopened);
    record.notes = {note_on(record, flag, FlagNote::Said::seen)};
    record.notes.front().level = Level::note;
    EXPECT_TRUE(judged(record).standing_flags().front()->reopened);
}

TEST(FlagNotes, TheNewestNoteCountsAndCanBeTakenBack)
{
    EngineRecord record = leaking(34, 4, 26);
    const Flag flag = *judged(record).standing_flags().front();
    record.notes = {note_on(record, flag, FlagNote::Said::seen), note_on(record, flag, FlagNote::Said::withdrawn)};
    EXPECT_FALSE(judged(record).standing_flags().front()->note);
    FlagNote elsewhere = note_on(record, flag, FlagNote::Said::seen);
    elsewhere.subject = Place::cylinder(1);
    record.notes = {elsewhere};
    EXPECT_FALSE(judged(record).standing_flags().front()->note) << "a note belongs to one flag";
}

TEST(FlagNotes, FlagsThatNobodyHasSeenStandFirst)
{
    EngineRecord record = leaking(34, 4, 24);
    for (std::size_t i = 26; i < record.readings.size(); ++i) {
        const double months = static_cast<double>(i - 26 + 1);
        move_value(record.readings[i], "compression_pressure", Place::cylinder(2), -0.9 * months);
        move_value(record.readings[i], "maximum_pressure", Place::cylinder(2), -0.75 * months);
    }
    const Judgement before = judged(record);
    ASSERT_GE(before.standing_flags().size(), 2u);
    const Flag worst = *before.standing_flags().front();
    record.notes = {note_on(record, worst, FlagNote::Said::seen)};
    const Judgement after = judged(record);
    EXPECT_NE(after.standing_flags().front()->subject, worst.subject);
    EXPECT_EQ(after.standing_flags().back()->subject, worst.subject);
}

TEST(FlagNotes, NoWorkWasDoneClosesTheQuestion)
{
    EngineRecord record = with_unrecorded_work(34, 3, 22);
    const Judgement before = judged(record);
    const auto question = std::find_if(before.flags.begin(), before.flags.end(),
                                       [](const Flag& flag) { return flag.severity == Level::ask; });
    ASSERT_NE(question, before.flags.end());
    EXPECT_EQ(question->level_now, Level::ask);
    record.notes = {note_on(record, *question, FlagNote::Said::no_work)};
    const Judgement after = judged(record);
    const auto answered = std::find_if(after.flags.begin(), after.flags.end(),
                                       [](const Flag& flag) { return flag.severity == Level::ask; });
    ASSERT_NE(answered, after.flags.end()) << "the question stays in the record";
    EXPECT_EQ(answered->level_now, Level::quiet);
    ASSERT_TRUE(answered->note);
    EXPECT_EQ(answered->note->said, FlagNote::Said::no_work);
}
