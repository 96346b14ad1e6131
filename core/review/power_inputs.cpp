// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/review/power_inputs.h"

#include "core/trend/deviations.h"
#include "core/workings/working_words.h"

namespace evenstroke {

std::size_t PowerInputs::add(WorkingInput input, int instrument)
{
    inputs_.push_back({input.value, input.half_width, instrument});
    words_.push_back(std::move(input));
    return inputs_.size() - 1;
}

WorkingInput PowerInputs::described(std::string_view name, const std::string& symbol, Place place, double own) const
{
    WorkingInput input;
    const auto id = find_quantity(name, place.kind);
    const Quantity& q = quantity(id ? *id : *find_quantity(name));
    input.words = q.title;
    input.symbol = symbol;
    input.place = place;
    input.value = own;
    input.unit = unit_words(q);
    input.half_width = instrument_uncertainty(engine_, q, own);
    return input;
}

std::optional<std::size_t> PowerInputs::at(std::string_view name, const std::string& symbol, Place place, int instrument)
{
    for (const Value& value : reading_.values) {
        if (value.phase != Phase::reading || value.place != place || quantity(value.quantity).name != name)
            continue;
        const auto own = own_value(value, conditions_);
        if (!own || own->outside_hard)
            continue;
        WorkingInput input = described(name, symbol, place, own->value);
        input.origin = words_as_typed(value);
        return add(std::move(input), instrument);
    }
    return std::nullopt;
}

std::optional<std::size_t> PowerInputs::mean(std::string_view name, const std::string& symbol)
{
    const auto own = engine_mean(reading_, name, conditions_);
    if (!own)
        return std::nullopt;
    WorkingInput input = described(name, symbol, Place::engine(), *own);
    int places = 0;
    const Value* last = nullptr;
    for (const Value& value : reading_.values) {
        if (value.phase != Phase::reading || quantity(value.quantity).name != name || !own_value(value, conditions_))
            continue;
        if (value.place.kind == Place::Kind::engine) {
            places = 1;
            last = &value;
            break;
        }
        ++places;
        last = &value;
    }
    input.origin = places == 1 && last ? words_as_typed(*last) : "mean of " + std::to_string(places) + " places";
    return add(std::move(input), UncertainInput::own);
}

std::size_t PowerInputs::given(WorkingInput input) { return add(std::move(input), UncertainInput::own); }

std::optional<Propagated> PowerInputs::solve(const Formula& formula)
{
    auto solved = propagate(inputs_, formula);
    if (!solved)
        return solved;
    std::vector<int> instruments;
    for (const UncertainInput& input : inputs_)
        instruments.push_back(input.instrument);
    const auto shares = budget_shares(*solved, instruments);
    for (std::size_t i = 0; i < words_.size(); ++i) {
        words_[i].moved = solved->parts[i];
        words_[i].share = shares[i];
    }
    return solved;
}

} // namespace evenstroke
