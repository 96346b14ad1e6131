// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <string_view>

/// Small helpers for text that people typed, and for the sentences that answer it. UTF-8 throughout.
namespace evenstroke {

/// Without the blanks around it; non-breaking, thin and other typographic blanks are blanks too.
std::string_view trimmed(std::string_view text);

/// Bytes of the blank that begins at `position`; 0 where there is none.
std::size_t blank_length(std::string_view text, std::size_t position);

/// The text in quotation marks as a sentence can hold it: at most 40 characters, no control characters,
/// always valid UTF-8, whatever bytes were typed. Where <iomanip> is in sight, a std::string argument finds
/// std::quoted as well: write evenstroke::quoted there.
std::string quoted(std::string_view text);

/// Every digit that tells this number from its neighbours, with a decimal point: "-273.15", "1e+300".
std::string number_text(double number);

/// At most six significant digits, for computed numbers in sentences: "273.05", "0.512346".
std::string short_number_text(double number);

} // namespace evenstroke
