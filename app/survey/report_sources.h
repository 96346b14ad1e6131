// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/survey/survey_report.h"
#include "storage/history.h"

#include <memory>
#include <string>
#include <vector>

namespace evenstroke {

/// What a survey report needs from the history, for page and command line alike.
struct ReportSources
{
    std::shared_ptr<const EngineRecord> record;
    ReportDetails details; ///< hashes, revisions, corrections, diagrams and changes filled in; date, number and names left to the caller
};

/// @par Problems not_found, storage
Result<ReportSources> load_report_sources(storage::History& history, const std::string& engine_id);

/// What the user wished for, with what the history says of itself.
ReportDetails with_found(ReportDetails wished, const ReportDetails& found);

/// SHA-256, hexadecimal, over the engine's own readings as a readings.csv holds them, the lines sorted by their
/// bytes: the report prints how it is made anew (core/survey, "Integrity of the data").
std::string data_set_hash(const Engine& engine, const std::vector<Reading>& own_readings);

} // namespace evenstroke
