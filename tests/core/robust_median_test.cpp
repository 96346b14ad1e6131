// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/robust.h"

#include <gtest/gtest.h>

#include <random>

namespace evenstroke::drift {
namespace {

TEST(MedianInPlace, IsTheMiddleOfSortedValuesForEveryCount)
{
    std::mt19937_64 random(7);
    std::uniform_int_distribution<int> few(-3, 3); // many equal ones
    std::normal_distribution<double> many;
    for (std::size_t count = 1; count <= 40; ++count)
        for (int turn = 0; turn < 200; ++turn) {
            std::vector<double> values(count);
            for (double& value : values)
                value = turn % 2 == 0 ? many(random) : few(random);
            std::vector<double> sorted = values;
            std::sort(sorted.begin(), sorted.end());
            const double middle = count % 2 != 0 ? sorted[count / 2] : 0.5 * (sorted[count / 2 - 1] + sorted[count / 2]);
            EXPECT_EQ(median_in_place(values), middle) << count;
            std::sort(values.begin(), values.end());
            EXPECT_EQ(values, sorted) << "nothing is lost";
        }
}

/// A network that sorts every row of zeros and ones sorts every row (Knuth, The Art of Computer Programming 3, 5.3.4,
/// theorem Z).
TEST(SortingNetwork, SortsAllRowsOfZerosAndOnes)
{
    for (unsigned row = 0; row < (1U << 16); ++row) {
        std::array<double, 16> values{};
        for (unsigned bit = 0; bit < 16; ++bit)
            values[bit] = (row >> bit) & 1U;
        sorting_network::sort<16>(values);
        ASSERT_TRUE(std::is_sorted(values.begin(), values.end())) << row;
    }
}

} // namespace
} // namespace evenstroke::drift
