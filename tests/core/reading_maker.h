// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"

#include <stdexcept>
#include <string_view>

/// Readings for tests, written as one would write them on paper.
namespace evenstroke::test {

class ReadingMaker
{
public:
    explicit ReadingMaker(TimePoint taken = {}) { reading_.taken_at.utc = taken; }

    /// A number in the quantity's own unit and kind.
    ReadingMaker& number(std::string_view name, double own, Place place = Place::engine(),
                         Phase phase = Phase::reading)
    {
        Value value = empty(name, place, phase);
        value.unit = quantity(value.quantity).unit;
        value.kind = quantity(value.quantity).kind;
        value.number = own;
        value.value_si = unit(value.unit).to_si(own);
        reading_.values.push_back(value);
        return *this;
    }
    /// "2.9 bar abs": with a unit of its own.
    ReadingMaker& typed(std::string_view name, std::string_view text, Place place = Place::engine())
    {
        Value value = empty(name, place, Phase::reading);
        const auto parsed = parse_typed_value(text).value();
        value.typed = std::string(text.substr(0, text.find(' ')));
        value.unit = parsed.unit.id;
        value.kind =
            parsed.unit.kind == PressureKind::none ? quantity(value.quantity).kind : parsed.unit.kind;
        value.number = parsed.number;
        value.value_si = parsed.value_si;
        reading_.values.push_back(value);
        return *this;
    }
    ReadingMaker& words(std::string_view name, std::string_view words, Phase phase = Phase::reading)
    {
        Value value = empty(name, Place::engine(), phase);
        value.words = words;
        reading_.values.push_back(value);
        return *this;
    }
    ReadingMaker& missing(std::string_view name, MissingReason reason, Place place = Place::engine())
    {
        Value value = empty(name, place, Phase::reading);
        value.missing = reason;
        reading_.values.push_back(value);
        return *this;
    }
    ReadingMaker& pair(std::string_view name, double before, double after, Place place = Place::engine())
    {
        return number(name, before, place, Phase::before).number(name, after, place, Phase::after);
    }
    /// One value a cylinder, from cylinder 1.
    ReadingMaker& cylinders(std::string_view name, std::initializer_list<double> values)
    {
        int cylinder = 0;
        for (const double value : values)
            number(name, value, Place::cylinder(++cylinder));
        return *this;
    }
    const Reading& done() const { return reading_; }

private:
    static Value empty(std::string_view name, Place place, Phase phase)
    {
        Value value;
        const auto found = find_quantity(name, place.kind);
        if (!found)
            throw std::logic_error("unknown quantity in a test: " + std::string(name));
        value.quantity = *found;
        value.place = place;
        value.phase = phase;
        return value;
    }
    Reading reading_;
};

inline Place at_ship()
{
    return {Place::Kind::ship, 0};
}
inline Place at_turbocharger(int number)
{
    return {Place::Kind::turbocharger, number};
}
inline Place at_cooler(int number)
{
    return {Place::Kind::cooler, number};
}

/// A six-cylinder crosshead engine, invented.
inline Engine invented_engine()
{
    Engine engine;
    engine.name = "main engine";
    engine.kind = EngineKind::two_stroke;
    engine.cylinders = 6;
    engine.bore = millimetres(600);
    engine.stroke = millimetres(2400);
    engine.rod_length = millimetres(2600);
    engine.rated_power = kilowatts(12000);
    engine.rated_speed = per_minute(105);
    return engine;
}

} // namespace evenstroke::test
