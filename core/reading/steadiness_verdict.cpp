// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/engine.h"
#include "core/reading/steadiness.h"

#include <algorithm>

namespace evenstroke {
namespace {

bool decides_over(const SteadinessFinding& finding, const SteadinessFinding& other)
{
    return finding.verdict != other.verdict ? finding.verdict > other.verdict
                                            : finding.severity > other.severity;
}

/// What was asked for beside the two lines and was not noted; it is said, never guessed.
std::string not_noted(bool settled_known, bool walk_known)
{
    if (settled_known && walk_known)
        return {};
    return settled_known ? " How long the walk took was not noted."
           : walk_known
               ? " How long the setting had been unchanged was not noted."
               : " How long the setting had been unchanged and how long the walk took were not noted.";
}

} // namespace

std::string steadiness_word(Steadiness steadiness)
{
    switch (steadiness) {
    case Steadiness::steady:
        return "steady";
    case Steadiness::usable_with_care:
        return "usable with care";
    case Steadiness::unsteady:
        return "unsteady";
    default:
        return "not judged";
    }
}

bool is_generating_set(const Engine& engine, std::span<const Reading> readings)
{
    if (engine.two_stroke())
        return false;
    const auto power = find_quantity("generator_power", Place::Kind::engine);
    return std::any_of(readings.begin(), readings.end(), [&](const Reading& reading) {
        return power && reading.find(*power, Place::engine()) != nullptr;
    });
}

SteadinessVerdict judge_steadiness(const Reading& reading, bool generating_set)
{
    const auto settled_minutes = find_quantity("settled_minutes", Place::Kind::engine);
    const auto walk_time = find_quantity("quick_line_time", Place::Kind::engine);
    SteadinessFinding deciding;
    bool any_pair = false, settled_known = false, walk_known = false;
    for (const SteadinessFinding& finding : steadiness_findings(reading, generating_set)) {
        any_pair = any_pair || finding.from_pair;
        settled_known = settled_known || finding.quantity == settled_minutes;
        walk_known = walk_known || finding.quantity == walk_time;
        if (deciding.verdict == Steadiness::not_judged || decides_over(finding, deciding))
            deciding = finding;
    }
    if (!any_pair)
        return {Steadiness::not_judged,
                "Not judged: no value was noted both just before and just after the walk. "
                "Fill in the two quick lines."};
    std::string sentence = steadiness_word(deciding.verdict);
    sentence[0] = static_cast<char>(sentence[0] - 'a' + 'A');
    sentence += deciding.verdict == Steadiness::steady ? ": nearest to its limit, " : ": ";
    return {deciding.verdict, sentence + deciding.words + "." + not_noted(settled_known, walk_known)};
}

} // namespace evenstroke
