// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/noise.h"

#include "core/trend/robust.h"

#include <iterator>

namespace evenstroke::drift {

void NoiseEstimate::Differences::sort()
{
    const auto middle = values.begin() + static_cast<std::ptrdiff_t>(sorted);
    std::sort(middle, values.end());
    std::inplace_merge(values.begin(), middle, values.end());
    sorted = values.size();
}

void NoiseEstimate::add_difference(double difference, bool steady)
{
    (steady ? steady_ : unsteady_).values.push_back(std::abs(difference));
}

void NoiseEstimate::renew()
{
    steady_.sort();
    std::vector<double> together;
    const bool all = unsteady_.values.size() * 2 > steady_.values.size();
    if (all) {
        unsteady_.sort();
        std::merge(steady_.values.begin(), steady_.values.end(), unsteady_.values.begin(),
                   unsteady_.values.end(), std::back_inserter(together));
    }
    const std::vector<double>& differences = all ? together : steady_.values;
    if (differences.empty())
        return;
    const double count = static_cast<double>(differences.size());
    const double sigma = median_to_sigma * median_of_sorted(differences);
    value_ = std::sqrt((weight_ * prior_ * prior_ + count * sigma * sigma / 2.0) / (weight_ + count));
}

double noise_against_others(double noise, std::size_t cylinders)
{
    const double others = cylinders > 4 ? static_cast<double>(cylinders - 1) : 3.0;
    return noise * std::sqrt(1.0 + 1.1 / others);
}

} // namespace evenstroke::drift
