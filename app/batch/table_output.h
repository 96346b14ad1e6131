// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/batch/command.h"

#include <optional>
#include <string>
#include <variant>
#include <vector>

namespace evenstroke::batch {

/// Writes rows as RFC 4180 text or as a JSON array of objects, one row at a time. Nothing is written before the
/// first row or the end, so that what is refused leaves nothing behind.
class TableOutput
{
public:
    using Cell = std::variant<std::monostate, std::string, double>;
    enum class Format { csv, json };

    /// Reads `--format`; nothing, and a sentence on err, where it is neither csv nor json.
    static std::optional<Format> read_format(const QCommandLineParser& parser, Streams& streams);

    TableOutput(Streams& streams, Format format, std::vector<std::string> header);
    void row(const std::vector<Cell>& cells);
    void finish();

    static Cell number(std::optional<double> value) { return value ? Cell(*value) : Cell(); }

private:
    void begin();
    void csv_row(const std::vector<Cell>& cells);
    void json_row(const std::vector<Cell>& cells);

    Streams& streams_;
    Format format_;
    std::vector<std::string> header_;
    bool begun_ = false, first_ = true;
};

/// Every digit that the number has, and no more: read back it is the same number.
std::string exact_number(double value);

} // namespace evenstroke::batch
