// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/drift_catalogue.h"
#include "core/trend/flag_text.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

#include <algorithm>

using namespace evenstroke;

namespace {

Judgement judged(EngineRecord record) { return judge(std::make_shared<EngineRecord>(std::move(record))); }

Event event_on(const EngineRecord& record, std::size_t before_reading, const std::string& kind, Place place)
{
    Event event;
    event.kind = kind;
    event.place = place;
    event.date.utc = record.readings[before_reading].taken_at.utc - std::chrono::hours(72);
    return event;
}

/// Compression pressure falls 0.9 bar a month, as in a fast leak, from reading `onset` on.
void add_leak(EngineRecord& record, int cylinder, std::size_t onset)
{
    for (std::size_t i = onset; i < record.readings.size(); ++i) {
        const double months = static_cast<double>(i - onset + 1);
        move_value(record.readings[i], "compression_pressure", Place::cylinder(cylinder), -0.9 * months);
        move_value(record.readings[i], "maximum_pressure", Place::cylinder(cylinder), -0.75 * months);
        move_value(record.readings[i], "exhaust_temperature", Place::cylinder(cylinder), 2.4 * months);
    }
}

} // namespace

TEST(Judge, ASoundEngineIsQuiet)
{
    const Judgement judgement = judged(example_record(36));
    EXPECT_TRUE(judgement.flags.empty());
    for (const Doubt& doubt : judgement.doubts)
        ADD_FAILURE() << "reading " << doubt.reading << ": " << doubt.sentence;
    EXPECT_EQ(judgement.level, Level::quiet);
}

TEST(Judge, ALeakIsFlaggedOnItsCylinderWithASentenceAndACaution)
{
    EngineRecord record = example_record(40);
    add_leak(record, 4, 26);
    const Judgement judgement = judged(std::move(record));
    ASSERT_FALSE(judgement.flags.empty());
    const Flag& flag = judgement.flags.front();
    EXPECT_EQ(flag.subject, Place::cylinder(4));
    EXPECT_GE(flag.reading, 26u);
    EXPECT_LE(flag.reading, 26u + 8u); // "fast ring wear": found in 5 to 8 readings
    EXPECT_EQ(flag.sentence.rfind("Cylinder 4 compression pressure has fallen", 0), 0u) << flag.sentence;
    EXPECT_NE(flag.sentence.find("a month for"), std::string::npos) << flag.sentence;
    EXPECT_NE(flag.chance_sentence.find("engine-years"), std::string::npos);
    EXPECT_FALSE(flag.next_check.empty());
    EXPECT_FALSE(flag.cautions.empty());
    EXPECT_GE(judgement.level, Level::watch);
    EXPECT_EQ(judgement.standing_flags().front()->subject, Place::cylinder(4));
    const Trend* trend = judgement.find_trend(*find_quantity("compression_pressure"), Place::cylinder(4));
    ASSERT_NE(trend, nullptr);
    EXPECT_GE(trend->level, Level::watch);
}

TEST(Judge, AFlagThatRoseNamesTheReadingAtWhichItDid)
{
    EngineRecord record = example_record(46);
    for (std::size_t i = 26; i < record.readings.size(); ++i) // a thermometer that reads 14 °C more: watch, then act
        move_value(record.readings[i], "exhaust_temperature", Place::cylinder(4), 14.0);
    const Judgement whole = judged(record);
    ASSERT_FALSE(whole.flags.empty());
    const Flag& flag = whole.flags.front();
    ASSERT_EQ(flag.severity, Level::watch);
    ASSERT_EQ(flag.level_now, Level::act);
    ASSERT_TRUE(flag.raised_at.has_value());
    EXPECT_GT(*flag.raised_at, flag.reading);
    record.readings.resize(*flag.raised_at);
    const Judgement before = judged(record);
    EXPECT_EQ(before.flags.front().level_now, Level::watch) << "one reading earlier it had not risen";
    EXPECT_FALSE(before.flags.front().raised_at.has_value());
}

TEST(Judge, CuttingOffTheLastYearChangesNoEarlierRow)
{
    EngineRecord record = example_record(48);
    add_leak(record, 2, 22);
    record.events.push_back(event_on(record, 40, "overhaul", Place::cylinder(2)));
    const Judgement whole = judged(record);
    record.readings.resize(36);
    const Judgement cut = judged(record);
    const auto count = std::count_if(whole.flags.begin(), whole.flags.end(), [](const Flag& f) { return f.reading < 36; });
    ASSERT_EQ(cut.flags.size(), static_cast<std::size_t>(count));
    for (std::size_t i = 0; i < cut.flags.size(); ++i) {
        EXPECT_EQ(cut.flags[i].reading, whole.flags[i].reading);
        EXPECT_EQ(cut.flags[i].subject, whole.flags[i].subject);
        EXPECT_EQ(cut.flags[i].severity, whole.flags[i].severity);
        EXPECT_EQ(cut.flags[i].first_sentence, whole.flags[i].first_sentence);
        EXPECT_EQ(cut.flags[i].first_chance_sentence, whole.flags[i].first_chance_sentence);
        EXPECT_EQ(cut.flags[i].first_quantity, whole.flags[i].first_quantity);
    }
}

TEST(Judge, RecordedWorkOpensANewStretchThatLearns)
{
    EngineRecord record = example_record(30);
    record.events.push_back(event_on(record, 26, "overhaul", Place::cylinder(3)));
    const Judgement judgement = judged(std::move(record));
    const QuantityId id = *find_quantity("compression_pressure");
    const Trend* worked = judgement.find_trend(id, Place::cylinder(3));
    const Trend* other = judgement.find_trend(id, Place::cylinder(2));
    EXPECT_EQ(worked->level, Level::learning);
    EXPECT_EQ(worked->learned, 4);
    EXPECT_EQ(worked->current_start, 26u);
    EXPECT_EQ(worked->points.back().stretch, 1);
    EXPECT_EQ(other->level, Level::quiet);
    EXPECT_EQ(other->points.back().stretch, 0);
}

TEST(Judge, WashingTheTurbochargerOpensNoNewStretch)
{
    EngineRecord record = example_record(30);
    record.events.push_back(event_on(record, 26, "turbocharger_wash", Place::engine()));
    const Judgement judgement = judged(std::move(record));
    EXPECT_EQ(judgement.find_trend(*find_quantity("compression_pressure"), Place::cylinder(3))->level, Level::quiet);
}

TEST(Judge, AReplacedSensorOpensOnlyWhatItReads)
{
    EngineRecord record = example_record(30);
    Event event = event_on(record, 26, "sensor_replaced", Place::cylinder(3));
    event.part = "exhaust_temperature";
    record.events.push_back(event);
    const Judgement judgement = judged(std::move(record));
    EXPECT_EQ(judgement.find_trend(*find_quantity("exhaust_temperature"), Place::cylinder(3))->level, Level::learning);
    EXPECT_EQ(judgement.find_trend(*find_quantity("compression_pressure"), Place::cylinder(3))->level, Level::quiet);
}

TEST(Judge, AnAbsoluteLimitActsAtOnceAndStartsOnce)
{
    EngineRecord record = example_record(12);
    record.engine.limits.push_back({"exhaust_temperature", std::nullopt, 350.0, "maker's manual"});
    for (std::size_t i = 3; i < 5; ++i)
        move_value(record.readings[i], "exhaust_temperature", Place::cylinder(5), 35.0);
    const Judgement judgement = judged(std::move(record));
    ASSERT_EQ(judgement.flags.size(), 1u);
    EXPECT_EQ(judgement.flags[0].severity, Level::act);
    EXPECT_EQ(judgement.flags[0].reading, 3u);
    EXPECT_EQ(judgement.flags[0].level_now, Level::quiet); // the last reading is back inside
    EXPECT_NE(judgement.flags[0].sentence.find("above the limit of 350 °C (maker's manual)"), std::string::npos)
        << judgement.flags[0].sentence;
}

TEST(Judge, ADecimalSlipIsDoubtedWithTheLikelyValueAndRaisesNothing)
{
    EngineRecord record = example_record(20);
    for (Value& value : record.readings[15].values)
        if (value.quantity == *find_quantity("mean_indicated_pressure") && value.place == Place::cylinder(2))
            value = typed_value("mean_indicated_pressure", Place::cylinder(2), "179.5");
    const Judgement judgement = judged(std::move(record));
    ASSERT_EQ(judgement.doubts.size(), 1u);
    EXPECT_EQ(judgement.doubts[0].verdict, Doubt::Verdict::decimal_slip);
    EXPECT_EQ(judgement.doubts[0].place, Place::cylinder(2));
    EXPECT_EQ(judgement.doubts[0].reading, 15u);
    EXPECT_TRUE(judgement.flags.empty());
    const auto& values = judgement.readings[15].values;
    EXPECT_EQ(std::count_if(values.begin(), values.end(), [](const JudgedValue& v) { return v.doubtful; }), 1);
}

namespace {

void type_over(Reading& reading, std::string_view quantity_name, Place place, const std::string& text)
{
    for (Value& value : reading.values)
        if (quantity(value.quantity).name == quantity_name && value.place == place)
            value = typed_value(quantity_name, place, text);
}

std::string typed_at(const Reading& reading, std::string_view quantity_name, Place place)
{
    for (const Value& value : reading.values)
        if (quantity(value.quantity).name == quantity_name && value.place == place)
            return value.typed;
    return {};
}

std::size_t count_of(const Judgement& judgement, Doubt::Verdict verdict)
{
    return static_cast<std::size_t>(std::count_if(judgement.doubts.begin(), judgement.doubts.end(),
                                                  [&](const Doubt& doubt) { return doubt.verdict == verdict; }));
}

} // namespace

TEST(Judge, AValueOutsideItsHardRangeIsNamedByItsSlip)
{
    EngineRecord record = example_record(20);
    Reading& reading = record.readings[15];
    const std::string lost_point = typed_at(reading, "exhaust_temperature", Place::cylinder(1)) + "0";
    type_over(reading, "exhaust_temperature", Place::cylinder(1), lost_point); // above 1000 degC
    std::string exchanged = typed_at(reading, "mean_indicated_pressure", Place::cylinder(3));
    std::swap(exchanged[0], exchanged[1]);
    type_over(reading, "mean_indicated_pressure", Place::cylinder(3), exchanged); // 17.9 -> 71.9, above 45 bar
    const Judgement judgement = judged(std::move(record));
    ASSERT_EQ(judgement.doubts.size(), 2u) << exchanged << " " << lost_point;
    EXPECT_EQ(count_of(judgement, Doubt::Verdict::decimal_slip), 1u);
    EXPECT_EQ(count_of(judgement, Doubt::Verdict::digits_swapped), 1u);
    EXPECT_TRUE(judgement.flags.empty());
}

TEST(Judge, ARowInAnotherUnitOutsideItsHardRangeIsAUnitSlip)
{
    EngineRecord record = example_record(20);
    for (int cylinder = 1; cylinder <= record.engine.cylinders; ++cylinder) { // far above 400 bar
        const double bar = std::stod(typed_at(record.readings[15], "compression_pressure", Place::cylinder(cylinder)));
        type_over(record.readings[15], "compression_pressure", Place::cylinder(cylinder), std::to_string(10.0 * bar));
    }
    const Judgement judgement = judged(std::move(record));
    ASSERT_EQ(judgement.doubts.size(), 1u);
    EXPECT_EQ(judgement.doubts[0].verdict, Doubt::Verdict::unit_slip);
    EXPECT_FALSE(judgement.doubts[0].place.has_value());
}

TEST(Judge, AnImpossibleValueThatDriftDoesNotWatchIsDoubtedUntilConfirmed)
{
    for (const bool confirmed : {false, true}) {
        EngineRecord record = example_record(20);
        record.readings[3].values.push_back(typed_value("lube_oil_inlet_temperature", Place::engine(), "480"));
        record.readings[3].values.back().confirmed = confirmed;
        const Judgement judgement = judged(std::move(record));
        ASSERT_EQ(judgement.doubts.size(), confirmed ? 0u : 1u);
        if (confirmed)
            continue;
        EXPECT_EQ(judgement.doubts[0].verdict, Doubt::Verdict::implausible);
        EXPECT_EQ(judgement.doubts[0].reading, 3u);
        EXPECT_EQ(judgement.doubts[0].place, Place::engine());
        EXPECT_NE(judgement.doubts[0].sentence.find("480"), std::string::npos) << judgement.doubts[0].sentence;
    }
}

TEST(Judge, ADriftShowsTheTimeToTheCustomaryLimitAndSaysThatItIsNotTheMakers)
{
    EngineRecord record = example_record(24);
    add_leak(record, 4, 18);
    const Judgement judgement = judged(std::move(record));
    ASSERT_EQ(judgement.flags.size(), 1u);
    ASSERT_TRUE(judgement.flags[0].time_to_limit.has_value());
    const TimeToLimit& time = *judgement.flags[0].time_to_limit;
    EXPECT_NE(time.limit_text.find("customary limit (not the maker's)"), std::string::npos) << time.limit_text;
    ASSERT_TRUE(time.months_5 && time.months_50);
    EXPECT_LE(*time.months_5, *time.months_50);
    // 0.9 bar a month for 6 months have used up the customary fall of 5 bar (two-stroke): soon means act.
    EXPECT_DOUBLE_EQ(time.limit, -5.0);
    EXPECT_LT(*time.months_5, 2.0);
    EXPECT_EQ(judgement.flags[0].level_now, Level::act);
}

TEST(Judge, TheEnginesOwnLimitGoesBeforeTheCustomaryOne)
{
    EngineRecord record = example_record(24);
    add_leak(record, 4, 18);
    const double before = std::stod(typed_at(record.readings[10], "compression_pressure", Place::cylinder(4)));
    record.engine.limits.push_back({"compression_pressure", before - 20.0, std::nullopt, "maker's manual"});
    const Judgement judgement = judged(std::move(record));
    ASSERT_EQ(judgement.flags.size(), 1u);
    ASSERT_TRUE(judgement.flags[0].time_to_limit.has_value());
    const TimeToLimit& time = *judgement.flags[0].time_to_limit;
    EXPECT_NE(time.limit_text.find("the engine's own limit"), std::string::npos) << time.limit_text;
    EXPECT_NE(time.limit_text.find("maker's manual"), std::string::npos) << time.limit_text;
    EXPECT_NEAR(time.limit, -20.0, 1.5); // the invented readings scatter by less than 1 bar about their level
    ASSERT_TRUE(time.months_50.has_value());
    EXPECT_GT(*time.months_50, 8.0); // 20 bar at 0.9 a month, 6 months gone
}

TEST(Judge, ADriftOfTheWholeEngineHasATimeToItsLimitToo)
{
    EngineRecord record = example_record(36);
    for (std::size_t i = 24; i < record.readings.size(); ++i) // 15 mbar clean: 4 % a month
        move_value(record.readings[i], "cooler_pressure_drop", Place::engine(), 0.6 * static_cast<double>(i - 23));
    const Judgement judgement = judged(std::move(record));
    ASSERT_FALSE(judgement.flags.empty());
    const Flag& flag = judgement.flags.front();
    EXPECT_EQ(flag.subject, Place::engine());
    EXPECT_EQ(quantity(flag.quantity).name, "cooler_pressure_drop");
    ASSERT_TRUE(flag.time_to_limit.has_value());
    EXPECT_DOUBLE_EQ(flag.time_to_limit->limit, 50.0); // per cent of the clean value
    EXPECT_NE(flag.time_to_limit->limit_text.find("50 % above its earlier level"), std::string::npos)
        << flag.time_to_limit->limit_text;
}

TEST(Judge, EveryCustomaryLimitBelongsToAWatchedQuantity)
{
    for (const drift::CustomaryLimit& limit : drift::customary_limits()) {
        EXPECT_NE(drift::find_channel(limit.quantity, limit.subject), nullptr) << limit.quantity;
        EXPECT_TRUE(limit.rise || limit.fall) << limit.quantity;
    }
}

TEST(Judge, OddRecordsGiveAnAnswer)
{
    EXPECT_EQ(judged(example_record(0)).level, Level::no_data);
    EXPECT_TRUE(judged(example_record(1)).flags.empty());
    EngineRecord empty_readings = example_record(5);
    for (Reading& reading : empty_readings.readings)
        reading.values.clear();
    EXPECT_TRUE(judged(std::move(empty_readings)).trends.empty());
    EngineRecord no_baseline = example_record(20);
    no_baseline.engine.baseline.clear();
    EXPECT_TRUE(judged(std::move(no_baseline)).flags.empty());
}

TEST(Judge, ACancelledRunIsEmpty)
{
    const Judgement judgement = judge(std::make_shared<EngineRecord>(example_record(20)), [] { return false; });
    EXPECT_TRUE(judgement.readings.empty());
}

TEST(JudgeDraft, ShowsPreviousAndExpectedAndDoubtsASlip)
{
    EngineRecord record = example_record(24);
    Reading draft = record.readings.back();
    record.readings.pop_back();
    for (Value& value : draft.values)
        if (value.quantity == *find_quantity("maximum_pressure") && value.place == Place::cylinder(1))
            value = typed_value("maximum_pressure", Place::cylinder(1), "15.02");
    const Judgement history = judged(std::move(record));
    const DraftOpinion opinion = judge_draft(history, draft);
    ASSERT_EQ(opinion.values.size(), draft.values.size());
    for (std::size_t i = 0; i < draft.values.size(); ++i) {
        if (draft.values[i].quantity != *find_quantity("maximum_pressure"))
            continue;
        const ValueOpinion& one = opinion.values[i];
        ASSERT_TRUE(one.previous && one.expected && one.usual_low && one.usual_high);
        EXPECT_NEAR(*one.expected, 150.0, 3.0);
        EXPECT_LT(*one.usual_low, *one.expected);
        EXPECT_GT(*one.usual_high, *one.expected);
        if (draft.values[i].place == Place::cylinder(1)) {
            EXPECT_EQ(one.verdict, ValueOpinion::Verdict::doubtful);
            ASSERT_TRUE(one.suggestion);
            EXPECT_NEAR(std::stod(*one.suggestion), 150.2, 1e-9);
        } else {
            EXPECT_EQ(one.verdict, ValueOpinion::Verdict::usual) << one.sentence;
        }
    }
}

TEST(FlagText, ADigitMoreThanWasTypedIsAMissingDigitAndNoExchange)
{
    Doubt doubt;
    doubt.verdict = Doubt::Verdict::digits_swapped;
    doubt.quantity = find_quantity("maximum_pressure", Place::Kind::cylinder);
    doubt.place = Place::cylinder(3);
    doubt.suggestion = "105.2"; // 15.2 was typed: the nought is gone
    EXPECT_EQ(doubt_sentence(example_engine(), doubt, "15.2"),
              "Cylinder 3 maximum pressure, typed 15.2, looks as if a digit were missing. Was 105.2 meant?");
    doubt.suggestion = "152";
    EXPECT_EQ(doubt_sentence(example_engine(), doubt, "125"),
              "Cylinder 3 maximum pressure, typed 125, looks as if two digits changed places. Was 152 meant?");
}

TEST(FlagText, NumbersKeepTwoDigits)
{
    EXPECT_EQ(two_digits(0.5954), "0.60");
    EXPECT_EQ(two_digits(5.44), "5.4");
    EXPECT_EQ(two_digits(23.7), "24");
    EXPECT_EQ(two_digits(347.0), "350");
    EXPECT_EQ(two_digits(0.0), "0");
}
