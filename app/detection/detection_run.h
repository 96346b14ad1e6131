// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/worker_run.h"
#include "core/simulation/detection_power.h"

namespace evenstroke {

/// Simulates engines like one.
class DetectionRun : public WorkerRun
{
    Q_OBJECT

public:
    using WorkerRun::WorkerRun;
    void start(const simulation::Likeness& likeness, const simulation::Effort& effort);

signals:
    void finished(const evenstroke::simulation::DetectionPower& power);
};

} // namespace evenstroke
