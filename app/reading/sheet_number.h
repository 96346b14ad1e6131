// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

#include <utility>

/// Numbers of a sheet of workings: whoever follows them with a calculator needs the digits, not the rounding.
namespace evenstroke {

/// "2.51", "0.286", "36 812", "1.4e-06": six significant digits without trailing zeros, a true minus sign.
QString sheet_number(double value);
/// The same cut at its decimal sign, so that a column lines up on it: {"2", ".51"}.
std::pair<QString, QString> at_decimal_sign(const QString& number);

} // namespace evenstroke
