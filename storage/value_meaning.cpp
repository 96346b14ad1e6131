// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/value_rows.h"

#include "core/plain_text.h"
#include "storage/written_unit.h"

namespace evenstroke::storage {

std::string written_unit(WrittenUnit written, PressureKind usual)
{
    std::string text(unit(written.id).symbol);
    if (written.kind == usual)
        return text;
    if (written.kind == PressureKind::absolute)
        return text + " abs";
    return written.kind == PressureKind::gauge ? text + " gauge" : text;
}

std::string written_unit(const Value& value)
{
    if (!value.unit_typed.empty())
        return value.unit_typed;
    return written_unit({value.unit, value.kind}, quantity(value.quantity).kind);
}

std::optional<Value> value_of(const History::Names& names, const ValueRow& row)
{
    const QuantityInFile* const known = names.quantity(row.quantity_key);
    const std::size_t kind = static_cast<std::size_t>(row.place / 1000);
    const UnitInFile* const written = names.unit(row.unit_key);
    if (!known || kind >= known->id.size() || known->id[kind] < 0 ||
        (row.unit_key != 0 && (!written || !written->unit)))
        return std::nullopt;
    Value value;
    value.quantity = known->id[kind];
    const Quantity& q = quantity(value.quantity);
    value.place = place_of(row.place);
    value.phase = static_cast<Phase>(row.phase);
    value.typed = row.typed;
    const WrittenUnit meant = written ? *written->unit : WrittenUnit{q.unit, PressureKind::none};
    value.unit = meant.id;
    value.kind = meant.kind == PressureKind::none ? q.kind : meant.kind;
    if (written && !written->as_catalogue[static_cast<std::size_t>(q.kind)])
        value.unit_typed = written->written;
    value.value_si = row.value_si;
    if (row.value_si)
        if (const auto number = parse_number(row.typed); number.has_value())
            value.number = number.value();
    value.words = row.words;
    value.missing = static_cast<MissingReason>(row.missing);
    value.confirmed = row.confirmed;
    value.place_typed = row.place_typed;
    value.origin = row.origin == static_cast<int>(Origin::card) ? Origin::card : Origin::read;
    return value;
}

Result<ValueRow> row_of(History::Names& names, const Value& value)
{
    const Quantity& q = quantity(value.quantity);
    ValueRow row;
    const auto quantity_key = names.quantity_key(q.name);
    if (!quantity_key)
        return quantity_key.error();
    row.quantity_key = quantity_key.value();
    row.place = place_code(value.place);
    row.phase = static_cast<int>(value.phase);
    // Blanks around a text would not come back from a file.
    row.typed = trimmed(value.typed);
    row.words = trimmed(value.words);
    row.missing = static_cast<int>(value.missing);
    row.confirmed = value.confirmed;
    row.place_typed = value.place_typed;
    row.origin = static_cast<int>(value.origin);
    row.value_si = value.value_si;
    const std::string written = written_unit(value);
    const bool bare = unit(value.unit).dimension == Dimension::number && value.unit_typed.empty();
    if (q.type == ValueType::number && value.missing == MissingReason::none && !bare) {
        const auto unit_key = names.unit_key(written);
        if (!unit_key)
            return unit_key.error();
        row.unit_key = unit_key.value();
    }
    return row;
}

} // namespace evenstroke::storage
