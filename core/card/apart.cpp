// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/apart.h"

#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

/// A move with what all cylinders share of its spread.
struct Moved
{
    double value = 0.0, own = 0.0, common = 0.0; // own and common: one standard deviation
};

std::optional<Moved> moved_result(const CardInReview& card, CardResult result)
{
    if (!card.comparison)
        return std::nullopt;
    const auto i = static_cast<std::size_t>(result);
    const auto& difference = card.comparison->differences[i];
    if (!difference || !difference->half_width)
        return std::nullopt;
    const double all = 0.5 * *difference->half_width, common = 0.5 * card.comparison->common_half_width[i];
    return Moved{difference->value, std::sqrt(std::max(all * all - common * common, 0.0)), common};
}

/// A number that is not among the results: now minus the healthy cards' by their shares.
template <typename Number, typename Spread>
std::optional<Moved> moved_number(const CardInReview& card, Number number, Spread spread)
{
    if (!card.comparison || !card.now || card.healthy.empty() || card.healthy.size() != card.comparison->from.size())
        return std::nullopt;
    const std::optional<double> now = number(*card.now);
    if (!now)
        return std::nullopt;
    Moved moved{*now, spread(*card.now) * spread(*card.now), 0.0};
    for (std::size_t i = 0; i < card.healthy.size(); ++i) {
        const std::optional<double> then = number(*card.healthy[i]);
        if (!then)
            return std::nullopt;
        const double share = card.comparison->from[i].share, s = spread(*card.healthy[i]);
        moved.value -= share * *then;
        moved.own += share * share * s * s;
    }
    moved.own = std::sqrt(moved.own);
    return moved;
}

std::optional<Moved> moved_wall(const CardInReview& card)
{
    return moved_number(
        card, [](const Evaluation& e) { return e.compared_wall; },
        [](const Evaluation& e) { return std::hypot(e.compared_wall_spread, 0.05); });
}

std::optional<Moved> moved_exponent(const CardInReview& card)
{
    constexpr double model = 0.001;
    return moved_number(
        card, [](const Evaluation& e) { return e.compression_exponent; },
        [](const Evaluation& e) { return std::hypot(model, 0.01 * e.trace.noise_mean); });
}

std::optional<Moved> moved_offset(const CardInReview& card)
{
    if (!card.known || !card.now || !card.now->own_offset || card.now->method != CalibrationMethod::energy_balance)
        return std::nullopt;
    return Moved{card.now->own_offset->value - card.known->value,
                 std::hypot(card.now->own_offset_noise, card.known->spread), 0.0};
}

std::optional<Moved> moved_part(const CardInReview& card, CyclePart part)
{
    if (card.comparison)
        for (const PartDifference& difference : card.comparison->parts)
            if (difference.part == part)
                return Moved{difference.mean, 0.5 * difference.mean_half_width, 0.0};
    return std::nullopt;
}

} // namespace

template <typename Own> std::optional<Shift> Apart::against_others(std::size_t card, Own own) const
{
    constexpr std::size_t fewest_others = 2;
    const std::optional<Moved> mine = own(cards_[card]);
    if (!mine)
        return std::nullopt;
    std::vector<double> others, spreads;
    for (std::size_t i = 0; i < cards_.size(); ++i)
        if (const auto other = i != card ? own(cards_[i]) : std::nullopt) {
            others.push_back(other->value);
            spreads.push_back(other->own);
        }
    if (others.size() < fewest_others)
        return Shift{mine->value, std::hypot(mine->own, mine->common)};
    const double of_median = 1.25 * drift::median_in_place(spreads) / std::sqrt(static_cast<double>(others.size()));
    return Shift{mine->value - drift::median_in_place(others), std::hypot(mine->own, of_median)};
}

template <typename Own> std::optional<Shift> Apart::of_all(Own own) const
{
    constexpr std::size_t fewest = 3;
    std::vector<double> values, away;
    double common = 0.0;
    for (const CardInReview& card : cards_)
        if (const std::optional<Moved> moved = own(card)) {
            values.push_back(moved->value);
            common = std::max(common, moved->common);
        }
    if (values.size() < fewest)
        return std::nullopt;
    const double middle = drift::median_in_place(values);
    for (const double value : values)
        away.push_back(std::abs(value - middle));
    const double n = static_cast<double>(values.size());
    const double of_median = 1.25 * 1.4826 * drift::median_in_place(away) * (1.0 + 2.0 / n) / std::sqrt(n);
    return Shift{middle, std::hypot(of_median, common)};
}

std::optional<Shift> Apart::of(std::size_t card, CardResult result) const
{
    return against_others(card, [result](const CardInReview& c) { return moved_result(c, result); });
}
std::optional<Shift> Apart::wall(std::size_t card) const { return against_others(card, moved_wall); }
std::optional<Shift> Apart::exponent(std::size_t card) const { return against_others(card, moved_exponent); }
std::optional<Shift> Apart::offset(std::size_t card) const { return against_others(card, moved_offset); }
std::optional<Shift> Apart::part(std::size_t card, CyclePart part) const
{
    // Zero and drift are the transducer's, which is the same on all cylinders: how the others scatter says more than what
    // each may be off by.
    std::vector<double> others;
    for (std::size_t i = 0; i < cards_.size(); ++i)
        if (const auto other = i != card ? moved_part(cards_[i], part) : std::nullopt)
            others.push_back(other->value);
    auto shift = against_others(card, [part](const CardInReview& c) { return moved_part(c, part); });
    constexpr std::size_t enough = 4;
    if (!shift || others.size() < enough)
        return shift;
    const double middle = drift::median_in_place(others), n = static_cast<double>(others.size());
    for (double& value : others)
        value = std::abs(value - middle);
    constexpr double least = 0.03; // bar
    shift->spread = std::hypot(std::max(least, 0.2 * shift->spread), 1.4826 * drift::median_in_place(others) * (1.0 + 2.0 / n));
    return shift;
}
std::optional<Shift> Apart::all(CardResult result) const
{
    return of_all([result](const CardInReview& c) { return moved_result(c, result); });
}
std::optional<Shift> Apart::all_offsets() const { return of_all(moved_offset); }

} // namespace evenstroke::indicator
