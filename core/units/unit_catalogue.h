// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <initializer_list>
#include <span>
#include <string>
#include <string_view>

/// What may be typed behind a number, and exactly what it means. Files, screens and the command line
/// share this one list; a new unit is one line of it.
namespace evenstroke {

/// What a unit measures. Two units convert into each other only within one dimension.
enum class Dimension {
    number,               ///< a bare number, a code, a mark
    share,                ///< per cent, fraction
    temperature,          ///< a point on a thermometer
    pressure,
    rotation,             ///< revolutions over time
    power,
    torque,
    mass_flow,
    volume_flow,          ///< becomes a mass flow only with a density
    specific_energy,      ///< heating value
    specific_consumption, ///< fuel over work
    length,               ///< heights, draughts, rack marks
    angle,
    duration,
    velocity,
    wind_force,           ///< Beaufort: becomes a velocity by a curve, no factor
    density,
    viscosity,
    mass,
};

enum class PressureKind { none, gauge, absolute, difference };

/// Index of a unit in the catalogue.
using UnitId = int;

/// The further accepted spellings of one unit, to iterate over.
class Spellings
{
public:
    constexpr Spellings() = default;
    constexpr Spellings(std::initializer_list<std::string_view> spellings) : count_(spellings.size())
    {
        std::copy(spellings.begin(), spellings.end(), list_.begin()); // too many: does not compile
    }
    constexpr auto begin() const { return list_.begin(); }
    constexpr auto end() const { return list_.begin() + static_cast<std::ptrdiff_t>(count_); }

private:
    std::array<std::string_view, 5> list_{};
    std::size_t count_ = 0;
};

/// One unit: `si = factor * typed + offset`, but for wind force: `si = factor * typed ^ 1.5`.
struct Unit
{
    std::string_view symbol; ///< as the program writes it: "kgf/cm²", "°C"
    Dimension dimension;
    double factor; ///< exact to the last bit of a double; the source is named at the table
    double offset; ///< only temperatures have one
    Spellings spellings; ///< further accepted spellings

    double to_si(double typed) const
    {
        return dimension == Dimension::wind_force ? factor * std::pow(typed, 1.5) : factor * typed + offset;
    }
    double from_si(double value_si) const
    {
        return dimension == Dimension::wind_force ? std::pow(value_si / factor, 2.0 / 3.0)
                                                  : (value_si - offset) / factor;
    }
    /// Differences never take the offset: 10 °C warmer is 10 K warmer. A wind force has none.
    double difference_to_si(double typed) const { return factor * typed; }
    double difference_from_si(double difference_si) const { return difference_si / factor; }
};

const Unit& unit(UnitId id); ///< a number outside the table is our own mistake and throws
std::span<const Unit> all_units();

/// "pressure", "mass flow": as sentences name what a unit measures.
std::string_view dimension_text(Dimension dimension);

/// A unit as somebody wrote it, with the kind of pressure if the text ends in `abs` or `gauge`.
struct WrittenUnit
{
    UnitId id;
    PressureKind kind; ///< none where the text does not say
};

/// Finds "bar", "kgf/cm2", "bar abs", "°C", "mmWC", "t/24h" and the like. ASCII and typographic forms
/// are alike, blanks inside do not matter. Upper and lower case as in the SI; another case is taken only
/// where it cannot mean anything else (Bar, KW, RPM): mPa is not MPa, Mbar is not mbar, kN is not kn.
/// Empty, "1" and "-" are a bare number. A pressure may end in `abs` or `gauge` (also a, g, in brackets).
/// @par Problems invalid_input with the text, and the units known for its likeliest dimension
Result<WrittenUnit> find_unit(std::string_view text);

/// The number of a typed value: decimal point or comma, an optional sign, digits, an optional exponent.
///
/// Refused in words: "1.234.567" and "1,234.5" (grouping could mean two things), "NaN", "-", "1e999",
/// hexadecimals, blanks inside, more than 64 characters, anything that is not wholly a number. One
/// separator is always the decimal sign: "1.250" is one and a quarter here, because files and log sheets
/// do not group. Converted exactly (to the nearest double). Blanks around it, also non-breaking ones, and
/// the typographic minus are taken.
/// @par Problems invalid_input with the text and what is the matter with it
Result<double> parse_number(std::string_view text);

/// A value as typed with its unit, such as "7,5 kgf/cm2", "112 bar abs", "385 °C".
struct TypedValue
{
    double number;   ///< in the typed unit
    WrittenUnit unit;
    double value_si; ///< in SI, of the typed kind (a gauge pressure stays over the barometer)
};
/// @par Problems invalid_input: no number, no unit, unknown unit, below absolute zero
Result<TypedValue> parse_typed_value(std::string_view text);

/// In SI, if the number can exist at all: not below absolute zero for temperatures and for pressures
/// written as absolute, not below a perfect vacuum for gauge pressures whatever the barometer, and finite; a
/// wind force from 0 to 12. @par Problems invalid_input naming value and unit
Result<double> to_si_checked(double number, WrittenUnit unit);

} // namespace evenstroke
