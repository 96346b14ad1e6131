// SPDX-License-Identifier: GPL-3.0-or-later
// The two control charts against the worked examples of the NIST/SEMATECH e-Handbook of Statistical Methods
// (doi:10.18434/M32189; data and printed values as public test suites quote them) and published average run lengths.
#include "core/trend/control_charts.h"

#include <gtest/gtest.h>

#include <array>
#include <cmath>
#include <random>

using namespace evenstroke::drift;

namespace {

/// Mean number of values to the first alarm with its standard error, on normal values of a shifted mean.
struct RunLength
{
    double mean, error;
};
template <typename Alarm> RunLength run_length(double shift, std::uint64_t seed, const Alarm& alarm_after)
{
    constexpr int runs = 20'000;
    std::mt19937_64 random(seed);
    std::normal_distribution<double> noise(shift, 1.0);
    double sum = 0.0, squares = 0.0;
    for (int run = 0; run < runs; ++run) {
        const double length = alarm_after([&] { return noise(random); });
        sum += length;
        squares += length * length;
    }
    const double mean = sum / runs;
    return {mean, std::sqrt((squares / runs - mean * mean) / runs)};
}

/// Feeds a chart value by value in blocks until it gives an alarm.
template <typename Chart, typename Draw> double feed(const Chart& chart, const Draw& draw)
{
    std::vector<double> values;
    for (std::size_t block = 32;; block *= 2) {
        while (values.size() < block)
            values.push_back(draw());
        if (const auto alarm = chart(values))
            return static_cast<double>(*alarm + 1);
    }
}

TEST(EwmaPublished, AgreesWithTheHandbooksExample)
{
    const std::array<double, 20> data{52.0, 47.0, 53.0, 49.3, 50.1, 47.0, 51.0, 50.1, 51.2, 50.5,
                                      49.6, 47.6, 49.9, 51.3, 47.8, 51.2, 52.6, 52.4, 53.6, 52.1};
    const std::array<double, 20> printed{50.60, 49.52, 50.56, 50.18, 50.16, 49.21, 49.75, 49.85, 50.26, 50.33,
                                         50.11, 49.36, 49.52, 50.05, 49.38, 49.92, 50.73, 51.23, 51.94, 51.99};
    const auto chart = ewma_chart(data, 0.3, 50.0, 2.0539, 3.0);
    ASSERT_TRUE(chart);
    for (std::size_t i = 0; i < data.size(); ++i)
        EXPECT_NEAR(chart->path[i], printed[i], 0.00501) << i; // half of the last printed digit
    EXPECT_NEAR(chart->high, 52.5884, 5e-5);
    EXPECT_NEAR(chart->low, 47.4115, 1e-4) << "printed 47.4115, by arithmetic 47.411568";
    EXPECT_FALSE(chart->alarm) << "no point outside";
}

TEST(CusumPublished, AgreesWithTheHandbooksExample)
{
    const std::array<double, 20> data{324.925, 324.675, 324.725, 324.350, 325.350, 325.225, 324.125,
                                      324.525, 325.225, 324.600, 324.625, 325.150, 328.325, 327.250,
                                      327.825, 328.500, 326.675, 327.775, 326.875, 328.350};
    const std::array<double, 20> upper{0, 0, 0, 0, 0.03, 0, 0, 0, 0, 0, 0, 0, 3.01, 4.94, 7.45, 10.63, 11.99, 14.44, 16.00, 19.04};
    const std::array<double, 20> lower{0, 0.01, 0, 0.33, 0, 0, 0.56, 0.72, 0.17, 0.25, 0.31, 0, 0, 0, 0, 0, 0, 0, 0, 0};
    const auto chart = cusum_chart(data, 325.0, 0.3175, 4.1959);
    ASSERT_TRUE(chart);
    for (std::size_t i = 0; i < data.size(); ++i) {
        EXPECT_NEAR(chart->upper[i], upper[i], 0.01) << i; // printed to two digits
        EXPECT_NEAR(chart->lower[i], lower[i], 0.01) << i;
    }
    EXPECT_EQ(chart->alarm, 13u) << "the fourteenth value";
}

// Lucas and Crosier 1982, Technometrics 24, table 1: two-sided, k 0.5, h 4: 168 (no shift), 26.6 (0.5), 8.38 (1), 3.34 (2).
// Brook and Evans 1972, Biometrika 59: one-sided k 0.5, h 3: 117.59. Tolerance: three standard errors of the simulation.
TEST(CusumPublished, RunsAsLongAsPublished)
{
    const auto length = [](double shift, double h, std::uint64_t seed) {
        return run_length(shift, seed, [&](const auto& draw) {
            return feed([&](const std::vector<double>& v) { return cusum_chart(v, 0.0, 0.5, h)->alarm; }, draw);
        });
    };
    const struct { double shift, published; } table[] = {{0.0, 168.0}, {0.5, 26.6}, {1.0, 8.38}, {2.0, 3.34}};
    for (const auto& row : table) {
        const RunLength found = length(row.shift, 4.0, 11);
        EXPECT_NEAR(found.mean, row.published, 3.0 * found.error + 0.005 * row.published) << row.shift; // and its rounding
    }
}

// Crowder 1987, Technometrics 29, table 1: λ 0.5, factor 2: 26.45 (no shift), 4.91 (1); Lucas and Saccucci 1990,
// Technometrics 32, table 3: λ 0.03, factor 2.437: 500, 29.3 (0.5), 12.6 (1).
TEST(EwmaPublished, RunsAsLongAsPublished)
{
    const auto length = [](double shift, double weight, double factor, std::uint64_t seed) {
        return run_length(shift, seed, [&](const auto& draw) {
            return feed([&](const std::vector<double>& v) { return ewma_chart(v, weight, 0.0, 1.0, factor)->alarm; }, draw);
        });
    };
    const struct { double shift, weight, factor, published; } table[] = {
        {0.0, 0.5, 2.0, 26.45}, {1.0, 0.5, 2.0, 4.91}, {0.5, 0.03, 2.437, 29.3}, {1.0, 0.03, 2.437, 12.6}};
    for (const auto& row : table) {
        const RunLength found = length(row.shift, row.weight, row.factor, 12);
        EXPECT_NEAR(found.mean, row.published, 3.0 * found.error + 0.005 * row.published) << row.weight << " " << row.shift;
    }
}

TEST(ControlCharts, SayNothingOfWhatCannotBe)
{
    const std::array<double, 2> odd{1.0, std::nan("")};
    EXPECT_FALSE(ewma_chart(odd, 0.3, 0.0, 1.0, 3.0));
    EXPECT_FALSE(cusum_chart(odd, 0.0, 0.5, 4.0));
    EXPECT_FALSE(ewma_chart({}, 0.0, 0.0, 1.0, 3.0));
    EXPECT_FALSE(ewma_chart({}, 0.3, 0.0, 0.0, 3.0));
    EXPECT_FALSE(cusum_chart({}, 0.0, -0.5, 4.0));
    ASSERT_TRUE(ewma_chart({}, 0.3, 0.0, 1.0, 3.0));
    EXPECT_TRUE(ewma_chart({}, 0.3, 0.0, 1.0, 3.0)->path.empty());
}

} // namespace
