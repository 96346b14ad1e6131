// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/drift_input.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

using namespace evenstroke;

namespace {

Reading reading_at(const std::string& inlet, const std::string& coolant)
{
    Reading reading;
    reading.values = {typed_value("load_percent", Place::engine(), "75"),
                      typed_value("inlet_air_temperature", Place::engine(), inlet),
                      typed_value("cooler_coolant_inlet_temperature", Place::engine(), coolant)};
    return reading;
}

JudgedValue judged(const Engine& engine, const Reading& reading, std::string_view name, Place place)
{
    const PreparedReading prepared = prepare_reading(engine, Baseline(engine), reading);
    const QuantityId id = *find_quantity(name, place.kind);
    for (const JudgedValue& value : prepared.values)
        if (value.quantity == id && value.place == place)
            return value;
    ADD_FAILURE() << name << " was not judged";
    return {};
}

} // namespace

// The worked figures of the linear correction (computed from the stated formula with invented coefficients): inlet
// air 40 °C, coolant 30 °C against 25/25, barometer 1 bar because none was entered.
TEST(Deviations, CorrectWithTheEnginesOwnCoefficientsAndOneBarWhereNoBarometerWasEntered)
{
    const Engine engine = example_engine();
    Reading reading = reading_at("40", "30");
    reading.values.push_back(typed_value("scavenge_pressure", Place::engine(), "2.50"));
    reading.values.push_back(typed_value("compression_pressure", Place::cylinder(1), "130"));
    reading.values.push_back(typed_value("maximum_pressure", Place::cylinder(1), "165"));
    reading.values.push_back(typed_value("exhaust_temperature", Place::cylinder(1), "365"));
    EXPECT_NEAR(*judged(engine, reading, "scavenge_pressure", Place::engine()).corrected, 2.606750, 1e-5);
    EXPECT_NEAR(*judged(engine, reading, "compression_pressure", Place::cylinder(1)).corrected, 134.585000, 1e-5);
    EXPECT_NEAR(*judged(engine, reading, "maximum_pressure", Place::cylinder(1)).corrected, 169.648000, 1e-5);
    EXPECT_NEAR(*judged(engine, reading, "exhaust_temperature", Place::cylinder(1)).corrected, 341.388450, 1e-5);
    const JudgedValue exhaust = judged(engine, reading, "exhaust_temperature", Place::cylinder(1));
    EXPECT_DOUBLE_EQ(*exhaust.expected, 320.0);
    EXPECT_NEAR(*exhaust.deviation, 21.388450, 1e-5);
    EXPECT_EQ(exhaust.applied, Applied::linear);
}

TEST(Deviations, BringEveryUnitAndKindToTheSameNumber)
{
    const Engine engine = example_engine();
    Reading reading = reading_at("25", "25");
    reading.values.push_back(typed_value("barometric_pressure", Place{Place::Kind::ship, 0}, "1013"));
    reading.values.push_back(typed_value("maximum_pressure", Place::cylinder(1), "15.0", "MPa"));
    reading.values.push_back(typed_value("maximum_pressure", Place::cylinder(2), "151.013", "bar abs"));
    reading.values.push_back(typed_value("exhaust_temperature", Place::cylinder(1), "608", "°F"));
    EXPECT_NEAR(judged(engine, reading, "maximum_pressure", Place::cylinder(1)).raw, 150.0, 1e-9);
    EXPECT_NEAR(judged(engine, reading, "maximum_pressure", Place::cylinder(2)).raw, 150.0, 1e-9);
    EXPECT_NEAR(judged(engine, reading, "exhaust_temperature", Place::cylinder(1)).raw, 320.0, 1e-9);
}

TEST(Deviations, SayWhichConditionIsMissingInsteadOfGuessing)
{
    const Engine engine = example_engine();
    Reading reading;
    reading.values = {typed_value("load_percent", Place::engine(), "75"),
                      typed_value("inlet_air_temperature", Place::engine(), "40"),
                      typed_value("maximum_pressure", Place::cylinder(1), "150")};
    const JudgedValue value = judged(engine, reading, "maximum_pressure", Place::cylinder(1));
    EXPECT_FALSE(value.corrected);
    EXPECT_FALSE(value.deviation);
    EXPECT_EQ(value.missing_input, "coolant temperature into the air cooler");
    EXPECT_DOUBLE_EQ(*value.expected, 150.0);
}

// No correction of the scavenge temperature is given for all engines; it follows the coolant. A value as read
// is not called corrected, and is not held against a baseline at another coolant temperature.
TEST(Deviations, ScavengeTemperatureIsCorrectedOnlyWithTheEnginesOwnCoefficients)
{
    Engine engine = example_engine();
    for (BaselinePoint& point : engine.baseline)
        point.values["scavenge_temperature"] = 38.0;
    Reading reading = reading_at("25", "30");
    reading.values.push_back(typed_value("scavenge_temperature", Place::engine(), "44"));
    const JudgedValue plain = judged(engine, reading, "scavenge_temperature", Place::engine());
    EXPECT_FALSE(plain.corrected);
    EXPECT_FALSE(plain.deviation);
    EXPECT_DOUBLE_EQ(*plain.expected, 38.0);
    EXPECT_EQ(plain.applied, Applied::not_correctable);
    engine.correction["scavenge_temperature"] = {0.0, -3.0e-3, "invented"};
    const JudgedValue corrected = judged(engine, reading, "scavenge_temperature", Place::engine());
    // (44 + 273.15)(1 - 0.003 * 5) - 273.15, by hand
    EXPECT_NEAR(*corrected.corrected, 39.24275, 1e-9);
    EXPECT_NEAR(*corrected.deviation, 1.24275, 1e-9);
}

TEST(Deviations, AConditionIsNotCorrectedForItself)
{
    const JudgedValue coolant = judged(example_engine(), reading_at("25", "30"), "cooler_coolant_inlet_temperature", Place::engine());
    EXPECT_FALSE(coolant.corrected);
    EXPECT_FALSE(coolant.deviation);
    EXPECT_FALSE(judged(example_engine(), reading_at("25", "30"), "inlet_air_temperature", Place::engine()).corrected);
}

TEST(Deviations, AnImpossibleConditionIsNotUsed)
{
    const Engine engine = example_engine();
    Reading reading = reading_at("255", "25"); // a lost decimal sign
    reading.values.push_back(typed_value("maximum_pressure", Place::cylinder(1), "150"));
    EXPECT_FALSE(judged(engine, reading, "maximum_pressure", Place::cylinder(1)).corrected);
}

TEST(Deviations, WithoutCoefficientsNothingIsCalledCorrected)
{
    Engine engine = example_engine();
    engine.correction.clear();
    Reading reading = reading_at("40", "30");
    reading.values.push_back(typed_value("maximum_pressure", Place::cylinder(1), "150"));
    const JudgedValue value = judged(engine, reading, "maximum_pressure", Place::cylinder(1));
    EXPECT_FALSE(value.corrected);
    EXPECT_EQ(value.applied, Applied::not_correctable);
}

TEST(Deviations, AControlledMaximumPressureIsNotCorrected)
{
    Engine engine = example_engine();
    engine.maximum_pressure_controlled = true;
    Reading reading = reading_at("40", "30");
    reading.values.push_back(typed_value("maximum_pressure", Place::cylinder(1), "152"));
    const JudgedValue value = judged(engine, reading, "maximum_pressure", Place::cylinder(1));
    EXPECT_DOUBLE_EQ(*value.corrected, 152.0);
    EXPECT_DOUBLE_EQ(*value.deviation, 2.0);
}

TEST(Deviations, ApartIsAgainstTheMedianOfTheOthers)
{
    const Engine engine = example_engine();
    Reading reading = reading_at("25", "25");
    const char* typed[] = {"150", "151", "149", "160", "150", "152"};
    for (int cylinder = 1; cylinder <= 6; ++cylinder)
        reading.values.push_back(typed_value("maximum_pressure", Place::cylinder(cylinder), typed[cylinder - 1]));
    EXPECT_DOUBLE_EQ(*judged(engine, reading, "maximum_pressure", Place::cylinder(4)).apart, 10.0); // others: median 0
    EXPECT_DOUBLE_EQ(*judged(engine, reading, "maximum_pressure", Place::cylinder(1)).apart, -1.0); // others: median 1
}

TEST(Deviations, ApartIsFormedFromCorrectedValuesWhereThereIsNoBaseline)
{
    const Engine engine = example_engine(); // has no baseline of the jacket water
    Reading reading = reading_at("25", "25");
    for (int cylinder = 1; cylinder <= 5; ++cylinder)
        reading.values.push_back(typed_value("jacket_outlet_temperature", Place::cylinder(cylinder), std::to_string(80 + cylinder)));
    const JudgedValue value = judged(engine, reading, "jacket_outlet_temperature", Place::cylinder(5));
    EXPECT_FALSE(value.expected);
    EXPECT_DOUBLE_EQ(*value.apart, 85.0 - 82.5);
}

TEST(Deviations, OutsideTheBaselineNothingIsExpected)
{
    const Engine engine = example_engine();
    Reading reading;
    reading.values = {typed_value("load_percent", Place::engine(), "40"),
                      typed_value("maximum_pressure", Place::cylinder(1), "100")};
    const PreparedReading prepared = prepare_reading(engine, Baseline(engine), reading);
    EXPECT_TRUE(prepared.outside_baseline);
    EXPECT_FALSE(judged(engine, reading, "maximum_pressure", Place::cylinder(1)).expected);
}

TEST(Deviations, LoadComesFromShaftPowerWhereNoneWasTyped)
{
    const Engine engine = example_engine();
    Reading reading;
    reading.values = {typed_value("shaft_power", Place::engine(), "9", "MW")};
    const Conditions conditions = find_conditions(engine, reading);
    EXPECT_NEAR(*conditions.load_percent, 75.0, 1e-12);
    EXPECT_TRUE(conditions.load_from_power);
}

TEST(Deviations, AVolumeOfFuelNeedsItsDensity)
{
    const Engine engine = example_engine();
    Reading reading = reading_at("25", "25");
    reading.values.push_back(typed_value("fuel_consumption", Place::engine(), "1600", "l/h"));
    EXPECT_FALSE(engine_mean(reading, "fuel_consumption", find_conditions(engine, reading)));
    reading.values.push_back(typed_value("fuel_density_15", Place::engine(), "991"));
    reading.values.push_back(typed_value("fuel_temperature", Place::engine(), "98"));
    // Density at 98 °C 934.149 kg/m³ (tables 54B of 1980, computed): 1600 l/h are 1494.638 kg/h.
    EXPECT_NEAR(*engine_mean(reading, "fuel_consumption", find_conditions(engine, reading)), 1494.638, 1e-2);
}

// b 178.4 g/kWh at 40.295871 MJ/kg comes to 168.35558 at 42.7 (computed from the stated formula).
TEST(Deviations, ConsumptionIsBroughtToTheUsualHeatingValue)
{
    const Engine engine = example_engine();
    Reading reading = reading_at("25", "25");
    reading.values.push_back(typed_value("shaft_power", Place::engine(), "1000"));
    reading.values.push_back(typed_value("fuel_consumption", Place::engine(), "178.4"));
    reading.values.push_back(typed_value("fuel_lower_heating_value", Place::engine(), "40.295871"));
    const Baseline baseline(engine);
    const DerivedReading of(engine, baseline, reading);
    DerivedInputs inputs(of);
    const auto row = derive_one(inputs, *find_derived("specific_fuel_consumption"), Place::engine());
    EXPECT_NEAR(row->corrected.value(), 168.35558, 1e-4);
}

TEST(Deviations, UncertaintyHoldsTheInstrumentAndTheLoad)
{
    Engine engine = example_engine();
    engine.instruments = {{"maximum_pressure", "", "", 1.5, ""}, {"load_percent", "", "", 2.0, ""},
                          {"inlet_air_temperature", "", "", 0.0, ""}, {"cooler_coolant_inlet_temperature", "", "", 0.0, ""}};
    Reading reading = reading_at("25", "25");
    reading.values.push_back(typed_value("maximum_pressure", Place::cylinder(1), "150"));
    // Around 75 % the curve rises 30 bar in 25 % of load both ways: 1.2 bar a per cent, 2.4 bar for 2 %.
    EXPECT_NEAR(*judged(engine, reading, "maximum_pressure", Place::cylinder(1)).uncertainty, std::sqrt(1.5 * 1.5 + 2.4 * 2.4),
                1e-9);
}
