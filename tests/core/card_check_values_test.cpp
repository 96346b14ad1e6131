// SPDX-License-Identifier: GPL-3.0-or-later
// Closed forms and worked numbers of the card's method, each with its own tolerance.
#include "core/card/calibration.h"
#include "core/card/combustion.h"
#include "core/card/curve.h"
#include "core/card/power_line.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

constexpr double pi = 3.14159265358979323846;

SliderCrank example_gear()
{
    return SliderCrank::make(millimetres(600), millimetres(2400), millimetres(2460)).value();
}

Cylinder example_cylinder()
{
    Cylinder cylinder{example_gear()};
    cylinder.compression_ratio = 19.0;
    cylinder.closes = -90.0;
    cylinder.opens = 115.0;
    cylinder.speed_rpm = 105.0;
    cylinder.wall_kelvin = 545.0;
    cylinder.closing_kelvin = 342.0;
    return cylinder;
}

std::vector<double> grid(double from, double to, double step)
{
    std::vector<double> angles;
    for (int i = 0; from + i * step <= to + 1e-9; ++i)
        angles.push_back(from + i * step);
    return angles;
}

/// A parabola that gives this pressure all over, for a mass that is not in question.
Parabola constant_pressure(double bar) { return {0.0, bar, 0.0, 0.0}; }

/// The parabola that makes `trapped_mass` this mass, whatever the zero is (mass is linear in the pressure).
Parabola for_mass(const Cylinder& cylinder, const Unknowns& x, double mass)
{
    Unknowns unread = x;
    unread[zero] = 0.0;
    const double at_one = trapped_mass(cylinder, constant_pressure(1.0), unread);
    return constant_pressure(mass / at_one + x[zero]);
}

} // namespace

// A sine over one revolution: 5π cos d exactly, whatever the rod, by the periodic sum.
TEST(CardWork, OfASineIsExactWhateverTheStep)
{
    for (const double step : {0.1, 0.5, 1.0, 5.0}) {
        std::vector<double> angle = grid(-180.0, 180.0 - step, step), pressure;
        for (const double a : angle)
            pressure.push_back(20.0 + 10.0 * std::sin(a * pi / 180.0));
        EXPECT_NEAR(weighted_sum(pressure, work_weights(example_gear(), angle, step, 0.0)), 15.70796327, 5e-9) << step;
        EXPECT_NEAR(weighted_sum(pressure, work_weights(example_gear(), angle, step, 0.0)), 5.0 * pi, 1e-12) << step;
        EXPECT_NEAR(weighted_sum(pressure, work_weights(example_gear(), angle, step, 2.0)), 5.0 * pi * std::cos(2.0 * pi / 180.0), 1e-12);
    }
    const std::vector<double> angle = grid(-180.0, 179.5, 0.5);
    std::vector<double> pressure;
    for (const double a : angle)
        pressure.push_back(20.0 + 10.0 * std::sin(a * pi / 180.0));
    EXPECT_NEAR(polygon_pressure(example_gear(), angle, pressure, 0.0), 15.707763897, 1e-9); // half of the last digit known
}

namespace {

struct DualCycle
{
    double ratio, rise, cut_off, compression, expansion, charge;
};

/// p dV of the dual cycle traced against crank angle; a second point at dead centre for the step of pressure.
double traced_work(const DualCycle& cycle, double step)
{
    const SliderCrank gear = example_gear();
    const double clearance = gear.clearance_volume(cycle.ratio).value().value();
    const double big = clearance * cycle.ratio, top = cycle.charge * std::pow(cycle.ratio, cycle.compression);
    const double after_cut_off = clearance * cycle.cut_off;
    std::vector<double> angle, pressure;
    const auto count = static_cast<int>(std::lround(360.0 / step));
    for (int i = 0; i <= count; ++i) {
        const double at = -180.0 + i * step;
        const double v = gear.volume(at * pi / 180.0, clearance);
        const bool dead_centre = std::abs(at) < 1e-9;
        if (at < 1e-9) {
            angle.push_back(at);
            pressure.push_back(cycle.charge * std::pow(big / v, cycle.compression));
        }
        if (at > -1e-9) {
            angle.push_back(dead_centre ? 0.0 : at);
            pressure.push_back(v <= after_cut_off ? cycle.rise * top
                                                  : cycle.rise * top * std::pow(after_cut_off / v, cycle.expansion));
        }
    }
    return polygon_pressure(gear, angle, pressure, 0.0);
}

} // namespace

// Air-standard dual cycle, ratio 16, rise 1.5, cut-off 1.6, γ 1.4, 1 bar: 9.170447127 bar in closed form. The polygon's
// own error at each step is part of the numbers.
TEST(CardWork, OfTheDualCycleFollowsTheClosedForm)
{
    const DualCycle dual{16.0, 1.5, 1.6, 1.4, 1.4, 1.0};
    EXPECT_NEAR(traced_work(dual, 1.0), 9.17157839, 9.17 * 2e-4);
    EXPECT_NEAR(traced_work(dual, 0.5), 9.17062836, 9.17 * 3e-5);
    EXPECT_NEAR(traced_work(dual, 0.1), 9.17044324, 9.17 * 1e-6);
    EXPECT_NEAR(traced_work(dual, 0.1), 9.170447127, 9.17 * 1e-5);
    // Diesel cycle, ratio 18, cut-off 2: 7.437505529 bar; the corner at cut-off costs the polygon up to 1e-5.
    EXPECT_NEAR(traced_work({18.0, 1.0, 2.0, 1.4, 1.4, 1.0}, 0.1), 7.437505529, 7.44 * 2e-5);
    // Different exponents, 3 bar: 25.379421 bar by areas.
    EXPECT_NEAR(traced_work({16.0, 1.25, 1.8, 1.36, 1.28, 3.0}, 0.1), 25.379421, 25.4 * 2e-5);
}

// A polytropic compression recorded 0.7° late and 0.4 bar high comes back to the last digit.
TEST(CardPowerLine, FindsOffsetZeroAndExponentOfAPolytrope)
{
    const SliderCrank gear = example_gear();
    const double clearance = gear.clearance_volume(19.0).value().value();
    const double start = gear.volume(-90.0 * pi / 180.0, clearance);
    const std::vector<double> angle = grid(-60.0, -10.0, 0.5);
    std::vector<double> pressure;
    for (const double a : angle)
        pressure.push_back(3.723 * std::pow(start / gear.volume((a - 0.7) * pi / 180.0, clearance), 1.36) + 0.4);
    const auto line = fit_power_line(gear, clearance, angle, pressure, 0.03, {});
    ASSERT_TRUE(line && line->converged);
    EXPECT_NEAR(line->offset, 0.7, 1e-6);
    EXPECT_NEAR(line->zero, 0.4, 1e-6);
    EXPECT_NEAR(line->exponent, 1.36, 1e-6);
    EXPECT_NEAR(line->pressure(clearance), 113.572758, 113.6e-6);
}

// The model's own compression: 3.723 bar at -90°, 1.76492479 kg, wall loss 1.2 times Woschni's.
TEST(CardUnfiredLine, FollowsTheCalculatedCompression)
{
    const Cylinder cylinder = example_cylinder();
    const WallLoss walls(cylinder);
    Unknowns x{0.0, 0.0, 1.2, 0.0, 0.0, 342.0, 0.0};
    const Parabola closing = for_mass(cylinder, x, 1.76492479);
    std::vector<double> fine = grid(-89.95, 0.0, 0.05); // the midpoint rule's error falls with the square
    const auto line = carry_line(cylinder, walls, x, closing, -90.0, std::log(3.723), fine);
    const auto at = [&](double angle) {
        return std::exp(line[static_cast<std::size_t>(std::lround((angle + 89.95) / 0.05))]);
    };
    const double pressures[][2] = {{-60, 7.988697},   {-30, 30.717216}, {-15, 75.089351},
                                   {-10, 97.788413}, {-5, 117.982131}, {0, 126.170755}};
    for (const auto& [angle, bar] : pressures)
        EXPECT_NEAR(at(angle), bar, 1e-5 * bar) << angle;
    const UnfiredBalance balance(cylinder, walls, cylinder.clearance(19.0), 1.76492479, 1.2);
    EXPECT_NEAR(balance.slope(0.0, at(0.0), std::log(at(0.0))).kelvin, 899.610, 0.02); // 1e-5 and the table's last digit
    EXPECT_NEAR(balance.slope(-60.0, at(-60.0), std::log(at(-60.0))).kelvin, 428.672, 0.01);
    x[wall_loss] = 0.0;
    const auto without = carry_line(cylinder, walls, x, closing, -90.0, std::log(3.723), fine);
    EXPECT_NEAR(std::exp(without.back()), 125.9385, 126e-5);
}

// The same, sampled at 0.5° with 0.7° and 0.4 bar added: d 0.7012, z 0.3994, α 1.190, p_comp 126.1771 (the trapezoidal
// rule's error is in them; hold d to 0.003°).
TEST(CardCalibration, FindsOffsetAndZeroOfTheCalculatedCompression)
{
    const Cylinder cylinder = example_cylinder();
    const WallLoss walls(cylinder);
    const Unknowns truth{0.7, 0.4, 1.2, 0.0, 0.0, 342.0, 0.0};
    const std::vector<double> recorded = grid(-69.5, -4.5, 0.5);
    std::vector<double> true_angle, pressure;
    for (const double a : recorded)
        true_angle.push_back(a - 0.7);
    for (const double log_pressure :
         carry_line(cylinder, walls, truth, for_mass(cylinder, truth, 1.76492479), -90.0, std::log(3.723), true_angle))
        pressure.push_back(std::exp(log_pressure) + 0.4);
    Beliefs beliefs;
    beliefs[zero] = {0.4, 0.2, false};
    beliefs[wall_loss] = {1.2, 0.6, false};
    beliefs[ratio].held = beliefs[drift].held = true;
    beliefs[closing] = {342.0, {}, true};
    const CompressionWindow window{recorded, pressure, 0.03, for_mass(cylinder, truth, 1.76492479)};
    const auto fit = calibrate(cylinder, walls, window, beliefs, {0.0, 0.4, 1.2, 0.0, 0.0, 342.0, 0.0});
    ASSERT_TRUE(fit && fit->converged);
    EXPECT_NEAR(fit->values[offset], 0.7012, 0.003);
    EXPECT_NEAR(fit->values[zero], 0.3994, 0.005); // goes with the offset: 0.003° is 0.004 bar
    EXPECT_NEAR(fit->values[wall_loss], 1.190, 0.1);
    const LineEnd end = line_end(cylinder, walls, window, fit->values);
    const double dead_centre = 0.0;
    const auto top = carry_line(cylinder, walls, fit->values, window.closing_pressure, end.angle, end.log_pressure,
                                std::span(&dead_centre, 1));
    EXPECT_NEAR(std::exp(top.front()), 126.1771, 0.01);
}

TEST(CardPeak, IsTheVertexOfAParabolaAndTheSlopeOfACubicIsExact)
{
    const std::vector<double> angle = grid(-40.0, 60.0, 0.5);
    std::vector<double> peak, cubic;
    for (const double a : angle) {
        peak.push_back(170.0 - 0.15 * (a - 11.23) * (a - 11.23));
        cubic.push_back(2.0 + 3.0 * a - 1e-3 * a * a * a);
    }
    const auto found = find_peak(angle, peak, 0.0);
    ASSERT_TRUE(found);
    EXPECT_NEAR(found->pressure, 170.0, 1e-9);
    EXPECT_NEAR(found->angle, 11.23, 1e-9);
    const auto rise = steepest_rise(angle, cubic, 0.5, 0.0);
    ASSERT_TRUE(rise);
    EXPECT_NEAR(rise->value, 3.0, 1e-9); // steepest at 0°: 3 bar a degree
}

// A Wiebe function of form 1, a 6.908, 50° long: 6.174941, 15.838227 and 28.867002°. Straight lines between samples 0.1°
// apart and the curve's bend leave 1e-4°.
TEST(CardHeat, SharesOfAWiebeFunctionAreFound)
{
    HeatRelease heat;
    for (const double a : grid(0.0, 80.0, 0.1)) {
        heat.angle.push_back(a);
        heat.fuel.push_back((1.0 - std::exp(-6.908 * (a / 50.0) * (a / 50.0))) / fuel_heat);
    }
    heat.total = 1.0;
    EXPECT_NEAR(angle_of_share(heat, 0.1).value(), 6.174941, 2e-4);
    EXPECT_NEAR(angle_of_share(heat, 0.5).value(), 15.838227, 2e-4);
    EXPECT_NEAR(angle_of_share(heat, 0.9).value(), 28.867002, 2e-4);
}

// Constant γ: γ/(γ-1) p dV + 1/(γ-1) V dp along pV^1.4 is no heat; the trapezoidal rule leaves 4e-6 of the work.
TEST(CardHeat, AnAdiabatReleasesNone)
{
    const SliderCrank gear = example_gear();
    const double clearance = gear.clearance_volume(19.0).value().value();
    double heat = 0.0, work = 0.0, v_before = 0.0, p_before = 0.0;
    for (const double a : grid(-90.0, 0.0, 0.1)) {
        const double v = gear.volume(a * pi / 180.0, clearance), p = std::pow(0.5 / v, 1.4);
        if (v_before > 0.0) {
            heat += (1.4 * 0.5 * (p + p_before) * (v - v_before) + 0.5 * (v + v_before) * (p - p_before)) / 0.4;
            work += 0.5 * (p + p_before) * (v - v_before);
        }
        v_before = v;
        p_before = p;
    }
    EXPECT_LT(std::abs(heat), 4e-6 * std::abs(work));
}

// Through the real evaluation: an unfired compression and expansion without wall loss takes up no heat. What the fit
// takes from 100 kJ of work is the trapezoid's error at 0.5°.
TEST(CardHeat, AnUnfiredCycleWithoutLossReleasesNone)
{
    const Cylinder cylinder = example_cylinder();
    const WallLoss walls(cylinder);
    const Unknowns x{0.0, 0.0, 0.0, 0.0, 0.0, 342.0, 0.0};
    const Parabola closing = for_mass(cylinder, x, 1.76492479);
    const std::vector<double> angle = grid(-90.0, 115.0, 0.5);
    std::vector<double> pressure;
    for (const double log_pressure : carry_line(cylinder, walls, x, closing, -90.0, std::log(3.723), angle))
        pressure.push_back(std::exp(log_pressure));
    HeatInputs inputs{angle, pressure, 1.76492479, std::nullopt, 0.0};
    const auto heat = release_heat(cylinder, walls, x, inputs);
    ASSERT_TRUE(heat);
    const double work = 1.0e5 * 3.7; // J, about what the compression takes
    for (const double net : heat->net)
        EXPECT_LT(std::abs(net), 1e-3 * work);
    EXPECT_NEAR(heat->dead_centre_kelvin.value(), 898.0, 5.0);
}

} // namespace evenstroke::indicator
