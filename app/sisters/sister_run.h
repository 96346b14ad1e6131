// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/worker_run.h"
#include "core/problem.h"
#include "core/trend/sister_engines.h"

#include <QString>

#include <memory>
#include <optional>
#include <vector>

namespace evenstroke {

/// An engine and its sisters in one history, compared.
struct SistersFound
{
    std::vector<std::shared_ptr<const Judgement>> engines; ///< the one that was asked for first, then by vessel and name
    SisterComparison comparison;
};

/// Looks for an engine's sisters in a history, judges them and compares them, with a connection of its own.
class SisterRun : public WorkerRun
{
    Q_OBJECT

public:
    using WorkerRun::WorkerRun;
    void start(const QString& history_path, const QString& engine_id);
    const std::shared_ptr<const SistersFound>& found() const { return found_; }
    const std::optional<Problem>& problem() const { return problem_; }

signals:
    void finished(); ///< `found` or `problem` is new

private:
    std::shared_ptr<const SistersFound> found_;
    std::optional<Problem> problem_;
};

} // namespace evenstroke
