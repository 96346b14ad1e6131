// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/quantity_catalogue.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"
#include "core/reading/place_kinds.h"
#include "core/reading/quantity_names.h"

#include <algorithm>
#include <numeric>
#include <stdexcept>
#include <unordered_map>

namespace evenstroke {
namespace {

ValueType value_type(const std::string& text)
{
    static const std::unordered_map<std::string, ValueType> types = {{"number", ValueType::number},
                                                                     {"words", ValueType::words},
                                                                     {"choice", ValueType::choice},
                                                                     {"yes_no", ValueType::yes_no}};
    return types.at(text);
}

PressureKind pressure_kind(const std::string& text)
{
    static const std::unordered_map<std::string, PressureKind> kinds = {{"", PressureKind::none},
                                                                        {"gauge", PressureKind::gauge},
                                                                        {"absolute", PressureKind::absolute},
                                                                        {"difference", PressureKind::difference}};
    return kinds.at(text);
}

CorrectionForm correction_form(const std::string& text)
{
    static const std::unordered_map<std::string, CorrectionForm> forms = {
        {"none", CorrectionForm::none},
        {"pressure", CorrectionForm::pressure},
        {"temperature", CorrectionForm::temperature},
        {"turbocharger_speed", CorrectionForm::turbocharger_speed},
        {"coolant_difference", CorrectionForm::coolant_difference}};
    return forms.at(text);
}

Need need_of(const std::string& text)
{
    return text == "required" ? Need::required : text == "recommended" ? Need::recommended : Need::optional;
}

Quantity read_row(const CatalogueTable& table, std::size_t row)
{
    Quantity q;
    q.id = static_cast<QuantityId>(row);
    q.name = table.cell(row, "id");
    q.title = table.cell(row, "title");
    q.short_title = table.cell(row, "short_title");
    q.group = table.cell(row, "group");
    q.per = place_kind_named(table.cell(row, "per"));
    q.type = value_type(table.cell(row, "type"));
    q.choices = split_list(table.cell(row, "choices"), '|');
    const Result<WrittenUnit> written = find_unit(table.cell(row, "unit"));
    if (!written.has_value())
        throw std::logic_error("catalogue quantities: unknown unit of " + q.name);
    q.unit = written.value().id;
    q.kind = pressure_kind(table.cell(row, "kind"));
    const auto range = [&](const char* low, const char* high) {
        return Range{table.number(row, low), table.number(row, high)};
    };
    q.usual_two_stroke = range("usual_two_stroke_low", "usual_two_stroke_high");
    q.usual_four_stroke = range("usual_four_stroke_low", "usual_four_stroke_high");
    q.soft = range("soft_low", "soft_high");
    q.hard = range("hard_low", "hard_high");
    q.uncertainty_absolute = table.number(row, "uncertainty");
    q.uncertainty_percent = table.number(row, "uncertainty_percent");
    q.need = need_of(table.cell(row, "need"));
    q.only_for = table.cell(row, "only_for");
    q.correction_form = correction_form(table.cell(row, "correction"));
    q.correction_like = table.cell(row, "correction_like");
    q.decimals = static_cast<int>(table.number(row, "decimals").value_or(1.0));
    q.source = table.cell(row, "source");
    return q;
}

struct Catalogue
{
    std::vector<Quantity> quantities;
    std::unordered_map<std::string_view, std::vector<QuantityId>> by_name;
};

const Catalogue& catalogue()
{
    static const Catalogue loaded = [] {
        Catalogue c;
        const CatalogueTable table(catalogue_text::quantities);
        c.quantities.reserve(table.rows());
        for (std::size_t row = 0; row < table.rows(); ++row)
            c.quantities.push_back(read_row(table, row));
        for (const Quantity& q : c.quantities)
            c.by_name[q.name].push_back(q.id);
        return c;
    }();
    return loaded;
}

/// A turbocharger's or cooler's value may be given for the engine: it has one, or the value stands for all.
bool may_stand_at(const Quantity& q, Place::Kind place)
{
    if (q.per == place)
        return true;
    const bool repeats = q.per == Place::Kind::turbocharger || q.per == Place::Kind::cooler;
    if (place == Place::Kind::engine)
        return repeats || q.per == Place::Kind::ship;
    // The inlet air may differ between turbochargers, the receiver between banks.
    return q.per == Place::Kind::engine && place != Place::Kind::cylinder && place != Place::Kind::ship &&
           (q.group == "turbocharger" || q.group == "cooler" || q.name == "inlet_air_temperature");
}

} // namespace

std::size_t edit_distance(std::string_view a, std::string_view b)
{
    std::vector<std::size_t> row(b.size() + 1);
    std::iota(row.begin(), row.end(), std::size_t{0});
    for (std::size_t i = 1; i <= a.size(); ++i) {
        std::size_t diagonal = row[0]++;
        for (std::size_t j = 1; j <= b.size(); ++j) {
            const std::size_t changed = diagonal + (a[i - 1] == b[j - 1] ? 0 : 1);
            diagonal = row[j];
            row[j] = std::min({row[j] + 1, row[j - 1] + 1, changed});
        }
    }
    return row.back();
}

std::span<const Quantity> all_quantities() { return catalogue().quantities; }

const Quantity& quantity(QuantityId id) { return catalogue().quantities.at(static_cast<std::size_t>(id)); }

std::optional<QuantityId> find_quantity(std::string_view name, Place::Kind place)
{
    const auto found = catalogue().by_name.find(name);
    if (found == catalogue().by_name.end())
        return std::nullopt;
    for (QuantityId id : found->second)
        if (quantity(id).per == place && !quantity(id).derived())
            return id;
    for (QuantityId id : found->second)
        if (!quantity(id).derived() && may_stand_at(quantity(id), place))
            return id;
    return std::nullopt;
}

std::optional<QuantityId> find_quantity(std::string_view name)
{
    const auto found = catalogue().by_name.find(name);
    if (found == catalogue().by_name.end())
        return std::nullopt;
    return found->second.front();
}

namespace {

std::vector<std::string> nearest_names(std::string_view name, std::size_t count, bool derived_too)
{
    std::vector<std::pair<std::size_t, std::string>> by_distance;
    name = name.substr(0, 64); // a longer name is no slip of the pen
    for (const auto& [known, ids] : catalogue().by_name)
        if (derived_too || !quantity(ids.front()).derived())
            by_distance.emplace_back(edit_distance(name, known), std::string(known));
    std::sort(by_distance.begin(), by_distance.end());
    std::vector<std::string> names;
    for (std::size_t i = 0; i < std::min(count, by_distance.size()); ++i)
        names.push_back(by_distance[i].second);
    return names;
}

} // namespace

std::vector<std::string> nearest_quantity_names(std::string_view name, std::size_t count)
{
    return nearest_names(name, count, false);
}

std::vector<std::string> nearest_names_of_all(std::string_view name, std::size_t count)
{
    return nearest_names(name, count, true);
}

std::string place_text(const Place& place)
{
    switch (place.kind) {
    case Place::Kind::engine: return "engine";
    case Place::Kind::ship: return "ship";
    case Place::Kind::cylinder: return "cylinder " + std::to_string(place.number);
    case Place::Kind::turbocharger: return "turbocharger " + std::to_string(place.number);
    case Place::Kind::cooler: return "cooler " + std::to_string(place.number);
    }
    return {};
}

} // namespace evenstroke
