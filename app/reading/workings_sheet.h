// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/theme.h"
#include "core/workings/workings.h"

#include <QString>

class QTextDocument;

namespace evenstroke {

/// What stands over a sheet of workings.
struct SheetHeading
{
    QString title; ///< "Compressor efficiency, engine"
    QString where; ///< "Main engine of Quiet Barley, reading of 14 Mar 2031 · 76 % load · steady"
};

/// Lays a sheet of workings out as a document: for the screen, for the side of a page (`narrow`) and for paper.
/// Result, what became of it, formula, inputs with their shares of the uncertainty, steps, source, remarks.
void fill_sheet(QTextDocument& document, const Workings& workings, const SheetHeading& heading, const Theme& colours,
                bool narrow = false);
/// "0.842 ± 0.012", "not known"
QString result_text(const Workings& workings);

} // namespace evenstroke
