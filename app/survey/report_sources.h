// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/survey/survey_report.h"
#include "storage/history.h"

#include <memory>
#include <string>

namespace evenstroke {

/// What a survey report needs from the history, for page and command line alike.
struct ReportSources
{
    std::shared_ptr<const EngineRecord> record;
    ReportDetails details; ///< hashes, revisions and corrections filled in; date, number and names left to the caller
};

/// @par Problems not_found, storage
Result<ReportSources> load_report_sources(storage::History& history, const std::string& engine_id);

/// SHA-256, hexadecimal, over the readings as a readings.csv would hold them: one line a value,
/// `reading,taken_at,quantity,cylinder,value,unit`, in order of time and walking order, each ended by a line feed.
std::string data_set_hash(const EngineRecord& record);

} // namespace evenstroke
