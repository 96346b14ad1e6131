// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/evaluation.h"

#include <memory>

/// A card against the same cylinder's healthy one at the same load.
namespace evenstroke::indicator {

/// A healthy card of the same cylinder, evaluated, with what was read beside it.
struct HealthyCard
{
    std::size_t reading = 0; ///< index in the record
    double load_percent = 0.0;
    std::optional<double> scavenge_pressure; ///< bar abs
    std::shared_ptr<const Evaluation> card;
};

enum class CyclePart { compression, combustion, expansion, gas_exchange };

/// The difference over one part of the cycle.
struct PartDifference
{
    CyclePart part = CyclePart::compression;
    double from = 0.0, to = 0.0;                 ///< true degrees
    double mean = 0.0, mean_half_width = 0.0;    ///< bar
    double largest = 0.0, largest_at = 0.0;      ///< bar with its sign; degrees
    bool clear = false;                          ///< beyond what the uncertainty explains
};

struct Comparison
{
    std::vector<double> angle;      ///< true degrees, rising, one period
    std::vector<double> now;        ///< bar abs, zero and dead centre taken out
    std::vector<double> healthy;    ///< the healthy card at this load and this charge pressure
    std::vector<double> difference, half_width; ///< bar, 95 %; all curves are NaN where a card has a gap
    std::vector<PartDifference> parts;
    Estimates healthy_results;      ///< at this load and charge pressure
    Estimates differences;          ///< now minus healthy, each with its half-width
    /// The healthy cards it comes from and their shares; two where the load lies between.
    struct From
    {
        std::size_t reading = 0;
        double load_percent = 0.0, share = 1.0;
    };
    std::vector<From> from;
    /// What all cylinders of the reading share of the half-widths: load and charge pressure as they were read.
    std::array<double, result_count> common_half_width{};
    bool dead_centre_assumed = false; ///< of this card or a healthy one: the band is as wide as 1° either way makes it
    bool charge_pressure_taken = false; ///< the healthy compression was brought to this reading's scavenge pressure
};

/// Loads that are at most this far apart, per cent of rated power, count as the same load (common practice, no source).
inline constexpr double same_load = 5.0;

/// The healthy card at this load and charge pressure: its unfired line times the ratio of the charge pressures, and what
/// combustion added to it. Between two loads each angle is interpolated; beside a single load what combustion adds goes
/// with the load. The half-widths hold the noise of the mean cycles, what dead centre, zero and drift may be off by (but
/// not twice what both cards share: compression ratio and film formula), load and charge pressure as they are read, and
/// what the interpolation leaves. The transducer's gain is not in them.
/// @param healthy cards of this cylinder, any order
/// @return nothing where no healthy card lies within `same_load` and none on either side to go between
std::optional<Comparison> compare(const Evaluation& now, double load_percent, std::optional<double> scavenge_pressure,
                                  const std::vector<HealthyCard>& healthy);

} // namespace evenstroke::indicator
