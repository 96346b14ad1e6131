// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

namespace evenstroke {

/// Writes an invented engine with ten years of monthly readings in the public file formats below a folder:
/// twelve cylinders, one of them drifting in the last year, work on each cylinder every two years.
void write_large_engine(const QString& folder, int cylinders = 12, int months = 120);

} // namespace evenstroke
