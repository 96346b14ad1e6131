// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QIODevice>

#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace evenstroke::storage {

/// Reads comma-separated text as RFC 4180 has it, piece by piece: a file of any size needs little memory.
///
/// Also taken: semicolons instead of commas (decided by the first line), a byte order mark, line ends of
/// either kind, blank lines. A line that cannot be understood is told apart, and reading goes on with the
/// next line; a line longer than `longest_line` ends the reading.
class CsvReader
{
public:
    static constexpr qsizetype longest_line = 64 * 1024; ///< bytes; a line of ours has about a hundred

    enum class Got {
        row,
        end,
        too_long, ///< nothing more can be read
        nul_byte, ///< not a text file
        not_utf8,
        open_quote,  ///< no closing quotation mark follows
        stray_quote, ///< something follows a closing quotation mark
        cannot_read, ///< the disk refused
    };

    explicit CsvReader(QIODevice& device);

    Got next();
    /// Of the last row; they live until the next call.
    std::span<const std::string_view> fields() const { return fields_; }
    /// Of the last row or of what was refused; counts from 1.
    qint64 line() const { return line_; }
    /// The beginning of what was refused.
    std::string_view excerpt() const { return excerpt_; }
    char separator() const { return separator_; }
    qint64 bytes_read() const { return bytes_read_; }

private:
    bool fill();
    std::string_view rest() const { return {buffer_.data() + at_, end_ - at_}; }
    std::size_t find_line_end(std::size_t from);
    Got take_line(std::size_t length, std::size_t consumed);
    Got take_quoted();
    Got refuse(Got what, std::size_t length, std::size_t consumed);
    void choose_separator(std::string_view first_line);
    void split(std::string_view record);

    QIODevice& device_;
    std::vector<char> buffer_;
    std::size_t at_ = 0, end_ = 0; ///< what is read and not yet taken
    bool at_end_ = false, refused_by_disk_ = false;
    char separator_ = '\0';
    qint64 line_ = 0, next_line_ = 1, bytes_read_ = 0;
    std::vector<std::string_view> fields_;
    std::string unquoted_; ///< fields that had quotation marks, without them
    std::string_view excerpt_;
};

} // namespace evenstroke::storage
