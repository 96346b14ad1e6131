// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/event_effect.h"

#include "core/sentence_words.h"
#include "core/trend/drift_input.h"

#include <algorithm>

namespace evenstroke {
namespace {

/// Turbochargers and coolers are not counted in the engine's particulars; more than this is a slip of the pen.
constexpr int most_machines = 9;

std::string lower_title(const std::string& quantity_name)
{
    const auto id = find_quantity(quantity_name);
    if (!id)
        return quantity_name;
    return lower_first(quantity(*id).title);
}

bool of_air_side(const EventKind& kind, const Place& place)
{
    return kind.concerns == "turbocharger" || kind.concerns == "cooler" || place.kind == Place::Kind::turbocharger
           || place.kind == Place::Kind::cooler;
}

const char* const needs_eight = ": eight usable readings are needed before it can be flagged.";

std::string work_sentence(const EventKind& kind, const Event& event, const Engine& engine)
{
    if (event.place.kind == Place::Kind::cylinder)
        return "From here on " + place_words(engine, event.place) + " is compared anew" + needs_eight;
    if (of_air_side(kind, event.place))
        return std::string("From here on the engine's air and exhaust side is compared anew") + needs_eight
               + " The cylinders go on as before.";
    return std::string("From here on the engine and every cylinder are compared anew") + needs_eight;
}

std::string instrument_sentence(const EventKind& kind, const Event& event, const Engine& engine)
{
    const bool by_part = std::find(kind.quantities.begin(), kind.quantities.end(), "quantity_read") != kind.quantities.end();
    if (!by_part)
        return "From here on what this instrument reads takes its own level anew; nothing else changes.";
    if (event.part.empty())
        return "It does not say which instrument, so everything at " + place_words(engine, event.place)
               + " is compared anew. Name the quantity to keep the rest.";
    return "From here on the " + lower_title(event.part) + " of " + place_words(engine, event.place)
           + " takes its own level anew; nothing else changes.";
}

std::string count_words(const Engine& engine)
{
    return "The engine has " + std::to_string(engine.cylinders) + (engine.cylinders == 1 ? " cylinder" : " cylinders");
}

} // namespace

bool starts_anew(const Event& event)
{
    const EventKind* kind = find_event_kind(event.kind);
    return kind && kind->concerns != "ship" && kind->effect == EventKind::Effect::new_segment;
}

std::string event_words(const Event& event, const std::string& place)
{
    const EventKind* kind = find_event_kind(event.kind);
    return (kind ? lower_first(kind->title) : event.kind) + place + " on " + short_date(event.date.utc);
}

std::string event_effect_word(const Event& event)
{
    const EventKind* kind = find_event_kind(event.kind);
    if (!kind || kind->concerns == "ship")
        return "mark only";
    if (starts_anew(event))
        return "compared anew";
    return kind->effect == EventKind::Effect::new_offset ? "instrument anew" : "mark only";
}

std::string event_effect_sentence(const Event& event, const Engine& engine)
{
    const EventKind* kind = find_event_kind(event.kind);
    if (starts_anew(event))
        return work_sentence(*kind, event, engine);
    if (kind && kind->concerns != "ship" && kind->effect == EventKind::Effect::new_offset)
        return instrument_sentence(*kind, event, engine);
    return "A mark on the trends; the comparison goes on.";
}

std::string same_day_sentence(const Event& event, const EngineRecord& record)
{
    const EventKind* kind = find_event_kind(event.kind);
    if (!kind || !event.date_only || (kind->effect != EventKind::Effect::new_segment && kind->effect != EventKind::Effect::new_offset))
        return {};
    const auto day = std::chrono::floor<std::chrono::days>(event.date.utc);
    const std::size_t first_after = first_reading_after(record, event);
    for (std::size_t i = record.readings.size(); i-- > 0;) {
        const TimePoint taken = record.readings[i].taken_at.utc;
        if (std::chrono::floor<std::chrono::days>(taken) != day)
            continue;
        const bool after = i >= first_after;
        const TimePoint other = after ? taken + std::chrono::hours(1) : taken - std::chrono::hours(1);
        return "A reading was taken on that day, at " + utc_text(taken) + ". It counts as taken " +
               (after ? "after" : "before") + " this, since a day without a time stands for noon. If it was " +
               (after ? "before" : "after") + ", write the time into the date, such as " + utc_text(other) + ".";
    }
    return {};
}

std::string record_book_reminder(const Event& event)
{
    const EventKind* kind = find_event_kind(event.kind);
    if (!kind || !kind->record_book)
        return {};
    return "This touches a setting or part of the engine's technical file: enter it in the engine's own record book of "
           "parameters as well. Evenstroke is no approved record book.";
}

bool takes_number(const EventKind& kind)
{
    return kind.concerns != "engine" && kind.concerns != "ship";
}

Result<Place> place_of_event(const EventKind& kind, std::optional<int> number, const Engine& engine)
{
    if (!number) {
        if (kind.concerns == "cylinder")
            return invalid_input(kind.title + " belongs to a cylinder, and none is named.", "Type the cylinder's number.");
        return Place::engine();
    }
    if (!takes_number(kind))
        return invalid_input(kind.title + " belongs to the whole " + kind.concerns + ", not to number " + std::to_string(*number) + ".",
                             "Leave the number out.");
    const bool machine = kind.concerns == "turbocharger" || kind.concerns == "cooler";
    const int most = machine ? most_machines : engine.cylinders;
    if (*number < 1 || *number > most)
        return invalid_input(machine ? "There is no " + kind.concerns + " " + std::to_string(*number) + "."
                                     : count_words(engine) + ", so there is no number " + std::to_string(*number) + ".",
                             "Type a number from 1 to " + std::to_string(most) + ".");
    if (kind.concerns == "turbocharger")
        return Place::turbocharger(*number);
    return kind.concerns == "cooler" ? Place::cooler(*number) : Place::cylinder(*number);
}

} // namespace evenstroke
