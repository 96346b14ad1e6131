// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/meant_number.h"

#include "core/reading/typed_box.h"

#include <gtest/gtest.h>

#include <vector>

namespace evenstroke {
namespace {

std::optional<MeantNumber> guess(const char* typed, double own, std::vector<NumberReference> references)
{
    const QuantityId load = *find_quantity("load_percent", Place::Kind::engine);
    const auto value = read_box({load, Place::engine(), Phase::reading}, typed, own_unit(load));
    return guess_meant_number(value.value(), own, references);
}

TEST(MeantNumber, APointInTheWrongPlaceIsOfferedRight)
{
    const auto meant = guess("8.54", 8.54, {{85.0, "The quick lines say"}});
    ASSERT_TRUE(meant.has_value());
    EXPECT_EQ(meant->suggestion, "85.4");
    EXPECT_NE(meant->sentence.find("The quick lines say 85 %"), std::string::npos) << meant->sentence;
    EXPECT_EQ(guess("854", 854, {{85.0, "The quick lines say"}})->suggestion, "85.4");
}

TEST(MeantNumber, TheFirstReferenceThatASlipExplainsDecides)
{
    const auto meant = guess("8.54", 8.54, {{57.0, "Last time it was"}, {85.0, "By shaft power it is"}});
    ASSERT_TRUE(meant.has_value());
    EXPECT_EQ(meant->suggestion, "85.4");
    EXPECT_NE(meant->sentence.find("By shaft power"), std::string::npos);
}

TEST(MeantNumber, NearNumbersAndThoseThatNoSlipExplainsAreLeft)
{
    EXPECT_FALSE(guess("84", 84, {{85.0, "The quick lines say"}}));
    EXPECT_FALSE(guess("30", 30, {{85.0, "The quick lines say"}}));
    EXPECT_FALSE(guess("8.54", 8.54, {}));
    EXPECT_FALSE(guess("8.54", 8.54, {{0.0, "The quick lines say"}}));
}

} // namespace
} // namespace evenstroke
