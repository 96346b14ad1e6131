// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/entry_opinions.h"

#include "app/desk/number_text.h"

#include <algorithm>

namespace evenstroke {
namespace {

/// Boxes of a row, or all boxes of a place, that a doubt about many speaks of.
std::vector<LogBox> boxes_of(const EntrySheet& sheet, const Doubt& doubt)
{
    std::vector<LogBox> boxes;
    for (const LogSection& section : sheet.sections())
        for (const LogRow& row : section.rows)
            for (const LogBox& box : row.boxes) {
                const bool this_row = !doubt.quantity || *doubt.quantity == box.quantity;
                const bool this_place = !doubt.place || *doubt.place == box.place;
                if (this_row && this_place && box.phase == Phase::reading && sheet.value(box))
                    boxes.push_back(box);
            }
    return boxes;
}

bool all_confirmed(const EntrySheet& sheet, const std::vector<LogBox>& boxes)
{
    return !boxes.empty() && std::all_of(boxes.begin(), boxes.end(), [&](const LogBox& box) {
        const Value* value = sheet.value(box);
        return value && value->confirmed;
    });
}

/// A reading that is corrected is not compared with itself, nor with those after it.
std::vector<Reading> readings_before(const Judgement& judgement, const Reading& reading, bool correcting)
{
    std::vector<Reading> earlier;
    for (const Reading& other : judgement.record->readings) {
        const bool itself = !reading.id.empty() && other.id == reading.id;
        if (!itself && (!correcting || other.taken_at.utc < reading.taken_at.utc))
            earlier.push_back(other);
    }
    return earlier;
}

} // namespace

void EntryOpinions::forget()
{
    *this = EntryOpinions();
}

void EntryOpinions::ask(const EntrySheet& sheet, std::shared_ptr<const Judgement> judgement, TimePoint now)
{
    forget();
    judgement_ = std::move(judgement);
    if (!judgement_ || !judgement_->record) {
        // Nothing to compare with yet; ranges and relations are checked all the same.
        auto none = std::make_shared<Judgement>();
        auto record = std::make_shared<EngineRecord>();
        record->engine = sheet.engine();
        none->record = std::move(record);
        judgement_ = std::move(none);
    }
    const Reading whole = sheet.whole();
    DraftOpinion draft = judge_draft(*judgement_, whole);
    for (std::size_t i = 0; i < draft.values.size() && i < whole.values.size(); ++i)
        opinions_[box_of(whole.values[i])] = std::move(draft.values[i]);
    steadiness_ = {draft.steadiness, draft.steadiness_sentence};
    const std::vector<Reading> earlier = readings_before(*judgement_, whole, sheet.reading().closed);
    const ReadingContext context{earlier, judgement_->record->events, now};
    for (const Relation& relation : check_relations(sheet.engine(), whole, context)) {
        SheetNote note{
            to_qstring(relation.sentence), {}, relation.impossible,
                       relation.name == "copied_from_previous", relation.name.rfind("time_", 0) == 0};
        for (const ConcernedValue& concerned : relation.concerned)
            note.boxes.push_back({concerned.quantity, concerned.place, Phase::reading});
        if (!all_confirmed(sheet, note.boxes))
            notes_.push_back(std::move(note));
    }
    note_doubts(sheet, draft.doubts);
    mark(sheet);
}

/// Doubts about one box stand in the ear of that box; here are those about a row, a cylinder or everything.
void EntryOpinions::note_doubts(const EntrySheet& sheet, const std::vector<Doubt>& doubts)
{
    const bool all_copied =
        std::any_of(notes_.begin(), notes_.end(), [](const SheetNote& note) { return note.whole; });
    for (const Doubt& doubt : doubts) {
        if (all_copied && doubt.verdict == Doubt::Verdict::copied)
            continue; // said once of the whole sheet
        const bool one_box = doubt.quantity && doubt.place;
        if (one_box || doubt.sentence.empty())
            continue;
        SheetNote note{to_qstring(doubt.sentence), {}, false, false, false};
        if (doubt.quantity || doubt.place)
            note.boxes = boxes_of(sheet, doubt);
        if (!all_confirmed(sheet, note.boxes))
            notes_.push_back(std::move(note));
    }
}

void EntryOpinions::mark(const EntrySheet& sheet)
{
    for (const SheetNote& note : notes_)
        for (const LogBox& box : note.boxes)
            marks_[box] = note.impossible ? BoxMark::impossible : BoxMark::asked;
    for (const auto& [box, opinion] : opinions_) {
        if (opinion.verdict == ValueOpinion::Verdict::impossible)
            marks_[box] = BoxMark::impossible;
        else if (opinion.verdict == ValueOpinion::Verdict::doubtful ||
                 opinion.verdict == ValueOpinion::Verdict::unlikely)
            marks_.emplace(box, BoxMark::asked);
    }
    for (auto mark = marks_.begin(); mark != marks_.end();)
        mark = sheet.value(mark->first) ? std::next(mark) : marks_.erase(mark);
}

const ValueOpinion* EntryOpinions::of(const LogBox& box) const
{
    const auto found = opinions_.find(box);
    return found == opinions_.end() ? nullptr : &found->second;
}

std::vector<const SheetNote*> EntryOpinions::notes_of(const LogBox& box) const
{
    std::vector<const SheetNote*> found;
    for (const SheetNote& note : notes_)
        if (std::find(note.boxes.begin(), note.boxes.end(), box) != note.boxes.end())
            found.push_back(&note);
    return found;
}

const Reading* EntryOpinions::previous_reading(const LogBox& box, TimePoint before) const
{
    if (!judgement_ || !judgement_->record)
        return nullptr;
    const auto& readings = judgement_->record->readings;
    for (auto reading = readings.rbegin(); reading != readings.rend(); ++reading)
        if (reading->taken_at.utc < before && reading->find(box.quantity, box.place))
            return &*reading;
    return nullptr;
}

} // namespace evenstroke
