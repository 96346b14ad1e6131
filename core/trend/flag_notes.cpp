// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/flag_notes.h"

#include <algorithm>

namespace evenstroke {
namespace {

/// Growth of the evidence that brings a flag that was seen up again: one standard deviation (common practice, no source).
constexpr double new_evidence = 1.0;

/// The newest note on what this reading raised at this subject, unless it was withdrawn.
const FlagNote* last_note(const std::vector<FlagNote>& notes, const Place& subject, TimePoint flagged_at)
{
    const FlagNote* last = nullptr;
    for (const FlagNote& note : notes)
        if (note.subject == subject && note.flagged_at == flagged_at)
            last = &note;
    return last && last->said != FlagNote::Said::withdrawn ? last : nullptr;
}

} // namespace

std::vector<drift::Answer> answers_from_notes(const EngineRecord& record)
{
    std::vector<drift::Answer> answers;
    for (std::size_t i = 0; i < record.readings.size(); ++i)
        for (int cylinder = 1; cylinder <= record.engine.cylinders; ++cylinder) {
            const FlagNote* note =
                last_note(record.notes, Place::cylinder(cylinder), record.readings[i].taken_at.utc);
            if (note && note->said == FlagNote::Said::no_work)
                answers.push_back({i, static_cast<std::size_t>(cylinder) - 1, false});
        }
    return answers;
}

void add_notes(Judgement& judgement)
{
    const EngineRecord& record = *judgement.record;
    for (Flag& flag : judgement.flags) {
        if (flag.reading >= record.readings.size())
            continue;
        const FlagNote* note = last_note(record.notes, flag.subject, record.readings[flag.reading].taken_at.utc);
        if (!note)
            continue;
        flag.note = *note;
        flag.reopened = note->said == FlagNote::Said::seen &&
                        (flag.evidence >= note->evidence + new_evidence || flag.level_now > note->level);
    }
}

} // namespace evenstroke
