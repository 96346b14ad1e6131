// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"

#include <optional>
#include <span>
#include <string>
#include <vector>

/// What two values of one reading, or a reading and those before it, say of each other.
///
/// Every finding is a hint to look again while the engine still runs; none refuses a value, and none changes
/// one.
namespace evenstroke {

/// One box of the log sheet that a finding speaks of.
struct ConcernedValue
{
    QuantityId quantity = 0;
    Place place;
    friend bool operator==(const ConcernedValue&, const ConcernedValue&) = default;
};

struct Relation
{
    std::string name;                      ///< which check: "maximum_below_compression"
    std::string sentence;                  ///< what does not fit, with the values, and what to look at
    std::vector<ConcernedValue> concerned; ///< empty where it is the reading's time or the whole reading
    bool impossible = false;               ///< no engine can do this, so one of the values is surely wrong
};

/// What is known beside the reading itself.
struct ReadingContext
{
    std::span<const Reading> earlier; ///< closed readings before this one, in order of time
    std::span<const Event> events;
    std::optional<TimePoint> now; ///< none: nothing is said of times in the future
};

/// All checks between values; a check whose values are not there says nothing. In walking order.
/// Limits are common practice unless the check names a law of physics; they stand beside each check.
std::vector<Relation> check_relations(const Engine& engine, const Reading& reading,
                                      const ReadingContext& context);

/// Whether a finding concerns this box.
bool concerns(const Relation& relation, QuantityId quantity, Place place);

} // namespace evenstroke
