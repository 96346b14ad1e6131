// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/typed_number.h"
#include "core/review/review_context.h"
#include "core/trend/deviations.h"
#include "core/uncertainty.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::reviewing {
namespace {

/// What a derived number cannot do without. A line says what is missing only where the engine has it read otherwise.
struct DerivedLine
{
    std::string_view name;
    bool uses_barometer;
    std::vector<std::string_view> inputs; ///< one alone is never missing beside others: none are named
};

const std::vector<DerivedLine>& derived_lines()
{
    static const std::vector<DerivedLine> lines{
        {"mean_effective_pressure", false, {"speed", "shaft_power"}},
        {"mechanical_efficiency", false, {"speed", "shaft_power", "mean_indicated_pressure"}},
        {"compressor_pressure_ratio", true, {}},
        {"compressor_efficiency", true, {"scavenge_pressure", "inlet_air_temperature", "compressor_outlet_temperature"}},
        {"turbocharger_efficiency", true,
         {"scavenge_pressure", "inlet_air_temperature", "exhaust_before_turbine", "exhaust_receiver_pressure",
          "exhaust_back_pressure"}},
        {"cooler_effectiveness", false,
         {"compressor_outlet_temperature", "scavenge_temperature", "cooler_coolant_inlet_temperature"}},
        {"cooler_temperature_difference", false, {"scavenge_temperature", "cooler_coolant_inlet_temperature"}},
        {"charge_air_condensate", true,
         {"inlet_air_temperature", "relative_humidity", "scavenge_temperature", "scavenge_pressure"}},
        {"compression_pressure_ratio", true, {"compression_pressure", "scavenge_pressure"}},
        {"apparent_slip", false, {"speed_through_water", "speed"}}};
    return lines;
}

const DerivedLine* find_line(std::string_view name)
{
    const auto& lines = derived_lines();
    const auto found = std::find_if(lines.begin(), lines.end(), [&](const DerivedLine& line) { return line.name == name; });
    return found == lines.end() ? nullptr : &*found;
}

std::string title_of(std::string_view name)
{
    const auto id = find_quantity(name);
    return id ? lower_first(quantity(*id).title) : std::string(name);
}

std::string verdict(const ReviewContext& context, const ReviewLine& line)
{
    if (!context.held.empty() && line.level < Level::note)
        return "not judged: " + context.held;
    std::string word;
    if (line.level >= Level::note)
        word = direction(line);
    else if (line.quantity)
        word = context.against_usual(*line.quantity, line.place).word;
    const bool departs = word == "high" || word == "low";
    if (departs && line.level < Level::note)
        word = "a little " + word;
    if (departs && context.power_in_doubt && line.place.kind != Place::Kind::cylinder && line.expected)
        word += ", power in doubt";
    if (word.empty() && line.level == Level::learning)
        word = "learning";
    return word;
}

std::string missing_words(MissingReason reason)
{
    switch (reason) {
    case MissingReason::not_fitted: return "not fitted";
    case MissingReason::out_of_order: return "out of order";
    default: return "not read";
    }
}

/// A quantity whose own level stands in for a baseline has its expected value in the trend only.
void take_own_level(const ReviewContext& context, ReviewLine& line)
{
    const Trend* trend = line.quantity ? context.judgement.find_trend(*line.quantity, line.place) : nullptr;
    const TrendPoint* point = trend && trend->own_level ? context.point(*line.quantity, line.place) : nullptr;
    if (!point)
        return;
    line.expected = point->expected;
    line.deviation = point->deviation;
}

ReviewLine empty_line(QuantityId id, Place place)
{
    const Quantity& q = quantity(id);
    ReviewLine line;
    line.words = q.title;
    line.quantity = id;
    line.place = place;
    line.unit = unit_behind(q.unit);
    line.decimals = q.decimals;
    line.has_workings = q.type == ValueType::number;
    return line;
}

/// The input that is not there although it has been read before, or nothing.
std::optional<std::string> missing_input(const ReviewContext& context, const DerivedLine& of)
{
    std::optional<std::string> missing;
    bool any = false;
    for (const std::string_view input : of.inputs) {
        if (context.number(input))
            any = true;
        else if (!context.ever_read(input))
            return std::nullopt;
        else if (!missing)
            missing = title_of(input);
    }
    return any ? missing : std::nullopt;
}

} // namespace

std::string direction(const ReviewLine& line)
{
    const bool beside_others = line.place.kind == Place::Kind::cylinder && line.apart;
    const auto& by = line.from_usual ? line.from_usual : beside_others ? line.apart : line.deviation;
    return !by || *by == 0.0 ? "" : *by > 0.0 ? "high" : "low";
}

ReviewLine typed_line(const ReviewContext& context, const JudgedValue& value)
{
    ReviewLine line = empty_line(value.quantity, value.place);
    const Quantity& q = quantity(value.quantity);
    line.value = value.raw;
    line.half_width = instrument_uncertainty(context.engine, q, value.raw);
    line.corrected = value.corrected;
    line.expected = value.expected;
    line.deviation = value.deviation;
    line.apart = value.apart;
    if (value.deviation)
        line.deviation_half_width = value.uncertainty;
    take_own_level(context, line);
    line.from_usual = context.against_usual(value.quantity, value.place).by;
    line.level = context.level(value.quantity, value.place);
    const bool in_baseline = context.baseline.has(q.name);
    if (value.doubtful)
        line.verdict = "in doubt";
    else if (!value.missing_input.empty())
        line.verdict = "not corrected: no " + value.missing_input + " was read";
    else if (value.applied == Applied::not_correctable && in_baseline)
        line.verdict = "raw: no coefficients to correct it";
    else
        line.verdict = verdict(context, line);
    return line;
}

void add_typed(std::vector<ReviewLine>& lines, const ReviewContext& context, std::string_view name)
{
    const auto values = context.values(name);
    for (const JudgedValue* value : values)
        lines.push_back(typed_line(context, *value));
    if (!values.empty() || !context.ever_read(name))
        return;
    ReviewLine line = empty_line(*find_quantity(name), Place::engine());
    line.verdict = "not read";
    for (const Value& value : context.reading.values)
        if (value.phase == Phase::reading && quantity(value.quantity).name == name && value.missing != MissingReason::none)
            line.verdict = missing_words(value.missing);
    lines.push_back(std::move(line));
}

std::optional<ReviewLine> derived_line(const ReviewContext& context, std::string_view name, Place place)
{
    const DerivedLine* known = find_line(name);
    const auto row = std::find_if(context.derived.begin(), context.derived.end(), [&](const DerivedValue& one) {
        return one.quantity == name && one.place == place;
    });
    const auto id = find_quantity(name);
    ReviewLine line;
    if (id)
        line = empty_line(*id, place);
    line.place = place;
    if (row == context.derived.end()) {
        const auto missing = known ? missing_input(context, *known) : std::nullopt;
        if (!missing)
            return std::nullopt;
        line.verdict = "not known: no " + *missing + " was read";
        return line;
    }
    line.unit = row->unit == "1" ? "" : std::string(row->unit);
    line.value = row->value;
    line.half_width = row->uncertainty;
    line.corrected = row->corrected;
    line.expected = row->expected;
    line.deviation = row->deviation;
    take_own_level(context, line);
    line.from_usual = id ? context.against_usual(*id, place).by : std::nullopt;
    line.level = id ? context.level(*id, place) : Level::no_data;
    const bool without_barometer = known && known->uses_barometer && !context.conditions.barometer;
    line.verdict = without_barometer ? one_bar_taken : verdict(context, line);
    return line;
}

void add_derived(std::vector<ReviewLine>& lines, const ReviewContext& context, std::string_view name)
{
    bool any = false;
    for (const DerivedValue& row : context.derived) {
        if (row.quantity != name || row.place.kind == Place::Kind::cylinder)
            continue;
        any = true;
        if (auto line = derived_line(context, name, row.place))
            lines.push_back(std::move(*line));
    }
    if (any)
        return;
    if (auto line = derived_line(context, name))
        lines.push_back(std::move(*line));
}

std::optional<ReviewLine> mean_line(const ReviewContext& context, std::string_view name)
{
    std::vector<const JudgedValue*> sound;
    for (const JudgedValue* value : context.values(name))
        if (!value->doubtful && value->place.kind == Place::Kind::cylinder)
            sound.push_back(value);
    if (sound.empty())
        return std::nullopt;
    const Quantity& q = quantity(sound.front()->quantity);
    ReviewLine line = empty_line(q.id, Place::engine());
    line.words = q.title + ", mean";
    line.spread = true;
    line.has_workings = false;
    const auto mean = [&](auto&& of) -> std::optional<double> {
        double sum = 0.0;
        for (const JudgedValue* value : sound) {
            const std::optional<double> one = of(*value);
            if (!one)
                return std::nullopt;
            sum += *one;
        }
        return sum / static_cast<double>(sound.size());
    };
    // One indicator goes from cylinder to cylinder and its slip does not average out; thermometers are many.
    const int instrument = q.correction_form == CorrectionForm::pressure || q.name == "mean_indicated_pressure"
                               ? 1
                               : UncertainInput::own;
    std::vector<UncertainInput> inputs;
    for (const JudgedValue* value : sound)
        inputs.push_back({value->raw, instrument_uncertainty(context.engine, q, value->raw), instrument});
    if (const auto solved = propagate(inputs, [](std::span<const double> x) -> std::optional<double> {
            double sum = 0.0;
            for (const double one : x)
                sum += one;
            return sum / static_cast<double>(x.size());
        })) {
        line.value = solved->value;
        line.half_width = solved->half_width;
    }
    line.corrected = mean([](const JudgedValue& value) { return value.corrected; });
    line.expected = sound.front()->expected;
    line.deviation = mean([](const JudgedValue& value) { return value.deviation; });
    if (line.deviation) // load and ambient are common to all: no less than one cylinder's is claimed
        line.deviation_half_width = mean([](const JudgedValue& value) { return value.uncertainty; });
    const auto [low, high] = std::minmax_element(
        sound.begin(), sound.end(), [](const JudgedValue* a, const JudgedValue* b) { return a->raw < b->raw; });
    line.low = (*low)->raw;
    line.high = (*high)->raw;
    line.level = context.level(q.id, Place::engine());
    if (line.level == Level::no_data && context.held.empty())
        line.level = Level::quiet;
    line.verdict = verdict(context, line);
    const bool small = line.deviation && line.deviation_half_width && std::abs(*line.deviation) <= *line.deviation_half_width;
    if (line.verdict.empty() && small)
        line.verdict = "usual";
    return line;
}

std::vector<std::string> departures(const std::vector<ReviewLine>& lines)
{
    std::vector<std::string> parts;
    for (const ReviewLine& line : lines)
        if (line.level >= Level::note) {
            const std::string way = direction(line);
            parts.push_back(lower_first(line.words) + (way.empty() ? "" : " " + way) + " (" + level_word(line.level) + ")");
        }
    return parts;
}

Level worst(const std::vector<ReviewLine>& lines)
{
    Level level = Level::quiet;
    for (const ReviewLine& line : lines)
        if (line.level >= Level::note)
            level = std::max(level, line.level);
    return level;
}

} // namespace evenstroke::reviewing
