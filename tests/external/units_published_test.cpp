// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/units/unit_catalogue.h"

#include <gtest/gtest.h>

namespace evenstroke {
namespace {

double factor_of(std::string_view text)
{
    return unit(find_unit(text).value().id).factor;
}

struct PublishedFactor
{
    std::string_view unit;
    double si;
    double half_last_digit;
};

// NIST Special Publication 811 (2008), appendix B.8 (read from memory, so to its seven printed digits).
// Tolerance: half of the last printed digit; none where the table calls the factor exact.
TEST(UnitsPublished, AgreeWithNistSp811)
{
    const PublishedFactor factors[] = {
        {"kgf/cm2", 9.80665e4, 0.0},    // kilogram-force per square centimetre
        {"mmH2O", 9.80665, 0.0},        // millimetre of water, conventional
        {"mmHg", 1.333224e2, 5e-5},     // millimetre of mercury, conventional
        {"inHg", 3.386389e3, 5e-4},     // inch of mercury, conventional
        {"inH2O", 2.490889e2, 5e-5},    // inch of water, conventional
        {"psi", 6.894757e3, 5e-4},      // pound-force per square inch
        {"atm", 1.01325e5, 0.0},        // atmosphere, standard
        {"hp", 7.456999e2, 5e-5},       // horsepower (550 ft·lbf/s)
        {"PS", 7.354988e2, 5e-5},       // horsepower, metric
        {"lb/hph", 1.689659e-7, 5e-14}, // pound per horsepower hour
        {"kcal/kg", 4.1868e3, 0.0},     // kilocalorie (International Table) per kilogram
        {"Btu/lb", 2.326e3, 0.0},       // British thermal unit (International Table) per pound
        {"kn", 5.144444e-1, 5e-8},      // knot
        {"nmi", 1.852e3, 0.0},          // nautical mile
        {"ft", 3.048e-1, 0.0},          // foot
        {"kgf·m", 9.80665, 0.0},        // kilogram-force metre
        {"cSt", 1e-6, 0.0},             // centistokes
        {"deg", 1.745329e-2, 5e-9},     // degree of angle
    };
    for (const PublishedFactor& published : factors)
        EXPECT_NEAR(factor_of(published.unit), published.si, published.half_last_digit) << published.unit;
    EXPECT_NEAR(factor_of("USgal/h") * 3600.0, 3.785412e-3, 5e-10); // gallon (US)
}

// The same definitions with more digits than print in that table, worked out by hand; mercury and the
// horsepowers are also what GNU units gives (from memory). Tolerance 1e-12: far below any instrument, above
// the rounding of the digits written here.
TEST(UnitsPublished, AgreeWithTheirDefinitionsToTwelveDigits)
{
    const std::pair<std::string_view, double> factors[] = {
        {"kgf/cm²", 98066.5},
        {"mmH2O", 9.80665},
        {"mmHg", 133.322387415},
        {"inHg", 3386.388640341},
        {"psi", 6894.757293168361},
        {"bar", 1e5},
        {"mbar", 100.0},
        {"atm", 101325.0},
        {"PS", 735.49875},
        {"hp", 745.69987158227022},
        {"kcal/kg", 4186.8},
        {"kn", 1852.0 / 3600.0},
        {"cSt", 1e-6},
        {"r/min", 1.0 / 60.0},
        {"t/24h", 1000.0 / 86400.0},
        {"°F", 5.0 / 9.0},
    };
    for (const auto& [text, si] : factors)
        EXPECT_NEAR(factor_of(text), si, 1e-12 * si) << text;
    // Ten digits were worked out by hand for these two.
    EXPECT_NEAR(factor_of("g/PSh") / factor_of("g/kWh"), 1.3596216173, 5e-11);
    EXPECT_NEAR(factor_of("lb/hph") / factor_of("g/kWh"), 608.2773878, 5e-8);
    EXPECT_NEAR(factor_of("USgal/h") * 3600.0, 3.785411784e-3, 1e-12 * 3.785411784e-3); // 231 cubic inches
}

// ITS-90 and the definition of the scales. Tolerance: the last bits of a sum of two numbers near 300.
TEST(UnitsPublished, TemperatureScalesMeetAtTheirFixedPoints)
{
    const Unit& fahrenheit = unit(find_unit("°F").value().id);
    const Unit& celsius_unit = unit(find_unit("°C").value().id);
    EXPECT_NEAR(fahrenheit.to_si(32.0), 273.15, 1e-12);
    EXPECT_NEAR(fahrenheit.to_si(212.0), 373.15, 1e-12);
    EXPECT_NEAR(fahrenheit.to_si(-40.0), celsius_unit.to_si(-40.0), 1e-12);
    EXPECT_NEAR(celsius_unit.to_si(0.01), 273.16, 1e-12); // triple point of water
}

} // namespace
} // namespace evenstroke
