// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"

#include <optional>
#include <string>
#include <vector>

namespace evenstroke::storage {

enum class ReadingState { draft = 0, closed = 1, withdrawn = 2 };

/// One line of the list of readings, without its values.
struct ReadingEntry
{
    std::string id, name;
    StampedTime taken_at;
    ReadingState state = ReadingState::closed;
    int values = 0;
    int corrections = 0;
    TimePoint changed_at{};
};

/// Where a value stands in a reading.
struct ValuePlace
{
    QuantityId quantity = 0;
    Place place;
    Phase phase = Phase::reading;
    friend auto operator<=>(const ValuePlace&, const ValuePlace&) = default;
};

/// A value changed after its reading was closed; the old one is kept.
struct Correction
{
    std::string reading_id;
    Value old_value, new_value;
    TimePoint at{};
    Signature by;
};

/// A result of an indicator card that is to become a value of its reading.
struct ValueFromCard
{
    QuantityId quantity = 0;
    Place place;
    double number = 0.0; ///< in `unit`
    WrittenUnit unit{0, PressureKind::none}; ///< kind none: the quantity's own
};

/// What became of values from cards.
struct AcceptedFromCards
{
    int added = 0;     ///< where no number stood
    int corrected = 0; ///< in place of what an earlier card gave
    int same = 0;      ///< an earlier card gave the same
    std::vector<ValuePlace> left_alone; ///< somebody read these, so they stay
};

/// Whose readings: an engine's, or those that all engines of a ship share.
struct Owner
{
    enum class Kind { engine, vessel } kind = Kind::engine;
    std::string id;
    static Owner engine(std::string id) { return {Kind::engine, std::move(id)}; }
    static Owner vessel(std::string id) { return {Kind::vessel, std::move(id)}; }
};

/// How far a ship's shared reading may be from an engine's to lend its values.
inline constexpr std::chrono::hours shared_within{6};

/// Readings and their values: a draft changes freely, a closed one only by a correction that keeps the old.
///
/// A value stands at the place its quantity repeats over; quantities of the ship stand at {Place::Kind::ship,
/// 0} wherever they were written; a turbocharger's or cooler's value without number stands at the engine.
/// Values of quantities that this program does not know stay in the file and are not handed out.
class ReadingStore
{
public:
    explicit ReadingStore(History& history) : history_(history) {}

    /// All closed readings of an engine in order of time, each followed by what the ship's nearest reading
    /// within 6 h lends it: quantities that it has not itself.
    Result<std::vector<Reading>> load(const std::string& engine_id) const;
    /// The same without what the ship lends; for a vessel its shared readings.
    Result<std::vector<Reading>> load_own(const Owner& owner) const;
    /// One reading in any state, own values only.
    Result<Reading> reading(const std::string& reading_id) const;
    Result<std::vector<ReadingEntry>> list(const Owner& owner) const; ///< every state, in order of time
    Result<std::vector<Correction>> corrections(const std::string& reading_id) const;
    Result<std::vector<Correction>> corrections_of(const Owner& owner) const; ///< in order of time

    /// Begins a draft. @par Problems invalid_input: a reading of this name is there
    Result<Reading> make_draft(const Owner& owner, const std::string& name, StampedTime taken_at,
                               const Signature& by);
    /// Name and time of a draft.
    Done rename_draft(const std::string& reading_id, const std::string& name, StampedTime taken_at);
    /// Keeps one value of a draft at once, so that nothing typed is lost. A value with neither text, words
    /// nor reason empties the place.
    Done save_value(const std::string& reading_id, const Value& value);
    /// Replaces name, time and all values of a draft.
    Done save_draft(const Reading& draft);
    Done discard_draft(const std::string& reading_id, const Signature& by);
    /// Closes a draft: from here on it changes only by corrections. @par Problems invalid_input: no value at
    /// all
    Done close(const std::string& reading_id, const Signature& by);

    /// Changes a value of a closed reading, or adds one that was forgotten. The old value, who, when and why
    /// stay. @par Problems invalid_input: no name or no reason given, or nothing changes
    Done correct(const std::string& reading_id, const Value& new_value, const Signature& by);
    /// Puts results of cards into a reading that is a draft or closed, all or none. What somebody read stays. In a
    /// closed reading each is a correction, in a draft a value like a typed one; the trail says so of both. Numbers
    /// are kept with one decimal more than the quantity is shown with. A reason is not needed: it is "from the card".
    /// @par Problems invalid_input: nobody signed, a number that cannot be, the reading is withdrawn; not_found
    Result<AcceptedFromCards> accept_card_values(const std::string& reading_id,
                                                 const std::vector<ValueFromCard>& values, const Signature& by);
    /// Corrects when a closed reading was taken; its name stays, the old time stays in the audit trail.
    /// @par Problems invalid_input: no name or no reason given, or it is the time already
    Done correct_time(const std::string& reading_id, StampedTime taken_at, const Signature& by);
    /// Marks that the engineer read the value again and it stands.
    Done set_confirmed(const std::string& reading_id, const ValuePlace& place, bool confirmed,
                       const Signature& by);
    /// Takes a closed reading out of use with a reason; it stays in the file. And back.
    Done withdraw(const std::string& reading_id, const Signature& by);
    Done restore(const std::string& reading_id, const Signature& by);

private:
    History& history_;
};

} // namespace evenstroke::storage
