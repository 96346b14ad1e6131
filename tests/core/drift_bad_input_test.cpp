// SPDX-License-Identifier: GPL-3.0-or-later
// Odd input of the drift method: an answer, or nothing; never a crash, and never a flag from nothing.
#include "core/trend/drift.h"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <random>

using namespace evenstroke::drift;

namespace {

Cell cell_of(double deviation)
{
    Cell cell;
    cell.present = true;
    cell.deviation = deviation;
    cell.typed_number = 100.0 + deviation;
    return cell;
}

/// One quantity; `deviation_of(reading, cylinder)` is what was read.
template <typename Deviation> Input input_of(std::size_t readings, std::size_t cylinders, const Deviation& deviation_of)
{
    Input input;
    input.cylinders = cylinders;
    Channel channel;
    channel.quantity = "compression_pressure";
    channel.noise = 1.2;
    for (std::size_t i = 0; i < readings; ++i) {
        input.months.push_back(static_cast<double>(i));
        for (std::size_t j = 0; j < cylinders; ++j)
            channel.cells.push_back(cell_of(deviation_of(i, j)));
    }
    input.channels.push_back(std::move(channel));
    return input;
}

/// Of one place and reading always the same, and of no other.
double wobble(std::size_t reading, std::size_t cylinder)
{
    std::mt19937_64 random(1000 * reading + cylinder);
    std::uniform_real_distribution<double> amount(-1.0, 1.0);
    random.discard(3);
    return amount(random);
}

TEST(DriftBadInput, AConstantSeriesRaisesNothing)
{
    EXPECT_TRUE(judge(input_of(60, 6, [](std::size_t, std::size_t) { return 0.0; })).flags.empty());
    EXPECT_TRUE(judge(input_of(60, 6, [](std::size_t, std::size_t j) { return 2.0 * static_cast<double>(j); })).flags.empty());
}

TEST(DriftBadInput, NothingReadIsNothingSaid)
{
    EXPECT_TRUE(judge(Input{}).flags.empty());
    Input input = input_of(40, 6, wobble);
    for (Cell& cell : input.channels.front().cells)
        cell = Cell{};
    const Output output = judge(input);
    EXPECT_TRUE(output.flags.empty());
    EXPECT_TRUE(output.doubts.empty());
}

TEST(DriftBadInput, TwoReadingsAreTooFew)
{
    EXPECT_TRUE(judge(input_of(2, 6, [](std::size_t i, std::size_t j) { return j == 0 && i == 1 ? -4.0 : 0.0; })).flags.empty());
}

TEST(DriftBadInput, ReadingsOfOneMomentRaiseNothing)
{
    Input input = input_of(60, 6, wobble);
    std::fill(input.months.begin(), input.months.end(), 3.0);
    EXPECT_TRUE(judge(input).flags.empty());
}

TEST(DriftBadInput, OneCylinderAndTwentyAreEngines)
{
    EXPECT_TRUE(judge(input_of(60, 1, wobble)).flags.empty());
    EXPECT_TRUE(judge(input_of(60, 20, wobble)).flags.empty());
    const auto falling = [](std::size_t i, std::size_t j) {
        return wobble(i, j) - (j == 13 && i >= 30 ? 0.9 * static_cast<double>(i - 29) : 0.0);
    };
    const Output output = judge(input_of(60, 20, falling));
    ASSERT_FALSE(output.flags.empty());
    EXPECT_EQ(output.flags.front().cylinder, 13u);
}

TEST(DriftBadInput, NumbersThatAreNoneCountAsNotRead)
{
    const double odd[] = {std::numeric_limits<double>::infinity(), -std::numeric_limits<double>::infinity(),
                          std::numeric_limits<double>::quiet_NaN(), 1e308};
    Input input = input_of(60, 6, wobble);
    for (std::size_t k = 0; k < std::size(odd); ++k)
        input.channels.front().cells[6 * (20 + 7 * k) + k].deviation = odd[k];
    for (const Flag& flag : judge(input).flags)
        ADD_FAILURE() << "reading " << flag.reading;
    input.months[10] = std::numeric_limits<double>::quiet_NaN();
    judge(input); // an answer, whatever it is
}

TEST(DriftBadInput, VectorsOfAnotherLengthCountAsEmpty)
{
    Input input = input_of(40, 6, wobble);
    input.channels.front().cells.pop_back();
    input.load_percent.resize(3);
    input.cylinder_work.resize(5);
    EXPECT_TRUE(judge(input).flags.empty());
}

// Time grows with the number of readings and not with its square: a million would take weeks otherwise. Here as many as
// fit some seconds with sanitizers.
TEST(DriftBadInput, TensOfThousandsOfReadingsAreJudged)
{
    std::mt19937_64 random(3);
    std::normal_distribution<double> noise;
    const Input input = input_of(20'000, 1, [&](std::size_t, std::size_t) { return noise(random); });
    EXPECT_EQ(judge(input).readings.size(), 20'000u);
}

} // namespace
