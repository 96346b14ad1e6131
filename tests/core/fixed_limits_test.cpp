// SPDX-License-Identifier: GPL-3.0-or-later
// The customary fixed limits, shown as a second opinion. Readings invented.
#include "core/trend/fixed_limits.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <string_view>

using namespace evenstroke;

namespace {

std::optional<FixedLimitOpinion> opinion_on(EngineRecord record, const char* quantity, Place place)
{
    return fixed_limit_opinion(judge(std::make_shared<EngineRecord>(std::move(record))), *find_quantity(quantity), place);
}

} // namespace

TEST(FixedLimits, SpeakWhereACylinderIsFartherFromTheOthersThanCustomAllows)
{
    EngineRecord record = example_record(20);
    for (const std::size_t i : {5u, 6u, 12u, 19u})
        move_value(record.readings[i], "compression_pressure", Place::cylinder(2), -6.0);
    const auto opinion = opinion_on(record, "compression_pressure", Place::cylinder(2));
    ASSERT_TRUE(opinion);
    EXPECT_EQ(opinion->limit, 3.0);
    EXPECT_EQ(opinion->began, (std::vector<std::size_t>{5, 12, 19}));
    EXPECT_EQ(opinion->beyond, 4u);
    EXPECT_TRUE(opinion->now);
    const auto other = opinion_on(record, "compression_pressure", Place::cylinder(4));
    ASSERT_TRUE(other);
    EXPECT_TRUE(other->began.empty()) << "a fifth of six bar is not three";
}

TEST(FixedLimits, TheEdgesShownPartTheReadingsThatItSpeaksOf)
{
    // A share of the mean, at loads that change from reading to reading.
    EngineRecord record = example_record(16);
    for (std::size_t i = 8; i < record.readings.size(); ++i)
        move_value(record.readings[i], "mean_indicated_pressure", Place::cylinder(2), -0.25 * static_cast<double>(i - 7));
    const Judgement judgement = judge(std::make_shared<EngineRecord>(std::move(record)));
    for (const char* name : {"mean_indicated_pressure", "exhaust_temperature", "maximum_pressure"})
        for (const int cylinder : {1, 2, 3}) {
            const QuantityId id = *find_quantity(name);
            const auto opinion = fixed_limit_opinion(judgement, id, Place::cylinder(cylinder));
            if (!opinion)
                continue;
            const Trend* trend = judgement.find_trend(id, Place::cylinder(cylinder));
            ASSERT_FALSE(opinion->edges.empty()) << name;
            std::size_t outside = 0;
            for (const auto& edge : opinion->edges) {
                EXPECT_LT(edge.low, edge.high);
                const auto point = std::find_if(trend->points.begin(), trend->points.end(),
                                                [&](const TrendPoint& one) { return one.reading == edge.reading; });
                ASSERT_NE(point, trend->points.end());
                outside += *point->apart < edge.low || *point->apart > edge.high ? 1U : 0U;
            }
            EXPECT_EQ(outside, opinion->beyond) << name << " " << cylinder;
            if (std::string_view(name) == "mean_indicated_pressure" && cylinder == 2) {
                EXPECT_GT(outside, 0U);
            }
        }
}

TEST(FixedLimits, HoldForTheQuantitiesThatCustomKnows)
{
    const EngineRecord record = example_record(12);
    EXPECT_FALSE(opinion_on(record, "scavenge_pressure", Place::engine()));
    EXPECT_FALSE(opinion_on(record, "maximum_pressure", Place::engine()));
    const auto index = opinion_on(record, "fuel_index", Place::cylinder(1));
    if (index) {
        EXPECT_FALSE(index->percent) << "three points of the index, not three per cent of it";
    }
    const auto mip = opinion_on(record, "mean_indicated_pressure", Place::cylinder(1));
    if (mip) {
        EXPECT_TRUE(mip->percent);
    }
}
