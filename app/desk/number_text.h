// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"

#include <QString>

#include <optional>

/// How numbers, values and dates are written on screens, plots and paper. The decimal sign is a point
/// everywhere, as in the files and the sentences; a true minus sign (U+2212) is as wide as the plus.
namespace evenstroke {

/// "385.2", "−0.6", "0.0" (never "−0.0").
QString number_text(double value, int decimals);
/// "11 400": from five digits on, groups of three with a narrow no-break space.
QString whole_text(double value);
/// "+0.3", "−5.6", "0.0": for differences.
QString signed_text(double value, int decimals);
/// "385 ± 4": half-width at 95 %, with the decimals that two digits of it deserve, never more than `decimals`.
QString with_uncertainty(double value, std::optional<double> half_width, int decimals);
/// Number with its unit after a no-break space: "112.4 bar"; "76 %".
QString with_unit(const QString& number, QStringView unit_symbol);

/// Symbol of the unit a quantity, its deviation and its apart are shown in; "" for bare numbers.
QString unit_text(QuantityId quantity);
int decimals_of(QuantityId quantity);
/// "Exhaust temperature"; "cylinder 4", "Cylinder A3"; both from the catalogue and the engine's own names.
QString quantity_title(QuantityId quantity);
QString place_title(const Engine& engine, const Place& place, bool capital = true);

/// "14 Mar 2031"; "Mar 2031"; "2031".
QString day_text(TimePoint time);
QString month_text(TimePoint time);
/// "06:30" on the ship's clock.
QString clock_text(const StampedTime& time);
/// "today", "12 days ago", "7 weeks ago", "5 months ago", "3 years ago".
QString age_text(TimePoint then, TimePoint now);
/// The clock in whole seconds; the one place where the front end asks for the time.
TimePoint time_now();

QString to_qstring(std::string_view text);
inline std::string to_std(const QString& text) { return text.toStdString(); }

} // namespace evenstroke
