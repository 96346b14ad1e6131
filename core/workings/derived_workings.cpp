// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/workings/derived_workings.h"

#include "core/trend/robust.h"
#include "core/workings/working_words.h"

#include <algorithm>

namespace evenstroke {
namespace {

using Input = DerivedInputs::Input;
using How = Input::How;

std::string plural(Place::Kind kind, std::size_t count)
{
    const std::string number = std::to_string(count);
    switch (kind) {
    case Place::Kind::cylinder: return number + " cylinders";
    case Place::Kind::turbocharger: return number + " turbochargers";
    case Place::Kind::cooler: return number + " coolers";
    case Place::Kind::engine:
    case Place::Kind::ship: break;
    }
    return number + " values";
}

/// The values behind a mean: the engine's own alone where there is one.
std::vector<const ReadingValues::Entry*> behind(const DerivedReading& of, QuantityId named)
{
    std::vector<const ReadingValues::Entry*> entries;
    for (const ReadingValues::Entry* each = of.values.first(named); each; each = of.values.next(*each)) {
        if (!each->usable() || (each->place.kind == Place::Kind::cylinder && quantity(named).per != Place::Kind::cylinder))
            continue;
        if (each->place.kind == Place::Kind::engine)
            return {each};
        entries.push_back(each);
    }
    return entries;
}

void describe_mean(const DerivedReading& of, const Input& from, WorkingInput& input)
{
    const auto entries = behind(of, *from.quantity);
    if (entries.size() == 1) {
        input.place = entries.front()->place;
        input.origin = words_as_typed(of.reading.values[entries.front()->value_index]);
    } else if (!entries.empty()) {
        input.origin = "mean of " + plural(entries.front()->place.kind, entries.size());
    }
}

WorkingInput describe(const DerivedInputs& inputs, const Input& from)
{
    WorkingInput input;
    const DerivedReading& of = inputs.of();
    input.place = from.place;
    input.value = from.value;
    if (from.quantity) {
        const Quantity& q = quantity(*from.quantity);
        input.words = q.title;
        input.symbol = symbol_of(q);
        input.unit = unit_words(q);
    } else {
        input.words = std::string(from.name);
        input.symbol = std::string(from.symbol);
    }
    if (!from.unit.empty())
        input.unit = std::string(from.unit);
    switch (from.how) {
    case How::typed:
    case How::volume: input.origin = words_as_typed(of.reading.values[from.value_index]); break;
    case How::mean:
    case How::barometer: describe_mean(of, from, input); break;
    case How::assumed_barometer: input.origin = "no barometer was read: 1 bar taken"; break;
    case How::particular: input.origin = "engine's particulars"; break;
    case How::assumed: input.origin = std::string(from.origin); break;
    case How::baseline:
        input.words += " of the baseline";
        input.symbol += "_ref";
        input.origin = "the engine's baseline at this load";
        break;
    }
    return input;
}

bool is_exact(const Input& input) { return input.how == How::particular || input.how == How::baseline; }

std::string title_of(const DerivedInputs::Missing& missing)
{
    const auto id = find_quantity(missing.name);
    return lower_first(id ? quantity(*id).title : std::string(missing.name));
}

/// A cylinder's number beside those of the others, as the judging sets typed ones apart.
std::optional<double> apart_from_others(const DerivedReading& of, const DerivedQuantity& quantity, Place place)
{
    if (place.kind != Place::Kind::cylinder)
        return std::nullopt;
    DerivedInputs inputs(of);
    std::optional<double> own;
    std::vector<double> others;
    for (int i = 1; i <= of.engine.cylinders; ++i) {
        const auto row = derive_one(inputs, quantity, Place::cylinder(i));
        if (!row)
            continue;
        const double compared = row->deviation ? *row->deviation : row->corrected.value_or(row->value);
        if (i == place.number)
            own = compared;
        else
            others.push_back(compared);
    }
    const auto middle = drift::median(std::move(others));
    return own && middle ? std::optional(*own - *middle) : std::nullopt;
}

void append(std::vector<std::string>& to, const std::vector<std::string>& from)
{
    for (const std::string& sentence : from)
        if (std::find(to.begin(), to.end(), sentence) == to.end())
            to.push_back(sentence);
}

} // namespace

std::vector<WorkingInput> working_inputs(const DerivedInputs& inputs, const std::optional<Propagated>& solved)
{
    std::vector<WorkingInput> list;
    std::vector<int> instruments;
    for (const Input& from : inputs.inputs())
        instruments.push_back(from.instrument);
    const auto shares = solved ? budget_shares(*solved, instruments) : std::vector<std::optional<double>>(instruments.size());
    for (std::size_t i = 0; i < inputs.inputs().size(); ++i) {
        const Input& from = inputs.inputs()[i];
        WorkingInput input = describe(inputs, from);
        if (!is_exact(from))
            input.half_width = inputs.half_width(from);
        input.moved = solved && i < solved->parts.size() ? solved->parts[i] : 0.0;
        if (!is_exact(from))
            input.share = shares[i];
        list.push_back(std::move(input));
    }
    return list;
}

std::vector<WorkingStep> working_steps(const DerivedInputs& inputs)
{
    std::vector<WorkingStep> steps;
    for (const DerivedInputs::Step& step : inputs.steps()) {
        const std::string place = part_words(inputs.engine(), step.place);
        steps.push_back({std::string(step.words) + (place.empty() ? "" : ", " + place), step.value, std::string(step.unit)});
    }
    return steps;
}

std::string missing_words(const DerivedInputs& inputs, const std::string& what)
{
    if (inputs.problem())
        return inputs.problem()->text();
    std::vector<std::string> reasons, to_read, of_baseline;
    for (const DerivedInputs::Missing& each : inputs.missing()) {
        const std::string place = part_words(inputs.engine(), each.place);
        const std::string words = title_of(each) + (place.empty() ? "" : " of " + place);
        std::vector<std::string>& list = each.of_baseline ? of_baseline : to_read;
        if (std::find(list.begin(), list.end(), words) != list.end())
            continue;
        list.push_back(words);
        reasons.push_back(each.of_baseline ? "the baseline does not reach this load with " + words
                                           : words + " " + why_missing(inputs.of().reading, each.name, each.place));
    }
    if (reasons.empty())
        return what + " is not known.";
    std::string text = what + " is not known, because " + and_list(reasons) + ".";
    if (!to_read.empty())
        text += " Read " + and_list(to_read) + ".";
    if (!of_baseline.empty())
        text += " Enter " + and_list(of_baseline) + " with the engine's baseline.";
    return text;
}

Workings derived_workings(const DerivedReading& of, const DerivedQuantity& quantity, Place place)
{
    Workings sheet;
    sheet.title = quantity.title;
    sheet.place = place;
    sheet.unit = quantity.unit == "1" ? std::string() : quantity.unit;
    sheet.decimals = quantity.decimals;
    sheet.formula = quantity.formula;
    sheet.source = quantity.source;
    sheet.validity = quantity.validity;
    DerivedInputs inputs(of);
    inputs.watch();
    const auto row = derive_one(inputs, quantity, place);
    if (!row) {
        sheet.missing = missing_words(inputs, quantity.title);
        sheet.inputs = working_inputs(inputs, std::nullopt);
        sheet.steps = working_steps(inputs);
        append(sheet.remarks, inputs.remarks());
        return sheet;
    }
    sheet.value = row->value;
    sheet.corrected = row->corrected;
    sheet.expected = row->expected;
    sheet.deviation = row->deviation;
    sheet.apart = apart_from_others(of, quantity, place);
    DerivedInputs corrected(of);
    corrected.watch();
    if (has_correction(quantity) && !derive_corrected(corrected, quantity, place))
        sheet.remarks.push_back(missing_words(corrected, "The number at reference conditions"));
    const auto solved = derive_uncertainty(inputs, quantity, place, row->corrected.has_value());
    if (solved && !is_exactly_none(quantity, row->value))
        sheet.half_width = solved->half_width;
    sheet.inputs = working_inputs(inputs, solved);
    sheet.steps = working_steps(inputs);
    for (WorkingStep& step : working_steps(corrected))
        if (std::none_of(sheet.steps.begin(), sheet.steps.end(), [&](const WorkingStep& s) { return s.words == step.words; }))
            sheet.steps.push_back(std::move(step));
    append(sheet.remarks, inputs.remarks());
    append(sheet.remarks, corrected.remarks());
    if (!sheet.half_width)
        append(sheet.remarks, {"How sure the number is cannot be said: of an input that counts nobody states it."});
    return sheet;
}

} // namespace evenstroke
