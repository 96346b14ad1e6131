// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <array>
#include <cstdint>
#include <string_view>

namespace evenstroke::storage {

namespace plain_number_detail {
inline constexpr int most_digits = 18; ///< fit into 64 bits
inline constexpr std::uint64_t exact_up_to = std::uint64_t{1}
                                             << 53; ///< whole numbers that a double holds exactly
/// A double holds these exactly, so that dividing an exact number by one of them rounds once, and rightly
/// (W. D. Clinger, How to read floating point numbers accurately, ACM PLDI 1990).
inline constexpr std::array<double, most_digits + 1> powers_of_ten = {
    1e0, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18};
inline bool take_digits(const char*& at, const char* end, std::uint64_t& whole)
{
    const char* const from = at;
    for (; at != end && static_cast<unsigned char>(*at - '0') < 10; ++at)
        whole = whole * 10 + static_cast<unsigned char>(*at - '0');
    return at != from;
}
} // namespace plain_number_detail

/// A number as recorders write it: an optional minus, digits, perhaps a decimal sign and more digits. The
/// nearest double, as std::from_chars gives it, in a fraction of the time.
/// @param at  moves behind the number  @param decimal_sign  '.' or ','
/// @return whether there was one; false too for numbers that need more care (many digits, an exponent
/// follows), then
///         `at` means nothing
inline bool read_plain_number(const char*& at, const char* end, char decimal_sign, double& number)
{
    using namespace plain_number_detail;
    const bool negative = at != end && *at == '-';
    if (negative)
        ++at;
    const char* const from = at;
    std::uint64_t whole = 0;
    bool any = take_digits(at, end, whole);
    auto digits = at - from;
    std::size_t decimals = 0;
    if (at != end && *at == decimal_sign) {
        const char* const fraction = ++at;
        any = take_digits(at, end, whole) || any;
        decimals = static_cast<std::size_t>(at - fraction);
        digits += at - fraction;
    }
    if (!any || digits > most_digits || whole > exact_up_to || (at != end && (*at == 'e' || *at == 'E')))
        return false;
    const double value = static_cast<double>(whole) / powers_of_ten[decimals];
    number = negative ? -value : value;
    return true;
}

} // namespace evenstroke::storage
