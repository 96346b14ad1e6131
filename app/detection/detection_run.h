// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/simulation/detection_power.h"

#include <QObject>
#include <QThreadPool>

#include <atomic>
#include <memory>
#include <optional>

namespace evenstroke {

/// Simulates engines like one on a worker thread. Only the newest run is answered.
class DetectionRun : public QObject
{
    Q_OBJECT

public:
    explicit DetectionRun(QObject* parent = nullptr);
    ~DetectionRun() override;

    void start(const simulation::Likeness& likeness, const simulation::Effort& effort);
    void stop();
    bool busy() const { return stopped_ != nullptr; }
    int done() const { return done_; }
    int total() const { return total_; }

signals:
    void progressed();
    void finished(const evenstroke::simulation::DetectionPower& power);

private:
    void take_progress(int done, int total);
    void take_result(const std::optional<simulation::DetectionPower>& power);

    std::shared_ptr<std::atomic<bool>> stopped_; ///< of the run in hand; null: none
    int done_ = 0, total_ = 0;
    QThreadPool pool_;
};

} // namespace evenstroke
