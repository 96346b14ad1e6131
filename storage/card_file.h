// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/common.h"

#include <QByteArray>
#include <QString>

#include <string_view>

namespace evenstroke::storage {

/// The whole of a card's file. @par Problems not_found; storage; invalid_input: larger than any card
Result<QByteArray> card_file_content(const QString& path);

/// Takes the next line off, without its end.
inline std::string_view take_text_line(std::string_view& rest)
{
    const std::size_t end = rest.find('\n');
    std::string_view line = rest.substr(0, end);
    rest.remove_prefix(end == std::string_view::npos ? rest.size() : end + 1);
    if (line.ends_with('\r'))
        line.remove_suffix(1);
    return line;
}

} // namespace evenstroke::storage
