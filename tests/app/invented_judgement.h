// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

#include <memory>

/// An invented engine and what the program would make of it, for tests of pages. All numbers are invented.
namespace evenstroke::invented {

struct Wishes
{
    int cylinders = 6;
    int readings = 37; ///< monthly
    bool drifting = true; ///< cylinder 4 loses compression in the last nine months and carries a watch
    bool engine_values = true;
};

/// Judged as if by the program: apart, deviations, evidence, one flag, one question, one cylinder learning.
std::shared_ptr<const Judgement> judgement(const Wishes& wishes = {});

} // namespace evenstroke::invented
