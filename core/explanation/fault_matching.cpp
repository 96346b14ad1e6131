// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/fault_matching.h"

#include <algorithm>
#include <array>
#include <cmath>

namespace evenstroke {
namespace {

constexpr double most_size = 1.5;        ///< of the reference size: beyond it levels of 3 are "3 or more" all the same
constexpr double unstated_weight = 0.8;  ///< of a movement that the signature does not speak of
constexpr double most_full_size = 3.5;   ///< a little beyond the largest size that is met (estimate)
constexpr double cut = 15.0;             ///< noise units: changes beyond it say no more about the pattern
/// How well the pattern's proportions are known: a third of each part (estimate), a tenth of a noise unit where
/// "should not move" was rounded, and 1.2 noise units where the signature says nothing. Settled by simulation.
constexpr double part_spread = 0.33, rounding_spread = 0.3, unstated_spread = 1.2;
/// Sizes over the reference size, and how often they are met (estimates): most faults are seen near it.
constexpr std::array<double, 7> sizes = {0.35, 0.5, 0.7, 1.0, 1.4, 2.0, 2.8};
constexpr std::array<double, 7> size_shares = {0.06, 0.12, 0.19, 0.24, 0.20, 0.13, 0.06};

double square(double x) { return x * x; }

double cut_at(double value, double limit) { return std::clamp(value, -limit, limit); }

/// p_max - p_comp says nothing of its own where both were read.
struct Redundant
{
    std::size_t rise, maximum, compression;
    bool at(std::size_t k, const ChangeVector& changes) const
    {
        return k == rise && changes[maximum] && changes[compression];
    }
};

const Redundant& redundant()
{
    static const Redundant known{find_fault_quantity("combustion_pressure_rise").value(),
                                 find_fault_quantity("maximum_pressure").value(),
                                 find_fault_quantity("compression_pressure").value()};
    return known;
}

double log_density(double value, double variance) { return -0.5 * (square(value) / variance + std::log(variance)); }

/// Logarithm of the likelihood of one size over that of nothing.
double log_ratio(const Fault& fault, double size, const ChangeVector& changes)
{
    double sum = 0.0, spread = 1.0; // one logarithm of the product is cheaper than the sum of many
    for (std::size_t k = 0; k < changes.size(); ++k) {
        if (!changes[k] || redundant().at(k, changes))
            continue;
        const double d = cut_at(changes[k]->amount, cut), noise = square(changes[k]->error);
        const auto& level = fault.full_levels[k];
        const double expected = level ? cut_at(size * *level, cut) : 0.0;
        const double own = !level          ? unstated_spread * std::min(std::abs(size), 1.0)
                           : *level == 0.0 ? rounding_spread * size
                                           : std::max(part_spread * std::abs(expected), rounding_spread * std::abs(size));
        const double whole = noise + square(own);
        sum += square(d) / noise - square(d - expected) / whole;
        spread *= whole / noise;
    }
    return 0.5 * (sum - std::log(spread));
}

struct Sums
{
    double product = 0.0, levels = 0.0, all_levels = 0.0;
};

/// @param weighted by the errors, and without what says nothing of its own; else every observed quantity alike
Sums sums_of(const Fault& fault, const ChangeVector& changes, bool weighted)
{
    Sums sums;
    for (std::size_t k = 0; k < changes.size(); ++k) {
        const auto& level = fault.levels[k];
        if (!level || (weighted && redundant().at(k, changes)))
            continue;
        sums.all_levels += square(*level);
        if (!changes[k])
            continue;
        const double weight = weighted ? 1.0 / square(changes[k]->error) : 1.0;
        sums.product += weight * *level * cut_at(changes[k]->amount, largest_level);
        sums.levels += weight * square(*level);
    }
    return sums;
}

double size_from(const Fault& fault, const Sums& sums)
{
    return std::clamp(sums.product / sums.levels, fault.either_sign ? -most_size : 0.0, most_size);
}

/// Each quantity weighted by its error and by how well its part in the pattern is known.
double full_size_of(const Fault& fault, const ChangeVector& changes)
{
    double product = 0.0, levels = 0.0;
    for (std::size_t k = 0; k < changes.size(); ++k) {
        const auto& level = fault.full_levels[k];
        if (!level || !changes[k] || redundant().at(k, changes))
            continue;
        const double weight = 1.0 / (square(changes[k]->error) + square(part_spread * *level));
        product += weight * *level * cut_at(changes[k]->amount, cut);
        levels += weight * square(*level);
    }
    return levels > 0.0 ? std::clamp(product / levels, fault.either_sign ? -most_full_size : 0.0, most_full_size) : 0.0;
}

struct Residual
{
    double left = 0.0, whole = 0.0, scatter = 0.0; ///< sums of squares; `scatter`: what errors alone bring
};

Residual residual_of(const Fault& fault, double size, const ChangeVector& changes, bool with_redundant)
{
    Residual residual;
    for (std::size_t k = 0; k < changes.size(); ++k) {
        if (!changes[k] || (!with_redundant && redundant().at(k, changes)))
            continue;
        const double d = cut_at(changes[k]->amount, largest_level);
        residual.whole += square(d);
        residual.scatter += square(std::min(changes[k]->error, 1.0));
        const auto& level = fault.levels[k];
        residual.left += level ? square(d - size * *level) : unstated_weight * square(d);
    }
    return residual;
}

double observed_share(const Fault& fault, const ChangeVector& changes)
{
    const Sums plain = sums_of(fault, changes, false);
    return plain.all_levels > 0.0 ? plain.levels / plain.all_levels : 0.0;
}

} // namespace

double log_sum(std::span<const double> logarithms)
{
    const double most = *std::max_element(logarithms.begin(), logarithms.end());
    double sum = 0.0;
    for (const double one : logarithms)
        sum += std::exp(one - most);
    return most + std::log(sum);
}

double log_commonness(const Fault& fault)
{
    // How often a cause is met, as the catalogue's three words have it (estimates): 1, 0.7 and 0.4.
    constexpr std::array<double, 3> shares = {0.4, 0.7, 1.0};
    double share = shares[static_cast<std::size_t>(fault.commonness)];
    if (fault.reference_size.empty()) // a pattern in outline only
        share *= 0.5;
    if (fault.urgency == Urgency::emergency) // seen by the alarm, long before a monthly sheet
        share *= 0.25;
    return std::log(share);
}

double log_likelihood(const Fault& fault, const ChangeVector& changes)
{
    std::vector<double> ratios;
    for (std::size_t i = 0; i < sizes.size(); ++i) {
        const double share = std::log(size_shares[i] * (fault.either_sign ? 0.5 : 1.0));
        ratios.push_back(log_ratio(fault, sizes[i], changes) + share);
        if (fault.either_sign)
            ratios.push_back(log_ratio(fault, -sizes[i], changes) + share);
    }
    return log_sum(ratios);
}

std::optional<PlainMatch> match_plainly(const Fault& fault, const ChangeVector& changes)
{
    const Sums sums = sums_of(fault, changes, false);
    if (!(sums.levels > 0.0))
        return std::nullopt;
    PlainMatch match;
    match.size = size_from(fault, sums);
    match.coverage = sums.levels / sums.all_levels;
    const Residual residual = residual_of(fault, match.size, changes, true);
    if (residual.whole > 0.0)
        match.explained = 1.0 - residual.left / residual.whole;
    return match;
}

std::vector<FaultMatch> match_faults(std::span<const Fault* const> faults, const ChangeVector& changes)
{
    std::vector<FaultMatch> matches;
    for (const Fault* fault : faults) {
        const Sums sums = sums_of(*fault, changes, true);
        if (!(sums.levels > 0.0))
            continue;
        FaultMatch match;
        match.fault = fault;
        match.size = size_from(*fault, sums);
        match.full_size = full_size_of(*fault, changes);
        match.coverage = observed_share(*fault, changes);
        const Residual residual = residual_of(*fault, match.size, changes, false);
        const double beyond_scatter = residual.whole - residual.scatter;
        if (beyond_scatter > 0.0)
            match.explained =
                std::clamp(1.0 - std::max(residual.left - residual.scatter, 0.0) / beyond_scatter, 0.0, 1.0);
        match.log_weight = log_likelihood(*fault, changes) + log_commonness(*fault);
        matches.push_back(match);
    }
    std::stable_sort(matches.begin(), matches.end(),
                     [](const FaultMatch& a, const FaultMatch& b) { return a.log_weight > b.log_weight; });
    return matches;
}

double log_weight_of_no_pattern(const ChangeVector& changes)
{
    constexpr double free_spread = 2.0; // noise units, estimate
    double sum = 0.0;
    for (std::size_t k = 0; k < changes.size(); ++k)
        if (changes[k] && !redundant().at(k, changes)) {
            const double d = cut_at(changes[k]->amount, cut), noise = square(changes[k]->error);
            sum += log_density(d, noise + square(free_spread)) - log_density(d, noise);
        }
    return sum;
}

double strongest_sign(std::span<const Fault* const> faults, const ChangeVector& changes)
{
    double strongest = 0.0;
    for (std::size_t k = 0; k < changes.size(); ++k)
        if (changes[k] && !redundant().at(k, changes))
            strongest = std::max(strongest, std::abs(changes[k]->amount) / changes[k]->error);
    for (const Fault* fault : faults) {
        double product = 0.0, levels = 0.0;
        for (std::size_t k = 0; k < changes.size(); ++k)
            if (changes[k] && fault->full_levels[k] && !redundant().at(k, changes)) {
                const double weight = 1.0 / square(changes[k]->error);
                product += weight * *fault->full_levels[k] * changes[k]->amount;
                levels += weight * square(*fault->full_levels[k]);
            }
        if (levels > 0.0) {
            const double sign = product / std::sqrt(levels);
            strongest = std::max(strongest, fault->either_sign ? std::abs(sign) : sign);
        }
    }
    return strongest;
}

ChangeVector without_fault(const Fault& fault, double size, const ChangeVector& changes)
{
    ChangeVector rest = changes;
    for (std::size_t k = 0; k < rest.size(); ++k)
        if (rest[k] && fault.levels[k])
            rest[k]->amount = cut_at(rest[k]->amount, cut) - size * *fault.levels[k];
    return rest;
}

} // namespace evenstroke
