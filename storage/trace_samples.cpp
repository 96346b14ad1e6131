// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/trace_samples.h"

#include "core/plain_text.h"
#include "storage/card_file.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::storage {
namespace {

/// Where the pressure rises through half of its height.
std::vector<std::size_t> rises_through_half(const std::vector<double>& pressure)
{
    const auto [least, most] = std::minmax_element(pressure.begin(), pressure.end());
    const double half = *least + 0.5 * (*most - *least), quarter = *least + 0.25 * (*most - *least);
    std::vector<std::size_t> found;
    bool low = false; // only a fall to a quarter ends a cycle: combustion may have two humps
    for (std::size_t i = 0; i < pressure.size(); ++i) {
        low = low || pressure[i] < quarter;
        if (!low || pressure[i] < half)
            continue;
        found.push_back(i);
        low = false;
    }
    return found;
}

} // namespace

bool steps_by_one(const std::vector<double>& numbers)
{
    const auto one = [](double before, double after) { return after != before + 1.0; };
    return numbers.size() > 3 && numbers.front() == std::floor(numbers.front()) &&
           std::adjacent_find(numbers.begin(), numbers.end(), one) == numbers.end();
}

std::vector<double> column_of_text(std::string_view text, const TraceLayout& layout, std::size_t column)
{
    std::vector<double> numbers;
    for (int line = 0; !text.empty(); ++line) {
        const std::string_view row = take_text_line(text);
        if (line < layout.header_lines)
            continue;
        const auto fields = split_line(row, layout.separator);
        if (column >= fields.size())
            continue;
        if (const auto number = parse_number(fields[column]))
            numbers.push_back(number.value());
    }
    return numbers;
}

double samples_a_cycle(const std::vector<double>& pressure)
{
    if (pressure.size() < 2)
        return 0.0;
    const auto rises = rises_through_half(pressure);
    const std::size_t rows = pressure.size();
    if (rises.size() < 2)
        return static_cast<double>(rows - rows % 2);
    const double apart =
        static_cast<double>(rises.back() - rises.front()) / static_cast<double>(rises.size() - 1);
    const auto cycles = static_cast<std::size_t>(std::round(static_cast<double>(rows) / apart));
    constexpr double near = 0.01; // the speed swings by less
    for (const std::size_t whole : {rows, rows - 1})
        if (cycles > 0 && whole % cycles == 0 &&
            std::abs(static_cast<double>(whole / cycles) - apart) < near * apart)
            return static_cast<double>(whole / cycles);
    return std::round(apart);
}

} // namespace evenstroke::storage
