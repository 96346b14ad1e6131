// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/simulation/detection_power.h"

#include "core/plain_text.h"
#include "core/sentence_words.h"
#include "core/simulation/fleet_tables.h"
#include "core/simulation/fleet_tally.h"
#include "core/trend/drift_catalogue.h"
#include "core/trend/drift_input.h"
#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::simulation {
namespace {

constexpr double two_years = 24.0; // months
constexpr std::size_t fewest_readings = 3;

double median_interval(const EngineRecord& record)
{
    std::vector<double> gaps;
    const auto& readings = record.readings;
    for (std::size_t i = 1; i < readings.size(); ++i) {
        const double month = months_of(readings[i].taken_at.utc);
        if (months_of(readings.back().taken_at.utc) - month <= two_years)
            gaps.push_back(month - months_of(readings[i - 1].taken_at.utc));
    }
    const auto middle = drift::median(std::move(gaps));
    return std::clamp(middle.value_or(1.0), 0.1, 12.0);
}

/// The scatter of a trend in the unit in which the drift method works.
std::optional<double> channel_noise(const Trend& trend, const drift::CatalogueChannel& channel)
{
    if (!trend.noise || trend.points.empty())
        return std::nullopt;
    if (channel.form != drift::DeviationForm::percent)
        return trend.noise;
    const double level = std::abs(trend.points.back().expected.value_or(trend.points.back().raw));
    return level > 0.0 ? std::optional(100.0 * *trend.noise / level) : std::nullopt;
}

/// Faults that move something this engine is read for.
std::vector<Fault> faults_seen(const Likeness& likeness)
{
    std::vector<Fault> seen;
    for (const Fault fault : all_faults)
        if (std::any_of(std::begin(effects), std::end(effects), [&](const Effect& effect) {
                return effect.fault == fault && (likeness.cylinder_noise.count(effect.quantity) > 0 ||
                                                 (is_of_engine(fault) && likeness.engine_noise.count(effect.quantity) > 0));
            }))
            seen.push_back(fault);
    return seen;
}

Recipe recipe_for(const Likeness& likeness)
{
    Recipe recipe;
    recipe.fewest_cylinders = recipe.most_cylinders = likeness.cylinders;
    recipe.months_between_readings = likeness.months_between_readings;
    recipe.cylinder_noise = likeness.cylinder_noise;
    recipe.engine_noise = likeness.engine_noise;
    for (const auto& [quantity, noise] : likeness.cylinder_noise)
        recipe.cylinder_quantities.push_back(quantity);
    for (const auto& [quantity, noise] : likeness.engine_noise)
        recipe.engine_quantities.push_back(quantity);
    const std::string none = "none of the engine"; // an empty list would mean the usual ones
    if (recipe.cylinder_quantities.empty())
        recipe.cylinder_quantities.push_back(none);
    if (recipe.engine_quantities.empty())
        recipe.engine_quantities.push_back(none);
    return recipe;
}

} // namespace

std::optional<Likeness> likeness_of(const Judgement& judgement)
{
    if (!judgement.record || judgement.record->readings.size() < fewest_readings || judgement.record->engine.cylinders < 1)
        return std::nullopt;
    Likeness likeness;
    likeness.cylinders = static_cast<std::size_t>(judgement.record->engine.cylinders);
    likeness.readings = judgement.record->readings.size();
    likeness.months_between_readings = median_interval(*judgement.record);
    std::map<std::string, std::vector<double>> of_cylinders;
    for (const Trend& trend : judgement.trends) {
        const std::string& name = quantity(trend.quantity).name;
        const bool cylinder = trend.place.kind == Place::Kind::cylinder;
        const auto* channel = drift::find_channel(name, cylinder ? drift::Subject::cylinder : drift::Subject::engine);
        if (!channel || !channel->evidence || !has_look(name))
            continue;
        const auto noise = channel_noise(trend, *channel);
        if (!noise || !(*noise > 0.0))
            continue;
        if (cylinder)
            of_cylinders[name].push_back(*noise);
        else
            likeness.engine_noise[name] = *noise;
    }
    for (auto& [name, noises] : of_cylinders)
        likeness.cylinder_noise[name] = *drift::median(std::move(noises));
    if (likeness.cylinder_noise.empty() && likeness.engine_noise.empty())
        return std::nullopt;
    return likeness;
}

std::string fault_effect_words(Fault fault)
{
    std::string words;
    for (const Effect& effect : effects) {
        if (effect.fault != fault)
            continue;
        const auto* channel = drift::find_channel(effect.quantity, drift::Subject::cylinder);
        if (!channel)
            channel = drift::find_channel(effect.quantity, drift::Subject::engine);
        const auto id = find_quantity(effect.quantity);
        words += (words.empty() ? "" : ", ") + lower_first(id ? quantity(*id).title : std::string(effect.quantity)) +
                 (effect.amount < 0.0 ? " −" : " +") + short_number_text(std::abs(effect.amount)) +
                 (channel ? " " + channel->unit : "");
    }
    return words + (is_step(fault) ? ", at once" : ", a month");
}

std::optional<DetectionPower> measure_detection_power(const Likeness& likeness, const Effort& effort,
                                                      const std::function<bool(std::size_t, std::size_t)>& go_on)
{
    const std::vector<Fault> faults = faults_seen(likeness);
    const std::size_t of = effort.sound_engines + faults.size() * effort.engines_a_fault;
    std::size_t done = 0;
    Recipe recipe = recipe_for(likeness);
    const auto judge_some = [&](std::size_t engines, std::uint64_t seed) -> std::optional<Tally> {
        Tally tally;
        for (std::size_t e = 0; e < engines; ++e) {
            if (go_on && !go_on(done, of))
                return std::nullopt;
            const SimulatedEngine engine = simulate_engine(recipe, seed + e);
            tally.add(engine, drift::judge(engine.input));
            ++done;
        }
        return tally;
    };
    const auto sound = judge_some(effort.sound_engines, effort.seed);
    if (!sound || !(sound->engine_years > 0.0))
        return std::nullopt;
    DetectionPower power;
    power.engine_years = sound->engine_years;
    power.false_flags = sound->false_cylinder + sound->false_engine;
    power.questions = sound->questions;
    const auto a_year = [&](std::size_t count) {
        const Interval interval = poisson_interval(count);
        return Interval{interval.low / power.engine_years, interval.high / power.engine_years};
    };
    power.false_a_year = a_year(power.false_flags);
    power.questions_a_year = a_year(power.questions);
    for (const Fault fault : faults) {
        recipe.fault = fault;
        const std::uint64_t apart = 1'000'000 * (static_cast<std::uint64_t>(fault) + 1); // no engine is drawn twice
        const auto tally = judge_some(effort.engines_a_fault, effort.seed + apart);
        if (!tally)
            return std::nullopt;
        if (tally->faults > 0)
            power.faults.push_back({fault, tally->faults, tally->found_within_12,
                                    binomial_interval(tally->found_within_12, tally->faults), tally->delay_at(0.5)});
    }
    return power;
}

} // namespace evenstroke::simulation
