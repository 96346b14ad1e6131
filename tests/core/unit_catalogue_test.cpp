// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/units/unit_catalogue.h"

#include <cmath>
#include <gtest/gtest.h>
#include <random>
#include <set>

namespace evenstroke {
namespace {

/// Symbol of the unit a text is taken for, with the kind it names; the refusal's sentences where it is
/// refused.
std::string taken_for(std::string_view text)
{
    const Result<WrittenUnit> written = find_unit(text);
    if (!written) {
        return "refused: " + written.error().text();
    }
    const std::string_view kinds[] = {"", " gauge", " abs", " difference"};
    return std::string(unit(written.value().id).symbol) +
           std::string(kinds[static_cast<std::size_t>(written.value().kind)]);
}

bool is_refused(std::string_view text)
{
    return !find_unit(text).has_value();
}
bool contains(const std::string& text, std::string_view part)
{
    return text.find(part) != std::string::npos;
}

TEST(FindUnit, TakesEverySpellingOfThePublicFileFormat)
{
    const std::pair<std::string_view, std::string_view> expected[] = {{"degC", "°C"},
                                                                      {"°C", "°C"},
                                                                      {"C", "°C"},
                                                                      {"degF", "°F"},
                                                                      {"°F", "°F"},
                                                                      {"F", "°F"},
                                                                      {"K", "K"},
                                                                      {"bar", "bar"},
                                                                      {"mbar", "mbar"},
                                                                      {"hPa", "hPa"},
                                                                      {"kPa", "kPa"},
                                                                      {"MPa", "MPa"},
                                                                      {"Pa", "Pa"},
                                                                      {"kgf/cm2", "kgf/cm²"},
                                                                      {"kgf/cm²", "kgf/cm²"},
                                                                      {"psi", "psi"},
                                                                      {"mmH2O", "mmH2O"},
                                                                      {"mmWC", "mmH2O"},
                                                                      {"mmHg", "mmHg"},
                                                                      {"inHg", "inHg"},
                                                                      {"r/min", "r/min"},
                                                                      {"1/min", "r/min"},
                                                                      {"rpm", "r/min"},
                                                                      {"1/s", "1/s"},
                                                                      {"kW", "kW"},
                                                                      {"MW", "MW"},
                                                                      {"PS", "PS"},
                                                                      {"hp", "hp"},
                                                                      {"kg/h", "kg/h"},
                                                                      {"t/h", "t/h"},
                                                                      {"t/24h", "t/24h"},
                                                                      {"l/h", "l/h"},
                                                                      {"g/s", "g/s"},
                                                                      {"kNm", "kNm"},
                                                                      {"MJ/kg", "MJ/kg"},
                                                                      {"kJ/kg", "kJ/kg"},
                                                                      {"kcal/kg", "kcal/kg"},
                                                                      {"g/kWh", "g/kWh"},
                                                                      {"%", "%"},
                                                                      {"mm", "mm"},
                                                                      {"deg", "deg"},
                                                                      {"h", "h"},
                                                                      {"min", "min"},
                                                                      {"kn", "kn"},
                                                                      {"m/s", "m/s"},
                                                                      {"mm/s", "mm/s"},
                                                                      {"m", "m"},
                                                                      {"ft", "ft"},
                                                                      {"kg/m3", "kg/m³"},
                                                                      {"mm2/s", "mm²/s"},
                                                                      {"cSt", "mm²/s"},
                                                                      {"t", "t"},
                                                                      {"g/PSh", "g/PSh"},
                                                                      {"fraction", "fraction"},
                                                                      {"kgf·m", "kgf·m"},
                                                                      {"", "1"},
                                                                      {"1", "1"},
                                                                      {"-", "1"},
                                                                      {"code", "1"},
                                                                      {"mark", "1"}};
    for (const auto& [text, symbol] : expected) {
        EXPECT_EQ(taken_for(text), symbol) << text;
    }
}

TEST(FindUnit, TakesTypographicFormsLikeTheirPlainOnes)
{
    const std::pair<std::string_view, std::string_view> expected[] = {{"°", "deg"},
                                                                      {"º C", "°C"},
                                                                      {"˚C", "°C"},
                                                                      {"℃", "°C"},
                                                                      {"℉", "°F"},
                                                                      {"\u212A", "K"},
                                                                      {"deg C", "°C"},
                                                                      {"kgf / cm²", "kgf/cm²"},
                                                                      {"kgf/cm^2", "kgf/cm²"},
                                                                      {"kg/m³", "kg/m³"},
                                                                      {"kg\u2044m³", "kg/m³"},
                                                                      {"mm²/s", "mm²/s"},
                                                                      {"kN·m", "kNm"},
                                                                      {"kN⋅m", "kNm"},
                                                                      {"kN*m", "kNm"},
                                                                      {"kN m", "kNm"},
                                                                      {"kgf m", "kgf·m"},
                                                                      {"min⁻¹", "r/min"},
                                                                      {"min\u2212"
                                                                       "1",
                                                                       "r/min"},
                                                                      {"1 / min", "r/min"},
                                                                      {"mm H₂O", "mmH2O"},
                                                                      {"t/24 h", "t/24h"},
                                                                      {"t / 24\u202Fh", "t/24h"},
                                                                      {"\u00A0kW ", "kW"},
                                                                      {"mm\u00A0WC", "mmH2O"},
                                                                      {"−", "1"},
                                                                      {" ", "1"}};
    for (const auto& [text, symbol] : expected) {
        EXPECT_EQ(taken_for(text), symbol) << text;
    }
}

TEST(FindUnit, TakesGaugeAndAbsoluteBehindAPressure)
{
    const std::pair<std::string_view, std::string_view> expected[] = {
        {"bar abs", "bar abs"},      {"barabs", "bar abs"},    {"bar (abs)", "bar abs"},
        {"bar absolute", "bar abs"}, {"bara", "bar abs"},      {"bar a", "bar abs"},
        {"bar(a)", "bar abs"},       {"BAR ABS", "bar abs"},   {"MPa gauge", "MPa gauge"},
        {"MPag", "MPa gauge"},       {"bar(g)", "bar gauge"},  {"bar g", "bar gauge"},
        {"psig", "psi gauge"},       {"psia", "psi abs"},      {"kgf/cm² gauge", "kgf/cm² gauge"},
        {"kPa abs", "kPa abs"},      {"mmHg abs", "mmHg abs"}, {"mbar\u00A0abs", "mbar abs"}};
    for (const auto& [text, symbol] : expected) {
        EXPECT_EQ(taken_for(text), symbol) << text;
    }
}

TEST(FindUnit, RefusesGaugeOrAbsoluteBehindAnythingElse)
{
    for (const std::string_view text : {"°C abs", "kW gauge", "abs", "gauge", "% abs", "r/min abs"}) {
        const Result<WrittenUnit> written = find_unit(text);
        ASSERT_FALSE(written.has_value()) << text;
        EXPECT_TRUE(contains(written.error().what_happened, text)) << written.error().text();
        EXPECT_TRUE(contains(written.error().what_happened, "only pressures")) << written.error().text();
    }
    EXPECT_TRUE(is_refused("bar abs gauge"));
    EXPECT_TRUE(is_refused("a"));
    EXPECT_TRUE(is_refused("g"));
}

TEST(FindUnit, TakesAnotherCaseOnlyWhereItCanMeanNothingElse)
{
    EXPECT_EQ(taken_for("Bar"), "bar");
    EXPECT_EQ(taken_for("KW"), "kW");
    EXPECT_EQ(taken_for("RPM"), "r/min");
    EXPECT_EQ(taken_for("Kpa"), "kPa");
    EXPECT_EQ(taken_for("MPA"), "MPa");
    EXPECT_EQ(taken_for("DEGC"), "°C");
    EXPECT_EQ(taken_for("KG/H"), "kg/h");
    EXPECT_EQ(taken_for("G/KWH"), "g/kWh");
    EXPECT_EQ(taken_for("mmhg"), "mmHg");
    EXPECT_EQ(taken_for("HP"), "hp");
    for (const std::string_view text : {"mPa", "Mbar", "mW", "mJ/kg", "Mm", "M", "k", "H", "T", "kN", "KN",
                                        "nm", "NM", "mNm", "MM/S", "Min"}) {
        EXPECT_TRUE(is_refused(text)) << text << " was taken for " << taken_for(text);
    }
}

TEST(FindUnit, SaysWhatTheUnitsOfTheLikeliestDimensionAre)
{
    const Problem pascal = find_unit("mPa").error();
    EXPECT_EQ(pascal.kind, Problem::Kind::invalid_input);
    EXPECT_EQ(pascal.what_happened, "The unit \"mPa\" is not known in this mixture of upper and lower case.");
    EXPECT_TRUE(contains(pascal.what_to_do, "Write MPa if that is meant")) << pascal.what_to_do;
    EXPECT_TRUE(contains(pascal.what_to_do, "kgf/cm²")) << pascal.what_to_do;

    const Problem misspelt = find_unit("kgf/cm3").error();
    EXPECT_EQ(misspelt.what_happened, "The unit \"kgf/cm3\" is not known.");
    EXPECT_TRUE(contains(misspelt.what_to_do, "units of pressure")) << misspelt.what_to_do;

    const Problem ships_day = find_unit("t/d").error(); // a ship's day can have 23 or 25 hours
    EXPECT_TRUE(contains(ships_day.what_to_do, "t/24h")) << ships_day.what_to_do;

    const Problem nonsense = find_unit("furlongs per fortnight").error();
    EXPECT_TRUE(contains(nonsense.what_to_do, "such as bar")) << nonsense.what_to_do;
}

TEST(FindUnit, TakesWindForcesWhoseSpeedsLieWithinTheBandsOfTheScale)
{
    // WMO Beaufort scale, m/s: lower and upper end of each force.
    const double bands[][2] = {{0.0, 0.2},   {0.3, 1.5},   {1.6, 3.3},   {3.4, 5.4},   {5.5, 7.9},   {8.0, 10.7},
                               {10.8, 13.8}, {13.9, 17.1}, {17.2, 20.7}, {20.8, 24.4}, {24.5, 28.4}, {28.5, 32.6}};
    const WrittenUnit beaufort = find_unit("beaufort").value();
    EXPECT_EQ(unit(beaufort.id).symbol, "Beaufort");
    EXPECT_EQ(find_unit("Bft").value().id, beaufort.id);
    for (int force = 0; force < 12; ++force) {
        const double speed = to_si_checked(force, beaufort).value();
        EXPECT_GE(speed, bands[force][0]) << force;
        EXPECT_LE(speed, bands[force][1]) << force;
        EXPECT_NEAR(unit(beaufort.id).from_si(speed), force, 1e-12); // rounding of two powers
    }
    EXPECT_GE(to_si_checked(12.0, beaufort).value(), 32.7);
    EXPECT_FALSE(to_si_checked(13.0, beaufort).has_value());
    EXPECT_FALSE(to_si_checked(-1.0, beaufort).has_value());
}

TEST(FindUnit, RefusesUnitsItDoesNotHave)
{
    for (const std::string_view text :
         {"t/d", "t/day", "bar2", "kgf", "mm3", "1/h", "--", "%%", "barr", "bar bar",
          "\xB0"
          "C",
          "\xFF", "kW\n%", "mg/l"}) {
        EXPECT_TRUE(is_refused(text)) << text << " was taken for " << taken_for(text);
    }
    EXPECT_TRUE(is_refused(std::string(100000, 'b')));
    EXPECT_LT(find_unit(std::string(100000, 'b')).error().what_happened.size(), 200u);
}

TEST(UnitCatalogue, FindsEverySymbolAndSpellingAsItsOwnUnit)
{
    std::set<std::string_view> symbols;
    const std::span<const Unit> units = all_units();
    for (std::size_t id = 0; id < units.size(); ++id) {
        EXPECT_TRUE(symbols.insert(units[id].symbol).second) << units[id].symbol;
        EXPECT_EQ(find_unit(units[id].symbol).value().id, static_cast<UnitId>(id)) << units[id].symbol;
        for (const std::string_view spelling : units[id].spellings) {
            EXPECT_EQ(find_unit(spelling).value().id, static_cast<UnitId>(id)) << spelling;
            EXPECT_EQ(find_unit(" " + std::string(spelling) + "\u00A0").value().id, static_cast<UnitId>(id))
                << spelling;
        }
        EXPECT_EQ(&unit(static_cast<UnitId>(id)), &units[id]);
    }
    EXPECT_THROW(unit(-1), std::out_of_range);
    EXPECT_THROW(unit(static_cast<UnitId>(units.size())), std::out_of_range);
}

TEST(UnitCatalogue, HasABareNumberAsUnitZero)
{
    EXPECT_EQ(unit(0).symbol, "1");
    EXPECT_EQ(unit(0).dimension, Dimension::number);
}

TEST(UnitCatalogue, KeepsPressureKindsToPressuresWhenAskedForEveryUnit)
{
    for (const Unit& candidate : all_units()) {
        const bool pressure = candidate.dimension == Dimension::pressure;
        EXPECT_EQ(find_unit(std::string(candidate.symbol) + " abs").has_value(), pressure)
            << candidate.symbol;
        EXPECT_EQ(find_unit(std::string(candidate.symbol) + " gauge").has_value(), pressure)
            << candidate.symbol;
    }
}

TEST(UnitCatalogue, NamesEveryDimension)
{
    for (const Unit& candidate : all_units()) {
        EXPECT_FALSE(dimension_text(candidate.dimension).empty()) << candidate.symbol;
    }
}

// Tolerance: one rounding of the product, one of the quotient and, for temperatures, of the sum, each half
// a unit in the last place: 1e-15 of the SI value holds four of them.
TEST(UnitCatalogue, BringsEveryNumberBackFromSi)
{
    std::mt19937_64 random(20260314);
    std::uniform_real_distribution<double> mantissa(-10.0, 10.0);
    std::uniform_int_distribution<int> exponent(-6, 6);
    for (int trial = 0; trial < 20000; ++trial) {
        const double typed = mantissa(random) * std::pow(10.0, exponent(random));
        for (const Unit& candidate : all_units()) {
            // A wind force goes through two powers, each rounded, and there is none below 0.
            const bool curved = candidate.dimension == Dimension::wind_force;
            if (curved && typed < 0.0)
                continue;
            const double value_si = candidate.to_si(typed);
            const double size_si = std::max(std::fabs(value_si), candidate.offset);
            const double rounding = curved ? 3e-15 : 1e-15;
            const double size_typed = curved ? std::fabs(typed) : size_si / candidate.factor;
            EXPECT_NEAR(candidate.to_si(candidate.from_si(value_si)), value_si, rounding * size_si)
                << candidate.symbol;
            EXPECT_NEAR(candidate.from_si(value_si), typed, rounding * size_typed) << candidate.symbol;
            EXPECT_NEAR(candidate.difference_from_si(candidate.difference_to_si(typed)), typed,
                        1e-15 * std::fabs(typed))
                << candidate.symbol;
        }
    }
}

TEST(UnitCatalogue, NeverShiftsADifferenceOfTemperature)
{
    const Unit& celsius_unit = unit(find_unit("°C").value().id);
    const Unit& fahrenheit_unit = unit(find_unit("°F").value().id);
    EXPECT_DOUBLE_EQ(celsius_unit.difference_to_si(10.0), 10.0);
    EXPECT_DOUBLE_EQ(fahrenheit_unit.difference_to_si(18.0), 10.0);
    EXPECT_DOUBLE_EQ(fahrenheit_unit.difference_from_si(10.0), 18.0);
}

} // namespace
} // namespace evenstroke
