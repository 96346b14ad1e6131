// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/log_sheet.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"
#include "core/reading/place_kinds.h"
#include "core/sentence_words.h"

#include <algorithm>
#include <map>
#include <stdexcept>

namespace evenstroke {
namespace {

/// One line of log_sheet.csv.
struct SectionPlan
{
    std::string name, title;
    std::vector<std::string> groups;
    std::vector<Place::Kind> kinds;
    std::vector<QuantityId> quick_line; ///< the quantities of the two quick lines; empty for other sections
};

std::vector<SectionPlan> load_plans()
{
    const CatalogueTable table(catalogue_text::log_sheet);
    std::vector<SectionPlan> plans;
    for (std::size_t row = 0; row < table.rows(); ++row) {
        SectionPlan plan{table.cell(row, "section"), table.cell(row, "title"), {}, {}, {}};
        plan.groups = split_list(table.cell(row, "groups"));
        for (const std::string& kind : split_list(table.cell(row, "per")))
            plan.kinds.push_back(place_kind_named(kind));
        for (const std::string& name : split_list(table.cell(row, "quick_line"))) {
            const auto found = find_quantity(name, Place::Kind::engine);
            if (!found)
                throw std::logic_error("log_sheet.csv names an unknown quantity: " + name);
            plan.quick_line.push_back(*found);
        }
        plans.push_back(std::move(plan));
    }
    return plans;
}

const std::vector<SectionPlan>& plans()
{
    static const std::vector<SectionPlan> loaded = load_plans();
    return loaded;
}

template <typename T> bool contains(const std::vector<T>& all, const T& wanted)
{
    return std::find(all.begin(), all.end(), wanted) != all.end();
}

bool applies_to(const Quantity& quantity, const Engine& engine)
{
    if (quantity.only_for == "two-stroke")
        return engine.two_stroke();
    if (quantity.only_for == "four-stroke")
        return !engine.two_stroke();
    return true;
}

std::vector<Place> places_of(const Quantity& quantity, const Engine& engine, EngineLayout layout)
{
    int count = 0;
    switch (quantity.per) {
    case Place::Kind::cylinder:
        count = engine.cylinders;
        break;
    case Place::Kind::turbocharger:
        count = layout.turbochargers;
        break;
    case Place::Kind::cooler:
        count = layout.coolers;
        break;
    case Place::Kind::ship:
        return {Place{Place::Kind::ship, 0}};
    case Place::Kind::engine:
        return {Place::engine()};
    }
    if (count == 0)
        return {Place::engine()};
    std::vector<Place> places;
    for (int number = 1; number <= count; ++number)
        places.push_back({quantity.per, number});
    return places;
}

LogRow make_row(const Quantity& quantity, const Engine& engine, EngineLayout layout)
{
    LogRow row{quantity.id, quantity.need, quantity.per == Place::Kind::ship, {}};
    for (const Place& place : places_of(quantity, engine, layout))
        row.boxes.push_back({quantity.id, place, Phase::reading});
    return row;
}

LogSection make_quick_lines(const SectionPlan& plan)
{
    LogSection section{plan.name, plan.title, {"before", "after"}, {}};
    for (const QuantityId id : plan.quick_line)
        section.rows.push_back({id,
                                Need::recommended,
                                false,
                                {{id, Place::engine(), Phase::before}, {id, Place::engine(), Phase::after}}});
    return section;
}

LogSection make_section(const SectionPlan& plan, const Engine& engine, EngineLayout layout)
{
    LogSection section{plan.name, plan.title, {}, {}};
    std::size_t widest = 1;
    for (const Quantity& quantity : all_quantities()) {
        if (!contains(plan.groups, quantity.group) || !contains(plan.kinds, quantity.per) ||
            !applies_to(quantity, engine))
            continue;
        section.rows.push_back(make_row(quantity, engine, layout));
        widest = std::max(widest, section.rows.back().boxes.size());
    }
    const bool cylinders = contains(plan.kinds, Place::Kind::cylinder);
    for (std::size_t column = 0; column < widest; ++column) {
        const int number = static_cast<int>(column) + 1;
        section.columns.push_back(cylinders    ? engine.cylinder_name(number)
                                  : widest > 1 ? std::to_string(number)
                                               : std::string());
    }
    return section;
}

std::string places_words(const Engine& engine, const std::vector<LogBox>& boxes)
{
    std::vector<std::string> numbers;
    for (const LogBox& box : boxes)
        numbers.push_back(box.place.kind == Place::Kind::cylinder ? engine.cylinder_name(box.place.number)
                                                                  : std::to_string(box.place.number));
    const char* what = nullptr;
    switch (boxes.front().place.kind) {
    case Place::Kind::cylinder:
        what = "cylinder";
        break;
    case Place::Kind::turbocharger:
        what = "turbocharger";
        break;
    case Place::Kind::cooler:
        what = "cooler";
        break;
    default:
        return {};
    }
    return std::string(" of ") + what + (boxes.size() > 1 ? "s " : " ") + and_list(numbers);
}

bool is_answered(const Value* value)
{
    return value && (value->value_si || !value->words.empty() || value->missing != MissingReason::none);
}

} // namespace

EngineLayout find_layout(std::span<const Reading> readings)
{
    EngineLayout layout;
    for (const Reading& reading : readings) {
        for (const Value& value : reading.values) {
            if (value.place.kind == Place::Kind::turbocharger)
                layout.turbochargers = std::max(layout.turbochargers, value.place.number);
            if (value.place.kind == Place::Kind::cooler)
                layout.coolers = std::max(layout.coolers, value.place.number);
        }
    }
    return layout;
}

std::set<QuantityId> quantities_used(std::span<const Reading> readings)
{
    std::set<QuantityId> used;
    for (const Reading& reading : readings)
        for (const Value& value : reading.values)
            if (is_answered(&value) && value.missing != MissingReason::not_fitted)
                used.insert(value.quantity);
    return used;
}

std::vector<LogSection> make_log_sheet(const Engine& engine, EngineLayout layout)
{
    std::vector<LogSection> sheet;
    for (const SectionPlan& plan : plans()) {
        LogSection section =
            plan.quick_line.empty() ? make_section(plan, engine, layout) : make_quick_lines(plan);
        if (!section.rows.empty())
            sheet.push_back(std::move(section));
    }
    return sheet;
}

const Value* find_value(const Reading& reading, const LogBox& box)
{
    for (const Value& value : reading.values)
        if (value.quantity == box.quantity && value.place == box.place && value.phase == box.phase)
            return &value;
    return nullptr;
}

Completeness find_completeness(std::span<const LogSection> sheet, const Reading& reading)
{
    Completeness result;
    for (const LogSection& section : sheet) {
        for (const LogRow& row : section.rows) {
            if (row.need != Need::required)
                continue;
            for (const LogBox& box : row.boxes) {
                ++result.required;
                if (is_answered(find_value(reading, box)))
                    ++result.answered;
                else
                    result.missing.push_back(box);
            }
        }
    }
    return result;
}

std::vector<std::string> missing_words(const Engine& engine, const std::vector<LogBox>& missing)
{
    std::vector<std::string> lines;
    for (std::size_t i = 0; i < missing.size();) {
        std::vector<LogBox> row{missing[i]};
        while (++i < missing.size() && missing[i].quantity == row.front().quantity &&
               missing[i].place.kind == row.front().place.kind)
            row.push_back(missing[i]);
        const bool all = row.front().place.kind == Place::Kind::cylinder &&
                         static_cast<int>(row.size()) == engine.cylinders && engine.cylinders > 1;
        lines.push_back(quantity(row.front().quantity).title +
                        (all ? std::string(" of all cylinders") : places_words(engine, row)));
    }
    return lines;
}

std::optional<Problem> find_problem_with_closing(const Reading& reading)
{
    static const std::vector<const char*> load_figures{"load_percent", "shaft_power", "generator_power",
                                                       "fuel_index", "shaft_torque"};
    for (const char* name : load_figures) {
        const auto figure = find_quantity(name, Place::Kind::engine);
        const Value* value = figure ? reading.find(*figure, Place::engine()) : nullptr;
        if (value && value->value_si)
            return std::nullopt;
    }
    return invalid_input("The reading has no figure of load: nothing in it could be compared.",
                         "Enter load, shaft power, electrical power or the fuel index of the engine.");
}

} // namespace evenstroke
