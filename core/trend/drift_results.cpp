// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/drift_results.h"

#include "core/trend/drift_catalogue.h"
#include "core/trend/drift_input.h"
#include "core/trend/flag_text.h"
#include "core/trend/limits_ahead.h"

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

/// Where the one value of an engine quantity stands: the engine has it, or its only turbocharger or cooler.
Place place_of_engine_value(const Reading& reading, QuantityId id)
{
    std::optional<Place> only;
    for (const Value& value : reading.values) {
        if (quantity(value.quantity).name != quantity(id).name || value.place.kind == Place::Kind::cylinder ||
            value.phase != Phase::reading)
            continue;
        if (only)
            return Place::engine();
        only = value.place;
    }
    return only.value_or(Place::engine());
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
        doubt.place = doubt.quantity ? place_of_engine_value(reading, *doubt.quantity) : Place::engine();
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

/// Outside its hard range, and nobody has said that it stands so.
bool is_impossible(const Reading& reading, const JudgedValue& value)
{
    const Range& hard = quantity(value.quantity).hard;
    return ((hard.low && value.raw < *hard.low) || (hard.high && value.raw > *hard.high)) &&
           !reading.values[value.value_index].confirmed;
}

bool is_doubted(std::span<const Doubt> doubts, const JudgedValue& value)
{
    return std::any_of(doubts.begin(), doubts.end(), [&](const Doubt& doubt) {
        return doubt.verdict != Doubt::Verdict::unsteady && (!doubt.quantity || *doubt.quantity == value.quantity) &&
               (!doubt.place || *doubt.place == value.place);
    });
}

/// The typing check sees only what drift watches and the baseline reaches; this names the rest.
Doubt impossible(const EngineRecord& record, std::size_t reading, const JudgedValue& value)
{
    Doubt doubt;
    doubt.verdict = Doubt::Verdict::implausible;
    doubt.reading = reading;
    doubt.quantity = value.quantity;
    doubt.place = value.place;
    const Value& typed = record.readings[reading].values[value.value_index];
    doubt.sentence = doubt_sentence(record.engine, doubt, typed.typed + " " + std::string(unit(typed.unit).symbol));
    return doubt;
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

/// The level at the last reading, and where it rose to it.
void set_standing_level(Flag& flag, const drift::Flag& from)
{
    if (!from.active)
        return;
    flag.level_now = flag.severity;
    for (const drift::Escalation& escalation : from.escalations)
        if (level_of(escalation.level) > flag.level_now) {
            flag.level_now = level_of(escalation.level);
            flag.raised_at = escalation.reading;
        }
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
    set_standing_level(flag, from);
    flag.threshold = from.cylinder ? output.cylinder_threshold : output.engine_threshold;
    fill_from_view(flag, judgement, from, from.at_start);
    flag.first_sentence = flag.sentence;
    flag.first_chance_sentence = flag.chance_sentence;
    flag.first_quantity = flag.quantity;
    fill_from_view(flag, judgement, from, from.now);
    for (std::size_t i = from.now.onset; i <= from.last_reading; ++i)
        flag.carrying.push_back(i);
    flag.time_to_limit = limit_ahead(judgement.record->engine, input, output, flag, from);
    return flag;
}

} // namespace

QuantityId drift_quantity(std::string_view name)
{
    if (name.substr(0, median_prefix.size()) == median_prefix)
        name.remove_prefix(median_prefix.size());
    if (const auto id = find_quantity(name, Place::Kind::cylinder))
        return *id; // typed ones; derived ones have one line each
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

void add_doubts(Judgement& judgement, const drift::Output& output)
{
    const EngineRecord& record = *judgement.record;
    auto next = output.doubts.begin();
    for (std::size_t i = 0; i < judgement.readings.size(); ++i) {
        const std::size_t first = judgement.doubts.size();
        for (; next != output.doubts.end() && next->reading == i; ++next) {
            const auto rows = translate_doubts(record.engine, record.readings[i], {*next});
            judgement.doubts.insert(judgement.doubts.end(), rows.begin(), rows.end());
        }
        for (const JudgedValue& value : judgement.readings[i].values)
            if (is_impossible(record.readings[i], value) &&
                !is_doubted(std::span(judgement.doubts).subspan(first), value))
                judgement.doubts.push_back(impossible(record, i, value));
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
