// SPDX-License-Identifier: GPL-3.0-or-later
// Engines of one kind against each other. Engines and readings are invented.
#include "core/trend/sister_engines.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

#include <algorithm>

using namespace evenstroke;

namespace {

using Engines = std::vector<std::shared_ptr<const Judgement>>;

/// @param drop of the scavenge pressure a month, bar, from reading 18 on; own: a little of each engine's own
std::shared_ptr<const Judgement> engine_with(double drop, int own)
{
    EngineRecord record = example_record(36);
    record.vessel.name = "ship " + std::to_string(own);
    for (std::size_t i = 0; i < record.readings.size(); ++i) {
        const double wobble = 0.01 * static_cast<double>((7 * static_cast<int>(i) + 3 * own) % 5 - 2);
        const double months = i < 18 ? 0.0 : static_cast<double>(i - 17);
        move_value(record.readings[i], "scavenge_pressure", Place::engine(), wobble - drop * months);
    }
    return std::make_shared<const Judgement>(judge(std::make_shared<EngineRecord>(std::move(record))));
}

} // namespace

TEST(SisterEngines, AreOfOneKind)
{
    const Engine one = example_engine();
    Engine other = example_engine();
    EXPECT_TRUE(are_sisters(one, other));
    other.rated_power = 1.004 * one.rated_power;
    EXPECT_TRUE(are_sisters(one, other)) << "a nameplate's rounding";
    other.rated_power = 1.02 * one.rated_power;
    EXPECT_FALSE(are_sisters(one, other));
    other = one;
    other.cylinders = one.cylinders + 1;
    EXPECT_FALSE(are_sisters(one, other));
}

TEST(SisterEngines, TheOneThatLeavesTheOthersIsNamed)
{
    Engines engines;
    for (int i = 0; i < 5; ++i)
        engines.push_back(engine_with(i == 2 ? 0.02 : 0.0, i));
    const SisterComparison comparison = compare_sisters(engines);
    EXPECT_TRUE(comparison.judged);
    const auto flag = std::find_if(comparison.flags.begin(), comparison.flags.end(), [](const SisterFlag& f) { return f.standing; });
    ASSERT_NE(flag, comparison.flags.end());
    EXPECT_EQ(flag->engine, 2u);
    EXPECT_NE(flag->sentence.find("scavenge pressure down"), std::string::npos) << flag->sentence;
    for (const SisterFlag& other : comparison.flags)
        EXPECT_EQ(other.engine, 2u) << other.sentence;
    const auto row = std::find_if(comparison.rows.begin(), comparison.rows.end(),
                                  [](const SisterRow& r) { return quantity(r.quantity).name == "scavenge_pressure"; });
    ASSERT_NE(row, comparison.rows.end());
    ASSERT_TRUE(row->cells[2].apart);
    EXPECT_LT(*row->cells[2].apart, -0.25);
    EXPECT_LT(std::abs(row->cells[0].apart.value()), 0.1);
}

TEST(SisterEngines, WhatAllOfThemDoIsNoMatterBetweenThem)
{
    Engines engines;
    for (int i = 0; i < 5; ++i)
        engines.push_back(engine_with(0.02, i));
    EXPECT_TRUE(compare_sisters(engines).flags.empty());
}

TEST(SisterEngines, TwoAreShownAndNotJudged)
{
    const SisterComparison comparison = compare_sisters(Engines{engine_with(0.0, 0), engine_with(0.02, 1)});
    EXPECT_FALSE(comparison.judged);
    EXPECT_TRUE(comparison.flags.empty());
    EXPECT_FALSE(comparison.rows.empty());
}

TEST(SisterEngines, EmptyOnesAreNoSisters)
{
    EXPECT_TRUE(compare_sisters(Engines{}).rows.empty());
    EXPECT_TRUE(compare_sisters(Engines{nullptr, nullptr, nullptr, nullptr}).rows.empty());
    EXPECT_TRUE(compare_sisters(Engines{engine_with(0.0, 0), nullptr}).rows.empty());
}
