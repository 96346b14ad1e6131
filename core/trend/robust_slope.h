// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <span>

/// Trends that no outlier moves: as second opinions beside the scan.
namespace evenstroke::drift {

struct RobustSlope
{
    double slope = 0.0;     ///< value per unit of time: the median of the slopes of all pairs
    double intercept = 0.0; ///< median value minus slope times median time
    double low = 0.0, high = 0.0; ///< interval of the slope
};
/// Theil and Sen. Pairs at the same time say nothing and are left out.
/// @param confidence of the interval, 0 < confidence < 1
/// @return nothing with fewer than two different times, or where a number is not finite
/// @par Source P. K. Sen, J. Am. Stat. Assoc. 63 (1968) 1379-1389, interval with ties as in its section 6
std::optional<RobustSlope> theil_sen(std::span<const double> times, std::span<const double> values, double confidence = 0.95);

struct MannKendall
{
    long long s = 0;         ///< pairs that rise minus pairs that fall
    double variance = 0.0;   ///< of s where nothing trends, ties allowed for
    double z = 0.0;          ///< with continuity correction
    double p_two_sided = 1.0;
};
/// Whether values rise or fall with their order. @return nothing with fewer than three values, all alike, or not finite
/// @par Source H. B. Mann, Econometrica 13 (1945); M. G. Kendall, Rank Correlation Methods
std::optional<MannKendall> mann_kendall(std::span<const double> values);

} // namespace evenstroke::drift
