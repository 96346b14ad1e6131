// SPDX-License-Identifier: GPL-3.0-or-later
// Measured traces of two published test beds, where they lie beside the clone (they are not part of the project).
// A: one cylinder 104 x 85 mm, four-stroke, 1500 r/min, uncooled transducer (SustainableFuelsG12 and 4CBLB10-Group-35 on
// GitHub). B: four cylinders 95.8 x 104 mm, 1600 r/min (Engine-Test-Evaluation-and-HRR-Analysis on GitHub).
#include "core/card/evaluation.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cstdio>
#include <cstdlib>
#include <fstream>

namespace evenstroke::indicator {
namespace {

std::string data_folder()
{
    const char* given = std::getenv("EVENSTROKE_CHECK_DATA");
    return given ? given : EVENSTROKE_SOURCE_DIR "/../shared/data";
}

std::optional<Trace> load(const std::string& file)
{
    std::ifstream in(data_folder() + "/" + file);
    std::string line;
    if (!std::getline(in, line))
        return std::nullopt;
    Trace trace;
    int cycle = 0;
    double angle = 0.0, pressure = 0.0;
    while (std::getline(in, line))
        if (std::sscanf(line.c_str(), "%d,%lf,%lf", &cycle, &angle, &pressure) == 3) {
            trace.cycle.push_back(cycle);
            trace.angle.push_back(angle);
            trace.pressure.push_back(pressure);
        }
    return trace;
}

Engine four_stroke(double bore, double stroke, double rod, double ratio, double closes, double opens, double speed)
{
    Engine engine;
    engine.kind = EngineKind::four_stroke;
    engine.cylinders = 1;
    engine.bore = millimetres(bore);
    engine.stroke = millimetres(stroke);
    engine.rod_length = millimetres(rod);
    engine.compression_ratio = ratio;
    engine.cylinder_closes_deg = closes;
    engine.cylinder_opens_deg = opens;
    engine.rated_speed = per_minute(speed);
    return engine;
}
Engine bed_a() { return four_stroke(104, 85, 136.5, 21.5, -135, 149, 1500); }
Engine bed_b() { return four_stroke(95.8, 104, 158, 14.6, -140, 130, 1600); }

Conditions conditions(double speed, double intake, double closing_kelvin)
{
    Conditions known;
    known.speed = per_minute(speed);
    known.scavenge_pressure = bar_absolute(intake);
    known.charge_temperature = Temperature::from_value(closing_kelvin);
    return known;
}

const char* const a_files[] = {"mean_imep2.0_soi14", "mean_imep3.5_soi14", "mean_imep5.0_soi14",
                               "mean_imep3.5_soi17", "mean_imep3.5_soi21", "raw_20cycles_late_injection"};

class CardMeasured : public testing::Test
{
protected:
    void SetUp() override
    {
        if (!std::ifstream(data_folder() + "/four_cylinder_96x104/cylinder1_100Nm_1600rpm.csv"))
            GTEST_SKIP() << "measured traces are not in " << data_folder();
    }
    static Evaluation evaluate_a(const std::string& name)
    {
        return evaluate(bed_a(), conditions(1500, 1.022, 340), *load("single_cylinder_104x85/" + name + ".csv")).value();
    }
    static Evaluation evaluate_b(std::optional<double> fuel = {})
    {
        Conditions known = conditions(1600, 1.201, 385);
        if (fuel)
            known.fuel_heat = *fuel * si::joules;
        return evaluate(bed_b(), known, *load("four_cylinder_96x104/cylinder1_100Nm_1600rpm.csv")).value();
    }
};

bool has(const Evaluation& card, std::string_view code)
{
    return std::any_of(card.remarks.begin(), card.remarks.end(), [&](const Remark& r) { return r.code == code; });
}

} // namespace

// Plain integration with nothing taken out, as worked out beside the data: 0.1 %.
TEST_F(CardMeasured, PlainWorkAndMaximumAgreeWithPlainIntegration)
{
    const double work[] = {2.051, 3.486, 4.990, 3.427, 3.373, 4.616};
    const double maximum[] = {52.49, 56.84, 60.95, 63.20, 67.68, 40.45};
    for (std::size_t i = 0; i < std::size(a_files); ++i) {
        const Evaluation card = evaluate_a(a_files[i]);
        EXPECT_NEAR(card.plain_mean_indicated, work[i], 1e-3 * work[i]) << a_files[i];
        // The vertex of a smoothed peak, beside the largest sample: 0.15 %.
        EXPECT_NEAR(card.plain_maximum, maximum[i], 1.5e-3 * maximum[i]) << a_files[i];
    }
    const Evaluation b = evaluate_b();
    EXPECT_NEAR(b.plain_mean_indicated, 5.676, 5.7e-3);
    // Indicated power of one cylinder: 5.674 kW.
    const double swept = 749.64e-6, power = b.plain_mean_indicated * 1e5 * swept * 1600.0 / 120.0 / 1000.0;
    EXPECT_NEAR(power, 5.674, 5.7e-3);
}

TEST_F(CardMeasured, BedBIsSane)
{
    const Evaluation card = evaluate_b();
    EXPECT_LE(std::abs(card[CardResult::offset]->value), 0.8);
    EXPECT_GE(card[CardResult::zero]->value, -0.25);
    EXPECT_LE(card[CardResult::zero]->value, -0.05);
    ASSERT_TRUE(card.heat);
    EXPECT_GE(card.heat->total, 0.85 * 908.0);
    EXPECT_LE(card.heat->total, 1.15 * 908.0);
    EXPECT_GE(card.compression_exponent.value(), 1.30);
    EXPECT_LE(card.compression_exponent.value(), 1.37);
    EXPECT_NEAR(card[CardResult::maximum_pressure]->value, 69.6, 0.2);
    EXPECT_GE(card[CardResult::maximum_pressure_angle]->value, 5.0);
    EXPECT_LE(card[CardResult::maximum_pressure_angle]->value, 6.5);
    EXPECT_GE(card[CardResult::start_of_combustion]->value, -5.0);
    EXPECT_LE(card[CardResult::start_of_combustion]->value, 0.0);
    const Evaluation fuelled = evaluate_b(908.0);
    EXPECT_NEAR(fuelled.heat_over_fuel.value(), 1.0, 0.15);
}

// The beds' transducer drifts and the ratio is not what is printed: the program says so, keeps the recorded dead centre
// with 1° either way, and gives no start of combustion.
TEST_F(CardMeasured, BedAIsCalledDoubtfulAndTheUncertaintyIsCarried)
{
    for (const char* file : a_files) {
        const Evaluation card = evaluate_a(file);
        EXPECT_TRUE(has(card, "geometry_or_zero_doubtful")) << file;
        EXPECT_LE(std::abs(card[CardResult::offset]->value), 1.0) << file;
        EXPECT_GE(*card[CardResult::offset]->half_width, 0.4) << file;
        // 8 to 22 % of the work a degree on these engines.
        EXPECT_GE(*card[CardResult::mean_indicated_pressure]->half_width,
                  0.03 * card[CardResult::mean_indicated_pressure]->value) << file;
        if (card.method == CalibrationMethod::offset_assumed) {
            EXPECT_FALSE(card[CardResult::start_of_combustion]) << file;
        }
    }
}

TEST_F(CardMeasured, BedAKeepsItsOrder)
{
    const Evaluation low = evaluate_a(a_files[0]), half = evaluate_a(a_files[1]), high = evaluate_a(a_files[2]);
    const double base = low[CardResult::mean_indicated_pressure]->value;
    // 1 : 1.70 : 2.43, plain; 1 % for the digits of the three.
    EXPECT_NEAR(half[CardResult::mean_indicated_pressure]->value / base, 1.70, 0.017);
    EXPECT_NEAR(high[CardResult::mean_indicated_pressure]->value / base, 2.43, 0.024);
    const Evaluation earlier = evaluate_a(a_files[3]), earliest = evaluate_a(a_files[4]);
    const auto rises = [&](CardResult result) {
        return half[result]->value < earlier[result]->value && earlier[result]->value < earliest[result]->value;
    };
    const auto falls = [&](CardResult result) {
        return half[result]->value > earlier[result]->value && earlier[result]->value > earliest[result]->value;
    };
    EXPECT_TRUE(rises(CardResult::maximum_pressure));
    EXPECT_TRUE(falls(CardResult::maximum_pressure_angle));
    EXPECT_TRUE(falls(CardResult::ca50));
}

TEST_F(CardMeasured, TheLateCyclesAreCalledLateAndTheirHumpStandsApart)
{
    const Evaluation card = evaluate_a("raw_20cycles_late_injection");
    EXPECT_EQ(card.cycles, 20u);
    EXPECT_TRUE(has(card, "maximum_not_from_combustion"));
    ASSERT_TRUE(card.firing_peak);
    EXPECT_NEAR(card.firing_peak->angle, 27.0, 2.0);
    EXPECT_NEAR(card.firing_peak->pressure, 30.9 - 0.5, 0.8); // largest mean sample 30.9 as recorded, zero about 0.5
    ASSERT_TRUE(card.spread);
    EXPECT_NEAR(card.spread->mean_indicated, 0.064, 0.002);
    EXPECT_NEAR(card.spread->maximum, 0.04, 0.01);
}

} // namespace evenstroke::indicator
