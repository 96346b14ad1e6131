// SPDX-License-Identifier: GPL-3.0-or-later
// Quantities worked out of a reading. All readings are invented; the expected numbers were worked out separately
// from the definitions, to nine digits or more. Tolerance: 1e-8 of the number unless said.
#include "core/derived/derived.h"
#include "core/trend/deviations.h"
#include "tests/core/reading_maker.h"

#include <gtest/gtest.h>

#include <cmath>

using namespace evenstroke;
using namespace evenstroke::test;

namespace {

ReadingMaker full_reading()
{
    ReadingMaker reading;
    reading.number("load_percent", 75.0).number("speed", 95.4).number("shaft_power", 9000.0);
    reading.cylinders("mean_indicated_pressure", {16.0, 16.2, 15.9, 16.1, 16.3, 15.8});
    reading.cylinders("compression_pressure", {120.0, 121.0, 119.0, 120.5, 120.2, 119.7});
    reading.number("fuel_consumption", 1600.0).number("fuel_lower_heating_value", 42.0);
    reading.number("inlet_air_temperature", 30.0).number("relative_humidity", 95.0, at_ship());
    reading.number("barometric_pressure", 1013.0, at_ship()).number("scavenge_pressure", 2.2);
    reading.number("scavenge_temperature", 42.0).number("exhaust_receiver_pressure", 2.0);
    reading.number("compressor_outlet_temperature", 170.0, at_turbocharger(1));
    reading.number("compressor_outlet_temperature", 172.0, at_turbocharger(2));
    reading.number("air_filter_pressure_drop", 10.0, at_turbocharger(1));
    reading.number("air_filter_pressure_drop", 12.0, at_turbocharger(2));
    reading.number("exhaust_before_turbine", 390.0, at_turbocharger(1));
    reading.number("exhaust_before_turbine", 392.0, at_turbocharger(2));
    reading.number("exhaust_back_pressure", 25.0, at_turbocharger(1));
    reading.number("exhaust_back_pressure", 30.0, at_turbocharger(2));
    reading.number("cooler_pressure_drop", 15.0, at_cooler(1)).number("cooler_pressure_drop", 20.0, at_cooler(2));
    reading.number("cooler_air_outlet_temperature", 41.0, at_cooler(1));
    reading.number("cooler_air_outlet_temperature", 43.0, at_cooler(2));
    reading.number("cooler_coolant_inlet_temperature", 32.0, at_cooler(1));
    reading.number("cooler_coolant_inlet_temperature", 32.0, at_cooler(2));
    return reading.number("speed_through_water", 14.0, at_ship());
}

Engine engine_with_propeller()
{
    Engine engine = invented_engine();
    engine.propeller_pitch = 4.8 * si::metres;
    return engine;
}

std::optional<DerivedValue> find(const Engine& engine, const Reading& reading, std::string_view name,
                                 Place place = Place::engine())
{
    for (const DerivedValue& row : derive(engine, Baseline(engine), reading))
        if (row.quantity == name && row.place == place)
            return row;
    return std::nullopt;
}

DerivedValue of_full_reading(std::string_view name, Place place = Place::engine())
{
    const auto row = find(engine_with_propeller(), full_reading().done(), name, place);
    EXPECT_TRUE(row) << name;
    return row.value_or(DerivedValue{});
}

void expect_close(double value, double expected) { EXPECT_NEAR(value, expected, 1e-8 * std::abs(expected)); }

} // namespace

TEST(Derived, PowerAgreesWithASeparateCalculation)
{
    expect_close(of_full_reading("indicated_power", Place::cylinder(1)).value, 1726.3177295182);
    expect_close(of_full_reading("indicated_power", Place::cylinder(5)).value, 1758.6861869467);
    expect_close(of_full_reading("indicated_power").value, 10390.2748345377);
    expect_close(of_full_reading("mean_effective_pressure").value, 13.9024234008);
    expect_close(of_full_reading("mechanical_efficiency").value, 0.8661946044);
    expect_close(of_full_reading("apparent_slip").value, 5.6312601910);
    EXPECT_EQ(of_full_reading("apparent_slip").unit, "%");
}

TEST(Derived, AirSideAgreesWithASeparateCalculation)
{
    expect_close(of_full_reading("compressor_pressure_ratio").value, 3.2240575974);
    expect_close(of_full_reading("compressor_efficiency").value, 0.8550117451);
    expect_close(of_full_reading("turbocharger_efficiency").value, 0.6682225382);
    expect_close(of_full_reading("cooler_effectiveness").value, 0.9281055901);
    expect_close(of_full_reading("cooler_temperature_difference").value, 10.0);
    expect_close(*of_full_reading("cooler_temperature_difference").corrected, 10.0);
    expect_close(of_full_reading("charge_air_condensate").value, 9.4900550456);
}

TEST(Derived, ConsumptionIsGivenRawAndAtTheUsualHeatingValue)
{
    const DerivedValue row = of_full_reading("specific_fuel_consumption");
    expect_close(row.value, 177.777777778);
    expect_close(row.corrected.value(), 174.863387978);
    // Fuel 1.5 %, heating value 0.5 %, power 3 %: sqrt(1.5² + 0.5² + 3²) = 3.3911650 % of the corrected one.
    // Tolerance: the difference quotient of a quotient.
    EXPECT_NEAR(row.uncertainty.value(), 0.033911650 * 174.863387978, 1e-5);
}

TEST(Derived, ConsumptionIsCorrectedByTheEnginesOwnCoefficientsOnce)
{
    Engine engine = engine_with_propeller();
    engine.correction["specific_fuel_consumption"] = {-0.0006, -0.0003, "invented"};
    // Inlet air 5 K and coolant 7 K over the reference: 1 - 0.003 - 0.0021.
    expect_close(find(engine, full_reading().done(), "specific_fuel_consumption")->corrected.value(),
                 174.863387978 * 0.9949);
}

TEST(Derived, CompressionRatioIsCorrectedThroughBothPressures)
{
    Engine engine = engine_with_propeller();
    const auto uncorrected = of_full_reading("compression_pressure_ratio", Place::cylinder(1));
    expect_close(uncorrected.value, 37.6635543106);
    EXPECT_FALSE(uncorrected.corrected) << "the engine has no coefficients";
    engine.correction = {{"scavenge_pressure", {2.7e-3, -2.0e-3, "invented"}},
                         {"compression_pressure", {2.8e-3, -1.4e-3, "invented"}}};
    expect_close(*find(engine, full_reading().done(), "compression_pressure_ratio", Place::cylinder(1))->corrected,
                 37.8406615695);
}

TEST(Derived, UncertaintyComesFromTheInstruments)
{
    // Mean indicated pressure 3 %, speed 0.1 %, shaft power 3 % (the catalogue's). One indicator for all: the sum
    // is as uncertain as one cylinder. Tolerance: the difference quotient.
    EXPECT_NEAR(*of_full_reading("indicated_power", Place::cylinder(1)).uncertainty, 51.81829585993, 1e-6);
    EXPECT_NEAR(*of_full_reading("indicated_power").uncertainty, 311.88136820695, 1e-5);
    EXPECT_NEAR(*of_full_reading("mechanical_efficiency").uncertainty, 0.0367597315, 1e-6);
    // Two thermometers of the scavenge air and the coolant: sqrt(1 + 1) K.
    EXPECT_NEAR(*of_full_reading("cooler_temperature_difference").uncertainty, std::sqrt(2.0), 1e-9);
}

TEST(Derived, BaselineOfTheNameGivesExpectedAndDeviation)
{
    Engine engine = engine_with_propeller();
    engine.baseline = {{50.0, "", {{"compressor_efficiency", 0.84}, {"indicated_power", 1200.0}}},
                       {75.0, "", {{"compressor_efficiency", 0.85}, {"indicated_power", 1700.0}}},
                       {100.0, "", {{"compressor_efficiency", 0.83}, {"indicated_power", 2200.0}}}};
    const auto efficiency = find(engine, full_reading().done(), "compressor_efficiency");
    expect_close(efficiency->expected.value(), 0.85);
    EXPECT_NEAR(efficiency->deviation.value(), 0.0050117451, 1e-9);
    EXPECT_TRUE(find(engine, full_reading().done(), "indicated_power", Place::cylinder(1))->deviation);
    EXPECT_FALSE(find(engine, full_reading().done(), "indicated_power")->expected) << "a baseline's is one cylinder's";
}

TEST(Derived, HasNoRowWhereAnInputIsMissing)
{
    const Engine engine = engine_with_propeller();
    EXPECT_TRUE(derive(engine, Baseline(engine), Reading{}).empty());
    ReadingMaker reading;
    reading.number("load_percent", 75.0).cylinders("mean_indicated_pressure", {16.0, 16.2, 15.9, 16.1, 16.3});
    EXPECT_TRUE(derive(engine, Baseline(engine), reading.done()).empty()) << "no speed";
    reading.number("speed", 95.4).number("scavenge_pressure", 2.2);
    EXPECT_TRUE(find(engine, reading.done(), "indicated_power", Place::cylinder(5)));
    EXPECT_FALSE(find(engine, reading.done(), "indicated_power")) << "the sixth cylinder is missing";
    EXPECT_FALSE(find(engine, reading.done(), "mean_effective_pressure")) << "a load is no shaft power";
    const auto ratio = find(engine, reading.done(), "compressor_pressure_ratio");
    expect_close(ratio->value, 3.2);
    EXPECT_FALSE(ratio->uncertainty) << "1 bar taken, for no barometer was read";
}

TEST(Derived, TorqueAndSpeedStandForAPowerThatWasNotRead)
{
    const Engine engine = engine_with_propeller();
    ReadingMaker reading;
    reading.number("speed", 95.4).number("shaft_torque", 900.0).number("fuel_consumption", 1600.0);
    // 900 kNm x 2π x 1.59/s = 8991.238 kW.
    const double kilowatt = 900.0 * 2.0 * 3.14159265358979 * 95.4 / 60.0;
    expect_close(find(engine, reading.done(), "mean_effective_pressure")->value, 13.9024234008 * kilowatt / 9000.0);
    const auto consumption = find(engine, reading.done(), "specific_fuel_consumption");
    expect_close(consumption->value, 1.6e6 / kilowatt);
    EXPECT_FALSE(consumption->corrected) << "no heating value was read";
}

TEST(Derived, NothingIsSaidOfTheCompressorWhileABlowerHelps)
{
    const Engine engine = engine_with_propeller();
    const Reading reading = full_reading().words("auxiliary_blower_running", "yes").done();
    EXPECT_FALSE(find(engine, reading, "compressor_pressure_ratio"));
    EXPECT_FALSE(find(engine, reading, "turbocharger_efficiency"));
    EXPECT_TRUE(find(engine, reading, "cooler_effectiveness"));
}

TEST(Derived, SlipNeedsAFixedPropellerWithoutAGear)
{
    Engine engine = engine_with_propeller();
    EXPECT_FALSE(find(engine, full_reading().number("propeller_pitch", 80.0, at_ship()).done(), "apparent_slip"));
    engine.kind = EngineKind::four_stroke;
    EXPECT_FALSE(find(engine, full_reading().done(), "apparent_slip"));
    engine = invented_engine();
    EXPECT_FALSE(find(engine, full_reading().done(), "apparent_slip")) << "no pitch";
}

TEST(Derived, DryAirHasACondensateOfZeroWithoutAnUncertainty)
{
    ReadingMaker reading;
    reading.number("inlet_air_temperature", 20.0).number("relative_humidity", 20.0, at_ship());
    reading.number("barometric_pressure", 1013.0, at_ship());
    reading.number("scavenge_temperature", 45.0).number("scavenge_pressure", 2.0);
    const Engine engine = invented_engine();
    const auto row = find(engine, reading.done(), "charge_air_condensate");
    EXPECT_EQ(row->value, 0.0);
    EXPECT_FALSE(row->uncertainty);
}
