// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/results.h"

/// What the program says about a card: only where the card itself shows it. A leak of charge, a clogged passage that
/// only delays and a gain that is wrong show against the healthy card or the other cylinders, never in one card.
namespace evenstroke::indicator {

/// The indicator passage as a spring of gas: what it rings with after the peak, and how late it shows a pressure.
struct Ringing
{
    double frequency = 0.0; ///< Hz
    double amplitude = 0.0; ///< bar, mean over the 40° after the peak
    double lag = 0.0;       ///< degrees: 6n · 2ζ / (2πf), with a damping ζ of 0.1 (common practice)
};
/// @return nothing where it does not ring clearly, or so fast that the lag is below 0.1°
std::optional<Ringing> find_ringing(std::span<const double> angle, std::span<const double> pressure, double peak_angle,
                                    double noise, double speed_rpm);

/// Of the samples and cycles: spikes, gaps, ringing, cycles unlike the others.
void remark_on_trace(Evaluation& card, const SliderCrank& gear, const DirectReadings& direct);

/// Of compression, zero and passage.
void remark_on_compression(Evaluation& card, const ThinTrace& thin, const Setting& setting, const SelfCalibration& found,
                           const std::optional<Ringing>& ringing);

/// More heat than the fuel had, where that is known.
void remark_on_heat(Evaluation& card);

/// Of start, length and place of the combustion.
void remark_on_combustion(Evaluation& card, const SelfCalibration& found);

} // namespace evenstroke::indicator
