// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/review/power_inputs.h"

#include "core/plain_text.h"
#include "core/reading/typed_number.h"
#include "core/trend/deviations.h"

#include <map>

namespace evenstroke {
namespace {

std::string kind_words(const Quantity& q)
{
    switch (q.kind) {
    case PressureKind::gauge: return " gauge";
    case PressureKind::absolute: return " abs";
    default: return {};
    }
}

/// The shares of inputs that one instrument gave add up to the share of the instrument.
void write_budget(std::vector<WorkingInput>& words, const std::vector<UncertainInput>& inputs, const Propagated& solved)
{
    std::map<int, double> of_instrument;
    for (std::size_t i = 0; i < inputs.size(); ++i)
        of_instrument[inputs[i].instrument] += solved.parts[i];
    for (std::size_t i = 0; i < inputs.size(); ++i) {
        words[i].moved = solved.parts[i];
        words[i].share.reset();
        if (!solved.half_width || !(*solved.half_width > 0.0))
            continue;
        const double with_its_like =
            inputs[i].instrument == UncertainInput::own ? solved.parts[i] : of_instrument[inputs[i].instrument];
        words[i].share = solved.parts[i] * with_its_like / (*solved.half_width * *solved.half_width);
    }
}

} // namespace

std::string typed_words(const Value& value)
{
    const std::string text = value.typed.empty() && value.number ? number_text(*value.number) : value.typed;
    const std::string unit_words = value.unit_typed.empty() ? unit_behind(value.unit) : value.unit_typed;
    return "typed " + text + (unit_words.empty() ? "" : " " + unit_words);
}

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
    input.unit = unit_behind(q.unit) + kind_words(q);
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
        input.origin = typed_words(value);
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
    input.origin = places == 1 && last ? typed_words(*last) : "mean of " + std::to_string(places) + " places";
    return add(std::move(input), UncertainInput::own);
}

std::size_t PowerInputs::given(WorkingInput input) { return add(std::move(input), UncertainInput::own); }

std::optional<Propagated> PowerInputs::solve(const Formula& formula)
{
    auto solved = propagate(inputs_, formula);
    if (solved)
        write_budget(words_, inputs_, *solved);
    return solved;
}

} // namespace evenstroke
