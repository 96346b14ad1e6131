// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/slider_crank.h"

#include <cmath>
#include <cstddef>

namespace evenstroke {

/// The crank gear at evenly spaced angles, as a card has them: calls use(index, motion) for each. Sine and cosine are
/// worked out once in 32 samples and turned on from there (addition theorems), which costs a fraction and moves the last
/// digits only.
/// @param first, step [rad]
template <typename Use>
void follow_evenly(const SliderCrank& gear, double first, double step, std::size_t count, Use&& use)
{
    constexpr std::size_t afresh = 32;
    const double turn_sine = std::sin(step), turn_cosine = std::cos(step);
    double sine = 0.0, cosine = 1.0;
    for (std::size_t i = 0; i < count; ++i) {
        if (i % afresh == 0) {
            const double angle = first + static_cast<double>(i) * step;
            sine = std::sin(angle);
            cosine = std::cos(angle);
        } else {
            const double turned = sine * turn_cosine + cosine * turn_sine;
            cosine = cosine * turn_cosine - sine * turn_sine;
            sine = turned;
        }
        use(i, gear.motion(sine, cosine));
    }
}

} // namespace evenstroke
