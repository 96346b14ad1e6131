// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"
#include "storage/history.h"

namespace evenstroke::storage {

/// Everything the judging needs about one engine, with the revision of what was read: keep it with the
/// judgement and compare later.
struct LoadedRecord
{
    std::shared_ptr<const EngineRecord> record;
    qint64 input_revision = 0;
};
Result<LoadedRecord> load_record(History& history, const std::string& engine_id);

} // namespace evenstroke::storage
