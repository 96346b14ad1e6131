// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/reading.h"
#include "core/units/quantity_types.h"

#include <optional>
#include <string>

/// A typed value in its quantity's own unit and kind: what comparisons between values need.
namespace evenstroke {

/// The barometer of this reading, whichever phase it was noted in; none where it was not read.
std::optional<AbsolutePressure> barometer_of(const Reading& reading);

/// The number of a value in `quantity(value.quantity).unit`, gauge or absolute as the quantity is kept.
/// @return none for words, for a missing value, and where gauge and absolute differ and the barometer is not
/// known
std::optional<double> number_in_own_unit(const Value& value, std::optional<AbsolutePressure> barometer);

/// The same pressure over vacuum, in the quantity's unit.
std::optional<double> absolute_in_own_unit(const Value& value, std::optional<AbsolutePressure> barometer);

/// A choice or words of the engine, or as they were typed; empty where the reading does not have them.
std::string words_of(const Reading& reading, std::string_view quantity_name);

/// "9800", "385.4": point as decimal sign whatever the locale, half away from zero.
std::string plain_number(double number, int decimals);

/// "385.4 °C", "0.92" for bare numbers: an own value as sentences write it, decimals of the catalogue.
std::string with_own_unit(QuantityId quantity, double own);

/// The unit as it stands behind a number; empty for bare numbers, codes and marks.
std::string unit_behind(UnitId unit_id);

} // namespace evenstroke
