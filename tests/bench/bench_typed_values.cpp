// SPDX-License-Identifier: GPL-3.0-or-later
// What one row of a file costs in parse_number, find_unit and parse_time, beside strtod on the same text.
// Prints nanoseconds a call; nothing is judged.
#include "core/reading/reading.h"
#include "core/units/unit_catalogue.h"

#include <cstdio>
#include <cstdlib>
#include <ctime>

namespace {

using namespace evenstroke;

constexpr int calls = 5'000'000; // rows of a large fleet's file
double sink = 0.0;               // keeps the compiler from dropping the work

/// Processor time, so that other work on the machine does not count.
template <typename Work> double nanoseconds_a_call(Work work)
{
    const std::clock_t start = std::clock();
    for (int call = 0; call < calls; ++call)
        sink += work(call);
    return 1e9 * static_cast<double>(std::clock() - start) / CLOCKS_PER_SEC / calls;
}

void print(const char* what, double nanoseconds)
{
    std::printf("%-34s %8.1f ns\n", what, nanoseconds);
}

} // namespace

int main()
{
    const char* const numbers[] = {"81.4", "4990", "134.585", "-3,2", "0.0854", "26033", "365.25", "1013"};
    const char* const units[] = {"bar", "degC", "%", "r/min", "mmH2O", "kg/h", "kW", "MJ/kg"};
    const char* const unusual[] = {"bar abs",   "kgf / cm²", "KW",  "mm WC",
                                   "MPa gauge", "deg C",     "Bar", "min⁻¹"};
    const char* const times[] = {"2026-03-14T06:30Z", "2026-03-14T08:30:00+02:00"};
    print("strtod (for comparison)",
          nanoseconds_a_call([&](int call) { return std::strtod(numbers[call % 8], nullptr); }));
    print("parse_number",
          nanoseconds_a_call([&](int call) { return parse_number(numbers[call % 8]).value(); }));
    print("find_unit, spelling as listed",
          nanoseconds_a_call([&](int call) { return find_unit(units[call % 8]).value().id; }));
    print("find_unit, other forms",
          nanoseconds_a_call([&](int call) { return find_unit(unusual[call % 8]).value().id; }));
    print("parse_time", nanoseconds_a_call([&](int call) {
              return static_cast<double>(parse_time(times[call % 2]).value().offset_minutes);
          }));
    return sink == 0.5 ? 1 : 0;
}
