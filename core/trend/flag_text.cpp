// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/flag_text.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"
#include "core/explanation/cautions.h"
#include "core/sentence_words.h"
#include "core/trend/drift_catalogue.h"

#include <algorithm>
#include <cctype>
#include <charconv>
#include <cmath>
#include <map>

namespace evenstroke {
namespace {

std::string quantity_words(const MovedQuantity& moved) { return lower_first(quantity(moved.quantity).title); }

std::string amount_text(const MovedQuantity& moved)
{
    const Quantity& q = quantity(moved.quantity);
    const std::string symbol = moved.percent ? "%" : std::string(unit(q.unit).symbol);
    return two_digits(std::abs(moved.amount)) + (symbol.empty() || symbol == "1" ? "" : " " + symbol);
}

std::string months_text(double months)
{
    const int whole = std::max(1, static_cast<int>(std::lround(months)));
    return whole == 1 ? "1 month" : std::to_string(whole) + " months";
}

std::string change_text(const MovedQuantity& moved, bool ramp, bool first)
{
    const bool up = moved.amount > 0.0;
    if (ramp)
        return std::string(first ? (up ? " has risen " : " has fallen ") : (up ? " up " : " down ")) +
               amount_text(moved) + " a month";
    return std::string(first ? " stands " : " ") + amount_text(moved) + (up ? " higher" : " lower");
}

/// Whether the drift of an engine's value is that of its deviation from a baseline curve. The charge air is
/// followed as its difference to the coolant, whatever curve it may have (core/trend/drift_input.cpp).
bool in_baseline(const Engine& engine, const std::string& name)
{
    if (name == "scavenge_temperature")
        return false;
    return std::any_of(engine.baseline.begin(), engine.baseline.end(),
                       [&](const BaselinePoint& point) { return point.values.count(name) != 0; });
}

constexpr std::size_t most_named_quantities = 4; // a sentence, not a list: the flag itself carries them all

std::string drift_sentence(const Flag& flag, const Engine& engine, std::size_t most_named)
{
    if (flag.moved.empty())
        return subject_text(engine, flag.subject) + " has left its own level.";
    const bool cylinder = flag.subject.kind == Place::Kind::cylinder;
    std::string text = cylinder ? subject_text(engine, flag.subject) + " " + quantity_words(flag.moved.front())
                                : quantity(flag.moved.front().quantity).title;
    if (!cylinder && quantity(flag.moved.front().quantity).per == Place::Kind::cylinder)
        text += " of all cylinders";
    text += change_text(flag.moved.front(), flag.ramp, true);
    text += flag.ramp ? " for " + months_text(flag.months) : " than before " + date_text(flag.since);
    text += cylinder ? " against the other cylinders"
            : in_baseline(engine, quantity(flag.moved.front().quantity).name) ? " against the engine's own baseline"
                                                                              : " from the engine's own level";
    const std::size_t named = std::min(flag.moved.size(), most_named);
    for (std::size_t i = 1; i < named; ++i)
        text += (i == 1 ? "; " : ", ") + quantity_words(flag.moved[i]) + change_text(flag.moved[i], flag.ramp, false);
    if (named < flag.moved.size() && named > 1)
        text += " and " + std::to_string(flag.moved.size() - named) + " more";
    if (!flag.pattern_words.empty())
        text += "; the pattern of " + flag.pattern_words;
    return text + ".";
}

std::string question_sentence(const Flag& flag, const Engine& engine)
{
    return "Was work done on " + lower_first(subject_text(engine, flag.subject)) + " about " + date_text(flag.since) +
           "? Its readings took a new level at once, as they do after an overhaul, and the events hold none.";
}

std::string chance_text(double years)
{
    if (!(years > 0.0))
        return {};
    return "So strong a drift comes by chance on a sound engine about once in " +
           (years >= 1000.0 ? std::string("1000 engine-years or more seldom") : two_digits(years) + " engine-years") +
           ".";
}

} // namespace

std::string two_digits(double amount)
{
    if (!std::isfinite(amount))
        return "?";
    if (amount == 0.0)
        return "0";
    const int digits_before = static_cast<int>(std::floor(std::log10(std::abs(amount)))) + 1;
    const int decimals = std::clamp(2 - digits_before, 0, 4);
    const double step = std::pow(10.0, std::max(0, digits_before - 2));
    char buffer[64];
    const double rounded = decimals == 0 ? std::round(amount / step) * step : amount;
    const auto result = std::to_chars(buffer, buffer + sizeof buffer, rounded, std::chars_format::fixed, decimals);
    return {buffer, result.ptr};
}

std::string note_text(const FlagNote& note, const std::string& day)
{
    std::string text = day + ", " + note.who + ": ";
    if (note.said == FlagNote::Said::no_work)
        text += note.words.empty() ? "no work was done" : "no work was done; ";
    return text + note.words;
}

std::string subject_text(const Engine& engine, const Place& subject)
{
    if (subject.kind == Place::Kind::cylinder)
        return "Cylinder " + engine.cylinder_name(subject.number);
    if (subject.kind == Place::Kind::engine || subject.kind == Place::Kind::ship)
        return "The engine";
    std::string text = place_text(subject);
    text[0] = static_cast<char>(std::toupper(static_cast<unsigned char>(text[0])));
    return text;
}

std::string next_check(const std::string& pattern, const std::string& quantity_name)
{
    static const std::map<std::string, std::string> checks = [] {
        std::map<std::string, std::string> loaded;
        const CatalogueTable table(catalogue_text::next_checks);
        for (std::size_t row = 0; row < table.rows(); ++row)
            loaded[table.cell(row, "finding")] = table.cell(row, "check");
        return loaded;
    }();
    for (const std::string& key : {pattern, quantity_name})
        if (const auto found = checks.find(key); !key.empty() && found != checks.end())
            return found->second;
    return "Read the value again at the same load and compare the instrument.";
}

void word_flag(Flag& flag, const Engine& engine, double years)
{
    const std::string quantity_name = quantity(flag.quantity).name;
    if (const drift::Signature* signature = drift::find_signature(flag.pattern))
        flag.pattern_words = signature->title;
    if (flag.severity == Level::ask) {
        flag.sentence = question_sentence(flag, engine);
        flag.next_check = "If work was done, write it into the events; the comparison then starts anew from it.";
        return;
    }
    flag.sentence = drift_sentence(flag, engine, most_named_quantities);
    flag.chance_sentence = chance_text(years);
    flag.next_check = next_check(flag.pattern, quantity_name);
    flag.cautions = cautions_for(flag.pattern, quantity_name, engine.two_stroke());
}

std::string short_sentence(const Flag& flag, const Engine& engine)
{
    return flag.severity == Level::ask || flag.absolute_limit ? flag.sentence : drift_sentence(flag, engine, 1);
}

std::string limit_sentence(const Engine& engine, const Place& place, const Quantity& q, double value, double limit,
                           bool above, const std::string& source)
{
    const std::string symbol(unit(q.unit).symbol);
    char number[32], mark[32];
    const auto number_end = std::to_chars(number, number + sizeof number, value, std::chars_format::general, 6).ptr;
    const auto mark_end = std::to_chars(mark, mark + sizeof mark, limit, std::chars_format::general, 6).ptr;
    std::string text = place.kind == Place::Kind::engine ? q.title
                                                         : subject_text(engine, place) + " " + lower_first(q.title);
    text += " read " + std::string(number, number_end) + " " + symbol + ", " + (above ? "above" : "below") +
            " the limit of " + std::string(mark, mark_end) + " " + symbol;
    return text + (source.empty() ? "." : " (" + source + ").");
}

std::string doubt_sentence(const Engine& engine, const Doubt& doubt, const std::string& typed_text)
{
    std::string where = doubt.place && doubt.place->kind != Place::Kind::engine
                            ? subject_text(engine, *doubt.place) + (doubt.quantity ? " " : "")
                            : std::string();
    if (doubt.quantity)
        where += where.empty() ? quantity(*doubt.quantity).title : lower_first(quantity(*doubt.quantity).title);
    const std::string typed = typed_text.empty() ? "" : ", typed " + typed_text + ",";
    const std::string meant = doubt.suggestion ? " Was " + *doubt.suggestion + " meant?" : "";
    switch (doubt.verdict) {
    case Doubt::Verdict::decimal_slip: return where + typed + " looks as if the decimal sign slipped." + meant;
    case Doubt::Verdict::digits_swapped:
        if (doubt.suggestion && doubt.suggestion->size() > typed_text.size() && !typed_text.empty())
            return where + typed + " looks as if a digit were missing." + meant;
        return where + typed + " looks as if two digits changed places." + meant;
    case Doubt::Verdict::unit_slip:
        return where + ": the whole row looks as if it were in another unit. Look at the gauge's face and the unit chosen.";
    case Doubt::Verdict::cylinders_swapped:
        return where + " looks as if it stood in another cylinder's box. Were two cylinders exchanged?";
    case Doubt::Verdict::copied:
        return (where.empty() ? std::string("More than half of all values") : where + ": the values") +
               " equal earlier ones to the last digit. Were they copied?";
    case Doubt::Verdict::unsteady:
        return "All values scatter more than usual: the load was probably not steady. The reading is shown, and raises nothing.";
    case Doubt::Verdict::implausible: break;
    }
    return where + typed + " is far from what this place usually reads. Please read it again or confirm it.";
}

} // namespace evenstroke
