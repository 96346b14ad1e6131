// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/chance.h"

#include <cmath>
#include <numbers>

namespace evenstroke::sample {
namespace {

/// Finaliser of the SplitMix64 generator: Steele, Lea, Flood, "Fast splittable pseudorandom number
/// generators", OOPSLA 2014 (the constants from memory; any good mixer would serve).
std::uint64_t mix(std::uint64_t value)
{
    value += 0x9E3779B97F4A7C15ULL;
    value = (value ^ (value >> 30U)) * 0xBF58476D1CE4E5B9ULL;
    value = (value ^ (value >> 27U)) * 0x94D049BB133111EBULL;
    return value ^ (value >> 31U);
}

std::uint64_t mix_text(std::uint64_t state, std::string_view text)
{
    for (const char letter : text)
        state = mix(state ^ static_cast<unsigned char>(letter));
    return state;
}

/// The upper 53 bits fill a double exactly.
double to_unit_interval(std::uint64_t bits)
{
    return static_cast<double>(bits >> 11U) * 0x1.0p-53;
}

constexpr double lasting_share = 0.15; // of the variance
constexpr double lasting_factor = 0.6; // from one month to the next

} // namespace

std::uint64_t Chance::bits(const ChanceKey& key, std::uint64_t draw) const
{
    std::uint64_t state = mix_text(mix(seed_), key.what);
    for (const int part : {key.engine, key.place, key.month})
        state = mix(state ^ static_cast<std::uint64_t>(static_cast<std::int64_t>(part)));
    return mix(state ^ draw);
}

double Chance::even(const ChanceKey& key) const
{
    return to_unit_interval(bits(key, 0));
}

double Chance::standard_normal(const ChanceKey& key, std::uint64_t draw) const
{
    // Box and Muller 1958. The first number must not be 0, hence 1 - u.
    const double radius = std::sqrt(-2.0 * std::log(1.0 - to_unit_interval(bits(key, 2 * draw + 1))));
    return radius * std::cos(2.0 * std::numbers::pi * to_unit_interval(bits(key, 2 * draw + 2)));
}

double Chance::normal(const ChanceKey& key) const
{
    return scale_ * standard_normal(key, 0);
}

double Chance::scatter(const ChanceKey& key) const
{
    // The lasting part is worked up from the first month, so that each month can be asked for by itself.
    double lasting = 0.0;
    for (int month = 0; month <= key.month; ++month) {
        const double fresh = standard_normal({key.what, key.engine, key.place, month}, 1);
        lasting = month == 0
                      ? fresh
                      : lasting_factor * lasting + std::sqrt(1.0 - lasting_factor * lasting_factor) * fresh;
    }
    return scale_ *
           (std::sqrt(1.0 - lasting_share) * standard_normal(key, 0) + std::sqrt(lasting_share) * lasting);
}

} // namespace evenstroke::sample
