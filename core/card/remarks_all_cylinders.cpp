// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/remarks_review.h"

#include "core/card/result_catalogue.h"
#include "core/plain_text.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

constexpr double sure = 3.0;

std::string shown(double number, double places = 100.0) { return short_number_text(std::round(number * places) / places); }

/// A result of all cylinders now over their healthy cards, minus 1; the spread with what load and charge leave open.
std::optional<Shift> shared_ratio(const std::vector<CardInReview>& cards, CardResult result)
{
    const auto moved = Apart(cards).all(result);
    std::vector<double> usual;
    for (const CardInReview& card : cards)
        if (card.comparison)
            if (const auto& healthy = card.comparison->healthy_results[static_cast<std::size_t>(result)])
                usual.push_back(healthy->value);
    if (!moved || usual.empty())
        return std::nullopt;
    const auto middle = usual.begin() + static_cast<std::ptrdiff_t>(usual.size() / 2);
    std::nth_element(usual.begin(), middle, usual.end());
    if (!(*middle > 0.0))
        return std::nullopt;
    return Shift{moved->value / *middle, moved->spread / *middle};
}

/// Load moves the work and not the compression, the charge the other way about: both by the same ratio is the instrument.
std::optional<Remark> remark_on_gain(const std::vector<CardInReview>& cards)
{
    constexpr double worth_share = 0.02, alike = 2.0, each = 2.0;
    const auto compression = shared_ratio(cards, CardResult::compression_pressure);
    const auto work = shared_ratio(cards, CardResult::mean_indicated_pressure);
    const auto maximum = shared_ratio(cards, CardResult::maximum_pressure);
    if (!compression || !work || !maximum)
        return std::nullopt;
    const bool taken = std::all_of(cards.begin(), cards.end(), [](const CardInReview& card) {
        return !card.comparison || card.comparison->charge_pressure_taken;
    });
    const double a = 1.0 / (compression->spread * compression->spread), b = 1.0 / (work->spread * work->spread);
    const Shift gain{(a * compression->value + b * work->value) / (a + b), 1.0 / std::sqrt(a + b)};
    const double apart = std::abs(compression->value - work->value);
    if (!taken || !gain.beyond(sure, worth_share) || compression->value * work->value <= 0.0 || maximum->value * gain.value <= 0.0 ||
        apart > alike * std::hypot(compression->spread, work->spread) || std::abs(maximum->value) < 0.5 * std::abs(gain.value))
        return std::nullopt;
    // Each of the two must show it by itself: one that is far off does not carry one that stands still.
    if (std::abs(compression->value) < each * compression->spread || std::abs(work->value) < each * work->spread)
        return std::nullopt;
    return make_remark("gain_suspected", {shown(100.0 * std::abs(compression->value), 10.0), shown(100.0 * std::abs(work->value), 10.0),
                                          gain.value > 0.0 ? "higher" : "lower"});
}

} // namespace

std::optional<double> moved_pickup(const Engine& engine, const std::vector<CardInReview>& cards)
{
    const double limit = engine.two_stroke() ? 0.15 : 0.25; // degrees
    const auto moved = Apart(cards).all_offsets();
    if (!moved)
        return std::nullopt;
    double known = 0.0;
    for (const CardInReview& card : cards)
        if (card.known)
            known = std::max(known, card.known->spread);
    if (std::abs(moved->value) < limit || std::abs(moved->value) < sure * std::hypot(moved->spread, known))
        return std::nullopt;
    return moved->value;
}

std::vector<Remark> remarks_of_all(const Engine& engine, const std::vector<CardInReview>& cards)
{
    std::vector<Remark> remarks;
    if (const auto moved = moved_pickup(engine, cards))
        remarks.push_back(make_remark("pickup_moved", {shown(std::abs(*moved)), *moved > 0.0 ? "later" : "earlier"}));
    if (auto gain = remark_on_gain(cards))
        remarks.push_back(*std::move(gain));
    return remarks;
}

} // namespace evenstroke::indicator
