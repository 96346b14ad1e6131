// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/engine_level.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::drift {

namespace {

constexpr std::size_t engine_window = 24, engine_readings_needed = 11;

bool sound(double noise)
{
    return std::isfinite(noise) && noise > 0.0;
}

} // namespace

EngineLevel::EngineLevel(const Input& input)
{
    for (const EngineChannel& channel : input.engine_channels)
        series_.emplace_back(channel.quantity, false, sound(channel.noise) ? channel.noise : 1.0,
                             channel.in_scan && sound(channel.noise) &&
                                 channel.cells.size() == input.readings());
    for (std::size_t k = 0; k < input.channels.size(); ++k)
        if (const auto* known = find_channel(input.channels[k].quantity, Subject::cylinder_median)) {
            medians_.push_back({k, series_.size()});
            series_.emplace_back(known->quantity, true, known->noise, input.channels[k].in_scan);
        }
    for (const Signature& signature : signature_catalogue()) {
        if (signature.subject != Subject::engine)
            continue;
        Weighted weighted{&signature, std::vector<double>(series_.size(), 0.0)};
        for (const Signature::Move& move : signature.moves)
            for (std::size_t e = 0; e < series_.size(); ++e)
                if (series_[e].quantity() == move.quantity && series_[e].is_median() == move.median &&
                    series_[e].in_scan())
                    weighted.weight[e] = move.amount;
        signatures_.push_back(std::move(weighted));
    }
}

std::optional<double> EngineLevel::strength(const Weighted& signature,
                                            std::span<const std::optional<Fit>> fits) const
{
    double sum = 0.0, variance = 0.0;
    std::size_t taking_part = 0;
    for (std::size_t e = 0; e < fits.size(); ++e) {
        if (!fits[e] || signature.weight[e] == 0.0)
            continue;
        ++taking_part;
        sum += signature.weight[e] * fits[e]->projection;
        variance += signature.weight[e] * signature.weight[e] * fits[e]->shape_squared;
    }
    if (taking_part < 2 || !(variance > 0.0))
        return std::nullopt;
    return sum / std::sqrt(variance);
}

ScanResult EngineLevel::scan(std::size_t reading) const
{
    ScanResult result;
    std::vector<std::size_t> ready;
    for (std::size_t e = 0; e < series_.size(); ++e)
        if (series_[e].in_scan() && series_[e].usable() >= engine_readings_needed)
            ready.push_back(e);
    std::vector<std::optional<Fit>> fits(series_.size());
    for (std::size_t onset = reading > engine_window ? reading - engine_window : 1;
         onset < reading && !ready.empty(); ++onset)
        for (const Shape shape : {Shape::step, Shape::ramp}) {
            for (const std::size_t e : ready) {
                fits[e] = series_[e].fit(onset, shape);
                if (fits[e])
                    result.consider(fits[e]->strength(), 0.0, e, onset, shape);
            }
            for (std::size_t s = 0; s < signatures_.size(); ++s)
                if (const auto found = strength(signatures_[s], fits); found && *found > 0.0)
                    result.consider(*found, 2.0 * std::log(signatures_[s].source->weight), fits.size() + s,
                                    onset, shape);
        }
    return result;
}

const std::string& EngineLevel::candidate_name(std::size_t candidate) const
{
    return candidate < series_.size() ? series_[candidate].quantity()
                                      : signatures_[candidate - series_.size()].source->name;
}

std::vector<std::size_t> EngineLevel::moved_by(std::size_t candidate) const
{
    if (candidate < series_.size())
        return {candidate};
    std::vector<std::size_t> moved;
    const Weighted& signature = signatures_[candidate - series_.size()];
    for (std::size_t e = 0; e < series_.size(); ++e)
        if (signature.weight[e] != 0.0)
            moved.push_back(e);
    return moved;
}

} // namespace evenstroke::drift
