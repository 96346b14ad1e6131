// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/reading_values.h"

#include "core/reading/quantity_names.h"

#include <algorithm>

namespace evenstroke {
namespace {

void keep(std::vector<Place>& places, Place place)
{
    const auto at = std::lower_bound(places.begin(), places.end(), place);
    if (at == places.end() || *at != place)
        places.insert(at, place);
}

} // namespace

ReadingValues::ReadingValues(const Reading& reading, const Conditions& conditions)
    : heads_(all_quantities().size(), -1)
{
    entries_.reserve(reading.values.size());
    std::vector<int> tails(heads_.size(), -1);
    for (std::size_t i = 0; i < reading.values.size(); ++i) {
        const Value& value = reading.values[i];
        if (value.place.kind == Place::Kind::turbocharger)
            keep(turbochargers_, value.place);
        else if (value.place.kind == Place::Kind::cooler)
            keep(coolers_, value.place);
        if (value.phase != Phase::reading)
            continue;
        const auto named = static_cast<std::size_t>(first_of_its_name(value.quantity));
        const int here = static_cast<int>(entries_.size());
        entries_.push_back({i, value.place, own_value(value, conditions), -1});
        if (tails[named] < 0)
            heads_[named] = here;
        else
            entries_[static_cast<std::size_t>(tails[named])].next = here;
        tails[named] = here;
    }
}

const ReadingValues::Entry* ReadingValues::at(QuantityId named, Place place) const
{
    for (const Entry* each = first(named); each; each = next(*each))
        if (each->place == place && each->usable())
            return each;
    return nullptr;
}

std::optional<double> ReadingValues::mean(QuantityId named) const
{
    double sum = 0.0;
    int count = 0;
    const bool of_cylinders = quantity(named).per == Place::Kind::cylinder;
    for (const Entry* each = first(named); each; each = next(*each)) {
        if (!each->usable() || (each->place.kind == Place::Kind::cylinder && !of_cylinders))
            continue;
        if (each->place.kind == Place::Kind::engine)
            return each->own->value;
        sum += each->own->value;
        ++count;
    }
    return count == 0 ? std::nullopt : std::optional(sum / count);
}

std::span<const Place> ReadingValues::numbered(Place::Kind kind) const
{
    return kind == Place::Kind::cooler ? coolers_ : turbochargers_;
}

} // namespace evenstroke
