// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <vector>

namespace evenstroke::drift {

/// One sigma of a quantity on this engine: the catalogue's figure, taken over by the engine's own.
///
/// Successive differences leave slow changes out; their median leaves typing errors out. A difference has
/// twice the variance of a value. The catalogue's figure counts like `prior_weight` differences.
class NoiseEstimate
{
public:
    NoiseEstimate(double prior, double prior_weight) : prior_(prior), weight_(prior_weight), value_(prior) {}

    /// @param steady both readings were; differences of unsteady ones count only where most are such, because
    /// then it is the catalogue's figure that does not fit this ship
    void add_difference(double difference, bool steady);
    /// Takes what has come in since into account. Between renewals the value stands still, so that two
    /// readings in a row are judged by one measure.
    void renew();
    double value() const { return value_; }

private:
    /// Sorted up to `sorted`, so that a renewal costs one merging.
    struct Differences
    {
        std::vector<double> values;
        std::size_t sorted = 0;
        void sort();
    };
    double prior_, weight_, value_;
    Differences steady_, unsteady_;
};

/// Prior sigma of a value against the mean of the others: their mean has noise of its own, the 10 % over
/// 1 / (N - 1) is for the pulling in (common_mode).
double noise_against_others(double noise, std::size_t cylinders);

} // namespace evenstroke::drift
