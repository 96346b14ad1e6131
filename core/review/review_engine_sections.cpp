// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/propeller.h"
#include "core/reading/typed_number.h"
#include "core/review/review_context.h"
#include "core/trend/deviations.h"
#include "core/trend/flag_text.h"
#include "core/uncertainty.h"

#include <algorithm>
#include <cmath>
#include <set>

/// The steps that judge the engine itself, from what moves all cylinders to what gathers every fault.
namespace evenstroke::reviewing {
namespace {

/// "It fits turbocharger fouling.": patterns of standing flags about this subject that speak of one of the lines.
std::string patterns_sentence(const ReviewContext& context, Place subject, const std::vector<ReviewLine>& lines)
{
    std::vector<std::string> patterns;
    for (const Flag* flag : context.standing) {
        const bool concerned = std::any_of(lines.begin(), lines.end(), [&](const ReviewLine& line) {
            return line.quantity && line.level >= Level::note && speaks_of(*flag, *line.quantity);
        });
        if (flag->subject == subject && concerned && !flag->pattern_words.empty() &&
            std::find(patterns.begin(), patterns.end(), flag->pattern_words) == patterns.end())
            patterns.push_back(flag->pattern_words);
    }
    return patterns.empty() ? "" : " Fits " + and_list(patterns) + ".";
}

void add(std::vector<ReviewLine>& lines, std::optional<ReviewLine> line)
{
    if (line)
        lines.push_back(std::move(*line));
}

/// Burning adds p_max - p_comp to what the air brings along: how late or weak it is shows here.
std::optional<ReviewLine> rise_line(const ReviewLine& maximum, const ReviewLine& compression)
{
    if (!maximum.value || !compression.value)
        return std::nullopt;
    ReviewLine line;
    line.words = "Rise by burning, p_max - p_comp, mean";
    line.unit = maximum.unit;
    line.decimals = maximum.decimals;
    const auto difference = [](const std::optional<double>& a, const std::optional<double>& b) {
        return a && b ? std::optional(*a - *b) : std::nullopt;
    };
    line.value = difference(maximum.value, compression.value);
    line.corrected = difference(maximum.corrected, compression.corrected);
    line.expected = difference(maximum.expected, compression.expected);
    line.deviation = difference(maximum.deviation, compression.deviation);
    if (maximum.half_width && compression.half_width) // one indicator may have read both: no more than this
        line.half_width = std::hypot(*maximum.half_width, *compression.half_width);
    line.level = Level::quiet;
    return line;
}

/// Mean of a number that every cylinder has, with its spread.
std::optional<ReviewLine> derived_mean_line(const ReviewContext& context, std::string_view name)
{
    std::optional<ReviewLine> line;
    int count = 0;
    double sum = 0.0, corrected = 0.0;
    bool all_corrected = true;
    for (const DerivedValue& row : context.derived) {
        if (row.quantity != name || row.place.kind != Place::Kind::cylinder)
            continue;
        if (!line) {
            line = derived_line(context, name, row.place);
            line->place = Place::engine();
            line->words += ", mean";
            line->spread = true;
            line->has_workings = false;
            line->low = line->high = row.value;
            // What was said of that one cylinder is not said of all.
            line->apart = line->from_usual = std::nullopt;
            line->level = context.held.empty() ? Level::quiet : Level::no_data;
            if (line->verdict != one_bar_taken)
                line->verdict = context.held.empty() ? "" : "not judged: " + context.held;
        }
        line->low = std::min(*line->low, row.value);
        line->high = std::max(*line->high, row.value);
        sum += row.value;
        all_corrected = all_corrected && row.corrected;
        corrected += row.corrected.value_or(0.0);
        ++count;
    }
    if (!line)
        return std::nullopt;
    line->value = sum / count;
    line->half_width.reset(); // of one cylinder; the scavenge pressure in it is common to all
    line->corrected = all_corrected ? std::optional(corrected / count) : std::nullopt;
    line->deviation =
        line->expected && line->corrected ? std::optional(*line->corrected - *line->expected) : std::nullopt;
    return line;
}

/// " 6.4 bar below its usual": the number that made the mark; " low" where the usual level is not known.
std::string departure(const ReviewLine& line)
{
    const std::string way = direction(line);
    if (way.empty() || !line.from_usual)
        return way.empty() ? "" : " " + way;
    return " " + plain_number(std::abs(*line.from_usual), line.decimals) + (line.unit.empty() ? "" : " " + line.unit) +
           (way == "low" ? " below" : " above") + " its usual";
}

std::string cylinder_words(const ReviewContext& context, int number, const std::vector<ReviewLine>& lines)
{
    std::vector<std::string> parts;
    std::vector<ReviewLine> own;
    for (const ReviewLine& line : lines) {
        if (line.place != Place::cylinder(number) || line.level < Level::note)
            continue;
        own.push_back(line);
        parts.push_back(lower_first(line.words) + departure(line) + " (" + level_word(line.level) + ")");
    }
    if (parts.empty())
        return {};
    return " Cylinder " + context.engine.cylinder_name(number) + ": " + and_list(parts) + "." +
           patterns_sentence(context, Place::cylinder(number), own);
}

void say_light_running(const ReviewContext& context, ReviewLine& line)
{
    if (line.level >= Level::note)
        return; // a flag speaks of it
    line.level = context.held.empty() ? Level::quiet : Level::no_data;
    const bool surely_heavy = line.half_width && *line.value < -*line.half_width;
    line.verdict = !context.held.empty()    ? "not judged: " + context.held
                   : context.power_in_doubt ? "not judged while the power is in doubt"
                   : surely_heavy           ? "heavy: slower than the propeller curve through the rating"
                                            : "";
}

std::optional<ReviewLine> light_running_line(const ReviewContext& context, const PowerAgreement& power)
{
    if (auto line = derived_line(context, "light_running_margin"); line && line->value) {
        say_light_running(context, *line);
        return line;
    }
    const auto speed = context.number("speed");
    const Quantity& of_speed = quantity(*find_quantity("speed"));
    const auto typed = std::find_if(power.estimates.begin(), power.estimates.end(),
                                    [](const PowerEstimate& one) { return one.name == "typed"; });
    if (!speed || !power.typed_power)
        return std::nullopt;
    const PropellerPoint rating{context.engine.rated_power, context.engine.rated_speed};
    const std::vector<UncertainInput> inputs{
        {*power.typed_power, typed == power.estimates.end() ? std::nullopt : typed->half_width, UncertainInput::own},
        {*speed, instrument_uncertainty(context.engine, of_speed, *speed), UncertainInput::own}};
    const auto solved = propagate(inputs, [&](std::span<const double> x) -> std::optional<double> {
        const auto margin = light_running_margin(kilowatts(x[0]), per_minute(x[1]), rating);
        return margin.has_value() ? std::optional(100.0 * margin.value().value()) : std::nullopt;
    });
    if (!solved)
        return std::nullopt;
    ReviewLine line;
    line.words = "Light running, at the load as typed";
    line.unit = "%";
    line.decimals = 1;
    line.value = solved->value;
    line.half_width = solved->half_width;
    say_light_running(context, line);
    return line;
}

} // namespace

ReviewSection air_side_section(const ReviewContext& context)
{
    ReviewSection section{ReviewTopic::air_side, "Air side", {}, Level::quiet, {}};
    auto& lines = section.lines;
    for (const char* name : {"inlet_air_temperature", "air_filter_pressure_drop"})
        add_typed(lines, context, name);
    add_derived(lines, context, "filter_drop_at_reference_flow");
    add_typed(lines, context, "compressor_outlet_temperature");
    add_derived(lines, context, "compressor_pressure_ratio");
    add_derived(lines, context, "compressor_efficiency");
    add_typed(lines, context, "cooler_pressure_drop");
    add_derived(lines, context, "cooler_drop_at_reference_flow");
    for (const char* name : {"cooler_coolant_inlet_temperature", "cooler_coolant_outlet_temperature",
                             "cooler_air_outlet_temperature", "scavenge_temperature"})
        add_typed(lines, context, name);
    for (const char* name : {"cooler_temperature_difference", "cooler_approach", "cooler_coolant_rise", "cooler_effectiveness"})
        add_derived(lines, context, name);
    for (const char* name : {"scavenge_pressure", "turbocharger_speed", "exhaust_before_turbine", "exhaust_after_turbine",
                             "exhaust_receiver_pressure", "exhaust_back_pressure"})
        add_typed(lines, context, name);
    for (const char* name : {"turbocharger_speed_at_ratio", "back_pressure_at_reference_flow",
                             "turbocharger_efficiency", "turbine_efficiency", "charge_air_dew_point", "charge_air_condensate"})
        add_derived(lines, context, name);
    section.level = worst(lines);
    const auto departing = departures(lines);
    if (!departing.empty())
        section.sentence = upper_first(and_list(departing)) + "." + patterns_sentence(context, Place::engine(), lines) +
                           " Settle the air side before cylinders are blamed: it moves them all alike.";
    if (words_of(context.reading, "auxiliary_blower_running") == "yes")
        section.sentence += std::string(section.sentence.empty() ? "" : " ") +
                            "The auxiliary blower was running: what the compressor does is not known.";
    return section;
}

ReviewSection means_section(const ReviewContext& context)
{
    ReviewSection section{ReviewTopic::means, "Means over the cylinders", {}, Level::quiet, {}};
    add(section.lines, mean_line(context, "exhaust_temperature"));
    const auto compression = mean_line(context, "compression_pressure"), maximum = mean_line(context, "maximum_pressure");
    add(section.lines, compression);
    add(section.lines, maximum);
    add(section.lines, derived_mean_line(context, "compression_pressure_ratio"));
    auto rise = derived_mean_line(context, "combustion_pressure_rise");
    if (!rise && compression && maximum)
        rise = rise_line(*maximum, *compression);
    add(section.lines, std::move(rise));
    add(section.lines, mean_line(context, "jacket_outlet_temperature"));
    section.level = worst(section.lines);
    const auto departing = departures(section.lines);
    if (!departing.empty())
        section.sentence =
            upper_first(and_list(departing)) + "." + patterns_sentence(context, Place::engine(), section.lines);
    return section;
}

ReviewSection cylinders_section(const ReviewContext& context)
{
    ReviewSection section{ReviewTopic::cylinders, "Each cylinder", {}, Level::quiet, {}};
    for (const JudgedValue& value : context.judged.values)
        if (value.place.kind == Place::Kind::cylinder && quantity(value.quantity).group == "cylinder")
            section.lines.push_back(typed_line(context, value));
    for (int number = 1; number <= context.engine.cylinders; ++number)
        if (auto line = derived_line(context, "compression_pressure_ratio", Place::cylinder(number)); line && line->value)
            section.lines.push_back(std::move(*line));
    section.level = worst(section.lines);
    for (int number = 1; number <= context.engine.cylinders; ++number)
        section.sentence += cylinder_words(context, number, section.lines);
    if (!section.sentence.empty())
        section.sentence.erase(0, 1);
    return section;
}

std::optional<LoadState> load_state(const ReviewContext& context, const PowerAgreement& power)
{
    const auto speed = context.number("speed");
    if (!context.engine.load_limits || !speed || !power.typed_power)
        return std::nullopt;
    const auto diagram =
        LoadDiagram::make(context.engine.rated_power, context.engine.rated_speed, *context.engine.load_limits);
    if (!diagram.has_value())
        return std::nullopt;
    const auto state = diagram.value().locate(kilowatts(*power.typed_power), per_minute(*speed));
    return state.has_value() ? std::optional(state.value()) : std::nullopt;
}

ReviewSection ship_section(const ReviewContext& context, const PowerAgreement& power)
{
    ReviewSection section{ReviewTopic::ship, context.generating_set ? "Speed and load" : "Ship and propeller", {},
                          Level::quiet, {}};
    add_typed(section.lines, context, "speed");
    const bool drives_propeller =
        !context.generating_set && !(context.engine.load_limits && context.engine.load_limits->constant_speed);
    if (drives_propeller) {
        for (const char* name : {"speed_through_water", "speed_over_ground", "propeller_pitch"})
            add_typed(section.lines, context, name);
        add_derived(section.lines, context, "apparent_slip");
        add_derived(section.lines, context, "admiralty_coefficient");
        add(section.lines, light_running_line(context, power));
    }
    if (const auto state = load_state(context, power)) {
        ReviewLine line;
        line.words = state->sentence;
        line.level = state->beyond ? (state->within_overload ? Level::note : Level::watch) : Level::quiet;
        line.verdict = state->beyond ? "beyond a limit" : "within the limits";
        if (context.power_in_doubt)
            line.verdict += ", power in doubt";
        if (state->beyond)
            section.sentence = state->sentence;
        section.lines.push_back(std::move(line));
    }
    section.level = worst(section.lines);
    return section;
}

ReviewSection fuel_section(const ReviewContext& context)
{
    ReviewSection section{ReviewTopic::fuel, "Fuel", {}, Level::quiet, {}};
    add_typed(section.lines, context, "fuel_consumption");
    add_typed(section.lines, context, "fuel_consumption_sounded");
    add_derived(section.lines, context, "fuel_mass_flow");
    add_typed(section.lines, context, "fuel_lower_heating_value");
    add_derived(section.lines, context, "calculated_heating_value");
    for (const char* name : {"fuel_injection_temperature", "calculated_ignition_index", "specific_fuel_consumption"})
        add_derived(section.lines, context, name);
    if (context.power_in_doubt) {
        for (ReviewLine& line : section.lines)
            if (line.expected || (line.quantity && quantity(*line.quantity).name == "specific_fuel_consumption")) {
                line.level = Level::no_data;
                line.verdict = "not judged while the power is in doubt";
            }
        if (!section.lines.empty())
            section.sentence = "Fuel consumption is not judged while the power is in doubt.";
        return section;
    }
    section.level = worst(section.lines);
    const auto departing = departures(section.lines);
    if (!departing.empty())
        section.sentence = upper_first(and_list(departing)) + ". It gathers every fault and slip above: settle those first.";
    return section;
}

} // namespace evenstroke::reviewing
