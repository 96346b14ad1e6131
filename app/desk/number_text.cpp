// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/number_text.h"

#include <QCoreApplication>
#include <QDateTime>

#include <algorithm>
#include <cmath>

namespace evenstroke {

namespace {

constexpr QChar minus_sign(0x2212), no_break_space(0x00A0), narrow_space(0x202F);

QString tr_(const char* text, int n = -1)
{
    return QCoreApplication::translate("evenstroke", text, nullptr, n);
}

QDateTime utc(TimePoint time)
{
    return QDateTime::fromSecsSinceEpoch(time.time_since_epoch().count(), Qt::UTC);
}

const char* month_name(int month)
{
    static constexpr const char* names[] = {
        QT_TRANSLATE_NOOP("evenstroke", "Jan"), QT_TRANSLATE_NOOP("evenstroke", "Feb"),
        QT_TRANSLATE_NOOP("evenstroke", "Mar"), QT_TRANSLATE_NOOP("evenstroke", "Apr"),
        QT_TRANSLATE_NOOP("evenstroke", "May"), QT_TRANSLATE_NOOP("evenstroke", "Jun"),
        QT_TRANSLATE_NOOP("evenstroke", "Jul"), QT_TRANSLATE_NOOP("evenstroke", "Aug"),
        QT_TRANSLATE_NOOP("evenstroke", "Sep"), QT_TRANSLATE_NOOP("evenstroke", "Oct"),
        QT_TRANSLATE_NOOP("evenstroke", "Nov"), QT_TRANSLATE_NOOP("evenstroke", "Dec")};
    return names[std::clamp(month, 1, 12) - 1];
}

} // namespace

QString to_qstring(std::string_view text)
{
    return QString::fromUtf8(text.data(), static_cast<qsizetype>(text.size()));
}

QString number_text(double value, int decimals)
{
    QString digits = QString::number(std::abs(value), 'f', std::max(0, decimals));
    const bool is_zero = std::none_of(digits.begin(), digits.end(), [](QChar c) { return c >= u'1' && c <= u'9'; });
    return value < 0.0 && !is_zero ? minus_sign + digits : digits;
}

QString whole_text(double value)
{
    QString digits = number_text(value, 0);
    const qsizetype first = digits.startsWith(minus_sign) ? 1 : 0;
    if (digits.size() - first >= 5)
        for (qsizetype i = digits.size() - 3; i > first; i -= 3)
            digits.insert(i, narrow_space);
    return digits;
}

QString signed_text(double value, int decimals)
{
    const QString digits = number_text(value, decimals);
    const bool is_zero = std::none_of(digits.begin(), digits.end(), [](QChar c) { return c >= u'1' && c <= u'9'; });
    return value > 0.0 && !is_zero ? u'+' + digits : digits;
}

QString with_uncertainty(double value, std::optional<double> half_width, int decimals)
{
    if (!half_width || !(*half_width > 0.0))
        return number_text(value, decimals);
    // Two significant digits of the half-width say all that it can say.
    const int deserved = std::max(0, 1 - static_cast<int>(std::floor(std::log10(*half_width))));
    const int shown = std::min(deserved, decimals);
    return number_text(value, shown) + no_break_space + QChar(0x00B1) + no_break_space
           + number_text(*half_width, shown);
}

QString with_unit(const QString& number, QStringView unit_symbol)
{
    return unit_symbol.isEmpty() ? number : number + no_break_space + unit_symbol.toString();
}

QString unit_text(QuantityId id) { return to_qstring(unit(quantity(id).unit).symbol); }

int decimals_of(QuantityId id) { return quantity(id).decimals; }

QString quantity_title(QuantityId id) { return to_qstring(quantity(id).title); }

QString place_title(const Engine& engine, const Place& place, bool capital)
{
    QString text;
    switch (place.kind) {
    case Place::Kind::cylinder:
        text = tr_("cylinder %1").arg(to_qstring(engine.cylinder_name(place.number)));
        break;
    case Place::Kind::turbocharger: text = tr_("turbocharger %1").arg(place.number); break;
    case Place::Kind::cooler: text = tr_("cooler %1").arg(place.number); break;
    case Place::Kind::ship: text = tr_("ship"); break;
    case Place::Kind::engine: text = tr_("engine"); break;
    }
    if (capital && !text.isEmpty())
        text[0] = text[0].toUpper();
    return text;
}

QString day_text(TimePoint time)
{
    const QDate date = utc(time).date();
    return tr_("%1 %2 %3").arg(date.day()).arg(tr_(month_name(date.month()))).arg(date.year());
}

QString month_text(TimePoint time)
{
    const QDate date = utc(time).date();
    return tr_("%1 %2").arg(tr_(month_name(date.month()))).arg(date.year());
}

QString clock_text(const StampedTime& time)
{
    return utc(time.utc).addSecs(60 * time.offset_minutes).time().toString(QStringLiteral("HH:mm"));
}

QString age_text(TimePoint then, TimePoint now)
{
    const auto days = std::chrono::floor<std::chrono::days>(now - then).count();
    if (days < 1)
        return tr_("today");
    if (days < 45)
        return tr_("%n day(s) ago", static_cast<int>(days));
    if (days < 700)
        return tr_("%n month(s) ago", static_cast<int>(std::lround(static_cast<double>(days) / 30.4375)));
    return tr_("%n year(s) ago", static_cast<int>(std::lround(static_cast<double>(days) / 365.25)));
}

TimePoint time_now() { return std::chrono::floor<std::chrono::seconds>(std::chrono::system_clock::now()); }

} // namespace evenstroke
