// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/simulation/exact_intervals.h"

#include <cmath>

namespace evenstroke::simulation {

namespace {

double poisson_at_most(std::size_t count, double mean)
{
    double sum = 0.0, term = -mean;
    for (std::size_t i = 0; i <= count; ++i) {
        sum += std::exp(term);
        term += std::log(mean) - std::log(static_cast<double>(i + 1));
    }
    return sum;
}

double binomial_at_most(std::size_t count, std::size_t of, double share)
{
    const double n = static_cast<double>(of);
    double sum = 0.0, term = n * std::log1p(-share);
    for (std::size_t i = 0; i <= count; ++i) {
        sum += std::exp(term);
        const double k = static_cast<double>(i);
        term += std::log((n - k) / (k + 1.0)) + std::log(share / (1.0 - share));
    }
    return sum;
}

/// Where a function that falls from 1 to 0 between `low` and `high` has this value.
template <typename Falling> double where(const Falling& falling, double low, double high, double value)
{
    for (int step = 0; step < 80; ++step) {
        const double middle = 0.5 * (low + high);
        (falling(middle) > value ? low : high) = middle;
    }
    return low;
}

} // namespace

Interval poisson_interval(std::size_t count)
{
    const double n = static_cast<double>(count), most = n + 10.0 * std::sqrt(n + 1.0) + 10.0;
    const auto mean_where = [&](std::size_t at_most, double chance) {
        return where([&](double mean) { return poisson_at_most(at_most, mean); }, 1e-9, most, chance);
    };
    return {count == 0 ? 0.0 : mean_where(count - 1, 0.975), mean_where(count, 0.025)};
}

Interval binomial_interval(std::size_t count, std::size_t of)
{
    const auto share_where = [&](std::size_t at_most, double chance) {
        return where([&](double share) { return binomial_at_most(at_most, of, share); }, 1e-12, 1.0 - 1e-12, chance);
    };
    return {count == 0 ? 0.0 : share_where(count - 1, 0.975), count == of ? 1.0 : share_where(count, 0.025)};
}

} // namespace evenstroke::simulation
