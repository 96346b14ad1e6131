// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/worker_run.h"

#include <QPointer>
#include <QThread>

namespace evenstroke {

WorkerRun::WorkerRun(QObject* parent) : QObject(parent)
{
    pool_.setMaxThreadCount(1);
    pool_.setThreadPriority(QThread::LowPriority);
}

WorkerRun::~WorkerRun()
{
    stop();
    pool_.waitForDone();
}

void WorkerRun::stop()
{
    if (stopped_)
        *stopped_ = true;
    stopped_.reset();
    pool_.clear();
}

void WorkerRun::begin(std::function<Delivery(const Told&)> work)
{
    stop();
    done_ = total_ = 0;
    const auto stopped = stopped_ = std::make_shared<std::atomic<bool>>(false);
    const QPointer<WorkerRun> self(this);
    pool_.start([self, stopped, work = std::move(work)] {
        const Delivery delivery = work([&](int done, int of) {
            QMetaObject::invokeMethod(self, [self, stopped, done, of] {
                if (!self || self->stopped_ != stopped)
                    return;
                self->done_ = done;
                self->total_ = of;
                emit self->progressed();
            }, Qt::QueuedConnection);
            return !*stopped;
        });
        QMetaObject::invokeMethod(self, [self, stopped, delivery] {
            if (!self || self->stopped_ != stopped)
                return;
            self->stopped_.reset();
            delivery();
        }, Qt::QueuedConnection);
    });
}

} // namespace evenstroke
