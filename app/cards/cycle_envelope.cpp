// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/cycle_envelope.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace evenstroke {

namespace {

constexpr float nothing = std::numeric_limits<float>::quiet_NaN();
constexpr double told_apart = 0.5; // grid places a pixel below which the cycles are drawn one by one

/// NaN gives way to a number.
float lower(float a, float b) { return std::isnan(a) || b < a ? b : a; }
float higher(float a, float b) { return std::isnan(a) || b > a ? b : a; }

CycleEnvelope::Level coarser(const CycleEnvelope::Level& level)
{
    CycleEnvelope::Level half;
    const std::size_t count = (level.low.size() + 1) / 2;
    half.low.assign(count, nothing);
    half.high.assign(count, nothing);
    for (std::size_t i = 0; i < level.low.size(); ++i) {
        half.low[i / 2] = lower(half.low[i / 2], level.low[i]);
        half.high[i / 2] = higher(half.high[i / 2], level.high[i]);
    }
    return half;
}

} // namespace

CycleEnvelope::CycleEnvelope(std::shared_ptr<const indicator::Evaluation> card) : card_(std::move(card))
{
    const indicator::CleanTrace& trace = card_->trace;
    first_ = (trace.angle.empty() ? 0.0 : trace.angle.front()) - card_->unknowns[indicator::offset];
    zero_ = card_->unknowns[indicator::zero];
    step_ = trace.step > 0.0 ? trace.step : 1.0;
    Level finest;
    finest.low.assign(trace.angle.size(), nothing);
    finest.high.assign(trace.angle.size(), nothing);
    for (std::size_t cycle = 0; cycle < trace.cycles.size(); ++cycle)
        for (std::size_t i = 0; i < std::min(finest.low.size(), trace.cycles[cycle].pressure.size()); ++i) {
            const float value = pressure(cycle, i);
            finest.low[i] = lower(finest.low[i], value);
            finest.high[i] = higher(finest.high[i], value);
        }
    levels_.push_back(std::move(finest));
    while (levels_.back().low.size() > 256)
        levels_.push_back(coarser(levels_.back()));
}

const CycleEnvelope::Level& CycleEnvelope::level_for(double places_a_pixel, int& exponent) const
{
    exponent = places_a_pixel < 2.0 ? 0 : static_cast<int>(std::log2(places_a_pixel));
    exponent = std::min(exponent, static_cast<int>(levels_.size()) - 1);
    return levels_[static_cast<std::size_t>(exponent)];
}

CycleBand::CycleBand(QCPAxis* key, QCPAxis* value, std::shared_ptr<const CycleEnvelope> envelope)
    : QCPAbstractPlottable(key, value), envelope_(std::move(envelope))
{
    setAntialiased(false);
}

QCPRange CycleBand::getKeyRange(bool& found, QCP::SignDomain) const
{
    found = envelope_->size() > 0;
    return found ? QCPRange(envelope_->angle(0), envelope_->angle(envelope_->size() - 1)) : QCPRange();
}

QCPRange CycleBand::getValueRange(bool& found, QCP::SignDomain, const QCPRange&) const
{
    int exponent = 0;
    const CycleEnvelope::Level& level = envelope_->level_for(1e9, exponent);
    double low = std::numeric_limits<double>::max(), high = std::numeric_limits<double>::lowest();
    for (std::size_t i = 0; i < level.low.size(); ++i)
        if (!std::isnan(level.low[i])) {
            low = std::min(low, static_cast<double>(level.low[i]));
            high = std::max(high, static_cast<double>(level.high[i]));
        }
    found = low <= high;
    return found ? QCPRange(low, high) : QCPRange();
}

void CycleBand::draw(QCPPainter* painter)
{
    if (!mKeyAxis || !mValueAxis || envelope_->size() < 2)
        return;
    const QCPRange seen = mKeyAxis->range();
    const double last = static_cast<double>(envelope_->size() - 1);
    const double from = std::clamp((seen.lower - envelope_->angle(0)) / envelope_->step() - 1.0, 0.0, last);
    const double to = std::clamp((seen.upper - envelope_->angle(0)) / envelope_->step() + 1.0, 0.0, last);
    if (to <= from)
        return;
    const double pixels = std::abs(mKeyAxis->coordToPixel(seen.upper) - mKeyAxis->coordToPixel(seen.lower));
    const double places_a_pixel = seen.size() / envelope_->step() / std::max(1.0, pixels);
    painter->setPen(mPen);
    applyDefaultAntialiasingHint(painter);
    const auto first_place = static_cast<std::size_t>(from), last_place = static_cast<std::size_t>(to);
    if (places_a_pixel < told_apart)
        draw_cycles(painter, first_place, last_place);
    else
        draw_columns(painter, first_place, last_place, places_a_pixel);
}

/// One upright line a step, drawn on to its neighbour so that steep flanks have no gaps.
void CycleBand::draw_columns(QCPPainter* painter, std::size_t from, std::size_t to, double places_a_pixel) const
{
    int exponent = 0;
    const CycleEnvelope::Level& level = envelope_->level_for(places_a_pixel, exponent);
    QVector<QLineF> lines;
    lines.reserve(static_cast<qsizetype>((to - from) >> exponent) + 2);
    const double width = static_cast<double>(std::size_t{1} << exponent) * envelope_->step();
    float low_before = nothing, high_before = nothing;
    for (std::size_t i = from >> exponent; i < level.low.size() && i <= (to >> exponent); ++i) {
        const float own_low = level.low[i], own_high = level.high[i];
        if (!std::isnan(own_low)) {
            const float low = std::isnan(high_before) ? own_low : std::min(own_low, high_before);
            const float high = std::isnan(low_before) ? own_high : std::max(own_high, low_before);
            const double x = mKeyAxis->coordToPixel(envelope_->angle(0) + width * (static_cast<double>(i) + 0.5) - 0.5 * envelope_->step());
            const double top = mValueAxis->coordToPixel(static_cast<double>(high)), bottom = mValueAxis->coordToPixel(static_cast<double>(low));
            lines.append(QLineF(x, top, x, std::max(bottom, top + 1.0))); // a single cycle is a pixel high
        }
        low_before = own_low;
        high_before = own_high;
    }
    painter->drawLines(lines);
}

void CycleBand::draw_cycles(QCPPainter* painter, std::size_t from, std::size_t to) const
{
    QPolygonF line;
    line.reserve(static_cast<qsizetype>(to - from) + 1);
    for (std::size_t cycle = 0; cycle < envelope_->cycles(); ++cycle) {
        line.clear();
        for (std::size_t i = from; i <= to; ++i) {
            const float value = envelope_->pressure(cycle, i);
            if (!std::isnan(value)) {
                line.append(QPointF(mKeyAxis->coordToPixel(envelope_->angle(i)), mValueAxis->coordToPixel(static_cast<double>(value))));
                continue;
            }
            painter->drawPolyline(line);
            line.clear();
        }
        painter->drawPolyline(line);
    }
}

} // namespace evenstroke
