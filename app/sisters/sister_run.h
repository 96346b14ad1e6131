// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/trend/sister_engines.h"

#include <QObject>
#include <QString>
#include <QThreadPool>

#include <atomic>
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

/// Looks for an engine's sisters in a history, judges them and compares them, on a worker thread with a connection of
/// its own. Only the newest question is answered.
class SisterRun : public QObject
{
    Q_OBJECT

public:
    explicit SisterRun(QObject* parent = nullptr);
    ~SisterRun() override;

    void start(const QString& history_path, const QString& engine_id);
    void stop();
    bool busy() const { return stopped_ != nullptr; }
    int done() const { return done_; }
    int total() const { return total_; }
    const std::shared_ptr<const SistersFound>& found() const { return found_; }
    const std::optional<Problem>& problem() const { return problem_; }

signals:
    void progressed();
    void finished(); ///< `found` or `problem` is new

private:
    std::shared_ptr<std::atomic<bool>> stopped_;
    int done_ = 0, total_ = 0;
    std::shared_ptr<const SistersFound> found_;
    std::optional<Problem> problem_;
    QThreadPool pool_;
};

} // namespace evenstroke
