// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/workings/working_words.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"
#include "core/plain_text.h"

#include <map>

namespace evenstroke {

std::string symbol_of(const Quantity& q)
{
    static const std::map<std::string, std::string, std::less<>> symbols = [] {
        std::map<std::string, std::string, std::less<>> read;
        const CatalogueTable table(catalogue_text::quantity_symbols);
        for (std::size_t row = 0; row < table.rows(); ++row)
            read.emplace(table.cell(row, "name"), table.cell(row, "symbol"));
        return read;
    }();
    const auto found = symbols.find(q.name);
    return found == symbols.end() ? q.short_title : found->second;
}

std::string unit_words(const Quantity& q)
{
    std::string text(unit(q.unit).symbol);
    if (text == "1")
        return {};
    const bool pressure = unit(q.unit).dimension == Dimension::pressure;
    if (pressure && q.kind == PressureKind::gauge)
        text += " gauge";
    if (pressure && q.kind == PressureKind::absolute)
        text += " abs";
    return text;
}

std::string part_words(const Engine& engine, const Place& place)
{
    return place.kind == Place::Kind::engine || place.kind == Place::Kind::ship ? std::string() : place_words(engine, place);
}

std::string words_as_typed(const Value& value)
{
    std::string text = value.origin == Origin::card ? "from the indicator card " : "typed ";
    text += value.typed.empty() && value.number ? number_text(*value.number) : value.typed;
    const std::string symbol = value.unit_typed.empty() ? std::string(unit(value.unit).symbol) : value.unit_typed;
    if (symbol != "1" && !symbol.empty())
        text += " " + symbol;
    if (value.unit_typed.empty() && unit(value.unit).dimension == Dimension::pressure)
        text += value.kind == PressureKind::gauge ? " gauge" : value.kind == PressureKind::absolute ? " abs" : "";
    return text;
}

std::string why_missing(const Reading& reading, std::string_view name, const Place& place)
{
    for (const Value& value : reading.values) {
        if (value.phase != Phase::reading || quantity(value.quantity).name != name ||
            (place.kind == Place::Kind::cylinder && value.place != place))
            continue;
        switch (value.missing) {
        case MissingReason::not_fitted: return "is not fitted";
        case MissingReason::out_of_order: return "is out of order";
        case MissingReason::not_read: return "was not read";
        case MissingReason::none: break;
        }
        if (value.number)
            return "cannot be used as it was " + words_as_typed(value);
    }
    return "was not read";
}

} // namespace evenstroke
