// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/units/unit_catalogue.h"

#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// For the reading of pasted tables only: cells, and what a heading means.
namespace evenstroke::table_text {

using Grid = std::vector<std::vector<std::string>>;

/// Cells parted by tabs, else semicolons, else commas; quotes and blanks around a cell are taken off, empty
/// lines left out, short rows filled up.
Grid read_grid(std::string_view text);
/// Rows become columns.
Grid transposed(const Grid& grid);

/// "Exhaust temp. (°C)": words and unit. The unit is empty where there is none that is known.
struct Heading
{
    std::string words;                ///< lower case, abbreviations written out, one blank between words: "exhaust temperature"
    std::optional<WrittenUnit> unit;
    std::optional<int> cylinder;      ///< "cyl. 4", "no 4"
};
Heading read_heading(const std::string& cell);
/// Name of the quantity that a heading means; empty where none is known.
std::string quantity_of(const Heading& heading);
/// Whether the cell heads a row or column of units.
bool names_units(const std::string& cell);
/// A cell that says nothing: empty, a dash, "n/a".
bool is_blank(const std::string& cell);

} // namespace evenstroke::table_text
