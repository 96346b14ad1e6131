// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/steadiness.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"
#include "core/reading/place_kinds.h"
#include "core/reading/typed_number.h"
#include "core/sentence_words.h"

#include <algorithm>
#include <charconv>
#include <cmath>
#include <map>
#include <stdexcept>

namespace evenstroke {
namespace {

/// One line of resources/catalogue/steadiness.csv. Course and helm, which common practice names too, are
/// not among the quantities of a reading and are left to the engineer.
struct Criterion
{
    enum class Form {
        relative, ///< change between the lines in % of the first
        absolute, ///< change between the lines in the quantity's unit
        at_least, ///< the value itself, a lower limit
        at_most,  ///< the value itself, an upper limit
        walk,     ///< minutes between the clock times of the two lines
        draughts, ///< a depth in mean draughts of the ship; must be greater
        same,     ///< words that must not differ between the lines
    };
    QuantityId quantity = 0;
    Form form = Form::relative;
    std::optional<double> steady, care, set_steady, set_care;
};

using Finding = SteadinessFinding;

Criterion::Form form_named(const std::string& name)
{
    static const std::map<std::string, Criterion::Form> forms{
        {"relative", Criterion::Form::relative}, {"absolute", Criterion::Form::absolute},
        {"at_least", Criterion::Form::at_least}, {"at_most", Criterion::Form::at_most},
        {"walk", Criterion::Form::walk},         {"draughts", Criterion::Form::draughts},
        {"same", Criterion::Form::same}};
    return forms.at(name);
}

std::vector<Criterion> load_criteria()
{
    const CatalogueTable table(catalogue_text::steadiness);
    std::vector<Criterion> criteria;
    for (std::size_t row = 0; row < table.rows(); ++row) {
        Criterion criterion;
        const auto found =
            find_quantity(table.cell(row, "quantity"), place_kind_named(table.cell(row, "per")));
        if (!found)
            throw std::logic_error("steadiness.csv names an unknown quantity: " +
                                   table.cell(row, "quantity"));
        criterion.quantity = *found;
        criterion.form = form_named(table.cell(row, "form"));
        criterion.steady = table.number(row, "steady");
        criterion.care = table.number(row, "care");
        criterion.set_steady = table.number(row, "set_steady");
        criterion.set_care = table.number(row, "set_care");
        criteria.push_back(criterion);
    }
    return criteria;
}

/// Mean over the places that were read in one phase, in the quantity's own unit.
std::optional<double> mean_of(const Reading& reading, QuantityId wanted, Phase phase)
{
    const auto barometer = barometer_of(reading);
    double sum = 0.0;
    int count = 0;
    for (const Value& value : reading.values) {
        if (value.quantity != wanted || value.phase != phase)
            continue;
        if (const auto own = number_in_own_unit(value, barometer)) {
            sum += *own;
            ++count;
        }
    }
    return count > 0 ? std::optional(sum / count) : std::nullopt;
}

/// Means of both lines over those places that stand in both: a cylinder read only once moves no mean.
std::optional<std::pair<double, double>> pair_of(const Reading& reading, QuantityId wanted)
{
    const auto barometer = barometer_of(reading);
    double before_sum = 0.0, after_sum = 0.0;
    int count = 0;
    for (const Value& before : reading.values) {
        if (before.quantity != wanted || before.phase != Phase::before)
            continue;
        for (const Value& after : reading.values) {
            if (after.quantity != wanted || after.phase != Phase::after || after.place != before.place)
                continue;
            const auto first = number_in_own_unit(before, barometer),
                       second = number_in_own_unit(after, barometer);
            if (first && second) {
                before_sum += *first;
                after_sum += *second;
                ++count;
            }
        }
    }
    if (count == 0)
        return std::nullopt;
    return std::pair(before_sum / count, after_sum / count);
}

const Value* find_words(const Reading& reading, QuantityId wanted, Phase phase)
{
    for (const Value& value : reading.values)
        if (value.quantity == wanted && value.phase == phase && value.missing == MissingReason::none)
            return &value;
    return nullptr;
}

std::string words_of(const Value& value)
{
    return value.words.empty() ? value.typed : value.words;
}

/// Rounding of decimal fractions to binary must not put a value that stands exactly on a limit beyond it.
constexpr double rounding_room = 1e-9;

Steadiness grade(double amount, double steady, double care)
{
    if (amount <= steady * (1.0 + rounding_room))
        return Steadiness::steady;
    return amount <= care * (1.0 + rounding_room) ? Steadiness::usable_with_care : Steadiness::unsteady;
}

std::string limit_words(const std::string& steady, const std::string& care, Steadiness verdict)
{
    return verdict == Steadiness::steady ? "steady up to " + steady
                                         : "steady up to " + steady + ", usable with care up to " + care;
}

Finding judge_change(const Criterion& criterion, const Reading& reading, double steady, double care)
{
    const auto pair = pair_of(reading, criterion.quantity);
    if (!pair)
        return {};
    const Quantity& meant = quantity(criterion.quantity);
    const double change = std::abs(pair->second - pair->first);
    const bool relative = criterion.form == Criterion::Form::relative;
    if (relative && pair->first == 0.0 && change != 0.0)
        return {}; // no share of nothing
    const double amount = !relative ? change : change == 0.0 ? 0.0 : 100.0 * change / std::abs(pair->first);
    const std::string unit_words = relative ? " %" : " " + unit_behind(meant.unit);

    Finding finding;
    finding.from_pair = true;
    finding.verdict = grade(amount, steady, care);
    finding.severity = amount / (finding.verdict == Steadiness::unsteady ? care : steady);
    finding.words = lower_first(meant.title) + " was " + plain_number(pair->first, meant.decimals) +
                    " before and " + with_own_unit(criterion.quantity, pair->second) +
                    " after, a change of " + plain_number(amount, relative ? 2 : meant.decimals) +
                    unit_words + " (" +
                    limit_words(plain_number(steady, 0) + unit_words, plain_number(care, 0) + unit_words,
                                finding.verdict) +
                    ")";
    constexpr double no_engine_changes_so = 40.0; // per cent between the quick lines (estimate)
    if (relative && amount > no_engine_changes_so)
        finding.words += "; one of the two is probably miswritten: read both again";
    finding.before = pair->first;
    finding.after = pair->second;
    finding.amount = amount;
    finding.unit = relative ? "%" : unit_behind(meant.unit);
    return finding;
}

Finding judge_settled(const Criterion& criterion, const Reading& reading, double steady, double care)
{
    auto waited = mean_of(reading, criterion.quantity, Phase::reading);
    if (!waited)
        waited = mean_of(reading, criterion.quantity, Phase::before);
    if (!waited)
        return {};
    Finding finding;
    finding.verdict = *waited >= steady ? Steadiness::steady
                      : *waited >= care ? Steadiness::usable_with_care
                                        : Steadiness::unsteady;
    const double limit = finding.verdict == Steadiness::unsteady ? care : steady;
    finding.severity = *waited > 0.0 ? limit / *waited : 1e6;
    finding.amount = *waited;
    finding.unit = "min";
    finding.words = "the setting had been unchanged for " + plain_number(*waited, 0) + " min (steady from " +
                    plain_number(steady, 0) + " min, usable with care from " + plain_number(care, 0) +
                    " min)";
    return finding;
}

Finding judge_condition(const Criterion& criterion, const Reading& reading, double steady, double care)
{
    const auto met = mean_of(reading, criterion.quantity, Phase::reading);
    if (!met)
        return {};
    const Quantity& meant = quantity(criterion.quantity);
    const std::string behind = unit_behind(meant.unit).empty() ? "" : " " + unit_behind(meant.unit);
    Finding finding;
    finding.verdict = grade(*met, steady, care);
    finding.severity = *met / (finding.verdict == Steadiness::unsteady ? care : steady);
    finding.amount = *met;
    finding.unit = unit_behind(meant.unit);
    finding.words = lower_first(meant.title) + " was " + with_own_unit(criterion.quantity, *met) + " (" +
                    limit_words(plain_number(steady, meant.decimals) + behind,
                                plain_number(care, meant.decimals) + behind, finding.verdict) +
                    ")";
    return finding;
}

std::optional<double> ship_number(const Reading& reading, const char* name)
{
    const auto wanted = find_quantity(name, Place::Kind::ship);
    if (!wanted)
        return std::nullopt;
    return mean_of(reading, *wanted, Phase::reading);
}

Finding judge_depth(const Criterion& criterion, const Reading& reading, double steady, double care)
{
    const auto depth = mean_of(reading, criterion.quantity, Phase::reading);
    const auto forward = ship_number(reading, "draught_forward");
    if (!forward)
        return {};
    const auto aft = ship_number(reading, "draught_aft");
    if (!aft)
        return {};
    const double draught = 0.5 * (*forward + *aft);
    if (!depth || draught <= 0.0)
        return {};
    const double ratio = *depth / draught;
    Finding finding;
    finding.verdict = ratio > steady ? Steadiness::steady
                      : ratio > care ? Steadiness::usable_with_care
                                     : Steadiness::unsteady;
    finding.severity = (finding.verdict == Steadiness::unsteady ? care : steady) / std::max(ratio, 1e-6);
    finding.amount = *depth;
    finding.unit = unit_behind(quantity(criterion.quantity).unit);
    finding.words = "the water was " + with_own_unit(criterion.quantity, *depth) +
                    " deep at a mean draught of " + plain_number(draught, 1) + " m, " +
                    plain_number(ratio, 1) + " times (steady above " + plain_number(steady, 0) +
                    " times, usable with care above " + plain_number(care, 0) + " times)";
    return finding;
}

/// Clock times of one day: "9:05", "09.05", "0905". Minutes after midnight.
std::optional<int> clock_minutes(const std::string& text)
{
    std::string digits;
    for (const char c : text) {
        if (c >= '0' && c <= '9')
            digits += c;
        else if (c != ':' && c != '.' && c != ' ' && c != 'h')
            return std::nullopt;
    }
    if (digits.size() < 3 || digits.size() > 4)
        return std::nullopt;
    int number = 0;
    std::from_chars(digits.data(), digits.data() + digits.size(), number);
    const int hours = number / 100, minutes = number % 100;
    return hours < 24 && minutes < 60 ? std::optional(hours * 60 + minutes) : std::nullopt;
}

Finding judge_walk(const Criterion& criterion, const Reading& reading, double steady, double care)
{
    const Value* before = find_words(reading, criterion.quantity, Phase::before);
    const Value* after = find_words(reading, criterion.quantity, Phase::after);
    const auto began = before ? clock_minutes(words_of(*before)) : std::nullopt;
    const auto ended = after ? clock_minutes(words_of(*after)) : std::nullopt;
    if (!began || !ended)
        return {};
    const int minutes = (*ended - *began + 24 * 60) % (24 * 60); // a walk may pass midnight
    Finding finding;
    finding.verdict = grade(minutes, steady, care);
    finding.severity = minutes / (finding.verdict == Steadiness::unsteady ? care : steady);
    finding.amount = minutes;
    finding.unit = "min";
    finding.words =
        "the walk took " + std::to_string(minutes) + " min, from " + words_of(*before) + " to " +
        words_of(*after) + " (" +
        limit_words(plain_number(steady, 0) + " min", plain_number(care, 0) + " min", finding.verdict) + ")";
    return finding;
}

Finding judge_sameness(const Criterion& criterion, const Reading& reading)
{
    const Value* before = find_words(reading, criterion.quantity, Phase::before);
    const Value* after = find_words(reading, criterion.quantity, Phase::after);
    if (!before || !after)
        return {};
    Finding finding;
    finding.from_pair = true;
    const bool same = before->value_si && after->value_si ? *before->value_si == *after->value_si
                                                          : words_of(*before) == words_of(*after);
    finding.verdict = same ? Steadiness::steady : Steadiness::unsteady;
    finding.severity = same ? 0.0 : 1e6;
    finding.words = lower_first(quantity(criterion.quantity).title) + " was " + words_of(*before) +
                    " before and " + words_of(*after) + " after (it must stay the same all through)";
    return finding;
}

Finding judge_criterion(const Criterion& criterion, const Reading& reading, bool generating_set)
{
    if (criterion.form == Criterion::Form::same)
        return judge_sameness(criterion, reading);
    const auto steady = generating_set ? criterion.set_steady : criterion.steady;
    const auto care = generating_set ? criterion.set_care : criterion.care;
    if (!steady || !care)
        return {};
    switch (criterion.form) {
    case Criterion::Form::at_least:
        return judge_settled(criterion, reading, *steady, *care);
    case Criterion::Form::at_most:
        return judge_condition(criterion, reading, *steady, *care);
    case Criterion::Form::walk:
        return judge_walk(criterion, reading, *steady, *care);
    case Criterion::Form::draughts:
        return judge_depth(criterion, reading, *steady, *care);
    default:
        return judge_change(criterion, reading, *steady, *care);
    }
}

} // namespace

std::vector<SteadinessFinding> steadiness_findings(const Reading& reading, bool generating_set)
{
    static const std::vector<Criterion> criteria = load_criteria();
    std::vector<SteadinessFinding> findings;
    for (const Criterion& criterion : criteria) {
        SteadinessFinding finding = judge_criterion(criterion, reading, generating_set);
        if (finding.verdict == Steadiness::not_judged)
            continue;
        finding.quantity = criterion.quantity;
        findings.push_back(std::move(finding));
    }
    return findings;
}

} // namespace evenstroke
