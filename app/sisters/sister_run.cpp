// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/sisters/sister_run.h"

#include "storage/engine_record.h"
#include "storage/history.h"
#include "storage/vessel_store.h"

#include <algorithm>
#include <functional>

namespace evenstroke {
namespace {

using Told = std::function<bool(int done, int of)>; ///< false: nobody wants to know any more

/// Ids of the engine itself and its sisters, by vessel and name.
Result<std::vector<std::string>> find_sisters(storage::History& history, const std::string& engine_id)
{
    const storage::VesselStore vessels(history);
    const auto own = vessels.engine(engine_id);
    if (!own)
        return own.error();
    const auto entries = vessels.engines();
    if (!entries)
        return entries.error();
    std::vector<std::string> ids{engine_id};
    for (const storage::EngineEntry& entry : entries.value()) {
        if (entry.id == engine_id)
            continue;
        const auto other = vessels.engine(entry.id);
        if (other && are_sisters(own.value().engine, other.value().engine))
            ids.push_back(entry.id);
    }
    return ids;
}

Result<std::shared_ptr<const SistersFound>> compare(const QString& path, const std::string& engine_id, const Told& tell)
{
    const auto history = storage::History::open(path, storage::OpenMode::read_only);
    if (!history)
        return history.error();
    const auto ids = find_sisters(*history.value(), engine_id);
    if (!ids)
        return ids.error();
    auto found = std::make_shared<SistersFound>();
    for (const std::string& id : ids.value()) {
        if (!tell(static_cast<int>(found->engines.size()), static_cast<int>(ids.value().size())))
            return std::shared_ptr<const SistersFound>();
        const auto record = storage::load_record(*history.value(), id);
        if (!record)
            return record.error();
        found->engines.push_back(std::make_shared<const Judgement>(judge(record.value().record)));
    }
    found->comparison = compare_sisters(found->engines);
    return std::shared_ptr<const SistersFound>(std::move(found));
}

} // namespace

void SisterRun::start(const QString& history_path, const QString& engine_id)
{
    found_.reset();
    problem_.reset();
    begin([this, history_path, engine_id](const Told& tell) -> Delivery {
        const auto answer = compare(history_path, engine_id.toStdString(), tell);
        return [this, answer] {
            found_ = answer.has_value() ? answer.value() : nullptr;
            problem_ = answer.has_value() ? std::nullopt : std::optional<Problem>(answer.error());
            emit finished();
        };
    });
}

} // namespace evenstroke
