// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/true_curve.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {

TrueCurve::TrueCurve(const Evaluation& card) : card_(&card)
{
    period_ = card.trace.step * static_cast<double>(card.trace.angle.size());
    begins_ = card.closes.value_or(-0.5 * period_);
    if (has_line())
        end_ratio_ = line_at(card.line_angle.back()) / line_at(-card.line_angle.back());
}

double TrueCurve::wrapped(double true_angle) const
{
    return true_angle - std::floor((true_angle - begins_) / period_) * period_;
}

bool TrueCurve::closed(double true_angle) const
{
    return card_->closes && card_->opens && wrapped(true_angle) <= *card_->opens;
}

double TrueCurve::sample(double recorded_angle) const
{
    const std::vector<double>& p = card_->trace.mean;
    const auto n = static_cast<std::ptrdiff_t>(p.size());
    const double place = (recorded_angle - card_->trace.angle.front()) / card_->trace.step;
    const double floor = std::floor(place), t = place - floor;
    const auto i = static_cast<std::ptrdiff_t>(floor);
    const auto at = [&](std::ptrdiff_t k) { return p[static_cast<std::size_t>(((i + k) % n + n) % n)]; };
    const double a = at(-1), b = at(0), c = at(1), d = at(2);
    if (!std::isfinite(a) || !std::isfinite(d)) // beside a gap
        return b + t * (c - b);
    return b + 0.5 * t * (c - a + t * (2.0 * a - 5.0 * b + 4.0 * c - d + t * (3.0 * (b - c) + d - a)));
}

double TrueCurve::drift_share(double true_angle) const
{
    // The zero drifts along the record, which begins and ends half a period from dead centre.
    return card_->closes ? (std::remainder(true_angle, period_) - *card_->closes) / 180.0 : 0.0;
}

double TrueCurve::pressure(double true_angle) const
{
    const Unknowns& x = card_->unknowns;
    return sample(true_angle + x[offset]) - x[zero] - x[drift] * drift_share(true_angle);
}

double TrueCurve::slope(double true_angle) const
{
    return (pressure(true_angle + 2.0) - pressure(true_angle - 2.0)) / 4.0;
}

double TrueCurve::line_at(double true_angle) const
{
    const std::vector<double>&x = card_->line_angle, &y = card_->line_pressure;
    const auto above = std::lower_bound(x.begin(), x.end(), true_angle);
    if (above == x.begin())
        return y.front();
    if (above == x.end())
        return y.back();
    const auto i = static_cast<std::size_t>(above - x.begin());
    const double part = (true_angle - x[i - 1]) / (x[i] - x[i - 1]);
    return y[i - 1] * std::pow(y[i] / y[i - 1], part);
}

double TrueCurve::unfired(double true_angle) const
{
    if (!has_line())
        return std::nan("");
    const double angle = wrapped(true_angle);
    if (!closed(true_angle))
        return line_at(card_->line_angle.front());
    return angle <= card_->line_angle.back() ? line_at(angle) : end_ratio_ * line_at(-angle);
}

TrueSamples true_samples(const Evaluation& card)
{
    const TrueCurve curve(card);
    TrueSamples samples;
    samples.angle.reserve(card.trace.angle.size());
    samples.pressure.reserve(card.trace.angle.size());
    for (std::size_t i = 0; i < card.trace.angle.size() && i < card.trace.mean.size(); ++i)
        if (std::isfinite(card.trace.mean[i])) {
            const double angle = card.trace.angle[i] - card.unknowns[offset];
            samples.angle.push_back(angle);
            samples.pressure.push_back(card.trace.mean[i] - card.unknowns[zero] -
                                       card.unknowns[drift] * curve.drift_share(angle));
        }
    return samples;
}

} // namespace evenstroke::indicator
