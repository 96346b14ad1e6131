// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/hypotheses.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {
namespace {

constexpr double least_explained = 0.5;
constexpr std::size_t most_shown = 3;
/// Logarithm of the odds below which two causes count as equals: three to one. Settled by simulation.
constexpr double equal_odds = 1.1;
/// Of the odds at which the plainer of two comes first although it is a little less likely.
constexpr double plain_first_odds = 0.4;
constexpr double rest_needed = 2.5; ///< noise units, in some quantity, for a second cause to be looked for
constexpr double moved_from = 1.0, contradicts_from = 1.5; ///< noise units

Hypothesis made_from(const FaultMatch& match, const ChangeWindow& window)
{
    Hypothesis hypothesis;
    hypothesis.fault = match.fault;
    hypothesis.explained = match.explained;
    hypothesis.size = match.size;
    hypothesis.evidence = weigh_evidence(*match.fault, match.size, window);
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

/// What is left when the first cause is taken away, if it is worth a look.
std::optional<Hypothesis> second_cause(std::span<const Fault* const> faults, const FaultMatch& first,
                                       const ChangeWindow& window)
{
    ChangeWindow rest = window;
    rest.changes = without_fault(*first.fault, first.size, window.changes);
    const bool enough = std::any_of(rest.changes.begin(), rest.changes.end(), [](const auto& change) {
        return change && std::abs(change->amount) >= rest_needed && std::abs(change->amount) >= 3.0 * change->error;
    });
    if (!enough)
        return std::nullopt;
    const auto matches = match_faults(faults, rest.changes);
    const auto found = std::find_if(matches.begin(), matches.end(), [&](const FaultMatch& match) {
        return match.fault != first.fault && match.explained >= 0.7 && match.log_weight > 3.0;
    });
    if (found == matches.end() || found->log_weight < log_weight_of_no_pattern(rest.changes))
        return std::nullopt;
    Hypothesis second = made_from(*found, window);
    second.in_the_rest = true;
    return second;
}

QuantityEvidence::Says what_it_says(double moved, double expected)
{
    using Says = QuantityEvidence::Says;
    const bool both_moved = std::abs(moved) >= moved_from && std::abs(expected) >= moved_from;
    const bool contradicts = std::abs(moved - expected) >= contradicts_from;
    if (both_moved && moved * expected > 0.0)
        return contradicts && std::abs(expected) < largest_level ? Says::partly_fits : Says::fits;
    if (contradicts)
        return Says::against;
    return std::abs(moved) < moved_from && std::abs(expected) < moved_from ? Says::as_usual : Says::partly_fits;
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

std::vector<QuantityEvidence> weigh_evidence(const Fault& fault, double size, const ChangeWindow& window)
{
    std::vector<QuantityEvidence> evidence;
    for (std::size_t k = 0; k < window.changes.size(); ++k) {
        if (!fault.levels[k])
            continue;
        const double table = fault_quantities()[k].noise, expected = size * *fault.levels[k];
        QuantityEvidence one;
        one.quantity = k;
        if (window.changes[k]) {
            one.amount = window.amounts[k];
            one.says = what_it_says(window.changes[k]->amount, expected);
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
    std::vector<FaultMatch> matches = match_faults(faults, window.changes);
    matches.erase(std::remove_if(matches.begin(), matches.end(),
                                 [](const FaultMatch& match) { return match.explained < least_explained; }),
                  matches.end());
    put_plain_first(matches);
    double likeliest = matches.empty() ? 0.0 : matches.front().log_weight;
    for (const FaultMatch& match : matches)
        likeliest = std::max(likeliest, match.log_weight);
    std::vector<Hypothesis> shown;
    for (std::size_t i = 0; i < matches.size(); ++i) {
        const bool equal = likeliest - matches[i].log_weight < equal_odds;
        const bool urgent = equal && will_not_wait(*matches[i].fault);
        if (i >= most_shown && !urgent)
            continue;
        Hypothesis hypothesis = made_from(matches[i], window);
        hypothesis.as_likely_as_first = i > 0 && equal && likeliest - matches[0].log_weight < equal_odds;
        hypothesis.only_for_its_urgency = i >= most_shown;
        shown.push_back(std::move(hypothesis));
    }
    if (!matches.empty())
        if (auto second = second_cause(faults, matches.front(), window))
            if (std::none_of(shown.begin(), shown.end(), [&](const Hypothesis& one) { return one.fault == second->fault; }))
                shown.push_back(std::move(*second));
    for (std::size_t i = 0; i < shown.size(); ++i)
        shown[i].rank = static_cast<int>(i) + 1;
    return shown;
}

} // namespace evenstroke
