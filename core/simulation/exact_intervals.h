// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>

namespace evenstroke::simulation {

/// Exact 95 % interval for the mean of a Poisson count (Garwood 1936, Biometrika 28).
struct Interval
{
    double low, high;
};
Interval poisson_interval(std::size_t count);
/// Exact 95 % interval for a share (Clopper and Pearson 1934, Biometrika 26). @param of > 0
Interval binomial_interval(std::size_t count, std::size_t of);

} // namespace evenstroke::simulation
