// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/sample_vessel.h"

#include "sample_vessel/card_files.h"
#include "sample_vessel/file_writer.h"
#include "sample_vessel/reading_maker.h"
#include "sample_vessel/sample_files.h"

#include <algorithm>

namespace evenstroke::sample {
namespace {

std::string cylinder_text(int cylinder)
{
    return cylinder == 0 ? std::string() : std::to_string(cylinder);
}

void add_typing_error(SampleTruth& truth, const Scenario& scenario, const TypingError& error)
{
    const std::string& engine = scenario.engines[static_cast<std::size_t>(error.engine)].name;
    truth.typing_errors.push_back({scenario.vessel, engine, error.reading, error.quantity,
                                   cylinder_text(error.cylinder), verdict_of(error.slip)});
    if (error.slip == Slip::cylinders_swapped)
        truth.typing_errors.push_back({scenario.vessel, engine, error.reading, error.quantity,
                                       cylinder_text(error.other_cylinder), verdict_of(error.slip)});
}

} // namespace

std::vector<SampleFile> make_files(const Scenario& scenario, std::uint64_t seed)
{
    std::vector<SampleFile> files;
    for (const EngineDesign& engine : scenario.engines) {
        files.push_back({engine.folder + "/engine.json", engine_json(scenario, engine)});
        files.push_back({engine.folder + "/events.csv", events_csv(scenario, engine.number)});
        const std::vector<Sheet> sheets = engine_sheets(scenario, seed, engine.number);
        files.push_back({engine.folder + "/readings.csv", readings_csv(sheets)});
        for (SampleFile& card : card_files(scenario, seed, engine.number, sheets))
            files.push_back(std::move(card));
    }
    files.push_back({"ship_readings.csv", ship_readings_csv(ship_sheets(scenario, seed))});
    std::sort(files.begin(), files.end(),
              [](const SampleFile& a, const SampleFile& b) { return a.relative_path < b.relative_path; });
    return files;
}

std::vector<SampleFile> make_sample_vessel(std::uint64_t seed)
{
    return make_files(sample_scenario(), seed);
}

SampleTruth sample_truth()
{
    const Scenario scenario = sample_scenario();
    SampleTruth truth;
    for (const Fault& fault : scenario.faults)
        truth.faults.push_back({scenario.vessel,
                                scenario.engines[static_cast<std::size_t>(fault.engine)].name, fault.cylinder,
                                fault.cause, fault.onset});
    for (const TypingError& error : scenario.typing_errors)
        add_typing_error(truth, scenario, error);
    for (const MonthOf& one : scenario.unsteady)
        truth.unsteady.push_back(
            {scenario.vessel, scenario.engines[static_cast<std::size_t>(one.engine)].name, one.reading});
    return truth;
}

} // namespace evenstroke::sample
