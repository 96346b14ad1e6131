// SPDX-License-Identifier: GPL-3.0-or-later
// What judging costs: one engine of 12 cylinders with 10 years of monthly readings (aim: at most 20 ms), and one
// draft against its history, as at every value typed. Prints processor time; nothing fails on it.
#include "core/trend/drift_input.h"
#include "tests/bench/processor_time.h"
#include "tests/core/example_engine.h"

#include <algorithm>
#include <cstdint>
#include <cstdio>

using namespace evenstroke;

namespace {

EngineRecord twelve_cylinders(std::size_t readings)
{
    EngineRecord record = example_record(readings);
    record.engine.cylinders = 12;
    for (Reading& reading : record.readings) {
        const std::size_t own = reading.values.size();
        for (std::size_t i = 0; i < own; ++i)
            if (reading.values[i].place.kind == Place::Kind::cylinder) {
                Value value = reading.values[i];
                value.place.number += 6;
                reading.values.push_back(std::move(value));
            }
    }
    return record;
}

/// A yardstick: how fast this machine is just now, and how busy.
void sort_numbers()
{
    std::vector<double> numbers(200000);
    std::uint64_t state = 1;
    for (double& number : numbers) {
        state = state * 6364136223846793005u + 1442695040888963407u; // Knuth, MMIX
        number = static_cast<double>(state >> 11);
    }
    std::sort(numbers.begin(), numbers.end());
}

} // namespace

int main()
{
    const auto record = std::make_shared<const EngineRecord>(twelve_cylinders(120));
    Judgement judgement;
    const double whole = best_of(10, [&] { judgement = judge(record); });
    const Baseline baseline(record->engine);
    std::vector<PreparedReading> prepared;
    const double deviations = best_of(10, [&] {
        prepared.clear();
        for (const Reading& reading : record->readings)
            prepared.push_back(prepare_reading(record->engine, baseline, reading));
    });
    const drift::Input input = make_drift_input(*record, baseline, prepared, std::vector<char>(prepared.size(), 0));
    const double drift = best_of(10, [&] { drift::judge(input); });
    Reading draft = record->readings.back();
    draft.taken_at.utc += std::chrono::hours(24 * 30);
    const double opinion = best_of(10, [&] { judge_draft(judgement, draft); });
    const double yardstick = best_of(10, sort_numbers);
    std::printf("judging 12 cylinders x 120 readings: %.1f ms (deviations %.1f, drift %.1f)\n", whole, deviations, drift);
    std::printf("sorting 200000 numbers on this machine now: %.1f ms; judging takes %.2f times as long\n", yardstick,
                whole / yardstick);
    std::printf("one draft against its history: %.1f ms, %.2f of judging all of it\n", opinion, opinion / whole);
    return 0;
}
