// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/drift_input.h"
#include "core/trend/judgement.h"

namespace evenstroke {

/// Gathers every performance quantity over time, the derived ones too, with its usual band and stretches.
void add_trends(Judgement& judgement, const std::vector<PreparedReading>& prepared,
                const drift::Input& input, const drift::Output& output);

/// Gives every trend its level of now, and the judgement the worst of them.
void set_levels(Judgement& judgement, const drift::Input& input, const drift::Output& output);

} // namespace evenstroke
