// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reference/fuel.h"
#include "core/reference/humid_air.h"
#include "core/reference/iso_3046.h"
#include "core/reference/linear_correction.h"
#include "core/reference/reference_conditions.h"

#include <gtest/gtest.h>
#include <limits>
#include <type_traits>

namespace evenstroke {
namespace {

constexpr double not_a_number = std::numeric_limits<double>::quiet_NaN();
constexpr double infinite = std::numeric_limits<double>::infinity();

bool contains(const std::string& text, std::string_view part)
{
    return text.find(part) != std::string::npos;
}

/// Both sentences are there, and the first names what is expected.
template <typename T> void expect_refusal(const Result<T>& result, std::string_view part, Problem::Kind kind)
{
    ASSERT_FALSE(result.has_value()) << part;
    EXPECT_EQ(result.error().kind, kind) << result.error().text();
    EXPECT_TRUE(contains(result.error().what_happened, part)) << result.error().text();
    EXPECT_FALSE(result.error().what_to_do.empty());
}

const CorrectionCoefficients exhaust{-2.3e-3, -0.5e-3, "invented"};
const CorrectionCoefficients scavenge{2.7e-3, -2.0e-3, "invented"};

AmbientDifference kelvins(double inlet_air, double coolant)
{
    return {kelvin_difference(inlet_air), kelvin_difference(coolant)};
}

// A corrected value is no measured one: correcting twice does not compile.
template <typename T>
constexpr bool can_be_corrected = requires(T value, const AmbientDifference& difference,
                                           const CorrectionCoefficients& coefficients)
{
    correct_linearly(value, difference, coefficients);
};
template <typename T> constexpr bool can_be_adjusted = requires(T value, const Iso3046Adjustment& adjustment)
{
    correct_iso_3046(value, adjustment);
};
static_assert(can_be_corrected<Temperature>);
static_assert(!can_be_corrected<Corrected<Temperature>>);
static_assert(!can_be_corrected<GaugePressure>, "a gauge pressure needs its barometer");
static_assert(!can_be_corrected<TemperatureDifference>);
static_assert(can_be_adjusted<SpecificConsumption>);
static_assert(!can_be_adjusted<Corrected<SpecificConsumption>>);
static_assert(!std::is_convertible_v<Corrected<SpecificConsumption>, SpecificConsumption>);

TEST(LinearCorrection, AddsTheTwoEffects)
{
    const LinearFactor factor = linear_factor(2.8e-3, -1.4e-3, 15.0, 5.0);
    EXPECT_DOUBLE_EQ(factor.factor, 1.0 + 0.042 - 0.007); // the product form would give 1.034706
    EXPECT_FALSE(factor.extrapolated);
}

TEST(LinearCorrection, SaysWhichCorrectionWasApplied)
{
    EXPECT_EQ(correct_linearly(celsius(365.0), kelvins(15.0, 5.0), exhaust).value().applied,
              AppliedCorrection::linear);
    EXPECT_EQ(correct_turbocharger_speed(per_minute(12000.0), celsius(35.0), celsius(25.0)).value().applied,
              AppliedCorrection::similarity);
    EXPECT_EQ(correct_iso_3046(grams_per_kilowatt_hour(180.0), {}).applied, AppliedCorrection::iso3046);
    EXPECT_EQ(Corrected<Temperature>().applied, AppliedCorrection::none);
    EXPECT_EQ(correction_text(AppliedCorrection::none), "none");
    EXPECT_EQ(correction_text(AppliedCorrection::linear), "linear");
    EXPECT_EQ(correction_text(AppliedCorrection::similarity), "similarity");
    EXPECT_EQ(correction_text(AppliedCorrection::iso3046), "ISO 3046-1");
}

TEST(LinearCorrection, LeavesAReadingAtReferenceAsItIs)
{
    const ReferenceConditions reference;
    const AmbientDifference none = ambient_difference(celsius(25.0), celsius(25.0), reference);
    EXPECT_EQ(correct_linearly(celsius(365.0), none, exhaust).value().value, celsius(365.0));
    EXPECT_NEAR(in_bar(correct_linearly(bar_gauge(2.5), bar_absolute(1.013), none, scavenge).value().value),
                2.5,
                1e-14); // one sum and one difference with the barometer
    EXPECT_EQ(correct_turbocharger_speed(per_minute(12000.0), celsius(25.0), celsius(25.0)).value().value,
              per_minute(12000.0));
}

TEST(LinearCorrection, CorrectsTheSamePressureAlikeWhetherGaugeOrAbsolute)
{
    const AbsolutePressure barometer = bar_absolute(1.03);
    const AmbientDifference difference = kelvins(12.0, -4.0);
    const auto gauge = correct_linearly(bar_gauge(2.5), barometer, difference, scavenge).value();
    const auto over_vacuum = correct_linearly(bar_absolute(3.53), difference, scavenge).value();
    EXPECT_NEAR(in_bar(to_absolute(gauge.value, barometer)), in_bar(over_vacuum.value), 1e-12);
}

TEST(LinearCorrection, WorksInKelvinSoThatTheScaleDoesNotMatter)
{
    const Corrected<Temperature> corrected =
        correct_linearly(celsius(0.0), kelvins(10.0, 0.0), exhaust).value();
    EXPECT_NEAR(in_celsius(corrected.value), -0.023 * 273.15, 1e-10); // a Celsius number would have stayed 0
}

TEST(LinearCorrection, MarksWhatLiesOutsideItsRange)
{
    const auto extrapolated = [](double inlet_air, double coolant,
                                 const CorrectionCoefficients& coefficients) {
        return correct_linearly(celsius(365.0), kelvins(inlet_air, coolant), coefficients)
            .value()
            .extrapolated;
    };
    EXPECT_FALSE(extrapolated(25.0, 15.0, exhaust));
    EXPECT_FALSE(extrapolated(-25.0, -15.0, exhaust));
    EXPECT_TRUE(extrapolated(25.1, 0.0, exhaust));
    EXPECT_TRUE(extrapolated(-25.1, 0.0, exhaust));
    EXPECT_TRUE(extrapolated(0.0, 15.1, exhaust));
    EXPECT_TRUE(extrapolated(0.0, -15.1, exhaust));
    EXPECT_FALSE(extrapolated(0.0, 20.0, {-2.3e-3, 0.0, "invented"})); // coolant does not count here
    EXPECT_TRUE(
        correct_turbocharger_speed(per_minute(12000.0), celsius(51.0), celsius(25.0)).value().extrapolated);
}

TEST(LinearCorrection, IsNotMadeWithoutAConditionThatCounts)
{
    const ReferenceConditions reference;
    const AmbientDifference no_air = ambient_difference(std::nullopt, celsius(30.0), reference);
    const AmbientDifference no_coolant = ambient_difference(celsius(40.0), std::nullopt, reference);
    expect_refusal(correct_linearly(celsius(365.0), no_air, exhaust), "inlet air temperature",
                   Problem::Kind::not_found);
    expect_refusal(correct_linearly(celsius(365.0), no_coolant, exhaust), "coolant temperature",
                   Problem::Kind::not_found);
    const CorrectionCoefficients air_alone{-2.3e-3, 0.0, "invented"};
    EXPECT_TRUE(correct_linearly(celsius(365.0), no_coolant, air_alone).has_value());
}

TEST(LinearCorrection, RefusesWhatCannotBeNamingTheValue)
{
    const AmbientDifference difference = kelvins(10.0, 5.0);
    const auto kind = Problem::Kind::invalid_input;
    expect_refusal(correct_linearly(bar_gauge(-1.2), bar_absolute(1.0), difference, scavenge),
                   "-1.2 bar gauge", kind);
    expect_refusal(correct_linearly(bar_absolute(0.0), difference, scavenge), "0 bar abs", kind);
    expect_refusal(correct_linearly(Temperature::from_value(not_a_number), difference, exhaust), "nan °C",
                   kind);
    expect_refusal(correct_linearly(celsius(365.0), kelvins(500.0, 0.0), exhaust), "factor", kind);
    expect_refusal(correct_linearly(celsius(365.0), kelvins(not_a_number, 0.0), exhaust), "factor", kind);
    expect_refusal(correct_turbocharger_speed(per_minute(-5.0), celsius(35.0), celsius(25.0)), "-5 r/min",
                   kind);
    expect_refusal(correct_turbocharger_speed(per_minute(5.0), celsius(-300.0), celsius(25.0)),
                   "absolute zero", kind);
}

TEST(ReferenceConditions, HaveTheStandardAndTheTropicalSets)
{
    const ReferenceSet* const standard = find_reference_set("standard");
    ASSERT_NE(standard, nullptr);
    EXPECT_EQ(standard->conditions().inlet_air, celsius(25.0));
    EXPECT_EQ(standard->conditions().cooler_coolant, celsius(25.0));
    EXPECT_EQ(standard->conditions().barometer, bar_absolute(1.0));
    EXPECT_EQ(standard->relative_humidity, 0.30);
    const ReferenceSet* const tropical = find_reference_set("tropical");
    ASSERT_NE(tropical, nullptr);
    EXPECT_EQ(tropical->conditions().inlet_air, celsius(45.0));
    EXPECT_EQ(tropical->conditions().cooler_coolant, celsius(32.0));
    EXPECT_EQ(tropical->relative_humidity, 0.60);
    EXPECT_EQ(find_reference_set("arctic"), nullptr);
    for (const ReferenceSet& set : all_reference_sets()) {
        EXPECT_FALSE(set.source.empty()) << set.name;
        EXPECT_FALSE(set.conditions().source.empty()) << set.name;
    }
}

Iso3046Ambient ambient(double barometer_bar, double inlet_air, double coolant)
{
    return {bar_absolute(barometer_bar), celsius(inlet_air), celsius(coolant), std::nullopt};
}

TEST(Iso3046, IsNotKnownOutsideItsRange)
{
    const Iso3046Ambient reference = ambient(1.0, 25.0, 25.0);
    const auto adjust = [&](const Iso3046Ambient& site) {
        return adjust_iso_3046(AspirationClass::charge_air_cooled, site, reference);
    };
    EXPECT_TRUE(adjust(ambient(0.62, 45.0, 32.0)).has_value());
    expect_refusal(adjust(ambient(0.5, 45.0, 32.0)), "not known: k would be 0.5", Problem::Kind::not_found);
    expect_refusal(adjust(ambient(1.05, -5.0, 5.0)), "not known: k would be 1.2", Problem::Kind::not_found);
}

TEST(Iso3046, AsksForWhatTheClassOfEngineNeeds)
{
    Iso3046Ambient site = ambient(1.0, 35.0, 30.0);
    const Iso3046Ambient reference = ambient(1.0, 25.0, 25.0);
    expect_refusal(adjust_iso_3046(AspirationClass::naturally_aspirated, site, reference), "humidity",
                   Problem::Kind::not_found);
    site.coolant = std::nullopt;
    expect_refusal(adjust_iso_3046(AspirationClass::charge_air_cooled, site, reference), "coolant",
                   Problem::Kind::not_found);
    EXPECT_TRUE(adjust_iso_3046(AspirationClass::turbocharged, site, reference).has_value());
}

TEST(Iso3046, RefusesWhatCannotBe)
{
    const Iso3046Ambient good = ambient(1.0, 35.0, 30.0);
    const auto kind = Problem::Kind::invalid_input;
    const auto adjust = [&](const Iso3046Ambient& site, double efficiency) {
        return adjust_iso_3046(AspirationClass::charge_air_cooled, site, good, efficiency);
    };
    expect_refusal(adjust(ambient(0.0, 35.0, 30.0), 0.8), "barometer", kind);
    expect_refusal(adjust(ambient(infinite, 35.0, 30.0), 0.8), "barometer", kind);
    expect_refusal(adjust(ambient(1.0, -300.0, 30.0), 0.8), "inlet air", kind);
    expect_refusal(adjust(ambient(1.0, 35.0, -300.0), 0.8), "coolant", kind);
    expect_refusal(adjust(good, 0.0), "efficiency of 0", kind);
    expect_refusal(adjust(good, 92.0), "efficiency of 92", kind);
    Iso3046Ambient steam = good;
    steam.water_vapour = bar_absolute(1.5);
    expect_refusal(adjust_iso_3046(AspirationClass::naturally_aspirated, steam, steam), "cannot be", kind);
}

TEST(HumidAir, FindsTheTemperatureBackFromThePressure)
{
    for (double kelvin = 273.16; kelvin < 647.0; kelvin += 0.37) {
        const AbsolutePressure pressure = saturation_pressure(Temperature::from_value(kelvin)).value();
        // IF97 says of its two equations that they agree exactly; the rounding of their roots stays below
        // 1e-9 K.
        EXPECT_NEAR(saturation_temperature(pressure).value().value(), kelvin, 1e-9) << kelvin;
    }
}

TEST(HumidAir, RefusesWhatIsOutsideTheSaturationLine)
{
    const auto kind = Problem::Kind::invalid_input;
    EXPECT_TRUE(saturation_pressure(celsius(0.0)).has_value());
    EXPECT_TRUE(saturation_pressure(Temperature::from_value(647.096)).has_value());
    expect_refusal(saturation_pressure(celsius(-0.1)), "-0.1 °C", kind);
    expect_refusal(saturation_pressure(Temperature::from_value(647.1)), "373.95 °C", kind);
    expect_refusal(saturation_pressure(Temperature::from_value(not_a_number)), "nan °C", kind);
    expect_refusal(saturation_temperature(bar_absolute(0.006)), "0.006 bar abs", kind);
    expect_refusal(saturation_temperature(bar_absolute(221.0)), "221 bar abs", kind);
}

TEST(HumidAir, RefusesHumidityAndPressuresThatCannotBe)
{
    const auto kind = Problem::Kind::invalid_input;
    const AbsolutePressure barometer = bar_absolute(1.0);
    expect_refusal(mixing_ratio(celsius(35.0), Ratio(1.01), barometer), "101%", kind);
    expect_refusal(mixing_ratio(celsius(35.0), Ratio(-0.1), barometer), "-10%", kind);
    expect_refusal(mixing_ratio(celsius(-5.0), Ratio(0.5), barometer), "0 °C", kind);
    expect_refusal(mixing_ratio(celsius(100.0), Ratio(1.0), barometer), "cannot hold steam", kind);
    expect_refusal(dew_point(Ratio(0.0), barometer), "no dew point", kind);
    expect_refusal(charge_air_water(celsius(35.0), Ratio(0.8), barometer, celsius(45.0), bar_absolute(0.05)),
                   "cannot hold steam", kind);
}

TEST(HumidAir, HasNoCondensateWhereTheScavengeAirCanCarryItAll)
{
    const ChargeAirWater water =
        charge_air_water(celsius(20.0), Ratio(0.4), bar_absolute(1.0), celsius(45.0), bar_absolute(3.0))
            .value();
    EXPECT_EQ(water.condensate.value(), 0.0);
    EXPECT_LT(water.dew_point.value(), celsius(45.0));
    const ChargeAirWater dry =
        charge_air_water(celsius(20.0), Ratio(0.0), bar_absolute(1.0), celsius(45.0), bar_absolute(3.0))
            .value();
    EXPECT_EQ(dry.drawn_in.value(), 0.0);
    EXPECT_FALSE(dry.dew_point.has_value());
}

TEST(HumidAir, DripsExactlyAtItsDewPoint)
{
    const ChargeAirWater water =
        charge_air_water(celsius(35.0), Ratio(0.8), bar_absolute(1.013), celsius(45.0), bar_absolute(3.5))
            .value();
    const Ratio saturated = mixing_ratio(water.dew_point.value(), Ratio(1.0), bar_absolute(3.5)).value();
    EXPECT_NEAR(saturated.value(), water.drawn_in.value(), 1e-12);
}

Density density(double kilograms_per_cubic_metre)
{
    return Density::from_value(kilograms_per_cubic_metre);
}

TEST(Fuel, KeepsItsDensityAt15Degrees)
{
    for (const double at_15 : {653.0, 770.0, 780.0, 800.0, 850.0, 991.0, 1075.0})
        EXPECT_DOUBLE_EQ(density_at_temperature(density(at_15), celsius(15.0)).value().value(), at_15);
}

TEST(Fuel, RefusesDensitiesAndTemperaturesOutsideTheTables)
{
    const auto kind = Problem::Kind::invalid_input;
    expect_refusal(density_at_temperature(density(0.991), celsius(98.0)), "0.991 kg/m³", kind);
    expect_refusal(density_at_temperature(density(1080.0), celsius(98.0)), "1080 kg/m³", kind);
    expect_refusal(density_at_temperature(density(991.0), celsius(151.0)), "151 °C", kind);
    expect_refusal(density_at_temperature(density(800.0), celsius(126.0)), "126 °C", kind);
    expect_refusal(density_at_temperature(density(700.0), celsius(96.0)), "96 °C", kind);
    expect_refusal(density_at_temperature(density(991.0), celsius(-19.0)), "-19 °C", kind);
    expect_refusal(density_at_temperature(density(not_a_number), celsius(98.0)), "nan", kind);
    EXPECT_TRUE(density_at_temperature(density(991.0), celsius(150.0)).has_value());
}

TEST(Fuel, BecomesAMassFlowWithTheDensityAtTheMeter)
{
    const VolumeFlow litres_an_hour = VolumeFlow::from_value(2000.0 / 3.6e6);
    const MassFlow mass = fuel_mass_flow(litres_an_hour, density(991.0), celsius(98.0)).value();
    EXPECT_NEAR(mass.value() * 3600.0, 2.0 * 934.149, 2e-3); // 934.149 kg/m³ at 98 °C, worked out separately
    expect_refusal(fuel_mass_flow(-litres_an_hour, density(991.0), celsius(98.0)), "-2000",
                   Problem::Kind::invalid_input);
}

TEST(Fuel, HasNoSpecificConsumptionWithoutPower)
{
    const MassFlow flow = kilograms_per_hour(1000.0);
    const auto kind = Problem::Kind::invalid_input;
    EXPECT_NEAR(in_grams_per_kilowatt_hour(specific_fuel_consumption(flow, kilowatts(5000.0)).value()), 200.0,
                1e-10);
    expect_refusal(specific_fuel_consumption(flow, kilowatts(0.0)), "power of 0 kW", kind);
    expect_refusal(specific_fuel_consumption(flow, kilowatts(-3.0)), "power of -3 kW", kind);
    expect_refusal(specific_fuel_consumption(flow, kilowatts(not_a_number)), "nan kW", kind);
    expect_refusal(specific_fuel_consumption(-flow, kilowatts(5000.0)), "-1000 kg/h", kind);
}

TEST(Fuel, RefusesHeatingValuesThatAreNoFuels)
{
    const SpecificConsumption consumption = grams_per_kilowatt_hour(180.0);
    const auto kind = Problem::Kind::invalid_input;
    expect_refusal(at_usual_heating_value(consumption, megajoules_per_kilogram(9.9)), "9.9 MJ/kg", kind);
    expect_refusal(at_usual_heating_value(consumption, megajoules_per_kilogram(42700.0)), "42700 MJ/kg",
                   kind);
    expect_refusal(at_usual_heating_value(consumption, megajoules_per_kilogram(not_a_number)), "nan MJ/kg",
                   kind);
    EXPECT_EQ(at_usual_heating_value(consumption, usual_heating_value()).value(), consumption);
}

TEST(Fuel, KeepsTheAmbientCorrectionAConsumptionHasBeenThrough)
{
    const AmbientDifference warm = kelvins(30.0, 0.0);
    const CorrectionCoefficients own{-2e-4, 0.0, "invented"};
    const Corrected<SpecificConsumption> linear =
        correct_linearly(grams_per_kilowatt_hour(180.0), warm, own).value();
    const Corrected<SpecificConsumption> both =
        at_usual_heating_value(linear, megajoules_per_kilogram(40.0)).value();
    EXPECT_EQ(both.applied, AppliedCorrection::linear);
    EXPECT_TRUE(both.extrapolated);
    EXPECT_NEAR(in_grams_per_kilowatt_hour(both.value), 180.0 * (1.0 - 0.006) * 40.0 / 42.7, 1e-10);
}

} // namespace
} // namespace evenstroke
