// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reference/humid_air.h"

#include <cmath>
#include <cstdio>
#include <cstdlib>
#include <fstream>
#include <gtest/gtest.h>
#include <memory>
#include <sstream>
#include <string>
#include <vector>

namespace evenstroke {
namespace {

Temperature kelvin(double degrees)
{
    return Temperature::from_value(degrees);
}
AbsolutePressure kilopascals(double pressure)
{
    return AbsolutePressure::from_value(pressure * 1000.0);
}
double in_kilopascals(AbsolutePressure pressure)
{
    return pressure.value() / 1000.0;
}
double saturation_at(double degrees_celsius)
{
    return in_kilopascals(saturation_pressure(celsius(degrees_celsius)).value());
}
double in_grams(Ratio water)
{
    return 1000.0 * water.value();
}

// IAPWS, Revised Release on the Industrial Formulation 1997, table 35. Hold to 1e-8 relative, the printed
// digits.
TEST(SaturationPublished, AgreesWithIf97Table35)
{
    const std::pair<double, double> rows[] = {{300.0, 3.53658941}, {500.0, 2638.89776}, {600.0, 12344.3146}};
    for (const auto& [temperature, pressure] : rows)
        EXPECT_NEAR(in_kilopascals(saturation_pressure(kelvin(temperature)).value()), pressure,
                    1e-8 * pressure);
}

// The same, table 36.
TEST(SaturationPublished, AgreesWithIf97Table36)
{
    const std::pair<double, double> rows[] = {
        {100.0, 372.755919}, {1000.0, 453.035632}, {10000.0, 584.149488}};
    for (const auto& [pressure, temperature] : rows)
        EXPECT_NEAR(saturation_temperature(kilopascals(pressure)).value().value(), temperature,
                    1e-8 * temperature);
}

// Steam-table values printed in R. Joel, Basic Engineering Thermodynamics, and P. K. Nag, Engineering
// Thermodynamics (through a public companion of solved examples). Tolerance: one of the last printed digit,
// because the older tables follow the formulation of 1967.
TEST(SaturationPublished, AgreesWithTextbookSteamTables)
{
    EXPECT_NEAR(saturation_at(20.0), 2.339, 1e-3);
    EXPECT_NEAR(saturation_at(25.0), 3.17, 1e-2);
    EXPECT_NEAR(saturation_at(30.0), 4.246, 1e-3);
}

// Worked out separately from the stated equation: hold to half of the last digit.
TEST(Saturation, AgreesWithASeparateCalculation)
{
    EXPECT_NEAR(saturation_at(25.0), 3.16975, 5e-6);
    EXPECT_NEAR(saturation_at(35.0), 5.62862, 5e-6);
    EXPECT_NEAR(saturation_at(45.0), 9.59439, 5e-6);
}

// A. L. Buck's short form of 1996 agrees within 0.04 % from 0 to 60 °C.
TEST(Saturation, StaysWithinFourTenThousandthsOfBuck1996)
{
    for (double t = 0.0; t <= 60.0; t += 0.5) {
        const double buck = 0.61121 * std::exp((18.678 - t / 234.5) * t / (257.14 + t));
        EXPECT_NEAR(saturation_at(t), buck, 4e-4 * buck) << t;
    }
}

/// What a command prints; empty where it cannot be run.
std::string output_of(const std::string& command)
{
    std::string output;
    if (FILE* const pipe = popen(command.c_str(), "r")) {
        char buffer[4096];
        while (std::fgets(buffer, sizeof buffer, pipe) != nullptr)
            output += buffer;
        pclose(pipe);
    }
    return output;
}

// The independent implementation of the python package iapws (Debian: python3-iapws) over a grid. Tolerance:
// 1e-11, the rounding of two double computations that take their roots in another order.
TEST(SaturationIndependent, AgreesWithThePythonPackageIapws)
{
    // Debian's own python, where Debian's package is; another one may stand first on the path.
    const std::string output = output_of("/usr/bin/python3 -c \""
                                         "from iapws.iapws97 import _PSat_T, _TSat_P\n"
                                         "for i in range(747):\n"
                                         "    t = 273.15 + 0.5 * i\n"
                                         "    p = _PSat_T(t)\n"
                                         "    b = _TSat_P(max(p, 0.000611213))\n"
                                         "    print(repr(t), repr(float(p)), repr(float(b)))\n"
                                         "\" 2>/dev/null");
    if (output.empty())
        GTEST_SKIP() << "the python package iapws (Debian: python3-iapws) is not installed";
    std::istringstream rows(output);
    double temperature = 0.0, pressure_mpa = 0.0, boiling = 0.0;
    int count = 0;
    while (rows >> temperature >> pressure_mpa >> boiling) {
        const double pressure = saturation_pressure(kelvin(temperature)).value().value();
        EXPECT_NEAR(pressure, 1e6 * pressure_mpa, 1e-11 * pressure) << temperature;
        const auto inside = AbsolutePressure::from_value(std::max(1e6 * pressure_mpa, 611.213));
        EXPECT_NEAR(saturation_temperature(inside).value().value(), boiling, 1e-11 * boiling) << temperature;
        ++count;
    }
    EXPECT_EQ(count, 747);
}

// Code of Federal Regulations, title 40, 1066.615, example: saturation pressure 2.93 kPa, relative humidity
// 37.5 %, 96.71 kPa: 7.14741 g water per kg dry air. Hold to 5e-6.
TEST(MixingRatioPublished, AgreesWith40Cfr1066Point615)
{
    EXPECT_NEAR(in_grams(mixing_ratio(kilopascals(0.375 * 2.93), kilopascals(96.71)).value()), 7.14741, 5e-6);
}

// R. Joel, Basic Engineering Thermodynamics, 5th ed., examples 19.2 and 19.3; P. K. Nag, Engineering
// Thermodynamics, 4th ed., example 15.1 (through a public companion). The books take 0.622 for the molar
// ratio, which moves no printed digit. Tolerance: half of the last printed digit.
TEST(MixingRatioPublished, AgreesWithTextbookExamples)
{
    EXPECT_NEAR(mixing_ratio(kilopascals(0.65 * 2.34), kilopascals(100.0)).value().value(), 0.0096, 5e-5);
    EXPECT_NEAR(mixing_ratio(kilopascals(0.6 * 3.17), kilopascals(101.3)).value().value(), 0.0119, 5e-5);
    EXPECT_NEAR(mixing_ratio(kilopascals(2.88), kilopascals(101.32)).value().value(), 0.0182, 5e-5);
    // Example 19.3 reads its dew point, 16.69 °C, between two lines of a table; worked out it is 16.71.
    const Ratio water = mixing_ratio(kilopascals(0.6 * 3.17), kilopascals(101.3)).value();
    EXPECT_NEAR(in_celsius(dew_point(water, kilopascals(101.3)).value()), 16.69, 0.03);
}

// Worked out separately from the stated equation: hold to 1e-6 g/kg.
TEST(MixingRatio, AgreesWithASeparateCalculation)
{
    EXPECT_NEAR(in_grams(mixing_ratio(celsius(45.0), Ratio(0.6), kilopascals(100.0)).value()), 37.990623,
                1e-6);
    EXPECT_NEAR(in_grams(mixing_ratio(celsius(25.0), Ratio(0.3), kilopascals(100.0)).value()), 5.971096,
                1e-6);
}

// Worked out separately: inlet 35 °C, 80 %; scavenge air 3.5 bar abs, 45 °C. Hold to 1e-3 g/kg and °C.
TEST(ChargeAirWater, AgreesWithASeparateCalculation)
{
    const auto water = [](double barometer_kpa) {
        return charge_air_water(celsius(35.0), Ratio(0.8), kilopascals(barometer_kpa), celsius(45.0),
                                bar_absolute(3.5))
            .value();
    };
    const ChargeAirWater at_sea = water(101.3);
    EXPECT_NEAR(in_grams(at_sea.drawn_in), 28.9326, 1e-3);
    EXPECT_NEAR(in_grams(at_sea.saturated), 17.5299, 1e-3);
    EXPECT_NEAR(in_grams(at_sea.condensate), 11.4028, 1e-3);
    EXPECT_NEAR(in_celsius(at_sea.dew_point.value()), 54.729, 1e-3);
    const ChargeAirWater lower = water(100.0);
    EXPECT_NEAR(in_grams(lower.drawn_in), 29.3265, 1e-3);
    EXPECT_NEAR(in_grams(lower.condensate), 11.7966, 1e-3);
    EXPECT_NEAR(in_celsius(lower.dew_point.value()), 54.998, 1e-3);
}

std::vector<std::vector<std::string>> rows_of(const std::string& path)
{
    std::ifstream file(path);
    std::vector<std::vector<std::string>> rows;
    for (std::string line; std::getline(file, line);) {
        std::vector<std::string> cells;
        std::istringstream text(line);
        for (std::string cell; std::getline(text, cell, ',');)
            cells.push_back(cell);
        rows.push_back(cells);
    }
    return rows;
}

// Calculated data sheets of two large two-stroke engines (public repository KevinKSY/EngineSystemModel,
// commit a1fe92b), 26 load points at 45 °C, 60 %, 1000 mbar: condensate in kg/h beside the moist air flow and
// the state of the scavenge air. Tolerance 4 %: the sheets do not state their saturation formula, and a
// separate calculation came out 1.5 to 3.1 % below at every point.
TEST(ChargeAirWaterPublished, StaysWithinFourPercentOfCalculatedDataSheets)
{
    const char* const elsewhere = std::getenv("EVENSTROKE_CHECK_DATA");
    const std::string folder = elsewhere != nullptr ? elsewhere : EVENSTROKE_SOURCE_DIR "/../shared/data";
    const auto rows = rows_of(folder + "/published_sheets/two_stroke_sheets.csv");
    if (rows.empty())
        GTEST_SKIP() << "the published sheets are not beside the source";
    int compared = 0;
    for (const auto& row : rows) {
        if (row.size() < 20 || row[1] != "design" || row[19].empty())
            continue;
        const auto cell = [&](std::size_t column) { return std::stod(row[column]); };
        const ChargeAirWater water =
            charge_air_water(celsius(cell(2)), Ratio(cell(4) / 100.0), bar_absolute(1.0), celsius(cell(13)),
                             bar_absolute(cell(11)))
                .value();
        const double dry_air = cell(14) / (1.0 + water.drawn_in.value()); // kg/s
        EXPECT_NEAR(3600.0 * dry_air * water.condensate.value(), cell(19), 0.04 * cell(19))
            << row[0] << " " << row[5];
        ++compared;
    }
    EXPECT_EQ(compared, 26);
}

} // namespace
} // namespace evenstroke
