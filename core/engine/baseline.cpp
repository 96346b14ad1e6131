// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/baseline.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {
namespace {

/// Slope at an end from its three nearest points; zero or limited where it would break the shape.
double end_slope(double width, double next_width, double secant, double next_secant)
{
    const double slope = ((2.0 * width + next_width) * secant - width * next_secant) / (width + next_width);
    if (slope * secant <= 0.0)
        return 0.0;
    if (secant * next_secant < 0.0 && std::abs(slope) > 3.0 * std::abs(secant))
        return 3.0 * secant;
    return slope;
}

std::vector<double> shape_keeping_slopes(const std::vector<double>& x, const std::vector<double>& y)
{
    const std::size_t n = x.size();
    std::vector<double> slopes(n, 0.0);
    if (n < 2)
        return slopes;
    std::vector<double> width(n - 1), secant(n - 1);
    for (std::size_t i = 0; i + 1 < n; ++i) {
        width[i] = x[i + 1] - x[i];
        secant[i] = (y[i + 1] - y[i]) / width[i];
    }
    if (n == 2)
        return {secant[0], secant[0]};
    for (std::size_t i = 1; i + 1 < n; ++i) {
        if (secant[i - 1] * secant[i] <= 0.0)
            continue; // an extreme stands at the point
        const double before = 2.0 * width[i] + width[i - 1], after = width[i] + 2.0 * width[i - 1];
        slopes[i] = (before + after) / (before / secant[i - 1] + after / secant[i]);
    }
    slopes[0] = end_slope(width[0], width[1], secant[0], secant[1]);
    slopes[n - 1] = end_slope(width[n - 2], width[n - 3], secant[n - 2], secant[n - 3]);
    return slopes;
}

} // namespace

BaselineCurve::BaselineCurve(std::vector<double> loads, std::vector<double> values)
    : loads_(std::move(loads)), values_(std::move(values)), slopes_(shape_keeping_slopes(loads_, values_))
{
}

std::optional<double> BaselineCurve::at(double load) const
{
    if (loads_.empty() || !(load >= loads_.front() - reach_percent) || !(load <= loads_.back() + reach_percent))
        return std::nullopt;
    if (load <= loads_.front())
        return values_.front();
    if (load >= loads_.back())
        return values_.back();
    const auto upper = std::upper_bound(loads_.begin(), loads_.end(), load);
    return between(static_cast<std::size_t>(upper - loads_.begin()) - 1, load);
}

double BaselineCurve::between(std::size_t i, double load) const
{
    const double width = loads_[i + 1] - loads_[i], s = (load - loads_[i]) / width;
    const double s2 = s * s, s3 = s2 * s;
    return (2.0 * s3 - 3.0 * s2 + 1.0) * values_[i] + (s3 - 2.0 * s2 + s) * width * slopes_[i] +
           (3.0 * s2 - 2.0 * s3) * values_[i + 1] + (s3 - s2) * width * slopes_[i + 1];
}

std::optional<double> BaselineCurve::load_at(double value) const
{
    std::vector<double> found;
    const std::size_t points = loads_.size();
    if (points < 2)
        return std::nullopt;
    const auto beyond = [&](std::size_t end, double direction) {
        if (slopes_[end] == 0.0)
            return;
        const double past = (value - values_[end]) / slopes_[end];
        if (past * direction > 0.0 && past * direction <= reach_percent)
            found.push_back(loads_[end] + past);
    };
    beyond(0, -1.0);
    beyond(points - 1, 1.0);
    for (std::size_t i = 0; i + 1 < points; ++i) {
        if (values_[i] == values_[i + 1] && value == values_[i])
            return std::nullopt; // a whole stretch of loads has it
        const bool last = i + 2 == points;
        const double above_low = value - values_[i], above_high = value - values_[i + 1];
        if (above_low * above_high > 0.0 || (above_high == 0.0 && !last))
            continue; // the next interval begins with the point itself
        double low = loads_[i], high = loads_[i + 1];
        const bool rising = values_[i + 1] > values_[i];
        for (int halving = 0; halving < 200; ++halving) {
            const double middle = 0.5 * (low + high);
            if (middle <= low || middle >= high)
                break;
            ((between(i, middle) < value) == rising ? low : high) = middle;
        }
        found.push_back(0.5 * (low + high));
    }
    return found.size() == 1 ? std::optional(found.front()) : std::nullopt;
}

Baseline::Baseline(const Engine& engine)
{
    std::map<std::string, std::map<std::string, std::pair<std::vector<double>, std::vector<double>>>> points;
    for (const BaselinePoint& point : engine.baseline) {
        const auto [span, fresh] = span_.try_emplace(point.mode, point.load_percent, point.load_percent);
        if (!fresh)
            span->second.second = point.load_percent;
        for (const auto& [name, value] : point.values) {
            points[point.mode][name].first.push_back(point.load_percent);
            points[point.mode][name].second.push_back(value);
        }
    }
    for (auto& [mode, quantities] : points)
        for (auto& [name, xy] : quantities)
            curves_[mode][name] = BaselineCurve(std::move(xy.first), std::move(xy.second));
}

bool Baseline::has(std::string_view quantity) const
{
    return std::any_of(curves_.begin(), curves_.end(),
                       [&](const auto& mode) { return mode.second.find(quantity) != mode.second.end(); });
}

bool Baseline::has_mode(std::string_view mode) const { return span_.find(mode) != span_.end(); }

const BaselineCurve* Baseline::curve(std::string_view mode, std::string_view quantity) const
{
    const auto curves = curves_.find(mode);
    if (curves == curves_.end())
        return nullptr;
    const auto found = curves->second.find(quantity);
    return found == curves->second.end() ? nullptr : &found->second;
}

bool Baseline::covers(std::string_view mode, double load) const
{
    const auto span = span_.find(mode);
    return span != span_.end() && load >= span->second.first - BaselineCurve::reach_percent &&
           load <= span->second.second + BaselineCurve::reach_percent;
}

} // namespace evenstroke
