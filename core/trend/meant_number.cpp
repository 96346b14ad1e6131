// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/meant_number.h"

#include "core/trend/typing_slips.h"

#include <array>
#include <charconv>
#include <cmath>

namespace evenstroke {
namespace {

/// How near the number meant must come, and how far the typed one must be away. Invented.
constexpr double near_enough = 0.05, numbers_apart = 1.5;

std::string three_digits(double number)
{
    std::array<char, 40> buffer{};
    const bool large = std::abs(number) >= 1000.0;
    const auto written = std::to_chars(buffer.data(), buffer.data() + buffer.size(), number,
                                       large ? std::chars_format::fixed : std::chars_format::general, large ? 0 : 3);
    return written.ec == std::errc{} ? std::string(buffer.data(), written.ptr) : std::string();
}

} // namespace

std::optional<MeantNumber> guess_meant_number(const Value& value, double own, std::span<const NumberReference> references)
{
    const Quantity& meant = quantity(value.quantity);
    const bool own_kind = value.kind == PressureKind::none || value.kind == meant.kind;
    if (!value.number || !own_kind || unit(value.unit).dimension != unit(meant.unit).dimension)
        return std::nullopt;
    const std::string typed = value.typed.empty() ? drift::plain_text(*value.number) : value.typed;
    for (const NumberReference& reference : references) {
        const double ratio = own / reference.value;
        if (!std::isfinite(ratio) || !(ratio > 0.0) || (ratio < numbers_apart && ratio > 1.0 / numbers_apart))
            continue;
        const auto best = drift::best_trial(typed, [&](double number) {
            const double would_be = unit(meant.unit).from_si(unit(value.unit).to_si(number));
            return std::abs(would_be / reference.value - 1.0);
        });
        if (!best || !(best->distance <= near_enough))
            continue;
        const std::string symbol(unit(meant.unit).symbol);
        return MeantNumber{best->trial.text, "Was " + best->trial.text + " meant? " + reference.words + " " +
                                                 three_digits(reference.value) + (symbol.empty() ? "" : " " + symbol) + "."};
    }
    return std::nullopt;
}

} // namespace evenstroke
