// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"

#include <QString>

#include <optional>

namespace evenstroke {

/// Writes the invented vessel's files below a folder, ready to be taken in.
std::optional<Problem> write_sample_files(const QString& folder);

} // namespace evenstroke
