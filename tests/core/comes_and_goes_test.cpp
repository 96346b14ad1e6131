// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/comes_and_goes.h"
#include "core/explanation/explanation.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

#include <random>

using namespace evenstroke;

namespace {

constexpr std::size_t readings = 28, onset = 18;

/// A cylinder of which one quantity was read: 18 readings as usual, then what the rule gives, all with scatter.
template <typename Rule> SubjectSeries series_of(std::mt19937_64& source, Rule amount_at)
{
    std::normal_distribution<double> scatter;
    SubjectSeries series;
    series.subject = Place::cylinder(2);
    series.quantities.resize(fault_quantities().size());
    for (QuantitySeries& not_read : series.quantities)
        not_read.values.resize(readings);
    QuantitySeries& read = series.quantities[*find_fault_quantity("mean_indicated_pressure")];
    for (std::size_t i = 0; i < readings; ++i) {
        series.months.push_back(static_cast<double>(i));
        read.values[i] = scatter(source) + (i >= onset ? amount_at(i - onset) : 0.0);
    }
    return series;
}

std::optional<ComesAndGoes> looked_at(const SubjectSeries& series, bool ramp)
{
    const auto window = change_since(series, onset, ramp);
    return window ? comes_and_goes(series, *window) : std::nullopt;
}

Explanation explained(EngineRecord record) { return explain(judge(std::make_shared<const EngineRecord>(std::move(record)))); }

} // namespace

TEST(ComesAndGoes, IsSeenWhereThreeOfFourReadingsAreOff)
{
    std::mt19937_64 source(4711);
    int seen = 0;
    for (int run = 0; run < 400; ++run)
        seen += looked_at(series_of(source, [](std::size_t i) { return i % 4 == 1 ? 0.0 : -7.0; }), false) ? 1 : 0;
    EXPECT_GE(seen, 340); // 85 %; a reading that is as usual lies within 1.5 sigma 87 times in 100, and two are needed of two or three
}

/// Steady steps and ramps of every size: the statement may be false once in a hundred.
TEST(ComesAndGoes, IsHardlyEverSaidOfASteadyChange)
{
    std::mt19937_64 source(815);
    int said = 0, runs = 0;
    for (const bool ramp : {false, true})
        for (double size = 1.0; size <= 12.0; size += 1.0)
            for (int run = 0; run < 200; ++run, ++runs)
                said += looked_at(series_of(source, [&](std::size_t i) { return ramp ? size * static_cast<double>(i + 1) / 10.0 : size; }), ramp) ? 1 : 0;
    EXPECT_EQ(runs, 4800);
    EXPECT_LE(said, 48) << said << " of " << runs;
}

TEST(ComesAndGoes, StandsInTheHistoryOfTheExplanation)
{
    EngineRecord record = example_record(readings);
    for (std::size_t i = onset; i < readings; ++i) {
        const bool off = (i - onset) % 4 != 2; // a needle that sticks now and then
        move_value(record.readings[i], "mean_indicated_pressure", Place::cylinder(2), off ? -1.6 : 0.0);
        move_value(record.readings[i], "maximum_pressure", Place::cylinder(2), off ? -5.0 : 0.0);
        move_value(record.readings[i], "exhaust_temperature", Place::cylinder(2), off ? -20.0 : 0.0);
    }
    const Explanation explanation = explained(record);
    ASSERT_FALSE(explanation.subjects.empty());
    const std::string& history = explanation.subjects.front().history;
    EXPECT_NE(history.find("It comes and goes: "), std::string::npos) << history;
    EXPECT_NE(history.find(" readings since then and as usual at "), std::string::npos) << history;
}

TEST(ComesAndGoes, NamesTheLoadThatPartsTheReadings)
{
    std::mt19937_64 source(42);
    const SubjectSeries series = series_of(source, [](std::size_t i) { return i % 2 == 0 ? -9.0 : 0.0; });
    const auto window = change_since(series, onset, false);
    ASSERT_TRUE(window && comes_and_goes(series, *window));
    EngineRecord record;
    record.readings.resize(readings);
    Judgement judgement;
    judgement.record = std::make_shared<const EngineRecord>(std::move(record));
    judgement.readings.resize(readings);
    for (std::size_t i = 0; i < readings; ++i)
        judgement.readings[i].load_percent = i % 2 == 0 ? 82.0 : 61.0;
    const std::string parted = comes_and_goes_sentence(series, *window, judgement);
    EXPECT_NE(parted.find("; it was off only at loads of 82 % and more."), std::string::npos) << parted;
    judgement.readings[onset + 1].load_percent = 90.0; // as usual at a higher load than any that was off
    const std::string mixed = comes_and_goes_sentence(series, *window, judgement);
    EXPECT_EQ(mixed.find("loads"), std::string::npos) << mixed;
}

TEST(ComesAndGoes, SaysNothingOfTooFewReadings)
{
    std::mt19937_64 source(1);
    SubjectSeries series = series_of(source, [](std::size_t) { return -7.0; });
    for (QuantitySeries& of : series.quantities)
        for (std::size_t i = 3; i < onset; ++i)
            of.values[i].reset();
    ChangeWindow window;
    window.onset = onset;
    window.changes.resize(series.quantities.size());
    window.amounts.resize(series.quantities.size());
    const std::size_t read = *find_fault_quantity("mean_indicated_pressure");
    window.changes[read] = Change{-7.0, 0.5};
    window.amounts[read] = -1.75;
    EXPECT_FALSE(comes_and_goes(series, window));
}
