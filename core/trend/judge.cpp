// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/absolute_limits.h"
#include "core/trend/drift_input.h"
#include "core/trend/drift_results.h"
#include "core/trend/flag_notes.h"
#include "core/trend/judgement.h"
#include "core/trend/trend_rows.h"

#include <algorithm>
#include <utility>

namespace evenstroke {
PreparedReading prepare_reading(const Engine& engine, const Baseline& baseline, const Reading& reading)
{
    PreparedReading prepared;
    prepared.conditions = find_conditions(engine, reading);
    prepared.values = judge_values(engine, baseline, reading, prepared.conditions);
    const auto& load = prepared.conditions.load_percent;
    prepared.outside_baseline =
        !engine.baseline.empty() && (!load || !baseline.covers(prepared.conditions.mode, *load));
    return prepared;
}

Judgement judge(std::shared_ptr<const EngineRecord> record, const std::function<bool()>& go_on)
{
    Judgement judgement;
    judgement.record = record;
    const Engine& engine = record->engine;
    const Baseline baseline(engine);
    const bool on_the_grid = is_generating_set(engine, record->readings);
    std::vector<PreparedReading> prepared;
    std::vector<char> unsteady;
    for (std::size_t i = 0; i < record->readings.size(); ++i) {
        if (go_on && !go_on())
            return Judgement{};
        const Reading& reading = record->readings[i];
        prepared.push_back(prepare_reading(engine, baseline, reading));
        prepared.back().derived = derive_trended(DerivedReading(engine, baseline, reading, prepared.back().conditions));
        const SteadinessVerdict steadiness = judge_steadiness(reading, on_the_grid);
        unsteady.push_back(steadiness.verdict == Steadiness::unsteady ? 1 : 0);
        judgement.readings.push_back({i, steadiness.verdict, steadiness.sentence, false,
                                      prepared.back().conditions.load_percent, prepared.back().conditions.mode, {}});
    }
    const drift::Input input = make_drift_input(*record, baseline, prepared, unsteady);
    if (go_on && !go_on())
        return Judgement{};
    const drift::Output output = drift::judge(input);
    if (go_on && !go_on())
        return Judgement{};

    for (std::size_t i = 0; i < prepared.size(); ++i) {
        judgement.readings[i].values = std::move(prepared[i].values); // only the conditions are needed from here on
        if (i < output.readings.size())
            judgement.readings[i].poor = output.readings[i].poor || output.readings[i].unsteady;
    }
    add_doubts(judgement, output);
    add_evidence(judgement, output);
    add_flags(judgement, input, output);
    add_absolute_limit_flags(judgement);
    add_notes(judgement);
    add_trends(judgement, prepared, input, output);
    set_levels(judgement, input, output);
    return judgement;
}

} // namespace evenstroke
