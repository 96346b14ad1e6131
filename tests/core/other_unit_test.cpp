// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/other_unit.h"

#include "core/reading/typed_box.h"

#include <gtest/gtest.h>

namespace evenstroke {
namespace {

std::optional<OtherUnit> guess(const char* name, Place place, const char* typed, double own, double reference)
{
    const QuantityId id = *find_quantity(name, place.kind);
    const auto value = read_box({id, place, Phase::reading}, typed, own_unit(id));
    return guess_other_unit(value.value(), own, reference, "last time it was");
}

const Place cooler{Place::Kind::cooler, 1};

TEST(OtherUnit, MillimetresOfWaterWrittenAsMillibarAreSeen)
{
    // 1 mmH2O is 9.80665 Pa by definition, so 102 mm are 10.0 mbar
    const auto other = guess("cooler_pressure_drop", cooler, "102", 102, 10);
    ASSERT_TRUE(other.has_value());
    EXPECT_EQ(other->suggestion, "102 mmH2O");
    EXPECT_NE(other->sentence.find("In another unit?"), std::string::npos);
    const auto read = read_box({*find_quantity("cooler_pressure_drop", Place::Kind::cooler), cooler, Phase::reading},
                               other->suggestion, own_unit(*find_quantity("cooler_pressure_drop", Place::Kind::cooler)));
    ASSERT_TRUE(read) << "what is offered can be typed";
    EXPECT_NEAR(*read.value().value_si, 1000.28, 0.01); // Pa
}

TEST(OtherUnit, DegreesFahrenheitInTheCelsiusBoxAreSeen)
{
    const auto other = guess("exhaust_temperature", Place::cylinder(1), "662", 662, 350); // 662 °F are 350 °C
    ASSERT_TRUE(other.has_value());
    EXPECT_NE(other->suggestion.find("662"), std::string::npos);
}

TEST(OtherUnit, EveryUnitThatWouldDoIsNamedNearestFirst)
{
    // 585 K are 311.85 °C and 585 °F are 307.2 °C, both by definition
    const auto kelvin = guess("exhaust_temperature", Place::cylinder(4), "585", 585, 312);
    ASSERT_TRUE(kelvin && kelvin->second);
    EXPECT_EQ(kelvin->suggestion, "585 K");
    EXPECT_EQ(*kelvin->second, "585 °F");
    EXPECT_NE(kelvin->sentence.find("585 °F would be 307"), std::string::npos) << kelvin->sentence;
    const auto fahrenheit = guess("exhaust_temperature", Place::cylinder(4), "585", 585, 307);
    ASSERT_TRUE(fahrenheit && fahrenheit->second);
    EXPECT_EQ(fahrenheit->suggestion, "585 °F");
    EXPECT_EQ(*fahrenheit->second, "585 K");
}

TEST(OtherUnit, UnitsTooNearEachOtherAndPlainChangesSayNothing)
{
    EXPECT_FALSE(guess("scavenge_pressure", Place::engine(), "2.04", 2.04, 2.0)); // kgf/cm² is 2 % from bar
    EXPECT_FALSE(guess("cooler_pressure_drop", cooler, "10", 10, 10));
    EXPECT_FALSE(guess("cooler_pressure_drop", cooler, "40", 40, 10)); // four times: no unit explains it
    EXPECT_FALSE(guess("cooler_pressure_drop", cooler, "10", 10, 0.0));
}

} // namespace
} // namespace evenstroke
