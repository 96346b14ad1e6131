// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/open_matters.h"

#include "app/desk/number_text.h"

#include <algorithm>

namespace evenstroke {
namespace {

template <typename Do> void for_each_box(const EntrySheet& sheet, Do act)
{
    for (const LogSection& section : sheet.sections())
        for (const LogRow& row : section.rows)
            for (const LogBox& box : row.boxes)
                act(box);
}

/// Why a value of its own is doubted; null where it is not, or was read again.
const ValueOpinion* open_opinion(const EntrySheet& sheet, const EntryOpinions& opinions, const LogBox& box)
{
    const Value* value = sheet.value(box);
    const ValueOpinion* opinion = opinions.of(box);
    if (!value || value->confirmed || sheet.lent(box) || !opinion || opinion->sentence.empty())
        return nullptr;
    const bool doubted = opinion->verdict == ValueOpinion::Verdict::impossible ||
                         opinion->verdict == ValueOpinion::Verdict::unlikely ||
                         opinion->verdict == ValueOpinion::Verdict::doubtful;
    return doubted ? opinion : nullptr;
}

/// "Cylinder 4 maximum pressure, typed 15 bar, is far …" says where; "Maximum pressure cannot be …" does not.
QString with_name(const LogSheetModel& model, const LogBox& box, const std::string& sentence)
{
    const bool says_where = sentence.rfind(quantity(box.quantity).title, 0) != 0;
    const bool lone = box.place.kind == Place::Kind::engine || box.place.kind == Place::Kind::ship;
    return says_where || lone ? to_qstring(sentence)
                              : model.box_name(box) + QStringLiteral(": ") + to_qstring(sentence);
}

} // namespace

std::vector<OpenMatter> find_open_matters(const LogSheetModel& model, const EntryOpinions& opinions)
{
    std::vector<OpenMatter> matters;
    for (const SheetNote& note : opinions.notes())
        matters.push_back({note.sentence, note.boxes, note.impossible, note.time, false, note.whole});
    for_each_box(model.sheet(), [&](const LogBox& box) {
        if (const ValueOpinion* opinion = open_opinion(model.sheet(), opinions, box))
            matters.push_back({with_name(model, box, opinion->sentence),
                               {box},
                               opinion->verdict == ValueOpinion::Verdict::impossible,
                               false,
                               true,
                               false});
    });
    return matters;
}

QString open_sentence(const LogSheetModel& model, const EntryOpinions& opinions, const LogBox& box)
{
    const auto named = [&](const QString& sentence) {
        return model.box_name(box) + QStringLiteral(": ") + sentence;
    };
    if (const ValueOpinion* opinion = open_opinion(model.sheet(), opinions, box))
        return named(to_qstring(opinion->sentence));
    const Value* value = model.sheet().value(box);
    const auto notes = opinions.notes_of(box);
    return value && !value->confirmed && !notes.empty() ? named(notes.front()->sentence) : QString();
}

std::vector<LogBox> doubted_boxes(const LogSheetModel& model, const std::vector<OpenMatter>& matters)
{
    std::vector<LogBox> boxes;
    for_each_box(model.sheet(), [&](const LogBox& box) {
        const bool named = std::any_of(matters.begin(), matters.end(), [&](const OpenMatter& matter) {
            return std::find(matter.boxes.begin(), matter.boxes.end(), box) != matter.boxes.end();
        });
        if (named)
            boxes.push_back(box);
    });
    return boxes;
}

} // namespace evenstroke
