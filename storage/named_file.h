// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "storage/sql.h"

#include <QFile>

#include <optional>

namespace evenstroke::storage {

/// Opens a file that somebody named, for reading; in words why it cannot be.
inline std::optional<Problem> open_named(QFile& file)
{
    if (!file.exists())
        return Problem{Problem::Kind::not_found, "There is no file \"" + from_qt(file.fileName()) + "\".",
                       "Check its name."};
    if (!file.open(QIODevice::ReadOnly))
        return Problem{Problem::Kind::storage, "\"" + from_qt(file.fileName()) + "\" cannot be read.",
                       "Check that you have the right to read it."};
    return std::nullopt;
}

} // namespace evenstroke::storage
