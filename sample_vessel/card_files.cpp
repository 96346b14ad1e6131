// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/card_files.h"

#include "sample_vessel/card_model.h"
#include "sample_vessel/chance.h"
#include "sample_vessel/cylinder_state.h"
#include "sample_vessel/decimal_text.h"
#include "sample_vessel/reading_maker.h"

#include <algorithm>
#include <charconv>
#include <string>

namespace evenstroke::sample {
namespace {

constexpr double trace_late_deg = 0.3; // of the pick-up, the same for all cylinders; invented
constexpr double zero_off_bar = 0.15;  // invented
constexpr double noise_bar = 0.06;     // mean of 20 cycles; invented
constexpr double trace_step_deg = 0.5;
constexpr double closing_over_receiver_k = 32.0; // warmed by walls and old gas; common practice

double typed(Sheet sheet, const std::string& quantity)
{
    const Line* line = sheet.find(quantity, 0);
    double number = 0.0;
    if (line) // from_chars knows no locale
        std::from_chars(line->value.data(), line->value.data() + line->value.size(), number);
    return number;
}

/// Compression lost past the rings up to this reading, bar.
double lost_by_leak(const Scenario& scenario, int engine, int cylinder, const ShipTime& time)
{
    for (const Fault& fault : scenario.faults)
        if (fault.engine == engine && fault.cylinder == cylinder && fault.cause == "ring_blow_by")
            return -fault.per_month.at("compression_pressure") *
                   std::max(0.0, months_between(day(fault.onset), time.utc));
    return 0.0;
}

CardTarget target_of(const SheetInputs& in, const Sheet& sheet, int cylinder, double barometer_bar)
{
    const auto true_value = [&](const std::string& quantity) { return cylinder_as_read(in, quantity, cylinder); };
    CardTarget target;
    target.scavenge = typed(sheet, "scavenge_pressure") + barometer_bar;
    target.compression = true_value("compression_pressure") + barometer_bar;
    target.maximum = true_value("maximum_pressure") + barometer_bar;
    target.mean_indicated = true_value("mean_indicated_pressure");
    target.lost_by_leak = lost_by_leak(*in.moment.scenario, in.moment.engine->number, cylinder, sheet.time);
    target.speed_rpm = typed(sheet, "speed");
    target.closing_temperature_k = typed(sheet, "scavenge_temperature") + 273.15 + closing_over_receiver_k;
    return target;
}

/// True pressure between two samples; `angle` may lie before the first one.
double pressure_at(const std::vector<double>& pressures, double angle)
{
    const double place = (angle + 180.0) / card_step_deg + static_cast<double>(pressures.size());
    const auto below = static_cast<std::size_t>(place);
    const double share = place - static_cast<double>(below);
    return (1.0 - share) * pressures[below % pressures.size()] +
           share * pressures[(below + 1) % pressures.size()];
}

std::string trace_csv(const std::vector<double>& pressures, const Chance& chance, int engine, int cylinder,
                      int month)
{
    std::string csv = "crank_angle_deg,pressure_bar\n";
    for (int sample = 0; sample < static_cast<int>(360.0 / trace_step_deg); ++sample) {
        const double angle = -180.0 + trace_step_deg * sample;
        const double noise = noise_bar * chance.normal({"card", engine, cylinder * 1000 + sample, month});
        csv += decimal_text(angle, 1) + "," +
               decimal_text(pressure_at(pressures, angle - trace_late_deg) + zero_off_bar + noise, 2) + "\n";
    }
    return csv;
}

} // namespace

std::vector<SampleFile> card_files(const Scenario& scenario, std::uint64_t seed, int engine,
                                   const std::vector<Sheet>& sheets)
{
    const EngineDesign& design = scenario.engines[static_cast<std::size_t>(engine)];
    const Chance weather(seed), chance(seed, scenario.scatter);
    constexpr double barometer_bar = 1.014; // the usual one; the cards were taken in fair weather
    std::vector<SampleFile> files;
    for (const Sheet& sheet : sheets)
        for (const MonthOf& wanted : scenario.cards) {
            if (wanted.engine != engine || wanted.reading != sheet.name)
                continue;
            const SheetInputs in = true_inputs(scenario, weather, chance, engine, sheet.name);
            for (int cylinder = 1; cylinder <= design.cylinders; ++cylinder) {
                const CardTarget target = target_of(in, sheet, cylinder, barometer_bar);
                files.push_back(
                    {design.folder + "/cards/" + sheet.name + "/" + std::to_string(cylinder) + ".csv",
                     trace_csv(card_pressures(design, target), chance, engine, cylinder,
                               month_number(sheet.name))});
            }
        }
    return files;
}

} // namespace evenstroke::sample
