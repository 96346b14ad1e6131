// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/exchanged_cylinders.h"

#include <algorithm>

namespace evenstroke::drift {

namespace {

double limited_square(double distance)
{
    return std::min(distance * distance, 9.0);
}

/// Gain of reading cylinder p's box as q's and the other way round; nothing with fewer than 3 quantities.
std::optional<double> gain_of_exchange(const ReadingOpinion& opinion, std::size_t p, std::size_t q)
{
    constexpr std::size_t learned = 3, quantities_needed = 3;
    double gain = 0.0;
    std::size_t quantities = 0;
    for (const auto& row : opinion.cylinders) {
        const CellOpinion &at_p = row[p], &at_q = row[q];
        if (!at_p.distance || !at_q.distance || at_p.alone || at_q.alone || at_p.offset_count < learned ||
            at_q.offset_count < learned)
            continue;
        ++quantities;
        const double usual_p = at_p.own_offset / at_p.tolerance, usual_q = at_q.own_offset / at_q.tolerance;
        const double seen_p = std::clamp(*at_p.distance + usual_p, -25.0, 25.0);
        const double seen_q = std::clamp(*at_q.distance + usual_q, -25.0, 25.0);
        gain += 0.5 * (limited_square(seen_p - usual_p) + limited_square(seen_q - usual_q) -
                       limited_square(seen_p - usual_q) - limited_square(seen_q - usual_p));
    }
    return quantities >= quantities_needed ? std::optional(gain) : std::nullopt;
}

} // namespace

std::optional<ExchangedPair> find_exchanged_cylinders(const ReadingOpinion& opinion)
{
    constexpr double likely_enough = 7.5;
    const std::size_t cylinders = opinion.cylinders.empty() ? 0 : opinion.cylinders.front().size();
    std::optional<ExchangedPair> best;
    for (std::size_t p = 0; p < cylinders; ++p)
        for (std::size_t q = p + 1; q < cylinders; ++q)
            if (const auto gain = gain_of_exchange(opinion, p, q);
                gain && *gain > likely_enough && (!best || *gain > best->likelihood))
                best = ExchangedPair{p, q, *gain};
    return best;
}

} // namespace evenstroke::drift
