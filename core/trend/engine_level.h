// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/engine_series.h"

#include <cstddef>
#include <optional>
#include <span>
#include <vector>

/// Drift of the engine as a whole: turbocharger, cooler, consumption, and the medians over the cylinders.
namespace evenstroke::drift {

class EngineLevel
{
public:
    /// Series in the order of the input's engine channels, then the medians of the catalogue that the input
    /// has.
    explicit EngineLevel(const Input& input);

    struct MedianOf
    {
        std::size_t channel; ///< of the cylinders
        std::size_t series;
    };
    const std::vector<MedianOf>& medians() const { return medians_; }
    std::vector<EngineSeries>& series() { return series_; }
    const std::vector<EngineSeries>& series() const { return series_; }

    /// Evidence at the last reading that was added; `any_change` is not used here.
    ScanResult scan(std::size_t reading) const;
    const std::string& candidate_name(std::size_t candidate) const;
    /// Series that a candidate moves.
    std::vector<std::size_t> moved_by(std::size_t candidate) const;

private:
    struct Weighted
    {
        const Signature* source;
        std::vector<double> weight; ///< (series)
    };
    std::optional<double> strength(const Weighted& signature, std::span<const std::optional<Fit>> fits) const;

    std::vector<EngineSeries> series_;
    std::vector<MedianOf> medians_;
    std::vector<Weighted> signatures_;
};

} // namespace evenstroke::drift
