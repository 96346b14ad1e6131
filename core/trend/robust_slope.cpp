// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/robust_slope.h"

#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <vector>

namespace evenstroke::drift {
namespace {

bool all_finite(std::span<const double> values)
{
    return std::all_of(values.begin(), values.end(), [](double value) { return std::isfinite(value); });
}

/// n (n-1) (2n+5), less the same for every group of equal values, over 18.
double variance_of_s(std::vector<double> values)
{
    std::sort(values.begin(), values.end());
    const auto term = [](double n) { return n * (n - 1.0) * (2.0 * n + 5.0); };
    double sum = term(static_cast<double>(values.size()));
    for (std::size_t i = 0; i < values.size();) {
        std::size_t j = i;
        while (j < values.size() && values[j] == values[i])
            ++j;
        sum -= term(static_cast<double>(j - i));
        i = j;
    }
    return sum / 18.0;
}

/// The standard normal deviate with this chance below it, by halving: exact to the last digits, and seldom asked for.
double normal_deviate(double chance)
{
    double low = -40.0, high = 40.0;
    for (int step = 0; step < 100; ++step) {
        const double middle = 0.5 * (low + high);
        (0.5 * std::erfc(-middle / std::numbers::sqrt2) < chance ? low : high) = middle;
    }
    return low;
}

/// The order statistic as one selection; `slopes` is left in another order.
double nth(std::vector<double>& slopes, std::size_t n)
{
    const auto at = slopes.begin() + static_cast<std::ptrdiff_t>(n);
    std::nth_element(slopes.begin(), at, slopes.end());
    return *at;
}

} // namespace

std::optional<RobustSlope> theil_sen(std::span<const double> times, std::span<const double> values, double confidence)
{
    if (times.size() != values.size() || times.size() < 2 || !(confidence > 0.0) || !(confidence < 1.0) || !all_finite(times) ||
        !all_finite(values))
        return std::nullopt;
    std::vector<double> slopes;
    slopes.reserve(times.size() * (times.size() - 1) / 2);
    for (std::size_t i = 0; i < times.size(); ++i)
        for (std::size_t j = i + 1; j < times.size(); ++j)
            if (const double step = times[j] - times[i]; step != 0.0)
                slopes.push_back((values[j] - values[i]) / step);
    if (slopes.empty())
        return std::nullopt;
    RobustSlope found;
    const std::size_t count = slopes.size();
    // Ranks on either side of the middle that hold the wanted share of all orders in which nothing trends.
    const double sigma = std::sqrt(variance_of_s({values.begin(), values.end()}));
    const double half = normal_deviate(0.5 + 0.5 * confidence) * sigma;
    const double pairs = static_cast<double>(count);
    const auto rank = [&](double at) {
        return static_cast<std::size_t>(std::clamp(std::round(at), 0.0, pairs - 1.0));
    };
    found.low = nth(slopes, rank((pairs - half) / 2.0 - 1.0));
    found.high = nth(slopes, rank((pairs + half) / 2.0));
    found.slope = median_in_place(slopes);
    found.intercept =
        *median({values.begin(), values.end()}) - found.slope * *median({times.begin(), times.end()});
    return found;
}

std::optional<MannKendall> mann_kendall(std::span<const double> values)
{
    if (values.size() < 3 || !all_finite(values))
        return std::nullopt;
    MannKendall test;
    for (std::size_t i = 0; i < values.size(); ++i)
        for (std::size_t j = i + 1; j < values.size(); ++j)
            test.s += values[j] > values[i] ? 1 : values[j] < values[i] ? -1 : 0;
    test.variance = variance_of_s({values.begin(), values.end()});
    if (!(test.variance > 0.0))
        return std::nullopt;
    const double s = static_cast<double>(test.s);
    test.z = (s > 0.0 ? s - 1.0 : s < 0.0 ? s + 1.0 : 0.0) / std::sqrt(test.variance);
    test.p_two_sided = std::erfc(std::abs(test.z) / std::numbers::sqrt2);
    return test;
}

} // namespace evenstroke::drift
