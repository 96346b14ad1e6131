// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/log_sheet.h"
#include "core/units/quantity_types.h"

#include <string>
#include <string_view>

/// What somebody writes in one box of the log sheet, and what it means.
namespace evenstroke {

/// The unit a quantity is written in unless the engineer chose another.
WrittenUnit own_unit(QuantityId quantity);

/// Reads a box. Numbers take the row's unit, or one written behind them ("7,5 kgf/cm2", "112 bar abs") if it
/// measures the same. "not read", "not fitted" and "out of order" are reasons for an empty box. Choices may
/// be shortened as long as one is meant; latitude and longitude may be degrees and minutes ("12 34.5 S").
/// @param row_unit unit and kind of pressure in which the row is written
/// @par Problems invalid_input: no number, a unit that measures something else, below absolute zero, no such
/// choice
Result<Value> read_box(const LogBox& box, std::string_view text, WrittenUnit row_unit);

/// A box left empty for a reason.
Value without_value(const LogBox& box, MissingReason reason);

/// What the box shows: as typed, with its unit where that is not the row's; a reason in words; else empty.
std::string box_text(const Value& value, WrittenUnit row_unit);

std::string missing_text(MissingReason reason);   ///< "not read"; empty for none
std::string choice_text(std::string_view choice); ///< "torsion meter" for torsion_meter

/// A number of the quantity's own unit and kind in the unit a row is written in.
/// @return none where gauge and absolute differ and the barometer is not known
std::optional<double> in_row_unit(QuantityId quantity, double own, WrittenUnit row_unit,
                                  std::optional<AbsolutePressure> barometer);

/// "bar", "bar abs", "°C": the head of a row. Gauge is said only where the quantity is not kept as gauge.
std::string row_unit_text(QuantityId quantity, WrittenUnit row_unit);

/// Units in which this quantity may be written, its own first.
std::vector<WrittenUnit> possible_units(QuantityId quantity);

} // namespace evenstroke
