// SPDX-License-Identifier: GPL-3.0-or-later
// How good flags are on an engine like one: simulated, so the counts depend on seeds alone.
#include "core/simulation/detection_power.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

using namespace evenstroke;
using namespace evenstroke::simulation;

namespace {

Likeness example_likeness()
{
    return *likeness_of(judge(std::make_shared<EngineRecord>(example_record(30))));
}

} // namespace

TEST(DetectionPower, AnEngineIsDescribedByItsOwnReadings)
{
    const Likeness likeness = example_likeness();
    EXPECT_EQ(likeness.cylinders, static_cast<std::size_t>(example_engine().cylinders));
    EXPECT_NEAR(likeness.months_between_readings, 1.0, 0.1) << "the example is read monthly";
    EXPECT_EQ(likeness.readings, 30u);
    ASSERT_EQ(likeness.cylinder_noise.count("compression_pressure"), 1u);
    EXPECT_GT(likeness.cylinder_noise.at("compression_pressure"), 0.0);
    EXPECT_FALSE(likeness_of(judge(std::make_shared<EngineRecord>(example_record(2)))));
}

TEST(DetectionPower, CountsSoundEnginesAndEachFaultOnce)
{
    std::size_t last = 0, of = 0;
    const auto power = measure_detection_power(example_likeness(), {4, 2, 77}, [&](std::size_t done, std::size_t all) {
        last = done;
        of = all;
        return true;
    });
    ASSERT_TRUE(power);
    EXPECT_GT(power->engine_years, 10.0);
    EXPECT_LE(power->false_a_year.low, power->false_per_year());
    EXPECT_GE(power->false_a_year.high, power->false_per_year());
    EXPECT_FALSE(power->faults.empty());
    for (const FaultPower& fault : power->faults) {
        EXPECT_LE(fault.found, fault.engines) << fault_name(fault.fault);
        EXPECT_LE(fault.engines, 2u);
        EXPECT_LE(fault.share.low, fault.share.high);
        EXPECT_FALSE(fault_effect_words(fault.fault).empty());
    }
    EXPECT_EQ(last + 1, of) << "asked before each engine";
}

// Fast ring wear is three noise units a month on an engine that scatters a third of the usual, and less than a third of
// one where it scatters three times as much: the share found must differ whatever the seed.
TEST(DetectionPower, AQuietEngineShowsItsFaultsSooner)
{
    Likeness quiet = example_likeness();
    quiet.cylinder_noise = {{"compression_pressure", 0.4}, {"maximum_pressure", 0.5}, {"exhaust_temperature", 2.0}};
    quiet.engine_noise.clear();
    Likeness loud = quiet;
    for (auto& [quantity, noise] : loud.cylinder_noise)
        noise *= 9.0;
    const auto found = [](const Likeness& likeness) {
        const auto power = measure_detection_power(likeness, {1, 12, 5});
        for (const FaultPower& fault : power->faults)
            if (fault.fault == Fault::slow_ring_wear)
                return fault.found;
        return std::size_t{0};
    };
    EXPECT_GT(found(quiet), found(loud));
}

TEST(DetectionPower, ARunThatIsStoppedSaysNothing)
{
    EXPECT_FALSE(measure_detection_power(example_likeness(), {4, 2, 77}, [](std::size_t done, std::size_t) { return done < 3; }));
}
