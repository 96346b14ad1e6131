// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/noise.h"

#include "core/trend/robust.h"

namespace evenstroke::drift {

void NoiseEstimate::add_difference(double difference, bool steady)
{
    (steady ? steady_ : unsteady_).push_back(std::abs(difference));
}

void NoiseEstimate::renew()
{
    std::vector<double> differences = steady_;
    if (unsteady_.size() * 2 > steady_.size())
        differences.insert(differences.end(), unsteady_.begin(), unsteady_.end());
    if (differences.empty())
        return;
    const double count = static_cast<double>(differences.size());
    const double sigma = median_to_sigma * median_in_place(differences);
    value_ = std::sqrt((weight_ * prior_ * prior_ + count * sigma * sigma / 2.0) / (weight_ + count));
}

double noise_against_others(double noise, std::size_t cylinders)
{
    const double others = cylinders > 4 ? static_cast<double>(cylinders - 1) : 3.0;
    return noise * std::sqrt(1.0 + 1.1 / others);
}

} // namespace evenstroke::drift
