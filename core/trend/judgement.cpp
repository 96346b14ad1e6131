// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/judgement.h"

#include <algorithm>

namespace evenstroke {

std::string level_word(Level level)
{
    switch (level) {
    case Level::no_data: return "no data";
    case Level::learning: return "learning";
    case Level::quiet: return "quiet";
    case Level::note: return "note";
    case Level::ask: return "ask";
    case Level::watch: return "watch";
    case Level::act: return "act";
    }
    return {};
}

std::string verdict_name(Doubt::Verdict verdict)
{
    switch (verdict) {
    case Doubt::Verdict::decimal_slip: return "decimal_slip";
    case Doubt::Verdict::digits_swapped: return "digits_swapped";
    case Doubt::Verdict::unit_slip: return "unit_slip";
    case Doubt::Verdict::cylinders_swapped: return "cylinders_swapped";
    case Doubt::Verdict::implausible: return "implausible";
    case Doubt::Verdict::copied: return "copied";
    case Doubt::Verdict::unsteady: return "unsteady";
    }
    return {};
}

const Trend* Judgement::find_trend(QuantityId id, Place place) const
{
    for (const Trend& trend : trends)
        if (trend.quantity == id && trend.place == place)
            return &trend;
    return nullptr;
}

const Evidence* Judgement::find_evidence(Place place) const
{
    for (const Evidence& one : evidence)
        if (one.place == place)
            return &one;
    return nullptr;
}

std::vector<const Flag*> Judgement::standing_flags() const
{
    std::vector<const Flag*> standing;
    for (const Flag& flag : flags)
        if (flag.level_now >= Level::note)
            standing.push_back(&flag);
    std::stable_sort(standing.begin(), standing.end(), [](const Flag* a, const Flag* b) {
        if (a->seen() != b->seen())
            return b->seen();
        if (a->level_now != b->level_now)
            return a->level_now > b->level_now;
        return a->evidence > b->evidence;
    });
    return standing;
}

Level Judgement::level_of(Place subject) const
{
    Level worst = Level::no_data;
    for (const Trend& trend : trends) {
        const bool belongs = subject.kind == Place::Kind::cylinder ? trend.place == subject
                                                                   : trend.place.kind != Place::Kind::cylinder;
        if (belongs)
            worst = std::max(worst, trend.level);
    }
    return worst;
}

} // namespace evenstroke
