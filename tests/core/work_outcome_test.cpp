// SPDX-License-Identifier: GPL-3.0-or-later
// Work that no reading has followed, and work that has not mended what it was for. All readings invented.
#include "core/explanation/work_outcome.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

using namespace evenstroke;

namespace {

Judgement judged(EngineRecord record) { return judge(std::make_shared<const EngineRecord>(std::move(record))); }

bool contains(const std::string& text, std::string_view part) { return text.find(part) != std::string::npos; }

} // namespace

TEST(WorkOutcome, WorkWithoutAReadingSinceIsSaid)
{
    const Judgement judgement = judged(overhauled_record(0, 0.0));
    ASSERT_FALSE(judgement.standing_flags().empty()) << "nothing has been read since";
    const std::string text = work_not_read_yet(judgement);
    EXPECT_TRUE(contains(text, "Entered since the newest reading: overhaul of cylinder 3 on ")) << text;
    EXPECT_EQ(work_without_effect(judgement), "");
    EXPECT_EQ(work_not_read_yet(judged(overhauled_record(1, 0.0))), "") << "a reading has followed";
}

TEST(WorkOutcome, WorkThatMendedNothingIsSaidUntilTheUsualLevelIsLearnedAnew)
{
    const Judgement judgement = judged(overhauled_record(2, 8.0));
    EXPECT_TRUE(judgement.standing_flags().empty()) << "the comparison began anew";
    const std::string text = work_without_effect(judgement);
    EXPECT_TRUE(contains(text, "Cylinder 3 ")) << text;
    EXPECT_TRUE(contains(text, "reads as before (overhaul on ")) << text;
    EXPECT_TRUE(contains(text, "below its earlier level")) << text;
    EXPECT_TRUE(contains(text, "(2 readings since)")) << text;
    EXPECT_EQ(work_without_effect(judgement, Place::cylinder(3)), text);
    EXPECT_EQ(work_without_effect(judgement, Place::cylinder(4)), "");
    EXPECT_EQ(work_without_effect(judged(overhauled_record(10, 8.0))), "") << "by now that is its usual level";
}

TEST(WorkOutcome, OfWorkThatHelpedNothingIsSaid)
{
    EXPECT_EQ(work_without_effect(judged(overhauled_record(1, 0.0))), "");
    EXPECT_EQ(work_without_effect(judged(overhauled_record(3, 1.0))), "") << "a remnant inside the uncertainty";
}

TEST(WorkOutcome, AnEmptyRecordHasNothingToSay)
{
    EXPECT_EQ(work_not_read_yet(Judgement{}), "");
    EXPECT_EQ(work_without_effect(Judgement{}), "");
}
