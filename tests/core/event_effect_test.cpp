// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/event_effect.h"
#include "core/reading/running_hours.h"
#include "core/trend/drift_input.h"
#include "tests/core/survey_fixture.h"

#include <gtest/gtest.h>
#include <set>

namespace evenstroke {
namespace {

using namespace survey_fixture;

bool contains(const std::string& text, std::string_view part) { return text.find(part) != std::string::npos; }

Event event_of(const char* kind, Place place, const char* part = "")
{
    return {"", {day("2031-01-10"), 0}, place, kind, "", {}, "", part, true};
}

TEST(EventKinds, EachHasItsOwnLetter)
{
    std::set<char> letters;
    for (const EventKind& kind : all_event_kinds()) {
        EXPECT_TRUE(kind.key >= 'A' && kind.key <= 'Z') << kind.name;
        EXPECT_TRUE(letters.insert(kind.key).second) << kind.name << " shares " << kind.key;
    }
}

TEST(EventEffect, WorkOnACylinderStartsItAnew)
{
    const Engine engine = make_engine(6);
    const std::string sentence = event_effect_sentence(event_of("overhaul", Place::cylinder(4)), engine);
    EXPECT_TRUE(contains(sentence, "cylinder 4 is compared anew")) << sentence;
    EXPECT_TRUE(contains(event_effect_sentence(event_of("overhaul", Place::engine()), engine), "every cylinder"));
}

TEST(EventEffect, CoolerCleaningLeavesTheCylinders)
{
    EXPECT_TRUE(contains(event_effect_sentence(event_of("cooler_cleaning", Place::cooler(1)), make_engine(6)), "cylinders go on"));
}

TEST(EventEffect, SensorSaysWhichQuantityOrThatItIsNotSaid)
{
    const Engine engine = make_engine(6);
    EXPECT_TRUE(contains(event_effect_sentence(event_of("sensor_replaced", Place::cylinder(3), "exhaust_temperature"), engine),
                         "of cylinder 3 takes its own level anew"));
    EXPECT_TRUE(contains(event_effect_sentence(event_of("sensor_replaced", Place::cylinder(3)), engine), "Name the quantity"));
}

TEST(EventEffect, WashAndDockingAreMarks)
{
    for (const char* kind : {"turbocharger_wash", "docking", "note"}) {
        EXPECT_EQ(event_effect_word(event_of(kind, Place::engine())), "mark only") << kind;
        EXPECT_TRUE(contains(event_effect_sentence(event_of(kind, Place::engine()), make_engine(6)), "goes on")) << kind;
    }
}

TEST(EventEffect, SaysOnWhichSideOfItAReadingOfTheSameDayStands)
{
    const Judgement judgement = make_judgement();
    const EngineRecord& record = *judgement.record;
    const TimePoint taken = record.readings[4].taken_at.utc;
    Event event = event_of("overhaul", Place::cylinder(4));
    event.date.utc = std::chrono::floor<std::chrono::days>(taken);
    const bool after = first_reading_after(record, event) <= 4;
    const std::string words = same_day_sentence(event, record);
    EXPECT_TRUE(contains(words, utc_text(taken))) << words;
    EXPECT_TRUE(contains(words, after ? "counts as taken after this" : "counts as taken before this")) << words;
    event.date.utc = taken + (after ? std::chrono::hours(1) : std::chrono::hours(-1));
    event.date_only = false;
    EXPECT_TRUE(same_day_sentence(event, record).empty()) << "a time leaves nothing open";
    EXPECT_EQ(first_reading_after(record, event) <= 4, !after) << "and puts the reading on the other side";
    event = event_of("overhaul", Place::cylinder(4));
    event.date.utc = std::chrono::floor<std::chrono::days>(taken) + std::chrono::days(3);
    EXPECT_TRUE(same_day_sentence(event, record).empty());
}

TEST(EventEffect, RemindsOfTheRecordBookWhereTheTechnicalFileIsTouched)
{
    EXPECT_TRUE(contains(record_book_reminder(event_of("timing_adjusted", Place::cylinder(1))), "no approved record book"));
    EXPECT_TRUE(record_book_reminder(event_of("overhaul", Place::cylinder(1))).empty());
}

TEST(EventPlace, AsksForACylinderWhereTheKindBelongsToOne)
{
    const Engine engine = make_engine(6);
    const EventKind& valves = *find_event_kind("fuel_valves");
    EXPECT_EQ(place_of_event(valves, 4, engine).value(), Place::cylinder(4));
    EXPECT_TRUE(contains(place_of_event(valves, std::nullopt, engine).error().what_to_do, "number"));
    EXPECT_TRUE(contains(place_of_event(valves, 7, engine).error().what_happened, "6 cylinders"));
}

TEST(EventPlace, OverhaulWithoutNumberIsOfTheEngine)
{
    const Engine engine = make_engine(6);
    EXPECT_EQ(place_of_event(*find_event_kind("overhaul"), std::nullopt, engine).value(), Place::engine());
    EXPECT_EQ(place_of_event(*find_event_kind("turbocharger_wash"), 2, engine).value(), Place::turbocharger(2));
    EXPECT_FALSE(place_of_event(*find_event_kind("docking"), 1, engine).has_value());
}

TEST(RunningHours, LieOnTheLineBetweenTwoReadings)
{
    const Judgement judgement = make_judgement(); // 500 h a month
    const auto& readings = judgement.record->readings;
    const TimePoint first = readings[3].taken_at.utc, second = readings[4].taken_at.utc;
    const auto at = running_hours_at(readings, first + (second - first) / 2);
    ASSERT_TRUE(at.has_value());
    // 40000 - 500 * 8 and 500 h more; half a second's rounding of the middle is far below 0.01 h.
    EXPECT_NEAR(*at, 36250.0, 0.01);
    EXPECT_FALSE(running_hours_at(readings, readings.back().taken_at.utc + std::chrono::hours(1)).has_value());
    EXPECT_FALSE(running_hours_at(readings, readings.front().taken_at.utc - std::chrono::hours(1)).has_value());
}

} // namespace
} // namespace evenstroke
