// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <algorithm>
#include <ctime>

namespace evenstroke {

/// Of this program, so that what else the machine does counts little.
inline double processor_ms()
{
    timespec time{};
    clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &time);
    return static_cast<double>(time.tv_sec) * 1e3 + static_cast<double>(time.tv_nsec) * 1e-6;
}

template <typename Work> double best_of(int runs, const Work& work)
{
    double best = 1e300;
    for (int run = 0; run < runs; ++run) {
        const double start = processor_ms();
        work();
        best = std::min(best, processor_ms() - start);
    }
    return best;
}

} // namespace evenstroke
