// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/typed_time.h"

#include "app/desk/number_text.h"

#include <QCoreApplication>
#include <QDateTime>
#include <QRegularExpression>

#include <cstdlib>

namespace evenstroke {
namespace {

QString tr_(const char* text)
{
    return QCoreApplication::translate("evenstroke::time", text);
}

Problem not_read(const QString& field, const QString& text, const QString& example)
{
    return invalid_input(to_std(tr_("%1 “%2” cannot be read.").arg(field, text)),
                         to_std(tr_("Write it like %1.").arg(example)));
}

QDate read_date(const QString& text)
{
    static const QRegularExpression iso(QStringLiteral("^(\\d{4})-(\\d{1,2})-(\\d{1,2})$"));
    static const QRegularExpression day_first(QStringLiteral("^(\\d{1,2})[./](\\d{1,2})[./](\\d{4})$"));
    if (const auto match = iso.match(text); match.hasMatch())
        return {match.captured(1).toInt(), match.captured(2).toInt(), match.captured(3).toInt()};
    // 3/4/2031 could be either month; only a day above 12 leaves no doubt, and dots are written day first.
    if (const auto match = day_first.match(text); match.hasMatch()) {
        const int day = match.captured(1).toInt(), month = match.captured(2).toInt();
        if (text.contains(u'.') || day > 12)
            return {match.captured(3).toInt(), month, day};
    }
    return {};
}

QTime read_clock(const QString& text)
{
    static const QRegularExpression clock(QStringLiteral("^(\\d{1,2})[:.h]?(\\d{2})$"));
    const auto match = clock.match(text);
    return match.hasMatch() ? QTime(match.captured(1).toInt(), match.captured(2).toInt()) : QTime();
}

std::optional<int> read_offset(const QString& text)
{
    if (text.compare(u"UTC", Qt::CaseInsensitive) == 0 || text == u"Z" || text == u"0")
        return 0;
    static const QRegularExpression offset(QStringLiteral("^([+\\x{2212}-])(\\d{1,2})(?::?(\\d{2}))?$"));
    const auto match = offset.match(text);
    if (!match.hasMatch())
        return std::nullopt;
    const int minutes = match.captured(2).toInt() * 60 + match.captured(3).toInt();
    const int signed_minutes = match.captured(1) == u"+" ? minutes : -minutes;
    // ISO 8601 offsets in use run from -12:00 to +14:00.
    return signed_minutes >= -12 * 60 && signed_minutes <= 14 * 60 ? std::optional(signed_minutes)
                                                                   : std::nullopt;
}

} // namespace

TimeText time_text(const StampedTime& time)
{
    const QDateTime local = QDateTime::fromSecsSinceEpoch(
        time.utc.time_since_epoch().count() + time.offset_minutes * 60, Qt::UTC);
    const int minutes = std::abs(time.offset_minutes);
    return {local.toString(QStringLiteral("yyyy-MM-dd")), local.toString(QStringLiteral("HH:mm")),
            QStringLiteral("%1%2:%3")
                .arg(QChar(time.offset_minutes < 0 ? u'-' : u'+'))
                .arg(minutes / 60, 2, 10, QChar(u'0'))
                .arg(minutes % 60, 2, 10, QChar(u'0'))};
}

Result<StampedTime> read_time(const TimeText& text)
{
    const QDate date = read_date(text.date.trimmed());
    if (!date.isValid())
        return not_read(tr_("The date"), text.date, QStringLiteral("2031-03-14"));
    const QTime clock = read_clock(text.clock.trimmed());
    if (!clock.isValid())
        return not_read(tr_("The ship's time"), text.clock, QStringLiteral("09:10"));
    const auto offset = read_offset(text.offset.trimmed());
    if (!offset)
        return not_read(tr_("The ship's offset from UTC"), text.offset, QStringLiteral("+02:00"));
    const qint64 local = QDateTime(date, clock, Qt::UTC).toSecsSinceEpoch();
    return StampedTime{TimePoint(std::chrono::seconds(local - *offset * 60)), *offset};
}

} // namespace evenstroke
