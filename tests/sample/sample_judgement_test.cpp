// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/sample/sample_record.h"

#include "core/explanation/explanation.h"
#include "sample_vessel/sample_vessel.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <set>
#include <tuple>

using namespace evenstroke;

namespace {

Judgement judged(int engine)
{
    return judge(sample_record(sample::sample_scenario(), sample::default_seed, engine));
}

/// reading, quantity, cylinder, verdict: as the doubts are listed.
using DoubtRow = std::tuple<std::string, std::string, std::string, std::string>;

std::set<DoubtRow> doubt_rows(const Judgement& judgement)
{
    std::set<DoubtRow> rows;
    for (const Doubt& doubt : judgement.doubts) {
        const bool of_cylinder = doubt.place && doubt.place->kind == Place::Kind::cylinder;
        rows.emplace(judgement.record->readings[doubt.reading].name,
                     doubt.quantity ? quantity(*doubt.quantity).name : "",
                     of_cylinder ? std::to_string(doubt.place->number) : "", verdict_name(doubt.verdict));
    }
    return rows;
}

std::set<DoubtRow> hidden_rows(const std::string& engine)
{
    const sample::SampleTruth truth = sample::sample_truth();
    std::set<DoubtRow> rows;
    for (const sample::SampleTypingError& error : truth.typing_errors)
        if (error.engine == engine)
            rows.emplace(error.reading, error.quantity, error.cylinder, error.verdict);
    for (const sample::SampleUnsteady& one : truth.unsteady)
        if (one.engine == engine)
            rows.emplace(one.reading, "", "", "unsteady");
    return rows;
}

} // namespace

TEST(SampleJudgement, FlagsTheTwoDevelopingFaultsAndNothingElse)
{
    const std::vector<sample::SampleFault> faults = sample::sample_truth().faults;
    for (int engine = 0; engine < 3; ++engine) {
        const Judgement judgement = judged(engine);
        const std::string& name = judgement.record->engine.name;
        const auto fault = std::find_if(faults.begin(), faults.end(),
                                        [&](const sample::SampleFault& one) { return one.engine == name; });
        ASSERT_EQ(judgement.flags.size(), fault == faults.end() ? 0U : 1U) << name;
        if (fault == faults.end())
            continue;
        const Flag& flag = judgement.flags.front();
        EXPECT_EQ(flag.subject, Place::cylinder(fault->cylinder)) << name;
        // Found as watch by the evidence alone; as act where a customary limit may be reached within two months.
        EXPECT_TRUE(flag.severity == Level::watch || (flag.severity == Level::act && flag.time_to_limit)) << name;
        EXPECT_EQ(flag.level_now, Level::act) << name;
        EXPECT_EQ(flag.pattern, fault->cause == "ring_blow_by" ? "blow_by" : "fuel_nozzle") << name;
        EXPECT_GE(date_text(judgement.record->readings[flag.reading].taken_at.utc), fault->onset) << name;
    }
}

TEST(SampleJudgement, NamesTheTrueCauseOfEachFaultFirst)
{
    for (const sample::SampleFault& fault : sample::sample_truth().faults)
        for (int engine = 0; engine < 3; ++engine) {
            const Explanation explanation = explain(judged(engine));
            if (explanation.record->engine.name != fault.engine)
                continue;
            const auto subject = std::find_if(explanation.subjects.begin(), explanation.subjects.end(), [&](const auto& one) {
                return one.subject == Place::cylinder(fault.cylinder);
            });
            ASSERT_NE(subject, explanation.subjects.end()) << fault.engine;
            ASSERT_FALSE(subject->causes.empty()) << fault.engine;
            EXPECT_EQ(subject->causes.front().fault->id, fault.cause) << fault.engine;
            EXPECT_FALSE(subject->sudden) << fault.engine;
        }
}

TEST(SampleJudgement, DoubtsTheSlipsAndTheUnsteadyReadingsAndNothingElse)
{
    for (int engine = 0; engine < 3; ++engine) {
        const Judgement judgement = judged(engine);
        EXPECT_EQ(doubt_rows(judgement), hidden_rows(judgement.record->engine.name))
            << judgement.record->engine.name;
    }
}

TEST(SampleJudgement, JudgesOneReadingUnsteadyAndOneOnlyUsableWithCare)
{
    std::string unsteady, with_care;
    for (const Judgement judgement = judged(0); const ReadingJudgement& reading : judgement.readings) {
        if (reading.steadiness == Steadiness::unsteady)
            unsteady += judgement.record->readings[reading.reading].name;
        if (reading.steadiness == Steadiness::usable_with_care)
            with_care += judgement.record->readings[reading.reading].name;
    }
    EXPECT_EQ(unsteady, "2024-02");
    EXPECT_EQ(with_care, "2025-01");
}
