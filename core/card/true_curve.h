// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/evaluation.h"

/// A card as the cylinder had it: dead centre and zero taken out, over true angles.
namespace evenstroke::indicator {

class TrueCurve
{
public:
    /// @param card outlives the curve
    explicit TrueCurve(const Evaluation& card);

    double period() const { return period_; }
    double step() const { return card_->trace.step; }
    bool has_line() const { return card_->line_angle.size() > 1; }
    /// Angle brought into one period that begins at the closing, or half a period before dead centre.
    double wrapped(double true_angle) const;
    bool closed(double true_angle) const;

    /// bar abs; NaN where the card has a gap. Cubic through four samples.
    double pressure(double true_angle) const;
    /// bar a degree, over 4° (2° either way) so that noise does not pass for slope.
    double slope(double true_angle) const;
    /// bar abs: what the cylinder would have without combustion, the charge while it is open. After the line's end it falls
    /// as it rose, with the loss that it has had by then. NaN without a line.
    double unfired(double true_angle) const;
    /// Half turns since the closing: what a drift of 1 bar in 180° has moved the zero by.
    double drift_share(double true_angle) const;

private:
    double sample(double recorded_angle) const;
    double line_at(double true_angle) const;

    const Evaluation* card_;
    double period_ = 360.0, begins_ = -180.0;
    double end_ratio_ = 1.0; // of the line at its end and as far before dead centre
};

/// The recorded samples of the mean cycle with dead centre, zero and its drift taken out; gaps are left out.
struct TrueSamples
{
    std::vector<double> angle, pressure; ///< degrees, rising; bar abs
};
TrueSamples true_samples(const Evaluation& card);

} // namespace evenstroke::indicator
