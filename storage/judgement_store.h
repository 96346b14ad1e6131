// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"

#include <QByteArray>

#include <string>
#include <vector>

namespace evenstroke::storage {

/// A judgement kept so that a page opens without computing. What is inside is the caller's business.
struct StoredJudgement
{
    std::string engine_id;
    int method_version = 0;
    qint64 input_revision = 0; ///< of the engine when it was read
    TimePoint computed_at{};
    int worst_level = 0; ///< the caller's numbering
    QByteArray summary;  ///< little: what the fleet page shows
    QByteArray detail;   ///< the whole; may be empty
};

struct JudgementEntry
{
    std::string engine_id, engine_name, vessel_id, vessel_name;
    bool stored = false;       ///< false: nothing kept yet, the rest is empty
    bool current = false;      ///< of this method version and of the engine's present revision
    StoredJudgement judgement; ///< without `detail`
};

class JudgementStore
{
public:
    explicit JudgementStore(History& history) : history_(history) {}

    /// One line for every engine of the history, ordered by vessel and engine.
    Result<std::vector<JudgementEntry>> all(int method_version) const;
    Result<std::vector<std::string>> stale_engines(int method_version) const;
    /// @par Problems not_found
    Result<StoredJudgement> load(const std::string& engine_id) const;
    Done save(const StoredJudgement& judgement);
    Done save_all(const std::vector<StoredJudgement>& judgements); ///< in one transaction

private:
    History& history_;
};

} // namespace evenstroke::storage
