// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/core/fleet_faults.h"

#include "core/explanation/explanation.h"
#include "core/explanation/hypotheses.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::simulation {

bool can_be_told_apart(const FaultTrial& trial)
{
    const auto read = [&](const char* name) {
        const auto id = find_quantity(name);
        const auto& values = trial.record->readings.back().values;
        return std::any_of(values.begin(), values.end(), [&](const Value& value) { return value.quantity == *id; });
    };
    const std::string& fault = trial.fault;
    if (fault == "liner_wear" || fault == "inlet_valve_leak")
        return false;
    if (fault == "indicator_zero" || fault == "indicator_gain")
        return trial.cards;
    if (fault == "exhaust_back_pressure_high" || fault == "turbine_efficiency_loss")
        return read("exhaust_back_pressure");
    if (fault == "fuel_quantity_error")
        return read("fuel_consumption"); // a meter that nobody reads leaves no trace
    return true;
}

int rank_plainly(const FaultTrial& trial)
{
    const Judgement judgement = judge(trial.record);
    const SeriesMaker maker(judgement);
    const bool of_engine = trial.subject.kind != Place::Kind::cylinder;
    const SubjectSeries series = of_engine ? maker.engine({}) : maker.cylinder(trial.subject.number);
    const auto faults = possible_faults(trial.record->engine, trial.subject, {});
    const auto window = find_change(series, faults, 1);
    if (!window)
        return 0;
    std::vector<std::pair<double, std::string>> ranked;
    for (const Fault* fault : faults)
        if (const auto match = match_plainly(*fault, window->changes); match && match->explained >= 0.5)
            ranked.emplace_back(-match->explained * std::sqrt(match->coverage), fault->id);
    std::sort(ranked.begin(), ranked.end());
    for (std::size_t i = 0; i < ranked.size(); ++i)
        if (ranked[i].second == trial.fault)
            return static_cast<int>(i) + 1;
    return 0;
}

FaultOutcome judge_trial(const FaultTrial& trial)
{
    FaultOutcome outcome;
    outcome.fault = trial.fault;
    const Explanation explanation = explain(judge(trial.record));
    for (const SubjectExplanation& subject : explanation.subjects) {
        if (trial.fault.empty() || subject.subject != trial.subject) {
            ++(subject.history.empty() ? outcome.slips : outcome.other_subjects);
            continue;
        }
        outcome.claimed = true;
        outcome.equals_said = !subject.cannot_tell.empty();
        if (!subject.causes.empty())
            outcome.first = subject.causes.front().fault->id;
        for (const Hypothesis& cause : subject.causes)
            if (cause.fault->id == trial.fault) {
                outcome.rank = cause.rank;
                outcome.explained = cause.explained.value_or(0.0);
                outcome.true_among_equals = cause.rank == 1 || cause.as_likely_as_first;
            }
    }
    return outcome;
}

} // namespace evenstroke::simulation
