// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/log_sheet.h"
#include "core/reading/typed_box.h"

#include <QString>

#include <functional>
#include <vector>

class QPrinter;

namespace evenstroke {

/// What is printed to be filled in by hand on the walk: the same sections, rows and order as on the screen.
struct BlankSheet
{
    QString vessel;
    const Engine* engine = nullptr;
    std::vector<LogSection> rows;
    std::function<WrittenUnit(QuantityId)> row_unit;
    const Reading* last = nullptr; ///< its values stand small and grey in the boxes; null before the first
};

/// Prints on A4, in black and grey, as many pages as it takes. The cautions for those who open cocks and
/// stand at hot pipes come first. @return the number of pages
int print_blank_sheet(const BlankSheet& sheet, QPrinter& printer);

} // namespace evenstroke
