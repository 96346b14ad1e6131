// SPDX-License-Identifier: GPL-3.0-or-later
// Derived quantities against published values and separate calculations; readings are invented where no source is
// named. Tolerance: half of the last printed digit of the source unless said.
#include "core/derived/derived.h"
#include "core/reading/quantity_names.h"
#include "core/trend/deviations.h"
#include "tests/core/reading_maker.h"

#include <gtest/gtest.h>

#include <cmath>
#include <random>

using namespace evenstroke;
using namespace evenstroke::test;

namespace {

std::optional<DerivedValue> find(const Engine& engine, const Reading& reading, std::string_view name,
                                 Place place = Place::engine())
{
    for (const DerivedValue& row : derive(engine, Baseline(engine), reading))
        if (row.quantity == name && row.place == place)
            return row;
    return std::nullopt;
}

double value_of(const Engine& engine, const Reading& reading, std::string_view name, Place place = Place::engine())
{
    const auto row = find(engine, reading, name, place);
    EXPECT_TRUE(row) << name;
    return row ? row->value : std::nan("");
}

/// The healthy engine at 75 % load for drops at reference flow.
Engine engine_with_baseline()
{
    Engine engine = invented_engine();
    engine.baseline = {{75.0,
                        "",
                        {{"scavenge_pressure", 2.5},
                         {"exhaust_before_turbine", 380.0},
                         {"scavenge_temperature", 44.85},
                         {"exhaust_after_turbine", 260.0},
                         {"cooler_pressure_drop", 14.0},
                         {"air_filter_pressure_drop", 8.0}}}};
    return engine;
}

/// Two turbochargers and two coolers.
ReadingMaker air_side()
{
    ReadingMaker reading;
    reading.number("load_percent", 75.0).number("inlet_air_temperature", 30.0);
    reading.number("barometric_pressure", 1013.0, at_ship()).number("scavenge_pressure", 2.4);
    reading.number("scavenge_temperature", 42.0).number("exhaust_receiver_pressure", 2.2);
    for (const int i : {1, 2}) {
        reading.number("compressor_outlet_temperature", 168.0 + 4.0 * i, at_turbocharger(i));
        reading.number("exhaust_before_turbine", 384.0 + 4.0 * i, at_turbocharger(i));
        reading.number("exhaust_after_turbine", 270.0 + 2.0 * i, at_turbocharger(i));
        reading.number("exhaust_back_pressure", 20.0 + 5.0 * i, at_turbocharger(i));
        reading.number("air_filter_pressure_drop", 8.0 + 2.0 * i, at_turbocharger(i));
        reading.number("cooler_pressure_drop", 12.0 + 3.0 * i, at_cooler(i));
        reading.number("cooler_air_outlet_temperature", 40.0 + i, at_cooler(i));
        reading.number("cooler_coolant_inlet_temperature", 32.0, at_cooler(i));
        reading.number("cooler_coolant_outlet_temperature", 46.0 + 2.0 * i, at_cooler(i));
    }
    return reading;
}

} // namespace

TEST(DerivedCatalogue, HasAFormulaASourceAndAValidityForEveryLine)
{
    EXPECT_GE(derived_catalogue().size(), 27U);
    for (const DerivedQuantity& each : derived_catalogue()) {
        EXPECT_FALSE(each.formula.empty() || each.source.empty() || each.validity.empty()) << each.name;
        EXPECT_TRUE(find_unit(each.unit).has_value()) << each.name;
        for (const std::string& input : each.inputs)
            EXPECT_TRUE(find_quantity(input)) << input << " of " << each.name;
        // Every name that nobody can type is a line of the quantity catalogue, in the same unit.
        const Quantity& q = quantity(each.id);
        EXPECT_EQ(q.name, each.name);
        if (q.derived()) {
            EXPECT_EQ(unit(q.unit).symbol, std::string_view(each.unit)) << each.name;
        }
    }
    for (const Quantity& q : all_quantities())
        EXPECT_TRUE(!q.derived() || find_derived(q.name)) << q.name << " is derived, and has no formula";
}

TEST(DerivedCatalogue, NobodyCanTypeADerivedQuantity)
{
    for (const DerivedQuantity& each : derived_catalogue()) {
        if (!quantity(each.id).derived())
            continue;
        for (const Place::Kind kind : {Place::Kind::engine, Place::Kind::ship, Place::Kind::cylinder,
                                       Place::Kind::turbocharger, Place::Kind::cooler})
            EXPECT_FALSE(find_quantity(each.name, kind)) << each.name;
        for (const std::string& name : nearest_quantity_names(each.name))
            EXPECT_NE(name, each.name);
        EXPECT_EQ(nearest_names_of_all(each.name, 1).front(), each.name) << "a baseline may name it";
    }
}

// D = 55 000 t, 14.5 kn, 7800 kW and 9450 kW at 99 r/min of 12 600 kW at 105: separate calculations from the formulas;
// P = 5 m, 105 r/min, 14 kn: public examination example, apparent slip 17.7 %.
TEST(DerivedShip, AgreesWithPublishedAndSeparateFigures)
{
    Engine engine = invented_engine();
    engine.rated_power = kilowatts(12600.0);
    engine.propeller_pitch = 5.0 * si::metres;
    ReadingMaker slip;
    slip.number("speed", 105.0).number("speed_through_water", 14.0, at_ship());
    EXPECT_NEAR(value_of(engine, slip.done(), "apparent_slip"), 17.688889, 5e-7);
    ReadingMaker margin;
    margin.number("speed", 99.0).number("shaft_power", 9450.0);
    EXPECT_NEAR(value_of(engine, margin.done(), "light_running_margin"), 3.774856, 1e-5);
    ReadingMaker admiralty;
    admiralty.number("displacement", 55000.0, at_ship()).number("speed_through_water", 14.5, at_ship()).number("shaft_power", 7800.0);
    EXPECT_NEAR(value_of(engine, admiralty.done(), "admiralty_coefficient"), 565.2638, 5e-5);
    engine.kind = EngineKind::four_stroke;
    EXPECT_FALSE(find(engine, margin.done(), "light_running_margin")) << "a gear or a generator";
    EXPECT_FALSE(find(engine, admiralty.done(), "admiralty_coefficient"));
}

// 991 kg/m³, 380 mm²/s at 50 °C: 851.944; net heating value of 850 kg/m³ with 0.08 % sulphur: 42.73860 MJ/kg;
// 991 kg/m³ at 98 °C: 934.149 kg/m³. Separate calculations from the formulas of ISO 8217 and of the tables of 1980.
TEST(DerivedFuel, AgreesWithSeparateFigures)
{
    const Engine engine = invented_engine();
    ReadingMaker heavy;
    heavy.number("fuel_density_15", 991.0).number("fuel_viscosity", 380.0).number("fuel_temperature", 50.0);
    EXPECT_NEAR(value_of(engine, heavy.done(), "calculated_ignition_index"), 851.944, 1e-3);
    ReadingMaker light;
    light.number("fuel_density_15", 850.0).number("fuel_sulphur", 0.08);
    const auto heat = find(engine, light.done(), "calculated_heating_value");
    EXPECT_NEAR(heat->value, 42.73860, 1e-4);
    EXPECT_FALSE(heat->uncertainty) << "nobody knows the water";
    EXPECT_FALSE(find(engine, light.number("fuel_lower_heating_value", 42.6).done(), "calculated_heating_value"));
    ReadingMaker warm;
    warm.number("fuel_density_15", 991.0).number("fuel_temperature", 98.0).typed("fuel_consumption", "1200 l/h");
    EXPECT_NEAR(value_of(engine, warm.done(), "fuel_density_at_meter"), 934.149, 5e-4);
    EXPECT_NEAR(value_of(engine, warm.done(), "fuel_mass_flow"), 1.2 * 934.149, 1e-3);
    EXPECT_FALSE(find(engine, heavy.number("fuel_consumption", 1600.0).done(), "fuel_mass_flow")) << "typed as a mass";
}

// Consumption 178.4 g/kWh, 40.295871 MJ/kg, 101 kPa, 313 K, coolant 303 K, mechanical efficiency 0.80: beta 1.012583810
// and 166.26336 g/kWh, a separate calculation from ISO 3046-1.
TEST(DerivedConsumption, IsBroughtToReferenceByOneWayAndNeverByTwo)
{
    Engine engine = invented_engine();
    engine.reference.inlet_air = 298.0 * absolute<si::temperature>();
    engine.reference.cooler_coolant = engine.reference.inlet_air;
    ReadingMaker made;
    made.number("load_percent", 75.0).number("shaft_power", 10000.0).number("fuel_consumption", 1784.0);
    made.number("fuel_lower_heating_value", 40.295871).number("barometric_pressure", 1010.0, at_ship());
    made.number("inlet_air_temperature", 39.85).number("cooler_coolant_inlet_temperature", 29.85, at_cooler(1));
    const Reading reading = made.done();
    EXPECT_NEAR(find(engine, reading, "specific_fuel_consumption")->corrected.value(), 168.35558, 1e-4);
    engine.consumption_correction = ConsumptionCorrection::iso_3046;
    const auto by_iso = find(engine, reading, "specific_fuel_consumption");
    EXPECT_NEAR(by_iso->corrected.value(), 166.26336, 1e-4);
    engine.correction["specific_fuel_consumption"] = {-0.0006, -0.0003, "invented"};
    EXPECT_EQ(find(engine, reading, "specific_fuel_consumption")->corrected, by_iso->corrected) << "ISO 3046-1 alone";
    engine.consumption_correction = ConsumptionCorrection::linear;
    EXPECT_NEAR(find(engine, reading, "specific_fuel_consumption")->corrected.value(),
                168.35558 * (1.0 - 0.0006 * 15.0 - 0.0003 * 5.0), 1e-4);
}

TEST(DerivedConsumption, IsNotCorrectedWhereTheCoolantWasNotRead)
{
    Engine engine = invented_engine();
    engine.consumption_correction = ConsumptionCorrection::iso_3046;
    ReadingMaker made;
    made.number("shaft_power", 10000.0).number("fuel_consumption", 1784.0).number("fuel_lower_heating_value", 42.7);
    made.number("inlet_air_temperature", 30.0);
    const auto row = find(engine, made.done(), "specific_fuel_consumption");
    EXPECT_NEAR(row->value, 178.4, 1e-9);
    EXPECT_FALSE(row->corrected);
    engine.aspiration = AspirationClass::turbocharged;
    EXPECT_TRUE(find(engine, made.done(), "specific_fuel_consumption")->corrected) << "without a cooler none is needed";
}

// Air 185 to 45 °C, coolant 32 to 50 °C: effectiveness 0.915033 and 13 K over the coolant; separate calculation.
TEST(DerivedCooler, AgreesWithASeparateFigure)
{
    ReadingMaker made;
    made.number("compressor_outlet_temperature", 185.0, at_turbocharger(1));
    made.number("cooler_air_outlet_temperature", 45.0, at_cooler(1)).number("cooler_coolant_inlet_temperature", 32.0, at_cooler(1));
    made.number("cooler_coolant_outlet_temperature", 50.0, at_cooler(1));
    const Engine engine = invented_engine();
    EXPECT_NEAR(value_of(engine, made.done(), "cooler_effectiveness"), 0.915033, 5e-7);
    EXPECT_NEAR(value_of(engine, made.done(), "cooler_approach"), 13.0, 1e-9);
    EXPECT_NEAR(value_of(engine, made.done(), "cooler_coolant_rise"), 18.0, 1e-9);
    EXPECT_FALSE(find(engine, made.done(), "cooler_approach", at_cooler(1))) << "one cooler: the engine's row says it";
}

// 140 mmH2O at 3.0 bar and 313 K with 0.9 of the reference flow, reference 3.5 bar and 318 K: 150.5147 mmH2O, a separate
// calculation. The flow as p_scav/sqrt(T3): 0.9 where T3 is the baseline's over 1.1025.
TEST(DerivedReferenceFlow, TakesWeatherAndLoadOutOfADrop)
{
    ReadingMaker made;
    made.number("load_percent", 75.0).number("barometric_pressure", 1000.0, at_ship()).number("scavenge_pressure", 2.0);
    made.number("scavenge_temperature", 39.85).number("exhaust_before_turbine", 653.15 / 1.1025 - 273.15, at_turbocharger(1));
    made.number("cooler_pressure_drop", 140.0 * 0.0980665, at_cooler(1));
    const Engine engine = engine_with_baseline();
    const auto row = find(engine, made.done(), "cooler_drop_at_reference_flow");
    ASSERT_TRUE(row);
    EXPECT_NEAR(row->value, 150.5147 * 0.0980665, 1e-5);
    EXPECT_EQ(row->expected, 14.0) << "the baseline's drop at this load";
    EXPECT_NEAR(row->deviation.value(), row->value - 14.0, 1e-12);
    EXPECT_FALSE(find(invented_engine(), made.done(), "cooler_drop_at_reference_flow")) << "no baseline, no reference flow";
}

// Inlet 35 °C, 80 %, 101.3 kPa; scavenge air 3.5 bar abs and 45 °C: dew point 54.729 °C, a separate calculation (IF97).
TEST(DerivedChargeAir, DewPointAgreesWithASeparateFigure)
{
    ReadingMaker made;
    made.number("inlet_air_temperature", 35.0).number("relative_humidity", 80.0, at_ship());
    made.number("barometric_pressure", 1013.0, at_ship()).number("scavenge_pressure", 3.5 - 1.013).number("scavenge_temperature", 45.0);
    EXPECT_NEAR(value_of(invented_engine(), made.done(), "charge_air_dew_point"), 54.729, 1e-3);
}

TEST(DerivedTurbocharger, EachOfSeveralHasItsRowAndTheEngineTheMean)
{
    const Engine engine = engine_with_baseline();
    const Reading reading = air_side().done();
    for (const char* name : {"compressor_efficiency", "turbocharger_efficiency", "turbine_efficiency", "filter_drop_at_reference_flow"}) {
        const double first = value_of(engine, reading, name, at_turbocharger(1)), second = value_of(engine, reading, name, at_turbocharger(2));
        EXPECT_NEAR(value_of(engine, reading, name), (first + second) / 2.0, 1e-12) << name;
        EXPECT_NE(first, second) << name;
    }
    EXPECT_NEAR(value_of(engine, reading, "turbine_efficiency", at_turbocharger(1)),
                value_of(engine, reading, "turbocharger_efficiency", at_turbocharger(1)) /
                    value_of(engine, reading, "compressor_efficiency", at_turbocharger(1)), 1e-12);
    EXPECT_NEAR(value_of(engine, reading, "cooler_approach", at_cooler(2)), 10.0, 1e-12);
    EXPECT_NEAR(value_of(engine, reading, "cooler_approach"), 9.5, 1e-12);
}

// Baseline and reading invented: at a ratio of 2.95 the baseline runs 10500 1/min; the reading needs one per cent more.
TEST(DerivedTurbocharger, SpeedIsComparedAtTheSamePressureRatio)
{
    Engine engine = invented_engine();
    engine.reference.barometer = bar_absolute(1.0);
    engine.reference.inlet_air = celsius(25.0);
    engine.baseline = {{50.0, "", {{"scavenge_pressure", 1.4}, {"turbocharger_speed", 9000.0}}},
                       {75.0, "", {{"scavenge_pressure", 2.5}, {"turbocharger_speed", 12000.0}}}};
    ReadingMaker made;
    made.number("load_percent", 70.0).number("inlet_air_temperature", 30.0);
    made.number("barometric_pressure", 1013.0, at_ship()).number("scavenge_pressure", 1.95 * 1.013);
    made.number("turbocharger_speed", 10605.0 * std::sqrt(303.15 / 298.15), at_turbocharger(1));
    const auto row = find(engine, made.done(), "turbocharger_speed_at_ratio");
    ASSERT_TRUE(row);
    EXPECT_NEAR(row->value, 1.0, 1e-9);
    EXPECT_TRUE(row->uncertainty);
    ReadingMaker beyond;
    beyond.number("load_percent", 70.0).number("inlet_air_temperature", 30.0);
    beyond.number("barometric_pressure", 1013.0, at_ship()).number("scavenge_pressure", 4.5);
    beyond.number("turbocharger_speed", 15000.0, at_turbocharger(1));
    EXPECT_FALSE(find(engine, beyond.done(), "turbocharger_speed_at_ratio")) << "no load of the baseline has this ratio";
}

// ASTM D341 worked out separately (bc): through 380 mm²/s at 50 °C and 15 mm²/s at 125 °C, 13 mm²/s at 130.5 °C.
TEST(DerivedFuel, TheTemperatureForTheInjectionFollowsFromTwoViscosities)
{
    ReadingMaker made;
    made.number("fuel_viscosity_50", 380.0).number("fuel_viscosity", 15.0).number("fuel_temperature", 125.0);
    EXPECT_NEAR(value_of(invented_engine(), made.done(), "fuel_injection_temperature"), 130.52, 0.05);
    ReadingMaker thin;
    thin.number("fuel_viscosity_50", 4.0).number("fuel_viscosity", 3.0).number("fuel_temperature", 60.0);
    EXPECT_FALSE(find(invented_engine(), thin.done(), "fuel_injection_temperature")) << "a distillate is not heated";
}

TEST(DerivedFuel, SoundingsStandInForAMeterWithTheirOwnUncertainty)
{
    ReadingMaker metered, sounded;
    for (ReadingMaker* made : {&metered, &sounded})
        made->number("shaft_power", 8000.0).number("fuel_lower_heating_value", 42.7);
    metered.number("fuel_consumption", 1400.0).number("fuel_consumption_sounded", 1500.0);
    sounded.number("fuel_consumption_sounded", 1400.0);
    const auto by_meter = find(invented_engine(), metered.done(), "specific_fuel_consumption"),
               by_tank = find(invented_engine(), sounded.done(), "specific_fuel_consumption");
    ASSERT_TRUE(by_meter && by_tank);
    EXPECT_NEAR(by_meter->value, 175.0, 1e-9);
    EXPECT_NEAR(by_tank->value, 175.0, 1e-9);
    EXPECT_GT(by_tank->uncertainty.value(), by_meter->uncertainty.value());
}

TEST(DerivedCylinders, MeanPressureIsThatOfAllOrOfNone)
{
    const Engine engine = invented_engine();
    ReadingMaker made;
    made.cylinders("mean_indicated_pressure", {16.0, 16.2, 15.9, 16.1, 16.3});
    EXPECT_FALSE(find(engine, made.done(), "mean_indicated_pressure"));
    made.number("mean_indicated_pressure", 15.5, Place::cylinder(6));
    const auto row = find(engine, made.done(), "mean_indicated_pressure");
    EXPECT_NEAR(row->value, 16.0, 1e-12);
    EXPECT_NEAR(row->uncertainty.value(), 0.03 * 16.0, 1e-6) << "one indicator: 3 % of the mean, it does not average out";
}

namespace {

/// The same reading with every number moved as its instrument may be wrong: normal, two sigma the half-width.
Reading disturbed(const Engine& engine, const Reading& reading, std::mt19937_64& random)
{
    std::normal_distribution<double> normal;
    Reading moved = reading;
    const Conditions conditions = find_conditions(engine, reading);
    for (Value& value : moved.values) {
        const auto own = own_value(value, conditions);
        const auto half = own ? instrument_uncertainty(engine, quantity(value.quantity), own->value) : std::nullopt;
        if (!half)
            continue;
        value.number = *value.number + *half / 2.0 * normal(random);
        value.value_si = unit(value.unit).to_si(*value.number);
    }
    return moved;
}

/// Twice the standard deviation of a derived number over many disturbed readings.
double two_sigma(const Engine& engine, const Reading& reading, std::string_view name, bool corrected)
{
    constexpr int draws = 20000;
    const Baseline baseline(engine);
    std::mt19937_64 random(20240607);
    double sum = 0.0, squares = 0.0;
    int count = 0;
    for (int i = 0; i < draws; ++i) {
        const Reading moved = disturbed(engine, reading, random);
        const DerivedReading of(engine, baseline, moved);
        DerivedInputs inputs(of);
        const auto row = derive_one(inputs, *find_derived(name), Place::engine());
        if (!row || (corrected && !row->corrected))
            continue;
        const double value = corrected ? *row->corrected : row->value;
        sum += value;
        squares += value * value;
        ++count;
    }
    EXPECT_GT(count, draws * 95 / 100) << name;
    return 2.0 * std::sqrt(squares / count - sum * sum / count / count);
}

} // namespace

// JCGM 101:2008: the law of propagation against draws from the inputs' distributions. One turbocharger and one cooler,
// so that no mean over instruments stands between (its inputs move together by rule). Tolerance 3 %: twice the standard
// error of a standard deviation of 20000 draws is 1 %, the rest is curvature.
TEST(DerivedUncertainty, AgreesWithMonteCarlo)
{
    Engine engine = engine_with_baseline();
    engine.baseline.push_back(engine.baseline.front());
    engine.baseline.back().load_percent = 100.0;
    for (auto& [name, value] : engine.baseline.back().values)
        value *= 1.2;
    engine.consumption_correction = ConsumptionCorrection::iso_3046;
    ReadingMaker made;
    made.number("load_percent", 80.0).number("speed", 99.0).number("shaft_power", 9450.0);
    made.number("fuel_consumption", 1650.0).number("fuel_lower_heating_value", 42.2);
    made.number("inlet_air_temperature", 32.0).number("relative_humidity", 75.0, at_ship());
    made.number("barometric_pressure", 1008.0, at_ship()).number("scavenge_pressure", 2.5).number("scavenge_temperature", 44.0);
    made.number("exhaust_receiver_pressure", 2.3).number("exhaust_before_turbine", 392.0, at_turbocharger(1));
    made.number("compressor_outlet_temperature", 176.0, at_turbocharger(1)).number("exhaust_back_pressure", 25.0, at_turbocharger(1));
    made.number("air_filter_pressure_drop", 10.0, at_turbocharger(1)).number("cooler_pressure_drop", 16.0, at_cooler(1));
    made.number("cooler_coolant_inlet_temperature", 31.0, at_cooler(1));
    const Reading reading = made.done();
    for (const char* name : {"compressor_efficiency", "turbocharger_efficiency", "turbine_efficiency", "cooler_effectiveness",
                             "cooler_drop_at_reference_flow", "light_running_margin", "charge_air_dew_point"}) {
        const auto row = find(engine, reading, name);
        ASSERT_TRUE(row && row->uncertainty) << name;
        EXPECT_NEAR(*row->uncertainty / two_sigma(engine, reading, name, false), 1.0, 0.03) << name;
    }
    const auto consumption = find(engine, reading, "specific_fuel_consumption");
    EXPECT_NEAR(*consumption->uncertainty / two_sigma(engine, reading, "specific_fuel_consumption", true), 1.0, 0.03);
}
