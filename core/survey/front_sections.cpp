// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/rounding.h"
#include "core/survey/survey_context.h"

#include <algorithm>
#include <array>

namespace evenstroke {

std::string standing_sentence()
{
    return "This report is evidence for the survey and takes no survey's place. It certifies the condition of no part "
           "and promises nothing. The maker's instructions, the class society's rules and the flag's rules come first; "
           "the surveyor decides.";
}

namespace report {
namespace {

std::string or_blank(const std::string& text) { return text.empty() ? "not given" : text; }

std::string length_words(Length length) { return rounded_text(length.value() * 1000.0, 1) + " mm"; }

std::size_t count_of(const Context& context, Place::Kind kind)
{
    int most = 0;
    for (const auto& row : context.cells)
        for (const auto& [key, cell] : row)
            if (key.second.kind == kind)
                most = std::max(most, key.second.number);
    return static_cast<std::size_t>(most);
}

std::string count_words(std::size_t count) { return count == 0 ? "one, or not told apart" : std::to_string(count); }

FieldList title_fields(const Context& context, const std::string& number)
{
    const Vessel& vessel = context.record.vessel;
    FieldList fields;
    fields.short_ones = true;
    fields.fields = {{"Ship", or_blank(vessel.name)},
                     {"IMO number", or_blank(vessel.imo)},
                     {"Flag", or_blank(vessel.flag)},
                     {"Class", or_blank(vessel.class_society)},
                     {"Class number", or_blank(vessel.class_number)},
                     {"Owner or manager", or_blank(context.details.owner)},
                     {"Engine", or_blank(context.engine.name)},
                     {"Report number", number},
                     {"Date of report", date_text(context.details.date)},
                     {"Period", date_text(context.period.from) + " to " + date_text(context.period.to)},
                     {"Meant for", or_blank(context.details.survey_kind)},
                     {"Program", "Evenstroke " + context.details.program_version + ", method version "
                                     + std::to_string(context.judgement.version)}};
    return fields;
}

FieldList particulars(const Context& context)
{
    const Engine& engine = context.engine;
    FieldList fields;
    fields.short_ones = true;
    fields.fields = {{"Working cycle", engine.two_stroke() ? "two-stroke" : "four-stroke"},
                     {"Cylinders", std::to_string(engine.cylinders)},
                     {"Bore and stroke", length_words(engine.bore) + " and " + length_words(engine.stroke)},
                     {"Connecting rod", length_words(engine.rod_length)},
                     {"Rated power", rounded_text(engine.rated_power.value() / 1000.0, 0) + " kW"},
                     {"Rated speed", rounded_text(engine.rated_speed.value() * 60.0, 1) + " r/min"},
                     {"Maximum pressure", engine.maximum_pressure_controlled ? "held by its own control" : "follows the load"},
                     {"Turbochargers", count_words(count_of(context, Place::Kind::turbocharger))},
                     {"Air coolers", count_words(count_of(context, Place::Kind::cooler))}};
    if (engine.compression_ratio)
        fields.fields.push_back({"Compression ratio", rounded_text(*engine.compression_ratio, 2)});
    if (engine.mechanical_efficiency)
        fields.fields.push_back({"Mechanical efficiency", rounded_text(*engine.mechanical_efficiency, 3)});
    if (engine.generator_efficiency)
        fields.fields.push_back({"Generator efficiency", rounded_text(*engine.generator_efficiency, 3)});
    if (engine.moving_mass)
        fields.fields.push_back({"Moving mass of one cylinder", rounded_text(engine.moving_mass->value(), 0) + " kg"});
    return fields;
}

/// What one kind of work opens, for the column "last opened".
struct Item
{
    std::string title;
    std::vector<std::string> kinds;
};

const std::array<Item, 4>& cylinder_items()
{
    static const std::array<Item, 4> items{{{"cover, piston, rings, liner", {"overhaul", "piston_ring_change", "liner_change"}},
                                            {"exhaust valve", {"exhaust_valve", "overhaul"}},
                                            {"fuel valves", {"fuel_valves"}},
                                            {"fuel pump", {"fuel_pump"}}}};
    return items;
}

const Event* last_opened(const Context& context, const Place& place, const std::vector<std::string>& kinds)
{
    const Event* last = nullptr;
    for (const Event& event : context.record.events) {
        const bool here = event.place == place || (event.place == Place::engine() && event.kind == "overhaul");
        if (here && event.date.utc <= end_of_day(context.period.to)
            && std::find(kinds.begin(), kinds.end(), event.kind) != kinds.end())
            last = &event;
    }
    return last;
}

/// Hours on the engine's counter at the last reading less those at the event; only where both were recorded.
std::string hours_since(const Context& context, const Event* event)
{
    const auto hours = find_quantity("engine_running_hours");
    if (!event || !event->running_hours || !hours)
        return "not known";
    for (auto row = context.cells.rbegin(); row != context.cells.rend(); ++row) {
        const auto found = row->find({*hours, Place::engine()});
        if (found == row->end() || !found->second.value || !found->second.value->value_si)
            continue;
        const double since = *found->second.value->value_si / 3600.0 - *event->running_hours;
        return since >= 0.0 ? rounded_text(since, 0) + " h" : "counter changed";
    }
    return "not known";
}

Row item_row(const Context& context, const Place& place, const Item& item, bool starts_group)
{
    const Event* event = last_opened(context, place, item.kinds);
    std::string opened = event ? date_text(event->date.utc) : "not recorded";
    if (event && event->kind != item.kinds.front())
        opened += ", " + lower_first(event_title(*event));
    return {{starts_group ? upper_first(place_words(context.engine, place)) : "", item.title, opened, hours_since(context, event),
             starts_group ? level_words(context.judgement.level_of(place)) : "", ""},
            starts_group};
}

} // namespace

Section title_section(const Context& context)
{
    Section section{"Report of engine performance readings", false, {}};
    const std::string number = context.details.number.empty() ? context.engine.name + " " + date_text(context.details.date)
                                                              : context.details.number;
    section.blocks = {title_fields(context, number), Paragraph{standing_sentence(), Paragraph::Style::boxed},
                      Heading{"Engine particulars"}, particulars(context)};
    return section;
}

Section items_section(const Context& context)
{
    Table table{"Machinery items that the readings speak to", {}, {}, 1,
                "Hours since: from the engine's counter where it was entered with the event. State: of the readings, "
                "not of the part. The last column is for the surveyor."};
    table.columns = {{"Item", Column::Kind::words}, {"Parts", Column::Kind::words}, {"Last opened", Column::Kind::words},
                     {"Hours since", Column::Kind::number}, {"Readings", Column::Kind::words}, {"Surveyor", Column::Kind::remark}};
    for (int number = 1; number <= context.engine.cylinders; ++number)
        for (const Item& item : cylinder_items())
            table.rows.push_back(item_row(context, Place::cylinder(number), item, &item == &cylinder_items().front()));
    const auto turbochargers = static_cast<int>(std::max<std::size_t>(1, count_of(context, Place::Kind::turbocharger)));
    for (int number = 1; number <= turbochargers; ++number)
        table.rows.push_back(item_row(context, Place::turbocharger(number), {"rotor, bearings", {"turbocharger_overhaul"}}, true));
    const auto coolers = static_cast<int>(std::max<std::size_t>(1, count_of(context, Place::Kind::cooler)));
    for (int number = 1; number <= coolers; ++number)
        table.rows.push_back(item_row(context, Place::cooler(number), {"air and water side", {"cooler_cleaning"}}, true));
    return {"Survey items concerned", false, {table}};
}

} // namespace report
} // namespace evenstroke
