// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/units/unit_catalogue.h"

#include <compare>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

/// Every quantity a reading can hold, as data: resources/catalogue/quantities.csv, one line each.
namespace evenstroke {

/// What a value belongs to. Numbers count from 1; engine and ship have 0.
struct Place
{
    enum class Kind : unsigned char { engine, ship, cylinder, turbocharger, cooler };
    Kind kind = Kind::engine;
    int number = 0;

    static Place engine() { return {}; }
    static Place cylinder(int number) { return {Kind::cylinder, number}; }
    static Place turbocharger(int number) { return {Kind::turbocharger, number}; }
    static Place cooler(int number) { return {Kind::cooler, number}; }
    friend auto operator<=>(const Place&, const Place&) = default;
};

/// Index of a quantity in the catalogue. The order is the walking order of the log sheet.
using QuantityId = int;

enum class ValueType { number, words, choice, yes_no };
enum class Need { required, recommended, optional };

/// How the ambient correction of methods treats a quantity.
enum class CorrectionForm { none, pressure, temperature, turbocharger_speed, coolant_difference };

struct Range
{
    std::optional<double> low, high; ///< in the quantity's own unit
};

struct Quantity
{
    QuantityId id;
    std::string name;       ///< identifier as in files: "maximum_pressure"
    std::string title;      ///< on screen: "Maximum pressure"
    std::string short_title;///< in narrow headings: "p_max"
    std::string group;      ///< heading, control, quick_line, ship_weather, cylinder, turbocharger, cooler, cooling_lube, fuel
    Place::Kind per;        ///< what it repeats over
    ValueType type = ValueType::number;
    std::vector<std::string> choices;
    UnitId unit = 0;        ///< the unit it is kept and shown in unless the engineer chose another
    PressureKind kind = PressureKind::none;
    Range usual_two_stroke, usual_four_stroke, soft, hard;
    std::optional<double> uncertainty_absolute; ///< half-width at 95 %, in `unit`
    std::optional<double> uncertainty_percent;  ///< of the reading
    Need need = Need::optional;
    bool derived() const { return group == "derived"; } ///< worked out by the program, never typed
    std::string only_for;   ///< "two-stroke", "four-stroke" or empty
    std::string source;

    CorrectionForm correction_form = CorrectionForm::none;
    std::string correction_like; ///< takes this quantity's coefficients where it has none of its own
    int decimals = 1;       ///< as the instrument shows, for printing

    Range usual(bool two_stroke) const { return two_stroke ? usual_two_stroke : usual_four_stroke; }
};

std::span<const Quantity> all_quantities();
const Quantity& quantity(QuantityId id);

/// The quantity of this name at this kind of place. Turbocharger and cooler quantities are also found
/// for the engine (the engine has one, or the value stands for all); `fuel_index` exists twice.
std::optional<QuantityId> find_quantity(std::string_view name, Place::Kind place);
/// Derived quantities are not found here: nobody types them.
/// As above, whatever the place, derived ones too; the first in walking order.
std::optional<QuantityId> find_quantity(std::string_view name);
/// The nearest known names to a misspelt one, for the sentence that refuses it.
std::vector<std::string> nearest_quantity_names(std::string_view name, std::size_t count = 3);

/// "cylinder 4", "turbocharger 2", "engine": as sentences and the flags' subject say it.
std::string place_text(const Place& place);

} // namespace evenstroke
