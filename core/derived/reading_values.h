// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/conditions.h"

#include <optional>
#include <span>
#include <string_view>
#include <vector>

namespace evenstroke {

/// The values of one reading by quantity, each brought to its own unit once: formulas ask often.
class ReadingValues
{
public:
    ReadingValues(const Reading& reading, const Conditions& conditions);

    struct Entry
    {
        std::size_t value_index = 0;  ///< in Reading::values
        Place place;
        std::optional<OwnValue> own;  ///< empty: no number, or none that can be brought to its unit
        int next = -1;                ///< the next of the same name, in the reading's order
        bool usable() const { return own && !own->outside_hard; }
    };
    /// The first value of this name; null where the reading has none. @param named as find_quantity(name) gives it
    const Entry* first(QuantityId named) const { return entry(heads_[static_cast<std::size_t>(named)]); }
    const Entry* next(const Entry& of) const { return entry(of.next); }

    /// The usable value at a place.
    const Entry* at(QuantityId named, Place place) const;
    /// The engine's own value or the mean over its places, as `engine_mean` of conditions.h.
    std::optional<double> mean(QuantityId named) const;
    /// Numbers of the turbochargers (coolers) that anything was read of; empty where none has a number.
    std::span<const Place> numbered(Place::Kind kind) const;

private:
    const Entry* entry(int index) const { return index < 0 ? nullptr : &entries_[static_cast<std::size_t>(index)]; }

    std::vector<Entry> entries_;
    std::vector<int> heads_; ///< by quantity
    std::vector<Place> turbochargers_, coolers_;
};

} // namespace evenstroke
