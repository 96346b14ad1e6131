// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/plain_text.h"
#include "core/units/unit_catalogue.h"

#include <charconv>

namespace evenstroke {
namespace {

constexpr std::size_t longest_number = 64; // a double needs 24; more is something else in the wrong field

bool is_digit(char character)
{
    return character >= '0' && character <= '9';
}

/// Bytes of a minus or plus sign at the start; the typographic minus and the en dash are minus signs.
std::size_t sign_length(std::string_view text, bool& negative)
{
    negative = false;
    if (text.starts_with('+')) {
        return 1;
    }
    negative = text.starts_with('-') || text.starts_with("\u2212") || text.starts_with("\u2013");
    return !negative ? 0 : text.front() == '-' ? 1 : 3;
}

/// The number in the form std::from_chars reads, in a place of fixed size.
struct PlainNumber
{
    char letters[longest_number + 1];
    std::size_t size = 0;

    void append(char letter) { letters[size++] = letter; }
    /// Copies digits and says how many there were.
    std::size_t append_digits(std::string_view& rest)
    {
        std::size_t count = 0;
        while (count < rest.size() && is_digit(rest[count])) {
            append(rest[count++]);
        }
        rest.remove_prefix(count);
        return count;
    }
};

/// Whether the text is wholly a number; its plain form if so.
bool write_plain(std::string_view rest, PlainNumber& plain)
{
    bool negative = false;
    rest.remove_prefix(sign_length(rest, negative));
    if (negative) {
        plain.append('-');
    }
    std::size_t digits = plain.append_digits(rest);
    if (rest.starts_with('.') || rest.starts_with(',')) {
        rest.remove_prefix(1);
        plain.append('.');
        const std::size_t decimals = plain.append_digits(rest);
        if (decimals == 0) {
            return false;
        }
        digits += decimals;
    }
    if (digits == 0) {
        return false;
    }
    if (rest.starts_with('e') || rest.starts_with('E')) {
        rest.remove_prefix(1);
        plain.append('e');
        rest.remove_prefix(sign_length(rest, negative));
        if (negative) {
            plain.append('-');
        }
        if (plain.append_digits(rest) == 0) {
            return false;
        }
    }
    return rest.empty();
}

Problem not_a_number(std::string_view typed)
{
    const std::string_view text = trimmed(typed);
    if (text.empty()) {
        return invalid_input("There is no number.", "Type a number such as 12.5.");
    }
    const std::string it = quoted(text);
    if (text.size() > longest_number) {
        return invalid_input(it + " is longer than the " + std::to_string(longest_number) +
                                 " characters a number may have.",
                             "Type the number alone, such as 12.5.");
    }
    std::size_t separators = 0, blanks = 0, digits = 0, others = 0;
    for (std::size_t position = 0; position < text.size(); ++position) {
        const char character = text[position];
        separators += character == '.' || character == ',' ? 1 : 0;
        digits += is_digit(character) ? 1 : 0;
        if (const std::size_t blank = blank_length(text, position)) {
            ++blanks;
            position += blank - 1;
        } else if (!is_digit(character) && character != '.' && character != ',') {
            ++others;
        }
    }
    if (digits > 0 && separators > 1) {
        return invalid_input(it + " has more than one point or comma, so it could mean different numbers.",
                             "Type it without thousands signs, with one point or comma before the decimals.");
    }
    if (digits > 0 && blanks > 0 && others == 0) {
        return invalid_input(it + " has a blank inside, so it could be one number or two.",
                             "Type the number without blanks.");
    }
    if (digits > 0 && others == 0 && (text.back() == '.' || text.back() == ',')) {
        return invalid_input(it + " ends in a decimal sign, so a digit may be missing.",
                             "Type the decimals too, or leave the decimal sign out.");
    }
    return invalid_input(it + " is not a number.",
                         "Type digits with one point or comma before the decimals, such as 12.5.");
}

Problem beyond_reach(std::string_view typed)
{
    return invalid_input(quoted(trimmed(typed)) + " is too large or too small to be a reading.",
                         "Check the exponent, and type the number as the instrument shows it.");
}

} // namespace

Result<double> parse_number(std::string_view text)
{
    const std::string_view number = trimmed(text);
    PlainNumber plain;
    if (number.size() > longest_number || !write_plain(number, plain)) {
        return not_a_number(text);
    }
    double value = 0.0;
    const auto read = std::from_chars(plain.letters, plain.letters + plain.size, value);
    if (read.ec == std::errc::result_out_of_range) {
        return beyond_reach(text);
    }
    if (read.ec != std::errc() || read.ptr != plain.letters + plain.size) {
        return not_a_number(text);
    }
    return value;
}

} // namespace evenstroke
