// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/combustion.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

constexpr double coldest = 220.0, hottest = 3100.0; // K, of the property look-up

/// Volume and pressure of the samples in the closed part.
struct ClosedSamples
{
    std::vector<double> angle, pressure, volume, position; // true degrees, Pa, m³, m
};

ClosedSamples take_closed(const Cylinder& cylinder, const Unknowns& x, const HeatInputs& inputs)
{
    const double clearance = cylinder.clearance(cylinder.compression_ratio * (1.0 + x[ratio]));
    const Range range = inputs.samples.value_or(
        samples_within(inputs.angle, cylinder.closes + 2.0 + x[offset], cylinder.opens - 1.0 + x[offset]));
    ClosedSamples samples;
    for (std::size_t i = range.first; i < range.first + range.count; ++i) {
        const double angle = inputs.angle[i] - x[offset];
        const double position = cylinder.gear.position(angle * radians_per_degree);
        samples.angle.push_back(angle);
        const double off = zero_at(cylinder, x, angle) + inputs.expansion_drift * hot_share(angle);
        samples.pressure.push_back(std::max(inputs.pressure[i] - off, 0.2) * 1e5);
        samples.position.push_back(position);
        samples.volume.push_back(clearance + cylinder.gear.area() * position);
    }
    return samples;
}

/// The burnt share changes from sample to sample: constants of the mixture are linear in it.
void integrate(const Cylinder& cylinder, const WallLoss& walls, const HeatInputs& inputs, const ClosedSamples& samples,
               HeatRelease& heat)
{
    double work = 0.0, wall = 0.0, energy_at_start = 0.0, loss_before = 0.0;
    for (std::size_t i = 0; i < samples.angle.size(); ++i) {
        const double fuel = heat.fuel[i], mass = inputs.mass + fuel;
        const double burnt =
            std::min(1.0, (cylinder.residual_share * inputs.mass + (1.0 + stoichiometric_air) * fuel) / mass);
        const WorkingGas gas(burnt);
        const double p = samples.pressure[i], v = samples.volume[i];
        const double kelvin = gas_temperature(gas, p, v, mass);
        const double energy = mass * gas_energy(gas, std::clamp(kelvin, coldest, hottest), mass / v);
        const double loss = inputs.wall_multiplier *
                            walls.per_degree(std::log(p * 1e-5), std::clamp(kelvin, coldest, hottest), samples.position[i]);
        if (i == 0) {
            energy_at_start = energy;
        } else {
            work += 0.5 * (p + samples.pressure[i - 1]) * (v - samples.volume[i - 1]);
            wall += 0.5 * (loss + loss_before) * (samples.angle[i] - samples.angle[i - 1]);
        }
        loss_before = loss;
        heat.kelvin[i] = kelvin;
        heat.net[i] = energy - energy_at_start + work;
        heat.gross[i] = heat.net[i] + wall;
    }
}

/// Both heats are 0 on average just before combustion starts.
void shift_to_start(HeatRelease& heat, double start)
{
    const auto at = std::lower_bound(heat.angle.begin(), heat.angle.end(), start - 2.0) - heat.angle.begin();
    const auto low = static_cast<std::size_t>(std::max<std::ptrdiff_t>(at - 3, 0));
    const std::size_t high = std::min(static_cast<std::size_t>(at) + 3, heat.angle.size() - 1);
    double net = 0.0, gross = 0.0;
    for (std::size_t i = low; i <= high; ++i) {
        net += heat.net[i] / static_cast<double>(high - low + 1);
        gross += heat.gross[i] / static_cast<double>(high - low + 1);
    }
    for (std::size_t i = 0; i < heat.angle.size(); ++i) {
        heat.net[i] -= net;
        heat.gross[i] -= gross;
    }
}

/// Gross heat as a mean over a stretch that widens with the distance from the start: at the end a single sample's noise
/// is per cents of the heat, and the largest of many would be taken for the total.
std::vector<double> smooth_late(const HeatRelease& heat, double start)
{
    constexpr double widens = 0.15, widest = 10.0; // degrees either way
    const std::size_t n = heat.angle.size();
    std::vector<double> sums(n + 1, 0.0), smooth(n);
    for (std::size_t i = 0; i < n; ++i)
        sums[i + 1] = sums[i] + heat.gross[i];
    const double step = (heat.angle.back() - heat.angle.front()) / static_cast<double>(n - 1);
    for (std::size_t i = 0; i < n; ++i) {
        const double half = std::clamp(widens * (heat.angle[i] - start), 0.0, widest);
        const auto reach = std::min({static_cast<std::size_t>(half / step), i, n - 1 - i});
        smooth[i] = (sums[i + reach + 1] - sums[i - reach]) / static_cast<double>(2 * reach + 1);
    }
    return smooth;
}

void burn(HeatRelease& heat, double start)
{
    const std::vector<double> gross = smooth_late(heat, start);
    double most = 0.0;
    // The last samples have no neighbours to be averaged with.
    const double end = heat.angle.back() - 3.0;
    for (std::size_t i = 0; i < heat.angle.size(); ++i) {
        if (heat.angle[i] >= start - 2.0 && heat.angle[i] <= end)
            most = std::max(most, gross[i]);
        heat.fuel[i] = most / fuel_heat;
    }
    heat.total = most;
}

void find_temperatures(HeatRelease& heat)
{
    double sum = 0.0;
    for (std::size_t i = 0; i < heat.angle.size(); ++i) {
        heat.highest_kelvin = std::max(heat.highest_kelvin, heat.kelvin[i]);
        sum += heat.kelvin[i];
        if (i > 0 && heat.angle[i - 1] < 0.0 && heat.angle[i] >= 0.0) {
            const double part = -heat.angle[i - 1] / (heat.angle[i] - heat.angle[i - 1]);
            heat.dead_centre_kelvin = heat.kelvin[i - 1] + part * (heat.kelvin[i] - heat.kelvin[i - 1]);
        }
    }
    heat.mean_kelvin = sum / static_cast<double>(heat.angle.size());
}

} // namespace

double hot_share(double true_angle) { return true_angle > 0.0 ? 1.0 - std::exp(-true_angle / 25.0) : 0.0; }

std::optional<double> angle_of_share(const HeatRelease& heat, double share)
{
    const double wanted = share * heat.total / fuel_heat;
    for (std::size_t i = 1; i < heat.angle.size(); ++i)
        if (heat.fuel[i] >= wanted && heat.fuel[i] > heat.fuel[i - 1]) {
            const double part = (wanted - heat.fuel[i - 1]) / (heat.fuel[i] - heat.fuel[i - 1]);
            return heat.angle[i - 1] + part * (heat.angle[i] - heat.angle[i - 1]);
        }
    return std::nullopt;
}

std::optional<HeatRelease> release_heat(const Cylinder& cylinder, const WallLoss& walls, const Unknowns& x,
                                        const HeatInputs& inputs)
{
    constexpr std::size_t fewest = 20;
    const ClosedSamples samples = take_closed(cylinder, x, inputs);
    if (samples.angle.size() < fewest || !(inputs.mass > 0.0))
        return std::nullopt;
    for (const double p : samples.pressure)
        if (!std::isfinite(p))
            return std::nullopt;
    HeatRelease heat;
    heat.angle = samples.angle;
    const std::size_t n = heat.angle.size();
    heat.kelvin.resize(n);
    heat.net.resize(n);
    heat.gross.resize(n);
    heat.fuel.assign(n, 0.0);
    if (inputs.known_fuel && inputs.known_fuel->size() == n)
        heat.fuel = *inputs.known_fuel;
    const int rounds = inputs.start ? inputs.rounds : 1;
    for (int round = 0; round < rounds; ++round) {
        integrate(cylinder, walls, inputs, samples, heat);
        if (!inputs.start)
            break;
        shift_to_start(heat, *inputs.start);
        burn(heat, *inputs.start);
    }
    find_temperatures(heat);
    if (inputs.start && heat.total > 0.0) {
        heat.ca10 = angle_of_share(heat, 0.10);
        heat.ca50 = angle_of_share(heat, 0.50);
        heat.ca90 = angle_of_share(heat, 0.90);
    }
    return heat;
}

} // namespace evenstroke::indicator
