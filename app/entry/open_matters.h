// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/entry/entry_opinions.h"

#include <optional>
#include <span>
#include <vector>

namespace evenstroke {

/// Something on the sheet that waits for an answer: a doubted value, values that do not fit each other, the
/// reading's time.
struct OpenMatter
{
    QString sentence;
    std::vector<LogBox> boxes; ///< that it speaks of; empty: the time, or the reading as a whole
    bool impossible = false;
    bool time = false;    ///< the reading's own time
    bool one_box = false; ///< a single value, no matter between several
    bool whole = false;   ///< the whole sheet
    int lacking = 0;      ///< required boxes that are empty
    bool quick = false;   ///< the quick lines are not filled in
};

/// What is open, in this order: time and matters between values, then single values in walking order.
/// Answered doubts and values lent by the ship's reading are left out.
std::vector<OpenMatter> find_open_matters(const LogSheetModel& model, const EntryOpinions& opinions);

/// What is not written yet, in walking order: the quick lines, then the required boxes, a matter a section.
std::vector<OpenMatter> find_lacking_matters(const LogSheetModel& model, const EntryOpinions& opinions);

/// "2 matters in doubt, 25 required boxes empty, the quick lines not filled in": what is open, in few words.
QString open_in_short(const std::vector<OpenMatter>& matters);

/// What is open about this box, its name first: "Maximum pressure of cylinder 1: …"; empty if nothing.
QString open_sentence(const LogSheetModel& model, const EntryOpinions& opinions, const LogBox& box);

/// The boxes that open matters speak of, each once, in walking order.
std::vector<LogBox> doubted_boxes(const LogSheetModel& model, const std::vector<OpenMatter>& matters);

} // namespace evenstroke
