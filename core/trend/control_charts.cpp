// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/control_charts.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::drift {
namespace {

bool all_finite(std::span<const double> values)
{
    return std::all_of(values.begin(), values.end(), [](double value) { return std::isfinite(value); });
}

} // namespace

std::optional<EwmaChart> ewma_chart(std::span<const double> values, double weight, double start, double sigma, double factor)
{
    if (!(weight > 0.0) || weight > 1.0 || !(sigma > 0.0) || !(factor > 0.0) || !std::isfinite(start) || !all_finite(values))
        return std::nullopt;
    EwmaChart chart;
    const double reach = factor * sigma * std::sqrt(weight / (2.0 - weight));
    chart.low = start - reach;
    chart.high = start + reach;
    double smoothed = start;
    for (std::size_t i = 0; i < values.size(); ++i) {
        smoothed = weight * values[i] + (1.0 - weight) * smoothed;
        chart.path.push_back(smoothed);
        if (!chart.alarm && (smoothed < chart.low || smoothed > chart.high))
            chart.alarm = i;
    }
    return chart;
}

std::optional<CusumChart> cusum_chart(std::span<const double> values, double target, double slack, double decision)
{
    if (!(slack >= 0.0) || !(decision >= 0.0) || !std::isfinite(target) || !all_finite(values))
        return std::nullopt;
    CusumChart chart;
    double upper = 0.0, lower = 0.0;
    for (std::size_t i = 0; i < values.size(); ++i) {
        upper = std::max(0.0, upper + values[i] - target - slack);
        lower = std::max(0.0, lower - values[i] + target - slack);
        chart.upper.push_back(upper);
        chart.lower.push_back(lower);
        if (!chart.alarm && std::max(upper, lower) > decision)
            chart.alarm = i;
    }
    return chart;
}

} // namespace evenstroke::drift
