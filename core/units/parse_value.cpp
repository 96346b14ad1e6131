// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/plain_text.h"
#include "core/units/unit_catalogue.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {
namespace {

/// "385 °C", "112 bar abs", "7": as a sentence names a value.
std::string value_text(double number, WrittenUnit written)
{
    const std::string_view symbol = unit(written.id).symbol;
    std::string text = number_text(number);
    if (unit(written.id).dimension != Dimension::number) {
        text += (symbol == "%" ? "" : " ") + std::string(symbol);
    }
    if (written.kind == PressureKind::absolute) {
        text += " abs";
    } else if (written.kind == PressureKind::gauge) {
        text += " gauge";
    }
    return text;
}

/// Where the number ends and the unit begins: digits, points, commas, signs, and an `e` that digits follow.
std::size_t number_length(std::string_view text)
{
    const auto is_sign = [&](std::size_t at) {
        const std::string_view rest = text.substr(std::min(at, text.size()));
        return rest.starts_with('+') || rest.starts_with('-')             ? std::size_t{1}
               : rest.starts_with("\u2212") || rest.starts_with("\u2013") ? std::size_t{3}
                                                                          : std::size_t{0};
    };
    const auto is_digit = [&](std::size_t at) {
        return at < text.size() && text[at] >= '0' && text[at] <= '9';
    };
    std::size_t end = is_sign(0);
    while (end < text.size() && (is_digit(end) || text[end] == '.' || text[end] == ',')) {
        ++end;
    }
    if (end < text.size() && (text[end] == 'e' || text[end] == 'E')) {
        std::size_t exponent = end + 1 + is_sign(end + 1);
        if (is_digit(exponent)) {
            while (is_digit(exponent)) {
                ++exponent;
            }
            end = exponent;
        }
    }
    return end;
}

/// Whether what follows the number goes on with digits ("1 250 kW") and is no unit such as "1/min".
bool goes_on_as_number(std::string_view rest)
{
    return !rest.empty() && rest[0] >= '0' && rest[0] <= '9' && !(rest.starts_with("1/") || rest == "1");
}

/// No barometer on earth stood higher (record extremes from memory: 1085 hPa): what a gauge shows below minus
/// this is less than nothing.
constexpr double highest_barometer = 1.1e5; // Pa
constexpr double highest_wind_force = 12.0; // Beaufort; beyond it the scale has no speeds at sea

Problem below_vacuum(double number, WrittenUnit written)
{
    const double limit = unit(written.id).from_si(-1e5);
    return invalid_input(
        value_text(number, {written.id, PressureKind::gauge}) + " is below a perfect vacuum (about " +
            value_text(std::round(limit * 1e4) / 1e4, {written.id, PressureKind::gauge}) + ").",
        "Check the sign and the unit.");
}

Problem below_absolute_zero(double number, WrittenUnit written)
{
    const bool temperature = unit(written.id).dimension == Dimension::temperature;
    const std::string limit = value_text(temperature ? unit(written.id).from_si(0.0) : 0.0, written);
    return invalid_input(
        value_text(number, written) + " is below " +
            (temperature ? "absolute zero (" + limit + ")." : "a perfect vacuum (" + limit + ")."),
        temperature ? "Check the sign and the unit."
                    : "Check the sign, and whether the instrument shows gauge pressure.");
}

} // namespace

Result<double> to_si_checked(double number, WrittenUnit written)
{
    const Unit& in = unit(written.id);
    const double value_si =
        written.kind == PressureKind::difference ? in.difference_to_si(number) : in.to_si(number);
    if (in.dimension == Dimension::wind_force && !(number >= 0.0 && number <= highest_wind_force)) {
        return invalid_input("The wind force " + number_text(number) + " is not on the Beaufort scale.",
                             "Write a force from 0 to 12, or the wind in m/s or kn.");
    }
    if (!std::isfinite(value_si)) {
        return invalid_input("A value in " + std::string(in.symbol) + " is not a finite number.",
                             "Type the number as the instrument shows it.");
    }
    if (written.kind == PressureKind::gauge && value_si < -highest_barometer) {
        return below_vacuum(number, written);
    }
    const bool has_zero = in.dimension == Dimension::temperature || written.kind == PressureKind::absolute;
    if (has_zero && value_si < 0.0) {
        constexpr double rounding = 1e-9; // K or Pa: -459.67 °F is absolute zero whatever the last bit says
        if (value_si < -rounding) {
            return below_absolute_zero(number, written);
        }
        return 0.0;
    }
    return value_si;
}

Result<TypedValue> parse_typed_value(std::string_view text)
{
    const std::string_view typed = trimmed(text);
    const std::size_t length = number_length(typed);
    const std::string_view rest = trimmed(typed.substr(length));
    if (goes_on_as_number(rest)) {
        return invalid_input(quoted(typed) +
                                 " has a blank inside the number, so it could be one number or two.",
                             "Type the number without blanks, then its unit.");
    }
    if (length == 0 && !typed.empty()) {
        return invalid_input(quoted(typed) + " does not begin with a number.",
                             "Type a number and its unit, such as 12.5 bar.");
    }
    auto number = parse_number(typed.substr(0, length));
    if (!number) {
        return std::move(number).error();
    }
    if (rest.empty()) {
        return invalid_input(quoted(typed) + " has no unit.",
                             "Type the unit behind the number, such as 12.5 bar.");
    }
    auto written = find_unit(rest);
    if (!written) {
        return std::move(written).error();
    }
    auto value_si = to_si_checked(number.value(), written.value());
    if (!value_si) {
        return std::move(value_si).error();
    }
    return TypedValue{number.value(), written.value(), value_si.value()};
}

} // namespace evenstroke
