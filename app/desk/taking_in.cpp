// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/taking_in.h"

#include <QtConcurrentRun>

namespace evenstroke {

TakingIn::TakingIn(QObject* parent) : QObject(parent)
{
    connect(&watcher_, &QFutureWatcher<Outcome>::finished, this, &TakingIn::take_result);
}

TakingIn::~TakingIn()
{
    stop();
    watcher_.waitForFinished();
}

bool TakingIn::running() const { return watcher_.isRunning(); }

void TakingIn::start(const QString& history_path, const QStringList& folders)
{
    if (running())
        return;
    stopped_ = false;
    report_.reset();
    problem_.reset();
    watcher_.setFuture(QtConcurrent::run([this, history_path, folders] {
        storage::HistorySettings settings;
        settings.automatic_backups = false; // the window's own connection has seen to them
        auto history = storage::History::open(history_path, storage::OpenMode::read_write, settings);
        if (!history)
            return std::make_shared<Result<storage::TakeReport>>(history.error());
        storage::TakeOptions options;
        options.progress = [this](qint64 done, qint64 total) {
            QMetaObject::invokeMethod(this, [this, done, total] { emit progress(done, total); }, Qt::QueuedConnection);
            return !stopped_;
        };
        return std::make_shared<Result<storage::TakeReport>>(storage::take(*history.value(), folders, options));
    }));
}

void TakingIn::take_result()
{
    const Outcome outcome = watcher_.result();
    if (outcome->has_value())
        report_ = outcome->value();
    else
        problem_ = outcome->error();
    emit finished();
}

} // namespace evenstroke
