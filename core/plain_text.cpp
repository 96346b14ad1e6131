// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/plain_text.h"

#include <charconv>
#include <cmath>

namespace evenstroke {
namespace {

/// Bytes of the well-formed UTF-8 character at `position`; 0 where the bytes are none.
std::size_t character_length(std::string_view text, std::size_t position)
{
    const auto byte = [&](std::size_t index) { return static_cast<unsigned char>(text[index]); };
    const unsigned char lead = byte(position);
    const std::size_t length = lead < 0x80   ? 1
                               : lead < 0xC2 ? 0
                               : lead < 0xE0 ? 2
                               : lead < 0xF0 ? 3
                               : lead < 0xF5 ? 4
                                             : 0;
    if (length == 0 || position + length > text.size()) {
        return 0;
    }
    for (std::size_t index = position + 1; index < position + length; ++index) {
        if ((byte(index) & 0xC0) != 0x80) {
            return 0;
        }
    }
    if (length > 2) { // overlong forms, surrogates, beyond U+10FFFF
        const unsigned char second = byte(position + 1);
        if ((lead == 0xE0 && second < 0xA0) || (lead == 0xED && second > 0x9F) ||
            (lead == 0xF0 && second < 0x90) || (lead == 0xF4 && second > 0x8F)) {
            return 0;
        }
    }
    return length;
}

/// ASCII and Latin-1 control characters (below U+0020, U+007F to U+009F).
bool is_control(std::string_view character)
{
    const auto lead = static_cast<unsigned char>(character[0]);
    return lead < 0x20 || lead == 0x7F || (lead == 0xC2 && static_cast<unsigned char>(character[1]) < 0xA0);
}

bool is_ascii_blank(char character)
{
    return character == ' ' || (character >= '\t' && character <= '\r');
}

/// U+2000 to U+200B (widths of space) and U+202F (narrow, non-breaking) all begin with these two bytes.
bool is_general_blank(std::string_view three)
{
    const auto last = static_cast<unsigned char>(three[2]);
    return three[0] == '\xE2' && three[1] == '\x80' && ((last >= 0x80 && last <= 0x8B) || last == 0xAF);
}

} // namespace

std::size_t blank_length(std::string_view text, std::size_t position)
{
    const std::string_view rest = text.substr(position);
    if (!rest.empty() && is_ascii_blank(rest.front())) {
        return 1;
    }
    if (rest.substr(0, 2) == "\xC2\xA0") { // U+00A0, non-breaking
        return 2;
    }
    return rest.size() >= 3 && is_general_blank(rest) ? 3 : 0;
}

std::string_view trimmed(std::string_view text)
{
    while (!text.empty()) {
        const std::size_t length = blank_length(text, 0);
        if (length == 0) {
            break;
        }
        text.remove_prefix(length);
    }
    while (!text.empty()) {
        if (is_ascii_blank(text.back())) {
            text.remove_suffix(1);
        } else if (text.size() >= 2 && text.substr(text.size() - 2) == "\xC2\xA0") {
            text.remove_suffix(2);
        } else if (text.size() >= 3 && is_general_blank(text.substr(text.size() - 3))) {
            text.remove_suffix(3);
        } else {
            break;
        }
    }
    return text;
}

std::string quoted(std::string_view text)
{
    constexpr int most_characters = 40; // a line of a terminal holds the sentence around it as well
    std::string result = "\"";
    int characters = 0;
    for (std::size_t position = 0; position < text.size(); ++characters) {
        if (characters == most_characters) {
            return result + "…\"";
        }
        const std::size_t length = character_length(text, position);
        if (text[position] == '\t') {
            result += ' '; // between the columns of a file
        } else if (length == 0 || is_control(text.substr(position, length))) {
            result += '?';
        } else {
            result += text.substr(position, length);
        }
        position += length == 0 ? 1 : length;
    }
    return result + "\"";
}

std::string number_text(double number)
{
    char buffer[64];
    const double size = std::fabs(number);
    const bool plain = size == 0.0 || (size >= 1e-5 && size < 1e15);
    const auto written = std::to_chars(buffer, buffer + sizeof buffer, number,
                                       plain ? std::chars_format::fixed : std::chars_format::general);
    return std::string(buffer, written.ptr);
}

std::string short_number_text(double number)
{
    char buffer[64];
    const auto written = std::to_chars(buffer, buffer + sizeof buffer, number, std::chars_format::general, 6);
    return std::string(buffer, written.ptr);
}

} // namespace evenstroke
