// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/csv_table.h"

#include "core/plain_text.h"

#include <algorithm>
#include <cctype>

namespace evenstroke::storage {
namespace {

/// Blanks and tabs; other blanks are taken off where numbers and units are read.
std::string_view without_blanks(std::string_view text)
{
    const std::size_t first = text.find_first_not_of(" \t");
    if (first == std::string_view::npos)
        return {};
    return text.substr(first, text.find_last_not_of(" \t") - first + 1);
}

std::string lower(std::string_view text)
{
    std::string result(text);
    std::transform(result.begin(), result.end(), result.begin(),
                   [](unsigned char letter) { return static_cast<char>(std::tolower(letter)); });
    return result;
}

} // namespace

std::string CsvTable::header_text() const
{
    std::string text;
    for (const CsvColumn& column : columns_)
        if (column.required)
            text += (text.empty() ? "" : ",") + std::string(column.name);
    return text;
}

bool CsvTable::read_header()
{
    const CsvReader::Got got = reader_.next();
    if (got == CsvReader::Got::end) {
        refusals_.add(0, "", "The file is empty.", "The first line is expected to be " + header_text() + ".");
        return false;
    }
    if (got != CsvReader::Got::row) {
        refuse(got);
        return false;
    }
    return place_columns();
}

bool CsvTable::place_columns()
{
    width_ = reader_.fields().size();
    place_.assign(columns_.size(), -1);
    std::string first_line;
    for (std::size_t i = 0; i < width_; ++i) {
        const std::string name = lower(without_blanks(reader_.fields()[i]));
        first_line += (i == 0 ? "" : ",") + name;
        const auto known = std::find_if(columns_.begin(), columns_.end(),
                                        [&](const CsvColumn& column) { return name == column.name; });
        if (known == columns_.end()) {
            unread_.push_back(name);
            continue;
        }
        int& place = place_[static_cast<std::size_t>(known - columns_.begin())];
        if (place >= 0) {
            refusals_.add(line(), name,
                          "The column " + evenstroke::quoted(name) + " stands twice in the first line.",
                          "Name each column once.");
            return false;
        }
        place = static_cast<int>(i);
    }
    const bool no_header = std::all_of(place_.begin(), place_.end(), [](int place) { return place < 0; });
    for (std::size_t i = 0; i < columns_.size(); ++i) {
        if (!columns_[i].required || place_[i] >= 0)
            continue;
        refusals_.add(line(), first_line,
                      no_header ? "The file has no header line."
                                : "The column " + evenstroke::quoted(columns_[i].name) +
                                      " is missing in the first line.",
                      "The first line is expected to be " + header_text() + ".");
        return false;
    }
    return true;
}

bool CsvTable::next_row()
{
    for (;;) {
        const CsvReader::Got got = reader_.next();
        if (got == CsvReader::Got::end)
            return false;
        if (got != CsvReader::Got::row) {
            refuse(got);
            if (got == CsvReader::Got::too_long || got == CsvReader::Got::cannot_read)
                return false;
            continue;
        }
        const auto fields = reader_.fields();
        if (fields.size() == width_)
            return true;
        if (std::all_of(fields.begin(), fields.end(),
                        [](std::string_view field) { return without_blanks(field).empty(); }))
            continue;
        refusals_.add(line(), fields.front(),
                      "The row has " + std::to_string(fields.size()) +
                          (fields.size() == 1 ? " field" : " fields") + ", the first line has " +
                          std::to_string(width_) + ".",
                      "Write as many fields as the first line names; put text that holds a separator in "
                      "quotation marks.");
    }
}

std::string_view CsvTable::cell(std::size_t column) const
{
    const int place = place_[column];
    return place < 0 ? std::string_view() : without_blanks(reader_.fields()[static_cast<std::size_t>(place)]);
}

void CsvTable::refuse(CsvReader::Got what)
{
    const auto add = [&](const char* reason, const char* expected) {
        refusals_.add(line(), reader_.excerpt(), reason, expected);
    };
    switch (what) {
    case CsvReader::Got::too_long:
        return add("The line is longer than 64 kB; the rest of the file was not read.",
                   "Write one row a line, about a hundred characters each.");
    case CsvReader::Got::nul_byte:
        return add("The line holds zero bytes, as a file has that is not plain text or is UTF-16.",
                   "Save the file as plain text in UTF-8.");
    case CsvReader::Got::not_utf8:
        return add("The line holds bytes that are not UTF-8.", "Save the file as plain text in UTF-8.");
    case CsvReader::Got::open_quote:
        return add("A quotation mark is opened and not closed.",
                   "Close it, and write a quotation mark within a text twice.");
    case CsvReader::Got::stray_quote:
        return add("Something follows a closing quotation mark.",
                   "Put the whole field in quotation marks, and write one within it twice.");
    default:
        return add("The file cannot be read any further.",
                   "Check that the disk or stick is in place and sound.");
    }
}

} // namespace evenstroke::storage
