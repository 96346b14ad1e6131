// SPDX-License-Identifier: GPL-3.0-or-later
// What the drift scan reaches on many simulated engines, and what it costs: one engine of 12 cylinders with
// 10 years of monthly readings (aim: at most 20 ms, all of the judging together). Nothing fails on a figure
// here.
//
// bench_drift [engines without a fault, default 400] [engines per fault, default 60] [seed]
#include "tests/bench/processor_time.h"
#include "core/simulation/fleet_tally.h"

#include "core/trend/drift_catalogue.h"

#include <algorithm>
#include <cstdio>
#include <cstdlib>

using namespace evenstroke;
using namespace evenstroke::simulation;

namespace {

void print_cost()
{
    Recipe recipe;
    recipe.fewest_cylinders = recipe.most_cylinders = 12;
    recipe.readings = 120;
    const SimulatedEngine engine = simulate_engine(recipe, 1);
    double best = 1e300, draft = 1e300;
    for (int run = 0; run < 10; ++run) {
        double start = processor_ms();
        drift::judge(engine.input);
        best = std::min(best, processor_ms() - start);
        start = processor_ms();
        drift::check_last_reading(engine.input);
        draft = std::min(draft, processor_ms() - start);
    }
    std::printf("12 cylinders, 120 readings: %.2f ms; one draft against the 119 before it: %.2f ms\n", best,
                draft);
}

double per_year(std::size_t count, const Tally& tally)
{
    return static_cast<double>(count) / tally.engine_years;
}

void print_sound(const char* what, const Recipe& recipe, std::size_t engines, std::uint64_t seed)
{
    const Tally tally = judge_fleet(recipe, engines, seed);
    const std::size_t all = tally.false_cylinder + tally.false_engine;
    const Interval interval = poisson_interval(all);
    std::printf("%-34s %6.0f engine-years: false %.3f a year (%.3f-%.3f), cylinders %.3f (%.3f after "
                "unrecorded work), engine "
                "%.3f; questions %.3f, %.0f %% true\n",
                what, tally.engine_years, per_year(all, tally), interval.low / tally.engine_years,
                interval.high / tally.engine_years, per_year(tally.false_cylinder, tally),
                per_year(tally.false_after_work, tally), per_year(tally.false_engine, tally),
                tally.questions_per_year(),
                tally.questions
                    ? 100.0 * static_cast<double>(tally.true_questions) / static_cast<double>(tally.questions)
                    : 0.0);
    if (recipe.typing_errors > 0.0)
        std::printf(
            "%-34s caught: point %.1f %%, digits %.1f %% (of 6 noise or more %.1f %%), unit %.1f %%, "
            "exchanged %.1f %%; without "
            "cause %.2f per 100 readings; unsteady %.0f %% marked, %.2f per 100 wrongly\n",
            "", 100.0 * tally.share_caught({drift::Verdict::decimal_slip}),
            100.0 * tally.share_caught({drift::Verdict::digits_swapped}),
            100.0 * tally.share_of_large_slips(), 100.0 * tally.share_caught({drift::Verdict::unit_slip}),
            100.0 * tally.share_caught({drift::Verdict::cylinders_swapped}),
            tally.doubts_without_cause_per_100(),
            100.0 * static_cast<double>(tally.unsteady_marked) /
                static_cast<double>(std::max<std::size_t>(tally.unsteady, 1)),
            100.0 * static_cast<double>(tally.unsteady_wrongly) / static_cast<double>(tally.readings));
    std::fflush(stdout);
}

void print_delay(const char* what, const Tally& tally)
{
    const auto or_never = [](std::size_t delay) {
        return delay == 0 ? std::string("-") : std::to_string(delay);
    };
    std::printf("%-22s %4zu engines: median %2s, 90th %2s readings; within 12: %.0f %%, with questions %.0f "
                "%%; elsewhere %.2f\n",
                what, tally.faults, or_never(tally.delay_at(0.5)).c_str(),
                or_never(tally.delay_at(0.9)).c_str(), 100.0 * tally.share_within_12(),
                100.0 * static_cast<double>(tally.found_or_asked_within_12) /
                    static_cast<double>(tally.faults),
                static_cast<double>(tally.flags_elsewhere) / static_cast<double>(tally.faults));
    std::fflush(stdout);
}

/// With the quantities of the catalogue that the thresholds were not calibrated for as well.
Recipe with_all_quantities()
{
    Recipe recipe;
    for (const drift::CatalogueChannel& channel : drift::channel_catalogue()) {
        if (channel.subject == drift::Subject::cylinder)
            recipe.cylinder_quantities.push_back(channel.quantity);
        if (channel.subject == drift::Subject::engine)
            recipe.engine_quantities.push_back(channel.quantity);
    }
    return recipe;
}

} // namespace

int main(int count, char** arguments)
{
    const auto argument = [&](int at, unsigned long otherwise) {
        return count > at ? std::strtoul(arguments[at], nullptr, 10) : otherwise;
    };
    const std::size_t sound = argument(1, 400), faulty = argument(2, 60);
    const std::uint64_t seed = argument(3, 910'000'000);
    print_cost();
    const Recipe usual;
    Recipe recorded = usual, noisy = usual, quiet = usual, four_stroke = usual;
    recorded.unrecorded_share = 0.0;
    noisy.noise_factor = 1.5;
    quiet.noise_factor = 0.7;
    four_stroke.cylinder_quantities = {"mean_indicated_pressure",   "maximum_pressure",
                                       "compression_pressure",      "exhaust_temperature",
                                       "jacket_outlet_temperature", "fuel_index"};
    print_sound("10 % of the work unrecorded", usual, sound, seed);
    print_sound("all work recorded", recorded, sound, seed);
    print_sound("noise 1.5 times the catalogue's", noisy, sound, seed);
    print_sound("noise 0.7 times the catalogue's", quiet, sound, seed);
    print_sound("without piston coolant", four_stroke, sound, seed);
    print_sound("all quantities of the catalogue", with_all_quantities(), sound, seed);
    Tally all;
    for (const Fault fault : all_faults) {
        Recipe recipe = usual;
        recipe.fault = fault;
        const Tally tally =
            judge_fleet(recipe, faulty, seed + 10'000'000 * (1 + static_cast<std::uint64_t>(fault)));
        print_delay(fault_name(fault), tally);
        all.add(tally);
    }
    print_delay("all of them", all);
}
