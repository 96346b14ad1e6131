// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/explanation.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

using namespace evenstroke;

namespace {

constexpr std::size_t readings = 26, onset = 18;

/// Adds to every reading from the onset on.
void change(EngineRecord& record, std::string_view name, Place place, double amount, bool ramp = false)
{
    for (std::size_t i = onset; i < record.readings.size(); ++i) {
        const double part = ramp ? static_cast<double>(i - onset + 1) / static_cast<double>(readings - onset) : 1.0;
        move_value(record.readings[i], name, place, part * amount);
    }
}

Explanation explained(EngineRecord record) { return explain(judge(std::make_shared<const EngineRecord>(std::move(record)))); }

const SubjectExplanation* subject_at(const Explanation& explanation, Place place)
{
    for (const SubjectExplanation& subject : explanation.subjects)
        if (subject.subject == place)
            return &subject;
    return nullptr;
}

std::string all_words(const Explanation& explanation)
{
    std::string words = explanation.sentence;
    for (const SubjectExplanation& subject : explanation.subjects) {
        words += subject.answer + subject.flag_sentence + subject.history + subject.cannot_tell;
        for (const Hypothesis& cause : subject.causes) {
            words += cause.what + cause.order + cause.course + cause.check_next + cause.urgency;
            for (const auto* lines : {&cause.fits, &cause.against, &cause.not_read})
                for (const std::string& line : *lines)
                    words += line + "; ";
        }
    }
    return words;
}

bool contains(const std::string& text, const char* part) { return text.find(part) != std::string::npos; }

EngineRecord with_leaking_valve()
{
    EngineRecord record = example_record(readings);
    const Place fourth = Place::cylinder(4);
    change(record, "exhaust_temperature", fourth, 30.0);
    change(record, "compression_pressure", fourth, -4.0);
    change(record, "maximum_pressure", fourth, -4.5);
    change(record, "mean_indicated_pressure", fourth, -0.5);
    return record;
}

TEST(Explanation, SaysPlainlyThatNothingIsOutOfTheUsual)
{
    const Explanation explanation = explained(example_record(readings));
    EXPECT_TRUE(explanation.subjects.empty());
    EXPECT_FALSE(explanation.too_few_readings);
    const std::string day = short_date(explanation.record->readings.back().taken_at.utc);
    EXPECT_EQ(explanation.sentence, "Nothing is out of the usual at reading r26 (" + day + ").");
}

TEST(Explanation, SaysThatTooFewReadingsAreThere)
{
    const Explanation few = explained(example_record(3));
    EXPECT_TRUE(few.too_few_readings);
    EXPECT_TRUE(contains(few.sentence, "too few readings"));
    EngineRecord none = example_record(1);
    none.readings.clear();
    EXPECT_FALSE(explained(none).reading.has_value());
}

TEST(Explanation, NamesALeakingExhaustValveWithItsEvidence)
{
    const Explanation explanation = explained(with_leaking_valve());
    const SubjectExplanation* fourth = subject_at(explanation, Place::cylinder(4));
    ASSERT_NE(fourth, nullptr);
    EXPECT_EQ(explanation.subjects.size(), 1U);
    ASSERT_FALSE(fourth->causes.empty());
    const Hypothesis& first = fourth->causes.front();
    EXPECT_EQ(first.fault->id, "exhaust_valve_leak");
    EXPECT_EQ(first.rank, 1);
    EXPECT_GT(first.explained.value_or(0.0), 0.8);
    EXPECT_TRUE(std::any_of(first.fits.begin(), first.fits.end(), [](const std::string& line) {
        return contains(line, "exhaust temperature") && contains(line, "up");
    }));
    EXPECT_TRUE(std::find(first.not_read.begin(), first.not_read.end(), "expansion pressure") != first.not_read.end());
    EXPECT_TRUE(std::find(first.not_read.begin(), first.not_read.end(), "crankcase pressure") == first.not_read.end())
        << "a crosshead engine has none";
    EXPECT_FALSE(first.check_next.empty());
    EXPECT_FALSE(first.cautions.empty());
    EXPECT_TRUE(fourth->sudden);
    EXPECT_TRUE(contains(fourth->history, "came at once"));
    EXPECT_LE(fourth->causes.size(), 4U);
}

TEST(Explanation, EveryCauseSaysWhyItStandsWhereItDoes)
{
    const Explanation explanation = explained(with_leaking_valve());
    const SubjectExplanation* fourth = subject_at(explanation, Place::cylinder(4));
    ASSERT_NE(fourth, nullptr);
    ASSERT_GE(fourth->causes.size(), 2U);
    for (const Hypothesis& cause : fourth->causes) {
        if (!cause.explained)
            continue;
        EXPECT_FALSE(cause.order.empty()) << cause.fault->id;
        if (cause.in_the_rest || cause.rank == 1)
            continue;
        ASSERT_TRUE(cause.odds);
        // Three to one is where causes stop being equals.
        EXPECT_EQ(contains(cause.order, "as likely as the first"), cause.as_likely_as_first) << cause.order;
        EXPECT_EQ(contains(cause.order, "against the first"), !cause.as_likely_as_first) << cause.order;
        if (!cause.as_likely_as_first) {
            EXPECT_LT(*cause.odds, 1.0 / 3.0 + 0.01) << cause.order;
        }
    }
    // What the flag says of the same cylinder stands beside it, with its own dates and sizes.
    if (fourth->flagged) {
        EXPECT_TRUE(contains(fourth->flag_sentence, "Cylinder 4")) << fourth->flag_sentence;
        EXPECT_TRUE(contains(fourth->history, "taken together")) << fourth->history;
    }
}

TEST(Explanation, NeverSpeaksAVerdict)
{
    const std::string words = all_words(explained(with_leaking_valve()));
    for (const char* never : {"diagnos", "certain", "proves", " is due to ", "faulty"})
        EXPECT_FALSE(contains(words, never)) << never << ": " << words;
}

TEST(Explanation, AThermometerComesBeforeTheMachineWhereOnlyItMoved)
{
    EngineRecord record = example_record(readings);
    change(record, "exhaust_temperature", Place::cylinder(2), -25.0, true);
    const Explanation explanation = explained(record);
    const SubjectExplanation* second = subject_at(explanation, Place::cylinder(2));
    ASSERT_NE(second, nullptr);
    EXPECT_EQ(second->causes.front().fault->id, "thermocouple_drift");
    EXPECT_FALSE(second->sudden);
    EXPECT_TRUE(contains(second->history, "little by little"));
}

EngineRecord with_weak_turbine()
{
    EngineRecord record = example_record(readings);
    for (int cylinder = 1; cylinder <= record.engine.cylinders; ++cylinder) {
        change(record, "compression_pressure", Place::cylinder(cylinder), -5.0);
        change(record, "maximum_pressure", Place::cylinder(cylinder), -4.0);
        change(record, "exhaust_temperature", Place::cylinder(cylinder), 17.0);
    }
    change(record, "scavenge_pressure", Place::engine(), -0.14);
    change(record, "turbocharger_speed", Place::engine(), -260.0);
    return record;
}

TEST(Explanation, WhatAllCylindersShareIsOfTheEngineAndLookAlikesAreSaidToBe)
{
    const Explanation explanation = explained(with_weak_turbine());
    ASSERT_EQ(explanation.subjects.size(), 1U) << explanation.sentence;
    const SubjectExplanation& engine = explanation.subjects.front();
    EXPECT_EQ(engine.subject, Place::engine());
    const auto has = [&](const char* id) {
        return std::any_of(engine.causes.begin(), engine.causes.end(), [&](const Hypothesis& one) { return one.fault->id == id; });
    };
    EXPECT_TRUE(has("turbine_efficiency_loss"));
    EXPECT_TRUE(has("exhaust_back_pressure_high"));
    EXPECT_TRUE(contains(engine.cannot_tell, "cannot tell"));
    EXPECT_TRUE(contains(engine.cannot_tell, "back-pressure gauge")) << engine.cannot_tell;
}

TEST(Explanation, OneValueFarOutAtTheLastReadingIsFirstOfAllReadAgain)
{
    EngineRecord record = example_record(readings);
    move_value(record.readings.back(), "exhaust_temperature", Place::cylinder(5), 200.0);
    const Explanation explanation = explained(record);
    const SubjectExplanation* fifth = subject_at(explanation, Place::cylinder(5));
    ASSERT_NE(fifth, nullptr);
    EXPECT_EQ(fifth->causes.front().fault->id, "single_misread");
    EXPECT_FALSE(fifth->causes.front().explained.has_value());
}

TEST(Explanation, ACylinderThatDoesNotFireIsNamedAtOnceWithItsCaution)
{
    EngineRecord record = example_record(readings);
    const Place third = Place::cylinder(3);
    for (const auto& [name, amount] : {std::pair{"exhaust_temperature", -130.0}, {"maximum_pressure", -29.0},
                                       {"mean_indicated_pressure", -16.0}})
        move_value(record.readings.back(), name, third, amount);
    const Explanation explanation = explained(record);
    const SubjectExplanation* found = subject_at(explanation, third);
    ASSERT_NE(found, nullptr);
    ASSERT_FALSE(found->causes.empty());
    EXPECT_EQ(found->causes.front().fault->id, "misfire");
    EXPECT_TRUE(contains(found->causes.front().urgency, "at once"));
    EXPECT_FALSE(found->causes.front().cautions.empty());
}

TEST(Explanation, AfterRecordedWorkTheComparisonStartsAnew)
{
    EngineRecord record = with_leaking_valve();
    Event event;
    event.kind = "exhaust_valve";
    event.place = Place::cylinder(4);
    event.date = record.readings[onset - 1].taken_at;
    event.date.utc += std::chrono::hours(72);
    record.events.push_back(event);
    EXPECT_EQ(subject_at(explained(record), Place::cylinder(4)), nullptr);
}

TEST(Explanation, NamesAnEventOfTheTimeItBegan)
{
    EngineRecord record = with_leaking_valve();
    Event event;
    event.kind = "turbocharger_wash"; // a mark only
    event.place = Place::turbocharger(1);
    event.date = record.readings[onset - 1].taken_at;
    event.date.utc += std::chrono::hours(72);
    record.events.push_back(event);
    const Explanation explanation = explained(record);
    const SubjectExplanation* fourth = subject_at(explanation, Place::cylinder(4));
    ASSERT_NE(fourth, nullptr);
    EXPECT_TRUE(contains(fourth->history, "turbocharger washed on ")) << fourth->history;
}

TEST(Explanation, IsCausalWhenAnEarlierReadingIsAskedFor)
{
    const EngineRecord whole = with_leaking_valve();
    const EngineRecord before = record_until(whole, onset - 1);
    EXPECT_EQ(before.readings.size(), onset);
    EXPECT_TRUE(explained(before).subjects.empty());
}

TEST(Explanation, ATwoFoldPatternNamesASecondCauseInTheRest)
{
    EngineRecord record = with_leaking_valve();
    change(record, "jacket_outlet_temperature", Place::cylinder(4), 8.0);
    const Explanation explanation = explained(record);
    const SubjectExplanation* fourth = subject_at(explanation, Place::cylinder(4));
    ASSERT_NE(fourth, nullptr);
    EXPECT_TRUE(std::any_of(fourth->causes.begin(), fourth->causes.end(), [](const Hypothesis& one) {
        return one.fault->id == "jacket_cooling_restricted" && one.in_the_rest && contains(one.what, "perhaps also");
    })) << all_words(explanation);
}

TEST(Explanation, ASmallDipIsNotCalledACylinderThatDoesNotFire)
{
    EngineRecord record = example_record(readings);
    change(record, "exhaust_temperature", Place::cylinder(2), -16.0);
    change(record, "maximum_pressure", Place::cylinder(2), -2.4);
    change(record, "fuel_index", Place::cylinder(2), -1.2);
    const Explanation explanation = explained(record);
    const SubjectExplanation* second = subject_at(explanation, Place::cylinder(2));
    ASSERT_NE(second, nullptr);
    for (const Hypothesis& cause : second->causes)
        EXPECT_NE(cause.fault->id, "misfire") << all_words(explanation);
}

TEST(Explanation, WhatMovedTheOtherWaySpeaksAgainst)
{
    const Explanation explanation = explained(with_leaking_valve());
    for (const Hypothesis& cause : subject_at(explanation, Place::cylinder(4))->causes)
        for (const QuantityEvidence& evidence : cause.evidence)
            if (evidence.amount && evidence.says != QuantityEvidence::Says::against
                && std::abs(*evidence.expected) >= fault_quantities()[evidence.quantity].noise) {
                EXPECT_GT(*evidence.amount * *evidence.expected, 0.0) << cause.fault->id << ": " << evidence.words;
            }
}

bool names(const SubjectExplanation& subject, const char* id)
{
    return std::any_of(subject.causes.begin(), subject.causes.end(), [&](const Hypothesis& one) { return one.fault->id == id; });
}

TEST(Explanation, AStepToTheBetterMayBeWorkThatNobodyEntered)
{
    EngineRecord record = example_record(readings);
    const Place fourth = Place::cylinder(4);
    change(record, "exhaust_temperature", fourth, -30.0);
    change(record, "compression_pressure", fourth, 5.0);
    change(record, "maximum_pressure", fourth, 6.0);
    const Explanation explanation = explained(record);
    const SubjectExplanation* found = subject_at(explanation, fourth);
    ASSERT_NE(found, nullptr);
    EXPECT_TRUE(names(*found, "work_not_recorded")) << all_words(explanation);
    EXPECT_TRUE(contains(all_words(explanation), "enter it under events"));
    // What went for the worse is no work.
    EXPECT_FALSE(names(*subject_at(explained(with_leaking_valve()), fourth), "work_not_recorded"));
}

TEST(Explanation, WhereTheDriftMethodAsksAboutWorkThatComesFirst)
{
    EngineRecord record = example_record(readings);
    const Place fourth = Place::cylinder(4); // new levels everywhere, and no pattern in them
    change(record, "exhaust_temperature", fourth, 30.0);
    change(record, "compression_pressure", fourth, 6.0);
    change(record, "maximum_pressure", fourth, -7.0);
    change(record, "fuel_index", fourth, -4.0);
    change(record, "jacket_outlet_temperature", fourth, 6.0);
    const auto judgement = judge(std::make_shared<const EngineRecord>(record));
    const bool asked = std::any_of(judgement.flags.begin(), judgement.flags.end(), [&](const Flag& flag) {
        return flag.subject == fourth && flag.level_now == Level::ask;
    });
    ASSERT_TRUE(asked);
    const Explanation explanation = explain(judgement);
    const SubjectExplanation* found = subject_at(explanation, fourth);
    ASSERT_NE(found, nullptr);
    ASSERT_FALSE(found->causes.empty());
    EXPECT_EQ(found->causes.front().fault->id, "work_not_recorded") << all_words(explanation);
    EXPECT_EQ(found->causes.front().rank, 1);
}

TEST(Explanation, OfAllLimitsAheadTheSoonestIsNamed)
{
    EngineRecord record = example_record(readings);
    const Place third = Place::cylinder(3);
    change(record, "exhaust_temperature", third, 28.0, true);
    change(record, "compression_pressure", third, -9.0, true);
    change(record, "maximum_pressure", third, -9.0, true);
    const auto judgement = judge(std::make_shared<const EngineRecord>(record));
    const SubjectExplanation* found = nullptr;
    const Explanation explanation = explain(judgement);
    found = subject_at(explanation, third);
    ASSERT_NE(found, nullptr);
    ASSERT_TRUE(found->time_to_limit.has_value());
    for (const Flag* flag : judgement.standing_flags())
        if (flag->subject == third && flag->time_to_limit && flag->time_to_limit->months_50) {
            EXPECT_LE(found->time_to_limit->months_50.value_or(1e6), *flag->time_to_limit->months_50);
        }
    EXPECT_TRUE(found->limit_quantity.has_value());
}

TEST(Explanation, OddEnginesGetAnAnswerAndNoCrash)
{
    for (const int cylinders : {1, 2, 20}) {
        EngineRecord record = example_record(readings);
        record.engine.cylinders = cylinders;
        for (Reading& reading : record.readings)
            reading.values.erase(std::remove_if(reading.values.begin(), reading.values.end(),
                                                [&](const Value& value) {
                                                    return value.place.kind == Place::Kind::cylinder && value.place.number > cylinders;
                                                }),
                                 reading.values.end());
        EXPECT_FALSE(explained(record).sentence.empty());
    }
    EngineRecord bare = example_record(readings);
    bare.engine.baseline.clear();
    bare.engine.correction.clear();
    EXPECT_FALSE(explained(bare).sentence.empty());
    EXPECT_TRUE(explain(Judgement{}).subjects.empty());
}

} // namespace
