// SPDX-License-Identifier: GPL-3.0-or-later
// Work that no reading has followed, and work that has not mended what it was for. All readings invented.
#include "core/explanation/work_outcome.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

#include <chrono>

using namespace evenstroke;

namespace {

constexpr std::size_t onset = 26, work_at = 38; ///< the first reading after the work

/// Compression pressure of cylinder 3 falls 0.7 bar a month until the work; afterwards so many bar of it are left.
EngineRecord overhauled(std::size_t readings, double left)
{
    EngineRecord record = example_record(readings);
    for (std::size_t i = onset; i < readings; ++i) {
        const double months = static_cast<double>(i - onset + 1);
        const double fallen = i < work_at ? 0.7 * months : left;
        move_value(record.readings[i], "compression_pressure", Place::cylinder(3), -fallen);
        move_value(record.readings[i], "maximum_pressure", Place::cylinder(3), -0.9 * fallen);
    }
    Event work;
    work.kind = "overhaul";
    work.place = Place::cylinder(3);
    work.date.utc = record.readings[work_at - 1].taken_at.utc + std::chrono::hours(24);
    record.events.push_back(work);
    return record;
}

Judgement judged(EngineRecord record) { return judge(std::make_shared<const EngineRecord>(std::move(record))); }

bool contains(const std::string& text, std::string_view part) { return text.find(part) != std::string::npos; }

} // namespace

TEST(WorkOutcome, WorkWithoutAReadingSinceIsSaid)
{
    const Judgement judgement = judged(overhauled(work_at, 0.0));
    ASSERT_FALSE(judgement.standing_flags().empty()) << "nothing has been read since";
    const std::string text = work_not_read_yet(judgement);
    EXPECT_TRUE(contains(text, "Entered since the newest reading: overhaul of cylinder 3 on ")) << text;
    EXPECT_EQ(work_without_effect(judgement), "");
    EXPECT_EQ(work_not_read_yet(judged(overhauled(work_at + 1, 0.0))), "") << "a reading has followed";
}

TEST(WorkOutcome, WorkThatMendedNothingIsSaidUntilTheUsualLevelIsLearnedAnew)
{
    const Judgement judgement = judged(overhauled(work_at + 2, 8.0));
    EXPECT_TRUE(judgement.standing_flags().empty()) << "the comparison began anew";
    const std::string text = work_without_effect(judgement);
    EXPECT_TRUE(contains(text, "Cylinder 3 ")) << text;
    EXPECT_TRUE(contains(text, "reads as before (overhaul on ")) << text;
    EXPECT_TRUE(contains(text, "below its earlier level")) << text;
    EXPECT_TRUE(contains(text, "(2 readings since)")) << text;
    EXPECT_EQ(work_without_effect(judgement, Place::cylinder(3)), text);
    EXPECT_EQ(work_without_effect(judgement, Place::cylinder(4)), "");
    EXPECT_EQ(work_without_effect(judged(overhauled(work_at + 10, 8.0))), "") << "by now that is its usual level";
}

TEST(WorkOutcome, OfWorkThatHelpedNothingIsSaid)
{
    EXPECT_EQ(work_without_effect(judged(overhauled(work_at + 1, 0.0))), "");
    EXPECT_EQ(work_without_effect(judged(overhauled(work_at + 3, 1.0))), "") << "a remnant inside the uncertainty";
}

TEST(WorkOutcome, AnEmptyRecordHasNothingToSay)
{
    EXPECT_EQ(work_not_read_yet(Judgement{}), "");
    EXPECT_EQ(work_without_effect(Judgement{}), "");
}
