// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/airside/charge_air_cooler.h"
#include "core/airside/turbocharger.h"

#include <gtest/gtest.h>

namespace evenstroke {
namespace {

Temperature kelvin(double value) { return Temperature::from_value(value); }

// R. K. Rajput, A Textbook of Internal Combustion Engines, 2nd ed. 2007, examples 16.1 and 16.3, and R. Joel,
// Basic Engineering Thermodynamics, 5th ed., example 16.1, through a public companion of solved examples; κ 1.4:
// from 325 K at ratio 1.6 to 391.73 K: 0.7; from 298 K at 1.8 to 370.66 K: 0.75; from 291 K at 8 to 568.8 K:
// 0.85. Tolerance: the last digit of the printed outlet temperature moves the efficiency by up to 0.0002.
TEST(CompressorPublished, AgreesWithTextbookExamples)
{
    const double air = 0.4 / 1.4;
    const auto efficiency = [&](double inlet, double outlet, double ratio) {
        return compressor_efficiency(kelvin(inlet), kelvin(outlet), Ratio(ratio), air).value().value();
    };
    EXPECT_NEAR(efficiency(325.0, 391.73, 1.6), 0.70, 2e-4);
    EXPECT_NEAR(efficiency(298.0, 370.66, 1.8), 0.75, 2e-4);
    EXPECT_NEAR(efficiency(291.0, 568.8, 8.0), 0.85, 2e-4);
}

// Worked out separately from the equation, with both exponents. Hold to 1e-6.
TEST(Compressor, AgreesWithASeparateCalculation)
{
    const auto with = [](double exponent) {
        return compressor_efficiency(kelvin(298.15), kelvin(458.15), Ratio(3.68687), exponent).value().value();
    };
    EXPECT_NEAR(with(0.4 / 1.4), 0.841873, 1e-6);
    EXPECT_NEAR(with(usual_air_exponent), 0.842881, 1e-6);
}

// Worked out separately from the equation with a fuel to air ratio of 0.02. Hold to 1e-6.
TEST(Turbocharger, AgreesWithASeparateCalculation)
{
    const Ratio heat_flow = air_over_gas_heat_flow().value();
    EXPECT_NEAR(heat_flow.value(), 0.903940, 1e-6);
    const auto efficiency = [&](double t1, double t3, double p3, double p4) {
        return turbocharger_efficiency(
                   {kelvin(t1), Ratio(3.5), kelvin(t3), bar_absolute(p3), bar_absolute(p4)}, heat_flow)
            .value()
            .value();
    };
    EXPECT_NEAR(efficiency(298.15, 650.0, 1.0, 0.30), 0.654028, 1e-6);
    EXPECT_NEAR(efficiency(300.0, 673.0, 3.2, 1.02), 0.664219, 1e-6);
}

struct SheetRow
{
    double scavenge_bar, receiver_bar, receiver_celsius, percent;
};

// A public calculated data sheet of a seven-cylinder two-stroke engine: inlet 25 °C and 1 bar, 300 mm of water
// after the turbine. Tolerance 2 points: the sheet does not tell its heat capacities, exponents nor the drops of
// filter and cooler; a filter drop of 10 mbar alone is half a point, the fuel's mass 1.4 points.
TEST(TurbochargerPublished, AgreesWithADataSheet)
{
    const SheetRow rows[] = {{4.43, 4.13, 426.1, 68.0}, {3.49, 3.21, 363.5, 71.0}, {2.42, 2.21, 332.0, 69.9}};
    for (const SheetRow& row : rows)
        EXPECT_NEAR(100.0 * turbocharger_efficiency({celsius(25.0), Ratio(row.scavenge_bar), celsius(row.receiver_celsius),
                                                     bar_absolute(row.receiver_bar), bar_absolute(1.029)},
                                                    air_over_gas_heat_flow().value())
                                .value()
                                .value(),
                    row.percent, 2.0)
            << row.scavenge_bar;
}

// Worked out separately from the definitions. Hold to 1e-6, the mean difference to 1e-4 K.
TEST(ChargeAirCooler, AgreesWithASeparateCalculation)
{
    const CoolerTemperatures at{celsius(185.0), celsius(45.0), celsius(32.0), celsius(50.0)};
    EXPECT_NEAR(cooler_effectiveness(at).value().value(), 0.915033, 1e-6);
    EXPECT_NEAR(cooler_approach(at).value().value(), 13.0, 1e-9);
    EXPECT_NEAR(coolant_rise(at).value().value(), 18.0, 1e-9);
    EXPECT_NEAR(mean_temperature_difference(at).value().value(), 52.1295, 1e-4);
}

// F. P. Incropera, D. P. DeWitt, Fundamentals of Heat and Mass Transfer, example 11.1 (through a public
// companion): oil 100 to 60 °C against water from 30 to 40.2 °C, mean difference 43.2 K; example 11.3: gas from
// 300 to 100 °C against water from 35 °C, effectiveness 0.75 (recomputed 0.7547). Tolerance: printed digits.
TEST(ChargeAirCoolerPublished, AgreesWithTextbookExamples)
{
    const CoolerTemperatures oil{celsius(100.0), celsius(60.0), celsius(30.0), celsius(40.2)};
    EXPECT_NEAR(mean_temperature_difference(oil).value().value(), 43.2, 0.05);
    const CoolerTemperatures gas{celsius(300.0), celsius(100.0), celsius(35.0), std::nullopt};
    EXPECT_NEAR(cooler_effectiveness(gas).value().value(), 0.75, 0.005);
    EXPECT_NEAR(cooler_effectiveness(gas).value().value(), 0.7547, 5e-5);
}

// Worked out separately: 140 mm of water at 3.0 bar, 313 K and 0.9 of the flow, against 3.5 bar and 318 K.
TEST(PressureDrop, IsBroughtToTheReferenceFlow)
{
    const double millimetre = 9.80665; // Pa of water
    const auto drop = drop_at_reference_flow(PressureDifference::from_value(140.0 * millimetre),
                                             {bar_absolute(3.0), kelvin(313.0), 0.9}, {bar_absolute(3.5), kelvin(318.0), 1.0});
    EXPECT_NEAR(drop.value().value() / millimetre, 150.5147, 1e-4);
}

} // namespace
} // namespace evenstroke
