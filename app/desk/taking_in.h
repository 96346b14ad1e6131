// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/take_in.h"

#include <QFutureWatcher>
#include <QObject>
#include <QStringList>

#include <atomic>
#include <memory>
#include <optional>

namespace evenstroke {

/// Takes folders of files into a history on a worker thread; stopped half way, the history is as it was.
class TakingIn : public QObject
{
    Q_OBJECT

public:
    explicit TakingIn(QObject* parent = nullptr);
    ~TakingIn() override;
    void start(const QString& history_path, const QStringList& folders);
    void stop() { stopped_ = true; }
    bool running() const;
    /// Of the last run; exactly one of the two is there when it has finished.
    const std::optional<storage::TakeReport>& report() const { return report_; }
    const std::optional<Problem>& problem() const { return problem_; }

signals:
    void progress(qint64 done, qint64 total);
    void finished();

private:
    void take_result();
    std::atomic<bool> stopped_{false};
    std::optional<storage::TakeReport> report_;
    std::optional<Problem> problem_;
    using Outcome = std::shared_ptr<Result<storage::TakeReport>>;
    QFutureWatcher<Outcome> watcher_;
};

} // namespace evenstroke
