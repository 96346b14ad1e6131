// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/results.h"

/// What the program says about a card: only where the card itself shows it. A leak of charge, a clogged passage that
/// only delays and a gain that is wrong show against the healthy card or the other cylinders, never in one card.
namespace evenstroke::indicator {

/// Of the samples and cycles: spikes, gaps, ringing, cycles unlike the others.
void remark_on_trace(Evaluation& card, const SliderCrank& gear, const DirectReadings& direct);

/// Of compression, zero and passage.
void remark_on_compression(Evaluation& card, const ThinTrace& thin, const Setting& setting, const SelfCalibration& found);

/// Of start, length and place of the combustion.
void remark_on_combustion(Evaluation& card, const SelfCalibration& found);

/// Frequency at which the pressure rings after its peak, Hz, where it rings clearly.
std::optional<double> find_ringing(std::span<const double> angle, std::span<const double> pressure, double peak_angle,
                                   double noise, double speed_rpm);

} // namespace evenstroke::indicator
