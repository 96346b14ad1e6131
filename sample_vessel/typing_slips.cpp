// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/typing_slips.h"

#include <algorithm>
#include <string_view>

namespace evenstroke::sample {
namespace {

std::string digits_of(const std::string& typed)
{
    std::string digits = typed;
    std::erase(digits, '.');
    return digits;
}

bool in_file_as_measured(const Line& line)
{
    return line.phase.empty() && line.quantity != "cylinder_running_hours";
}

void exchange_cylinders(Sheet& sheet, int one, int other)
{
    for (Line& line : sheet.lines) {
        if (line.cylinder != std::to_string(one) || !in_file_as_measured(line))
            continue;
        if (Line* partner = sheet.find(line.quantity, other))
            std::swap(line.value, partner->value);
    }
}

/// The indicator was set to megapascal and nobody changed the unit on the form.
void write_row_in_megapascal(Sheet& sheet, const std::string& quantity)
{
    for (Line& line : sheet.lines)
        if (line.quantity == quantity && line.phase.empty())
            line.value = with_lost_place(line.value);
}

} // namespace

std::string with_lost_place(const std::string& typed)
{
    const std::size_t point = typed.find('.');
    if (point == std::string::npos)
        return typed.substr(0, typed.size() - 1);
    std::string moved = typed;
    std::swap(moved[point], moved[point - 1]);
    return point == 1 ? "0" + moved : moved;
}

std::string with_digits_exchanged(const std::string& typed)
{
    const std::string digits = digits_of(typed);
    std::size_t best = 0;
    long largest = -1;
    for (std::size_t i = 0; i + 1 < digits.size(); ++i) {
        long weight = 1;
        for (std::size_t k = i + 2; k < digits.size(); ++k)
            weight *= 10;
        const long change = std::abs(digits[i] - digits[i + 1]) * 9L * weight;
        if (change > largest && digits[i + 1] != '0') {
            largest = change;
            best = i;
        }
    }
    std::string exchanged = digits;
    std::swap(exchanged[best], exchanged[best + 1]);
    if (const std::size_t point = typed.find('.'); point != std::string::npos)
        exchanged.insert(point, 1, '.');
    return exchanged;
}

void make_slip(Sheet& sheet, const TypingError& error)
{
    if (error.slip == Slip::cylinders_swapped)
        return exchange_cylinders(sheet, error.cylinder, error.other_cylinder);
    if (error.slip == Slip::unit_slip)
        return write_row_in_megapascal(sheet, error.quantity);
    if (Line* line = sheet.find(error.quantity, error.cylinder))
        line->value = error.slip == Slip::decimal_slip ? with_lost_place(line->value)
                                                       : with_digits_exchanged(line->value);
}

} // namespace evenstroke::sample
