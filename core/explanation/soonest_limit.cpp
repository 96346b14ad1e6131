// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/soonest_limit.h"

#include "core/derived/derived.h"
#include "core/trend/drift.h"
#include "core/trend/drift_input.h"
#include "core/trend/limits_ahead.h"

#include <cmath>

namespace evenstroke {
namespace {

/// Standard deviations from which a quantity counts as moving; with fewer its limit would be guessed at.
constexpr double moves_from = 3.0;
/// Farther than any that is looked for.
constexpr double never = 1e6;

double months_of(const TimeToLimit& time)
{
    return time.months_50.value_or(never);
}

} // namespace

std::optional<SoonestLimit> find_soonest_limit(const Judgement& judgement, const Flag& flag)
{
    if (!flag.ramp || flag.severity == Level::ask || flag.absolute_limit || flag.carrying.empty())
        return std::nullopt;
    std::optional<SoonestLimit> soonest;
    if (flag.time_to_limit)
        soonest = SoonestLimit{flag.quantity, *flag.time_to_limit};
    if (flag.moved.size() < 2)
        return soonest;
    const EngineRecord& record = *judgement.record;
    const Baseline baseline(record.engine);
    std::vector<PreparedReading> prepared;
    std::vector<char> unsteady;
    for (std::size_t i = 0; i < record.readings.size(); ++i) {
        prepared.push_back(prepare_reading(record.engine, baseline, record.readings[i]));
        prepared.back().derived =
            derive_trended(DerivedReading(record.engine, baseline, record.readings[i], prepared.back().conditions));
        unsteady.push_back(judgement.readings[i].steadiness == Steadiness::unsteady ? 1 : 0);
    }
    const drift::Input input = make_drift_input(record, baseline, prepared, unsteady);
    const drift::Output output = drift::judge(input);
    const auto cylinder = flag.subject.kind == Place::Kind::cylinder
                              ? std::optional(static_cast<std::size_t>(flag.subject.number) - 1)
                              : std::nullopt;
    for (const MovedQuantity& moved : flag.moved) {
        if (moved.quantity == flag.quantity || std::abs(moved.strength) < moves_from)
            continue;
        const auto time = limit_ahead_of(record.engine, input, output, cylinder, flag.carrying.back(),
                                         flag.carrying.front(), moved);
        if (time && time->months_50 && (!soonest || months_of(*time) < months_of(soonest->time)))
            soonest = SoonestLimit{moved.quantity, *time};
    }
    return soonest;
}

} // namespace evenstroke
