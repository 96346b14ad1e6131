// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/typed_number.h"
#include "core/review/reading_review.h"
#include "core/trend/usual_level.h"
#include "core/workings/find_workings.h"

#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <memory>

namespace evenstroke {
namespace {

Judgement judged(EngineRecord record) { return judge(std::make_shared<const EngineRecord>(std::move(record))); }

const ReviewSection* find(const ReadingReview& review, ReviewTopic topic)
{
    const auto found = std::find_if(review.sections.begin(), review.sections.end(),
                                    [&](const ReviewSection& section) { return section.topic == topic; });
    return found == review.sections.end() ? nullptr : &*found;
}

const ReviewLine* find(const ReviewSection& section, std::string_view name, Place place = Place::engine())
{
    const auto found = std::find_if(section.lines.begin(), section.lines.end(), [&](const ReviewLine& line) {
        return line.quantity && quantity(*line.quantity).name == name && line.place == place;
    });
    return found == section.lines.end() ? nullptr : &*found;
}

EngineRecord sound_record(std::size_t count = 24)
{
    EngineRecord record = example_record(count);
    for (Reading& reading : record.readings) {
        reading.values.push_back(typed_value("barometric_pressure", Place{Place::Kind::ship, 0}, "1000"));
        reading.values.push_back(typed_value("fuel_lower_heating_value", Place::engine(), "42.7"));
        reading.values.push_back(typed_value("speed", Place::engine(), "79.2"));
    }
    // 18 bar in six cylinders at 79.2 1/min are 9673 kW, at 93 % the 9000 kW that the readings note.
    record.engine.mechanical_efficiency = 0.93;
    const double speeds[] = {69.2, 79.2, 87.2};
    for (std::size_t i = 0; i < record.engine.baseline.size(); ++i)
        record.engine.baseline[i].values["speed"] = speeds[i];
    return record;
}

TEST(ReadingReview, GoesFromWhatSpoilsEverythingToWhatGathersEverything)
{
    const Judgement judgement = judged(sound_record());
    const ReadingReview review = review_reading(judgement, 23);
    std::vector<ReviewTopic> topics;
    for (const ReviewSection& section : review.sections)
        if (section.topic != ReviewTopic::entry && section.topic != ReviewTopic::steadiness)
            topics.push_back(section.topic);
    EXPECT_EQ(topics, (std::vector<ReviewTopic>{ReviewTopic::power, ReviewTopic::air_side, ReviewTopic::means,
                                                ReviewTopic::cylinders, ReviewTopic::ship, ReviewTopic::fuel}));
}

TEST(ReadingReview, OfASoundEngineTheStepsStayQuiet)
{
    const Judgement judgement = judged(sound_record());
    ASSERT_TRUE(judgement.standing_flags().empty());
    const ReadingReview review = review_reading(judgement, 23);
    EXPECT_TRUE(review.power.agrees) << review.power.sentence;
    for (const ReviewTopic topic : {ReviewTopic::power, ReviewTopic::air_side, ReviewTopic::means, ReviewTopic::cylinders,
                                    ReviewTopic::ship, ReviewTopic::fuel}) {
        const ReviewSection* section = find(review, topic);
        ASSERT_TRUE(section);
        EXPECT_EQ(section->sentence, "") << section->title;
        EXPECT_EQ(section->level, Level::quiet) << section->title;
    }
    EXPECT_TRUE(review.cautions.empty());
}

TEST(ReadingReview, NumbersAreThoseOfTheJudgement)
{
    const Judgement judgement = judged(sound_record());
    const ReadingReview review = review_reading(judgement, 20);
    const ReviewSection* cylinders = find(review, ReviewTopic::cylinders);
    ASSERT_TRUE(cylinders);
    int compared = 0;
    for (const JudgedValue& value : judgement.readings[20].values) {
        if (value.place.kind != Place::Kind::cylinder)
            continue;
        const ReviewLine* line = find(*cylinders, quantity(value.quantity).name, value.place);
        ASSERT_TRUE(line) << quantity(value.quantity).name;
        EXPECT_EQ(line->value, value.raw);
        EXPECT_EQ(line->corrected, value.corrected);
        EXPECT_EQ(line->expected, value.expected);
        EXPECT_EQ(line->deviation, value.deviation);
        EXPECT_EQ(line->apart, value.apart);
        ++compared;
    }
    EXPECT_EQ(compared, 36);
}

TEST(ReadingReview, MeanOfTheCylindersStandsWithItsSpread)
{
    const Judgement judgement = judged(sound_record());
    const ReadingReview review = review_reading(judgement, 23);
    const ReviewSection* means = find(review, ReviewTopic::means);
    ASSERT_TRUE(means);
    const ReviewLine* line = find(*means, "exhaust_temperature");
    ASSERT_TRUE(line && line->value && line->low && line->high);
    double sum = 0.0;
    int count = 0;
    for (const JudgedValue& value : judgement.readings[23].values)
        if (quantity(value.quantity).name == "exhaust_temperature") {
            sum += value.raw;
            ++count;
        }
    EXPECT_NEAR(*line->value, sum / count, 1e-9);
    EXPECT_LE(*line->low, *line->value);
    EXPECT_GE(*line->high, *line->value);
    // Six thermometers, each ±5 °C of its own: 5/√6. Tolerance: central differences.
    EXPECT_NEAR(*line->half_width, 5.0 / std::sqrt(6.0), 1e-6);
    // One indicator for all: 1 % of about 150 bar does not average out.
    EXPECT_NEAR(*find(*means, "maximum_pressure")->half_width, 0.01 * *find(*means, "maximum_pressure")->value, 1e-6);
}

/// Compression pressure of cylinder 3 falls 0.9 bar a month from reading 26 on, as in a fast leak.
EngineRecord record_with_a_leak()
{
    EngineRecord record = sound_record(40);
    for (std::size_t i = 26; i < record.readings.size(); ++i) {
        const double months = static_cast<double>(i - 25);
        move_value(record.readings[i], "compression_pressure", Place::cylinder(3), -0.9 * months);
        move_value(record.readings[i], "maximum_pressure", Place::cylinder(3), -0.75 * months);
        move_value(record.readings[i], "exhaust_temperature", Place::cylinder(3), 2.4 * months);
    }
    return record;
}

TEST(ReadingReview, OnlyTheCylinderThatDepartsIsSpelledOut)
{
    const Judgement judgement = judged(record_with_a_leak());
    ASSERT_FALSE(judgement.standing_flags().empty());
    const ReadingReview review = review_reading(judgement, 39);
    const ReviewSection* cylinders = find(review, ReviewTopic::cylinders);
    ASSERT_TRUE(cylinders);
    EXPECT_GE(cylinders->level, Level::watch);
    EXPECT_NE(cylinders->sentence.find("Cylinder 3: "), std::string::npos) << cylinders->sentence;
    EXPECT_NE(cylinders->sentence.find("maximum pressure"), std::string::npos) << cylinders->sentence;
    for (const char* other : {"Cylinder 1", "Cylinder 2", "Cylinder 4", "Cylinder 5", "Cylinder 6"})
        EXPECT_EQ(cylinders->sentence.find(other), std::string::npos) << cylinders->sentence;
    EXPECT_FALSE(review.cautions.empty()) << "a leak: the catalogue has warnings for the hand that goes there";
    // Before the fault began nothing stood, and the review of that reading says nothing of it.
    const ReadingReview before = review_reading(judgement, 24);
    EXPECT_EQ(find(before, ReviewTopic::cylinders)->sentence, "");
    EXPECT_TRUE(before.cautions.empty());
}

TEST(ReadingReview, ACylinderIsMeasuredFromItsOwnUsualLevel)
{
    // Indicated 15 bar above the others since it was new: after the leak it still stands above them, and it is low.
    EngineRecord record = record_with_a_leak();
    for (Reading& reading : record.readings)
        move_value(reading, "compression_pressure", Place::cylinder(3), 15.0);
    const Judgement judgement = judged(std::move(record));
    const ReadingReview review = review_reading(judgement, 39);
    const ReviewSection& cylinders = *find(review, ReviewTopic::cylinders);
    const ReviewLine* line = find(cylinders, "compression_pressure", Place::cylinder(3));
    ASSERT_TRUE(line && line->apart && line->from_usual);
    EXPECT_GT(*line->apart, 0.0);
    // 14 readings of 0.9 bar; tolerance: the noise of a pressure, twice.
    EXPECT_NEAR(*line->from_usual, -0.9 * 14.0, 3.0);
    EXPECT_EQ(line->verdict, "low");
    // The sheet of workings ends at the same number.
    const auto sheet = find_workings(judgement, 39, *line->quantity, Place::cylinder(3));
    ASSERT_TRUE(sheet && sheet->from_usual && !sheet->steps.empty());
    EXPECT_EQ(sheet->from_usual, line->from_usual);
    EXPECT_EQ(sheet->steps.back().value, *line->from_usual);
    EXPECT_EQ(sheet->steps.back().unit, "bar");
    const std::string amount = plain_number(-*line->from_usual, line->decimals);
    EXPECT_NE(cylinders.sentence.find("compression pressure " + amount + " bar below its usual ("), std::string::npos)
        << cylinders.sentence;
    for (int sound : {1, 2, 4, 5, 6}) {
        const ReviewLine* other = find(cylinders, "compression_pressure", Place::cylinder(sound));
        ASSERT_TRUE(other && other->from_usual) << sound;
        EXPECT_LT(std::abs(*other->from_usual), 6.0) << sound;
    }
}

TEST(ReadingReview, AMeanDoesNotSpeakForItsFirstCylinder)
{
    EngineRecord record = sound_record(40);
    for (std::size_t i = 26; i < record.readings.size(); ++i)
        move_value(record.readings[i], "compression_pressure", Place::cylinder(1), -0.9 * static_cast<double>(i - 25));
    const ReadingReview review = review_reading(judged(std::move(record)), 39);
    int means = 0;
    for (const ReviewLine& line : find(review, ReviewTopic::means)->lines) {
        EXPECT_FALSE(line.from_usual) << line.words;
        EXPECT_FALSE(line.apart) << line.words;
        EXPECT_EQ(line.verdict.find("low"), std::string::npos) << line.words << ": " << line.verdict;
        means += line.spread && line.quantity && quantity(*line.quantity).derived() ? 1 : 0;
    }
    EXPECT_GE(means, 1) << "a ratio of compression over scavenge pressure";
}

TEST(ReadingReview, WhatFollowsTheFaultOfACylinderDoesNotBecomeUsualOnTheWay)
{
    // The ratio is made of the compression pressure that leaks: both are measured from the level before the leak.
    const Judgement judgement = judged(record_with_a_leak());
    const auto pressure = usual_level(judgement, 39, *find_quantity("compression_pressure"), Place::cylinder(3));
    const auto ratio = usual_level(judgement, 39, *find_quantity("compression_pressure_ratio"), Place::cylinder(3));
    ASSERT_TRUE(pressure);
    ASSERT_TRUE(ratio);
    EXPECT_LT(pressure->value, pressure->low);
    EXPECT_LT(ratio->value, ratio->low);
}

TEST(ReadingReview, UnsteadyReadingsAreShownAndNothingInThemIsCalledAFault)
{
    EngineRecord record = record_with_a_leak();
    for (const auto& [phase, speed] : {std::pair(Phase::before, "79.2"), std::pair(Phase::after, "82.0")}) {
        Value value = typed_value("speed", Place::engine(), speed);
        value.phase = phase;
        record.readings.back().values.push_back(value);
    }
    const Judgement judgement = judged(std::move(record));
    ASSERT_EQ(judgement.readings.back().steadiness, Steadiness::unsteady);
    const ReadingReview review = review_reading(judgement, 39);
    const ReviewSection* steadiness = find(review, ReviewTopic::steadiness);
    ASSERT_TRUE(steadiness);
    EXPECT_NE(steadiness->sentence.find("nothing in it is called a fault"), std::string::npos) << steadiness->sentence;
    ASSERT_FALSE(steadiness->lines.empty());
    EXPECT_NE(steadiness->lines.front().verdict.find("79.2"), std::string::npos) << steadiness->lines.front().verdict;
    const ReviewSection* cylinders = find(review, ReviewTopic::cylinders);
    EXPECT_EQ(cylinders->sentence, "");
    EXPECT_EQ(cylinders->lines.front().verdict, "not judged: unsteady");
}

TEST(ReadingReview, OutsideTheBaselineIsSaid)
{
    EngineRecord record = sound_record();
    move_value(record.readings.back(), "load_percent", Place::engine(), -45.0);
    move_value(record.readings.back(), "shaft_power", Place::engine(), -5400.0);
    const Judgement judgement = judged(std::move(record));
    const ReadingReview review = review_reading(judgement, 23);
    EXPECT_NE(find(review, ReviewTopic::power)->sentence.find("does not reach this load"), std::string::npos)
        << find(review, ReviewTopic::power)->sentence << find(review, ReviewTopic::steadiness)->sentence;
    for (const ReviewTopic topic : {ReviewTopic::air_side, ReviewTopic::means, ReviewTopic::cylinders}) {
        EXPECT_EQ(find(review, topic)->sentence, "");
        EXPECT_EQ(find(review, topic)->level, Level::quiet);
    }
}

TEST(ReadingReview, FuelIsNotJudgedWhileThePowerIsInDoubt)
{
    EngineRecord record = sound_record();
    move_value(record.readings.back(), "shaft_power", Place::engine(), 1200.0); // 13 % more than load and cylinders say
    const Judgement judgement = judged(std::move(record));
    const ReadingReview review = review_reading(judgement, 23);
    EXPECT_FALSE(review.power.agrees);
    const ReviewSection* power = find(review, ReviewTopic::power);
    EXPECT_EQ(power->level, Level::note);
    EXPECT_NE(power->sentence, "");
    const ReviewSection* fuel = find(review, ReviewTopic::fuel);
    ASSERT_TRUE(fuel);
    EXPECT_NE(fuel->sentence.find("not judged while the power is in doubt"), std::string::npos);
    EXPECT_EQ(find(*fuel, "specific_fuel_consumption")->verdict, "not judged while the power is in doubt");
    // The check between load and shaft power is told where the reading is looked at first.
    const ReviewSection* entry = find(review, ReviewTopic::entry);
    ASSERT_TRUE(entry);
    EXPECT_NE(entry->sentence.find("Settle this first"), std::string::npos);
}

TEST(ReadingReview, SaysHowManyValuesComeFromCards)
{
    EngineRecord record = sound_record();
    int cards = 0;
    for (Value& value : record.readings.back().values)
        if (quantity(value.quantity).name == "maximum_pressure") {
            value.origin = Origin::card;
            ++cards;
        }
    ASSERT_EQ(cards, 6);
    const ReadingReview review = review_reading(judged(std::move(record)), 23);
    const ReviewSection* entry = find(review, ReviewTopic::entry);
    ASSERT_TRUE(entry);
    EXPECT_NE(entry->sentence.find("6 values come from indicator cards."), std::string::npos) << entry->sentence;
}

TEST(ReadingReview, WhatWasNotReadIsNamed)
{
    EngineRecord record = sound_record();
    const auto drop = [&](std::string_view name) {
        std::erase_if(record.readings.back().values, [&](const Value& value) { return quantity(value.quantity).name == name; });
    };
    drop("barometric_pressure");
    drop("cooler_coolant_inlet_temperature");
    const Judgement judgement = judged(std::move(record));
    const ReadingReview review = review_reading(judgement, 23);
    const ReviewSection* air = find(review, ReviewTopic::air_side);
    ASSERT_TRUE(air);
    EXPECT_EQ(find(*air, "cooler_coolant_inlet_temperature")->verdict, "not read");
    EXPECT_EQ(find(*air, "cooler_temperature_difference")->verdict,
              "not known: no coolant into air cooler was read");
    EXPECT_NE(find(*air, "scavenge_pressure")->verdict.find("not corrected: no"), std::string::npos)
        << find(*air, "scavenge_pressure")->verdict;
    const bool told = std::any_of(air->lines.begin(), air->lines.end(), [](const ReviewLine& line) {
        return line.verdict == "1 bar taken: no barometer was read";
    });
    EXPECT_TRUE(told);
}

TEST(ReadingReview, StateBeyondTheLoadDiagramIsSaidWithTheCaution)
{
    EngineRecord record = sound_record();
    LoadLimits limits;
    limits.mean_effective_pressure = 0.6; // 75 % at 75.4 % of rated speed is a torque of 99 %
    limits.source = "invented";
    record.engine.load_limits = limits;
    const Judgement judgement = judged(std::move(record));
    const ReadingReview review = review_reading(judgement, 23);
    const ReviewSection* ship = find(review, ReviewTopic::ship);
    ASSERT_TRUE(ship);
    EXPECT_NE(ship->sentence.find("above the mean effective pressure limit"), std::string::npos) << ship->sentence;
    EXPECT_NE(std::find(review.cautions.begin(), review.cautions.end(), "overload"), review.cautions.end());
}

TEST(ReadingReview, EveryReadingOfARecordCanBeReviewed)
{
    EngineRecord record = record_with_a_leak();
    record.readings[4].values.clear();
    const Judgement judgement = judged(std::move(record));
    for (std::size_t i = 0; i < judgement.readings.size(); ++i) {
        const ReadingReview review = review_reading(judgement, i);
        EXPECT_EQ(review.reading, i);
        EXPECT_FALSE(review.sections.empty());
        for (const ReviewSection& section : review.sections)
            EXPECT_FALSE(section.title.empty());
    }
    EXPECT_FALSE(judged(EngineRecord{}).readings.size()) << "an engine without readings has nothing to review";
}

} // namespace
} // namespace evenstroke
