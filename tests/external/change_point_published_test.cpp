// SPDX-License-Identifier: GPL-3.0-or-later
// The step scan on the annual flow of the Nile at Aswan, 1871 to 1970 (10^8 m^3).
// Data: Cobb 1978, Biometrika 65, 243-251; data set `Nile` of R.
// Published: one break, 1898 the last old year (Zeileis, Kleiber, Kraemer and Hornik 2003, Computational Statistics
// & Data Analysis 44, 109-123, and the examples of the R package strucchange, which gives supF 75.929769).
// The means, sums of squares and the standardised step follow by arithmetic; tolerances are half of the last
// printed digit.
#include "core/trend/scan.h"

#include <gtest/gtest.h>

#include <cmath>
#include <string>
#include <vector>

using namespace evenstroke::drift;

namespace {

const std::vector<double> nile{
    1120, 1160, 963,  1210, 1160, 1160, 813,  1230, 1370, 1140, 995,  935, 1110, 994, 1020, 960, 1180, 799, 958, 1140,
    1100, 1210, 1150, 1250, 1260, 1220, 1030, 1100, 774,  840,  874,  694, 940,  833, 701,  916, 692,  1020, 1050, 969,
    831,  726,  456,  824,  702,  1120, 1100, 832,  764,  821,  768,  845, 864,  862, 698,  845, 744,  796, 1040, 759,
    781,  865,  845,  944,  984,  897,  822,  1010, 771,  676,  649,  846, 812,  742, 801,  1040, 860, 874, 848, 890,
    744,  749,  838,  1050, 918,  986,  797,  923,  975,  815,  1020, 906, 901,  1170, 912, 746, 919,  718, 714, 740};

constexpr double sigma = 127.67374; // about the two means, 98 degrees of freedom

RunningSums sums_of_nile()
{
    RunningSums sums;
    for (std::size_t i = 0; i < nile.size(); ++i)
        sums.add(static_cast<double>(i), nile[i]);
    return sums;
}

TEST(PublishedChangePoint, TheLargestStepOfTheNileIsAfter1898)
{
    const RunningSums sums = sums_of_nile();
    std::size_t best = 0;
    double largest = 0.0;
    for (std::size_t onset = readings_before_onset; onset + readings_after_onset <= nile.size(); ++onset) {
        const auto fit = fit_step(sums, 0, onset, nile.size() - 1, sigma);
        ASSERT_TRUE(fit.has_value());
        if (std::abs(fit->strength()) > largest) {
            largest = std::abs(fit->strength());
            best = onset;
        }
    }
    EXPECT_EQ(best, 28U); // 28 old years: 1871 to 1898
    EXPECT_NEAR(largest, 8.713769, 5e-7);
    EXPECT_NEAR(largest * largest, 75.929769, 5e-6);
    const auto fit = fit_step(sums, 0, best, nile.size() - 1, sigma);
    EXPECT_NEAR(fit->size(sigma), 849.9722 - 1097.750, 5e-5);
    const double with_break = 2835156.75 - fit->size(sigma) * fit->size(sigma) * fit->shape_squared;
    EXPECT_NEAR(with_break, 1597457.194, 5e-4);
    EXPECT_NEAR(std::sqrt(with_break / 98.0), sigma, 5e-6);
}

TEST(PublishedChangePoint, TheScanSeesItFourYearsLaterAsAStep)
{
    const RunningSums sums = sums_of_nile();
    std::vector<double> years;
    for (std::size_t i = 0; i < nile.size(); ++i)
        years.push_back(static_cast<double>(i));
    const std::vector<ScanSeries> series{{&sums, 0, sigma}};
    const std::vector<std::string> names{"compression_pressure"};
    const ScanResult result = scan(series, SignatureMatcher(names), years, 45);
    EXPECT_EQ(result.shape, Shape::step);
    EXPECT_EQ(result.onset, 28U);
    EXPECT_EQ(result.direction, -1);
}

} // namespace
