// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/fixed_limits.h"
#include "core/trend/robust_slope.h"

/// What well-known rules would have said of one trend, to be shown beside the flags. They raise nothing: on readings of
/// ships they either speak without cause or come late (the figures are in core/trend/drift.h's simulations).
namespace evenstroke {

struct SecondOpinions
{
    std::optional<FixedLimitOpinion> fixed;
    std::size_t values = 0; ///< usable ones since the last work
    std::optional<drift::RobustSlope> slope; ///< a month, 95 %
    std::optional<drift::MannKendall> order;
    bool charted = false; ///< enough values for the two charts
    std::optional<std::size_t> ewma_alarm, cusum_alarm; ///< reading at which the chart would first have spoken
};

/// Weight λ and factor of the EWMA chart, slack and decision limit of the CUSUM in standard deviations: customary choices
/// of the NIST/SEMATECH e-Handbook. Both take the mean of the first six values since the last work as their target and
/// the engine's own scatter.
inline constexpr double ewma_weight = 0.3, ewma_factor = 3.0, cusum_slack = 0.5, cusum_decision = 5.0;
inline constexpr std::size_t values_of_reference = 6;

/// Of `apart` for a cylinder, of the deviation for the engine, since the last work.
SecondOpinions second_opinions(const Judgement& judgement, QuantityId quantity, Place place);

} // namespace evenstroke
