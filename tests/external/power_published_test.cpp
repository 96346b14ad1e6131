// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/power.h"
#include "core/engine/propeller.h"

#include <gtest/gtest.h>

namespace evenstroke {
namespace {

constexpr EngineKind two = EngineKind::two_stroke, four = EngineKind::four_stroke;

double in_kilowatts(Power power) { return power.value() / 1000.0; }

Volume swept(double bore, double stroke) { return swept_volume(bore * si::metres, stroke * si::metres).value(); }

double indicated(EngineKind kind, double bore, double stroke, double bar, double speed)
{
    return in_kilowatts(indicated_power(kind, bar_difference(bar), swept(bore, stroke), per_minute(speed)).value());
}

// D. A. Taylor, Introduction to Marine Engineering, appendix: 8.385 bar (129 mm in ten mid-ordinates of
// 65 kPa/mm), 410 x 1100 mm, two-stroke, 120 r/min: 243.547 kW a cylinder (the book's figure recomputed).
// Hold to 1e-6 of it.
TEST(IndicatedPowerPublished, AgreesWithAMarineTextbook)
{
    EXPECT_NEAR(indicated(two, 0.41, 1.1, 129.0 / 10.0 * 0.65, 120.0), 243.547, 5e-4);
}

// R. K. Rajput, A Textbook of Internal Combustion Engines, 2nd ed. 2007, through a public companion of solved
// examples. 17.1: two-stroke 0.11 x 0.14 m, 1000 r/min, 6 bar: 13.30 kW. 17.9: four-stroke 0.3 x 0.45 m,
// 300 r/min, 6 bar: 47.71 kW indicated and 42.88 kW at the brake, 89.88 %. Tolerance: half of the last digit.
TEST(IndicatedPowerPublished, AgreesWithTextbookExamples)
{
    EXPECT_NEAR(indicated(two, 0.11, 0.14, 6.0, 1000.0), 13.30, 0.005);
    EXPECT_NEAR(indicated(four, 0.3, 0.45, 6.0, 300.0), 47.71, 0.005);
    EXPECT_NEAR(100.0 * mechanical_efficiency(kilowatts(42.88), kilowatts(47.71)).value().value(), 89.88, 0.005);
}

// Rajput, example 17.8: 175 Nm at 500 r/min are 9.16 kW. R. Joel, Basic Engineering Thermodynamics, 5th ed.,
// example 17.6: eight cylinders 0.85 x 2.2 m, two-stroke, 95 r/min, 15 bar: 23.719 MW. Same companion.
TEST(ShaftPowerPublished, AgreesWithTextbookExamples)
{
    const Torque torque = Torque::from_value(175.0);
    EXPECT_NEAR(in_kilowatts(shaft_power_from_torque(torque, per_minute(500.0)).value()), 9.16, 0.005);
    const auto pressure =
        mean_effective_pressure(two, kilowatts(23719.0), swept(0.85, 2.2), 8, per_minute(95.0)).value();
    EXPECT_NEAR(in_bar(pressure), 15.0, 0.0005);
}

struct SheetRow
{
    double kilowatt, speed, bar;
};

// A public calculated data sheet of a seven-cylinder two-stroke engine, 820 x 3375 mm. The mean pressure is
// printed with one decimal and lies within 0.052 bar of the calculation in every row.
TEST(MeanEffectivePressurePublished, AgreesWithADataSheet)
{
    const SheetRow rows[] = {{35797.3, 81.6, 21.1}, {32543.0, 79.0, 19.8}, {24407.3, 71.8, 16.4}, {8135.8, 49.8, 7.9}};
    for (const SheetRow& row : rows)
        EXPECT_NEAR(in_bar(mean_effective_pressure(two, kilowatts(row.kilowatt), swept(0.82, 3.375), 7,
                                                   per_minute(row.speed))
                               .value()),
                    row.bar, 0.053)
            << row.kilowatt;
}

// Worked out separately from the definitions. Hold to 1e-6 of each.
TEST(Power, AgreesWithASeparateCalculation)
{
    EXPECT_NEAR(swept(0.6, 2.4).value(), 0.678584013, 1e-9);
    EXPECT_NEAR(indicated(two, 0.6, 2.4, 19.5, 105.0), 2315.668, 1e-3);
    EXPECT_NEAR(indicated(four, 0.32, 0.40, 22.0, 750.0), 442.336, 5e-4);
    const Power shaft = kilowatts(12600.0), all = kilowatts(6 * 2315.668);
    EXPECT_NEAR(in_bar(mean_effective_pressure(two, shaft, swept(0.6, 2.4), 6, per_minute(105.0)).value()), 17.683883, 1e-5);
    EXPECT_NEAR(mechanical_efficiency(shaft, all).value().value(), 0.906866, 1e-6);
    EXPECT_NEAR(shaft_torque(shaft, per_minute(105.0)).value().value() / 1000.0, 1145.9156, 1e-4);
}

// Worked out separately from the cube law. Hold to 1e-5.
TEST(PropellerCurve, AgreesWithASeparateCalculation)
{
    const PropellerPoint rating{kilowatts(12600.0), per_minute(105.0)};
    const Power part = kilowatts(9450.0);
    EXPECT_NEAR(speed_on_propeller_curve(part, rating).value().value() * 60.0, 95.398831, 1e-5);
    EXPECT_NEAR(100.0 * light_running_margin(part, per_minute(99.0), rating).value().value(), 3.774856, 1e-5);
}

// A published shop trial of a two-stroke engine on the brake: power over the cube of speed is constant within
// 1.7 % from 25 to 110 %. Here: every row's power against the curve through the 100 % row.
TEST(PropellerCurvePublished, HoldsForAShopTrial)
{
    const PropellerPoint full{kilowatts(17121.0), per_minute(91.0)};
    const double rows[][2] = {{57.4, 4313.0}, {72.3, 8475.0}, {82.6, 12761.0}, {87.9, 15376.0}, {93.9, 18732.0}};
    for (const auto& [speed, power] : rows)
        EXPECT_NEAR(in_kilowatts(power_on_propeller_curve(per_minute(speed), full).value()) / power, 1.0, 0.017) << power;
}

// Public examination examples: 3.8 m, 87 r/min, 10 kn: 6.6 %; 5 m, 105 r/min, 14 kn, wake fraction 0.35: 17.7 %
// apparent, 46.5 % real. Printed digits, and recomputed to six decimals.
TEST(SlipPublished, AgreesWithExaminationExamples)
{
    const auto percent = [](Result<Ratio> slip) { return 100.0 * slip.value().value(); };
    EXPECT_NEAR(percent(apparent_slip(knots(10.0), 3.8 * si::metres, per_minute(87.0))), 6.6, 0.05);
    EXPECT_NEAR(percent(apparent_slip(knots(10.0), 3.8 * si::metres, per_minute(87.0))), 6.634402, 1e-6);
    EXPECT_NEAR(percent(apparent_slip(knots(14.0), 5.0 * si::metres, per_minute(105.0))), 17.688889, 1e-6);
    EXPECT_NEAR(percent(real_slip(knots(14.0), 5.0 * si::metres, per_minute(105.0), Ratio(0.35))), 46.497778, 1e-6);
}

// Worked out separately. Hold to 1e-4.
TEST(AdmiraltyCoefficient, AgreesWithASeparateCalculation)
{
    const auto coefficient = [](double tonnes, double knot, double kilowatt) {
        return admiralty_coefficient(tonnes * 1000.0 * si::kilogrammes, knots(knot), kilowatts(kilowatt)).value();
    };
    EXPECT_NEAR(coefficient(55000.0, 14.5, 7800.0), 565.2638, 1e-4);
    EXPECT_NEAR(coefficient(50000.0, 14.0, 6500.0), 572.9509, 1e-4);
}

} // namespace
} // namespace evenstroke
