// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/typed_box.h"

#include "core/plain_text.h"
#include "core/reading/fitting_unit.h"
#include "core/reading/typed_number.h"

#include <algorithm>

namespace evenstroke {
namespace {

std::string lowered(std::string_view text)
{
    std::string lower(text);
    for (char& c : lower)
        c = c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c == '_' ? ' ' : c;
    return lower;
}

Value start_value(const LogBox& box)
{
    Value value;
    value.quantity = box.quantity;
    value.place = box.place;
    value.phase = box.phase;
    value.unit = quantity(box.quantity).unit;
    value.kind = quantity(box.quantity).kind;
    return value;
}

std::optional<MissingReason> find_reason(std::string_view text)
{
    const std::string wanted = lowered(text);
    for (const MissingReason reason :
         {MissingReason::not_read, MissingReason::not_fitted, MissingReason::out_of_order})
        if (wanted == missing_text(reason))
            return reason;
    return std::nullopt;
}

Result<Value> read_choice(Value value, std::string_view text)
{
    const Quantity& meant = quantity(value.quantity);
    const std::string wanted = lowered(text);
    std::vector<const std::string*> fitting;
    for (const std::string& choice : meant.choices) {
        const std::string known = lowered(choice);
        if (known == wanted) {
            fitting = {&choice};
            break;
        }
        if (known.compare(0, wanted.size(), wanted) == 0)
            fitting.push_back(&choice);
    }
    if (fitting.size() == 1) {
        value.words = *fitting.front();
        value.typed = value.words;
        return value;
    }
    std::string list;
    for (const std::string& choice : meant.choices)
        list += (list.empty() ? "" : ", ") + choice_text(choice);
    return invalid_input(quoted(text) + " is none of the choices for " + lowered(meant.title) + ".",
                         "Write one of: " + list + ".");
}

Result<Value> read_yes_no(Value value, std::string_view text)
{
    const std::string wanted = lowered(text);
    if (wanted == "yes" || wanted == "y" || wanted == "on" || wanted == "1")
        value.words = "yes";
    else if (wanted == "no" || wanted == "n" || wanted == "off" || wanted == "0")
        value.words = "no";
    else
        return invalid_input(quoted(text) + " is neither yes nor no.", "Write yes or no.");
    value.typed = value.words;
    return value;
}

/// "12 34.5 S", "12°34.5'S": degrees, minutes with decimals, hemisphere (ISO 6709 takes south and west
/// negative).
std::optional<double> degrees_and_minutes(std::string_view text)
{
    std::string plain;
    double sign = 0.0;
    for (std::size_t i = 0; i < text.size(); ++i) {
        const char c = text[i];
        const bool last = trimmed(text.substr(i)).size() == 1;
        if (last && (c == 'N' || c == 'n' || c == 'E' || c == 'e'))
            sign = 1.0;
        else if (last && (c == 'S' || c == 's' || c == 'W' || c == 'w'))
            sign = -1.0;
        else if ((c >= '0' && c <= '9') || c == '.' || c == ',')
            plain += c;
        else
            plain += ' '; // degree sign, minute mark, blanks
    }
    const std::string_view both = trimmed(plain);
    const std::size_t gap = both.find(' ');
    if (sign == 0.0 || both.empty())
        return std::nullopt;
    const auto degrees = parse_number(both.substr(0, gap));
    if (!degrees)
        return std::nullopt;
    if (gap == std::string_view::npos)
        return sign * degrees.value();
    const auto minutes = parse_number(trimmed(both.substr(gap)));
    if (!minutes || minutes.value() < 0.0 || minutes.value() >= 60.0)
        return std::nullopt;
    return sign * (degrees.value() + minutes.value() / 60.0);
}

/// Where the number ends and its unit begins; the whole text where it is all number.
std::string_view number_part(std::string_view text)
{
    for (std::size_t length = text.size(); length > 0; --length)
        if (parse_number(text.substr(0, length)))
            return trimmed(text.substr(0, length));
    return {};
}

Result<Value> read_number(Value value, std::string_view text, WrittenUnit row_unit)
{
    const Quantity& meant = quantity(value.quantity);
    if (meant.name == "latitude" || meant.name == "longitude")
        if (const auto degrees = degrees_and_minutes(text)) {
            value.number = *degrees;
            value.value_si = unit(value.unit).to_si(*degrees);
            value.typed = plain_number(*degrees, 5);
            return value;
        }
    const std::string_view number_text = number_part(text);
    const auto number = parse_number(number_text.empty() ? text : number_text);
    if (!number)
        return number.error();
    WrittenUnit written = row_unit;
    const std::string_view behind =
        trimmed(text.substr(static_cast<std::size_t>(number_text.data() - text.data()) + number_text.size()));
    if (!behind.empty()) {
        const auto found = find_unit(behind);
        if (!found)
            return found.error();
        written = found.value();
        const Dimension dimension = unit(written.id).dimension, wanted = unit(meant.unit).dimension;
        if (!may_be_written_in(meant, written.id))
            return invalid_input(
                std::string(unit(written.id).symbol) + " measures " + std::string(dimension_text(dimension)) +
                    ", but " + lowered(meant.title) + " is a " + std::string(dimension_text(wanted)) + ".",
                "Write the number alone, or with a unit such as " + std::string(unit(meant.unit).symbol) +
                    ".");
        if (auto problem = find_unit_problem(meant, written))
            return std::move(*problem);
    }
    if (written.kind == PressureKind::none)
        written.kind = meant.kind;
    const auto checked = to_si_checked(number.value(), written);
    if (!checked)
        return checked.error();
    value.typed = number_text;
    value.number = number.value();
    value.value_si = checked.value();
    value.unit = written.id;
    value.kind = written.kind;
    return value;
}

} // namespace

WrittenUnit own_unit(QuantityId quantity_id)
{
    return {quantity(quantity_id).unit, quantity(quantity_id).kind};
}

Value without_value(const LogBox& box, MissingReason reason)
{
    Value value = start_value(box);
    value.missing = reason;
    return value;
}

Result<Value> read_box(const LogBox& box, std::string_view text, WrittenUnit row_unit)
{
    const std::string_view plain = trimmed(text);
    Value value = start_value(box);
    if (plain.empty())
        return value;
    if (const auto reason = find_reason(plain))
        return without_value(box, *reason);
    switch (quantity(box.quantity).type) {
    case ValueType::words:
        value.words = plain;
        value.typed = plain;
        return value;
    case ValueType::choice:
        return read_choice(std::move(value), plain);
    case ValueType::yes_no:
        return read_yes_no(std::move(value), plain);
    case ValueType::number:
        break;
    }
    return read_number(std::move(value), plain, row_unit);
}

std::string box_text(const Value& value, WrittenUnit row_unit)
{
    if (value.missing != MissingReason::none)
        return missing_text(value.missing);
    const Quantity& meant = quantity(value.quantity);
    if (meant.type == ValueType::choice)
        return choice_text(value.words);
    if (meant.type != ValueType::number)
        return value.words.empty() ? value.typed : value.words;
    if (!value.number)
        return {};
    const std::string number = value.typed.empty() ? number_text(*value.number) : value.typed;
    const PressureKind row_kind = row_unit.kind == PressureKind::none ? meant.kind : row_unit.kind;
    if (value.unit == row_unit.id && value.kind == row_kind)
        return number;
    const std::string behind = row_unit_text(value.quantity, {value.unit, value.kind});
    return behind.empty() ? number : number + " " + behind;
}

std::string missing_text(MissingReason reason)
{
    switch (reason) {
    case MissingReason::not_fitted:
        return "not fitted";
    case MissingReason::not_read:
        return "not read";
    case MissingReason::out_of_order:
        return "out of order";
    default:
        return {};
    }
}

std::string choice_text(std::string_view choice)
{
    std::string words(choice);
    std::replace(words.begin(), words.end(), '_', ' ');
    return words;
}

std::optional<double> in_row_unit(QuantityId quantity_id, double own, WrittenUnit row_unit,
                                  std::optional<AbsolutePressure> barometer)
{
    const Quantity& meant = quantity(quantity_id);
    if (unit(row_unit.id).dimension != unit(meant.unit).dimension)
        return std::nullopt; // a volume flow, say
    double value_si = unit(meant.unit).to_si(own);
    const bool other_level = (meant.kind == PressureKind::gauge && row_unit.kind == PressureKind::absolute) ||
                             (meant.kind == PressureKind::absolute && row_unit.kind == PressureKind::gauge);
    if (other_level) {
        if (!barometer)
            return std::nullopt;
        value_si += meant.kind == PressureKind::gauge ? barometer->value() : -barometer->value();
    }
    return unit(row_unit.id).from_si(value_si);
}

std::string row_unit_text(QuantityId quantity_id, WrittenUnit row_unit)
{
    const PressureKind own = quantity(quantity_id).kind;
    std::string words = unit_behind(row_unit.id);
    if (row_unit.kind == PressureKind::none || row_unit.kind == own)
        return words;
    return words + (row_unit.kind == PressureKind::absolute ? " abs"
                    : row_unit.kind == PressureKind::gauge  ? " gauge"
                                                            : "");
}

std::vector<WrittenUnit> possible_units(QuantityId quantity_id)
{
    const Quantity& meant = quantity(quantity_id);
    std::vector<WrittenUnit> units{own_unit(quantity_id)};
    if (meant.type != ValueType::number)
        return units;
    const Dimension dimension = unit(meant.unit).dimension;
    const auto count = static_cast<UnitId>(all_units().size());
    for (UnitId id = 0; id < count; ++id)
        if (id != meant.unit && may_be_written_in(meant, id) && dimension != Dimension::number)
            units.push_back({id, meant.kind});
    // The barometer, the one absolute quantity, has no gauge.
    if (meant.kind == PressureKind::gauge)
        for (std::size_t i = 0, own_kind = units.size(); i < own_kind; ++i)
            units.push_back({units[i].id, PressureKind::absolute});
    return units;
}

} // namespace evenstroke
