// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/csv_reader.h"
#include "storage/refusals.h"

#include <string>
#include <string_view>
#include <vector>

namespace evenstroke::storage {

struct CsvColumn
{
    const char* name;
    bool required = true;
};

/// A CSV file with a header line, read row by row. Lines that are no rows of the table are refused here;
/// columns may stand in any order, and further ones are named and left unread.
class CsvTable
{
public:
    CsvTable(QIODevice& device, std::vector<CsvColumn> columns, Refusals& refusals)
        : reader_(device), columns_(std::move(columns)), refusals_(refusals)
    {
    }

    /// False: the file as a whole cannot be taken, and the reason is among the refusals.
    bool read_header();
    bool next_row();
    /// Without blanks around it; empty where the file lacks the column.
    std::string_view cell(std::size_t column) const;
    qint64 line() const { return reader_.line(); }
    qint64 bytes_read() const { return reader_.bytes_read(); }
    const std::vector<std::string>& unread_columns() const { return unread_; }

private:
    std::string header_text() const;
    bool place_columns();
    void refuse(CsvReader::Got what);

    CsvReader reader_;
    std::vector<CsvColumn> columns_;
    Refusals& refusals_;
    std::vector<int> place_; ///< of each wanted column in a row; -1: the file lacks it
    std::size_t width_ = 0;
    std::vector<std::string> unread_;
};

} // namespace evenstroke::storage
