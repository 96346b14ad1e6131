// SPDX-License-Identifier: GPL-3.0-or-later
// What the drift method reaches on simulated engines that were not used for its calibration (other seeds).
//
// Every engine is drawn from a seed, so the counts are the same on every run and machine but for the last
// digits of the mathematical library. A bound fails only where the exact 95 % interval of what was counted
// lies wholly on its wrong side: chance alone does that for one of forty seeds at the very bound. The number
// of engines fits about ten seconds; bench_drift takes as many as one likes.
#include "core/simulation/fleet_tally.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <ostream>
#include <string>

using namespace evenstroke;
using namespace evenstroke::simulation;

namespace {

constexpr std::uint64_t first_seed = 4'200'000'000;

/// EVENSTROKE_SIMULATED_ENGINES multiplies the number of engines, for a closer look.
std::size_t engines(std::size_t usual)
{
    const char* times = std::getenv("EVENSTROKE_SIMULATED_ENGINES");
    return usual * (times ? std::max<std::size_t>(std::strtoul(times, nullptr, 10), 1) : 1);
}

std::string text(const Interval& interval)
{
    return std::to_string(interval.low) + " to " + std::to_string(interval.high);
}

/// Sound engines with the usual tenth of the work unrecorded: judged once for all tests of this file.
const Tally& sound_engines()
{
    static const Tally tally = judge_fleet(Recipe{}, engines(450), first_seed);
    return tally;
}

Interval a_year(std::size_t count, const Tally& tally)
{
    const Interval interval = poisson_interval(count);
    return {interval.low / tally.engine_years, interval.high / tally.engine_years};
}

TEST(DriftStatistics, TheIntervalsAreTheExactOnes)
{
    // Garwood's limits for 10 counts, 4.7954 to 18.3904, and Clopper and Pearson's for 9 of 10, 0.55498 to 0.99747:
    // found from the sums themselves with another program. Tolerance: half of the last printed digit.
    EXPECT_NEAR(poisson_interval(10).low, 4.7954, 5e-5);
    EXPECT_NEAR(poisson_interval(10).high, 18.3904, 5e-5);
    EXPECT_NEAR(poisson_interval(0).high, 3.6889, 5e-5);
    EXPECT_NEAR(binomial_interval(9, 10).low, 0.55498, 5e-6);
    EXPECT_NEAR(binomial_interval(9, 10).high, 0.99747, 5e-6);
}

TEST(DriftStatistics, SoundEnginesAreFlaggedFalselyAtMostOnceInFiveYears)
{
    const Tally& tally = sound_engines();
    const Interval rate = a_year(tally.false_cylinder + tally.false_engine, tally);
    RecordProperty("false_flags_a_year", text(rate));
    EXPECT_LE(rate.low, 0.2) << text(rate);
    // Sure to 97.5 %: not a quarter above the aim.
    EXPECT_LE(rate.high, 0.25) << text(rate);
}

TEST(DriftStatistics, AnEngineWithAllWorkRecordedIsAlmostNeverAskedAboutWork)
{
    Recipe recorded;
    recorded.unrecorded_share = 0.0;
    const Tally tally = judge_fleet(recorded, engines(120), first_seed + 100'000);
    const Interval asked = a_year(tally.questions, tally);
    const Interval false_flags = a_year(tally.false_cylinder + tally.false_engine, tally);
    RecordProperty("questions_a_year", text(asked));
    EXPECT_LE(asked.low, 0.02) << text(asked);
    EXPECT_LE(false_flags.low, 0.2) << text(false_flags);
}

TEST(DriftStatistics, MostQuestionsAreAboutWorkThatWasDone)
{
    const Tally& tally = sound_engines();
    ASSERT_GT(tally.questions, 0U);
    const Interval right = binomial_interval(tally.true_questions, tally.questions);
    EXPECT_GE(right.high, 0.8) << text(right); // 40 of 50 before
    EXPECT_GE(right.low, 0.5) << text(right);
}

TEST(DriftStatistics, TypingErrorsAreCaughtAndSoundValuesLeftInPeace)
{
    const Tally& tally = sound_engines();
    using drift::Verdict;
    const auto caught = [&](Verdict kind) { return binomial_interval(tally.caught.at(kind), tally.errors.at(kind)); };
    EXPECT_GE(caught(Verdict::decimal_slip).low, 0.95) << text(caught(Verdict::decimal_slip));
    EXPECT_GE(caught(Verdict::unit_slip).low, 0.95) << text(caught(Verdict::unit_slip));
    // Exchanged digits that move a value by less than 6 noise units are no different from noise.
    const Interval large = binomial_interval(tally.large_slips_caught, tally.large_slips);
    EXPECT_GE(large.low, 0.9) << text(large);
    // Two cylinders exchanged show only through their lasting offsets: about a third can be told.
    const Interval exchanged = caught(Verdict::cylinders_swapped);
    EXPECT_GE(exchanged.high, 0.33) << text(exchanged);
    // At most 2.5 rows without a cause in 100 readings. The rows of one reading come together, so the count
    // scatters more than a Poisson count: twice its 95 % half-width is allowed for.
    const double readings = static_cast<double>(tally.readings);
    const Interval causeless = poisson_interval(tally.doubts_without_cause);
    EXPECT_LE(2.0 * causeless.high - static_cast<double>(tally.doubts_without_cause), 0.025 * readings);
    // A reading that was not steady is poor by a scatter of 1.7 times the usual, which part of them only just
    // reach: three of four are marked at least, and at most one in a hundred steady ones.
    const Interval unsteady = binomial_interval(tally.unsteady_marked, tally.unsteady);
    EXPECT_GE(unsteady.low, 0.75) << text(unsteady);
    EXPECT_LE(poisson_interval(tally.unsteady_wrongly).high, 0.01 * readings);
}

struct FaultCase
{
    Fault fault;
    double share_within_12; ///< reached by the prototype of the method on 70 engines
};
void PrintTo(const FaultCase& one, std::ostream* out) { *out << fault_name(one.fault); }

class FaultFound : public testing::TestWithParam<FaultCase>
{
};

TEST_P(FaultFound, AsOftenWithinTwelveReadingsAsThePrototypeFoundIt)
{
    Recipe recipe;
    recipe.fault = GetParam().fault;
    const Tally tally = judge_fleet(recipe, engines(40), first_seed + 1'000'000 * (1 + static_cast<std::uint64_t>(recipe.fault)));
    ASSERT_GT(tally.faults, 0U);
    const Interval share = binomial_interval(tally.found_within_12, tally.faults);
    RecordProperty("found_within_12", text(share));
    // The prototype's share has an error of its own: one standard error of 70 engines.
    const double floor = GetParam().share_within_12;
    EXPECT_GE(share.high, floor - std::sqrt(floor * (1.0 - floor) / 70.0)) << text(share);
}

INSTANTIATE_TEST_SUITE_P(AllFaults, FaultFound,
                         testing::Values(FaultCase{Fault::slow_ring_wear, 0.70}, FaultCase{Fault::fast_ring_wear, 0.99},
                                         FaultCase{Fault::fuel_pump_wear, 0.56}, FaultCase{Fault::fuel_nozzle, 0.97},
                                         FaultCase{Fault::exhaust_valve, 0.99},
                                         FaultCase{Fault::exhaust_sensor_drift, 0.67},
                                         FaultCase{Fault::jacket_sensor_step, 0.83},
                                         FaultCase{Fault::turbocharger_fouling, 0.94},
                                         FaultCase{Fault::air_cooler_fouling, 0.97}));

} // namespace
