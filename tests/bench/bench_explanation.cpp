// SPDX-License-Identifier: GPL-3.0-or-later
// Which cause is named for simulated faults: share first and among the first three, what is mistaken for what, how
// often a sound engine is said to be out of the usual, and what an explanation costs. Nothing fails on a figure.
//
// bench_explanation [engines a fault, default 60] [sound engines, default 400] [seed] [fault]
#include "tests/bench/processor_time.h"
#include "tests/core/fleet_faults.h"
#include "core/simulation/fleet_tally.h"

#include "core/explanation/explanation.h"

#include <algorithm>
#include <cstdio>
#include <cstdlib>
#include <map>

using namespace evenstroke;
using namespace evenstroke::simulation;

namespace {

struct Counts
{
    std::size_t trials = 0, claimed = 0, first = 0, three = 0, others = 0, equals = 0, true_in_equals = 0;
    std::map<std::string, std::size_t> named; ///< what came first

    void add(const FaultOutcome& outcome)
    {
        ++trials;
        claimed += outcome.claimed ? 1 : 0;
        first += outcome.rank == 1 ? 1 : 0;
        three += outcome.rank >= 1 && outcome.rank <= 3 ? 1 : 0;
        others += outcome.other_subjects;
        equals += outcome.equals_said ? 1 : 0;
        true_in_equals += outcome.equals_said && outcome.true_among_equals ? 1 : 0;
        ++named[!outcome.claimed ? "(as usual)" : outcome.first.empty() ? "(none of the list)" : outcome.first];
    }
    void add(const Counts& other)
    {
        trials += other.trials;
        claimed += other.claimed;
        first += other.first;
        three += other.three;
        others += other.others;
        equals += other.equals;
        true_in_equals += other.true_in_equals;
    }
};

std::string share(std::size_t count, std::size_t of)
{
    if (of == 0)
        return "-";
    const Interval interval = binomial_interval(count, of);
    char text[64];
    std::snprintf(text, sizeof text, "%5.1f %% (%.1f to %.1f)", 100.0 * static_cast<double>(count) / static_cast<double>(of),
                  100.0 * interval.low, 100.0 * interval.high);
    return text;
}

void print(const char* name, const Counts& counts)
{
    std::printf("%-28s first %s  three %s  claimed %s  others %.2f  equals %zu of them true %zu\n", name,
                share(counts.first, counts.trials).c_str(), share(counts.three, counts.trials).c_str(),
                share(counts.claimed, counts.trials).c_str(),
                static_cast<double>(counts.others) / static_cast<double>(counts.trials), counts.equals, counts.true_in_equals);
}

void print_confusion(const std::string& fault, const Counts& counts)
{
    std::vector<std::pair<std::size_t, std::string>> named;
    for (const auto& [cause, count] : counts.named)
        if (cause != fault)
            named.emplace_back(count, cause);
    std::sort(named.rbegin(), named.rend());
    for (const auto& [count, cause] : named)
        std::printf("        %3zu named first: %s\n", count, cause.c_str());
}

Counts run(FaultRecipe recipe, std::size_t engines, std::uint64_t seed)
{
    Counts counts;
    for (std::size_t n = 0; n < engines; ++n)
        counts.add(judge_trial(simulate_fault(recipe, seed + n)));
    return counts;
}

void print_over_all(const char* name, FaultRecipe recipe, std::size_t each, std::uint64_t seed, bool told_apart_only)
{
    Counts of;
    std::size_t number = 0;
    for (const std::string& fault : simulated_faults()) {
        recipe.fault = fault;
        ++number;
        if (fault == "indicator_dead_centre" && recipe.cards == false)
            continue; // says nothing without diagrams
        for (std::size_t n = 0; n < each; ++n) {
            const FaultTrial trial = simulate_fault(recipe, seed + 100'000 * number + n);
            if (!told_apart_only || can_be_told_apart(trial))
                of.add(judge_trial(trial));
        }
    }
    print(name, of);
}

/// The share explained alone as the order, for comparison: at the same change, and whether or not it is claimed.
void print_plain_ranking(std::size_t each, std::uint64_t seed)
{
    FaultRecipe recipe;
    recipe.fewest_after = 6;
    std::size_t first = 0, three = 0, trials = 0, number = 0;
    for (const std::string& fault : simulated_faults()) {
        recipe.fault = fault;
        ++number;
        for (std::size_t n = 0; n < each; ++n) {
            const FaultTrial trial = simulate_fault(recipe, seed + 100'000 * number + n);
            if (!can_be_told_apart(trial))
                continue;
            const int rank = rank_plainly(trial);
            ++trials;
            first += rank == 1 ? 1 : 0;
            three += rank >= 1 && rank <= 3 ? 1 : 0;
        }
    }
    std::printf("ordered by share explained   first %s  three %s\n", share(first, trials).c_str(), share(three, trials).c_str());
}

void print_sound(const char* name, FaultRecipe recipe, std::size_t engines, std::uint64_t seed)
{
    std::size_t with_any = 0, subjects = 0, slips = 0;
    for (std::size_t n = 0; n < engines; ++n) {
        const FaultOutcome outcome = judge_trial(simulate_fault(recipe, seed + n));
        const std::size_t claimed = outcome.other_subjects;
        slips += outcome.slips;
        with_any += claimed > 0 ? 1 : 0;
        subjects += claimed;
    }
    std::printf("%-28s something out of the usual at the last reading: %s of %zu engines, %zu subjects; miswritten only: %zu\n",
                name, share(with_any, engines).c_str(), engines, subjects, slips);
}

void print_cost()
{
    FaultRecipe recipe;
    recipe.fault = "exhaust_valve_leak";
    double judging = 0.0, explaining = 0.0;
    constexpr int runs = 20;
    for (int n = 0; n < runs; ++n) {
        const FaultTrial trial = simulate_fault(recipe, 77 + static_cast<std::uint64_t>(n));
        double start = processor_ms();
        const Judgement judgement = judge(trial.record);
        judging += processor_ms() - start;
        start = processor_ms();
        const Explanation explanation = explain(judgement);
        explaining += processor_ms() - start;
    }
    std::printf("judging one engine %.2f ms, explaining its last reading %.2f ms (ratio %.2f)\n", judging / runs,
                explaining / runs, explaining / judging);
}

} // namespace

int main(int count, char** arguments)
{
    const auto argument = [&](int at, unsigned long otherwise) {
        return count > at ? std::strtoul(arguments[at], nullptr, 10) : otherwise;
    };
    const std::size_t each = argument(1, 20), sound = argument(2, 200);
    const std::uint64_t seed = argument(3, 52'000'000);
    print_cost();
    if (sound > 0) {
        FaultRecipe recipe;
        print_sound("sound", recipe, sound, seed);
        recipe.unrecorded_work = true;
        print_sound("work left out of the events", recipe, sound, seed + 50'000);
    }
    Counts all;
    std::size_t number = 0;
    for (const std::string& fault : simulated_faults()) {
        ++number;
        if (count > 4 && fault != arguments[4])
            continue;
        FaultRecipe recipe;
        recipe.fault = fault;
        const Counts counts = run(recipe, each, seed + 100'000 * number);
        print(fault.c_str(), counts);
        print_confusion(fault, counts);
        std::fflush(stdout);
        all.add(counts);
    }
    print("all", all);
    for (const bool cards : {true, false}) {
        FaultRecipe recipe;
        recipe.cards = cards;
        if (count <= 4)
            print_over_all(cards ? "all, with diagrams" : "all, peak gauge only", recipe, each / 2, seed + 50'000, false);
    }
    FaultRecipe later;
    later.fewest_after = 6;
    if (count <= 4) {
        print_over_all("all, six readings since", later, each, seed + 60'000, false);
        print_over_all("those that can be told apart", later, each, seed + 60'000, true);
        later.cards = later.gauges = true;
        print_over_all("... everything read", later, each / 2, seed + 70'000, true);
        print_plain_ranking(each / 2, seed + 60'000);
    }
}
