// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/drift.h"
#include "core/trend/judgement.h"

namespace evenstroke {

/// Writes recorded work into the drift input: which stretches begin anew at which reading.
///
/// Work on a cylinder opens all its quantities; work on the whole engine all cylinders and the engine
/// level; a turbocharger or cooler the engine level. A changed or calibrated instrument opens what it reads,
/// or everything at its place where the event does not say which. Marks only (washing, fuel, notes) open nothing.
void mark_recorded_work(const EngineRecord& record, drift::Input& input);

} // namespace evenstroke
