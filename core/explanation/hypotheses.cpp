// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/hypotheses.h"

#include <algorithm>
#include <cmath>
#include <utility>

namespace evenstroke {
namespace {

constexpr double least_explained = 0.5;
constexpr double least_log_weight = 1.0; ///< a cause has to be likelier than nothing at all: three to one
constexpr std::size_t most_shown = 3;
/// Logarithm of the odds below which two causes count as equals: three to one. Settled by simulation.
constexpr double equal_odds = 1.1;
/// Of the odds at which the plainer of two comes first although it is a little less likely.
constexpr double plain_first_odds = 0.4;
constexpr double rest_needed = 2.5; ///< noise units, in some quantity, for a second cause to be looked for
constexpr double rest_explained = 0.7, pair_explained = 0.5; ///< share of that rest, beside a first cause that stands alone or not
constexpr double moved_from = 1.0, contradicts_from = 1.5; ///< noise units
/// Of what is expected: a part of a pattern that is known to a third may be off by half. Common practice, no source.
constexpr double contradicts_from_share = 0.5;

Hypothesis made_from(const FaultMatch& match, const ChangeWindow& window)
{
    Hypothesis hypothesis;
    hypothesis.fault = match.fault;
    hypothesis.explained = match.explained;
    hypothesis.size = match.size;
    hypothesis.evidence = weigh_evidence(*match.fault, match.full_size, window);
    return hypothesis;
}

bool will_not_wait(const Fault& fault) { return fault.urgency >= Urgency::now; }

/// A measurement before a machine, and what is met often before what is rare.
bool plainer(const Fault& one, const Fault& other)
{
    const bool measured = one.group == Fault::Group::measurement, other_measured = other.group == Fault::Group::measurement;
    return measured != other_measured ? measured : one.commonness > other.commonness;
}

/// Among those as likely as the first the plainest leads.
void put_plain_first(std::vector<FaultMatch>& matches)
{
    if (matches.empty())
        return;
    auto plainest = matches.begin();
    for (auto one = matches.begin(); one != matches.end(); ++one)
        if (matches.front().log_weight - one->log_weight < plain_first_odds && plainer(*one->fault, *plainest->fault))
            plainest = one;
    std::rotate(matches.begin(), plainest, plainest + 1);
}

/// The likeliest cause of what the first one leaves over, if that is worth a look.
std::optional<FaultMatch> match_in_the_rest(std::span<const Fault* const> faults, const FaultMatch& first,
                                            const ChangeVector& changes, double least)
{
    const ChangeVector rest = without_fault(*first.fault, first.size, changes);
    const bool enough = std::any_of(rest.begin(), rest.end(), [](const auto& change) {
        return change && std::abs(change->amount) >= rest_needed && std::abs(change->amount) >= 3.0 * change->error;
    });
    if (!enough)
        return std::nullopt;
    const auto matches = match_faults(faults, rest);
    const auto found = std::find_if(matches.begin(), matches.end(), [&](const FaultMatch& match) {
        return match.fault->id != first.fault->id && match.explained >= least && match.log_weight > 3.0;
    });
    if (found == matches.end() || found->log_weight < log_weight_of_no_pattern(rest))
        return std::nullopt;
    return *found;
}

/// Two causes together where none alone accounts for half: the likeliest pair of those whose first is likely.
std::vector<Hypothesis> two_together(std::span<const Fault* const> faults, const std::vector<FaultMatch>& matches,
                                     const ChangeWindow& window)
{
    constexpr std::size_t firsts = 6;
    std::optional<std::pair<FaultMatch, FaultMatch>> best;
    for (std::size_t i = 0; i < std::min(firsts, matches.size()); ++i) {
        const auto second = match_in_the_rest(faults, matches[i], window.changes, pair_explained);
        if (second && (!best || matches[i].log_weight + second->log_weight > best->first.log_weight + best->second.log_weight))
            best = {matches[i], *second};
    }
    if (!best)
        return {};
    std::vector<Hypothesis> pair = {made_from(best->first, window), made_from(best->second, window)};
    pair.back().in_the_rest = true;
    return pair;
}

/// The first three, and further ones only where they are as likely as the first and would not wait.
std::vector<Hypothesis> shown_of(std::vector<FaultMatch> matches, const ChangeWindow& window)
{
    const double likeliest = matches.empty() ? 0.0 : matches.front().log_weight;
    put_plain_first(matches);
    std::vector<Hypothesis> shown;
    for (std::size_t i = 0; i < matches.size(); ++i) {
        const bool equal = likeliest - matches[i].log_weight < equal_odds;
        if (i >= most_shown && !(equal && will_not_wait(*matches[i].fault)))
            continue;
        Hypothesis hypothesis = made_from(matches[i], window);
        hypothesis.odds = std::exp(matches[i].log_weight - matches.front().log_weight);
        hypothesis.as_likely_as_first = i > 0 && equal;
        hypothesis.only_for_its_urgency = i >= most_shown;
        shown.push_back(std::move(hypothesis));
    }
    return shown;
}

const FaultMatch* first_shown(const std::vector<FaultMatch>& matches, const std::vector<Hypothesis>& shown)
{
    return &*std::find_if(matches.begin(), matches.end(), [&](const FaultMatch& match) { return match.fault == shown.front().fault; });
}

/// @param open_ended the signature says "so much or more"
QuantityEvidence::Says what_it_says(double moved, double expected, bool open_ended)
{
    using Says = QuantityEvidence::Says;
    const bool should_move = std::abs(expected) >= moved_from, has_moved = std::abs(moved) >= moved_from;
    const double allowed = std::max(contradicts_from, contradicts_from_share * std::abs(expected));
    const bool far_off = std::abs(moved - expected) >= allowed, same_way = moved * expected > 0.0;
    if (!should_move)
        return far_off ? Says::against : Says::as_usual;
    if (!same_way || (far_off && !has_moved))
        return Says::against;
    return has_moved && (!far_off || (open_ended && std::abs(moved) >= std::abs(expected))) ? Says::fits : Says::partly_fits;
}

/// Size and share explained as the best window has them, ordered by the weight over all windows.
std::vector<FaultMatch> matches_over_windows(std::span<const Fault* const> faults, const ChangeWindow& window)
{
    std::vector<FaultMatch> matches = match_faults(faults, window.changes);
    if (window.log_weights.size() != faults.size())
        return matches;
    for (FaultMatch& match : matches) {
        const auto at = std::find(faults.begin(), faults.end(), match.fault) - faults.begin();
        match.log_weight = window.log_weights[static_cast<std::size_t>(at)];
    }
    std::stable_sort(matches.begin(), matches.end(),
                     [](const FaultMatch& a, const FaultMatch& b) { return a.log_weight > b.log_weight; });
    return matches;
}

} // namespace

std::vector<const Fault*> possible_faults(const Engine& engine, const Place& subject,
                                          const std::set<std::string>& ever_read)
{
    std::vector<const Fault*> faults;
    const bool of_engine = subject.kind != Place::Kind::cylinder;
    for (const Fault& fault : all_faults())
        if (fault.test == Fault::Test::signature && fault.of_engine == of_engine && fault.possible_on(engine) &&
            (fault.only_if_read.empty() || ever_read.count(fault.only_if_read) != 0))
            faults.push_back(&fault);
    return faults;
}

std::vector<QuantityEvidence> weigh_evidence(const Fault& fault, double full_size, const ChangeWindow& window)
{
    std::vector<QuantityEvidence> evidence;
    for (std::size_t k = 0; k < window.changes.size(); ++k) {
        if (!fault.levels[k])
            continue;
        const double table = fault_quantities()[k].noise, expected = full_size * *fault.full_levels[k];
        QuantityEvidence one;
        one.quantity = k;
        if (window.changes[k]) {
            one.amount = window.amounts[k];
            one.says = what_it_says(window.changes[k]->amount, expected, std::abs(*fault.levels[k]) >= largest_level);
        } else if (*fault.levels[k] == 0.0) {
            continue; // that something was not read which should not have moved is no news
        }
        one.expected = expected * table;
        evidence.push_back(std::move(one));
    }
    return evidence;
}

std::vector<Hypothesis> rank_causes(std::span<const Fault* const> faults, const ChangeWindow& window)
{
    const std::vector<FaultMatch> all = matches_over_windows(faults, window);
    std::vector<FaultMatch> matches;
    for (const FaultMatch& match : all) {
        const bool known = std::any_of(matches.begin(), matches.end(),
                                       [&](const FaultMatch& before) { return before.fault->id == match.fault->id; });
        if (match.explained >= least_explained && match.log_weight >= least_log_weight && !known) // of two patterns of a fault the likelier one
            matches.push_back(match);
    }
    std::vector<Hypothesis> shown = shown_of(matches, window);
    if (matches.empty()) {
        shown = two_together(faults, all, window);
    } else if (const auto second = match_in_the_rest(faults, *first_shown(matches, shown), window.changes, rest_explained)) {
        const bool known = std::any_of(shown.begin(), shown.end(), [&](const Hypothesis& one) { return one.fault->id == second->fault->id; });
        if (!known) {
            shown.push_back(made_from(*second, window));
            shown.back().in_the_rest = true;
        }
    }
    for (std::size_t i = 0; i < shown.size(); ++i)
        shown[i].rank = static_cast<int>(i) + 1;
    return shown;
}

} // namespace evenstroke
