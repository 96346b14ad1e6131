// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/plain_number.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <bit>
#include <charconv>
#include <cstdint>
#include <random>
#include <string>

namespace evenstroke::storage {
namespace {

struct Read
{
    bool taken = false;
    double number = 0.0;
    std::size_t length = 0;
};
Read read(const std::string& text, char decimal_sign = '.')
{
    Read result;
    const char* at = text.data();
    result.taken = read_plain_number(at, text.data() + text.size(), decimal_sign, result.number);
    result.length = static_cast<std::size_t>(at - text.data());
    return result;
}

/// An optional minus, up to `most` digits, the decimal sign anywhere among them or nowhere.
std::string random_decimal(std::mt19937_64& dice, int most)
{
    std::string text = dice() % 2 == 0 ? "-" : "";
    const auto digits = 1 + dice() % static_cast<std::uint64_t>(most);
    const auto sign_at = dice() % (digits + 3);
    for (std::uint64_t i = 0; i < digits; ++i) {
        if (i == sign_at)
            text += '.';
        text += static_cast<char>('0' + dice() % 10);
    }
    return text;
}

TEST(PlainNumber, IsTheNearestDoubleAsTheStandardLibraryGivesIt)
{
    std::mt19937_64 dice(20261202);
    int taken = 0;
    for (int i = 0; i < 1'000'000; ++i) {
        const std::string text = random_decimal(dice, 20);
        const Read mine = read(text);
        double expected = 0.0;
        const auto standard = std::from_chars(text.data(), text.data() + text.size(), expected);
        if (!mine.taken)
            continue;
        ++taken;
        ASSERT_EQ(standard.ec, std::errc()) << text;
        ASSERT_EQ(std::bit_cast<std::uint64_t>(mine.number), std::bit_cast<std::uint64_t>(expected)) << text;
        ASSERT_EQ(mine.length, text.size()) << text;
    }
    EXPECT_GT(taken, 700'000) << "most of them are short enough";
}

TEST(PlainNumber, TakesEveryNumberOfFifteenDigits)
{
    std::mt19937_64 dice(7);
    for (int i = 0; i < 100'000; ++i) {
        const std::string text = random_decimal(dice, 15);
        ASSERT_TRUE(read(text).taken) << text;
    }
}

TEST(PlainNumber, StopsBehindTheNumber)
{
    EXPECT_EQ(read("-179.5,101.25").length, 6U);
    EXPECT_EQ(read("101,25;3", ',').number, 101.25);
    EXPECT_EQ(read("12 ").length, 2U);
}

TEST(PlainNumber, LeavesWhatNeedsMoreCare)
{
    for (const char* text : {"", "-", ".", "-.", "+1", "1e3", "1.5E-3", "nan", "abc", "9007199254740993",
                             "1234567890123456789012"})
        EXPECT_FALSE(read(text).taken) << text;
}

} // namespace
} // namespace evenstroke::storage
