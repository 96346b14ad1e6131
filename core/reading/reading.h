// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/quantity_catalogue.h"

#include <chrono>
#include <optional>
#include <string>
#include <vector>

namespace evenstroke {

using TimePoint = std::chrono::sys_seconds;

/// A date and time with the ship's offset. Everything is ordered and compared in UTC.
struct StampedTime
{
    TimePoint utc{};
    int offset_minutes = 0; ///< of the clock it was written by
};

/// ISO 8601 with zone: "2026-03-14T06:30Z", "2026-03-14T08:30:00+02:00".
/// @par Problems invalid_input: no zone, impossible date, other writing
Result<StampedTime> parse_time(std::string_view text);
/// "2026-03-14"; with time and zone it is taken too. Midnight UTC where only the date is given.
Result<StampedTime> parse_date(std::string_view text);
std::string utc_text(TimePoint time);   ///< "2026-03-14T06:30Z"
std::string date_text(TimePoint time);  ///< "2026-03-14"
std::string short_date(TimePoint time); ///< "14 Mar 2026", as the sentences of a screen write it

/// The quick lines before and after the walk, and the reading itself.
enum class Phase : unsigned char { before, reading, after };
enum class MissingReason : unsigned char { none, not_fitted, not_read, out_of_order };

/// Where a value came from: somebody read an instrument, or an indicator card was evaluated.
enum class Origin : unsigned char { read, card };

/// One value as it was typed. `value_si` is what the text means; it is never changed by the program.
struct Value
{
    QuantityId quantity = 0;
    Place place;
    Phase phase = Phase::reading;
    std::string typed;               ///< the text as typed; empty where `missing` says why
    UnitId unit = 0;
    PressureKind kind = PressureKind::none; ///< the kind the typed unit named, else the quantity's
    std::optional<double> number;    ///< in the typed unit
    std::optional<double> value_si;  ///< of the typed kind
    std::string words;               ///< for choices and words
    MissingReason missing = MissingReason::none;
    bool confirmed = false;          ///< the engineer read it again: no longer doubted
    Origin origin = Origin::read;
    std::string unit_typed;          ///< the unit as it was written ("degC"); empty: as the catalogue writes it
    std::string place_typed;         ///< the place as it was written, where that is not `cylinder_name`; else empty
};

struct Reading
{
    std::string id;   ///< UUID in the history; empty while not stored
    std::string name; ///< as in files: "2026-03"
    StampedTime taken_at;
    bool closed = true;
    std::vector<Value> values; ///< own values, then what the ship's shared reading lends (see `shared_from`)

    /// The value at a place, phase `reading`; null where it was not read.
    const Value* find(QuantityId quantity, Place place) const;
};

struct Event
{
    std::string id;
    StampedTime date;
    Place place; ///< cylinder, turbocharger, cooler or the whole engine
    std::string kind;
    std::string note;
    std::optional<double> running_hours;
    std::string done_by, part;
    bool date_only = true;
};

/// What kinds of event there are and what they do to comparisons: resources/catalogue/event_kinds.csv.
struct EventKind
{
    enum class Effect { new_segment, new_offset, mark_only, other };
    std::string name, title, concerns;
    Effect effect;
    std::vector<std::string> quantities; ///< names; "quantity_read" where the event's `part` says which
    bool record_book = false;            ///< touches a setting or part of the NOx technical file
    char key = 0;                        ///< the letter that chooses it, 'A' to 'Z', each once
};
std::span<const EventKind> all_event_kinds();
const EventKind* find_event_kind(std::string_view name);

} // namespace evenstroke
