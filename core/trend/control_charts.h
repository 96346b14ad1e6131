// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <optional>
#include <span>
#include <vector>

/// Two charts of statistical process control, as second opinions beside the scan. Values and limits in one unit.
namespace evenstroke::drift {

struct EwmaChart
{
    std::vector<double> path;          ///< one a value
    double low = 0.0, high = 0.0;      ///< steady-state limits
    std::optional<std::size_t> alarm;  ///< first value at which the path lies outside
};
/// Exponentially weighted mean: z_i = λ x_i + (1 - λ) z_(i-1), limits start ± factor σ √(λ / (2 - λ)).
/// @param weight λ, 0 < λ <= 1  @param start z_0, the mean of a process in control  @param sigma of one value, > 0
/// @return nothing where λ or σ are outside their range or a value is not finite
/// @par Source NIST/SEMATECH e-Handbook of Statistical Methods, 6.3.2.4; S. W. Roberts, Technometrics 1 (1959)
std::optional<EwmaChart> ewma_chart(std::span<const double> values, double weight, double start, double sigma, double factor);

struct CusumChart
{
    std::vector<double> upper, lower; ///< one a value, >= 0
    std::optional<std::size_t> alarm; ///< first value at which one of them exceeds the decision limit
};
/// Cumulative sums of what exceeds the target by more than the slack, either way.
/// @param slack k, @param decision h: in the values' unit, >= 0
/// @return nothing where slack or decision are negative or a value is not finite
/// @par Source NIST/SEMATECH e-Handbook of Statistical Methods, 6.3.2.3; E. S. Page, Biometrika 41 (1954)
std::optional<CusumChart> cusum_chart(std::span<const double> values, double target, double slack, double decision);

} // namespace evenstroke::drift
