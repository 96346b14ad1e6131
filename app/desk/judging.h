// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/fleet/fleet_summary.h"
#include "core/problem.h"
#include "core/trend/judgement.h"

#include <QObject>
#include <QString>
#include <QStringList>
#include <QThreadPool>

#include <atomic>
#include <functional>
#include <memory>
#include <optional>

namespace evenstroke {

/// What came of judging one engine.
struct JudgingOutcome
{
    QString engine_id;
    qint64 revision = 0; ///< of the engine's readings and events when they were read
    std::shared_ptr<const Judgement> judgement; ///< null: see `problem`
    FleetSummary summary;
    std::optional<Problem> problem;
};

/// Judges engines on worker threads, each with a connection of its own, keeps the summaries in the history,
/// and hands the outcome to the thread this object lives on. Nothing is delivered once it is gone.
class Judging : public QObject
{
    Q_OBJECT

public:
    using Deliver = std::function<void(const JudgingOutcome&)>;
    /// @param may_store  false for a history that can only be read
    Judging(QString history_path, bool may_store, Deliver deliver, QObject* parent = nullptr);
    ~Judging() override;

    /// Asked for by a page: goes before the fleet. Asking twice does no harm.
    void ask(const QString& engine_id);
    bool busy_with(const QString& engine_id) const { return asked_.contains(engine_id); }
    /// Engine after engine in the background.
    void ask_all(const QStringList& engine_ids);
    /// The engines still waiting are left as they are; a page's own question is always answered.
    void stop_fleet();
    bool busy() const { return !asked_.isEmpty() || fleet_done_ < fleet_total_; }
    int fleet_done() const { return fleet_done_; }
    int fleet_total() const { return fleet_total_; }

signals:
    void progress();
    void fleet_finished();

private:
    struct Shared;
    void stop();
    void run_one(const QString& engine_id);
    void run_fleet_worker();
    void take_delivery(const JudgingOutcome& outcome, bool of_fleet);

    QString path_;
    bool may_store_;
    Deliver deliver_;
    QThreadPool pool_, fleet_pool_;
    std::shared_ptr<Shared> shared_;
    QStringList asked_, fleet_;
    int fleet_done_ = 0, fleet_total_ = 0;
};

} // namespace evenstroke
