// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reference/fuel.h"
#include "core/reference/iso_3046.h"

#include <gtest/gtest.h>

namespace evenstroke {
namespace {

Density kilograms_per_cubic_metre(double density)
{
    return Density::from_value(density);
}

// R. K. Rajput, A Textbook of Internal Combustion Engines, 2nd ed. 2007, example 17.12, and R. Joel, Basic
// Engineering Thermodynamics, 5th ed., example 17.6 (through a public companion of solved examples): 1.68
// kg/h at 6 kW is 0.28 kg/kWh; 4.74 t/h at 23.719 MW is 0.2 kg/kWh. Tolerance: half of the last printed
// digit.
TEST(SpecificConsumptionPublished, AgreesWithTextbookExamples)
{
    const auto consumption = [](double kilograms_an_hour, double kilowatt) {
        return in_grams_per_kilowatt_hour(
            specific_fuel_consumption(kilograms_per_hour(kilograms_an_hour), kilowatts(kilowatt)).value());
    };
    EXPECT_NEAR(consumption(0.56 * 60.0 / 20.0, 6.0), 280.0, 5.0);
    EXPECT_NEAR(consumption(4740.0, 23719.0), 200.0, 0.5);
}

// Worked out separately from the stated equation: 178.4 g/kWh at 40.295871 MJ/kg. Hold to 1e-4 g/kWh.
TEST(SpecificConsumption, IsBroughtToTheUsualHeatingValue)
{
    const SpecificConsumption measured = grams_per_kilowatt_hour(178.4);
    const SpecificEnergy heating_value = megajoules_per_kilogram(40.295871);
    EXPECT_NEAR(in_grams_per_kilowatt_hour(at_usual_heating_value(measured, heating_value).value()),
                168.35558, 1e-4);
    const Corrected<SpecificConsumption> iso =
        correct_iso_3046(measured, Iso3046Adjustment{.k = 1.0, .alpha = 1.0, .beta = 1.0125838});
    EXPECT_NEAR(in_grams_per_kilowatt_hour(at_usual_heating_value(iso, heating_value).value().value),
                166.26336, 1e-4);
}

struct Row54B
{
    double density_15, celsius_degrees, ratio;
};

// Tables 53B/54B of 1980 in their closed form (API MPMS 11.1, ASTM D1250, ISO 91-1), worked out separately
// for each product group. Hold to 1e-6.
TEST(FuelDensity, AgreesWithASeparateCalculationOfTable54B)
{
    const Row54B rows[] = {{992.0, 36.0, 0.985658},
                           {991.0, 98.0, 0.942633},
                           {850.0, 40.0, 0.979107},
                           {800.0, 40.0, 0.976622},
                           {780.0, 40.0, 0.973747}};
    for (const Row54B& row : rows) {
        const Density warm =
            density_at_temperature(kilograms_per_cubic_metre(row.density_15), celsius(row.celsius_degrees))
                .value();
        EXPECT_NEAR(warm.value() / row.density_15, row.ratio, 1e-6) << row.density_15;
    }
    EXPECT_NEAR(density_at_temperature(kilograms_per_cubic_metre(991.0), celsius(98.0)).value().value(),
                934.149, 1e-3);
}

} // namespace
} // namespace evenstroke
