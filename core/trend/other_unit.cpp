// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/other_unit.h"

#include "core/reading/typed_box.h"

#include <array>
#include <charconv>
#include <cmath>

namespace evenstroke {
namespace {

/// How near the value must come, and how far apart two units must be to be told from a change of the engine.
/// Invented.
constexpr double near_enough = 0.05, units_apart = 1.5;

double apart(double value, double reference)
{
    return std::abs(value / reference - 1.0);
}

/// "7.06": three digits are enough to compare by eye.
std::string short_number(double number)
{
    std::array<char, 40> buffer{};
    const auto written = std::to_chars(buffer.data(), buffer.data() + buffer.size(), number,
                                       std::abs(number) >= 1000.0 ? std::chars_format::fixed
                                                                  : std::chars_format::general,
                                       std::abs(number) >= 1000.0 ? 0 : 3);
    return written.ec == std::errc{} ? std::string(buffer.data(), written.ptr) : std::string();
}

} // namespace

std::optional<OtherUnit> guess_other_unit(const Value& value, double own, double reference,
                                          const std::string& reference_words)
{
    const Quantity& meant = quantity(value.quantity);
    const bool own_kind = value.kind == PressureKind::none || value.kind == meant.kind;
    if (!value.number || value.place.kind == Place::Kind::ship || !own_kind || own == 0.0 ||
        !(own / reference > 0.0) || !std::isfinite(own / reference))
        return std::nullopt;
    const double ratio = own / reference;
    if (ratio < units_apart && ratio > 1.0 / units_apart)
        return std::nullopt;
    std::optional<double> best;
    UnitId found = value.unit;
    for (const WrittenUnit& written : possible_units(value.quantity)) {
        if (written.kind != meant.kind || written.id == value.unit ||
            unit(written.id).dimension != unit(meant.unit).dimension)
            continue;
        const double would_be = unit(meant.unit).from_si(unit(written.id).to_si(*value.number));
        if (apart(would_be, reference) <= near_enough && (!best || apart(would_be, reference) < apart(*best, reference))) {
            best = would_be;
            found = written.id;
        }
    }
    if (!best)
        return std::nullopt;
    const std::string typed = value.typed.empty() ? short_number(*value.number) : value.typed;
    const std::string other = typed + " " + std::string(unit(found).symbol),
                      own_symbol = " " + std::string(unit(meant.unit).symbol);
    return OtherUnit{other, "In another unit? " + typed + " " + std::string(unit(value.unit).symbol) +
                                " stands here; " + other + " would be " + short_number(*best) + own_symbol +
                                ", " + reference_words + " " + short_number(reference) + own_symbol +
                                ". Look at the gauge's face."};
}

} // namespace evenstroke
