// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/derived_inputs.h"

#include "core/trend/deviations.h"

#include <algorithm>

namespace evenstroke {

std::size_t DerivedInputs::add(std::string_view name, double own, int instrument)
{
    const auto id = find_quantity(name);
    inputs_.push_back({own, id ? instrument_uncertainty(engine_, quantity(*id), own) : std::nullopt, instrument});
    return inputs_.size() - 1;
}

InputIndex DerivedInputs::at(std::string_view name, Place place, int instrument)
{
    for (const Value& value : reading_.values) {
        if (value.phase != Phase::reading || value.place != place || quantity(value.quantity).name != name)
            continue;
        const auto own = own_value(value, conditions_);
        if (own && !own->outside_hard)
            return add(name, own->value, instrument);
    }
    const bool repeats = place.kind == Place::Kind::turbocharger || place.kind == Place::Kind::cooler;
    const bool stands_for_all = repeats && std::any_of(reading_.values.begin(), reading_.values.end(), [&](const Value& value) {
        return value.phase == Phase::reading && value.place == Place::engine() && quantity(value.quantity).name == name;
    });
    return stands_for_all ? mean(name) : std::nullopt;
}

InputIndex DerivedInputs::mean(std::string_view name)
{
    for (const auto& [known, index] : means_)
        if (known == name)
            return index;
    const auto own = engine_mean(reading_, name, conditions_);
    if (!own)
        return std::nullopt;
    means_.emplace_back(name, add(name, *own, UncertainInput::own));
    return means_.back().second;
}

InputIndex DerivedInputs::at_or_mean(std::string_view name, Place place)
{
    const InputIndex here = at(name, place);
    return here ? here : mean(name);
}

std::size_t DerivedInputs::barometer()
{
    constexpr double millibar = 1e-3; // bar
    for (const auto& [known, index] : means_)
        if (known == "barometric_pressure")
            return index;
    UncertainInput input{conditions_.barometer_or_one_bar(), std::nullopt, UncertainInput::own};
    if (const auto id = find_quantity("barometric_pressure"); id && conditions_.barometer)
        if (const auto half = instrument_uncertainty(engine_, quantity(*id), *conditions_.barometer / millibar))
            input.half_width = *half * millibar;
    inputs_.push_back(input);
    means_.emplace_back("barometric_pressure", inputs_.size() - 1);
    return inputs_.size() - 1;
}

} // namespace evenstroke
