// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/detection/detection_run.h"

#include <QPointer>
#include <QThread>

namespace evenstroke {

DetectionRun::DetectionRun(QObject* parent) : QObject(parent)
{
    pool_.setMaxThreadCount(1);
    pool_.setThreadPriority(QThread::LowPriority);
}

DetectionRun::~DetectionRun()
{
    stop();
    pool_.waitForDone();
}

void DetectionRun::start(const simulation::Likeness& likeness, const simulation::Effort& effort)
{
    stop();
    done_ = total_ = 0;
    const auto stopped = stopped_ = std::make_shared<std::atomic<bool>>(false);
    const QPointer<DetectionRun> self(this);
    pool_.start([self, stopped, likeness, effort] {
        const auto power = measure_detection_power(likeness, effort, [&](std::size_t done, std::size_t of) {
            QMetaObject::invokeMethod(self, [self, stopped, done, of] {
                if (self && self->stopped_ == stopped)
                    self->take_progress(static_cast<int>(done), static_cast<int>(of));
            }, Qt::QueuedConnection);
            return !*stopped;
        });
        QMetaObject::invokeMethod(self, [self, stopped, power] {
            if (self && self->stopped_ == stopped)
                self->take_result(power);
        }, Qt::QueuedConnection);
    });
}

void DetectionRun::stop()
{
    if (stopped_)
        *stopped_ = true;
    stopped_.reset();
    pool_.clear();
}

void DetectionRun::take_progress(int done, int total)
{
    done_ = done;
    total_ = total;
    emit progressed();
}

void DetectionRun::take_result(const std::optional<simulation::DetectionPower>& power)
{
    stopped_.reset();
    if (power)
        emit finished(*power);
    else
        emit progressed();
}

} // namespace evenstroke
