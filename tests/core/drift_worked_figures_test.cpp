// SPDX-License-Identifier: GPL-3.0-or-later
// Figures of the drift method worked out beforehand with a program of its own, on invented data.
// Tolerances: half of the last digit that was written down.
#include "core/trend/common_mode.h"
#include "core/trend/drift.h"
#include "core/trend/noise.h"
#include "core/trend/scan.h"

#include <gtest/gtest.h>

#include <cmath>
#include <ostream>
#include <string>
#include <vector>

using namespace evenstroke::drift;

namespace {

const std::vector<double> values{0.2, -0.5, 0.1, 0.4, -0.3, 0.0, -0.6, -1.4, -1.9, -2.8};
const std::vector<double> months{0, 1, 2, 3, 4, 5, 6, 7, 8, 9};

RunningSums sums_of(const std::vector<double>& times, const std::vector<double>& series)
{
    RunningSums sums;
    for (std::size_t i = 0; i < series.size(); ++i)
        sums.add(times[i], series[i]);
    return sums;
}

struct FitCase
{
    std::size_t onset;
    Shape shape;
    double shape_squared, projection, strength, size;
};

void PrintTo(const FitCase& one, std::ostream* out)
{
    *out << (one.shape == Shape::step ? "step" : "ramp") << " from reading " << one.onset;
}

class WorkedFit : public testing::TestWithParam<FitCase>
{
};

TEST_P(WorkedFit, AgreesWithTheFigures)
{
    const FitCase& expected = GetParam();
    const RunningSums sums = sums_of(months, values);
    const auto fit = expected.shape == Shape::step ? fit_step(sums, 0, expected.onset, 9, 1.0)
                                                   : fit_ramp(sums, 0, expected.onset, 9, 1.0, months[expected.onset - 1]);
    ASSERT_TRUE(fit.has_value());
    EXPECT_NEAR(fit->shape_squared, expected.shape_squared, 5e-7);
    EXPECT_NEAR(fit->projection, expected.projection, 5e-7);
    EXPECT_NEAR(fit->strength(), expected.strength, 5e-7);
    EXPECT_NEAR(fit->size(1.0), expected.size, 5e-7);
}

INSTANTIATE_TEST_SUITE_P(StepsAndRamps, WorkedFit,
                         testing::Values(FitCase{6, Shape::step, 2.4, -3.98, -2.569079, -1.658333},
                                         FitCase{6, Shape::ramp, 20.0, -13.50, -3.018692, -0.675},
                                         FitCase{7, Shape::step, 2.1, -4.06, -2.801666, -1.933333},
                                         FitCase{7, Shape::ramp, 10.4, -9.52, -2.952027, -0.915385},
                                         FitCase{8, Shape::step, 1.6, -3.34, -2.640502, -2.0875},
                                         FitCase{8, Shape::ramp, 4.1, -5.46, -2.696502, -1.331707}));

TEST(WorkedScan, TheLargestIsTheRampFromTheSixthReading)
{
    const RunningSums sums = sums_of(months, values);
    const std::vector<ScanSeries> series{{&sums, 0, 1.0}};
    const std::vector<std::string> names{"compression_pressure"};
    const ScanResult result = scan(series, SignatureMatcher(names), months, 9);
    ASSERT_TRUE(result.possible);
    EXPECT_NEAR(result.evidence, 3.018692, 5e-7);
    EXPECT_EQ(result.shape, Shape::ramp);
    EXPECT_EQ(result.onset, 6U);
    EXPECT_EQ(result.direction, -1);
    EXPECT_NEAR(result.any_change, 2.801666 * 2.801666, 5e-6); // the largest step
    EXPECT_EQ(result.any_change_onset, 7U);
}

TEST(WorkedScan, NeedsSixValuesBeforeAndTwoAfterTheOnset)
{
    const RunningSums sums = sums_of(months, values);
    EXPECT_FALSE(fit_step(sums, 0, 5, 9, 1.0).has_value());
    EXPECT_FALSE(fit_step(sums, 0, 9, 9, 1.0).has_value());
    EXPECT_FALSE(fit_step(sums, 1, 6, 9, 1.0).has_value()); // the segment began a reading later
}

TEST(WorkedScan, ReadingsOfOneDayMakeNoRamp)
{
    const std::vector<double> one_day(10, 3.0);
    const RunningSums sums = sums_of(one_day, values);
    EXPECT_FALSE(fit_ramp(sums, 0, 6, 9, 1.0, 3.0).has_value());
    EXPECT_TRUE(fit_step(sums, 0, 6, 9, 1.0).has_value());
}

TEST(WorkedTimeToLimit, AgreesWithTheFigures)
{
    // Months of the year in the figures, from now (the 9th) here: 10.00, 12.75, 27.25 and 9.00, 10.50, 20.00.
    const auto far = time_to_limit(months, values, 1.0, -6.0);
    ASSERT_TRUE(far && far->months_5 && far->months_50 && far->months_95);
    EXPECT_DOUBLE_EQ(*far->months_5, 1.00);
    EXPECT_DOUBLE_EQ(*far->months_50, 3.75);
    EXPECT_DOUBLE_EQ(*far->months_95, 18.25);
    EXPECT_FALSE(far->may_be_reached);
    const auto near = time_to_limit(months, values, 1.0, -4.0);
    ASSERT_TRUE(near && near->months_5 && near->months_50 && near->months_95);
    EXPECT_DOUBLE_EQ(*near->months_5, 0.00);
    EXPECT_DOUBLE_EQ(*near->months_50, 1.50);
    EXPECT_DOUBLE_EQ(*near->months_95, 11.00);
    EXPECT_TRUE(near->may_be_reached);
}

TEST(WorkedTimeToLimit, ALimitOnTheOtherSideIsNotReachedWithinTenYears)
{
    const auto other = time_to_limit(months, values, 1.0, 6.0);
    ASSERT_TRUE(other.has_value());
    EXPECT_FALSE(other->months_50.has_value());
    EXPECT_FALSE(time_to_limit({0, 1, 2}, {0, 1, 2}, 1.0, 5.0).has_value()); // too few values to say
}

TEST(WorkedCommonMode, AgreesWithTheFigures)
{
    const MaybeValues row{1.0, 0.5, -2.0, 0.8, 5.0};
    const std::vector<double> no_offsets(5, 0.0);
    const std::vector<double> medians{0.65, 0.90, 0.90, 0.75, 0.65};
    const std::vector<double> common{0.7375, 0.925, 1.55, 0.8125, 0.075};
    const MaybeValues of_others = median_of_others(row), shared = common_mode(row, no_offsets, 1.5);
    for (std::size_t j = 0; j < row.size(); ++j) {
        EXPECT_NEAR(*of_others[j], medians[j], 1e-12);
        EXPECT_NEAR(*shared[j], common[j], 1e-12);
    }
}

TEST(WorkedCommonMode, NeedsThreeOthers)
{
    const MaybeValues three{1.0, 2.0, 3.0}, four_places{1.0, 2.0, 3.0, std::nullopt};
    EXPECT_FALSE(median_of_others(three)[0].has_value());
    const MaybeValues medians = median_of_others(four_places);
    EXPECT_FALSE(medians[0].has_value());
    ASSERT_TRUE(medians[3].has_value()); // the one that was not read is compared with all three
    EXPECT_DOUBLE_EQ(*medians[3], 2.0);
}

TEST(WorkedSignatures, AgreeWithTheFigures)
{
    const std::vector<std::string> names{"mean_indicated_pressure", "maximum_pressure",          "compression_pressure",
                                         "exhaust_temperature",     "jacket_outlet_temperature", "piston_coolant_outlet_temperature",
                                         "fuel_index"};
    const SignatureMatcher matcher(names);
    std::vector<FitEntry> fits;
    for (const double strength : {0.0, -2.0, -3.0, 1.5, 0.0, 0.0, 0.0})
        fits.push_back({true, 2.0, strength}); // all gg are 4
    const FitRow row(fits);
    EXPECT_TRUE(row.alike);
    ASSERT_EQ(matcher.count(), 3U);
    EXPECT_EQ(matcher.signature(0).name, "blow_by");
    EXPECT_NEAR(matcher.strength(0, row), 3.468819, 5e-7);
    EXPECT_EQ(matcher.signature(1).name, "fuel_nozzle");
    EXPECT_NEAR(matcher.strength(1, row), 1.669584, 5e-7);
    EXPECT_EQ(matcher.signature(2).name, "fuel_pump");
    EXPECT_NEAR(matcher.strength(2, row), 0.348529, 5e-7);
    EXPECT_NEAR(matcher.any_change(row), 12.103333, 5e-7);
    FitRow long_way(fits); // as where the roots differ
    long_way.alike = false;
    for (std::size_t s = 0; s < matcher.count(); ++s)
        EXPECT_NEAR(matcher.strength(s, long_way), matcher.strength(s, row), 1e-12);
}

TEST(WorkedSignatures, NoSignatureExceedsTheRootOfAnyChange)
{
    // The scan leaves signatures out by this bound, also where quantities are missing.
    const std::vector<std::string> names{"mean_indicated_pressure", "maximum_pressure", "compression_pressure",
                                         "exhaust_temperature"};
    const SignatureMatcher matcher(names);
    for (int missing = -1; missing < 4; ++missing) {
        std::vector<FitEntry> fits;
        for (const double strength : {-1.3, -2.4, -2.9, 2.2})
            fits.push_back({true, 1.7, strength});
        if (missing >= 0)
            fits[static_cast<std::size_t>(missing)] = {};
        for (std::size_t s = 0; s < matcher.count(); ++s)
            EXPECT_LE(matcher.strength(s, FitRow(fits)), std::sqrt(matcher.any_change(FitRow(fits))) + 1e-12);
    }
}

TEST(WorkedNoise, TheShipsOwnScatterTakesOverFromTheCatalogue)
{
    NoiseEstimate noise(1.0, 30.0);
    EXPECT_DOUBLE_EQ(noise.value(), 1.0);
    for (int i = 0; i < 1000; ++i)
        noise.add_difference(i % 2 == 0 ? 2.0 : -2.0, true); // sigma of a difference 1.4826 * 2, of a value 2.097
    EXPECT_DOUBLE_EQ(noise.value(), 1.0); // not before it is renewed
    noise.renew();
    EXPECT_NEAR(noise.value(), std::sqrt((30.0 + 1000.0 * 0.5 * 2.9652 * 2.9652) / 1030.0), 1e-12);
}

TEST(WorkedChance, IsOneInSoManyYears)
{
    EXPECT_GT(years_by_chance(5.5, 8), years_by_chance(5.0, 8));
    EXPECT_GT(years_by_chance(5.5, 8), years_by_chance(5.5, 12)); // more cylinders, more chances
    EXPECT_LE(years_by_chance(50.0, 8), 1000.0);                  // never claimed to be rarer
}

TEST(WorkedChance, AgreesWithTheRatesCountedOnSimulatedSoundEngines)
{
    // Starts in 2347 years of engines with 7 cylinders on average. Tolerance: the exact 95 % interval of the
    // count, a factor of 1.2 for 138 starts, 1.26 for 73 and 1.5 for 28; rounding to two digits adds 5 %.
    EXPECT_NEAR(std::log(years_by_chance(5.0, 7) * 138.0 / 2347.0), 0.0, std::log(1.2) + 0.05);
    EXPECT_NEAR(std::log(years_by_chance(5.6, 7) * 28.0 / 2347.0), 0.0, std::log(1.5) + 0.05);
    EXPECT_NEAR(std::log(years_by_chance(5.4, 0) * 73.0 / 2347.0), 0.0, std::log(1.26) + 0.05);
}

} // namespace
