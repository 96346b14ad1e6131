// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/baseline.h"
#include "core/trend/judgement.h"
#include "core/workings/workings.h"

namespace evenstroke {

/// The sheet of a typed value: as typed, in its own unit and kind, corrected, expected, deviation, apart.
Workings typed_workings(const Judgement& judgement, const Baseline& baseline, std::size_t reading,
                        const Quantity& quantity, Place place);

} // namespace evenstroke
