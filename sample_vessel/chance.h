// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <string_view>

namespace evenstroke::sample {

/// Which value a chance number belongs to. Every value has its own stream, so that a further quantity or
/// a missed month moves no other value.
struct ChanceKey
{
    std::string_view what; ///< "maximum_pressure", "wind", ...
    int engine = 0, place = 0, month = 0;
};

/// Chance numbers that depend on the seed and the key alone.
class Chance
{
public:
    /// @param scale  1 for the ordinary scatter, 0 to switch all scatter off
    explicit Chance(std::uint64_t seed, double scale = 1.0) : seed_(seed), scale_(scale) {}

    /// Even between 0 (included) and 1 (excluded); the scale does not touch it.
    double even(const ChanceKey& key) const;
    /// Normal deviate of mean 0 and spread 1, times the scale.
    double normal(const ChanceKey& key) const;
    /// As `normal`, but 15 % of the variance lasts from month to month with the factor 0.6: a reading is
    /// a little like the one before (invented shares, the ones the drift method was calibrated with).
    double scatter(const ChanceKey& key) const;

private:
    std::uint64_t bits(const ChanceKey& key, std::uint64_t draw) const;
    double standard_normal(const ChanceKey& key, std::uint64_t draw) const;

    std::uint64_t seed_;
    double scale_;
};

} // namespace evenstroke::sample
