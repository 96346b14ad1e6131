// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/flag_words.h"

#include "app/desk/number_text.h"
#include "app/desk/theme.h"

#include <QCoreApplication>

namespace evenstroke {

QString standing_words(const Judgement& judgement, const Flag& flag)
{
    const auto words = [](const char* text) { return QCoreApplication::translate("evenstroke", text); };
    const auto day = [&](std::size_t reading) { return day_text(judgement.record->readings[reading].taken_at.utc); };
    if (flag.level_now == flag.severity)
        return words("%1 since %2").arg(level_text(flag.level_now), day(flag.reading));
    const QString began = words("began %1 as %2").arg(day(flag.reading), level_text(flag.severity));
    return flag.raised_at ? words("%1 since %2 (%3)").arg(level_text(flag.level_now), day(*flag.raised_at), began)
                          : words("%1 now (%2)").arg(level_text(flag.level_now), began);
}

} // namespace evenstroke
