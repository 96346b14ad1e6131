// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/open_matters.h"

#include "app/desk/number_text.h"

#include <QCoreApplication>
#include <QStringList>

#include <algorithm>

namespace evenstroke {
namespace {

QString tr_(const char* text, int n = -1) { return QCoreApplication::translate("evenstroke", text, nullptr, n); }

/// The first box of the quick lines that is empty, where they do not tell whether the engine ran steadily.
std::optional<LogBox> empty_quick_box(const EntrySheet& sheet, const EntryOpinions& opinions)
{
    if (opinions.steadiness().verdict != Steadiness::not_judged)
        return std::nullopt;
    for (const LogSection& section : sheet.sections())
        for (const LogRow& row : section.rows)
            for (const LogBox& box : row.boxes)
                if (box.phase != Phase::reading && !sheet.value(box))
                    return box;
    return std::nullopt;
}

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
        matters.push_back({note.sentence, note.boxes, note.impossible, note.time, false, note.whole, 0, false});
    for_each_box(model.sheet(), [&](const LogBox& box) {
        if (const ValueOpinion* opinion = open_opinion(model.sheet(), opinions, box))
            matters.push_back({with_name(model, box, opinion->sentence),
                               {box},
                               opinion->verdict == ValueOpinion::Verdict::impossible,
                               false,
                               true,
                               false,
                               0,
                               false});
    });
    return matters;
}

std::vector<OpenMatter> find_lacking_matters(const LogSheetModel& model, const EntryOpinions& opinions)
{
    const EntrySheet& sheet = model.sheet();
    std::vector<OpenMatter> matters;
    if (const auto box = empty_quick_box(sheet, opinions))
        matters.push_back({to_qstring(opinions.steadiness().sentence), {*box}, false, false, false, false, 0, true});
    const Reading whole = sheet.whole();
    for (const LogSection& section : sheet.sections()) {
        const Completeness state = find_completeness(std::span(&section, 1), whole);
        const int count = static_cast<int>(state.missing.size());
        if (count == 0)
            continue;
        QStringList names;
        for (const std::string& words : missing_words(sheet.engine(), state.missing))
            names << to_qstring(words);
        matters.push_back({tr_("%1, %n required box(es) empty: %2.", count)
                               .arg(to_qstring(section.title), names.join(QStringLiteral("; "))),
                           state.missing, false, false, false, false, count, false});
    }
    return matters;
}

QString open_in_short(const std::vector<OpenMatter>& matters)
{
    int doubted = 0, lacking = 0;
    bool quick = false;
    for (const OpenMatter& matter : matters) {
        lacking += matter.lacking;
        quick = quick || matter.quick;
        doubted += matter.lacking == 0 && !matter.quick ? 1 : 0;
    }
    QStringList parts;
    if (doubted > 0)
        parts << tr_("%n matter(s) in doubt", doubted);
    if (lacking > 0)
        parts << tr_("%n required box(es) empty", lacking);
    if (quick)
        parts << tr_("the quick lines not filled in");
    return parts.join(QStringLiteral(", "));
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
