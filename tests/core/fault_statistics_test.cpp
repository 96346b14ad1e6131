// SPDX-License-Identifier: GPL-3.0-or-later
// What the explanation names on simulated engines that were not used to settle its constants (other seeds).
//
// A bound fails only where the exact 95 % interval of what was counted lies wholly on its wrong side. The number of
// engines fits about ten seconds with sanitizers; bench_explanation takes as many as one likes.
#include "tests/core/fleet_faults.h"
#include "core/simulation/fleet_tally.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cstdlib>
#include <string>

using namespace evenstroke;
using namespace evenstroke::simulation;

namespace {

constexpr std::uint64_t first_seed = 640'000'000;

/// EVENSTROKE_SIMULATED_ENGINES multiplies the number of engines, for a closer look.
std::size_t engines(std::size_t usual)
{
    const char* times = std::getenv("EVENSTROKE_SIMULATED_ENGINES");
    return usual * (times ? std::max<std::size_t>(std::strtoul(times, nullptr, 10), 1) : 1);
}

std::string text(const Interval& interval) { return std::to_string(interval.low) + " to " + std::to_string(interval.high); }

struct Named
{
    std::size_t trials = 0, claimed = 0, first = 0, three = 0, equals = 0, true_in_equals = 0;
};

/// Faults of the usual size that the engine's readings can tell apart, six readings or more after they began.
Named named_causes()
{
    Named named;
    std::uint64_t seed = first_seed;
    for (const std::string& fault : simulated_faults()) {
        FaultRecipe recipe;
        recipe.fault = fault;
        recipe.fewest_after = 6;
        for (std::size_t n = 0; n < engines(5); ++n) {
            const FaultTrial trial = simulate_fault(recipe, ++seed);
            if (!can_be_told_apart(trial))
                continue;
            const FaultOutcome outcome = judge_trial(trial);
            ++named.trials;
            named.claimed += outcome.claimed ? 1 : 0;
            named.first += outcome.rank == 1 ? 1 : 0;
            named.three += outcome.rank >= 1 && outcome.rank <= 3 ? 1 : 0;
            named.equals += outcome.equals_said ? 1 : 0;
            named.true_in_equals += outcome.equals_said && outcome.true_among_equals ? 1 : 0;
        }
    }
    return named;
}

// One test, since each runs in a process of its own and the engines are made once.
TEST(FaultStatistics, TheTrueCauseIsMostlyNamedFirstAndNearlyAlwaysAmongTheFirstThree)
{
    const Named named = named_causes();
    ASSERT_GT(named.trials, 150U);
    // Of all faults, those still too small to be seen included. Measured on other seeds than those the constants were
    // settled on, 1026 engines: 92.0 % (90.2 to 93.6) among the first three, 83.9 % (81.5 to 86.1) first.
    const Interval three = binomial_interval(named.three, named.trials), first = binomial_interval(named.first, named.trials);
    RecordProperty("among_first_three", text(three));
    RecordProperty("first", text(first));
    EXPECT_GE(three.high, 0.90) << text(three);
    EXPECT_GE(first.low, 0.65) << text(first);
    // Where something is said to be out of the usual at all.
    const Interval of_claimed = binomial_interval(named.three, named.claimed);
    RecordProperty("among_first_three_of_claimed", text(of_claimed));
    EXPECT_GE(of_claimed.low, 0.90) << text(of_claimed);
    // "Cannot tell apart" holds the true cause: 89 % of 229 while the constants were settled.
    ASSERT_GT(named.equals, 0U);
    const Interval right = binomial_interval(named.true_in_equals, named.equals);
    RecordProperty("true_among_equals", text(right));
    EXPECT_GE(right.high, 0.85) << text(right);
}

TEST(FaultStatistics, SoundEnginesAreSeldomSaidToBeOutOfTheUsual)
{
    std::size_t claimed = 0;
    const std::size_t count = engines(60);
    for (std::size_t n = 0; n < count; ++n)
        claimed += judge_trial(simulate_fault(FaultRecipe{}, first_seed + 1'000'000 + n)).other_subjects > 0 ? 1 : 0;
    const Interval share = binomial_interval(claimed, count);
    RecordProperty("engines_with_a_false_claim", text(share));
    // At one reading, cylinders and engine together: 7.0 % (5.3 to 9.0) of 800 on other seeds.
    EXPECT_LE(share.low, 0.10) << text(share);
}

} // namespace
