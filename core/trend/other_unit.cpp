// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/other_unit.h"

#include "core/reading/typed_box.h"

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>
#include <vector>

namespace evenstroke {
namespace {

/// How near the value must come, and how far apart two units must be to be told from a change of the engine.
/// Invented.
constexpr double near_enough = 0.05, units_apart = 1.5;
/// Beside a unit that comes near enough, others are named that would do as well. Invented.
constexpr double near_enough_beside = 0.10;
constexpr double same_unit = 1e-6;

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

struct Candidate
{
    UnitId id;
    double would_be; ///< in the quantity's own unit
};

/// Every other unit of the quantity in which the number would be plausible, nearest to the reference first.
std::vector<Candidate> fitting_units(const Value& value, double reference)
{
    const Quantity& meant = quantity(value.quantity);
    std::vector<Candidate> candidates;
    for (const WrittenUnit& written : possible_units(value.quantity)) {
        if (written.kind != meant.kind || written.id == value.unit ||
            unit(written.id).dimension != unit(meant.unit).dimension)
            continue;
        const double would_be = unit(meant.unit).from_si(unit(written.id).to_si(*value.number));
        const bool twice = std::any_of(candidates.begin(), candidates.end(), [&](const Candidate& one) {
            return apart(one.would_be, would_be) < same_unit; // kilopascal and the like under another name
        });
        if (!twice && apart(would_be, reference) <= near_enough_beside)
            candidates.push_back({written.id, would_be});
    }
    std::stable_sort(candidates.begin(), candidates.end(), [&](const Candidate& a, const Candidate& b) {
        return apart(a.would_be, reference) < apart(b.would_be, reference);
    });
    if (!candidates.empty() && apart(candidates.front().would_be, reference) > near_enough)
        candidates.clear();
    return candidates;
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
    const std::vector<Candidate> candidates = fitting_units(value, reference);
    if (candidates.empty())
        return std::nullopt;
    const std::string typed = value.typed.empty() ? short_number(*value.number) : value.typed;
    const std::string own_symbol = " " + std::string(unit(meant.unit).symbol);
    const auto in_other = [&](const Candidate& one) { return typed + " " + std::string(unit(one.id).symbol); };
    std::string would_be;
    for (const Candidate& one : candidates)
        would_be += (would_be.empty() ? "" : ", ") + in_other(one) + " would be " + short_number(one.would_be) + own_symbol;
    OtherUnit found;
    found.suggestion = in_other(candidates.front());
    if (candidates.size() > 1)
        found.second = in_other(candidates[1]);
    found.sentence = "In another unit? " + typed + " " + std::string(unit(value.unit).symbol) + " stands here; " + would_be +
                     ", " + reference_words + " " + short_number(reference) + own_symbol + ". Look at the gauge's face.";
    return found;
}

} // namespace evenstroke
