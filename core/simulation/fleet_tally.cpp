// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/simulation/fleet_tally.h"

#include <algorithm>
#include <cmath>
#include <set>

namespace evenstroke::simulation {

using drift::Verdict;

namespace {

bool after_unrecorded_work(const SimulatedEngine& engine, const drift::Flag& flag)
{
    constexpr double memory_months = 18.0;
    const auto& months = engine.input.months;
    return std::any_of(engine.unrecorded.begin(), engine.unrecorded.end(), [&](const UnrecordedWork& work) {
        return flag.cylinder == work.cylinder && flag.reading >= work.reading &&
               months[flag.reading] - months[work.reading] < memory_months;
    });
}

void count_flags(const SimulatedEngine& engine, const drift::Output& output, Tally& tally)
{
    const bool faulty = engine.fault != Fault::none;
    const std::size_t end = faulty ? engine.onset : engine.input.readings();
    tally.engine_years += (engine.input.months[end - 1] - engine.input.months.front()) / 12.0;
    std::size_t delay = 0;
    bool asked = false, already = false;
    for (const drift::Flag& flag : output.flags) {
        const bool question = flag.level == drift::Level::ask, right = flag.cylinder == engine.cylinder;
        if (flag.reading < end) {
            const bool work = after_unrecorded_work(engine, flag);
            tally.questions += question ? 1 : 0;
            tally.true_questions += question && work ? 1 : 0;
            tally.false_cylinder += !question && flag.cylinder ? 1 : 0;
            tally.false_engine += !question && !flag.cylinder ? 1 : 0;
            tally.false_after_work += !question && work ? 1 : 0;
            already = already || (faulty && !question && right && flag.reading + 6 >= engine.onset);
            continue;
        }
        const std::size_t readings = flag.reading - engine.onset + 1;
        if (question)
            asked = asked || (right && readings <= 12);
        else if (right && delay == 0)
            delay = readings;
        tally.flags_elsewhere += !question && !right && readings <= 12 ? 1 : 0;
    }
    if (!faulty || (already && delay == 0))
        return; // flagged by mistake just before the onset: cannot be counted
    ++tally.faults;
    tally.delays.push_back(delay);
    const bool found = delay > 0 && delay <= 12;
    tally.found_within_12 += found ? 1 : 0;
    tally.found_or_asked_within_12 += found || asked ? 1 : 0;
}

bool concerns(const drift::Doubt& doubt, const TypingError& error)
{
    if (doubt.reading != error.reading || doubt.verdict == Verdict::unsteady)
        return false;
    const bool shares_cylinder =
        std::any_of(doubt.cylinders.begin(), doubt.cylinders.end(), [&](std::size_t j) {
            return std::find(error.cylinders.begin(), error.cylinders.end(), j) != error.cylinders.end();
        });
    if (error.kind == Verdict::cylinders_swapped)
        return shares_cylinder;
    if (error.kind == Verdict::unit_slip)
        return doubt.quantity == error.quantity;
    return doubt.quantity == error.quantity &&
           (error.cylinders.empty() ? doubt.cylinders.empty() : shares_cylinder);
}

void count_doubts(const SimulatedEngine& engine, const drift::Output& output, Tally& tally)
{
    for (const TypingError& error : engine.errors) {
        ++tally.errors[error.kind];
        const auto caught = [&](const drift::Doubt& doubt) {
            return concerns(doubt, error) &&
                   (error.kind != Verdict::cylinders_swapped || doubt.verdict == error.kind);
        };
        const bool found = std::any_of(output.doubts.begin(), output.doubts.end(), caught);
        tally.caught[error.kind] += found ? 1 : 0;
        constexpr double large = 6.0;
        tally.large_slips += error.size >= large ? 1 : 0;
        tally.large_slips_caught += error.size >= large && found ? 1 : 0;
        tally.named[error.kind] +=
            std::any_of(output.doubts.begin(), output.doubts.end(), [&](const drift::Doubt& doubt) {
                return caught(doubt) && doubt.verdict == error.kind;
            });
    }
    std::set<std::size_t> marked;
    for (const drift::Doubt& doubt : output.doubts) {
        if (doubt.verdict == Verdict::unsteady) {
            marked.insert(doubt.reading);
            continue;
        }
        const std::size_t rows = std::max<std::size_t>(doubt.cylinders.size(), 1);
        tally.doubts += rows;
        const bool cause = std::any_of(engine.errors.begin(), engine.errors.end(),
                                       [&](const TypingError& error) { return concerns(doubt, error); });
        tally.doubts_without_cause += cause ? 0 : rows;
    }
    tally.unsteady += engine.unsteady.size();
    for (const std::size_t i : engine.unsteady)
        tally.unsteady_marked += marked.count(i);
    tally.unsteady_wrongly += marked.size();
    for (const std::size_t i : engine.unsteady)
        tally.unsteady_wrongly -= marked.count(i);
}

} // namespace

void Tally::add(const SimulatedEngine& engine, const drift::Output& output)
{
    ++engines;
    readings += engine.input.readings();
    count_flags(engine, output, *this);
    count_doubts(engine, output, *this);
}

void Tally::add(const Tally& other)
{
    engines += other.engines;
    readings += other.readings;
    engine_years += other.engine_years;
    false_cylinder += other.false_cylinder;
    false_engine += other.false_engine;
    false_after_work += other.false_after_work;
    questions += other.questions;
    true_questions += other.true_questions;
    faults += other.faults;
    found_within_12 += other.found_within_12;
    found_or_asked_within_12 += other.found_or_asked_within_12;
    flags_elsewhere += other.flags_elsewhere;
    delays.insert(delays.end(), other.delays.begin(), other.delays.end());
    for (const auto& [kind, count] : other.errors) {
        errors[kind] += count;
        caught[kind] += other.caught.at(kind);
        named[kind] += other.named.at(kind);
    }
    large_slips += other.large_slips;
    large_slips_caught += other.large_slips_caught;
    doubts += other.doubts;
    doubts_without_cause += other.doubts_without_cause;
    unsteady += other.unsteady;
    unsteady_marked += other.unsteady_marked;
    unsteady_wrongly += other.unsteady_wrongly;
}

double Tally::share_caught(const std::vector<Verdict>& kinds) const
{
    double of = 0.0, got = 0.0;
    for (const Verdict kind : kinds)
        if (const auto found = errors.find(kind); found != errors.end()) {
            of += static_cast<double>(found->second);
            got += static_cast<double>(caught.at(kind));
        }
    return of > 0.0 ? got / of : 0.0;
}

std::size_t Tally::delay_at(double share) const
{
    std::vector<std::size_t> sorted = delays;
    std::sort(sorted.begin(), sorted.end(),
              [](std::size_t one, std::size_t other) { return one - 1 < other - 1; }); // 0 last
    if (sorted.empty())
        return 0;
    const double rank = std::ceil(share * static_cast<double>(sorted.size()));
    return sorted[std::min(sorted.size(), static_cast<std::size_t>(std::max(rank, 1.0))) - 1];
}

Tally judge_fleet(const Recipe& recipe, std::size_t engines, std::uint64_t seed)
{
    Tally tally;
    for (std::size_t e = 0; e < engines; ++e) {
        const SimulatedEngine engine = simulate_engine(recipe, seed + e);
        tally.add(engine, drift::judge(engine.input));
    }
    return tally;
}

} // namespace evenstroke::simulation
