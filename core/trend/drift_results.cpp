// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/drift_results.h"

#include "core/trend/drift_catalogue.h"
#include "core/trend/drift_input.h"
#include "core/trend/flag_text.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {
namespace {

constexpr std::string_view median_prefix = "median ";

Doubt::Verdict verdict_of(drift::Verdict verdict)
{
    switch (verdict) {
    case drift::Verdict::decimal_slip: return Doubt::Verdict::decimal_slip;
    case drift::Verdict::digits_swapped: return Doubt::Verdict::digits_swapped;
    case drift::Verdict::unit_slip: return Doubt::Verdict::unit_slip;
    case drift::Verdict::cylinders_swapped: return Doubt::Verdict::cylinders_swapped;
    case drift::Verdict::copied: return Doubt::Verdict::copied;
    case drift::Verdict::unsteady: return Doubt::Verdict::unsteady;
    case drift::Verdict::implausible: break;
    }
    return Doubt::Verdict::implausible;
}

std::string typed_text_at(const Reading& reading, QuantityId id, const Place& place)
{
    const Value* value = reading.find(id, place);
    return value ? value->typed + " " + std::string(unit(value->unit).symbol) : std::string();
}

Doubt translate(const Engine& engine, const Reading& reading, const drift::Doubt& from, std::optional<std::size_t> cylinder)
{
    Doubt doubt;
    doubt.verdict = verdict_of(from.verdict);
    doubt.reading = from.reading;
    if (!from.quantity.empty())
        doubt.quantity = find_quantity(from.quantity, from.engine_level ? Place::Kind::engine : Place::Kind::cylinder);
    if (cylinder)
        doubt.place = Place::cylinder(static_cast<int>(*cylinder) + 1);
    else if (from.engine_level)
        doubt.place = Place::engine();
    if (!from.suggested_text.empty())
        doubt.suggestion = from.suggested_text;
    const std::string typed =
        doubt.quantity && doubt.place ? typed_text_at(reading, *doubt.quantity, *doubt.place) : std::string();
    doubt.sentence = doubt_sentence(engine, doubt, typed);
    return doubt;
}

Level level_of(drift::Level level)
{
    switch (level) {
    case drift::Level::quiet: return Level::quiet;
    case drift::Level::note: return Level::note;
    case drift::Level::ask: return Level::ask;
    case drift::Level::watch: return Level::watch;
    case drift::Level::act: return Level::act;
    }
    return Level::quiet;
}

bool is_percent(const std::string& quantity_name, bool cylinder)
{
    const auto* channel =
        drift::find_channel(quantity_name, cylinder ? drift::Subject::cylinder : drift::Subject::engine);
    return channel && channel->form == drift::DeviationForm::percent;
}

std::vector<MovedQuantity> moved_quantities(const drift::Flag::View& view, bool cylinder)
{
    std::vector<MovedQuantity> moved;
    for (const drift::QuantityChange& change : view.changes)
        moved.push_back({drift_quantity(change.quantity), change.size, change.strength,
                         is_percent(change.quantity, cylinder)});
    return moved;
}

/// In a pattern the quantity that the fault moves most leads the sentence, unless it hardly moved here.
void lead_with_the_pattern(std::vector<MovedQuantity>& moved, const std::string& pattern)
{
    const drift::Signature* signature = drift::find_signature(pattern);
    if (!signature || moved.empty() || signature->moves.empty())
        return;
    const auto main = std::max_element(signature->moves.begin(), signature->moves.end(), [](const auto& a, const auto& b) {
        return std::abs(a.amount) < std::abs(b.amount);
    });
    const auto found = std::find_if(moved.begin(), moved.end(), [&](const MovedQuantity& one) {
        return one.quantity == drift_quantity(main->quantity);
    });
    if (found != moved.end() && std::abs(found->strength) >= 0.5 * std::abs(moved.front().strength))
        std::rotate(moved.begin(), found, found + 1);
}

TimePoint time_of(const Judgement& judgement, std::size_t reading)
{
    const auto& readings = judgement.record->readings;
    return reading < readings.size() ? readings[reading].taken_at.utc : TimePoint{};
}

Level standing_level(const drift::Flag& from)
{
    if (!from.active)
        return Level::quiet;
    Level level = level_of(from.level);
    for (const drift::Escalation& escalation : from.escalations)
        level = std::max(level, level_of(escalation.level));
    return level;
}

/// The absolute mark in the direction of the drift, as a distance from the cylinder's level before it.
std::optional<TimeToLimit> limit_ahead(const Judgement& judgement, const drift::Input& input, const drift::Output& output,
                                       const Flag& flag, const drift::Flag& from)
{
    if (!from.cylinder || !flag.ramp || flag.moved.empty())
        return std::nullopt;
    for (std::size_t k = 0; k < input.channels.size(); ++k) {
        const drift::Channel& channel = input.channels[k];
        if (drift_quantity(channel.quantity) != flag.quantity)
            continue;
        const bool up = flag.moved.front().amount > 0.0;
        const auto allowed = up ? channel.allowed_rise : channel.allowed_fall;
        if (!allowed)
            return std::nullopt;
        const double limit = up ? *allowed : -*allowed;
        const auto found = drift::time_to_limit(input, output, k, *from.cylinder, from.last_reading, limit);
        if (!found)
            return std::nullopt;
        TimeToLimit time{limit, {}, found->months_5, found->months_50, found->months_95};
        const bool percent = is_percent(channel.quantity, true);
        const Quantity& q = quantity(flag.quantity);
        time.limit_text = two_digits(std::abs(limit)) + " " + (percent ? "%" : std::string(unit(q.unit).symbol)) +
                          (up ? " above" : " below") + " its level before";
        (void)judgement;
        return time;
    }
    return std::nullopt;
}

/// Writes one view of a drift flag, as it started or as it stands, into the flag and words it.
void fill_from_view(Flag& flag, const Judgement& judgement, const drift::Flag& from, const drift::Flag::View& view)
{
    flag.pattern = view.is_signature ? view.candidate : std::string();
    flag.pattern_words.clear();
    flag.ramp = view.shape == drift::Shape::ramp;
    flag.since = time_of(judgement, from.work_before ? *from.work_before : view.since);
    flag.months = view.months;
    flag.evidence = view.evidence;
    flag.moved = moved_quantities(view, from.cylinder.has_value());
    lead_with_the_pattern(flag.moved, flag.pattern);
    if (!flag.moved.empty())
        flag.quantity = flag.moved.front().quantity;
    else if (!view.is_signature && !view.candidate.empty())
        flag.quantity = drift_quantity(view.candidate);
    word_flag(flag, judgement.record->engine, view.years_by_chance);
}

Flag translate_flag(const Judgement& judgement, const drift::Input& input, const drift::Output& output,
                    const drift::Flag& from)
{
    Flag flag;
    flag.reading = from.reading;
    flag.subject = from.cylinder ? Place::cylinder(static_cast<int>(*from.cylinder) + 1) : Place::engine();
    flag.severity = level_of(from.level);
    flag.level_now = standing_level(from);
    flag.threshold = from.cylinder ? output.cylinder_threshold : output.engine_threshold;
    fill_from_view(flag, judgement, from, from.at_start);
    flag.first_sentence = flag.sentence;
    flag.first_quantity = flag.quantity;
    fill_from_view(flag, judgement, from, from.now);
    for (std::size_t i = from.now.onset; i <= from.last_reading; ++i)
        flag.carrying.push_back(i);
    flag.time_to_limit = limit_ahead(judgement, input, output, flag, from);
    return flag;
}

} // namespace

QuantityId drift_quantity(std::string_view name)
{
    if (name.substr(0, median_prefix.size()) == median_prefix)
        name.remove_prefix(median_prefix.size());
    if (const auto id = find_quantity(name, Place::Kind::cylinder))
        return *id;
    return find_quantity(name).value_or(0);
}

std::vector<Doubt> translate_doubts(const Engine& engine, const Reading& reading, const std::vector<drift::Doubt>& doubts)
{
    std::vector<Doubt> translated;
    for (const drift::Doubt& from : doubts) {
        if (from.cylinders.empty())
            translated.push_back(translate(engine, reading, from, std::nullopt));
        for (std::size_t cylinder : from.cylinders)
            translated.push_back(translate(engine, reading, from, cylinder));
    }
    return translated;
}

void add_doubts(Judgement& judgement, const drift::Input&, const drift::Output& output)
{
    for (const drift::Doubt& doubt : output.doubts) {
        const Reading& reading = judgement.record->readings[doubt.reading];
        const auto rows = translate_doubts(judgement.record->engine, reading, {doubt});
        judgement.doubts.insert(judgement.doubts.end(), rows.begin(), rows.end());
    }
}

void add_evidence(Judgement& judgement, const drift::Output& output)
{
    const std::size_t readings = judgement.readings.size();
    const std::size_t cylinders = readings == 0 ? 0 : output.cylinders.size() / readings;
    for (std::size_t j = 0; j < cylinders; ++j) {
        Evidence evidence{Place::cylinder(static_cast<int>(j) + 1), {}, output.cylinder_threshold};
        for (std::size_t i = 0; i < readings; ++i)
            evidence.amount.push_back(output.cylinders[i * cylinders + j].evidence);
        judgement.evidence.push_back(std::move(evidence));
    }
    Evidence engine{Place::engine(), {}, output.engine_threshold};
    for (const drift::SubjectResult& result : output.engine)
        engine.amount.push_back(result.evidence);
    judgement.evidence.push_back(std::move(engine));
}

void add_flags(Judgement& judgement, const drift::Input& input, const drift::Output& output)
{
    for (const drift::Flag& flag : output.flags)
        judgement.flags.push_back(translate_flag(judgement, input, output, flag));
}

} // namespace evenstroke
