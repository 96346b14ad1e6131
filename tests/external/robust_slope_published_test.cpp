// SPDX-License-Identifier: GPL-3.0-or-later
// Mann and Kendall's test and Sen's slope against a printed example and against scipy.
#include "core/trend/robust_slope.h"

#include <gtest/gtest.h>

#include <array>
#include <cmath>
#include <cstdio>
#include <numeric>
#include <random>
#include <sstream>
#include <string>
#include <vector>

using namespace evenstroke::drift;

namespace {

// "A Mann-Kendall example by hand", J. Little, College of the Holy Cross, Montserrat seminar notes.
const std::vector<double> holy_cross{12.9, 14.8, 13.2, 15.7, 13.8, 15.6, 12.9, 11.0, 17.3, 15.9, 19.0, 18.3, 20.1, 21.7};

std::vector<double> counting(std::size_t count)
{
    std::vector<double> times(count);
    std::iota(times.begin(), times.end(), 1.0);
    return times;
}

TEST(MannKendallPublished, AgreesWithTheExampleByHand)
{
    const auto test = mann_kendall(holy_cross);
    ASSERT_TRUE(test);
    EXPECT_EQ(test->s, 54);
    EXPECT_NEAR(test->variance, 332.6667, 5e-5);
    EXPECT_NEAR(test->z, 2.9058, 5e-5);
    EXPECT_NEAR(test->p_two_sided / 2.0, 0.0018, 5e-5) << "printed one-sided";
}

// The same data and invented irregular times by scipy.stats.theilslopes 1.10.1; tolerances: half of the last digit printed.
TEST(TheilSenIndependent, AgreesWithScipysFigures)
{
    const auto regular = theil_sen(counting(14), holy_cross);
    ASSERT_TRUE(regular);
    EXPECT_NEAR(regular->slope, 0.5666667, 5e-8);
    EXPECT_NEAR(regular->intercept, 11.4, 1e-12);
    EXPECT_NEAR(regular->low, 0.3250, 5e-5);
    EXPECT_NEAR(regular->high, 0.8666667, 5e-8);
    const auto narrower = theil_sen(counting(14), holy_cross, 0.90);
    EXPECT_NEAR(narrower->low, 0.3333333, 5e-8);
    EXPECT_NEAR(narrower->high, 0.8, 5e-5);
    const std::vector<double> times{0, 1, 2, 3.5, 4.5, 5.5, 7.5, 8.5, 9.5, 11, 12, 13, 14, 16};
    const auto irregular = theil_sen(times, holy_cross);
    EXPECT_NEAR(irregular->slope, 0.48, 1e-12);
    EXPECT_NEAR(irregular->intercept, 11.81, 1e-12);
    EXPECT_NEAR(irregular->low, 0.2727273, 5e-8);
    EXPECT_NEAR(irregular->high, 0.6800, 5e-5);
}

// Annual flow of the Nile (Cobb 1978, Biometrika 65): S -1387, slope -2.6, -3.627907 to -1.428571 (R and scipy).
TEST(TheilSenIndependent, AgreesOnTheFlowOfTheNile)
{
    const std::vector<double> nile{
        1120, 1160, 963,  1210, 1160, 1160, 813,  1230, 1370, 1140, 995,  935, 1110, 994, 1020, 960, 1180, 799, 958, 1140,
        1100, 1210, 1150, 1250, 1260, 1220, 1030, 1100, 774,  840,  874,  694, 940,  833, 701,  916, 692,  1020, 1050, 969,
        831,  726,  456,  824,  702,  1120, 1100, 832,  764,  821,  768,  845, 864,  862, 698,  845, 744,  796, 1040, 759,
        781,  865,  845,  944,  984,  897,  822,  1010, 771,  676,  649,  846, 812,  742, 801,  1040, 860, 874, 848, 890,
        744,  749,  838,  1050, 918,  986,  797,  923,  975,  815,  1020, 906, 901,  1170, 912, 746, 919,  718, 714, 740};
    EXPECT_EQ(mann_kendall(nile)->s, -1387);
    const auto slope = theil_sen(counting(100), nile);
    EXPECT_NEAR(slope->slope, -2.6, 1e-12);
    EXPECT_NEAR(slope->low, -3.627907, 5e-7);
    EXPECT_NEAR(slope->high, -1.428571, 5e-7);
}

// Random series with ties: slope, intercept and interval of scipy.stats.theilslopes to rounding; skipped where Debian's
// python3-scipy is not installed.
TEST(TheilSenIndependent, AgreesWithScipyOnRandomSeries)
{
    std::string command = "/usr/bin/python3 -c \"from scipy.stats import theilslopes\n";
    std::vector<std::pair<std::vector<double>, std::vector<double>>> series;
    std::mt19937_64 random(5);
    for (int i = 0; i < 20; ++i) {
        std::vector<double> times, values;
        double time = 0.0;
        for (int k = 0; k < 8 + 3 * i; ++k) {
            time += 0.5 + 0.125 * static_cast<double>(random() % 8);
            times.push_back(time);
            values.push_back(0.25 * static_cast<double>(random() % 64) + 0.5 * k);
        }
        std::ostringstream line;
        const auto list = [&](const std::vector<double>& numbers) {
            line << "[";
            for (const double number : numbers)
                line << number << ",";
            line << "]";
        };
        line << "print(*[repr(float(x)) for x in theilslopes(";
        list(values);
        line << ",";
        list(times);
        line << ",0.95)])\n";
        command += line.str();
        series.emplace_back(std::move(times), std::move(values));
    }
    command += "\" 2>/dev/null";
    std::string output;
    if (FILE* const pipe = popen(command.c_str(), "r")) {
        char buffer[4096];
        while (std::fgets(buffer, sizeof buffer, pipe) != nullptr)
            output += buffer;
        pclose(pipe);
    }
    if (output.empty())
        GTEST_SKIP() << "scipy (Debian: python3-scipy) is not installed";
    std::istringstream rows(output);
    for (const auto& [times, values] : series) {
        double slope = 0.0, intercept = 0.0, low = 0.0, high = 0.0;
        ASSERT_TRUE(rows >> slope >> intercept >> low >> high);
        const auto found = theil_sen(times, values);
        ASSERT_TRUE(found);
        EXPECT_NEAR(found->slope, slope, 1e-12);
        EXPECT_NEAR(found->intercept, intercept, 1e-10);
        EXPECT_NEAR(found->low, low, 1e-12) << times.size();
        EXPECT_NEAR(found->high, high, 1e-12) << times.size();
    }
}

TEST(RobustSlope, SaysNothingOfTooLittle)
{
    const std::array<double, 2> same{1.0, 1.0}, two{1.0, 2.0}, odd{1.0, std::nan("")};
    EXPECT_FALSE(theil_sen(same, two)) << "two values at one time";
    EXPECT_FALSE(theil_sen(two, odd));
    EXPECT_FALSE(theil_sen(std::span(two).first(1), std::span(two).first(1)));
    EXPECT_FALSE(mann_kendall(two));
    EXPECT_FALSE(mann_kendall(std::vector<double>{3.0, 3.0, 3.0}));
    const auto flat = theil_sen(counting(5), std::vector<double>(5, 2.0));
    ASSERT_TRUE(flat);
    EXPECT_EQ(flat->slope, 0.0);
    EXPECT_EQ(flat->low, 0.0);
}

} // namespace
