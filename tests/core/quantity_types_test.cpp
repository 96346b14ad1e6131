// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/units/quantity_types.h"

#include <gtest/gtest.h>
#include <type_traits>

namespace evenstroke {
namespace {

// What must not compile, asked of the compiler: none of the three pressures turns into another by itself,
// and a difference of temperature is no temperature.
template <typename From, typename To> constexpr bool turns_into = std::is_convertible_v<From, To>;
template <typename A, typename B> constexpr bool can_be_added = requires(A a, B b)
{
    a + b;
};
template <typename A, typename B> constexpr bool can_be_compared = requires(A a, B b)
{
    a < b;
};

static_assert(!turns_into<GaugePressure, AbsolutePressure>);
static_assert(!turns_into<AbsolutePressure, GaugePressure>);
static_assert(!turns_into<PressureDifference, GaugePressure>);
static_assert(!turns_into<PressureDifference, AbsolutePressure>);
static_assert(!turns_into<AbsolutePressure, PressureDifference>);
static_assert(!turns_into<GaugePressure, PressureDifference>);
static_assert(!std::is_constructible_v<AbsolutePressure, GaugePressure>);
static_assert(!std::is_constructible_v<GaugePressure, AbsolutePressure>);
static_assert(!std::is_constructible_v<PressureDifference, GaugePressure>);
static_assert(!std::is_assignable_v<AbsolutePressure&, GaugePressure>);
static_assert(!std::is_assignable_v<GaugePressure&, AbsolutePressure>);
static_assert(!can_be_added<GaugePressure, AbsolutePressure>);
static_assert(!can_be_added<GaugePressure, GaugePressure>);
static_assert(!can_be_added<GaugePressure, PressureDifference>);
static_assert(!can_be_compared<GaugePressure, AbsolutePressure>);
static_assert(can_be_compared<GaugePressure, GaugePressure>);
static_assert(can_be_added<AbsolutePressure, PressureDifference>);

static_assert(!turns_into<double, AbsolutePressure>);
static_assert(!turns_into<double, GaugePressure>);
static_assert(!turns_into<double, Temperature>);
static_assert(!turns_into<TemperatureDifference, Temperature>);
static_assert(!turns_into<Temperature, TemperatureDifference>);
static_assert(can_be_added<Temperature, TemperatureDifference>);

static_assert(sizeof(AbsolutePressure) == sizeof(double));
static_assert(sizeof(GaugePressure) == sizeof(double));

TEST(QuantityTypes, AGaugePressureBecomesAbsoluteOnlyOverANamedBarometer)
{
    const AbsolutePressure barometer = bar_absolute(1.013);
    const AbsolutePressure scavenge = to_absolute(bar_gauge(2.5), barometer);
    EXPECT_DOUBLE_EQ(in_bar(scavenge), 3.513);
    EXPECT_DOUBLE_EQ(in_bar(to_gauge(scavenge, barometer)), 2.5);
}

TEST(QuantityTypes, ADifferenceOfTemperatureIsNeverShifted)
{
    const TemperatureDifference warmer = celsius(40.0) - celsius(25.0);
    EXPECT_DOUBLE_EQ(warmer.value(), 15.0);
    EXPECT_DOUBLE_EQ(in_celsius(celsius(25.0) + warmer), 40.0);
}

TEST(QuantityTypes, RevolutionsAMinuteAreCountedASecond)
{
    EXPECT_DOUBLE_EQ(per_minute(120.0).value(), 2.0);
}

} // namespace
} // namespace evenstroke
