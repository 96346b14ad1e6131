// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cmath>
#include <cstddef>
#include <cstdint>
#include <numbers>
#include <random>

namespace evenstroke::simulation {

/// The same numbers with every standard library: only the generator itself is laid down by the standard.
class Dice
{
public:
    explicit Dice(std::uint64_t seed) : engine_(seed) {}
    double uniform() { return static_cast<double>(engine_() >> 11) * 0x1.0p-53; }
    double uniform(double low, double high) { return low + (high - low) * uniform(); }
    std::size_t below(std::size_t count)
    {
        return static_cast<std::size_t>(uniform() * static_cast<double>(count));
    }
    bool chance(double probability) { return uniform() < probability; }
    double normal()
    {
        const double radius = std::sqrt(-2.0 * std::log(1.0 - uniform()));
        return radius * std::cos(2.0 * std::numbers::pi * uniform());
    }

private:
    std::mt19937_64 engine_;
};

/// Noise of one quantity at one place, in noise units.
class NoiseSource
{
public:
    /// @param white the part that is new at each reading, sigma 1
    double next(Dice& dice, double months, double white, double spread)
    {
        constexpr double lasting = 0.15, kept_a_month = 0.6, walk = 0.03;
        const double kept = std::pow(kept_a_month, months);
        lasting_ = kept * lasting_ + std::sqrt(1.0 - kept * kept) * dice.normal();
        walked_ += walk * std::sqrt(months) * dice.normal();
        const double tail = dice.chance(0.05) ? 2.5 : 1.0;
        return std::sqrt(1.0 - lasting) * tail * spread * white + std::sqrt(lasting) * lasting_ + walked_;
    }

private:
    double lasting_ = 0.0, walked_ = 0.0;
};

} // namespace evenstroke::simulation
