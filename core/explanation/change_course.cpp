// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/change_course.h"

#include <cmath>

namespace evenstroke {
bool moved_clearly(const Change& change)
{
    return std::abs(change.amount) >= 1.5 && std::abs(change.amount) >= 3.0 * change.error;
}

bool looks_like_work(const ChangeWindow& window)
{
    std::size_t better = 0;
    for (std::size_t k = 0; k < window.changes.size(); ++k) {
        if (!window.changes[k] || !moved_clearly(*window.changes[k]) || fault_quantities()[k].read_as.empty())
            continue;
        if (window.changes[k]->amount * fault_quantities()[k].after_work <= 0.0)
            return false;
        ++better;
    }
    return !window.ramp && better >= 2;
}

} // namespace evenstroke
