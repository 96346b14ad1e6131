// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/relations.h"

#include "core/reading/relations_detail.h"

#include <algorithm>
#include <stdexcept>

namespace evenstroke {
namespace relations_detail {

std::optional<double> Numbers::engine(std::string_view name) const
{
    return at(id_of(name, Place::Kind::engine), Place::engine());
}

std::optional<double> Numbers::ship(std::string_view name) const
{
    return at(id_of(name, Place::Kind::ship), Place{Place::Kind::ship, 0});
}

std::optional<double> Numbers::at(QuantityId wanted, Place place) const
{
    const Value* value = reading_.find(wanted, place);
    return value ? number_in_own_unit(*value, barometer_) : std::nullopt;
}

std::optional<double> Numbers::absolute_at(QuantityId wanted, Place place) const
{
    const Value* value = reading_.find(wanted, place);
    return value ? absolute_in_own_unit(*value, barometer_) : std::nullopt;
}

std::vector<std::pair<Place, double>> Numbers::all(QuantityId wanted) const
{
    std::vector<std::pair<Place, double>> places;
    for (const Value& value : reading_.values)
        if (value.quantity == wanted && value.phase == Phase::reading)
            if (const auto own = number_in_own_unit(value, barometer_))
                places.emplace_back(value.place, *own);
    std::sort(places.begin(), places.end());
    return places;
}

QuantityId id_of(std::string_view name, Place::Kind kind)
{
    const auto found = find_quantity(name, kind);
    if (!found)
        throw std::logic_error("no such quantity in the catalogue: " + std::string(name));
    return *found;
}

std::string cylinders_words(const Engine& engine, const std::vector<int>& numbers)
{
    std::string words = numbers.size() == 1 ? "Cylinder " : "Cylinders ";
    for (std::size_t i = 0; i < numbers.size(); ++i) {
        if (i > 0)
            words += i + 1 == numbers.size() ? " and " : ", ";
        words += engine.cylinder_name(numbers[i]);
    }
    return words;
}

std::optional<double> power_kw(const Engine& engine, const Numbers& numbers)
{
    if (const auto noted = numbers.engine("shaft_power"))
        return noted;
    const auto load = numbers.engine("load_percent");
    const double rated = engine.rated_power.value() / 1000.0;
    return load && rated > 0.0 ? std::optional(*load / 100.0 * rated) : std::nullopt;
}

} // namespace relations_detail

std::vector<Relation> check_relations(const Engine& engine, const Reading& reading,
                                      const ReadingContext& context)
{
    const relations_detail::Numbers numbers(reading);
    std::vector<Relation> found;
    relations_detail::check_against_earlier(numbers, context, found);
    relations_detail::check_power_and_fuel(engine, numbers, found);
    relations_detail::check_cylinders(engine, numbers, found);
    relations_detail::check_compression_ratio(engine, numbers, context, found);
    relations_detail::check_air_and_water(engine, numbers, found);
    return found;
}

bool concerns(const Relation& relation, QuantityId quantity, Place place)
{
    const ConcernedValue box{quantity, place};
    return std::find(relation.concerned.begin(), relation.concerned.end(), box) != relation.concerned.end();
}

} // namespace evenstroke
