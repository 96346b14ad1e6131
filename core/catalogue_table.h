// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace evenstroke {

/// A catalogue file of resources/catalogue, cut into cells: RFC 4180 quoting, the first line names the columns.
///
/// Only for text compiled into the program, which the tests read whole: a column that is not there or a row
/// of another length is our own mistake and throws std::logic_error. Files of users are read in storage.
class CatalogueTable
{
public:
    explicit CatalogueTable(std::string_view text);

    std::size_t rows() const { return rows_.size(); }
    bool has_column(std::string_view column) const;
    const std::string& cell(std::size_t row, std::string_view column) const;
    /// The number in a cell; nothing where it is empty. @throws std::logic_error where it is no number
    std::optional<double> number(std::size_t row, std::string_view column) const;

private:
    std::vector<std::string> columns_;
    std::vector<std::vector<std::string>> rows_;
};

/// The parts of a cell that lists several, "a; b; c", without the blanks around them.
std::vector<std::string> split_list(std::string_view cell, char separator = ';');

} // namespace evenstroke
