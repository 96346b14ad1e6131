// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/units/unit_list.h"

#include <algorithm>
#include <array>
#include <cstdint>
#include <stdexcept>

namespace evenstroke {
namespace {

using enum Dimension;

// Exact by definition. Sources: NIST Special Publication 811 (2008), appendix B, which marks these as exact;
// ISO 80000-4 for kgf/cm². Computed in long double so that the double is the nearest one.
constexpr long double gravity = 9.80665L;               // m/s², standard acceleration of free fall
constexpr long double pound = 0.45359237L;              // kg, avoirdupois
constexpr long double inch = 0.0254L;                   // m
constexpr long double foot = 0.3048L;                   // m
constexpr long double mercury = 13.5951L * gravity;     // Pa a mm, conventional density 13 595.1 kg/m³
constexpr long double metric_horsepower = 75 * gravity; // W, 75 kgf·m a second
constexpr long double horsepower = 550 * foot * pound * gravity; // W, 550 ft·lbf a second
constexpr long double pound_force_per_square_inch = pound * gravity / (inch * inch);
constexpr long double inch_of_mercury = mercury * inch * 1000;
constexpr long double inch_of_water = gravity * inch * 1000; // Pa, conventional density 1000 kg/m³
constexpr long double us_gallon = 231 * inch * inch * inch;  // m³
constexpr long double joule_per_kilowatt_hour = 3.6e6L;
constexpr long double minute = 60, hour = 3600, day = 86400; // s; a day is 24 hours, not a ship's day
constexpr long double pi = 3.14159265358979323846264338327950288L;

constexpr double exactly(long double factor)
{
    return static_cast<double>(factor);
}

/// One line a unit. SI inside: K, Pa, 1/s, W, N·m, kg/s, m³/s, J/kg, kg/J, m, rad, s, m/s, kg/m³, m²/s, kg;
/// shares as a fraction of 1. Typographic forms, blanks and the middle dot are smoothed out before the
/// search (find_unit.cpp), so spellings need only their plain ASCII form. Not listed on purpose: t/d and
/// the like, because a ship's day can have 23 or 25 hours.
constexpr Unit table[] = {
    {"1", number, 1.0, 0.0, {"", "-", "code", "mark"}},

    {"%", share, 0.01, 0.0, {"percent", "pct"}},
    {"fraction", share, 1.0, 0.0, {}},
    {"g/kg", share, 1e-3, 0.0, {}},

    {"°C", temperature, 1.0, 273.15, {"degC", "C"}},
    {"°F", temperature, exactly(5.0L / 9.0L), exactly(459.67L * 5.0L / 9.0L), {"degF", "F"}},
    {"K", temperature, 1.0, 0.0, {}},

    {"bar", pressure, 1e5, 0.0, {}},
    {"mbar", pressure, 100.0, 0.0, {}},
    {"hPa", pressure, 100.0, 0.0, {}},
    {"kPa", pressure, 1e3, 0.0, {}},
    {"MPa", pressure, 1e6, 0.0, {"N/mm2"}},
    {"Pa", pressure, 1.0, 0.0, {"N/m2"}},
    {"kgf/cm²", pressure, exactly(gravity * 1e4L), 0.0, {"kgf/cm2", "kg/cm2", "kp/cm2", "at"}},
    {"psi", pressure, exactly(pound_force_per_square_inch), 0.0, {"lbf/in2", "lb/in2"}},
    {"mmH2O", pressure, exactly(gravity), 0.0, {"mmWC", "mmWG", "mmWS"}},
    {"mmHg", pressure, exactly(mercury), 0.0, {}},
    {"inHg", pressure, exactly(inch_of_mercury), 0.0, {}},
    {"inH2O", pressure, exactly(inch_of_water), 0.0, {"inWC", "inWG"}},
    {"atm", pressure, 101325.0, 0.0, {}},

    {"r/min", rotation, exactly(1 / minute), 0.0, {"1/min", "rpm", "rev/min", "min-1", "U/min"}},
    {"1/s", rotation, 1.0, 0.0, {"r/s", "rev/s", "rps", "s-1", "Hz"}},

    {"kW", power, 1e3, 0.0, {}},
    {"MW", power, 1e6, 0.0, {}},
    {"W", power, 1.0, 0.0, {}},
    {"PS", power, exactly(metric_horsepower), 0.0, {}},
    {"hp", power, exactly(horsepower), 0.0, {}},

    {"kNm", torque, 1e3, 0.0, {}},
    {"Nm", torque, 1.0, 0.0, {}},
    {"MNm", torque, 1e6, 0.0, {}},
    {"kgf·m", torque, exactly(gravity), 0.0, {"kgfm", "kpm"}},

    {"kg/h", mass_flow, exactly(1 / hour), 0.0, {}},
    {"t/h", mass_flow, exactly(1000 / hour), 0.0, {}},
    {"t/24h", mass_flow, exactly(1000 / day), 0.0, {}},
    {"kg/24h", mass_flow, exactly(1 / day), 0.0, {}},
    {"kg/min", mass_flow, exactly(1 / minute), 0.0, {}},
    {"kg/s", mass_flow, 1.0, 0.0, {}},
    {"g/s", mass_flow, 1e-3, 0.0, {}},

    {"l/h", volume_flow, exactly(1e-3L / hour), 0.0, {"L/h", "dm3/h"}},
    {"l/24h", volume_flow, exactly(1e-3L / day), 0.0, {"L/24h"}},
    {"l/min", volume_flow, exactly(1e-3L / minute), 0.0, {"L/min"}},
    {"m³/h", volume_flow, exactly(1 / hour), 0.0, {"m3/h"}},
    {"USgal/h", volume_flow, exactly(us_gallon / hour), 0.0, {}},

    {"MJ/kg", specific_energy, 1e6, 0.0, {}},
    {"kJ/kg", specific_energy, 1e3, 0.0, {}},
    {"J/kg", specific_energy, 1.0, 0.0, {}},
    {"kcal/kg", specific_energy, 4186.8, 0.0, {}}, // International Table calorie, NIST SP 811
    {"Btu/lb", specific_energy, 2326.0, 0.0, {}},  // International Table, NIST SP 811

    {"g/kWh", specific_consumption, exactly(1e-3L / joule_per_kilowatt_hour), 0.0, {}},
    {"kg/kWh", specific_consumption, exactly(1 / joule_per_kilowatt_hour), 0.0, {}},
    {"g/PSh", specific_consumption, exactly(1e-3L / (metric_horsepower * hour)), 0.0, {}},
    {"lb/hph", specific_consumption, exactly(pound / (horsepower * hour)), 0.0, {}},

    {"m", length, 1.0, 0.0, {}},
    {"cm", length, 0.01, 0.0, {}},
    {"mm", length, 1e-3, 0.0, {}},
    {"ft", length, exactly(foot), 0.0, {}},
    {"nmi", length, 1852.0, 0.0, {}},

    {"deg", angle, exactly(pi / 180), 0.0, {"degCA"}},
    {"rad", angle, 1.0, 0.0, {}},

    {"h", duration, exactly(hour), 0.0, {"hr", "hrs", "hours"}},
    {"min", duration, exactly(minute), 0.0, {"minutes"}},
    {"s", duration, 1.0, 0.0, {}},

    {"kn", velocity, exactly(1852 / hour), 0.0, {"kt", "kts", "knots"}},
    {"m/s", velocity, 1.0, 0.0, {}},
    {"mm/s", velocity, 1e-3, 0.0, {}},
    {"km/h", velocity, exactly(1000 / hour), 0.0, {}},

    // WMO Beaufort scale: mean wind speed in m/s is 0.836 times the force to the power 1.5, 10 m above the
    // sea.
    {"Beaufort", wind_force, 0.836, 0.0, {"Bft"}},

    {"kg/m³", density, 1.0, 0.0, {"kg/m3", "g/l", "g/L"}},
    {"g/cm³", density, 1e3, 0.0, {"g/cm3", "kg/l", "kg/L", "kg/dm3", "t/m3"}},

    {"mm²/s", viscosity, 1e-6, 0.0, {"mm2/s", "cSt"}},
    {"m²/s", viscosity, 1.0, 0.0, {"m2/s"}},

    {"t", mass, 1e3, 0.0, {}},
    {"kg", mass, 1.0, 0.0, {}},
};
constexpr UnitId unit_count = static_cast<UnitId>(std::size(table));

/// Spellings whose other cases are units of their own: kN is a force, nm a length or a nautical mile.
constexpr std::string_view only_in_this_case[] = {"kn", "Nm"};

constexpr char lower(char letter)
{
    return letter >= 'A' && letter <= 'Z' ? static_cast<char>(letter + 32) : letter;
}

/// Empty is all zeros: g++ 12 writes other default values of a constant array's untouched elements as zeros.
struct Spelling
{
    std::string_view text;
    UnitId id = 0;
    bool used = false;
};

/// FNV-1a over the letters, in lower case where case is not to count.
template <bool any_case> constexpr std::uint32_t hash_of(std::string_view text)
{
    std::uint32_t hash = 2166136261U;
    for (const char letter : text) {
        hash = (hash ^ static_cast<unsigned char>(any_case ? lower(letter) : letter)) * 16777619U;
    }
    return hash ^ (hash >> 15);
}

template <bool any_case> constexpr bool alike(std::string_view a, std::string_view b)
{
    return any_case ? std::equal(a.begin(), a.end(), b.begin(), b.end(),
                                 [](char x, char y) { return lower(x) == lower(y); })
                    : a == b;
}

/// Every spelling in a table with open addressing, built by the compiler: no start-up work, no locks.
template <bool any_case> class SpellingTable
{
public:
    constexpr SpellingTable()
    {
        for (UnitId id = 0; id < unit_count; ++id) {
            const Unit& entry = table[id];
            add({entry.symbol, id, true});
            for (const std::string_view spelling : entry.spellings) {
                add({spelling, id, true});
            }
        }
    }

    /// The spelling, or an unused one where it is not in the table.
    constexpr const Spelling& find(std::string_view text) const { return slots_[slot_of(text)]; }

private:
    /// Where the text is, or where it would go.
    constexpr std::uint32_t slot_of(std::string_view text) const
    {
        std::uint32_t slot = hash_of<any_case>(text) % slots;
        while (slots_[slot].used && !alike<any_case>(slots_[slot].text, text)) {
            slot = (slot + 1) % slots;
        }
        return slot;
    }

    constexpr void add(Spelling spelling)
    {
        const std::uint32_t slot = slot_of(spelling.text);
        if (slots_[slot].used && slots_[slot].id != spelling.id) {
            throw std::logic_error("one spelling for two units"); // does not compile
        }
        slots_[slot] = spelling;
    }

    static constexpr std::uint32_t slots = 512; // a third full: most searches end at the first slot
    std::array<Spelling, slots> slots_{};
};

constexpr SpellingTable<false> exact_spellings;
constexpr SpellingTable<true> spellings_in_any_case;

/// Whether `written` may stand for `listed` although the case differs. A first m or M is milli or mega,
/// and a single letter in the other case is another unit (K kelvin, k kilo; h hour, H henry).
bool other_case_is_safe(std::string_view written, std::string_view listed)
{
    if (listed.size() < 2 || std::find(std::begin(only_in_this_case), std::end(only_in_this_case), listed) !=
                                 std::end(only_in_this_case)) {
        return false;
    }
    return lower(listed[0]) != 'm' || listed[0] == written[0];
}

/// Levenshtein distance without regard to case; both texts at most 31 bytes.
int distance(std::string_view a, std::string_view b)
{
    std::array<int, 33> row{};
    for (std::size_t column = 0; column <= b.size(); ++column) {
        row[column] = static_cast<int>(column);
    }
    for (std::size_t line = 0; line < a.size(); ++line) {
        int diagonal = row[0]++;
        for (std::size_t column = 0; column < b.size(); ++column) {
            const int replaced = diagonal + (lower(a[line]) == lower(b[column]) ? 0 : 1);
            diagonal = row[column + 1];
            row[column + 1] = std::min({replaced, diagonal + 1, row[column] + 1});
        }
    }
    return row[b.size()];
}

} // namespace

std::span<const Unit> all_units()
{
    return table;
}

const Unit& unit(UnitId id)
{
    if (id < 0 || id >= unit_count) {
        throw std::out_of_range("unit number outside the catalogue");
    }
    return table[id];
}

std::string_view dimension_text(Dimension dimension)
{
    switch (dimension) {
    case number:
        return "bare number";
    case share:
        return "share";
    case temperature:
        return "temperature";
    case pressure:
        return "pressure";
    case rotation:
        return "speed of rotation";
    case power:
        return "power";
    case torque:
        return "torque";
    case mass_flow:
        return "mass flow";
    case volume_flow:
        return "volume flow";
    case specific_energy:
        return "heating value";
    case specific_consumption:
        return "specific consumption";
    case length:
        return "length";
    case angle:
        return "angle";
    case duration:
        return "duration";
    case velocity:
        return "velocity";
    case wind_force:
        return "wind force";
    case density:
        return "density";
    case viscosity:
        return "viscosity";
    case mass:
        return "mass";
    }
    throw std::logic_error("dimension without a name");
}

namespace unit_list {

UnitId find_exact(std::string_view spelling)
{
    const Spelling& found = exact_spellings.find(spelling);
    return found.used ? found.id : no_unit;
}

UnitId find_other_case(std::string_view spelling)
{
    const Spelling& found = spellings_in_any_case.find(spelling);
    return found.used && other_case_is_safe(spelling, found.text) ? found.id : no_unit;
}

UnitId find_any_case(std::string_view spelling)
{
    const Spelling& found = spellings_in_any_case.find(spelling);
    return found.used ? found.id : no_unit;
}

UnitId find_nearest(std::string_view spelling)
{
    UnitId nearest = no_unit;
    int smallest = static_cast<int>(spelling.size() + 1) / 2; // more than half of it wrong is no likeness
    for (UnitId id = 0; id < unit_count; ++id) {
        const auto consider = [&](std::string_view candidate) {
            const int steps = distance(spelling, candidate);
            if (steps < smallest && !candidate.empty()) {
                smallest = steps;
                nearest = id;
            }
        };
        consider(table[id].symbol);
        std::for_each(table[id].spellings.begin(), table[id].spellings.end(), consider);
    }
    return nearest;
}

} // namespace unit_list
} // namespace evenstroke
