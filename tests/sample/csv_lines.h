// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <chrono>
#include <string>
#include <vector>

/// Readers for the tests alone, written apart from the makers they check.
using CsvLine = std::vector<std::string>;

/// Lines of an RFC 4180 text without line breaks inside fields.
inline std::vector<CsvLine> csv_lines(const std::string& text)
{
    std::vector<CsvLine> lines(1, CsvLine(1));
    bool quoted = false;
    for (std::size_t i = 0; i < text.size(); ++i) {
        const char letter = text[i];
        if (letter == '"') {
            if (quoted && i + 1 < text.size() && text[i + 1] == '"')
                lines.back().back() += text[++i];
            else
                quoted = !quoted;
        } else if (letter == ',' && !quoted) {
            lines.back().emplace_back();
        } else if (letter == '\n' && !quoted) {
            lines.emplace_back(1);
        } else {
            lines.back().back() += letter;
        }
    }
    lines.pop_back(); // behind the last line's end
    return lines;
}

/// "2023-03-14T09:40+09:00" as minutes since 1970 in UTC.
inline long long minutes_utc(const std::string& text)
{
    const auto number = [&](std::size_t from, std::size_t count) {
        return std::stoi(text.substr(from, count));
    };
    const std::chrono::sys_days date(std::chrono::year(number(0, 4)) /
                                     std::chrono::month(static_cast<unsigned>(number(5, 2))) /
                                     std::chrono::day(static_cast<unsigned>(number(8, 2))));
    const int offset = (text[16] == '-' ? -1 : 1) * (number(17, 2) * 60 + number(20, 2));
    return date.time_since_epoch().count() * 1440LL + number(11, 2) * 60 + number(14, 2) - offset;
}
