// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/load_rows.h"
#include "core/survey/rounding.h"
#include "core/survey/survey_context.h"

#include "core/engine/baseline.h"

#include <algorithm>
#include <chrono>
#include <set>

namespace evenstroke::report {
namespace {

std::string title_of(const std::string& name)
{
    const auto id = find_quantity(name);
    return id ? quantity(*id).title : name;
}

std::string unit_of_name(const std::string& name)
{
    const auto id = find_quantity(name);
    return id ? unit_of(quantity(*id)) : std::string();
}

int decimals_of_name(const std::string& name)
{
    const auto id = find_quantity(name);
    return id ? quantity(*id).decimals : 1;
}

Table coefficients_table(const Engine& engine)
{
    Table table{"Correction coefficients: relative change per kelvin",
                {{"Quantity", Column::Kind::words}, {"Inlet air, 1/K", Column::Kind::number},
                 {"Charge-air coolant, 1/K", Column::Kind::number}, {"Source", Column::Kind::remark}},
                {}, 1, "A quantity that is not listed takes the coefficients of its kind where the catalogue says so; "
                       "without coefficients a value stays as read."};
    for (const auto& [name, coefficients] : engine.correction)
        table.rows.push_back({{title_of(name), rounded_text(coefficients.per_inlet_air, 6, Sign::always),
                               rounded_text(coefficients.per_coolant, 6, Sign::always), source_words(coefficients.source)}, true});
    return table;
}

/// Heating values that were entered with the readings, each once.
std::string heating_values(const Context& context)
{
    const auto id = find_quantity("fuel_lower_heating_value");
    std::vector<std::string> seen;
    for (const auto& row : context.cells)
        if (const auto found = id ? row.find({*id, Place::engine()}) : row.end(); found != row.end() && found->second.value) {
            const Value& value = *found->second.value;
            const std::string text = value.typed + " " + unit_words(value.unit, value.kind);
            if (!value.typed.empty() && std::find(seen.begin(), seen.end(), text) == seen.end())
                seen.push_back(text);
        }
    std::string words;
    for (const std::string& text : seen)
        words += (words.empty() ? "" : ", ") + text;
    return words.empty() ? "not entered in this period" : words;
}

std::set<std::string> baseline_names(const Engine& engine)
{
    std::set<std::string> names;
    for (const BaselinePoint& point : engine.baseline)
        for (const auto& [name, value] : point.values)
            names.insert(name);
    return names;
}

Table baseline_table(const Engine& engine, const std::vector<std::string>& names)
{
    Table table{"Points of the baseline at reference conditions", {{"Quantity", Column::Kind::words}, {"Unit", Column::Kind::words}}, {}, 2, {}};
    for (const BaselinePoint& point : engine.baseline)
        table.columns.push_back({rounded_text(point.load_percent, 0) + " %" + (point.mode.empty() ? "" : " " + point.mode), Column::Kind::number});
    for (const std::string& name : names) {
        Row row{{title_of(name), unit_of_name(name)}, true};
        for (const BaselinePoint& point : engine.baseline) {
            const auto found = point.values.find(name);
            row.cells.push_back(found == point.values.end() ? "\u2013" : rounded_text(found->second, decimals_of_name(name)));
        }
        table.rows.push_back(std::move(row));
    }
    return table;
}

/// What was read over load, as the mean over the cylinders where the quantity has several.
PlotLine corrected_line(const Context& context, QuantityId id)
{
    PlotLine line{"readings, corrected", {}, true, true};
    for (std::size_t i = 0; i < context.readings.size(); ++i) {
        const ReadingJudgement& judged = context.judgement.readings[context.readings[i]];
        double sum = 0.0;
        int count = 0;
        for (const JudgedValue& value : judged.values)
            if (value.quantity == id && !value.doubtful) {
                sum += value.corrected.value_or(value.raw);
                ++count;
            }
        if (count > 0 && judged.load_percent)
            line.points.push_back({*judged.load_percent, sum / count,
                                   usable(judged) ? PlotPoint::Mark::filled : PlotPoint::Mark::hollow});
    }
    return line;
}

PlotLine curve_line(const BaselineCurve& curve, double low, double high)
{
    PlotLine line{"baseline", {}, false, false};
    for (double load = low; load <= high + 0.5; load += 1.0)
        if (const auto value = curve.at(load))
            line.points.push_back({load, *value, PlotPoint::Mark::filled});
    return line;
}

std::optional<Plot> baseline_plot(const Context& context, const Baseline& baseline, const std::string& name)
{
    const auto id = find_quantity(name);
    const BaselineCurve* curve = baseline.curve("", name);
    if (!id || !curve || curve->empty())
        return std::nullopt;
    double low = 200.0, high = 0.0;
    for (const BaselinePoint& point : context.engine.baseline)
        if (point.mode.empty() && point.values.count(name)) {
            low = std::min(low, point.load_percent);
            high = std::max(high, point.load_percent);
        }
    Plot plot;
    plot.across = Plot::Across::load;
    plot.title = quantity(*id).title + (quantity(*id).per == Place::Kind::cylinder ? ", mean of the cylinders" : "");
    plot.value_title = unit_of(quantity(*id));
    plot.from = std::max(0.0, low - 5.0);
    plot.to = high + 5.0;
    plot.lines = {curve_line(*curve, low, high), corrected_line(context, *id)};
    for (const PlotPoint& point : plot.lines.back().points) {
        plot.from = std::min(plot.from, point.across - 1.0);
        plot.to = std::max(plot.to, point.across + 1.0);
    }
    return plot;
}

std::string limit_text(const std::optional<double>& limit, const std::string& name)
{
    return limit ? rounded_text(*limit, decimals_of_name(name)) : "\u2013";
}

/// What the audit log says of the engine's settings between the days of the period.
void add_changes(const Context& context, Section& section)
{
    Table table{"Changes of limits, coefficients, baseline, instruments or particulars recorded in the period",
                {{"Date", Column::Kind::words}, {"Change", Column::Kind::remark}, {"By", Column::Kind::words}, {"Why", Column::Kind::remark}}, {}, 1, {}};
    for (const EngineChangeLine& change : context.details.engine_changes)
        if (context.contains(change.when))
            table.rows.push_back({{date_text(change.when), change.what, change.who, change.reason}, true});
    if (table.rows.empty())
        section.blocks.push_back(Paragraph{"The audit log records no change of this engine's limits, coefficients, baseline or "
                                           "instruments in the period.", {}});
    else
        section.blocks.push_back(std::move(table));
}

} // namespace

Section reference_section(const Context& context)
{
    const ReferenceConditions& reference = context.engine.reference;
    FieldList fields;
    fields.fields = {{"Inlet air", rounded_text(in_celsius(reference.inlet_air), 1) + " °C"},
                     {"Charge-air coolant", rounded_text(in_celsius(reference.cooler_coolant), 1) + " °C"},
                     {"Barometer", rounded_text(in_bar(reference.barometer) * 1000.0, 0) + " mbar"},
                     {"Relative humidity", humidity_words(context.engine)},
                     {"Source", source_words(reference.source)},
                     {"Mechanical efficiency", context.engine.mechanical_efficiency
                                                   ? rounded_text(*context.engine.mechanical_efficiency, 3) : "not given"},
                     {"Lower heating values", heating_values(context)}};
    if (context.engine.consumption_correction == ConsumptionCorrection::iso_3046)
        fields.fields.push_back({"Consumption", "brought to reference ambient by ISO 3046-1, " +
                                                    std::string(aspiration_words(context.engine.aspiration))});
    Section section{"Reference conditions and corrections", true, {fields}};
    if (context.engine.correction.empty())
        section.blocks.push_back(Paragraph{"No correction coefficients are entered for this engine: pressures and exhaust "
                                           "temperatures are compared as read.", {}});
    else
        section.blocks.push_back(coefficients_table(context.engine));
    if (context.engine.load_limits || !context.engine.walls.empty())
        section.blocks.push_back(load_and_walls_table(context.engine));
    return section;
}

Section baseline_section(const Context& context)
{
    Section section{"Baseline", false, {}};
    if (context.engine.baseline.empty()) {
        section.blocks.push_back(Paragraph{"No baseline is entered for this engine: values are compared between the "
                                           "cylinders and with their own past, not with the engine as it was new.", {}});
        return section;
    }
    section.blocks.push_back(FieldList{{{"Source", source_words(context.engine.baseline_source)}}});
    const std::set<std::string> known = baseline_names(context.engine);
    std::vector<std::string> names; // walking order, then what the catalogue does not know
    for (const Quantity& of : all_quantities())
        if (known.count(of.name) && std::find(names.begin(), names.end(), of.name) == names.end())
            names.push_back(of.name);
    for (const std::string& name : known)
        if (std::find(names.begin(), names.end(), name) == names.end())
            names.push_back(name);
    section.blocks.push_back(baseline_table(context.engine, names));
    const Baseline baseline(context.engine);
    for (const std::string& name : names)
        if (auto plot = baseline_plot(context, baseline, name))
            section.blocks.push_back(std::move(*plot));
    return section;
}

Section limits_section(const Context& context)
{
    Section section{"Limits in force", false, {}};
    Table table{"Absolute limits of this engine: they speak at once, whatever the trend says",
                {{"Quantity", Column::Kind::words}, {"Unit", Column::Kind::words}, {"Low", Column::Kind::number},
                 {"High", Column::Kind::number}, {"Source", Column::Kind::remark}},
                {}, 1, {}};
    for (const AbsoluteLimit& limit : context.engine.limits)
        table.rows.push_back({{title_of(limit.quantity), unit_of_name(limit.quantity), limit_text(limit.low, limit.quantity),
                               limit_text(limit.high, limit.quantity), source_words(limit.source)}, true});
    if (table.rows.empty())
        section.blocks.push_back(Paragraph{"No absolute limits are entered for this engine.", {}});
    else
        section.blocks.push_back(std::move(table));
    add_changes(context, section);
    section.blocks.push_back(Paragraph{"Flags for drift follow the evidence of the readings, not fixed limits; their "
                                       "thresholds stand under \u201cMethod\u201d.", Paragraph::Style::muted});
    return section;
}

namespace {

/// More than 24 months before the report: common practice, no source. A date that cannot be read is not judged.
bool calibrated_long_ago(const std::string& calibrated, TimePoint report_date)
{
    using namespace std::chrono;
    const auto day = parse_date(calibrated);
    if (!day.has_value())
        return false;
    const year_month_day latest = year_month_day(floor<days>(day.value().utc)) + months(24);
    return floor<days>(report_date) > (latest.ok() ? sys_days(latest) : sys_days(latest.year() / latest.month() / last));
}

} // namespace

Section instruments_section(const Context& context)
{
    Section section{"Instruments", false, {}};
    Table table{"As entered for this engine",
                {{"Quantity", Column::Kind::remark}, {"Serial number", Column::Kind::words}, {"Calibrated", Column::Kind::remark},
                 {"Uncertainty (95 %)", Column::Kind::number}, {"Source", Column::Kind::remark}},
                {}, 1, "Uncertainty is a half-width that holds the true value 95 times of 100."};
    bool any_old = false;
    for (const Instrument& instrument : context.engine.instruments) {
        const std::string in = unit_of_name(instrument.quantity);
        const bool old = calibrated_long_ago(instrument.calibrated, context.details.date);
        any_old = any_old || old;
        table.rows.push_back({{title_of(instrument.quantity), instrument.serial.empty() ? "not given" : instrument.serial,
                               (instrument.calibrated.empty() ? "not given" : instrument.calibrated) + (old ? ", older than 24 months" : ""),
                               instrument.uncertainty ? "\u00b1" + rounded_text(*instrument.uncertainty, std::max(1, decimals_of_name(instrument.quantity))) + " " + in : "not given",
                               source_words(instrument.source)}, true});
    }
    if (any_old)
        table.note += " Twenty-four months between calibrations are common practice (no source); the maintenance scheme's own interval goes first.";
    if (table.rows.empty())
        section.blocks.push_back(Paragraph{"No instruments are entered for this engine. Uncertainties are those that are "
                                           "usual for the kind of instrument (common practice).", {}});
    else
        section.blocks.push_back(std::move(table));
    return section;
}

} // namespace evenstroke::report
