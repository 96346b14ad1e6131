// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/csv_reader.h"

#include <algorithm>
#include <cstdint>
#include <cstring>

namespace evenstroke::storage {
namespace {

constexpr std::size_t chunk = 256 * 1024;
constexpr std::size_t not_found = std::string_view::npos;

/// Whether a byte needs a closer look: zero, or not ASCII. Eight bytes at a time.
bool is_plain(std::string_view text)
{
    const char* at = text.data();
    std::size_t left = text.size();
    for (; left >= 8; at += 8, left -= 8) {
        std::uint64_t eight = 0;
        std::memcpy(&eight, at, 8);
        const std::uint64_t has_zero = (eight - 0x0101010101010101U) & ~eight;
        if (((eight | has_zero) & 0x8080808080808080U) != 0)
            return false;
    }
    for (; left > 0; ++at, --left)
        if (*at == '\0' || (static_cast<unsigned char>(*at) & 0x80) != 0)
            return false;
    return true;
}

/// Length of the UTF-8 sequence at the beginning of the text (RFC 3629); 0 where there is none.
std::size_t sequence_length(std::string_view text)
{
    const auto byte = [&](std::size_t index) {
        return index < text.size() ? static_cast<unsigned char>(text[index]) : 0U;
    };
    const auto follows = [&](std::size_t index, unsigned low, unsigned high) {
        return byte(index) >= low && byte(index) <= high;
    };
    const unsigned first = byte(0);
    if (first < 0x80)
        return 1;
    if (first >= 0xC2 && first <= 0xDF)
        return follows(1, 0x80, 0xBF) ? 2 : 0;
    if (first >= 0xE0 && first <= 0xEF) {
        const unsigned low = first == 0xE0 ? 0xA0 : 0x80, high = first == 0xED ? 0x9F : 0xBF; // no surrogates
        return follows(1, low, high) && follows(2, 0x80, 0xBF) ? 3 : 0;
    }
    if (first >= 0xF0 && first <= 0xF4) {
        const unsigned low = first == 0xF0 ? 0x90 : 0x80, high = first == 0xF4 ? 0x8F : 0xBF;
        return follows(1, low, high) && follows(2, 0x80, 0xBF) && follows(3, 0x80, 0xBF) ? 4 : 0;
    }
    return 0;
}

bool is_utf8(std::string_view text)
{
    while (!text.empty()) {
        const std::size_t length = sequence_length(text);
        if (length == 0)
            return false;
        text.remove_prefix(length);
    }
    return true;
}

} // namespace

CsvReader::CsvReader(QIODevice& device) : device_(device)
{
    buffer_.resize(2 * chunk);
    fill();
    if (rest().starts_with("\xEF\xBB\xBF"))
        at_ += 3;
}

/// Reads on; what is not yet taken moves to the front.
bool CsvReader::fill()
{
    if (at_end_)
        return false;
    std::memmove(buffer_.data(), buffer_.data() + at_, end_ - at_);
    end_ -= at_;
    at_ = 0;
    const qint64 wanted = static_cast<qint64>(std::min(chunk, buffer_.size() - end_));
    const qint64 got = device_.read(buffer_.data() + end_, wanted);
    refused_by_disk_ = got < 0;
    at_end_ = got <= 0;
    if (got > 0) {
        end_ += static_cast<std::size_t>(got);
        bytes_read_ += got;
    }
    return got > 0;
}

/// Length of the text up to the next line end, counted from `at_`; reads on where needed.
std::size_t CsvReader::find_line_end(std::size_t from)
{
    for (;;) {
        const std::size_t found = rest().find('\n', from);
        if (found != not_found || static_cast<qsizetype>(rest().size()) > longest_line)
            return found;
        from = rest().size();
        if (!fill())
            return not_found;
    }
}

CsvReader::Got CsvReader::next()
{
    for (;;) {
        const std::size_t found = find_line_end(0);
        line_ = next_line_;
        if (refused_by_disk_)
            return Got::cannot_read;
        if (found == not_found && rest().empty())
            return Got::end;
        const std::size_t length = found == not_found ? rest().size() : found;
        if (static_cast<qsizetype>(length) > longest_line)
            return refuse(Got::too_long, length, 0);
        const std::size_t consumed = found == not_found ? length : length + 1;
        std::string_view text = rest().substr(0, length);
        if (text.ends_with('\r'))
            text.remove_suffix(1);
        if (separator_ == '\0')
            choose_separator(text);
        if (text.find_first_not_of(" \t") == not_found) {
            at_ += consumed;
            ++next_line_;
            continue;
        }
        return text.find('"') == not_found ? take_line(text.size(), consumed) : take_quoted();
    }
}

CsvReader::Got CsvReader::refuse(Got what, std::size_t length, std::size_t consumed)
{
    excerpt_ = rest().substr(0, std::min<std::size_t>(length, 60));
    at_ += consumed;
    next_line_ += consumed > 0 ? 1 : 0;
    return what;
}

void CsvReader::choose_separator(std::string_view first_line)
{
    const auto count = [&](char letter) { return std::count(first_line.begin(), first_line.end(), letter); };
    separator_ = count(';') > count(',') ? ';' : ',';
}

CsvReader::Got CsvReader::take_line(std::size_t length, std::size_t consumed)
{
    const std::string_view record = rest().substr(0, length);
    if (!is_plain(record)) {
        if (record.find('\0') != not_found)
            return refuse(Got::nul_byte, length, consumed);
        if (!is_utf8(record))
            return refuse(Got::not_utf8, length, consumed);
    }
    split(record);
    at_ += consumed;
    ++next_line_;
    return Got::row;
}

void CsvReader::split(std::string_view record)
{
    fields_.clear();
    for (;;) {
        const std::size_t end = record.find(separator_);
        fields_.push_back(record.substr(0, end));
        if (end == not_found)
            return;
        record.remove_prefix(end + 1);
    }
}

/// A row with quotation marks; it may go over several lines. Where it cannot be understood, its first line is
/// refused and reading goes on with the second.
CsvReader::Got CsvReader::take_quoted()
{
    const std::size_t first_line = find_line_end(0);
    const std::size_t first_length = first_line == not_found ? rest().size() : first_line;
    const std::size_t first_consumed = first_line == not_found ? first_length : first_length + 1;
    unquoted_.clear();
    std::vector<std::pair<std::size_t, std::size_t>> parts; // begin and size within `unquoted_`
    std::size_t position = 0, begin = 0;
    qint64 lines = 0;
    bool quoted = false, was_quoted = false;
    for (;; ++position) {
        if (position >= rest().size() && static_cast<qsizetype>(position) <= longest_line)
            fill();
        const bool over = position >= rest().size();
        if (quoted && (over || static_cast<qsizetype>(position) > longest_line))
            return refuse(Got::open_quote, first_length, first_consumed);
        const char letter = over ? '\n' : rest()[position];
        if (quoted) {
            lines += letter == '\n' ? 1 : 0;
            if (letter != '"')
                unquoted_ += letter;
            else if (position + 1 < rest().size() ? rest()[position + 1] == '"'
                                                  : (fill() && rest()[position + 1] == '"'))
                unquoted_ += rest()[++position];
            else
                quoted = false;
        } else if (letter == '"' && unquoted_.size() == begin && !was_quoted) {
            quoted = was_quoted = true;
        } else if (letter == separator_ || letter == '\n') {
            if (letter == '\n' && !was_quoted && unquoted_.size() > begin && unquoted_.back() == '\r')
                unquoted_.pop_back();
            parts.emplace_back(begin, unquoted_.size() - begin);
            begin = unquoted_.size();
            was_quoted = false;
            if (letter == '\n')
                break;
        } else if (!was_quoted) {
            unquoted_ += letter;
        } else if (letter != ' ' && letter != '\t' && letter != '\r') {
            return refuse(Got::stray_quote, first_length, first_consumed);
        }
    }
    const std::string_view whole = rest().substr(0, position);
    if (whole.find('\0') != not_found || !is_utf8(whole))
        return refuse(whole.find('\0') != not_found ? Got::nul_byte : Got::not_utf8, first_length,
                      first_consumed);
    fields_.clear();
    for (const auto& [from, size] : parts)
        fields_.push_back(std::string_view(unquoted_).substr(from, size));
    at_ = std::min(end_, at_ + position + 1);
    next_line_ += lines + 1;
    return Got::row;
}

} // namespace evenstroke::storage
