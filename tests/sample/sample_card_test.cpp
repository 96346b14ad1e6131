// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/card_model.h"
#include "sample_vessel/cylinder_gas.h"
#include "sample_vessel/sample_vessel.h"

#include "tests/sample/csv_lines.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

using namespace evenstroke::sample;

namespace {

CardTarget sound_target()
{
    return {3.17, 107.5, 148.0, 16.7, 0.0, 98.0, 343.0};
}

std::size_t sample_at(double angle_deg)
{
    return static_cast<std::size_t>(std::lround((angle_deg + 180.0) / card_step_deg));
}

/// Slope of ln p over -ln V between two angles.
double exponent(const EngineDesign& engine, const std::vector<double>& pressures, double from, double to)
{
    return std::log(pressures[sample_at(to)] / pressures[sample_at(from)]) /
           std::log(cylinder_volume(engine, from) / cylinder_volume(engine, to));
}

} // namespace

TEST(SampleCard, ShowsTheValuesOfTheForm)
{
    const EngineDesign engine = main_engine();
    const std::vector<double> pressures = card_pressures(engine, sound_target());
    EXPECT_EQ(pressures.size(), 1440U);
    // The search stops far inside what an indicator shows (0.1 bar, 0.01 bar for the mean).
    EXPECT_NEAR(*std::max_element(pressures.begin(), pressures.end()), 148.0, 0.01);
    EXPECT_NEAR(mean_indicated_pressure(engine, pressures), 16.7, 0.001);
}

TEST(SampleCard, CompressesLikeAirWithALittleLossToTheWall)
{
    const EngineDesign engine = main_engine();
    const std::vector<double> pressures = card_pressures(engine, sound_target());
    // Compression exponents of large engines lie between 1.34 and 1.40 (common practice).
    EXPECT_GT(exponent(engine, pressures, -70.0, -20.0), 1.34);
    EXPECT_LT(exponent(engine, pressures, -70.0, -20.0), 1.40);
    EXPECT_NEAR(pressures[sample_at(engine.cylinder_closes_deg)] / sound_target().scavenge, 1.01, 0.03)
        << "the exhaust valve closes at about the pressure of the receiver";
}

TEST(SampleCard, LosesPressureLateInCompressionWhenTheRingsLeak)
{
    const EngineDesign engine = main_engine();
    CardTarget leaking = sound_target();
    leaking.compression -= 6.0;
    leaking.maximum -= 6.0;
    leaking.lost_by_leak = 6.0;
    const std::vector<double> sound = card_pressures(engine, sound_target()),
                              leaky = card_pressures(engine, leaking);
    EXPECT_NEAR(leaky[sample_at(-90.0)], sound[sample_at(-90.0)], 0.01) << "the charge is the same";
    EXPECT_LT(exponent(engine, leaky, -40.0, -10.0), exponent(engine, sound, -40.0, -10.0) - 0.005);
}

TEST(SampleCard, UsesAGasThatIsAirWhenThinAndCold)
{
    const double density = gas_density(1e5, 300.0);
    EXPECT_NEAR(density, 1.1614, 0.001); // air at 1 bar, 300 K: steam- and air-table value of many textbooks
    const GasState air = gas_state(1e5, density, 0.0);
    EXPECT_NEAR(air.temperature_k, 300.0, 1e-6);
    EXPECT_NEAR(air.isentropic_exponent, 1.400,
                0.003); // textbook value of the ideal gas; the virial adds 0.002
}

TEST(SampleCard, KeepsAWholeTraceForEveryCylinderOfTheNamedReadings)
{
    int cards = 0;
    for (const SampleFile& file : make_sample_vessel()) {
        if (file.relative_path.find("/cards/") == std::string::npos)
            continue;
        ++cards;
        const std::vector<CsvLine> lines = csv_lines(file.content);
        ASSERT_EQ(lines.size(), 721U) << file.relative_path;
        EXPECT_EQ(lines[0], (CsvLine{"crank_angle_deg", "pressure_bar"}));
        EXPECT_EQ(lines[1][0], "-180.0");
        EXPECT_EQ(lines[720][0], "179.5");
    }
    EXPECT_EQ(cards, 12);
}
