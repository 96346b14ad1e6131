// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/self_calibration.h"

namespace evenstroke::indicator {

/// What is read off the record as it stands, before anything is taken out.
struct DirectReadings
{
    std::vector<double> work;           ///< mean indicated pressure of each cycle with no offset, bar
    std::vector<double> maxima;         ///< of each cycle, bar as recorded
    std::optional<Peak> peak;           ///< means over the cycles, as recorded
    double maximum_spread = 0.0;        ///< standard deviation of one cycle's maximum
    std::optional<Rise> rise;
    double passage_lag = 0.0, passage_swing = 0.0; ///< degrees, bar: one standard deviation of what a ringing passage adds
};

using Numbers = std::array<std::optional<double>, result_count>;

/// One set of unknowns brought to results; run again with each unknown moved, it gives the uncertainty.
class ResultMaker
{
public:
    ResultMaker(const Engine& engine, const CleanTrace& clean, const ThinTrace& thin, const DirectReadings& direct,
                const Setting& setting, const SelfCalibration& found);

    /// The numbers, and the heat release they come from.
    Numbers numbers(std::optional<HeatRelease>& heat) const;
    /// The same with half-widths. @param heat filled  @param carried where they come from
    Estimates estimate(std::optional<HeatRelease>& heat, Carried& carried);

private:
    /// What is not among the unknowns of the compression and moves results all the same.
    struct Beside
    {
        double wall_multiplier = 1.0, expansion_drift = 0.0; ///< of the film formula; bar
    };
    Numbers at(const Unknowns& x, const Beside& beside, const HeatRelease* base, std::optional<HeatRelease>& heat) const;
    std::array<double, 3> heat_noise(const HeatRelease& heat) const;
    std::optional<double> own_spread(CardResult result, double value) const;

    const Engine& engine_;
    const CleanTrace& clean_;
    const ThinTrace& thin_;
    const DirectReadings& direct_;
    const Setting& setting_;
    const SelfCalibration& found_;
    WallLoss walls_;
    std::optional<std::array<double, 3>> base_spread_; ///< of the three shares of heat, degrees
};

/// Mean indicated pressure of the mean cycle at an offset.
double mean_indicated(const SliderCrank& gear, const CleanTrace& clean, double recorded_offset);

} // namespace evenstroke::indicator
