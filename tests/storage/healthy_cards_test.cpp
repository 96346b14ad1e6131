// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/audit.h"
#include "storage/card_store.h"
#include "storage/healthy_cards.h"

#include <QSqlQuery>

namespace evenstroke::storage {
namespace {

class HealthyCardsTest : public StorageTest
{
protected:
    HealthyCardsTest()
    {
        write_engine(QStringLiteral("one"), header + "2029-01,2029-01-10T08:00Z,speed,,95,r/min\n"
                                                     "2029-02,2029-02-10T08:00Z,speed,,96,r/min\n");
        take_folder(*history_, QStringLiteral("one"));
        engine_ = only_engine(*history_);
        const auto readings = value_of_result(ReadingStore(*history_).load(engine_));
        first_ = readings.front().id;
        second_ = readings.back().id;
        CardTrace trace;
        trace.crank_angle_deg = {-1.0, 0.0, 1.0};
        trace.pressure_bar = {100.0, 101.0, 100.5};
        value_of_result(CardStore(*history_).add(first_, 1, trace, chief_));
    }
    std::vector<HealthyCards> list() { return value_of_result(HealthyCardStore(*history_).list(engine_)); }
    Done say(const std::string& reading, bool healthy, const std::string& words = "after overhaul")
    {
        return HealthyCardStore(*history_).say(reading, healthy, words, {"A. Chief", ""});
    }

    std::unique_ptr<History> history_ = memory();
    std::string engine_, first_, second_;
};

TEST_F(HealthyCardsTest, AreCalledSoByNameAndWords)
{
    EXPECT_TRUE(list().empty());
    expect_done(say(first_, true));
    ASSERT_EQ(list().size(), 1U);
    EXPECT_EQ(list().front().reading_id, first_);
    EXPECT_EQ(list().front().who, "A. Chief");
    EXPECT_EQ(list().front().words, "after overhaul");
    EXPECT_EQ(list().front().at, now_);
    EXPECT_TRUE(value_of_result(verify(*history_)).sound());
}

TEST_F(HealthyCardsTest, CanBeTakenBackWithWordsAndCalledSoAgain)
{
    expect_done(say(first_, true, ""));
    EXPECT_FALSE(say(first_, true).has_value()) << "said already";
    EXPECT_FALSE(say(first_, false, " ").has_value()) << "no reason";
    expect_done(say(first_, false, "pickup was loose"));
    EXPECT_TRUE(list().empty());
    EXPECT_FALSE(say(first_, false).has_value());
    expect_done(say(first_, true));
    EXPECT_EQ(list().size(), 1U);
    EXPECT_TRUE(value_of_result(verify(*history_)).sound());
}

TEST_F(HealthyCardsTest, NeedCardsAClosedReadingAndAName)
{
    EXPECT_FALSE(say(second_, true).has_value()) << "no card there";
    EXPECT_FALSE(say("no such reading", true).has_value());
    EXPECT_FALSE(HealthyCardStore(*history_).say(first_, true, "good", {" ", ""}).has_value());
    const Reading draft = value_of_result(ReadingStore(*history_).make_draft(
        Owner::engine(engine_), "2029-03", parse_time("2029-03-10T08:00Z").value(), chief_));
    EXPECT_FALSE(say(draft.id, true).has_value());
    EXPECT_TRUE(list().empty());
    expect_done(say(first_, true));
    expect_done(ReadingStore(*history_).withdraw(first_, chief_));
    EXPECT_TRUE(list().empty()) << "out of use with its reading";
}

TEST_F(HealthyCardsTest, MakeStoredJudgementsStale)
{
    const qint64 before = value_of_result(VesselStore(*history_).engines()).front().input_revision;
    expect_done(say(first_, true));
    EXPECT_GT(value_of_result(VesselStore(*history_).engines()).front().input_revision, before);
}

TEST_F(HealthyCardsTest, AreOnlyAddedToAndMissedWhereAltered)
{
    expect_done(say(first_, true));
    QSqlQuery query(history_->database());
    EXPECT_FALSE(query.exec(QStringLiteral("UPDATE healthy_cards SET healthy = 0")));
    EXPECT_FALSE(query.exec(QStringLiteral("DELETE FROM healthy_cards")));
    ASSERT_TRUE(query.exec(QStringLiteral("DROP TRIGGER healthy_cards_no_update")));
    ASSERT_TRUE(query.exec(QStringLiteral("UPDATE healthy_cards SET words = 'other words'")));
    EXPECT_FALSE(value_of_result(verify(*history_)).sound());
}

} // namespace
} // namespace evenstroke::storage
