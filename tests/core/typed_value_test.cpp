// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/units/unit_catalogue.h"

#include <cmath>
#include <gtest/gtest.h>
#include <limits>
#include <random>

namespace evenstroke {
namespace {

bool contains(const std::string& text, std::string_view part)
{
    return text.find(part) != std::string::npos;
}

TEST(ParseNumber, ReadsPointAndCommaAlike)
{
    EXPECT_EQ(parse_number("7,5").value(), 7.5);
    EXPECT_EQ(parse_number("7.5").value(), 7.5);
    EXPECT_EQ(parse_number("1.250").value(), 1.25); // one separator is always the decimal sign
    EXPECT_EQ(parse_number("1,250").value(), 1.25);
    EXPECT_EQ(parse_number("385").value(), 385.0);
    EXPECT_EQ(parse_number("0").value(), 0.0);
    EXPECT_EQ(parse_number("007").value(), 7.0);
    EXPECT_EQ(parse_number(".5").value(), 0.5);
    EXPECT_EQ(parse_number(",5").value(), 0.5);
}

TEST(ParseNumber, ReadsSignsExponentsAndBlanksAround)
{
    EXPECT_EQ(parse_number("-12.5").value(), -12.5);
    EXPECT_EQ(parse_number("+12,5").value(), 12.5);
    EXPECT_EQ(parse_number("\u2212"
                           "12.5")
                  .value(),
              -12.5); // typographic minus
    EXPECT_EQ(parse_number("\u2013"
                           "3")
                  .value(),
              -3.0); // en dash, as word processors make it
    EXPECT_EQ(parse_number("1.5e3").value(), 1500.0);
    EXPECT_EQ(parse_number("1,5E+3").value(), 1500.0);
    EXPECT_EQ(parse_number("25e-1").value(), 2.5);
    EXPECT_EQ(parse_number("25e\u2212"
                           "1")
                  .value(),
              2.5);
    EXPECT_EQ(parse_number("  42\t").value(), 42.0);
    EXPECT_EQ(parse_number("\u00A0"
                           "42\u202F")
                  .value(),
              42.0);
}

TEST(ParseNumber, ConvertsToTheNearestDouble)
{
    EXPECT_EQ(parse_number("0.1").value(), 0.1);
    EXPECT_EQ(parse_number("9007199254740993").value(), 9007199254740992.0); // 2^53 + 1: ties go to even
    EXPECT_EQ(parse_number("2.2250738585072014e-308").value(), std::numeric_limits<double>::min());
    EXPECT_EQ(parse_number("1.7976931348623157e308").value(), std::numeric_limits<double>::max());
    EXPECT_EQ(parse_number("0,30000000000000004").value(), 0.1 + 0.2);
}

TEST(ParseNumber, BringsBackEveryDoubleWrittenWith17Digits)
{
    std::mt19937_64 random(7);
    std::uniform_real_distribution<double> mantissa(-10.0, 10.0);
    std::uniform_int_distribution<int> exponent(-300, 300);
    for (int trial = 0; trial < 20000; ++trial) {
        const double number = mantissa(random) * std::pow(10.0, exponent(random));
        char text[40];
        std::snprintf(text, sizeof text, "%.17g", number);
        ASSERT_EQ(parse_number(text).value(), number) << text;
    }
}

struct Refusal
{
    std::string_view text, reason;
};

TEST(ParseNumber, RefusesWithTheTextAndTheReason)
{
    const Refusal refusals[] = {
        {"1.234.567", "more than one point or comma"},
        {"1,234.5", "more than one point or comma"},
        {"1.234,5", "more than one point or comma"},
        {"1,2,3", "more than one point or comma"},
        {"1 250", "blank inside"},
        {"1\u00A0"
         "250",
         "blank inside"},
        {"- 5", "not a number"},
        {"NaN", "not a number"},
        {"nan", "not a number"},
        {"inf", "not a number"},
        {"-inf", "not a number"},
        {"Infinity", "not a number"},
        {"-", "not a number"},
        {"+", "not a number"},
        {"\u2212", "not a number"},
        {".", "not a number"},
        {",", "not a number"},
        {"0x10", "not a number"},
        {"1e", "not a number"},
        {"1e+", "not a number"},
        {"e5", "not a number"},
        {"1e5.0", "not a number"},
        {"--5", "not a number"},
        {"+-5", "not a number"},
        {"5-", "not a number"},
        {"12'500", "not a number"},
        {"12.5bar", "not a number"},
        {"1_000", "not a number"},
        {"1e2e3", "not a number"},
        {"½", "not a number"},
        {"٣", "not a number"},
        {"１２", "not a number"},
        {"412.", "ends in a decimal sign"},
        {"412,", "ends in a decimal sign"},
        {"1e999", "too large or too small"},
        {"-1e999", "too large or too small"},
        {"1e-999", "too large or too small"},
    };
    for (const Refusal& refusal : refusals) {
        const Result<double> number = parse_number(refusal.text);
        ASSERT_FALSE(number.has_value()) << refusal.text;
        EXPECT_EQ(number.error().kind, Problem::Kind::invalid_input);
        EXPECT_TRUE(contains(number.error().what_happened, "\"" + std::string(refusal.text) + "\""))
            << refusal.text;
        EXPECT_TRUE(contains(number.error().what_happened, refusal.reason)) << number.error().what_happened;
        EXPECT_FALSE(number.error().what_to_do.empty());
    }
    EXPECT_EQ(parse_number("").error().what_happened, "There is no number.");
    EXPECT_EQ(parse_number(" \u00A0").error().what_happened, "There is no number.");
}

TEST(ParseNumber, RefusesMoreThan64Characters)
{
    const std::string longest(64, '1');
    EXPECT_TRUE(parse_number(longest).has_value());
    const Result<double> longer = parse_number(longest + "1");
    ASSERT_FALSE(longer.has_value());
    EXPECT_TRUE(contains(longer.error().what_happened, "64 characters")) << longer.error().what_happened;
    EXPECT_LT(parse_number(std::string(1000000, '1')).error().what_happened.size(), 200u);
}

TEST(ParseNumber, RefusesAZeroByteInside)
{
    EXPECT_FALSE(parse_number(std::string_view("1\0002", 3)).has_value());
    EXPECT_FALSE(parse_number(std::string_view("12\0", 3)).has_value());
}

struct Typed
{
    std::string_view text, symbol;
    double number, value_si;
    PressureKind kind = PressureKind::none;
};

TEST(ParseTypedValue, ReadsWhatLogSheetsHold)
{
    // Expected SI values by hand from the definitions of the units.
    const Typed values[] = {
        {"7,5 kgf/cm2", "kgf/cm²", 7.5, 7.5 * 98066.5},
        {"0.85 MPa", "MPa", 0.85, 850000.0},
        {"112 bar abs", "bar", 112.0, 11200000.0, PressureKind::absolute},
        {"385 °C", "°C", 385.0, 658.15},
        {"725 F", "°F", 725.0, (725.0 + 459.67) / 1.8},
        {"180 mmH2O", "mmH2O", 180.0, 1765.197},
        {"1.2 t/h", "t/h", 1.2, 1.0 / 3.0},
        {"385°C", "°C", 385.0, 658.15},
        {"81,4%", "%", 81.4, 0.814},
        {"98 1/min", "r/min", 98.0, 98.0 / 60.0},
        {"1.5e3 kW", "kW", 1500.0, 1.5e6},
        {"-12\u00A0°C", "°C", -12.0, 261.15},
        {"\u2212"
         "12 °C",
         "°C", -12.0, 261.15},
        {"2,5 bar gauge", "bar", 2.5, 250000.0, PressureKind::gauge},
        {"-0.3 bar gauge", "bar", -0.3, -30000.0, PressureKind::gauge},
        {"760 mmHg abs", "mmHg", 760.0, 101325.0144354, PressureKind::absolute},
        {"4 -", "1", 4.0, 4.0},
        {" 42.7 MJ/kg ", "MJ/kg", 42.7, 42.7e6},
        {"0 K", "K", 0.0, 0.0},
        {"0 bar abs", "bar", 0.0, 0.0, PressureKind::absolute},
        {"-273.15 °C", "°C", -273.15, 0.0},
        {"-459.67 °F", "°F", -459.67, 0.0},
    };
    for (const Typed& expected : values) {
        const Result<TypedValue> value = parse_typed_value(expected.text);
        ASSERT_TRUE(value.has_value()) << expected.text << ": " << value.error().text();
        EXPECT_EQ(value.value().number, expected.number) << expected.text;
        EXPECT_EQ(unit(value.value().unit.id).symbol, expected.symbol) << expected.text;
        EXPECT_EQ(value.value().unit.kind, expected.kind) << expected.text;
        // a few roundings of the last bit
        EXPECT_NEAR(value.value().value_si, expected.value_si, 1e-15 * std::fabs(expected.value_si))
            << expected.text;
    }
}

TEST(ParseTypedValue, RefusesWithTheTextAndTheReason)
{
    const Refusal refusals[] = {
        {"7,5", "has no unit"},
        {"bar", "does not begin with a number"},
        {"NaN bar", "does not begin with a number"},
        {"inf K", "does not begin with a number"},
        {"1 250 kW", "blank inside"},
        {"1.234,5 kW", "more than one point or comma"},
        {"12 furlongs", "not known"},
        {"12 mPa", "mixture of upper and lower case"},
        {"- bar", "not a number"},
        {"412. °C", "ends in a decimal sign"},
        {"1e999 bar", "too large"},
        {"12 °C abs", "only pressures"},
        {"12 bar 3", "not known"},
    };
    for (const Refusal& refusal : refusals) {
        const Result<TypedValue> value = parse_typed_value(refusal.text);
        ASSERT_FALSE(value.has_value()) << refusal.text;
        EXPECT_TRUE(contains(value.error().what_happened, refusal.reason)) << value.error().what_happened;
        EXPECT_FALSE(value.error().what_to_do.empty());
    }
    EXPECT_EQ(parse_typed_value("").error().what_happened, "There is no number.");
}

TEST(ParseTypedValue, RefusesWhatIsBelowAbsoluteZeroNamingValueUnitAndLimit)
{
    EXPECT_EQ(parse_typed_value("-274 °C").error().what_happened,
              "-274 °C is below absolute zero (-273.15 °C).");
    EXPECT_EQ(parse_typed_value("-1 K").error().what_happened, "-1 K is below absolute zero (0 K).");
    EXPECT_EQ(parse_typed_value("-460,5 F").error().what_happened,
              "-460.5 °F is below absolute zero (-459.67 °F).");
    EXPECT_EQ(parse_typed_value("-0.2 bar abs").error().what_happened,
              "-0.2 bar abs is below a perfect vacuum (0 bar abs).");
}

TEST(ToSiChecked, RefusesWhatIsNotFinite)
{
    const WrittenUnit megapascal = find_unit("MPa").value();
    for (const double number :
         {std::numeric_limits<double>::quiet_NaN(), std::numeric_limits<double>::infinity(), 1e305}) {
        const Result<double> value = to_si_checked(number, megapascal);
        ASSERT_FALSE(value.has_value());
        EXPECT_TRUE(contains(value.error().what_happened, "MPa"));
    }
    EXPECT_EQ(to_si_checked(0.85, megapascal).value(), 850000.0);
}

TEST(ToSiChecked, LetsGaugePressuresAndDifferencesBeNegative)
{
    const UnitId millibar = find_unit("mbar").value().id;
    EXPECT_EQ(to_si_checked(-5.0, {millibar, PressureKind::gauge}).value(), -500.0);
    EXPECT_EQ(to_si_checked(-5.0, {millibar, PressureKind::difference}).value(), -500.0);
    EXPECT_EQ(to_si_checked(-5.0, {millibar, PressureKind::none}).value(),
              -500.0); // kind not said: not judged
    EXPECT_FALSE(to_si_checked(-5.0, {millibar, PressureKind::absolute}).has_value());
}

TEST(ToSiChecked, RefusesGaugePressuresBelowVacuumWhateverTheBarometer)
{
    const WrittenUnit bar_gauge = find_unit("bar gauge").value();
    EXPECT_EQ(to_si_checked(-5.0, bar_gauge).error().what_happened,
              "-5 bar gauge is below a perfect vacuum (about -1 bar gauge).");
    EXPECT_EQ(to_si_checked(-1.05, bar_gauge).value(), -1.05e5) << "possible under a high barometer";
    EXPECT_EQ(parse_typed_value("-2 kgf/cm2 g").error().what_happened,
              "-2 kgf/cm² gauge is below a perfect vacuum (about -1.0197 kgf/cm² gauge).");
}

} // namespace
} // namespace evenstroke
