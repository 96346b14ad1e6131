// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/explanation/explanation.h"

#include <QString>

#include <vector>

namespace evenstroke {

/// One line of the sheet of possible causes.
struct CausesLine
{
    enum class Kind {
        subject, ///< what can be said at all of one cylinder or the engine
        caution, ///< stands before what it warns of
        cause,   ///< "1. The readings fit: ..."
        plain,   ///< a sentence
        label,   ///< `lead` and words: "speaks against", "..."
        last,    ///< who decides
    };
    Kind kind = Kind::plain;
    QString lead, words;
};

struct CardsStored;

/// The sheet from top to bottom.
/// @param cards those that are stored with the engine: a cylinder that has one is pointed to it
std::vector<CausesLine> causes_lines(const Explanation& explanation, const CardsStored& cards);

} // namespace evenstroke
