// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/catalogue_table.h"

#include <algorithm>
#include <charconv>
#include <stdexcept>

namespace evenstroke {
namespace {

/// Reads one record and moves `at` behind its line end.
std::vector<std::string> next_record(std::string_view text, std::size_t& at)
{
    std::vector<std::string> cells(1);
    bool quoted = false;
    for (; at < text.size(); ++at) {
        const char c = text[at];
        if (quoted) {
            if (c != '"')
                cells.back() += c;
            else if (at + 1 < text.size() && text[at + 1] == '"')
                cells.back() += text[++at];
            else
                quoted = false;
        } else if (c == '"') {
            quoted = true;
        } else if (c == ',') {
            cells.emplace_back();
        } else if (c == '\n') {
            ++at;
            break;
        } else if (c != '\r') {
            cells.back() += c;
        }
    }
    return cells;
}

} // namespace

CatalogueTable::CatalogueTable(std::string_view text)
{
    std::size_t at = 0;
    columns_ = next_record(text, at);
    while (at < text.size()) {
        auto cells = next_record(text, at);
        if (cells.size() == 1 && cells.front().empty())
            continue;
        if (cells.size() != columns_.size())
            throw std::logic_error("catalogue row '" + cells.front() + "' has " + std::to_string(cells.size())
                                   + " cells, its header " + std::to_string(columns_.size()));
        rows_.push_back(std::move(cells));
    }
}

bool CatalogueTable::has_column(std::string_view column) const
{
    return std::find(columns_.begin(), columns_.end(), column) != columns_.end();
}

const std::string& CatalogueTable::cell(std::size_t row, std::string_view column) const
{
    const auto found = std::find(columns_.begin(), columns_.end(), column);
    if (found == columns_.end())
        throw std::logic_error("catalogue has no column '" + std::string(column) + "'");
    return rows_.at(row)[static_cast<std::size_t>(found - columns_.begin())];
}

std::optional<double> CatalogueTable::number(std::size_t row, std::string_view column) const
{
    const std::string& text = cell(row, column);
    if (text.empty())
        return std::nullopt;
    double value = 0.0;
    const auto [end, problem] = std::from_chars(text.data(), text.data() + text.size(), value);
    if (problem != std::errc() || end != text.data() + text.size())
        throw std::logic_error("not a number in a catalogue: " + text);
    return value;
}

std::vector<std::string> split_list(std::string_view cell, char separator)
{
    std::vector<std::string> parts;
    while (!cell.empty()) {
        const std::size_t end = std::min(cell.find(separator), cell.size());
        std::string_view part = cell.substr(0, end);
        const std::size_t first = part.find_first_not_of(' ');
        if (first != std::string_view::npos)
            parts.emplace_back(part.substr(first, part.find_last_not_of(' ') - first + 1));
        cell.remove_prefix(std::min(end + 1, cell.size()));
    }
    return parts;
}

} // namespace evenstroke
