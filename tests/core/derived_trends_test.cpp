// SPDX-License-Identifier: GPL-3.0-or-later
// Derived quantities over time: trended with their band as typed ones are. Readings are invented.
#include "core/derived/derived.h"
#include "core/trend/drift_catalogue.h"
#include "core/trend/judgement.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

#include <algorithm>

using namespace evenstroke;

namespace {

/// Three years with what the air side needs, air after the compressor a little warmer from reading to reading.
EngineRecord with_air_side(double rise_per_month)
{
    EngineRecord record = example_record(36);
    for (std::size_t i = 0; i < record.readings.size(); ++i) {
        const double wobble = static_cast<double>((i * 7) % 5) - 2.0;
        const double outlet = 178.0 + wobble + rise_per_month * static_cast<double>(i);
        auto& values = record.readings[i].values;
        values.push_back(typed_value("compressor_outlet_temperature", Place::turbocharger(1), std::to_string(outlet)));
        values.push_back(typed_value("barometric_pressure", {Place::Kind::ship, 0}, "1010"));
        values.push_back(typed_value("fuel_lower_heating_value", Place::engine(), "42.7"));
        values.push_back(typed_value("exhaust_before_turbine", Place::engine(), std::to_string(380.0 + wobble)));
    }
    return record;
}

const Trend* trend_of(const Judgement& judgement, std::string_view name, Place place = Place::engine())
{
    return judgement.find_trend(*find_quantity(name), place);
}

} // namespace

TEST(DerivedTrends, ArePointForPointTheRowsOfDerive)
{
    const auto record = std::make_shared<const EngineRecord>(with_air_side(0.0));
    const Judgement judgement = judge(record);
    const Baseline baseline(record->engine);
    for (const DerivedQuantity& quantity : derived_catalogue()) {
        if (!quantity.trended)
            continue;
        for (const Place place : {Place::engine(), Place::cylinder(3)}) {
            const Trend* trend = judgement.find_trend(quantity.id, place);
            std::size_t at = 0;
            for (std::size_t i = 0; i < record->readings.size(); ++i)
                for (const DerivedValue& row : derive(record->engine, baseline, record->readings[i])) {
                    if (row.id != quantity.id || row.place != place)
                        continue;
                    ASSERT_TRUE(trend && at < trend->points.size()) << quantity.name;
                    EXPECT_EQ(trend->points[at].raw, row.value) << quantity.name;
                    EXPECT_EQ(trend->points[at++].reading, i) << quantity.name;
                }
            EXPECT_EQ(at, trend ? trend->points.size() : 0U) << quantity.name;
        }
    }
    ASSERT_TRUE(trend_of(judgement, "compressor_efficiency"));
    ASSERT_TRUE(trend_of(judgement, "cooler_drop_at_reference_flow"));
    EXPECT_FALSE(trend_of(judgement, "compressor_pressure_ratio")) << "shown with its reading, and not trended";
}

TEST(DerivedTrends, HaveABandAndALevelOfTheirOwn)
{
    const Judgement judgement = judge(std::make_shared<const EngineRecord>(with_air_side(0.0)));
    for (const char* name : {"compressor_efficiency", "cooler_effectiveness", "cooler_drop_at_reference_flow",
                             "cooler_temperature_difference", "specific_fuel_consumption"}) {
        const Trend* trend = trend_of(judgement, name);
        ASSERT_TRUE(trend) << name;
        EXPECT_TRUE(trend->usual_low && trend->usual_high && trend->noise) << name;
        EXPECT_EQ(trend->level, Level::quiet) << name;
        EXPECT_GE(trend->learned, trend->needed) << name;
    }
    const Trend* ratio = trend_of(judgement, "compression_pressure_ratio", Place::cylinder(2));
    ASSERT_TRUE(ratio);
    EXPECT_TRUE(ratio->usual_low && ratio->points.back().apart);
    EXPECT_TRUE(ratio->points.back().corrected) << "both pressures have coefficients";
}

/// A derived quantity that is a function of judged ones is shown, and is no second witness.
TEST(DerivedTrends, RaiseNoFlagThatTheirInputsDoNotRaise)
{
    const Judgement judgement = judge(std::make_shared<const EngineRecord>(with_air_side(0.8)));
    for (const Flag& flag : judgement.flags)
        EXPECT_FALSE(quantity(flag.quantity).name == "compressor_efficiency" || quantity(flag.quantity).name == "cooler_effectiveness");
    for (const drift::CatalogueChannel& channel : drift::channel_catalogue()) {
        const DerivedQuantity* derived = find_derived(channel.quantity);
        const bool old = channel.quantity == "specific_fuel_consumption" || channel.quantity == "cooler_temperature_difference";
        EXPECT_TRUE(!derived || !quantity(derived->id).derived() || channel.evidence == old) << channel.quantity;
    }
}
