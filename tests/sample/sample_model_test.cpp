// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/ambient.h"
#include "sample_vessel/chance.h"
#include "sample_vessel/decimal_text.h"
#include "sample_vessel/sample_files.h"

#include "tests/sample/csv_lines.h"

#include <gtest/gtest.h>

#include <cmath>
#include <map>
#include <numbers>

using namespace evenstroke::sample;

namespace {

using Values = std::map<std::string, double>;

/// The values of every reading by "quantity" or "quantity/cylinder", with the shared ones, in file units.
std::map<std::string, Values> readings_of(const std::vector<SampleFile>& files, const std::string& folder)
{
    std::map<std::string, Values> readings;
    std::map<long long, Values> shared;
    for (const SampleFile& file : files)
        if (file.relative_path == "ship_readings.csv")
            for (const CsvLine& line : csv_lines(file.content))
                if (line[0] != "reading")
                    shared[minutes_utc(line[1])][line[2]] = std::stod(line[3]);
    for (const SampleFile& file : files) {
        if (file.relative_path != folder + "/readings.csv")
            continue;
        for (const CsvLine& line : csv_lines(file.content)) {
            if (line[0] == "reading" || line[4].empty() || !line[6].empty())
                continue;
            Values& values = readings[line[0]];
            if (values.empty())
                values = std::prev(shared.upper_bound(minutes_utc(line[1])))
                             ->second; // the round begins on the bridge
            values[line[3].empty() ? line[2] : line[2] + "/" + line[3]] = std::stod(line[4]);
        }
    }
    return readings;
}

/// Linear ambient correction, written anew from its definition: gauge pressure in bar, barometer in mbar.
double corrected_pressure(double typed, double per_air, double per_coolant, const Values& values)
{
    const double barometer = values.at("barometric_pressure") / 1000.0;
    return (typed + barometer) * (1.0 + per_air * (values.at("inlet_air_temperature") - 25.0) +
                                  per_coolant * (values.at("cooler_coolant_inlet_temperature") - 25.0)) -
           barometer;
}

double corrected_temperature(double typed, double per_air, double per_coolant, const Values& values)
{
    return (typed + 273.15) * (1.0 + per_air * (values.at("inlet_air_temperature") - 25.0) +
                               per_coolant * (values.at("cooler_coolant_inlet_temperature") - 25.0)) -
           273.15;
}

} // namespace

TEST(SampleModel, CorrectsBackToItsOwnBaselineWhenNothingIsWrongAndNothingScatters)
{
    const Scenario scenario = plain_scenario();
    const std::vector<SampleFile> files = make_files(scenario, default_seed);
    for (const EngineDesign& engine : scenario.engines) {
        const auto readings = readings_of(files, engine.folder);
        ASSERT_GE(readings.size(), 44U);
        for (const auto& [name, values] : readings) {
            SCOPED_TRACE(engine.name + " " + name);
            const double load = values.at("load_percent");
            // Half a digit of the value, and half a digit of the typed load (0.05 %) along the curve.
            const auto slack = [&](const std::string& quantity, double half_digit) {
                return 1.1 * half_digit + std::abs(expected(engine, quantity, load + 0.05) -
                                                   expected(engine, quantity, load - 0.05));
            };
            const Coefficients p_max = engine.correction.at("maximum_pressure"),
                               p_comp = engine.correction.at("compression_pressure"),
                               exhaust = engine.correction.at("exhaust_temperature");
            for (int cylinder = 1; cylinder <= engine.cylinders; ++cylinder) {
                const std::string place = "/" + std::to_string(cylinder);
                EXPECT_NEAR(corrected_pressure(values.at("maximum_pressure" + place), p_max.per_inlet_air,
                                               p_max.per_coolant, values),
                            expected(engine, "maximum_pressure", load), slack("maximum_pressure", 0.05));
                EXPECT_NEAR(corrected_pressure(values.at("compression_pressure" + place),
                                               p_comp.per_inlet_air, p_comp.per_coolant, values),
                            expected(engine, "compression_pressure", load),
                            slack("compression_pressure", 0.05));
                EXPECT_NEAR(corrected_temperature(values.at("exhaust_temperature" + place),
                                                  exhaust.per_inlet_air, exhaust.per_coolant, values),
                            expected(engine, "exhaust_temperature", load), slack("exhaust_temperature", 0.5));
                EXPECT_NEAR(values.at("mean_indicated_pressure" + place),
                            expected(engine, "mean_indicated_pressure", load),
                            slack("mean_indicated_pressure", 0.005));
            }
            EXPECT_NEAR(corrected_temperature(values.at("exhaust_after_turbine"), exhaust.per_inlet_air,
                                              exhaust.per_coolant, values),
                        expected(engine, "exhaust_after_turbine", load), slack("exhaust_after_turbine", 0.5));
            EXPECT_NEAR(values.at("turbocharger_speed") *
                            std::sqrt(298.15 / (values.at("inlet_air_temperature") + 273.15)),
                        expected(engine, "turbocharger_speed", load), slack("turbocharger_speed", 0.5));
            EXPECT_NEAR(values.at("cooler_pressure_drop") * 0.0980665,
                        expected(engine, "cooler_pressure_drop", load), slack("cooler_pressure_drop", 0.05));
        }
    }
}

TEST(SampleModel, IsItsOwnReferenceAtReferenceConditions)
{
    const Surroundings reference;
    const Coefficients any{0.0026, -0.0015};
    EXPECT_DOUBLE_EQ(pressure_as_read(120.0, any, reference), 120.0);
    EXPECT_DOUBLE_EQ(temperature_as_read(330.0, any, reference), 330.0);
    EXPECT_DOUBLE_EQ(turbocharger_speed_as_read(12000.0, reference), 12000.0);
    // ISO 3046-1 counts from 298 K, the thermometers from 298.15 K: 0.06 % of k, a twentieth of that in fuel.
    EXPECT_NEAR(consumption_as_read(170.0, 0.9, 42.7, reference), 170.0, 0.02);
}

TEST(SampleModel, GivesTheShaftThePowerThatItsMeanPressuresLeave)
{
    for (const EngineDesign& engine : sample_scenario().engines) {
        const double volume =
            std::numbers::pi / 4.0 * engine.bore_mm * engine.bore_mm * engine.stroke_mm * 1e-9;
        const double strokes = engine.rated_speed_rpm / 60.0 / (engine.two_stroke ? 1.0 : 2.0);
        const double indicated_kw =
            expected(engine, "mean_indicated_pressure", 100.0) * 100.0 * volume * strokes * engine.cylinders;
        // The mechanical efficiency of the particulars is rounded to a hundredth.
        EXPECT_NEAR(engine.rated_power_kw / indicated_kw, engine.mechanical_efficiency, 0.01) << engine.name;
    }
}

TEST(SampleModel, TakesAsMuchWorkOutOfTheGasAsTheCompressorNeeds)
{
    for (const EngineDesign& engine : sample_scenario().engines)
        for (const DesignPoint& point : engine.baseline) {
            if (point.load_percent < 50.0)
                continue; // blowers and heat losses blur the balance there
            const double ratio = point.values.at("scavenge_pressure") + 1.0;
            const double before_k = point.values.at("exhaust_before_turbine") + 273.15;
            const double receiver = 0.925 * ratio; // the pressure the readings give before the turbine
            // Turbocharger efficiency after CIMAC recommendation 27 with c = 0.904; credible turbochargers
            // lie between 0.55 and 0.72 (common practice).
            const double efficiency = 0.904 * 298.15 * (std::pow(ratio, 0.286) - 1.0) /
                                      (before_k * (1.0 - std::pow(1.0 / receiver, 0.265)));
            EXPECT_GT(efficiency, 0.55) << engine.name << " " << point.load_percent;
            EXPECT_LT(efficiency, 0.72) << engine.name << " " << point.load_percent;
        }
}

TEST(SampleChance, ScattersLikeANormalVariableWithALittleMemory)
{
    const Chance chance(5);
    const int count = 4000;
    double sum = 0.0, squares = 0.0, products = 0.0, last = 0.0;
    for (int place = 0; place < count / 40; ++place)
        for (int month = 0; month < 40; ++month) {
            const double value = chance.scatter({"test", 0, place, month});
            sum += value;
            squares += value * value;
            products += month > 0 ? value * last : 0.0;
            last = value;
        }
    // Four standard errors: 1/sqrt(4000) = 0.016 for the mean and the correlation, 0.022 for the variance.
    EXPECT_NEAR(sum / count, 0.0, 0.075);
    EXPECT_NEAR(squares / count, 1.0, 0.1);
    EXPECT_NEAR(products / (count * 39.0 / 40.0), 0.15 * 0.6, 0.065);
}

TEST(SampleChance, DrawsKnownNumbersOnEveryPlatform)
{
    // Own earlier output: guards the generator against a change that would change every file.
    const Chance chance(default_seed);
    EXPECT_EQ(decimal_text(chance.even({"wind", 0, 0, 0}), 9), "0.897450699");
    EXPECT_EQ(decimal_text(chance.normal({"sea", 0, 0, 0}), 9), "1.035088998");
}

TEST(DecimalText, RoundsHalfAwayFromZeroAndKeepsTrailingZeros)
{
    EXPECT_EQ(decimal_text(2.5, 0), "3");
    EXPECT_EQ(decimal_text(-2.5, 0), "-3");
    EXPECT_EQ(decimal_text(0.04, 1), "0.0");
    EXPECT_EQ(decimal_text(-0.04, 1), "0.0");
    EXPECT_EQ(decimal_text(15.2, 2), "15.20");
    EXPECT_EQ(decimal_text(0.052, 2), "0.05");
}
