// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/detection/detection_run.h"

namespace evenstroke {

void DetectionRun::start(const simulation::Likeness& likeness, const simulation::Effort& effort)
{
    begin([this, likeness, effort](const Told& tell) -> Delivery {
        const auto power = measure_detection_power(likeness, effort, [&](std::size_t done, std::size_t of) {
            return tell(static_cast<int>(done), static_cast<int>(of));
        });
        return [this, power] {
            if (power)
                emit finished(*power);
            else
                emit progressed();
        };
    });
}

} // namespace evenstroke
