// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace evenstroke::storage {

/// One field as RFC 4180 writes it: in quotation marks where it must be.
inline std::string csv_field(std::string_view text)
{
    // Leading blanks would be lost when the file is read, and a file may be saved again with semicolons.
    const bool plain = text.find_first_of(",;\"\r\n") == std::string_view::npos &&
                       (text.empty() || (text.front() != ' ' && text.back() != ' '));
    if (plain)
        return std::string(text);
    std::string quoted = "\"";
    for (const char letter : text)
        quoted += letter == '"' ? std::string("\"\"") : std::string(1, letter);
    return quoted + "\"";
}

inline std::string csv_line(const std::vector<std::string>& fields)
{
    std::string line;
    for (std::size_t i = 0; i < fields.size(); ++i)
        line += (i == 0 ? "" : ",") + csv_field(fields[i]);
    return line + "\n";
}

} // namespace evenstroke::storage
