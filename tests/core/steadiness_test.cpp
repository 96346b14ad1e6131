// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/steadiness.h"

#include "tests/core/reading_maker.h"

#include <gtest/gtest.h>

using namespace evenstroke;
using namespace evenstroke::test;

namespace {

/// A change between the lines and the verdict it earns alone. The limits are common practice; each is tried
/// at its edge and one step of the instrument beyond.
struct Step
{
    const char* quantity;
    double before, after;
    Steadiness verdict, verdict_of_set;
};
std::ostream& operator<<(std::ostream& out, const Step& step)
{
    return out << step.quantity << " " << step.before << " to " << step.after;
}
constexpr auto steady = Steadiness::steady, care = Steadiness::usable_with_care,
               unsteady = Steadiness::unsteady;

class ChangeBetweenTheLines : public testing::TestWithParam<Step>
{
};
TEST_P(ChangeBetweenTheLines, IsGradedByItsLimits)
{
    const Step& step = GetParam();
    const Reading reading = ReadingMaker().pair(step.quantity, step.before, step.after).done();
    EXPECT_EQ(judge_steadiness(reading, false).verdict, step.verdict)
        << judge_steadiness(reading, false).sentence;
    EXPECT_EQ(judge_steadiness(reading, true).verdict, step.verdict_of_set);
}
INSTANTIATE_TEST_SUITE_P(
    Limits, ChangeBetweenTheLines,
    testing::Values(
        Step{"speed", 100, 101, steady, steady}, Step{"speed", 100, 101.1, care, care},
        Step{"speed", 100, 98, care, care}, Step{"speed", 100, 97.9, unsteady, unsteady},
        Step{"shaft_power", 10000, 10200, steady, steady}, Step{"shaft_power", 10000, 10201, care, steady},
        Step{"shaft_power", 10000, 10400, care, steady}, Step{"shaft_power", 10000, 10401, unsteady, steady},
        Step{"shaft_power", 10000, 10500, unsteady, steady},
        Step{"shaft_power", 10000, 10501, unsteady, care}, Step{"shaft_power", 10000, 9200, unsteady, care},
        Step{"shaft_power", 10000, 9199, unsteady, unsteady}, Step{"load_percent", 75, 76.5, steady, steady},
        Step{"load_percent", 75, 76.6, care, steady}, Step{"fuel_index", 60, 61.2, steady, steady},
        Step{"fuel_index", 60, 61.3, care, steady}, Step{"turbocharger_speed", 10000, 10100, steady, steady},
        Step{"turbocharger_speed", 10000, 10101, care, care},
        Step{"turbocharger_speed", 10000, 10201, unsteady, unsteady},
        Step{"scavenge_pressure", 2.0, 2.04, steady, steady},
        Step{"scavenge_pressure", 2.0, 2.05, care, care}, Step{"scavenge_pressure", 2.0, 2.08, care, care},
        Step{"scavenge_pressure", 2.0, 2.09, unsteady, unsteady},
        Step{"exhaust_before_turbine", 380, 385, steady, steady},
        Step{"exhaust_before_turbine", 380, 386, care, care},
        Step{"exhaust_before_turbine", 380, 370, care, care},
        Step{"exhaust_before_turbine", 380, 369, unsteady, unsteady},
        Step{"jacket_outlet_temperature_mean", 80, 82, steady, steady},
        Step{"jacket_outlet_temperature_mean", 80, 82.1, care, care},
        Step{"jacket_outlet_temperature_mean", 80, 84.1, unsteady, unsteady},
        Step{"scavenge_temperature", 38, 40, steady, steady},
        Step{"scavenge_temperature", 38, 40.1, care, care},
        Step{"scavenge_temperature", 38, 42.1, unsteady, unsteady}));

ReadingMaker quiet_lines()
{
    return ReadingMaker().pair("speed", 100, 100.1);
}

TEST(Steadiness, IsNotJudgedWithoutAPairOfValues)
{
    const Reading reading = ReadingMaker()
                                .number("speed", 100, Place::engine(), Phase::before)
                                .number("settled_minutes", 90)
                                .number("sea_state", 8, at_ship())
                                .done();
    const SteadinessVerdict verdict = judge_steadiness(reading, false);
    EXPECT_EQ(verdict.verdict, Steadiness::not_judged);
    EXPECT_NE(verdict.sentence.find("quick lines"), std::string::npos);
}

TEST(Steadiness, NamesTheCriterionThatDecidedWithBothValues)
{
    const Reading reading =
        quiet_lines().pair("turbocharger_speed", 10000, 10300).pair("scavenge_pressure", 2.0, 2.05).done();
    const SteadinessVerdict verdict = judge_steadiness(reading, false);
    EXPECT_EQ(verdict.verdict, unsteady);
    EXPECT_NE(verdict.sentence.find("Unsteady: turbocharger speed was 10000 before and 10300"),
              std::string::npos)
        << verdict.sentence;
    EXPECT_NE(verdict.sentence.find("3.00 %"), std::string::npos) << verdict.sentence;
}

TEST(Steadiness, AsksForASlipOfThePenWhereNoEngineChangesSo)
{
    const Reading slip = ReadingMaker().pair("turbocharger_speed", 12370, 23.8).done();
    EXPECT_NE(judge_steadiness(slip, false).sentence.find("probably miswritten"), std::string::npos) << judge_steadiness(slip, false).sentence;
    const Reading real = ReadingMaker().pair("turbocharger_speed", 12370, 10200).done();
    EXPECT_EQ(judge_steadiness(real, false).sentence.find("miswritten"), std::string::npos) << judge_steadiness(real, false).sentence;
}

TEST(Steadiness, OfASteadyEngineNamesWhatWasNearestToItsLimit)
{
    const SteadinessVerdict verdict =
        judge_steadiness(quiet_lines().pair("scavenge_pressure", 2.0, 2.03).done(), false);
    EXPECT_EQ(verdict.verdict, steady);
    EXPECT_NE(verdict.sentence.find("nearest to its limit, scavenge pressure"), std::string::npos)
        << verdict.sentence;
}

TEST(Steadiness, SaysWhatWasNotNotedInsteadOfGuessing)
{
    EXPECT_NE(judge_steadiness(quiet_lines().done(), false)
                  .sentence.find("unchanged and how long the walk took were not noted"),
              std::string::npos);
    const Reading waited = quiet_lines().number("settled_minutes", 90).done();
    EXPECT_NE(judge_steadiness(waited, false).sentence.find("How long the walk took was not noted"),
              std::string::npos);
}

TEST(Steadiness, AsksForAnHourAtUnchangedSetting)
{
    const auto after = [](double minutes) {
        return judge_steadiness(quiet_lines().number("settled_minutes", minutes).done(), false).verdict;
    };
    EXPECT_EQ(after(60), steady);
    EXPECT_EQ(after(59), care);
    EXPECT_EQ(after(30), care);
    EXPECT_EQ(after(29), unsteady);
    EXPECT_EQ(after(0), unsteady);
}

TEST(Steadiness, TimesTheWalkByTheClockOfBothLines)
{
    const auto walk = [](const char* began, const char* ended) {
        return judge_steadiness(quiet_lines()
                                    .words("quick_line_time", began, Phase::before)
                                    .words("quick_line_time", ended, Phase::after)
                                    .done(),
                                false);
    };
    EXPECT_EQ(walk("09:00", "10:00").verdict, steady);
    EXPECT_EQ(walk("09:00", "10:01").verdict, care);
    EXPECT_EQ(walk("0900", "11.00").verdict, care);
    EXPECT_EQ(walk("9:00", "11:01").verdict, unsteady);
    EXPECT_EQ(walk("23:30", "00:15").verdict, steady) << "a walk may pass midnight";
    EXPECT_NE(walk("soon", "25:00").sentence.find("walk took were not noted"), std::string::npos);
}

TEST(Steadiness, MindsWindSeaAndDepthOfMainEnginesOnly)
{
    const auto with = [](const char* name, double value, bool set) {
        return judge_steadiness(quiet_lines()
                                    .number(name, value, at_ship())
                                    .number("draught_forward", 9, at_ship())
                                    .number("draught_aft", 11, at_ship())
                                    .done(),
                                set)
            .verdict;
    };
    EXPECT_EQ(with("wind_speed", 7.9, false), steady); // upper end of Beaufort 4, WMO scale
    EXPECT_EQ(with("wind_speed", 8.0, false), care);
    EXPECT_EQ(with("wind_speed", 10.7, false), care); // upper end of Beaufort 5
    EXPECT_EQ(with("wind_speed", 10.8, false), unsteady);
    EXPECT_EQ(with("sea_state", 4, false), steady);
    EXPECT_EQ(with("sea_state", 5, false), care);
    EXPECT_EQ(with("sea_state", 6, false), unsteady);
    EXPECT_EQ(with("water_depth", 50.1, false), steady); // mean draught 10 m
    EXPECT_EQ(with("water_depth", 50, false), care);
    EXPECT_EQ(with("water_depth", 30.1, false), care);
    EXPECT_EQ(with("water_depth", 30, false), unsteady);
    EXPECT_EQ(with("water_depth", 12, true), steady) << "a generating set works in harbour too";
}

TEST(Steadiness, ComparesMeansOverThePlacesReadInBothLines)
{
    ReadingMaker maker = quiet_lines();
    maker.pair("exhaust_temperature", 350, 354, Place::cylinder(1))
        .pair("exhaust_temperature", 360, 366, Place::cylinder(2));
    maker.number("exhaust_temperature", 500, Place::cylinder(3), Phase::after);
    EXPECT_EQ(judge_steadiness(maker.done(), false).verdict, steady)
        << "mean change 5 °C, cylinder 3 stands in one line only";
}

TEST(Steadiness, WantsTheSameModeAllThrough)
{
    const Reading changed = quiet_lines()
                                .words("auxiliary_blower_running", "yes", Phase::before)
                                .words("auxiliary_blower_running", "no", Phase::after)
                                .done();
    EXPECT_EQ(judge_steadiness(changed, false).verdict, unsteady);
}

TEST(Steadiness, ReadsPressuresOfEitherKind)
{
    // 3.000 bar absolute at 1000 mbar is 2.000 bar gauge.
    Reading reading = ReadingMaker()
                          .number("barometric_pressure", 1000, at_ship())
                          .number("scavenge_pressure", 2.0, Place::engine(), Phase::before)
                          .done();
    Value after = ReadingMaker().typed("scavenge_pressure", "3.0 bar abs").done().values.front();
    after.phase = Phase::after;
    reading.values.push_back(after);
    EXPECT_EQ(judge_steadiness(reading, false).verdict, steady);
    EXPECT_NE(judge_steadiness(reading, false).sentence.find("2.00 before and 2.00 bar after"),
              std::string::npos);
}

TEST(Steadiness, LeavesOutAPressureWhoseKindNeedsTheBarometerThatWasNotRead)
{
    Reading reading = ReadingMaker().number("scavenge_pressure", 2.0, Place::engine(), Phase::before).done();
    Value after = ReadingMaker().typed("scavenge_pressure", "3.0 bar abs").done().values.front();
    after.phase = Phase::after;
    reading.values.push_back(after);
    EXPECT_EQ(judge_steadiness(reading, false).verdict, Steadiness::not_judged);
}

} // namespace
