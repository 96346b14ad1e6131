// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/judging.h"

#include "storage/engine_record.h"
#include "storage/history.h"
#include "storage/judgement_store.h"

#include <QtConcurrentRun>

#include <mutex>

namespace evenstroke {

/// What the worker threads share with the window's.
struct Judging::Shared
{
    std::atomic<bool> stopped{false};
    std::mutex mutex;
    QStringList waiting; ///< engines of the fleet still to be judged
};

namespace {

using HistoryPointer = std::unique_ptr<storage::History>;

Result<HistoryPointer> open_connection(const QString& path, bool writing)
{
    storage::HistorySettings settings;
    settings.automatic_backups = false; // the window's own connection has seen to them
    return storage::History::open(path, writing ? storage::OpenMode::read_write : storage::OpenMode::read_only,
                                  settings);
}

JudgingOutcome judge_engine(storage::History& history, const QString& engine_id, const std::atomic<bool>& stopped)
{
    JudgingOutcome outcome;
    outcome.engine_id = engine_id;
    const auto loaded = storage::load_record(history, engine_id.toStdString());
    if (!loaded) {
        outcome.problem = loaded.error();
        return outcome;
    }
    outcome.revision = loaded.value().input_revision;
    outcome.judgement =
        std::make_shared<const Judgement>(judge(loaded.value().record, [&stopped] { return !stopped; }));
    outcome.summary = summarise(*outcome.judgement);
    return outcome;
}

storage::StoredJudgement stored_form(const JudgingOutcome& outcome, TimePoint now)
{
    storage::StoredJudgement stored;
    stored.engine_id = outcome.engine_id.toStdString();
    stored.method_version = method_version;
    stored.input_revision = outcome.revision;
    stored.computed_at = now;
    stored.worst_level = static_cast<int>(outcome.judgement->level);
    stored.summary = pack(outcome.summary);
    return stored;
}

/// A summary that cannot be kept is made anew next time: nothing the user could do about it now.
void store(storage::History& history, std::vector<storage::StoredJudgement>& judgements)
{
    if (!judgements.empty())
        static_cast<void>(storage::JudgementStore(history).save_all(judgements).has_value());
    judgements.clear();
}

} // namespace

Judging::Judging(QString history_path, bool may_store, Deliver deliver, QObject* parent)
    : QObject(parent), path_(std::move(history_path)), may_store_(may_store), deliver_(std::move(deliver)),
      shared_(std::make_shared<Shared>())
{
    pool_.setMaxThreadCount(1);
    fleet_pool_.setMaxThreadCount(std::max(1, QThread::idealThreadCount()));
    fleet_pool_.setThreadPriority(QThread::LowPriority);
}

Judging::~Judging()
{
    stop();
    pool_.waitForDone();
    fleet_pool_.waitForDone();
}

void Judging::stop()
{
    stop_fleet();
    shared_->stopped = true;
}

void Judging::stop_fleet()
{
    {
        const std::lock_guard lock(shared_->mutex);
        shared_->waiting.clear();
    }
    fleet_done_ = fleet_total_ = 0;
    emit progress();
}

void Judging::ask(const QString& engine_id)
{
    if (asked_.contains(engine_id))
        return;
    asked_.append(engine_id);
    run_one(engine_id);
    emit progress();
}

void Judging::run_one(const QString& engine_id)
{
    static_cast<void>(QtConcurrent::run(&pool_, [this, run = shared_, engine_id, path = path_, keep = may_store_] {
        if (run->stopped)
            return;
        JudgingOutcome outcome;
        outcome.engine_id = engine_id;
        auto history = open_connection(path, keep);
        if (!history)
            outcome.problem = history.error();
        else
            outcome = judge_engine(*history.value(), engine_id, run->stopped);
        if (run->stopped)
            return;
        // The page first; keeping the summary may wait for another writer.
        QMetaObject::invokeMethod(this, [this, outcome] { take_delivery(outcome, false); },
                                  Qt::QueuedConnection);
        if (keep && outcome.judgement) {
            std::vector<storage::StoredJudgement> one{stored_form(outcome, history.value()->now())};
            store(*history.value(), one);
        }
    }));
}

void Judging::ask_all(const QStringList& engine_ids)
{
    if (engine_ids.isEmpty() || fleet_done_ < fleet_total_)
        return;
    fleet_done_ = 0;
    fleet_total_ = static_cast<int>(engine_ids.size());
    {
        const std::lock_guard lock(shared_->mutex);
        shared_->waiting = engine_ids;
    }
    const int workers = std::min(fleet_pool_.maxThreadCount(), fleet_total_);
    for (int i = 0; i < workers; ++i)
        run_fleet_worker();
    emit progress();
}

void Judging::run_fleet_worker()
{
    static_cast<void>(QtConcurrent::run(&fleet_pool_, [this, run = shared_, path = path_, keep = may_store_] {
        constexpr std::size_t kept_at_once = 16; // one transaction, one wait for the disk
        auto history = open_connection(path, keep);
        std::vector<storage::StoredJudgement> waiting_to_be_kept;
        while (!run->stopped) {
            QString engine_id;
            {
                const std::lock_guard lock(run->mutex);
                if (run->waiting.isEmpty())
                    break;
                engine_id = run->waiting.takeFirst();
            }
            JudgingOutcome outcome;
            outcome.engine_id = engine_id;
            if (history)
                outcome = judge_engine(*history.value(), engine_id, run->stopped);
            else
                outcome.problem = history.error();
            if (run->stopped)
                break;
            if (keep && outcome.judgement)
                waiting_to_be_kept.push_back(stored_form(outcome, history.value()->now()));
            if (waiting_to_be_kept.size() >= kept_at_once)
                store(*history.value(), waiting_to_be_kept);
            QMetaObject::invokeMethod(this, [this, outcome] { take_delivery(outcome, true); },
                                      Qt::QueuedConnection);
        }
        if (history)
            store(*history.value(), waiting_to_be_kept);
        QMetaObject::invokeMethod(this, [this] { emit fleet_finished(); }, Qt::QueuedConnection);
    }));
}

void Judging::take_delivery(const JudgingOutcome& outcome, bool of_fleet)
{
    if (of_fleet)
        fleet_done_ = std::min(fleet_done_ + 1, fleet_total_);
    else
        asked_.removeAll(outcome.engine_id);
    deliver_(outcome);
    emit progress();
}

} // namespace evenstroke
