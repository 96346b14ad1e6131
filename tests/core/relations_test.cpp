// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/relations.h"

#include "tests/core/reading_maker.h"

#include <gtest/gtest.h>

#include <algorithm>

using namespace evenstroke;
using namespace evenstroke::test;
using namespace std::chrono_literals;

namespace {

const Relation* find(const std::vector<Relation>& relations, std::string_view name)
{
    const auto found =
        std::find_if(relations.begin(), relations.end(), [&](const Relation& r) { return r.name == name; });
    return found == relations.end() ? nullptr : &*found;
}

std::vector<Relation> check(const Reading& reading)
{
    return check_relations(invented_engine(), reading, {});
}

bool says(const Reading& reading, std::string_view name)
{
    return find(check(reading), name) != nullptr;
}

Reading peaks(double maximum, double compression)
{
    return ReadingMaker()
        .number("maximum_pressure", maximum, Place::cylinder(3))
        .number("compression_pressure", compression, Place::cylinder(3))
        .done();
}

TEST(Relations, MaximumPressureBelowOrEqualToCompression)
{
    // Common practice: equal means within 2 bar.
    EXPECT_FALSE(says(peaks(112.1, 110), "maximum_equals_compression"));
    EXPECT_TRUE(says(peaks(112, 110), "maximum_equals_compression"));
    EXPECT_TRUE(says(peaks(108, 110), "maximum_equals_compression"));
    EXPECT_FALSE(says(peaks(108, 110), "maximum_below_compression"));
    EXPECT_TRUE(says(peaks(107.9, 110), "maximum_below_compression"));
    EXPECT_FALSE(says(peaks(107.9, 110), "maximum_equals_compression"));
}

TEST(Relations, NameTheBoxesTheySpeakOf)
{
    const auto relations = check(peaks(90, 110));
    const Relation* relation = find(relations, "maximum_below_compression");
    ASSERT_NE(relation, nullptr);
    EXPECT_TRUE(concerns(*relation, *find_quantity("maximum_pressure"), Place::cylinder(3)));
    EXPECT_TRUE(concerns(*relation, *find_quantity("compression_pressure"), Place::cylinder(3)));
    EXPECT_FALSE(concerns(*relation, *find_quantity("maximum_pressure"), Place::cylinder(2)));
    EXPECT_NE(relation->sentence.find("Cylinder 3: maximum pressure 90.0 bar is lower than 110.0 bar"),
              std::string::npos)
        << relation->sentence;
    EXPECT_FALSE(relation->impossible);
}

TEST(Relations, OneSentenceSpeaksForSeveralCylinders)
{
    const Reading reading = ReadingMaker()
                                .cylinders("maximum_pressure", {90, 91, 140})
                                .cylinders("compression_pressure", {110, 111, 112})
                                .done();
    const auto relations = check(reading);
    const Relation* relation = find(relations, "maximum_below_compression");
    ASSERT_NE(relation, nullptr);
    EXPECT_EQ(relation->sentence.find("Cylinders 1 and 2: "), 0u) << relation->sentence;
}

TEST(Relations, ExhaustMustCoolInTheTurbine)
{
    const auto with = [](double before, double after) {
        return ReadingMaker()
            .number("exhaust_before_turbine", before, at_turbocharger(1))
            .number("exhaust_after_turbine", after, at_turbocharger(1))
            .done();
    };
    EXPECT_FALSE(says(with(380, 379), "turbine_not_cooling"));
    EXPECT_TRUE(says(with(380, 380), "turbine_not_cooling"));
    EXPECT_TRUE(says(with(260, 380), "turbine_not_cooling"));
    const Reading common = ReadingMaker()
                               .number("exhaust_before_turbine", 380)
                               .number("exhaust_after_turbine", 390, at_turbocharger(2))
                               .done();
    EXPECT_TRUE(says(common, "turbine_not_cooling")) << "a value for the engine stands for all turbochargers";
}

TEST(Relations, ScavengeAirCannotBeColderThanItsCoolant)
{
    const auto with = [](double scavenge) {
        return ReadingMaker()
            .number("scavenge_temperature", scavenge)
            .number("cooler_coolant_inlet_temperature", 32, at_cooler(1))
            .number("cooler_coolant_inlet_temperature", 34, at_cooler(2))
            .done();
    };
    EXPECT_FALSE(says(with(32), "scavenge_below_coolant"));
    const auto warned = check(with(31.9));
    ASSERT_NE(find(warned, "scavenge_below_coolant"), nullptr);
    EXPECT_FALSE(find(warned, "scavenge_below_coolant")->impossible);
    EXPECT_FALSE(find(check(with(27)), "scavenge_below_coolant")->impossible)
        << "5 °C are left to the instruments";
    EXPECT_TRUE(find(check(with(26.9)), "scavenge_below_coolant")->impossible);
}

TEST(Relations, JacketWaterMustWarmUnderLoad)
{
    const auto with = [](double outlet) {
        return ReadingMaker()
            .number("jacket_inlet_temperature", 72)
            .number("jacket_outlet_temperature", outlet, Place::cylinder(5));
    };
    EXPECT_FALSE(says(with(72.1).done(), "jacket_not_warming"));
    EXPECT_TRUE(says(with(72).done(), "jacket_not_warming"));
    EXPECT_FALSE(says(with(72).number("load_percent", 0).done(), "jacket_not_warming"));
}

TEST(Relations, CompressorMustWarmItsAirWhenItWorks)
{
    const auto with = [](double outlet, double scavenge) {
        return ReadingMaker()
            .number("inlet_air_temperature", 35)
            .number("scavenge_pressure", scavenge)
            .number("compressor_outlet_temperature", outlet, at_turbocharger(1))
            .done();
    };
    EXPECT_FALSE(says(with(35.1, 2.0), "compressor_not_warming"));
    EXPECT_TRUE(says(with(35, 2.0), "compressor_not_warming"));
    EXPECT_TRUE(says(with(35, 0.31), "compressor_not_warming"));
    EXPECT_FALSE(says(with(35, 0.30), "compressor_not_warming"));
}

TEST(Relations, LoadAndShaftPowerMayDifferByThreePercent)
{
    // 12 000 kW rated: 75 % is 9000 kW.
    const auto with = [](double power) {
        return ReadingMaker().number("load_percent", 75).number("shaft_power", power).done();
    };
    EXPECT_FALSE(says(with(9000 / 1.03), "load_against_power"));
    EXPECT_TRUE(says(with(9000 / 1.0301), "load_against_power"));
    EXPECT_FALSE(says(with(9000 / 0.97), "load_against_power"));
    EXPECT_TRUE(says(with(9000 / 0.9699), "load_against_power"));
}

TEST(Relations, IndicatedPowerTimesEfficiencyMayDifferByFivePercentFromShaftPower)
{
    Engine engine = invented_engine();
    engine.cylinders = 2;
    const auto found = [&](double shaft) {
        const Reading reading =
            ReadingMaker().cylinders("indicated_power", {1000, 1000}).number("shaft_power", shaft).done();
        return find(check_relations(engine, reading, {}), "indicated_against_shaft") != nullptr;
    };
    EXPECT_FALSE(found(1000)) << "nothing is said while the mechanical efficiency is not known";
    engine.mechanical_efficiency = 0.95; // 1900 kW at the shaft
    EXPECT_FALSE(found(1900 / 1.05));
    EXPECT_TRUE(found(1900 / 1.0501));
    EXPECT_FALSE(found(1900 / 0.95));
    EXPECT_TRUE(found(1900 / 0.9499));
}

TEST(Relations, MeanIndicatedPressureGivesTheIndicatedPower)
{
    // p_mi 18 bar * pi/4 * (0.6 m)^2 * 2.4 m * 100/60 1/s = 2035.8 kW a cylinder, 12 214.5 kW for six.
    Engine engine = invented_engine();
    engine.mechanical_efficiency = 1.0;
    const auto found = [&](double shaft) {
        const Reading reading = ReadingMaker()
                                    .cylinders("mean_indicated_pressure", {18, 18, 18, 18, 18, 18})
                                    .number("speed", 100)
                                    .number("shaft_power", shaft)
                                    .done();
        return find(check_relations(engine, reading, {}), "indicated_against_shaft") != nullptr;
    };
    EXPECT_FALSE(found(12214.5));
    EXPECT_FALSE(found(12214.5 / 1.049));
    EXPECT_TRUE(found(12214.5 / 1.051));
    const Reading one_missing = ReadingMaker()
                                    .cylinders("mean_indicated_pressure", {18, 18, 18, 18, 18})
                                    .number("speed", 100)
                                    .number("shaft_power", 5000)
                                    .done();
    EXPECT_EQ(find(check_relations(engine, one_missing, {}), "indicated_against_shaft"), nullptr);
}

TEST(Relations, FuelConsumptionIsHeldAgainstPowerAndHeatingValue)
{
    const auto with = [](double grams_per_kwh, double heating_value) {
        return ReadingMaker()
            .number("shaft_power", 10000)
            .number("fuel_consumption", grams_per_kwh * 10)
            .number("fuel_lower_heating_value", heating_value)
            .done();
    };
    EXPECT_FALSE(says(with(150, 42.7), "fuel_against_power"));
    EXPECT_TRUE(says(with(149.9, 42.7), "fuel_against_power"));
    EXPECT_FALSE(says(with(260, 42.7), "fuel_against_power"));
    EXPECT_TRUE(says(with(260.1, 42.7), "fuel_against_power"));
    // Methanol, about 19.9 MJ/kg: twice the mass is right. 380 * 19.9 / 42.7 = 177 g/kWh of usual fuel.
    EXPECT_FALSE(says(with(380, 19.9), "fuel_against_power"));
    // First law: 3600 / 42.7 = 84.3 g/kWh.
    EXPECT_FALSE(find(check(with(84.4, 42.7)), "fuel_against_power")->impossible);
    EXPECT_TRUE(find(check(with(84.2, 42.7)), "fuel_against_power")->impossible);
}

TEST(Relations, FuelConsumptionSaysWhenTheHeatingValueIsNotNoted)
{
    const Reading reading = ReadingMaker()
                                .number("load_percent", 50)
                                .number("fuel_consumption", 2400)
                                .done(); // 400 g/kWh of 6000 kW
    const auto relations = check(reading);
    const Relation* relation = find(relations, "fuel_against_power");
    ASSERT_NE(relation, nullptr);
    EXPECT_NE(relation->sentence.find("Heating value not noted"), std::string::npos);
    EXPECT_TRUE(concerns(*relation, *find_quantity("load_percent"), Place::engine()));
}

TEST(Relations, AllCylindersAlikeAreAskedAbout)
{
    const auto alike = ReadingMaker().cylinders("exhaust_temperature", {350, 350, 350, 350, 350, 350}).done();
    EXPECT_TRUE(says(alike, "cylinders_identical"));
    const auto one_differs =
        ReadingMaker().cylinders("exhaust_temperature", {350, 350, 350, 350, 350, 351}).done();
    EXPECT_FALSE(says(one_differs, "cylinders_identical"));
    const auto one_missing =
        ReadingMaker().cylinders("exhaust_temperature", {350, 350, 350, 350, 350}).done();
    EXPECT_FALSE(says(one_missing, "cylinders_identical"));
    const auto setting = ReadingMaker().cylinders("injection_timing_offset", {0, 0, 0, 0, 0, 0}).done();
    EXPECT_FALSE(says(setting, "cylinders_identical")) << "settings stand alike on purpose";
}

TimePoint day(int number)
{
    return TimePoint{} + std::chrono::hours(24 * number);
}

std::vector<Reading> months_with_ratio(double compression)
{
    std::vector<Reading> readings;
    for (int month = 0; month < 6; ++month)
        readings.push_back(ReadingMaker(day(30 * month))
                               .number("barometric_pressure", 1000, at_ship())
                               .number("scavenge_pressure", 2.0)
                               .cylinders("compression_pressure",
                                          {compression, compression + 1, compression + 2, compression})
                               .done());
    return readings;
}

TEST(Relations, CompressionRatioIsHeldAgainstTheCylindersOwnHabit)
{
    // 119 bar gauge and 2 bar gauge at 1000 mbar: 120 / 3 = 40 absolute.
    const std::vector<Reading> earlier = months_with_ratio(119);
    const auto now_with = [&](double compression) {
        return check_relations(invented_engine(),
                               ReadingMaker(day(200))
                                   .number("barometric_pressure", 1000, at_ship())
                                   .number("scavenge_pressure", 2.0)
                                   .cylinders("compression_pressure", {compression, 120, 121, 119})
                                   .done(),
                               {earlier, {}, {}});
    };
    EXPECT_EQ(find(now_with(113.01), "compression_ratio"), nullptr); // 114.01 / 120 = -4.99 %
    const auto low = now_with(112.9);                                // -5.08 %
    ASSERT_NE(find(low, "compression_ratio"), nullptr);
    EXPECT_TRUE(concerns(*find(low, "compression_ratio"), *find_quantity("compression_pressure"),
                         Place::cylinder(1)));
    EXPECT_EQ(find(check_relations(invented_engine(),
                                   ReadingMaker(day(200))
                                       .number("barometric_pressure", 1000, at_ship())
                                       .number("scavenge_pressure", 2.0)
                                       .cylinders("compression_pressure", {100})
                                       .done(),
                                   {std::span(earlier).first(4), {}, {}}),
                   "compression_ratio"),
              nullptr)
        << "four readings are no habit";
}

TEST(Relations, CompressionRatioOffAtMostCylindersPointsToTheScavengePressure)
{
    // The gauge pressure written as absolute: 2.0 bar abs is 1.0 bar gauge.
    const std::vector<Reading> earlier = months_with_ratio(119);
    const Reading slipped = ReadingMaker(day(200))
                                .number("barometric_pressure", 1000, at_ship())
                                .typed("scavenge_pressure", "2,0 bar abs")
                                .cylinders("compression_pressure", {119, 120, 121, 119})
                                .done();
    const auto relations = check_relations(invented_engine(), slipped, {earlier, {}, {}});
    const Relation* relation = find(relations, "compression_ratio_of_all");
    ASSERT_NE(relation, nullptr);
    EXPECT_TRUE(concerns(*relation, *find_quantity("scavenge_pressure"), Place::engine()));
    EXPECT_EQ(find(relations, "compression_ratio"), nullptr);
}

TEST(Relations, TimesBeforeTheLastReadingOrStillToComeAreNamed)
{
    const std::vector<Reading> earlier{ReadingMaker(day(10)).number("load_percent", 70).done()};
    const auto at = [&](TimePoint taken) {
        return check_relations(invented_engine(), ReadingMaker(taken).done(), {earlier, {}, day(40)});
    };
    EXPECT_NE(find(at(day(10) - 1s), "time_before_previous"), nullptr);
    EXPECT_EQ(find(at(day(10)), "time_before_previous"), nullptr);
    EXPECT_EQ(find(at(day(40)), "time_in_future"), nullptr);
    EXPECT_NE(find(at(day(40) + 1s), "time_in_future"), nullptr);
    EXPECT_EQ(find(check_relations(invented_engine(), ReadingMaker(day(9999)).done(), {}), "time_in_future"),
              nullptr);
}

TEST(Relations, RunningHoursMayNeitherFallNorOutrunTheClock)
{
    const std::vector<Reading> earlier{ReadingMaker(day(0)).number("engine_running_hours", 10000).done(),
                                       ReadingMaker(day(5)).number("load_percent", 70).done()};
    const auto with = [&](double hours, std::span<const Event> events = {}) {
        return check_relations(invented_engine(),
                               ReadingMaker(day(10)).number("engine_running_hours", hours).done(),
                               {earlier, events, {}});
    };
    EXPECT_EQ(find(with(10000), "running_hours_fell"), nullptr);
    EXPECT_NE(find(with(9999), "running_hours_fell"), nullptr);
    EXPECT_EQ(find(with(10241), "running_hours_too_many"), nullptr)
        << "240 h passed, the counter is read to the hour";
    ASSERT_NE(find(with(10242), "running_hours_too_many"), nullptr);
    EXPECT_TRUE(find(with(10242), "running_hours_too_many")->impossible);
    Event changed;
    changed.kind = "counter_changed";
    changed.date.utc = day(7);
    EXPECT_EQ(find(with(12, std::span(&changed, 1)), "running_hours_fell"), nullptr);
}

TEST(Relations, MoreThanHalfOfAllValuesAsLastTimeLooksCopied)
{
    const std::vector<Reading> earlier{ReadingMaker(day(0))
                                           .cylinders("exhaust_temperature", {341, 352, 363, 344, 355, 366})
                                           .number("speed", 98.1)
                                           .number("load_percent", 75.2)
                                           .done()};
    const auto with = [&](std::initializer_list<double> exhaust) {
        return check_relations(invented_engine(),
                               ReadingMaker(day(30))
                                   .cylinders("exhaust_temperature", exhaust)
                                   .number("speed", 99)
                                   .number("load_percent", 76)
                                   .done(),
                               {earlier, {}, {}});
    };
    EXPECT_EQ(find(with({341, 352, 363, 344, 300, 301}), "copied_from_previous"), nullptr)
        << "four of eight is half";
    EXPECT_NE(find(with({341, 352, 363, 344, 355, 301}), "copied_from_previous"), nullptr);
}

TEST(Relations, WhatTheShipLendsIsNotCounted)
{
    const auto shared = [](TimePoint taken, double exhaust) {
        ReadingMaker maker(taken);
        for (const char* name : {"barometric_pressure", "sea_water_temperature", "draught_forward",
                                 "draught_aft", "speed_over_ground", "water_depth"})
            maker.number(name, 12, Place{Place::Kind::ship, 0});
        return maker.cylinders("exhaust_temperature", {exhaust, exhaust + 1, exhaust + 2, exhaust + 3, exhaust + 4, exhaust + 5})
            .number("speed", 98)
            .number("load_percent", 75)
            .done();
    };
    const std::vector<Reading> earlier{shared(day(0), 341)};
    EXPECT_EQ(find(check_relations(invented_engine(), shared(day(30), 351), {earlier, {}, {}}), "copied_from_previous"),
              nullptr)
        << "two of the engine's own eight are equal";
}

TEST(Relations, AnEmptyReadingSaysNothing)
{
    EXPECT_TRUE(check(Reading{}).empty());
}

} // namespace
