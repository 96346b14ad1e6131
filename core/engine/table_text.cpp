// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/table_text.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"
#include "core/plain_text.h"
#include "core/reading/quantity_catalogue.h"

#include <algorithm>
#include <cctype>
#include <map>

namespace evenstroke::table_text {
namespace {

std::string bare_cell(std::string_view cell)
{
    cell = trimmed(cell);
    if (cell.size() >= 2 && cell.front() == '"' && cell.back() == '"')
        cell = trimmed(cell.substr(1, cell.size() - 2));
    return std::string(cell);
}

char separator_of(std::string_view text)
{
    for (const char candidate : {'\t', ';'})
        if (text.find(candidate) != std::string_view::npos)
            return candidate;
    return ',';
}

std::vector<std::string> cells_of(std::string_view line, char separator)
{
    std::vector<std::string> cells;
    bool quoted = false;
    std::size_t begin = 0;
    for (std::size_t at = 0; at <= line.size(); ++at) {
        if (at < line.size() && line[at] == '"')
            quoted = !quoted;
        if (at == line.size() || (line[at] == separator && !quoted)) {
            cells.push_back(bare_cell(line.substr(begin, at - begin)));
            begin = at + 1;
        }
    }
    return cells;
}

/// Lower-case letters and digits; everything else parts words. Letters beyond ASCII stay as they are.
std::vector<std::string> words_of(std::string_view text)
{
    std::vector<std::string> words(1);
    for (const char c : text) {
        const auto byte = static_cast<unsigned char>(c);
        if (std::isalnum(byte) || byte >= 0x80)
            words.back() += static_cast<char>(byte < 0x80 ? std::tolower(byte) : byte);
        else if (!words.back().empty())
            words.emplace_back();
    }
    if (words.back().empty())
        words.pop_back();
    return words;
}

std::string joined(const std::vector<std::string>& words)
{
    std::string text;
    for (const std::string& word : words)
        text += (text.empty() ? "" : " ") + word;
    return text;
}

const std::map<std::string, std::string>& abbreviations()
{
    static const std::map<std::string, std::string> known = [] {
        std::map<std::string, std::string> map;
        const CatalogueTable table(catalogue_text::heading_abbreviations);
        for (std::size_t row = 0; row < table.rows(); ++row)
            map.emplace(table.cell(row, "short"), table.cell(row, "full"));
        return map;
    }();
    return known;
}

/// "scav air press" as "scavenge air pressure": names and headings are compared written out.
std::string written_out(const std::vector<std::string>& words)
{
    std::vector<std::string> full;
    for (std::size_t i = 0; i < words.size(); ++i) {
        const auto pair = i + 1 < words.size() ? abbreviations().find(words[i] + " " + words[i + 1]) : abbreviations().end();
        const auto one = abbreviations().find(words[i]);
        full.push_back(pair != abbreviations().end() ? pair->second : one != abbreviations().end() ? one->second : words[i]);
        i += pair != abbreviations().end() ? 1 : 0;
    }
    return joined(full);
}

bool all_digits(const std::string& word)
{
    return !word.empty() && std::all_of(word.begin(), word.end(), [](unsigned char c) { return std::isdigit(c); });
}

/// Takes "cyl 4", "cylinder 4", "no 4" and words for a mean off the end.
std::optional<int> take_cylinder(std::vector<std::string>& words)
{
    static const std::vector<std::string> means{"mean", "average", "avg", "ave", "cyl", "cylinder", "cylinders", "no", "nr", "total", "of"};
    std::optional<int> number;
    if (words.size() > 1 && all_digits(words.back()) && words.back().size() <= 2) {
        number = std::stoi(words.back());
        words.pop_back();
    }
    while (words.size() > 1 && std::find(means.begin(), means.end(), words.back()) != means.end()) {
        const bool after = words.size() > 2 && words[words.size() - 2] == "after";
        if (after)
            break; // "exhaust after cylinder" is a name
        words.pop_back();
    }
    return number;
}

const std::map<std::string, std::string>& known_words()
{
    static const std::map<std::string, std::string> known = [] {
        std::map<std::string, std::string> map;
        const CatalogueTable table(catalogue_text::quantity_words);
        for (std::size_t row = 0; row < table.rows(); ++row)
            map.emplace(written_out(words_of(table.cell(row, "words"))), table.cell(row, "quantity"));
        for (const Quantity& of : all_quantities())
            for (const std::string& name : {of.name, of.title, of.short_title})
                map.emplace(written_out(words_of(name)), of.name);
        return map;
    }();
    return known;
}

/// A bare "1" behind a heading is a cylinder's number, not the unit of bare numbers.
std::optional<WrittenUnit> unit_in(std::string_view text)
{
    const auto found = find_unit(trimmed(text));
    return found.has_value() && unit(found.value().id).dimension != Dimension::number ? std::optional<WrittenUnit>(found.value()) : std::nullopt;
}

/// Takes the unit off a heading: in brackets, behind a comma, or as the last word.
std::optional<WrittenUnit> take_unit(std::string& cell)
{
    for (const auto& [open, close] : {std::pair{'[', ']'}, std::pair{'(', ')'}}) {
        const std::size_t begin = cell.rfind(open), end = cell.rfind(close);
        if (begin == std::string::npos || end == std::string::npos || end < begin)
            continue;
        if (const auto unit = unit_in(cell.substr(begin + 1, end - begin - 1))) {
            cell.erase(begin, end - begin + 1);
            return unit;
        }
    }
    for (const char mark : {',', ' '}) {
        if (known_words().count(written_out(words_of(cell))) && mark == ' ')
            continue; // "fuel index" must not lose a word that could be a unit
        for (std::size_t at = cell.find(mark); at != std::string::npos; at = cell.find(mark, at + 1)) { // "kg/cm2 abs" before "abs"
            const auto unit = at > 0 ? unit_in(cell.substr(at + 1)) : std::nullopt;
            if (!unit)
                continue;
            cell.erase(at);
            return unit;
        }
    }
    return std::nullopt;
}

} // namespace

Grid read_grid(std::string_view text)
{
    Grid grid;
    const char separator = separator_of(text);
    std::size_t widest = 0;
    for (std::size_t begin = 0; begin <= text.size();) {
        const std::size_t end = std::min(text.find('\n', begin), text.size());
        auto cells = cells_of(text.substr(begin, end - begin), separator);
        if (std::any_of(cells.begin(), cells.end(), [](const std::string& cell) { return !cell.empty(); })) {
            widest = std::max(widest, cells.size());
            grid.push_back(std::move(cells));
        }
        begin = end + 1;
    }
    for (auto& row : grid)
        row.resize(widest);
    return grid;
}

Grid transposed(const Grid& grid)
{
    Grid turned(grid.empty() ? 0 : grid.front().size(), std::vector<std::string>(grid.size()));
    for (std::size_t row = 0; row < grid.size(); ++row)
        for (std::size_t column = 0; column < grid[row].size(); ++column)
            turned[column][row] = grid[row][column];
    return turned;
}

Heading read_heading(const std::string& cell)
{
    Heading heading;
    std::string text = cell;
    heading.unit = take_unit(text);
    std::vector<std::string> words = words_of(text);
    if (!known_words().count(written_out(words)))
        heading.cylinder = take_cylinder(words);
    heading.words = written_out(words);
    return heading;
}

std::string quantity_of(const Heading& heading)
{
    const auto found = known_words().find(heading.words);
    return found == known_words().end() ? std::string() : found->second;
}

bool names_units(const std::string& cell)
{
    const std::string words = joined(words_of(cell));
    return words == "unit" || words == "units";
}

bool is_blank(const std::string& cell)
{
    const std::string words = joined(words_of(cell));
    return words.empty() || words == "n a" || words == "na" || cell == "\u2013" || cell == "\u2014";
}

} // namespace evenstroke::table_text
