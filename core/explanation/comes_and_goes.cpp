// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/comes_and_goes.h"

#include "core/explanation/explanation_words.h"
#include "core/reading/typed_number.h"
#include "core/sentence_words.h"
#include "core/trend/flag_text.h"
#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>
#include <set>

namespace evenstroke {
namespace {

// Sigmas of a single value, chosen so that a steady change of any size hardly ever shows both (estimates, checked by
// simulation in tests/core/comes_and_goes_test.cpp).
constexpr double off_from = 4.0, usual_below = 1.5;
constexpr std::size_t of_each = 2;
constexpr double most_between = 0.2; ///< share of the readings that may be neither
constexpr double hardly_chance = 0.1; ///< that a condition parts the readings by chance alone

/// The quantity that moved most surely, of those that are read.
std::optional<std::size_t> surest(const SubjectSeries& series, const ChangeWindow& window)
{
    std::optional<std::size_t> best;
    const auto sureness = [&](std::size_t k) { return std::abs(window.changes[k]->amount) / window.changes[k]->error; };
    for (std::size_t k = 0; k < series.quantities.size(); ++k)
        if (window.changes[k] && !fault_quantities()[k].read_as.empty() && !series.quantities[k].gauge_of_engine &&
            (!best || sureness(k) > sureness(*best)))
            best = k;
    return best;
}

std::optional<double> level_before(const QuantitySeries& series, std::size_t onset)
{
    std::vector<double> values;
    for (std::size_t i = series.start; i < onset; ++i)
        if (series.values[i])
            values.push_back(*series.values[i]);
    if (values.size() < level_needs)
        return std::nullopt;
    return drift::median_in_place(values);
}

/// Off, later as usual, and later off again.
bool returns(const ComesAndGoes& found)
{
    return std::any_of(found.usual.begin(), found.usual.end(),
                       [&](std::size_t i) { return found.off.front() < i && i < found.off.back(); });
}

/// Chance that a condition singles out exactly these readings, either way round.
double chance_to_part(std::size_t off, std::size_t usual)
{
    double ways = 1.0;
    for (std::size_t i = 1; i <= off; ++i)
        ways *= static_cast<double>(usual + i) / static_cast<double>(i);
    return 2.0 / ways;
}

std::vector<double> loads_at(const Judgement& judgement, const std::vector<std::size_t>& readings)
{
    std::vector<double> loads;
    for (const std::size_t i : readings)
        if (judgement.readings[i].load_percent)
            loads.push_back(*judgement.readings[i].load_percent);
    return loads;
}

std::string load_words(const Judgement& judgement, const ComesAndGoes& found)
{
    const auto off = loads_at(judgement, found.off), usual = loads_at(judgement, found.usual);
    if (off.size() < found.off.size() || usual.size() < found.usual.size())
        return {};
    const auto [least_off, most_off] = std::minmax_element(off.begin(), off.end());
    const auto [least_usual, most_usual] = std::minmax_element(usual.begin(), usual.end());
    if (*least_off > *most_usual)
        return "; it was off only at loads of " + two_digits(*least_off) + " % and more";
    if (*most_off < *least_usual)
        return "; it was off only at loads of " + two_digits(*most_off) + " % and less";
    return {};
}

/// The kind without the batch that is often written behind it.
std::string kind_of_fuel(const Reading& reading)
{
    const std::string words = words_of(reading, "fuel_kind");
    return words.substr(0, words.find(';'));
}

std::string fuel_words(const Judgement& judgement, const ComesAndGoes& found)
{
    std::set<std::string> off, usual;
    for (const std::size_t i : found.off)
        off.insert(kind_of_fuel(judgement.record->readings[i]));
    for (const std::size_t i : found.usual)
        usual.insert(kind_of_fuel(judgement.record->readings[i]));
    if (off.size() != 1 || off.begin()->empty() || usual.count(*off.begin()) != 0 || usual.count({}) != 0)
        return {};
    return "; it was off only on " + *off.begin() + " fuel";
}

} // namespace

std::optional<ComesAndGoes> comes_and_goes(const SubjectSeries& series, const ChangeWindow& window)
{
    const auto quantity = surest(series, window);
    const auto level = quantity ? level_before(series.quantities[*quantity], window.onset) : std::nullopt;
    if (!level)
        return std::nullopt;
    const QuantitySeries& of = series.quantities[*quantity];
    const double way = *window.amounts[*quantity] < 0.0 ? -1.0 : 1.0;
    ComesAndGoes found;
    found.quantity = *quantity;
    std::size_t between = 0;
    for (std::size_t i = window.onset; i < of.values.size(); ++i) {
        if (!of.values[i])
            continue;
        const double moved = way * (*of.values[i] - *level) / of.noise;
        if (moved >= off_from)
            found.off.push_back(i);
        else if (std::abs(moved) < usual_below)
            found.usual.push_back(i);
        else
            ++between;
    }
    const std::size_t all = found.off.size() + found.usual.size() + between;
    const bool few_between = static_cast<double>(between) <= most_between * static_cast<double>(all);
    if (found.off.size() < of_each || found.usual.size() < of_each || !few_between || !returns(found))
        return std::nullopt;
    return found;
}

std::string comes_and_goes_sentence(const SubjectSeries& series, const ChangeWindow& window, const Judgement& judgement)
{
    const auto found = comes_and_goes(series, window);
    if (!found)
        return {};
    std::string text = "It comes and goes: " + fault_quantity_words(found->quantity) + " was clearly off at " +
                       std::to_string(found->off.size()) + " readings since then and as usual at " +
                       std::to_string(found->usual.size());
    if (chance_to_part(found->off.size(), found->usual.size()) <= hardly_chance) {
        const std::string load = load_words(judgement, *found);
        text += load.empty() ? fuel_words(judgement, *found) : load;
    }
    return text + ".";
}

} // namespace evenstroke
