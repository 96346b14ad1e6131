// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/reading_in_hand.h"

#include "app/desk/number_text.h"

#include <QCoreApplication>

#include <algorithm>

namespace evenstroke {

namespace {

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

auto day_of(const Reading& reading) { return std::chrono::floor<std::chrono::days>(reading.taken_at.utc); }

} // namespace

std::optional<std::size_t> reading_in_hand(const Judgement& judgement, const Selection& selection)
{
    if (!judgement.record || judgement.readings.empty())
        return std::nullopt;
    const std::string id = to_std(selection.reading);
    const std::vector<Reading>& readings = judgement.record->readings;
    for (std::size_t i = 0; !id.empty() && i < judgement.readings.size(); ++i)
        if (readings[i].id == id)
            return i;
    return judgement.readings.size() - 1;
}

Selection with_reading(const Selection& selection, const Judgement& judgement, std::size_t reading)
{
    Selection result = selection;
    result.reading = to_qstring(judgement.record->readings.at(reading).id);
    return result;
}

Selection with_reading_step(const Selection& selection, const Judgement& judgement, int steps)
{
    const auto here = reading_in_hand(judgement, selection);
    if (!here)
        return selection;
    const auto last = static_cast<std::ptrdiff_t>(judgement.readings.size()) - 1;
    const auto there = std::clamp<std::ptrdiff_t>(static_cast<std::ptrdiff_t>(*here) + steps, 0, last);
    return with_reading(selection, judgement, static_cast<std::size_t>(there));
}

QString reading_title(const Judgement& judgement, std::size_t reading)
{
    const std::vector<Reading>& readings = judgement.record->readings;
    const Reading& shown = readings.at(reading);
    const auto same_day = [&](std::size_t other) { return other < readings.size() && day_of(readings[other]) == day_of(shown); };
    const QString day = day_text(shown.taken_at.utc);
    return (reading > 0 && same_day(reading - 1)) || same_day(reading + 1)
               ? tr_("%1, %2").arg(day, clock_text(shown.taken_at))
               : day;
}

QString reading_words(const Judgement& judgement, std::size_t reading)
{
    const ReadingJudgement& judged = judgement.readings.at(reading);
    QStringList words{reading_title(judgement, reading)};
    if (judged.load_percent)
        words.append(tr_("%1 load").arg(with_unit(number_text(*judged.load_percent, 0), u"%")));
    if (judged.steadiness != Steadiness::not_judged)
        words.append(QCoreApplication::translate("evenstroke", steadiness_word(judged.steadiness).c_str()));
    return words.join(QStringLiteral(" · "));
}

} // namespace evenstroke
