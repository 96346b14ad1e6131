// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/compared_results.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

constexpr double coverage = 2.0;
constexpr double load_reading = 0.01;        // one standard deviation of a load as read (common practice, no source)
constexpr double charge_reading = 0.005;     // of a scavenge pressure as read: half of the catalogue's 1 % at 95 %
constexpr double charge_not_taken = 0.03;    // of the charge from month to month (common practice, no source)
constexpr double load_power_spread = 0.12;   // of the power by which combustion goes with load
constexpr double straight_line_leaves = 0.03; // of the difference of two healthy cards, in the middle; by simulation

std::size_t index(CardResult result) { return static_cast<std::size_t>(result); }

/// What load and charge move a result by: parts of it that come from combustion and from the charge.
struct Shares
{
    double combustion = 0.0, charge = 0.0; ///< in the result's unit
};

Shares shares_of(CardResult result, double value, const DifferenceMember& member)
{
    const auto at = [&](double angle) {
        return Shares{member.combustion(angle) / member.fuel_ratio, member.curve.has_line() ? member.curve.unfired(angle) : 0.0};
    };
    switch (result) {
    case CardResult::mean_indicated_pressure: return {value, 0.0};
    case CardResult::pressure_rise: return {0.5 * value, 0.0}; // steeper and longer share it (common practice)
    case CardResult::maximum_pressure:
        if (const auto& angle = (*member.card)[CardResult::maximum_pressure_angle])
            return at(angle->value);
        return {};
    case CardResult::expansion_pressure: return at(member.card->expansion_angle);
    case CardResult::compression_pressure:
    case CardResult::trapped_mass: return {0.0, value};
    default: return {};
    }
}

/// What load away from the healthy card's moves a result by that is not a pressure, one standard deviation for each per
/// cent. Common practice, no source.
double per_cent_of_load(CardResult result)
{
    switch (result) {
    case CardResult::maximum_pressure_angle:
    case CardResult::start_of_combustion:
    case CardResult::ca10: return 0.05;
    case CardResult::ca50: return 0.08;
    case CardResult::ca90: return 0.2;
    case CardResult::maximum_temperature: return 4.0;
    default: return 0.0;
    }
}

/// Places on the curve, whose own spread is mostly the method's: both cards share it.
bool by_method(CardResult result)
{
    return result == CardResult::maximum_pressure_angle || result == CardResult::start_of_combustion ||
           result == CardResult::pressure_rise || result == CardResult::ca10 || result == CardResult::ca50 ||
           result == CardResult::ca90;
}
constexpr double not_shared = 0.5; // of the variance; by simulation (card_comparison_test.cpp)

struct Variances
{
    double alone = 0.0, common = 0.0; ///< common: of all cylinders of the reading
};

/// Of the healthy value alone (members without the first), or of the difference.
Variances variances(std::size_t i, const std::vector<DifferenceMember>& members, const LoadsAndCharges& known, const Shares& healthy)
{
    Variances sum;
    std::vector<Unknowns> slopes(members.size());
    double walls = 0.0;
    for (std::size_t m = 0; m < members.size(); ++m) {
        const DifferenceMember& member = members[m];
        const double square = member.weight * member.weight;
        if (const auto& carried = member.card->carried) {
            slopes[m] = carried->slopes[i];
            walls += member.weight * carried->walls[i];
            const double kept = by_method(static_cast<CardResult>(i)) ? not_shared : 1.0;
            sum.alone += square * (kept * carried->own[i] * carried->own[i] + not_shared * carried->heated[i] * carried->heated[i]);
        } else if (const auto& estimate = member.card->results[i]; estimate && estimate->half_width) {
            sum.alone += square * *estimate->half_width * *estimate->half_width / (coverage * coverage);
        }
        if (i == index(CardResult::mean_indicated_pressure) && member.card->results[i]) {
            const double scatter = member.cycle_scatter * member.card->results[i]->value;
            sum.alone += square * scatter * scatter;
        }
    }
    sum.alone += walls * walls + shared_variance(members, slopes);
    if (members.size() > 2 && members[1].card->results[i] && members[2].card->results[i]) {
        const double apart = known.between * (members[1].card->results[i]->value - members[2].card->results[i]->value);
        sum.alone += apart * apart;
    }
    const double away = per_cent_of_load(static_cast<CardResult>(i)) * known.load_away;
    const double load = known.load_spread * healthy.combustion, charge = known.charge_spread * healthy.charge;
    sum.common = load * load + charge * charge + away * away;
    return sum;
}

} // namespace

LoadsAndCharges weigh_loads(const Comparison& comparison, double load_percent)
{
    LoadsAndCharges known;
    double squares = 1.0;
    for (const Comparison::From& from : comparison.from)
        squares += from.share * from.share;
    known.load_spread = load_reading * std::sqrt(squares); // at constant speed; less on the propeller law
    known.charge_spread = comparison.charge_pressure_taken ? charge_reading * std::sqrt(squares) : charge_not_taken;
    if (comparison.from.size() == 1 && load_percent > 0.0 && comparison.from.front().load_percent > 0.0) {
        known.load_away = std::abs(load_percent - comparison.from.front().load_percent);
        const double power = load_power_spread * std::log(load_percent / comparison.from.front().load_percent);
        known.load_spread = std::hypot(known.load_spread, power);
    }
    if (comparison.from.size() == 2)
        known.between = straight_line_leaves * 4.0 * comparison.from[0].share * comparison.from[1].share;
    return known;
}

void compare_results(Comparison& comparison, const std::vector<DifferenceMember>& members, const LoadsAndCharges& known)
{
    const Evaluation& now = *members.front().card;
    const std::vector<DifferenceMember> healthy_members(members.begin() + 1, members.end());
    for (std::size_t i = 0; i < result_count; ++i) {
        const auto result = static_cast<CardResult>(i);
        if (result == CardResult::zero)
            continue; // of the transducer, not of the cylinder
        double value = 0.0;
        Shares shares;
        bool known_everywhere = true;
        for (const DifferenceMember& member : healthy_members) {
            const auto& estimate = member.card->results[i];
            known_everywhere = known_everywhere && estimate;
            if (!known_everywhere)
                break;
            const Shares own = shares_of(result, estimate->value, member);
            const double share = -member.weight;
            value += share * (estimate->value + (member.charge_ratio - 1.0) * own.charge + (member.fuel_ratio - 1.0) * own.combustion);
            shares.combustion += share * own.combustion * member.fuel_ratio;
            shares.charge += share * own.charge;
        }
        if (!known_everywhere)
            continue;
        const Variances alone = variances(i, healthy_members, known, shares);
        comparison.healthy_results[i] = Estimate{value, coverage * std::sqrt(alone.alone + alone.common)};
        if (!now.results[i])
            continue;
        const Variances both = variances(i, members, known, shares);
        comparison.differences[i] = Estimate{now.results[i]->value - value, coverage * std::sqrt(both.alone + both.common)};
        comparison.common_half_width[i] = coverage * std::sqrt(both.common);
    }
}

} // namespace evenstroke::indicator
