// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/flag_words.h"

#include "app/desk/number_text.h"
#include "app/desk/theme.h"
#include "core/reading/reading.h"

#include <QCoreApplication>

namespace evenstroke {

QString standing_words(const Judgement& judgement, const Flag& flag)
{
    const auto words = [](const char* text) { return QCoreApplication::translate("evenstroke", text); };
    const auto day = [&](std::size_t reading) { return day_text(judgement.record->readings[reading].taken_at.utc); };
    const QString seen = flag.seen()     ? words(", seen %1").arg(day_text(flag.note->written_at))
                         : flag.reopened ? words(", again since it was seen %1").arg(day_text(flag.note->written_at))
                                         : QString();
    if (flag.level_now == flag.severity)
        return words("%1 since %2").arg(level_text(flag.level_now), day(flag.reading)) + seen;
    const QString began = words("began %1 as %2").arg(day(flag.reading), level_text(flag.severity));
    return (flag.raised_at ? words("%1 since %2 (%3)").arg(level_text(flag.level_now), day(*flag.raised_at), began)
                           : words("%1 now (%2)").arg(level_text(flag.level_now), began)) +
           seen;
}

QString note_words(const Judgement& judgement, const Flag& flag)
{
    if (!flag.note)
        return {};
    const auto words = [](const char* text) { return QCoreApplication::translate("evenstroke", text); };
    const FlagNote& note = *flag.note;
    QString text = words("%1, %2: %3").arg(day_text(note.written_at), to_qstring(note.who),
                                           note.said == FlagNote::Said::no_work ? words("no work was done") : to_qstring(note.words));
    if (note.said == FlagNote::Said::no_work && !note.words.empty())
        text += QStringLiteral("; ") + to_qstring(note.words);
    for (const Event& event : judgement.record->events)
        if (!note.event_id.empty() && event.id == note.event_id) {
            const EventKind* kind = find_event_kind(event.kind);
            text += words(" (with %1 of %2)").arg(to_qstring(kind ? kind->title : event.kind).toLower(), day_text(event.date.utc));
        }
    text += u'.';
    if (flag.reopened)
        text += words(" New evidence came since.");
    return text;
}

} // namespace evenstroke
