// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/sheet_number.h"

#include "app/desk/number_text.h"

#include <cmath>

namespace evenstroke {

namespace {
constexpr int significant_digits = 6;
}

QString sheet_number(double value)
{
    if (!std::isfinite(value))
        return QString();
    QString digits = QString::number(value, 'g', significant_digits);
    if (digits.contains(u'e') && std::abs(value) >= 1.0)
        return whole_text(value);
    if (const bool whole = !digits.contains(u'.') && !digits.contains(u'e'); whole && std::abs(value) >= 10'000.0)
        return whole_text(value);
    return digits.replace(u'-', QChar(0x2212));
}

std::pair<QString, QString> at_decimal_sign(const QString& number)
{
    const qsizetype sign = number.indexOf(u'.');
    return sign < 0 ? std::pair(number, QString()) : std::pair(number.left(sign), number.mid(sign));
}

} // namespace evenstroke
