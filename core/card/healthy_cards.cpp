// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/healthy_cards.h"

#include "core/plain_text.h"

#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

constexpr double same_point = 0.5;       // per cent of load: nothing to go between
constexpr std::size_t most_others = 2;   // further healthy readings that are looked at for dead centre alone
constexpr std::size_t fewest_cards = 3;  // before their median stands for the installation

struct Candidate
{
    std::size_t reading = 0;
    double load = 0.0;
};

std::string load_list(const std::vector<Candidate>& candidates)
{
    std::string text;
    for (std::size_t i = 0; i < candidates.size(); ++i)
        text += (i == 0 ? "" : i + 1 == candidates.size() ? " and " : ", ") + short_number_text(std::round(candidates[i].load));
    return text;
}

/// The nearest at this load, or those on both sides of it.
std::vector<std::size_t> around(double load, const std::vector<Candidate>& candidates)
{
    const Candidate *below = nullptr, *above = nullptr;
    for (const Candidate& c : candidates) {
        if (c.load <= load && (!below || c.load > below->load))
            below = &c;
        if (c.load > load && (!above || c.load < above->load))
            above = &c;
    }
    for (const Candidate* c : {below, above})
        if (c && std::abs(c->load - load) <= same_point)
            return {c->reading};
    if (below && above)
        return {below->reading, above->reading};
    for (const Candidate* c : {below, above})
        if (c && std::abs(c->load - load) <= same_load)
            return {c->reading};
    return {};
}

/// Of those called healthy, newest first, the ones whose load no newer one has.
HealthyChoice choose_called(double load, const std::vector<Candidate>& called)
{
    HealthyChoice choice;
    std::vector<Candidate> newest;
    for (const Candidate& c : called)
        if (std::none_of(newest.begin(), newest.end(), [&](const Candidate& n) { return std::abs(n.load - c.load) <= same_load; }))
            newest.push_back(c);
    choice.readings = around(load, newest);
    for (const Candidate& c : called)
        if (choice.others.size() < most_others &&
            std::find(choice.readings.begin(), choice.readings.end(), c.reading) == choice.readings.end())
            choice.others.push_back(c.reading);
    if (choice.readings.empty())
        choice.none = "The cards called healthy were taken at " + load_list(newest) + " % load, and this reading at " +
                      short_number_text(std::round(load)) + " % lies neither near one nor between them.";
    return choice;
}

/// Nobody called any healthy: the earliest near this load, else the earliest on either side.
HealthyChoice choose_earliest(double load, const std::vector<Candidate>& earlier)
{
    HealthyChoice choice;
    choice.provisional = true;
    for (const Candidate& c : earlier)
        if (std::abs(c.load - load) <= same_load) {
            choice.readings = {c.reading};
            return choice;
        }
    std::optional<std::size_t> below, above;
    for (const Candidate& c : earlier) {
        if (c.load < load && !below)
            below = c.reading;
        if (c.load > load && !above)
            above = c.reading;
    }
    if (below && above)
        choice.readings = {*below, *above};
    else if (earlier.empty())
        choice.none = "No earlier cards with a known load are stored.";
    else
        choice.none = "No earlier cards were taken near " + short_number_text(std::round(load)) + " % load or on both sides of it.";
    return choice;
}

} // namespace

HealthyChoice choose_healthy(const Judgement& judgement, std::size_t reading, int cylinder, const CardShelf& shelf)
{
    std::vector<Candidate> called, earlier;
    for (const CardPlace& place : shelf.places) {
        if (place.cylinder != cylinder || place.reading == reading || place.reading >= judgement.readings.size())
            continue;
        const auto& load = judgement.readings[place.reading].load_percent;
        if (!load)
            continue;
        if (std::find(shelf.called_healthy.begin(), shelf.called_healthy.end(), place.reading) != shelf.called_healthy.end())
            called.push_back({place.reading, *load});
        if (place.reading < reading)
            earlier.push_back({place.reading, *load});
    }
    const auto by_time = [](const Candidate& a, const Candidate& b) { return a.reading < b.reading; };
    std::sort(called.begin(), called.end(), [&](const Candidate& a, const Candidate& b) { return by_time(b, a); });
    std::sort(earlier.begin(), earlier.end(), by_time);
    const auto& load = judgement.readings[reading].load_percent;
    if (!load) {
        HealthyChoice choice;
        choice.none = "The load of this reading is not known.";
        return choice;
    }
    return called.empty() ? choose_earliest(*load, earlier) : choose_called(*load, called);
}

void InstallationOffset::add(int cylinder, const Evaluation& card)
{
    if (!card.own_offset || !card.own_offset->half_width)
        return;
    const Found found{card.own_offset->value, 0.5 * *card.own_offset->half_width};
    found_[cylinder].push_back(found);
    all_.push_back(found);
}

/// The scatter of the cards holds what each fit is off by and what differs between cylinders or from month to month; the
/// first averages out, the second stays.
std::optional<KnownOffset> InstallationOffset::weigh(const std::vector<Found>& found, bool one_cylinder)
{
    if (found.size() < fewest_cards)
        return std::nullopt;
    std::vector<double> values, away, spreads;
    for (const Found& f : found) {
        values.push_back(f.value);
        spreads.push_back(f.spread);
    }
    const double middle = drift::median_in_place(values);
    for (const double value : values)
        away.push_back(std::abs(value - middle));
    const double n = static_cast<double>(found.size());
    // A median of few distances is too small and scatters itself (common practice: more room for fewer cards).
    const double scatter = 1.4826 * drift::median_in_place(away) * (1.0 + 2.0 / n);
    constexpr double least = 0.02; // degrees: play of the pickup and twist of the shaft (common practice, no source)
    const double by_chance = scatter * scatter * 1.57 / n; // of a median
    const double lasting = one_cylinder ? 0.0 : 0.5 * scatter * scatter;
    return KnownOffset{middle, std::sqrt(least * least + by_chance + lasting)};
}

std::optional<Estimate> InstallationOffset::of_engine() const
{
    const auto known = weigh(all_, false);
    if (known)
        return Estimate{known->value, 2.0 * known->spread};
    if (all_.empty())
        return std::nullopt;
    std::vector<double> values;
    double widest = 0.0;
    for (const Found& f : all_) {
        values.push_back(f.value);
        widest = std::max(widest, f.spread);
    }
    return Estimate{drift::median_in_place(values), 2.0 * widest};
}

std::optional<KnownOffset> InstallationOffset::of_cylinder(int cylinder) const
{
    if (const auto own = found_.find(cylinder); own != found_.end())
        if (const auto known = weigh(own->second, true))
            return known;
    return weigh(all_, false);
}

} // namespace evenstroke::indicator
